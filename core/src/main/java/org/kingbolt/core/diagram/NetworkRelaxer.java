package org.kingbolt.core.diagram;

import java.util.ArrayList;
import java.util.List;
import org.jspecify.annotations.Nullable;

/**
 * Replaces the networks of a structure that are too wide to sweep by others that can be worked out,
 * all of which work less often, or all of which work more often, and which come nearer step by
 * step.
 *
 * <p>The structure is expressed anew for each side and after each step; its networks must come in
 * the same order every time. For one thread.
 */
public final class NetworkRelaxer {

  private final double[] working;
  private final double[] failing;
  private final List<NetworkEnclosure> networks = new ArrayList<>();
  private boolean lessWorking;
  private boolean monotone;
  private int next;
  private boolean busy;

  /** Of the expression begun last, as far as networks had to be made known. */
  private @Nullable Estimates estimates;

  /**
   * Starts with nothing known of any network.
   *
   * @param working indexed by variable
   * @param failing indexed by variable: the complement
   */
  public NetworkRelaxer(double[] working, double[] failing) {
    this.working = working;
    this.failing = failing;
  }

  /**
   * Makes ready for a structure to be expressed.
   *
   * @param newLessWorking whether what is expressed is to work at most as often as the structure,
   *     or at least as often
   * @return this
   */
  public NetworkRelaxer begin(boolean newLessWorking) {
    lessWorking = newLessWorking;
    monotone = false;
    estimates = null;
    next = 0;
    return this;
  }

  /**
   * The same, with what is itself monotone only: a network that follows its likeliest states may
   * fail where one of its parts works, while the network itself would not.
   *
   * @param newLessWorking as in {@link #begin}
   * @return this
   */
  public NetworkRelaxer beginMonotone(boolean newLessWorking) {
    begin(newLessWorking);
    monotone = true;
    return this;
  }

  /**
   * Takes one step with the network of which least is known; networks come to be known as the
   * structure is first expressed.
   *
   * @param effort how many nodes may be held, in general
   * @param most how many nodes may be held at all
   * @param meter hears of the work
   * @return whether another step of this size may help
   */
  public boolean step(long effort, long most, WorkMeter meter) {
    List<NetworkEnclosure> open = new ArrayList<>(networks);
    open.removeIf(NetworkEnclosure::isExact);
    open.sort((a, b) -> Double.compare(b.gap(), a.gap()));
    for (NetworkEnclosure network : open) {
      if (network.step(effort, most, meter)) {
        return true;
      }
    }
    return false;
  }

  /**
   * Counts how often what replaces a network has changed.
   *
   * @return a number that stays the same as long as an expression would be the same
   */
  public int changes() {
    return networks.stream().mapToInt(NetworkEnclosure::changes).sum();
  }

  /**
   * Tells whether every network met so far is used as it is.
   *
   * @return true when nothing is relaxed
   */
  public boolean isExact() {
    return networks.stream().allMatch(NetworkEnclosure::isExact);
  }

  boolean isBusy() {
    return busy;
  }

  int sweep(Composer composer, NetworkProblem network, boolean dual, int[] parts, WorkMeter meter) {
    if (next == networks.size()) {
      Estimates known = estimates;
      if (known == null) {
        known = new Estimates(composer, working, failing, meter);
        estimates = known;
      }
      double[] works = known.works(parts);
      double[] fails = known.fails(parts);
      networks.add(
          new NetworkEnclosure(network, dual ? fails : works, dual ? works : fails, meter));
    }
    busy = true;
    int expression =
        networks.get(next++).express(composer, lessWorking != dual, monotone, dual, parts, meter);
    busy = false;
    return expression;
  }
}
