package org.kingbolt.importance;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.BitSet;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.function.IntPredicate;
import org.jspecify.annotations.Nullable;
import org.kingbolt.core.Evaluator;
import org.kingbolt.core.Probability;
import org.kingbolt.core.diagram.WorkMeter;

/** The way to a plan by what gains most for its cost, and the best step beyond it. */
final class PlanExplanation {

  /**
   * An explanation.
   *
   * @param steps the way to the plan
   * @param next the best step that was left out, if any helps
   */
  record Why(List<ImprovementStep> steps, @Nullable ImprovementStep next) {}

  private final PlanModel model;
  private final String resource;
  private final Evaluator evaluator;
  private final WorkMeter meter;

  private PlanExplanation(PlanModel model, String resource, WorkMeter meter) {
    this.model = model;
    this.resource = resource;
    this.evaluator = model.system().evaluator();
    this.meter = meter;
  }

  static Why of(PlanModel model, BitSet chosen, String resource, WorkMeter meter) {
    PlanExplanation explanation = new PlanExplanation(model, resource, meter);
    return new Why(explanation.steps(chosen), explanation.next(chosen));
  }

  private List<ImprovementStep> steps(BitSet chosen) {
    BitSet now = start(chosen);
    Probability reliability = model.reliability(evaluator, now);
    BitSet open = (BitSet) chosen.clone();
    open.andNot(now);
    List<ImprovementStep> steps = new ArrayList<>();
    while (!open.isEmpty()) {
      BitSet state = now;
      Best best = best(now, reliability, open, item -> isReady(item, state, chosen));
      if (best == null) {
        best = best(now, reliability, open, item -> true);
      }
      if (best == null) {
        throw new AssertionError("an item is open and can be taken");
      }
      steps.add(best.step);
      now = best.after;
      reliability = best.step.after();
      open.clear(best.item);
    }
    return steps;
  }

  /** Where one must be chosen, the cheapest. */
  private BitSet start(BitSet chosen) {
    BitSet start = new BitSet();
    for (PlanLimit limit : model.limits()) {
      if (limit.kind() == PlanLimit.Kind.EXACTLY_ONE) {
        int cheapest = -1;
        int taken = -1;
        for (int member : limit.members()) {
          taken = chosen.get(member) ? member : taken;
          if (cheapest < 0 || Arrays.compare(cost(member), cost(cheapest)) < 0) {
            cheapest = member;
          }
        }
        boolean same = taken >= 0 && Arrays.equals(cost(taken), cost(cheapest));
        start.set(same ? taken : cheapest);
      }
    }
    return start;
  }

  private long[] cost(int item) {
    return model.items().get(item).cost();
  }

  /** Whether what an item requires is there, as far as it is in the plan. */
  private boolean isReady(int item, BitSet now, BitSet chosen) {
    for (PlanLimit limit : model.limits()) {
      if (limit.kind() == PlanLimit.Kind.REQUIRES && limit.members().get(0) == item) {
        int needed = limit.members().get(1);
        if (chosen.get(needed) && !now.get(needed)) {
          return false;
        }
      }
    }
    return true;
  }

  private record Best(int item, BitSet after, ImprovementStep step) {}

  /** Of equal ones the first. */
  private @Nullable Best best(
      BitSet now, Probability reliability, BitSet items, IntPredicate allowed) {
    Best best = null;
    for (int item = items.nextSetBit(0); item >= 0; item = items.nextSetBit(item + 1)) {
      meter.now(0);
      if (allowed.test(item)) {
        BitSet after = with(now, item);
        Probability then = model.reliability(evaluator, after);
        Map<String, Double> costs = more(now, after);
        ImprovementStep step =
            new ImprovementStep(model.items().get(item).name(), costs, reliability, then);
        if (best == null || step.gainPer(resource) > best.step.gainPer(resource)) {
          best = new Best(item, after, step);
        }
      }
    }
    return best;
  }

  /** One more item, without those that it excludes. */
  private BitSet with(BitSet now, int item) {
    BitSet after = (BitSet) now.clone();
    for (PlanLimit limit : model.limits()) {
      if (limit.kind() != PlanLimit.Kind.REQUIRES && limit.members().contains(item)) {
        limit.members().forEach(after::clear);
      }
    }
    after.set(item);
    return after;
  }

  private Map<String, Double> more(BitSet before, BitSet after) {
    long[] from = model.cost(before);
    long[] to = model.cost(after);
    Map<String, Double> more = new LinkedHashMap<>();
    for (int r = 0; r < to.length; r++) {
      more.put(model.resources().get(r), model.costs().get(r).amount(to[r] - from[r]));
    }
    return more;
  }

  private @Nullable ImprovementStep next(BitSet chosen) {
    BitSet open = new BitSet();
    open.set(0, model.items().size());
    open.andNot(chosen);
    Probability reliability = model.reliability(evaluator, chosen);
    Best best = best(chosen, reliability, open, item -> model.allows(with(chosen, item)));
    return best == null || best.step.gain() <= 0 ? null : best.step;
  }
}
