package org.kingbolt.docs;

import java.util.LinkedHashMap;
import java.util.Map;
import org.kingbolt.core.Probabilities;
import org.kingbolt.core.Structure;

/**
 * The main job from end to end: a water-pumping station, read from its text description, becomes a
 * review page.
 *
 * <p>The station has one intake and one rising main, two pumps with drives, two-of-three filters, a
 * switchyard with a bus tie that is neither series nor parallel, and a control supply that pumps
 * and a filter share. Station and figures are invented.
 */
public final class StationReview {

  private StationReview() {}

  /**
   * Prints the review page.
   *
   * @param args not used
   */
  public static void main(String[] args) {
    System.out.print(page());
  }

  /**
   * Makes the review page.
   *
   * @return its text
   */
  public static String page() {
    return ReviewPage.of("Pumping station: will it deliver on demand?", station(), failing())
        .toString();
  }

  /**
   * Reads the station's description.
   *
   * @return the structure
   */
  public static Structure station() {
    return Structure.parse(Resources.text("station.txt"));
  }

  /**
   * Reads the station's failing probabilities.
   *
   * @return the register
   */
  public static Probabilities failing() {
    Map<String, Double> failing = new LinkedHashMap<>();
    for (String line : Resources.text("station-failing.txt").lines().toList()) {
      if (!line.isBlank() && !line.startsWith("#")) {
        String[] words = line.strip().split("\\s+", -1);
        failing.put(words[0], Double.valueOf(words[1]));
      }
    }
    return Probabilities.failing(failing);
  }
}
