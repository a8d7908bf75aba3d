package org.kingbolt.bounds;

import java.util.ArrayList;
import java.util.List;
import org.kingbolt.core.Budget;

/** The methods that need the families of path and cut sets and nothing else. */
final class Closed {

  /** The order of the table's inclusion and exclusion. */
  private static final int ORDER_OF_TABLE = 3;

  private Closed() {}

  static Interval inclusionExclusion(int order, Families families, Budget budget, Effort effort) {
    if (order < 1) {
      throw new IllegalArgumentException(
          "inclusion and exclusion of order "
              + order
              + "; give 1 or more, such as 2 for pairs of sets");
    }
    return TwoSided.of(
        "inclusion-exclusion of order " + order,
        Assumption.INDEPENDENT,
        "with independent components the sums of odd order are no smaller, and those of even order"
            + " no larger, than the probability that any set occurs",
        paths -> InclusionExclusion.of(families, paths, order, budget, effort));
  }

  static Interval secondOrder(Families families, Budget budget, Effort effort) {
    return TwoSided.of(
        "second order",
        Assumption.INDEPENDENT,
        "with independent components any set occurs no more often than all in sum less the pairs"
            + " along a tree, and no less often than the best combination of both sums says",
        paths -> SecondOrder.of(families, paths, budget, effort));
  }

  static List<BoundsTable.Method> methods(Families families) {
    List<BoundsTable.Method> methods = new ArrayList<>();
    methods.add(
        new BoundsTable.Method(
            "Frechet", (budget, effort) -> Frechet.of(families, budget, effort)));
    methods.add(
        new BoundsTable.Method(
            "linear programming", (budget, effort) -> LinearProgram.of(families, budget, effort)));
    methods.add(
        new BoundsTable.Method("min-max", (budget, effort) -> MinMax.of(families, budget, effort)));
    methods.add(
        new BoundsTable.Method(
            EsaryProschan.NAME, (budget, effort) -> EsaryProschan.of(families, budget, effort)));
    methods.add(
        new BoundsTable.Method(
            "inclusion-exclusion of order " + ORDER_OF_TABLE,
            (budget, effort) -> inclusionExclusion(ORDER_OF_TABLE, families, budget, effort)));
    methods.add(
        new BoundsTable.Method(
            "second order", (budget, effort) -> secondOrder(families, budget, effort)));
    return methods;
  }
}
