package org.kingbolt.core.diagram;

/**
 * What both kinds of network sweep share: reading a packed state, applying one decision and the
 * operations that follow it by themselves, and writing the next state.
 */
abstract class FrontierRule implements StateRule {

  final FrontierPlan plan;

  /** The frontier's nodes before the present operation, in order of entry; read only. */
  int[] active = {};

  /** How many nodes are on the frontier, one that is just entering included. */
  int activeCount;

  FrontierRule(FrontierPlan plan) {
    this.plan = plan;
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
    int op = plan.operationOf(step);
    active = plan.frontierBefore(op);
    activeCount = active.length;
    unpack(pool, at, length);
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
    active = plan.frontierBefore(end);
    pack(out);
    return CONTINUES;
  }

  private int apply(int op, boolean works) {
    int argument = plan.argument(op);
    active = plan.frontierBefore(op);
    int settled = CONTINUES;
    switch (plan.kind(op)) {
      case FrontierPlan.ENTER -> {
        activeCount++;
        settled = enter(argument, works);
      }
      case FrontierPlan.LINK -> {
        if (works) {
          join(plan.firstPlace(op), plan.secondPlace(op), plan.problem.arc[argument]);
        }
      }
      default -> {
        settled = leave(argument, plan.firstPlace(op));
        activeCount--;
      }
    }
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

  /** A node enters, working or failed; its place is the last one. */
  abstract int enter(int node, boolean works);

  /** A working link is met between two places on the frontier. */
  abstract void join(int from, int to, boolean arc);

  /** The node at a place leaves the frontier. */
  abstract int leave(int node, int at);

  /** Whether all terminals met so far are served; asked once all have been met. */
  abstract boolean answered();
}
