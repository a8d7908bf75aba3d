package org.kingbolt.bounds;

import java.util.List;
import org.kingbolt.core.Budget;
import org.kingbolt.core.diagram.WorkMeter;

/**
 * Inclusion-exclusion over a family, cut off at an order: sums of odd order are at least the
 * probability that any set occurs, sums of even order at most (Bonferroni). Of all orders up to the
 * one given the best of each kind is taken; where the order reaches the number of sets, the sum is
 * the figure itself.
 */
final class InclusionExclusion {

  private final List<int[]> sets;
  private final double[] occurs;
  private final int order;
  private final PreciseSum[] sums;

  /** How many of the chosen sets have each component. */
  private final int[] uses;

  private InclusionExclusion(List<int[]> sets, double[] occurs, int order) {
    this.sets = sets;
    this.occurs = occurs;
    this.order = Math.min(order, sets.size());
    this.sums = new PreciseSum[this.order];
    for (int i = 0; i < sums.length; i++) {
      sums[i] = new PreciseSum();
    }
    this.uses = new int[occurs.length];
  }

  static UnionBounds of(Families families, boolean paths, int order, Budget budget, Effort effort) {
    List<int[]> sets = families.possible(paths, budget, effort);
    if (sets.isEmpty()) {
      return UnionBounds.ofNothing(families.discarded(paths));
    }
    InclusionExclusion terms = new InclusionExclusion(sets, families.values.occurs(paths), order);
    terms.addUp(budget.start("adding up the terms of inclusion and exclusion"), effort);
    return terms.bounds(families.discarded(paths));
  }

  /** Goes through all choices of up to so many sets; the product grows by what a set adds. */
  private void addUp(WorkMeter meter, Effort effort) {
    int[] chosen = new int[order];
    double[] product = new double[order + 1];
    product[0] = 1;
    chosen[0] = -1;
    int depth = 0;
    long terms = 0;
    while (depth >= 0) {
      if (++chosen[depth] == sets.size()) {
        if (--depth >= 0) {
          leaveOut(sets.get(chosen[depth]));
        }
        continue;
      }
      meter.at(++terms);
      int[] set = sets.get(chosen[depth]);
      double all = product[depth] * takeIn(set);
      sums[depth].add(all);
      if (depth + 1 < order && all > 0) {
        depth++;
        chosen[depth] = chosen[depth - 1];
        product[depth] = all;
      } else {
        leaveOut(set);
      }
    }
    effort.add(terms);
  }

  private double takeIn(int[] set) {
    double added = 1;
    for (int member : set) {
      if (uses[member]++ == 0) {
        added *= occurs[member];
      }
    }
    return added;
  }

  private void leaveOut(int[] set) {
    for (int member : set) {
      uses[member]--;
    }
  }

  private UnionBounds bounds(double discarded) {
    double total = 0;
    double magnitude = 0;
    double lower = 0;
    double lowerError = 0;
    int lowerOrder = 0;
    double upper = Double.POSITIVE_INFINITY;
    double upperError = 0;
    int upperOrder = 0;
    for (int j = 1; j <= order; j++) {
      double sum = sums[j - 1].value();
      total += (j & 1) == 1 ? sum : -sum;
      magnitude += sum;
      double error = magnitude * Rounding.share(occurs.length + 4L * j);
      boolean whole = j == sets.size();
      if (((j & 1) == 1 || whole) && total + error < upper + upperError) {
        upper = total;
        upperError = error;
        upperOrder = j;
      }
      if (((j & 1) == 0 || whole) && total - error > lower - lowerError) {
        lower = total;
        lowerError = error;
        lowerOrder = j;
      }
    }
    return UnionBounds.ofSums(
        lower, lowerError, name(lowerOrder), upper, upperError, name(upperOrder), discarded);
  }

  private String name(int sumOrder) {
    return sumOrder == sets.size() ? "the whole sum" : "the sum of order " + sumOrder;
  }
}
