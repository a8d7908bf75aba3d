package org.kingbolt.bounds;

import org.kingbolt.core.Budget;
import org.kingbolt.core.Probability;
import org.kingbolt.core.diagram.WorkMeter;

/** Esary-Proschan bounds: as if the sets of a family shared no components. */
final class EsaryProschan {

  static final String NAME = "Esary-Proschan";

  private static final String REASON =
      "with independent components the minimal cuts are at least as likely to hold all together,"
          + " and the minimal paths to fail all together, as if they shared no components";

  private EsaryProschan() {}

  static Interval of(Families families, Budget budget, Effort effort) {
    return TwoSided.of(
        NAME,
        Assumption.INDEPENDENT,
        REASON,
        paths -> {
          SetProduct product = combined(families, paths, budget, effort);
          return new UnionBounds(
              Probability.IMPOSSIBLE,
              Rounding.up(
                  product.any(), product.none(), product.operations() + families.values.slack()),
              "which say nothing of this end",
              "as if they shared nothing" + cutOff(families, paths));
        });
  }

  private static String cutOff(Families families, boolean paths) {
    double discarded = families.discarded(paths);
    if (discarded == 0) {
      return "";
    }
    return discarded < 1
        ? ", with the probability discarded as one more set"
        : ": trivial, since the family is cut off";
  }

  static Probability lower(Families families, Budget budget, Effort effort) {
    SetProduct cuts = combined(families, false, budget, effort);
    return Rounding.down(cuts.none(), cuts.any(), cuts.operations() + families.values.slack());
  }

  static Probability upper(Families families, Budget budget, Effort effort) {
    SetProduct paths = combined(families, true, budget, effort);
    return Rounding.up(paths.any(), paths.none(), paths.operations() + families.values.slack());
  }

  private static SetProduct combined(
      Families families, boolean paths, Budget budget, Effort effort) {
    WorkMeter meter = budget.start("combining minimal sets");
    SetProduct product = new SetProduct();
    long[] count = new long[1];
    families.forEach(
        paths,
        meter,
        set -> {
          meter.at(++count[0]);
          product.add(set, families.values, paths);
        });
    double discarded = families.discarded(paths);
    if (discarded > 0) {
      product.begin();
      product.member(discarded, 1 - discarded);
      product.end();
    }
    effort.add(count[0]);
    return product;
  }
}
