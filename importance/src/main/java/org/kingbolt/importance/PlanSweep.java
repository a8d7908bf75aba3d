package org.kingbolt.importance;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.BitSet;
import java.util.List;
import org.jspecify.annotations.Nullable;
import org.kingbolt.core.diagram.WorkMeter;

/**
 * One pass through the steps of a diagram with all partial plans that may lead to an answer: those
 * that others beat, or whose bound shows that they cannot, are dropped. If more are left than
 * allowed, those of the best bounds stay, and the best bound among the others is remembered.
 */
final class PlanSweep {

  /** Rounding of the bounds must not drop a plan as good as the best one. */
  private static final double SLACK = 1e-10;

  private final PlanModel model;
  private final PlanSteps steps;
  private final PlanMenus menus;
  private final PlanReach reach;
  private final @Nullable PlanBound bound;
  private final PlanGoal goal;
  private final WorkMeter meter;

  /** How many partial plans may stay after a step. */
  private final int most;

  private final double tolerance;

  /** No plan with a log of failing above this is of interest. */
  private final double logCutoff;

  private final long[] limits;
  private final List<int[]> parents = new ArrayList<>();
  private final List<int[]> choices = new ArrayList<>();
  private final List<int[]> keys = new ArrayList<>();
  private double lost = Double.POSITIVE_INFINITY;

  PlanSweep(
      PlanModel model,
      PlanSteps steps,
      PlanMenus menus,
      PlanReach reach,
      @Nullable PlanBound bound,
      PlanGoal goal,
      double logCutoff,
      long[] limits,
      int most,
      double tolerance,
      WorkMeter meter) {
    this.model = model;
    this.steps = steps;
    this.menus = menus;
    this.reach = reach;
    this.bound = bound;
    this.goal = goal;
    this.logCutoff = logCutoff;
    this.limits = limits;
    this.most = most;
    this.tolerance = tolerance;
    this.meter = meter;
  }

  /** The best bound of a partial plan that there was no room for; infinite if there was room. */
  double lost() {
    return lost;
  }

  /** The whole plans that no other beats. */
  List<PlanFound> run() {
    int resources = model.resources().size();
    PlanLabels labels = new PlanLabels(resources, 0, 1);
    labels.add();
    for (int at = 0; at < steps.count(); at++) {
      labels = advance(at, labels);
      parents.add(labels.parent);
      choices.add(labels.choice);
      keys.add(labels.key);
    }
    List<PlanFound> found = new ArrayList<>();
    for (int label = 0; label < labels.size; label++) {
      long[] cost =
          Arrays.copyOfRange(labels.cost, label * resources, label * resources + resources);
      found.add(new PlanFound(chosen(label), cost, labels.works[label], labels.fails[label]));
    }
    return found;
  }

  private BitSet chosen(int label) {
    BitSet chosen = new BitSet();
    int row = label;
    for (int at = steps.count() - 1; at >= 0; at--) {
      int parent = parents.get(at)[row];
      int key = at == 0 ? 0 : keys.get(at - 1)[parent];
      for (int item : menus.menu(at, key)[choices.get(at)[row]].chosen()) {
        chosen.set(item);
      }
      row = parent;
    }
    return chosen;
  }

  private PlanLabels advance(int at, PlanLabels before) {
    int resources = before.resources;
    int width = steps.width(at);
    PlanLabels after = new PlanLabels(resources, width, Math.max(16, before.size * 2));
    long[] left = new long[resources];
    double[] logs = new double[width];
    int room = (int) Math.min(1 << 22, 8L * most + 1024);
    for (int label = 0; label < before.size; label++) {
      PlanAlternative[] menu = menus.menu(at, before.key[label]);
      for (int choice = 0; choice < menu.length; choice++) {
        PlanAlternative alternative = menu[choice];
        if (!affordable(before, label, alternative, left)) {
          continue;
        }
        int row = after.add();
        meter.at(held(after));
        double p = alternative.working();
        double q = alternative.failing();
        int from = label * before.width;
        steps.advance(at, p, q, false, before.fails, from, after.fails, row * width);
        steps.advance(at, p, q, true, before.works, from, after.works, row * width);
        for (int r = 0; r < resources; r++) {
          after.cost[row * resources + r] =
              before.cost[label * resources + r] + alternative.cost()[r];
        }
        after.key[row] = alternative.key();
        after.parent[row] = label;
        after.choice[row] = choice;
        boolean promising =
            width == 1
                ? promises(at, after, row, left, logs)
                : bound == null || bound.simple(at, after, row) <= logCutoff + SLACK;
        if (!promising) {
          after.drop();
        }
      }
      if (after.size >= room) {
        after = reduced(at, after);
      }
    }
    return reduced(at, after);
  }

  private static long held(PlanLabels labels) {
    long bytes = 16L * labels.width + 8L * labels.resources + 20;
    return labels.size * bytes * 2 / WorkMeter.BYTES_PER_NODE;
  }

  private boolean affordable(
      PlanLabels before, int label, PlanAlternative alternative, long[] left) {
    boolean affordable = true;
    for (int r = 0; r < left.length; r++) {
      left[r] = limits[r] - before.cost[label * left.length + r] - alternative.cost()[r];
      affordable &= left[r] >= 0;
    }
    return affordable;
  }

  /** Whether a partial plan may lead to an answer; leaves its bound. */
  private boolean promises(int at, PlanLabels labels, int row, long[] left, double[] logs) {
    if (bound == null) {
      return true;
    }
    if (goal.kind() == PlanGoal.Kind.CHEAPEST) {
      int resource = goal.resource();
      double needed = bound.needed(at, labels, row, left, resource, logCutoff + SLACK, logs);
      long spent = labels.cost[row * labels.resources + resource];
      labels.bound[row] = spent + needed;
      return needed * (1 - SLACK) <= left[resource];
    }
    labels.bound[row] = bound.of(at, labels, row, left, logs);
    return labels.bound[row] <= logCutoff + SLACK;
  }

  private int[] promising(int at, PlanLabels labels, int[] rows) {
    int resources = labels.resources;
    long[] left = new long[resources];
    double[] logs = new double[labels.width];
    int size = 0;
    for (int row : rows) {
      meter.at(labels.size);
      for (int r = 0; r < resources; r++) {
        left[r] = limits[r] - labels.cost[row * resources + r];
      }
      if (promises(at, labels, row, left, logs)) {
        rows[size++] = row;
      }
    }
    return Arrays.copyOf(rows, size);
  }

  private PlanLabels reduced(int at, PlanLabels labels) {
    int first = goal.kind() == PlanGoal.Kind.BEST ? 0 : goal.resource();
    double spare = reach.spare(at, Math.exp(logCutoff + SLACK));
    int[] unbeaten =
        new PlanDominance(first, tolerance, reach.least(at), reach.most(at), spare, meter)
            .kept(labels);
    int[] kept = labels.width == 1 ? unbeaten : promising(at, labels, unbeaten);
    if (kept.length > most) {
      int[] order =
          PlanSort.sorted(
              kept.length, (a, b) -> Double.compare(labels.bound[kept[a]], labels.bound[kept[b]]));
      lost = Math.min(lost, labels.bound[kept[order[most]]]);
      int[] best = Arrays.copyOf(order, most);
      Arrays.sort(best);
      return labels.take(Arrays.stream(best).map(i -> kept[i]).toArray());
    }
    return labels.take(kept);
  }
}
