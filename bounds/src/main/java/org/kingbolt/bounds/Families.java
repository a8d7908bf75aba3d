package org.kingbolt.bounds;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.function.Consumer;
import org.kingbolt.core.Budget;
import org.kingbolt.core.diagram.WorkMeter;

/**
 * Path sets and cut sets at given probabilities, as far as they are known. A set is an event: that
 * all members of a path set work, or that all members of a cut set have failed.
 */
abstract class Families {

  final ComponentValues values;

  Families(ComponentValues values) {
    this.values = values;
  }

  /** Hands over the sets one by one, as indices of components. */
  abstract void forEach(boolean paths, WorkMeter meter, Consumer<int[]> action);

  /**
   * A set with the least sum of its members' weights; of a structure that could not be compiled,
   * any set.
   *
   * @param weights one for every component, at least 0
   * @return the members, none of a system that always works, or always fails; or no set, where none
   *     is known
   */
  abstract Optional<int[]> lightest(boolean paths, double[] weights, WorkMeter meter);

  /** Throws what kept the structure from being compiled, if anything did. */
  void requireLightest() {}

  /** No smaller than the probability that any set that is not handed over occurs; 1 if unknown. */
  abstract double discarded(boolean paths);

  /** All sets that can occur, in a list; every member counts as a twelfth of a node. */
  final List<int[]> possible(boolean paths, Budget budget, Effort effort) {
    WorkMeter meter = budget.start("listing the sets of a family");
    double[] occurs = values.occurs(paths);
    List<int[]> sets = new ArrayList<>();
    long[] held = new long[1];
    forEach(
        paths,
        meter,
        set -> {
          boolean can = true;
          for (int member : set) {
            can &= occurs[member] > 0;
          }
          held[0] += 1 + (set.length >> 3);
          meter.at(held[0]);
          effort.add(1);
          if (can) {
            sets.add(set);
          }
        });
    return sets;
  }

  /** A set that is most likely to occur, by the sum of its members' logarithms. */
  final Optional<int[]> mostProbable(boolean paths, WorkMeter meter) {
    double[] occurs = values.occurs(paths);
    double[] fails = values.fails(paths);
    double[] weights = new double[occurs.length];
    for (int i = 0; i < weights.length; i++) {
      weights[i] = fails[i] < 0.5 ? -Math.log1p(-fails[i]) : -Math.log(occurs[i]);
      // of sets that cannot occur, those with the fewest members that never do
      weights[i] = Math.min(weights[i], 1e9);
    }
    return lightest(paths, weights, meter);
  }
}
