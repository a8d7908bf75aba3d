package org.kingbolt.docs;

import org.kingbolt.core.NetworkBuilder;
import org.kingbolt.core.Probabilities;
import org.kingbolt.core.Probability;
import org.kingbolt.core.Structure;
import org.kingbolt.docs.ReviewPage.Section;

/**
 * A meshed power network: the 20 branches of the IEEE 14-bus test case, reviewed for two questions.
 *
 * <p>The topology is published (from memory); that every branch fails with probability 0.01 is
 * assumed for this example, and that buses do not fail. A branch is named by the two buses it
 * joins, such as {@code 1-2}. The pages show connection only, not whether lines can carry the load.
 */
public final class Ieee14Review {

  private static final double BRANCH_FAILS = 0.01;

  private Ieee14Review() {}

  /**
   * Prints both review pages.
   *
   * @param args not used
   */
  public static void main(String[] args) {
    System.out.print(page());
  }

  /**
   * Makes both review pages.
   *
   * @return their text, one after the other
   */
  public static String page() {
    return page("IEEE 14-bus test case: is bus 14 connected to bus 1?", busOneToFourteen())
        + "\n\n"
        + page("IEEE 14-bus test case: are all buses connected?", allBuses());
  }

  private static String page(String title, Structure structure) {
    return ReviewPage.of(title, structure, failing())
        .showing(
            Section.STRUCTURE,
            Section.RELIABILITY,
            Section.SMALLEST_CUT_SETS,
            Section.LIKELIEST_CUT_SETS,
            Section.INTERVAL,
            Section.BIRNBAUM,
            Section.ADVICE)
        .toString();
  }

  /**
   * Asks for a way from bus 1 to bus 14.
   *
   * @return the structure
   */
  public static Structure busOneToFourteen() {
    return network().connecting("1", "14");
  }

  /**
   * Asks for the connection of all buses.
   *
   * @return the structure
   */
  public static Structure allBuses() {
    return network().connectingAll();
  }

  /**
   * Gives the assumed failing probability of the branches.
   *
   * @return the register
   */
  public static Probabilities failing() {
    return Probabilities.all(Probability.failing(BRANCH_FAILS));
  }

  private static NetworkBuilder network() {
    NetworkBuilder network = Structure.network();
    for (String line : Resources.text("ieee14.txt").lines().toList()) {
      if (!line.isBlank() && !line.startsWith("#")) {
        String[] buses = line.strip().split("\\s+", -1);
        network.link(buses[0] + "-" + buses[1], buses[0], buses[1]);
      }
    }
    return network;
  }
}
