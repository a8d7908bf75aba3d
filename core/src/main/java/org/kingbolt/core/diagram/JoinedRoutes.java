package org.kingbolt.core.diagram;

import java.util.Arrays;
import org.jspecify.annotations.Nullable;

/** Path sets of an operator some of whose slots hold the same variable. For one thread. */
final class JoinedRoutes implements RouteFinder {

  private final RouteFinder slots;
  private final int[] variable;
  private final boolean[] barredSlots;
  private final boolean[] freeSlots;

  /**
   * Makes a finder.
   *
   * @param slots the operator's own finder
   * @param variable of each slot, from 0 up
   */
  public JoinedRoutes(RouteFinder slots, int[] variable) {
    this.slots = slots;
    this.variable = variable.clone();
    this.barredSlots = new boolean[variable.length];
    this.freeSlots = new boolean[variable.length];
  }

  @Override
  public int @Nullable [] find(boolean[] barred, boolean[] free) {
    for (int slot = 0; slot < variable.length; slot++) {
      barredSlots[slot] = barred[variable[slot]];
      freeSlots[slot] = free[variable[slot]];
    }
    int[] route = slots.find(barredSlots, freeSlots);
    return route == null
        ? null
        : Arrays.stream(route).map(slot -> variable[slot]).distinct().toArray();
  }

  @Override
  public boolean works(boolean[] barred) {
    for (int slot = 0; slot < variable.length; slot++) {
      barredSlots[slot] = barred[variable[slot]];
    }
    return slots.works(barredSlots);
  }
}
