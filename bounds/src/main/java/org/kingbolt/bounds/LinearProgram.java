package org.kingbolt.bounds;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.HashSet;
import java.util.List;
import java.util.Optional;
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
 * found by a scan, until all are covered. In terms of 1 - z both programs start from a feasible
 * point.
 *
 * <p>Whatever z the solver gives, dividing by the least z(S), which the scan finds exactly, makes
 * it cover; so the bound holds however imprecise the solver is. Whether it is attained is judged by
 * a packing, shrunk until it fits.
 */
final class LinearProgram {

  /** Ends this close to what some joint distribution attains, relative to it, are called best. */
  static final double TOLERANCE = 1e-9;

  private static final int MOST_STEPS = 20_000;
  private static final double EPSILON = 1e-11;

  private final Families families;
  private final boolean paths;
  private final WorkMeter meter;
  private final double[] cost;

  /** What the other family tells. */
  private final Probability byOther;

  /** What costs are measured by; costs far above are not paid. */
  private final double scale;

  private final List<int[]> rows = new ArrayList<>();
  private double best;
  private double attained;

  private LinearProgram(Families families, boolean paths, WorkMeter meter) {
    this.families = families;
    this.paths = paths;
    this.meter = meter;
    this.cost = families.values.occurs(paths);
    this.byOther = Frechet.notAnyAbove(families, !paths, meter);
    this.scale = byOther.working();
    this.best = scale;
  }

  static Interval of(Families families, Budget budget, Effort effort) {
    families.requireLightest();
    LinearProgram failing = solved(families, false, budget, effort);
    LinearProgram working = solved(families, true, budget, effort);
    return new Interval(
        failing.most().complement(),
        working.most(),
        Assumption.NONE,
        "linear programming",
        "whatever the dependence, the prices of a linear program over all joint distributions cover"
            + " every set; "
            + failing.quality("lower")
            + "; "
            + working.quality("upper"));
  }

  private String quality(String end) {
    boolean proven = best <= attained * (1 + TOLERANCE);
    return end + (proven ? " end attained by some joint distribution" : " end not proven best");
  }

  private static LinearProgram solved(
      Families families, boolean paths, Budget budget, Effort effort) {
    WorkMeter meter = budget.start("solving a linear program over the dependence of components");
    LinearProgram program = new LinearProgram(families, paths, meter);
    if (families.discarded(paths) < 1 && program.scale > 0 && families.values.size() > 0) {
      program.solve();
    } else if (families.discarded(paths) == 0) {
      program.attained = program.best;
    }
    effort.add(1 + program.rows.size());
    return program;
  }

  private Probability most() {
    if (best == 0) {
      return Probability.IMPOSSIBLE;
    }
    double error = best * Rounding.share(2 * families.values.slack() + 8);
    Probability own = best + error < 1 ? Rounding.above(best, error) : Probability.CERTAIN;
    return own.compareTo(byOther) < 0 ? own : byOther;
  }

  private void solve() {
    double[] prices = new double[cost.length];
    Set<List<Integer>> known = new HashSet<>();
    boolean goOn = true;
    while (goOn) {
      for (int i = 0; i < prices.length; i++) {
        prices[i] = isFree(i) ? 1 : prices[i];
      }
      Optional<int[]> found = families.lightest(paths, prices, meter);
      if (found.isEmpty()) {
        best = families.discarded(paths);
        attained = best;
        return;
      }
      int[] least = found.get();
      double covered = sum(least, prices);
      if (covered > 0) {
        best = Math.min(best, sum(prices) / covered + families.discarded(paths));
      }
      goOn = covered < 1 - TOLERANCE / 10 && known.add(Arrays.stream(least).boxed().toList());
      if (goOn) {
        rows.add(least);
        meter.now((long) rows.size() * (cost.length + 2L * rows.size()) / 12);
        goOn = resolve(prices);
      }
    }
    attained = families.discarded(paths) > 0 ? 0 : packed();
  }

  /** What costs next to nothing covers for next to nothing. */
  private boolean isFree(int component) {
    return cost[component] <= scale * 1e-14;
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

  /**
   * The cheapest prices z that cover the sets met so far, from y = 1 - z: the most that c y can be
   * with y(S) at most one less than S has members. False if the solver gives up.
   */
  private boolean resolve(double[] prices) {
    double[] scaled = new double[cost.length];
    List<LinearConstraint> constraints = new ArrayList<>();
    for (int i = 0; i < scaled.length; i++) {
      scaled[i] = Math.min(1e9, cost[i] / scale);
      double[] one = new double[scaled.length];
      one[i] = 1;
      constraints.add(new LinearConstraint(one, Relationship.LEQ, isFree(i) ? 0 : 1));
    }
    for (int[] row : rows) {
      double[] coefficients = new double[scaled.length];
      for (int member : row) {
        coefficients[member] = 1;
      }
      constraints.add(new LinearConstraint(coefficients, Relationship.LEQ, row.length - 1.0));
    }
    double[] point = most(scaled, constraints);
    for (int i = 0; i < point.length; i++) {
      double price = 1 - point[i];
      prices[i] = price < 1e-12 ? 0 : price;
    }
    return point.length > 0;
  }

  /** What the sets met can be given so that no component gets more than its own probability. */
  private double packed() {
    if (rows.isEmpty()) {
      return 0;
    }
    double[] ones = new double[rows.size()];
    Arrays.fill(ones, 1);
    double total = best / scale;
    List<LinearConstraint> constraints = new ArrayList<>();
    constraints.add(new LinearConstraint(ones, Relationship.LEQ, total));
    for (int i = 0; i < cost.length; i++) {
      if (cost[i] / scale < total) {
        constraints.add(new LinearConstraint(holders(i), Relationship.LEQ, cost[i] / scale));
      }
    }
    double[] point = most(ones, constraints);
    double shrink = 1;
    double sum = 0;
    for (double given : point) {
      sum += Math.max(0, given);
    }
    for (int i = 0; i < cost.length && point.length > 0; i++) {
      double used = 0;
      double[] holds = holders(i);
      for (int j = 0; j < point.length; j++) {
        used += holds[j] * Math.max(0, point[j]);
      }
      shrink = used * scale > cost[i] ? Math.min(shrink, cost[i] / (used * scale)) : shrink;
    }
    return sum * shrink * scale;
  }

  private double[] holders(int component) {
    double[] holds = new double[rows.size()];
    for (int j = 0; j < holds.length; j++) {
      for (int member : rows.get(j)) {
        holds[j] = member == component ? 1 : holds[j];
      }
    }
    return holds;
  }

  /** The point that the solver finds; empty if it gives up. */
  private static double[] most(double[] objective, List<LinearConstraint> constraints) {
    try {
      return new SimplexSolver(EPSILON)
          .optimize(
              new MaxIter(MOST_STEPS),
              new LinearObjectiveFunction(objective, 0),
              new LinearConstraintSet(constraints),
              GoalType.MAXIMIZE,
              new NonNegativeConstraint(true))
          .getPoint();
    } catch (MathIllegalStateException gaveUp) {
      return new double[0];
    }
  }
}
