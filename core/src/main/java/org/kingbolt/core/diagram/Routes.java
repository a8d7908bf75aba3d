package org.kingbolt.core.diagram;

import java.util.List;
import java.util.function.Predicate;

/** The finders of path sets, one kind for each way of describing a function. */
public final class Routes {

  private Routes() {}

  /**
   * Path sets that are listed beforehand.
   *
   * @param sets path sets as slots in increasing order, among them all minimal ones
   * @return finds the one with the fewest slots that are not free
   */
  public static RouteFinder listed(List<int[]> sets) {
    return new ListedRoutes(sets);
  }

  /**
   * Path sets of a threshold on a sum of weights.
   *
   * @param demand works while the weights of working slots add up to it
   * @param weights of the slots, at least 0, with a sum that fits
   * @return finds the heaviest slots besides those that are free
   */
  public static RouteFinder capacity(long demand, long[] weights) {
    return new CapacityRoutes(demand, weights);
  }

  /**
   * Routes through a network, split by the first target that is not reached.
   *
   * @param problem the network
   * @return one finder a target: it takes the source and all targets of the finders before it as
   *     connected, with nodes that work, and looks for routes from any of these to its own target.
   *     The network fails in a state exactly when the function of some finder does. Targets close
   *     to the source come first.
   */
  public static List<RouteFinder> network(NetworkProblem problem) {
    return NetworkRoutes.of(problem);
  }

  /**
   * Barriers in a network, which are the path sets of its dual.
   *
   * @param problem the network, not its dual
   * @return finds barriers close to what the source reaches
   */
  public static RouteFinder barriers(NetworkProblem problem) {
    return new NetworkBarriers(problem);
  }

  /**
   * Path sets of an operator some of whose slots hold the same variable.
   *
   * @param slots the operator's own finder
   * @param variable of each slot, from 0 up
   * @return finds variables
   */
  public static RouteFinder joined(RouteFinder slots, int[] variable) {
    return new JoinedRoutes(slots, variable);
  }

  /**
   * Path sets of a monotone function that can only be asked.
   *
   * @param slots the number of slots
   * @param works the function, given which slots work; it must not keep or change the array
   * @return takes away what is not needed; see there for the number of questions
   */
  public static RouteFinder asked(int slots, Predicate<boolean[]> works) {
    return new ShrinkingRoutes(slots, works);
  }
}
