package org.kingbolt.bounds;

import org.kingbolt.core.Budget;
import org.kingbolt.core.Probability;

/** Min-max bounds: the best single path and the worst single cut. */
final class MinMax {

  private MinMax() {}

  static Interval of(Families families, Budget budget, Effort effort) {
    return new Interval(
        lower(families, budget, effort),
        upper(families, budget, effort),
        Assumption.ASSOCIATED,
        "min-max",
        "with associated components the system works at least as often as its best path, and fails"
            + " at least as often as its worst cut, would with independent members");
  }

  static Probability lower(Families families, Budget budget, Effort effort) {
    SetProduct path = best(families, true, budget, effort);
    return Rounding.down(path.any(), path.none(), path.operations() + families.values.slack());
  }

  static Probability upper(Families families, Budget budget, Effort effort) {
    SetProduct cut = best(families, false, budget, effort);
    return Rounding.up(cut.none(), cut.any(), cut.operations() + families.values.slack());
  }

  private static SetProduct best(Families families, boolean paths, Budget budget, Effort effort) {
    SetProduct product = new SetProduct();
    families
        .mostProbable(paths, budget.start("searching the most probable set"))
        .ifPresent(set -> product.add(set, families.values, paths));
    effort.add(1);
    return product;
  }
}
