package org.kingbolt.importance;

import com.google.common.collect.ImmutableList;
import java.util.BitSet;
import org.kingbolt.core.CoherentSystem;
import org.kingbolt.core.Evaluator;
import org.kingbolt.core.Probability;

/**
 * An improvement plan as numbers: one compiled system that holds every component any item could
 * bring, and what the items do to its variables.
 *
 * @param system its components are the variables
 * @param working by variable: the probability of working with nothing chosen; not changed
 * @param failing by variable: the other side; not changed
 * @param items what can be chosen
 * @param limits what goes together
 * @param resources the names of the resources
 * @param costs by resource
 */
@SuppressWarnings("ArrayRecordComponent")
record PlanModel(
    CoherentSystem system,
    double[] working,
    double[] failing,
    ImmutableList<PlanItem> items,
    ImmutableList<PlanLimit> limits,
    ImmutableList<String> resources,
    ImmutableList<PlanCosts> costs) {

  /** The two sides of every variable with some items chosen. */
  void fill(BitSet chosen, double[] works, double[] fails) {
    int n = working.length;
    System.arraycopy(working, 0, works, 0, n);
    System.arraycopy(failing, 0, fails, 0, n);
    for (int i = chosen.nextSetBit(0); i >= 0; i = chosen.nextSetBit(i + 1)) {
      for (PlanEffect effect : items.get(i).effects()) {
        if (effect.sets()) {
          works[effect.variable()] = effect.working();
          fails[effect.variable()] = effect.failing();
        }
      }
    }
    for (int i = chosen.nextSetBit(0); i >= 0; i = chosen.nextSetBit(i + 1)) {
      for (PlanEffect effect : items.get(i).effects()) {
        if (!effect.sets()) {
          int v = effect.variable();
          works[v] = Math.min(1, works[v] + fails[v] * effect.working());
          fails[v] *= effect.failing();
        }
      }
    }
  }

  /** The system's reliability with some items chosen. */
  Probability reliability(Evaluator evaluator, BitSet chosen) {
    double[] works = new double[working.length];
    double[] fails = new double[working.length];
    fill(chosen, works, fails);
    evaluator.evaluate(works, fails);
    return Probability.of(evaluator.working(), evaluator.failing());
  }

  /** The cost of some items, by resource. */
  long[] cost(BitSet chosen) {
    long[] sum = new long[resources.size()];
    for (int i = chosen.nextSetBit(0); i >= 0; i = chosen.nextSetBit(i + 1)) {
      for (int r = 0; r < sum.length; r++) {
        sum[r] += items.get(i).cost()[r];
      }
    }
    return sum;
  }

  /** Whether some items may be chosen together and no others. */
  boolean allows(BitSet chosen) {
    for (PlanLimit limit : limits) {
      int count = 0;
      for (int member : limit.members()) {
        count += chosen.get(member) ? 1 : 0;
      }
      boolean kept =
          switch (limit.kind()) {
            case AT_MOST_ONE -> count <= 1;
            case EXACTLY_ONE -> count == 1;
            case REQUIRES ->
                !chosen.get(limit.members().get(0)) || chosen.get(limit.members().get(1));
          };
      if (!kept) {
        return false;
      }
    }
    return true;
  }
}
