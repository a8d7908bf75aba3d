package org.kingbolt.bounds;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.HashSet;
import java.util.List;
import java.util.Set;
import org.apache.commons.math3.exception.MathIllegalStateException;
import org.apache.commons.math3.optim.MaxIter;
import org.apache.commons.math3.optim.linear.LinearConstraint;
import org.apache.commons.math3.optim.linear.LinearConstraintSet;
import org.apache.commons.math3.optim.linear.LinearObjectiveFunction;
import org.apache.commons.math3.optim.linear.NonNegativeConstraint;
import org.apache.commons.math3.optim.linear.Relationship;
import org.apache.commons.math3.optim.linear.SimplexSolver;
import org.apache.commons.math3.optim.nonlinear.scalar.GoalType;
import org.kingbolt.core.Budget;
import org.kingbolt.core.Probability;
import org.kingbolt.core.diagram.WorkMeter;

/**
 * The most that the probability of any set of a family occurring can be, given the probability c_i
 * of each component alone.
 *
 * <p>Of the states of the system only those matter in which the members of one minimal set occur
 * and nothing else does, or nothing at all: further components can be added to a state without
 * harm. So the linear program over all states is a packing, max sum of x_S with sum over the sets
 * that hold i of x_S at most c_i, or dually a covering: min sum of c_i z_i with z(S) at least 1 for
 * every set. The covering is solved over a few sets, to which one that is covered least is added,
 * found by a scan, until all are covered.
 *
 * <p>Whatever z the solver gives, dividing by the least z(S), which the scan finds exactly, makes
 * it cover; so the bound holds however imprecise the solver is.
 */
final class LinearProgram {

  /** Covered up to this much, the bound is called best. */
  static final double TOLERANCE = 1e-9;

  private static final int MOST_STEPS = 20_000;

  private final Families families;
  private final boolean paths;
  private final WorkMeter meter;
  private final double[] cost;
  private final double largest;
  private final List<int[]> rows = new ArrayList<>();
  private double best = Double.POSITIVE_INFINITY;
  private boolean proven;

  private LinearProgram(Families families, boolean paths, WorkMeter meter) {
    this.families = families;
    this.paths = paths;
    this.meter = meter;
    this.cost = families.values.occurs(paths);
    this.largest = Arrays.stream(cost).max().orElse(0);
  }

  static Interval of(Families families, Budget budget, Effort effort) {
    LinearProgram failing = solved(families, false, budget, effort);
    LinearProgram working = solved(families, true, budget, effort);
    return new Interval(
        failing.most().complement(),
        working.most(),
        Assumption.NONE,
        "linear programming",
        "whatever the dependence, the dual prices of a linear program over all joint distributions"
            + " cover every set; "
            + failing.quality("lower")
            + "; "
            + working.quality("upper"));
  }

  private String quality(String end) {
    return end
        + " end "
        + (proven ? "attained by some joint distribution" : "not proven to be attained");
  }

  private static LinearProgram solved(
      Families families, boolean paths, Budget budget, Effort effort) {
    WorkMeter meter = budget.start("solving a linear program over the dependence of components");
    LinearProgram program = new LinearProgram(families, paths, meter);
    if (families.discarded(paths) < 1) {
      program.solve();
    }
    effort.add(program.rows.size());
    return program;
  }

  private Probability most() {
    double error = best * Rounding.share(2 * families.values.slack() + 8);
    double discarded = families.discarded(paths);
    double sum = best + discarded;
    // what the other family tells holds as well
    Probability byOther = Frechet.notAnyAbove(families, !paths, meter);
    Probability own = sum + error < 1 ? Rounding.above(sum, error) : Probability.CERTAIN;
    return byOther.compareTo(own) < 0 ? byOther : own;
  }

  private void solve() {
    double[] prices = new double[cost.length];
    for (int i = 0; i < prices.length; i++) {
      // what costs nothing covers for nothing
      prices[i] = cost[i] == 0 ? 1 : 0;
    }
    Set<List<Integer>> known = new HashSet<>();
    while (true) {
      int[] least = families.lightest(paths, prices, meter);
      double covered = sum(least, prices);
      if (least.length == 0 || covered > 0) {
        double price = least.length == 0 ? 0 : sum(prices) / covered;
        best = Math.min(best, price);
      }
      proven = least.length == 0 || covered >= 1 - TOLERANCE;
      if (proven || !known.add(Arrays.stream(least).boxed().toList())) {
        return;
      }
      rows.add(least);
      meter.now((long) rows.size() * (cost.length + 2L * rows.size()) / 12);
      if (!resolve(prices)) {
        return;
      }
    }
  }

  private static double sum(int[] set, double[] prices) {
    double sum = 0;
    for (int member : set) {
      sum += prices[member];
    }
    return sum;
  }

  private double sum(double[] prices) {
    double sum = 0;
    for (int i = 0; i < prices.length; i++) {
      sum += cost[i] * prices[i];
    }
    return sum;
  }

  /** The cheapest prices that cover the sets met so far; false if the solver gives up. */
  private boolean resolve(double[] prices) {
    double[] scaled = Arrays.stream(cost).map(c -> c / largest).toArray();
    List<LinearConstraint> constraints = new ArrayList<>();
    for (int[] row : rows) {
      double[] coefficients = new double[prices.length];
      for (int member : row) {
        coefficients[member] = 1;
      }
      constraints.add(new LinearConstraint(coefficients, Relationship.GEQ, 1));
    }
    try {
      double[] point =
          new SimplexSolver()
              .optimize(
                  new MaxIter(MOST_STEPS),
                  new LinearObjectiveFunction(scaled, 0),
                  new LinearConstraintSet(constraints),
                  GoalType.MINIMIZE,
                  new NonNegativeConstraint(true))
              .getPoint();
      for (int i = 0; i < prices.length; i++) {
        prices[i] = cost[i] == 0 ? 1 : Math.max(0, point[i]);
      }
      return true;
    } catch (MathIllegalStateException gaveUp) {
      return false;
    }
  }
}
