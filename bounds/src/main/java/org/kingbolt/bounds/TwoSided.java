package org.kingbolt.bounds;

import java.util.ArrayList;
import java.util.List;
import java.util.function.Function;
import org.kingbolt.core.BudgetExceededException;
import org.kingbolt.core.Probability;

/**
 * Makes an interval of what the cut sets tell and what the path sets tell. Where one family is too
 * large for the budget the other one stands alone.
 */
final class TwoSided {

  private static final UnionBounds NOTHING =
      new UnionBounds(
          Probability.IMPOSSIBLE,
          Probability.CERTAIN,
          "which are too many for the budget",
          "which are too many for the budget");

  private final List<BudgetExceededException> failures = new ArrayList<>();

  private TwoSided() {}

  static Interval of(
      String method,
      Assumption assumption,
      String reason,
      Function<Boolean, UnionBounds> ofFamily) {
    TwoSided attempts = new TwoSided();
    UnionBounds cuts = attempts.attempt(ofFamily, false);
    UnionBounds paths = attempts.attempt(ofFamily, true);
    if (attempts.failures.size() == 2) {
      throw attempts.failures.get(0);
    }
    Probability lowerByCuts = cuts.upper().complement();
    Probability upperByCuts = cuts.lower().complement();
    boolean lowerIsOfCuts = lowerByCuts.compareTo(paths.lower()) >= 0;
    boolean upperIsOfCuts = upperByCuts.compareTo(paths.upper()) < 0;
    return new Interval(
        lowerIsOfCuts ? lowerByCuts : paths.lower(),
        upperIsOfCuts ? upperByCuts : paths.upper(),
        assumption,
        method,
        reason
            + "; lower end from "
            + (lowerIsOfCuts ? "cut sets, " + cuts.upperWhy() : "path sets, " + paths.lowerWhy())
            + "; upper end from "
            + (upperIsOfCuts ? "cut sets, " + cuts.lowerWhy() : "path sets, " + paths.upperWhy()));
  }

  private UnionBounds attempt(Function<Boolean, UnionBounds> ofFamily, boolean paths) {
    try {
      return ofFamily.apply(paths);
    } catch (BudgetExceededException over) {
      if (over.limit() == BudgetExceededException.Limit.INTERRUPT) {
        throw over;
      }
      failures.add(over);
      return NOTHING;
    }
  }
}
