package org.kingbolt.core.diagram;

import java.util.Arrays;

/**
 * What both kinds of network sweep share: reading a packed state, applying one decision and the
 * operations that follow it by themselves, and writing the next state.
 */
abstract class FrontierRule implements StateRule {

  final FrontierPlan plan;

  /** The frontier's nodes at this moment, in order of entry. */
  final int[] active;

  int activeCount;

  FrontierRule(FrontierPlan plan) {
    this.plan = plan;
    this.active = new int[plan.problem.nodes()];
  }

  @Override
  public final int steps() {
    return plan.decisions();
  }

  @Override
  public final int slot(int step) {
    return plan.slot(step);
  }

  @Override
  public final int start(StateWords out) {
    activeCount = 0;
    unpackEmpty();
    return run(0, 0, out);
  }

  @Override
  public final int next(int step, boolean works, long[] pool, int at, int length, StateWords out) {
    int[] frontier = plan.frontierBefore(step);
    System.arraycopy(frontier, 0, active, 0, frontier.length);
    activeCount = frontier.length;
    unpack(pool, at, length);
    int op = plan.operationOf(step);
    int settled = apply(op, works);
    return settled != CONTINUES ? settled : run(op + 1, step + 1, out);
  }

  /** Applies what happens by itself until the next decision, then packs. */
  private int run(int firstOp, int nextStep, StateWords out) {
    int end = nextStep < plan.decisions() ? plan.operationOf(nextStep) : plan.operations();
    for (int op = firstOp; op < end; op++) {
      int settled = apply(op, true);
      if (settled != CONTINUES) {
        return settled;
      }
    }
    if (nextStep == plan.decisions()) {
      return SETTLED_FAILS;
    }
    pack(out);
    return CONTINUES;
  }

  private int apply(int op, boolean works) {
    int argument = plan.argument(op);
    int settled =
        switch (plan.kind(op)) {
          case FrontierPlan.ENTER -> {
            active[activeCount++] = argument;
            yield enter(argument, works);
          }
          case FrontierPlan.LINK -> works ? join(argument) : CONTINUES;
          default -> {
            int left = leave(argument);
            activeCount = FrontierPlan.remove(active, activeCount, argument);
            yield left;
          }
        };
    if (settled == CONTINUES && plan.allTerminalsMetBefore(op + 1) && answered()) {
      return SETTLED_WORKS;
    }
    return settled;
  }

  /** Forgets all state: nothing has entered. */
  abstract void unpackEmpty();

  /** Reads the state of the {@link #active} nodes. */
  abstract void unpack(long[] pool, int at, int length);

  /** Writes the state of the {@link #active} nodes in a canonical form. */
  abstract void pack(StateWords out);

  /** A node enters, working or failed; it is the last of {@link #active}. */
  abstract int enter(int node, boolean works);

  /** A working link is met. */
  abstract int join(int link);

  /** A node is about to leave {@link #active}. */
  abstract int leave(int node);

  /** Whether all terminals met so far are served; asked once all have been met. */
  abstract boolean answered();

  /** Position of a node in {@link #active}. */
  final int position(int node) {
    int at = 0;
    while (active[at] != node) {
      at++;
    }
    return at;
  }

  @Override
  public String toString() {
    return getClass().getSimpleName() + Arrays.toString(Arrays.copyOf(active, activeCount));
  }
}
