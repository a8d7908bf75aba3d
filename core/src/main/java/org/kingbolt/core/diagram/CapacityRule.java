package org.kingbolt.core.diagram;

import java.util.Arrays;
import java.util.Comparator;

/**
 * Weighted-k-out-of-n:G. State: the demand still unmet, rounded up to a multiple of the greatest
 * common divisor of the weights still to come. Slots are decided in order of decreasing weight.
 *
 * <p>Source of the recurrence: Wu &amp; Chen, An algorithm for computing the reliability of
 * weighted-k-out-of-n systems, IEEE Trans. Reliab. 43 (1994) 327 (from memory).
 */
final class CapacityRule implements StateRule {

  private final long demand;
  private final int[] slots;
  private final long[] weight;

  /** Sum and greatest common divisor of the weights from a step on. */
  private final long[] ahead;

  private final long[] divisor;

  CapacityRule(long demand, long[] weights) {
    this.demand = demand;
    this.slots =
        Arrays.stream(StateSweep.identity(weights.length))
            .boxed()
            .sorted(Comparator.comparingLong((Integer slot) -> -weights[slot]))
            .mapToInt(Integer::intValue)
            .toArray();
    this.weight = Arrays.stream(slots).mapToLong(slot -> weights[slot]).toArray();
    this.ahead = new long[weights.length + 1];
    this.divisor = new long[weights.length + 1];
    for (int step = weights.length - 1; step >= 0; step--) {
      ahead[step] = Math.addExact(ahead[step + 1], weight[step]);
      divisor[step] = gcd(weight[step], divisor[step + 1]);
    }
  }

  private static long gcd(long a, long b) {
    long x = a;
    long y = b;
    while (y != 0) {
      long rest = x % y;
      x = y;
      y = rest;
    }
    return x;
  }

  @Override
  public int steps() {
    return slots.length;
  }

  @Override
  public int slot(int step) {
    return slots[step];
  }

  @Override
  public int start(StateWords out) {
    return settle(0, demand, out);
  }

  @Override
  public int next(int step, boolean works, long[] pool, int at, int length, StateWords out) {
    return settle(step + 1, works ? pool[at] - weight[step] : pool[at], out);
  }

  private int settle(int step, long unmet, StateWords out) {
    if (unmet <= 0) {
      return SETTLED_WORKS;
    }
    if (unmet > ahead[step]) {
      return SETTLED_FAILS;
    }
    long rest = unmet % divisor[step];
    out.add(rest == 0 ? unmet : unmet - rest + divisor[step]);
    return CONTINUES;
  }
}
