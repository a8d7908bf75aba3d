package org.kingbolt.importance;

import java.util.Arrays;
import java.util.BitSet;
import java.util.List;
import java.util.Optional;
import org.jspecify.annotations.Nullable;
import org.kingbolt.core.Budget;
import org.kingbolt.core.BudgetExceededException;
import org.kingbolt.core.Evaluator;
import org.kingbolt.core.Probability;
import org.kingbolt.core.diagram.WorkMeter;

/**
 * The search for one answer: sweeps with more and more room, until nothing had to be left out, the
 * proved gap is small enough, or the budget is used up. For the best plan, a branch and bound with
 * a convex relaxation takes over after the first of them, where no decision matters for more than
 * one variable.
 */
final class PlanSearch {

  /**
   * An answer.
   *
   * @param plan the best found
   * @param bound what no plan can beat: the log of the failing probability, or the cost
   * @param proved whether no plan is better
   */
  record Answer(PlanFound plan, double bound, boolean proved) {}

  private static final int FIRST_ROOM = 32;
  private static final int GROWTH = 8;

  /** Without an allowed gap, sweeps get so much room before the tree is tried. */
  private static final int EXACT_ROOM = 1 << 8;

  private static final int MOST_ROOM = 1 << 26;

  private final PlanModel model;
  private final double gap;
  private final WorkMeter meter;
  private final PlanSteps steps;
  private final PlanOrder order;
  private final PlanMenus menus;
  private final PlanReach reach;
  private final PlanAlternative[][] relaxed;
  private @Nullable PlanFound best;
  private double proved = Double.NEGATIVE_INFINITY;

  PlanSearch(PlanModel model, double gap, WorkMeter meter) {
    this.model = model;
    this.gap = gap;
    this.meter = meter;
    this.steps = new PlanSteps(model.system().diagram(), meter);
    this.order = new PlanOrder(model, steps);
    this.menus = new PlanMenus(model, steps, order, meter);
    this.reach = new PlanReach(steps, PlanRange.all(model, steps));
    this.relaxed = new PlanAlternative[steps.count()][];
    for (int at = 0; at < relaxed.length; at++) {
      relaxed[at] = menus.relaxed(at);
      if (relaxed[at].length == 0) {
        throw contradiction();
      }
    }
  }

  static Answer find(PlanModel model, PlanGoal goal, double gap, Budget budget) {
    PlanSearch search = new PlanSearch(model, gap, budget.start("searching for the best plan"));
    return goal.kind() == PlanGoal.Kind.CHEAPEST ? search.cheapest(goal) : search.best(goal);
  }

  static List<PlanFound> frontier(PlanModel model, PlanGoal goal, double gap, Budget budget) {
    WorkMeter meter = budget.start("finding the efficient frontier of plans");
    PlanSearch search = new PlanSearch(model, gap, meter);
    double tolerance = Math.expm1(Math.log1p(gap) / search.steps.count());
    List<PlanFound> found =
        new PlanSweep(
                model,
                search.steps,
                search.menus,
                search.reach,
                null,
                goal,
                Double.POSITIVE_INFINITY,
                goal.limits(),
                Integer.MAX_VALUE,
                tolerance,
                meter)
            .run();
    if (found.isEmpty()) {
      throw contradiction();
    }
    return found;
  }

  static IllegalArgumentException contradiction() {
    return new IllegalArgumentException(
        "no choice of options keeps all limits; look for exactlyOneOf, requires, allocations and"
            + " limits of resources that exclude each other");
  }

  private Answer best(PlanGoal goal) {
    double[][] start = start();
    try {
      PlanBound bound = new PlanBound(steps, relaxed, goal.limits(), start, meter);
      proved = bound.root();
      double tolerance = Math.expm1(Math.log1p(gap) / 2 / steps.count());
      for (int room = FIRST_ROOM; room <= MOST_ROOM; room *= GROWTH) {
        double slack = steps.count() * Math.log1p(tolerance);
        double cutoff = best == null ? Double.POSITIVE_INFINITY : cutoff(best);
        PlanSweep sweep =
            new PlanSweep(
                model,
                steps,
                menus,
                reach,
                bound,
                goal,
                cutoff,
                goal.limits(),
                room,
                tolerance,
                meter);
        List<PlanFound> found = sweep.run();
        double before = Math.min(sweep.lost(), cutoff);
        found.forEach(this::offer);
        if (best == null) {
          if (sweep.lost() == Double.POSITIVE_INFINITY) {
            throw contradiction();
          }
          continue;
        }
        if (best.fails() == 0) {
          return new Answer(best, Double.NEGATIVE_INFINITY, true);
        }
        double reached = Math.log(best.fails());
        proved = Math.max(proved, Math.min(before, reached) - slack);
        boolean whole = sweep.lost() == Double.POSITIVE_INFINITY && gap == 0;
        if (whole || reached - proved <= Math.log1p(gap)) {
          return new Answer(best, whole ? reached : proved, whole || reached <= proved);
        }
        if ((gap > 0 || room >= EXACT_ROOM) && climb(goal)) {
          double log = Math.log(best.fails());
          return new Answer(best, gap == 0 ? log : Math.min(proved, log), gap == 0);
        }
      }
    } catch (BudgetExceededException used) {
      refuse(used);
    }
    PlanFound found = java.util.Objects.requireNonNull(best);
    return new Answer(found, Math.min(proved, Math.log(found.fails())), false);
  }

