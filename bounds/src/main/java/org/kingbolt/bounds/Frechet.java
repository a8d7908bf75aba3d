package org.kingbolt.bounds;

import java.util.Optional;
import org.kingbolt.core.Budget;
import org.kingbolt.core.Probability;
import org.kingbolt.core.diagram.WorkMeter;

/** Fréchet bounds: a path fails only if a member does, a cut holds only if a member works. */
final class Frechet {

  private Frechet() {}

  static Interval of(Families families, Budget budget, Effort effort) {
    WorkMeter meter = budget.start("searching the best path and the worst cut");
    effort.add(2);
    Probability fails = notAnyAbove(families, true, meter);
    Probability works = notAnyAbove(families, false, meter);
    return new Interval(
        fails.complement(),
        works,
        Assumption.NONE,
        "Frechet",
        "whatever the dependence, the system fails at most as often as the members of its best path"
            + " do in sum, and works at most as often as the members of its worst cut do in sum"
            + trivial(fails, "; lower end")
            + trivial(works, "; upper end"));
  }

  private static String trivial(Probability most, String end) {
    return most.equals(Probability.CERTAIN) ? end + " trivial, since no such sum is below 1" : "";
  }

  /**
   * No smaller than the probability that no set of a family occurs: the least sum of the
   * probabilities that a member of a set does not, or 1 where that is not below 1.
   */
  static Probability notAnyAbove(Families families, boolean paths, WorkMeter meter) {
    double[] fails = families.values.fails(paths);
    Optional<int[]> lightest = families.lightest(paths, fails, meter);
    if (lightest.isEmpty()) {
      return Probability.CERTAIN;
    }
    int[] set = lightest.get();
    if (set.length == 0) {
      return Probability.IMPOSSIBLE;
    }
    int largest = set[0];
    double sum = 0;
    for (int member : set) {
      sum += fails[member];
      largest = fails[member] > fails[largest] ? member : largest;
    }
    double others = 0;
    for (int member : set) {
      others += member == largest ? 0 : fails[member];
    }
    double share = Rounding.share(set.length + families.values.slack());
    double occurs = families.values.occurs(paths)[largest];
    return Rounding.above(sum, sum * share, occurs - others, occurs * share);
  }
}
