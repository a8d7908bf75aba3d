package org.kingbolt.core.diagram;

import java.util.Arrays;
import java.util.Comparator;
import org.jspecify.annotations.Nullable;

/** Path sets of a threshold on a sum of weights: what is free, and the heaviest slots besides. */
final class CapacityRoutes implements RouteFinder {

  private final long demand;
  private final long[] weight;
  private final int[] heaviestFirst;

  /**
   * Makes a finder.
   *
   * @param demand works while the weights of working slots add up to it
   * @param weights of the slots, at least 0, with a sum that fits
   */
  public CapacityRoutes(long demand, long[] weights) {
    this.demand = demand;
    this.weight = weights.clone();
    Integer[] order = new Integer[weight.length];
    Arrays.setAll(order, slot -> slot);
    Arrays.sort(order, Comparator.comparingLong(slot -> -weight[slot]));
    this.heaviestFirst = Arrays.stream(order).mapToInt(Integer::intValue).toArray();
  }

  @Override
  public int @Nullable [] find(boolean[] barred, boolean[] free) {
    long missing = demand;
    for (int slot = 0; slot < weight.length; slot++) {
      missing -= free[slot] ? weight[slot] : 0;
    }
    int[] taken = new int[weight.length];
    int count = 0;
    for (int i = 0; i < heaviestFirst.length && missing > 0; i++) {
      int slot = heaviestFirst[i];
      if (!barred[slot] && !free[slot] && weight[slot] > 0) {
        missing -= weight[slot];
        taken[count++] = slot;
      }
    }
    return missing > 0 ? null : Arrays.copyOf(taken, count);
  }
}