  /** Branch and bound to the end, where the plan allows it; false where not. */
  private boolean climb(PlanGoal goal) {
    Optional<PlanWeb> web = PlanWeb.of(model, steps, order, menus, goal.limits(), meter);
    if (best == null || web.isEmpty()) {
      return false;
    }
    Evaluator evaluator = model.system().evaluator();
    double log = Math.log(best.fails());
    PlanTree tree =
        new PlanTree(web.get(), goal.limits(), log, chosen -> offer(evaluator, chosen), gap, meter);
    try {
      tree.run(proved);
    } finally {
      proved = Math.max(proved, tree.proved());
    }
    return true;
  }

  private double offer(Evaluator evaluator, BitSet chosen) {
    Probability p = model.reliability(evaluator, chosen);
    PlanFound found = new PlanFound(chosen, model.cost(chosen), p.working(), p.failing());
    offer(found);
    return Math.log(best == null ? found.fails() : best.fails());
  }

  /** With a gap allowed, plans are of interest only if they are better by half of it. */
  private double cutoff(PlanFound found) {
    return Math.log(found.fails()) - Math.log1p(gap) / 2;
  }

  private void refuse(BudgetExceededException used) {
    if (best == null || used.limit() == BudgetExceededException.Limit.INTERRUPT) {
      throw used;
    }
  }

  private void offer(PlanFound found) {
    PlanFound now = best;
    if (now == null || better(found, now)) {
      best = found;
    }
  }

  /** Better by more than rounding, or as good and cheaper. */
  private static boolean better(PlanFound found, PlanFound now) {
    double rank = found.rank();
    double other = now.rank();
    boolean same = PlanLabels.sameRank(rank, other);
    return same ? Arrays.compare(found.cost(), now.cost()) < 0 : rank < other;
  }

  private Answer cheapest(PlanGoal goal) {
    int resource = goal.resource();
    long[] limits = goal.limits().clone();
    double[][] start = start();
    double provedCost = 0;
    try {
      for (int room = FIRST_ROOM; room <= MOST_ROOM; room *= GROWTH) {
        PlanBound bound = new PlanBound(steps, relaxed, limits, start, meter);
        PlanSweep sweep =
            new PlanSweep(
                model, steps, menus, reach, bound, goal, goal.logTarget(), limits, room, 0, meter);
        for (PlanFound found : sweep.run()) {
          if (reaches(found, goal) && cheaper(found, best, resource)) {
            best = found;
          }
        }
        boolean whole = sweep.lost() == Double.POSITIVE_INFINITY;
        if (best == null) {
          if (whole) {
            throw new PlanUnreachedException();
          }
          continue;
        }
        long cost = best.cost()[resource];
        provedCost = Math.max(provedCost, Math.min((double) cost, sweep.lost()));
        if (whole || cost <= provedCost * (1 + gap)) {
          return new Answer(best, whole ? cost : provedCost, whole || cost <= provedCost);
        }
        limits[resource] = Math.min(limits[resource], cost);
      }
    } catch (BudgetExceededException used) {
      refuse(used);
    }
    return new Answer(java.util.Objects.requireNonNull(best), provedCost, false);
  }

  private static boolean reaches(PlanFound found, PlanGoal goal) {
    double rank = found.rank();
    return rank <= goal.targetRank() || PlanLabels.sameRank(rank, goal.targetRank());
  }

  private static boolean cheaper(PlanFound found, @Nullable PlanFound best, int resource) {
    if (best == null || found.cost()[resource] != best.cost()[resource]) {
      return best == null || found.cost()[resource] < best.cost()[resource];
    }
    return better(found, best);
  }

  /** Both sides of each step's variable at the best that it can be. */
  private double[][] start() {
    double[][] start = new double[2][steps.count()];
    for (int at = 0; at < steps.count(); at++) {
      PlanAlternative best = relaxed[at][0];
      for (PlanAlternative other : relaxed[at]) {
        if (PlanLabels.rank(other.working(), other.failing())
            < PlanLabels.rank(best.working(), best.failing())) {
          best = other;
        }
      }
      start[0][at] = best.working();
      start[1][at] = best.failing();
    }
    return start;
  }
}
