package org.kingbolt.core.diagram;

/**
 * Builds the template of a network by sweeping a frontier across it, link by link, never listing
 * its paths.
 *
 * <p>Source: Hardy, Lucet &amp; Limnios, K-terminal network reliability measures with binary
 * decision diagrams, IEEE Trans. Reliab. 56 (2007) 506. Cost: proportional to the number of
 * distinct frontier states, which grows exponentially with the width of the network and linearly
 * with its length.
 */
public final class FrontierSweep {

  private FrontierSweep() {}

  /**
   * Builds a network's template.
   *
   * @param problem the network; source and targets connected when everything works
   * @param meter hears of every state
   * @return a template over the network's slots; slots of parts that are not connected with the
   *     source do not occur in its order
   * @throws FrontierTooWideException if no order was found whose states can be packed
   */
  public static Diagram template(NetworkProblem problem, WorkMeter meter) {
    return StateSweep.template(new FrontierPlan(problem, meter).rule(), meter);
  }
}
