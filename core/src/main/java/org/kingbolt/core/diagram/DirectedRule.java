package org.kingbolt.core.diagram;

import java.util.Arrays;

/**
 * Frontier states of a network with arcs: which frontier nodes have been reached from the source;
 * which of the others reach which; and, for every target that left unreached, the frontier nodes
 * that would reach it.
 *
 * <p>A state is a run of words: reached, failed, one row a frontier node, then the waiting sets in
 * increasing order. Bits are positions on the frontier. Rows of reached nodes and bits for reached
 * nodes in other rows are dropped, because they can no longer matter.
 */
final class DirectedRule extends FrontierRule {

  private static final int WIDEST = Long.SIZE;

  private long reached;
  private long failed;
  private final long[] row = new long[WIDEST];
  private long[] waiting = new long[8];
  private int waitingCount;
  private int targetsOnFrontier;

  DirectedRule(FrontierPlan plan) {
    super(plan);
  }

  @Override
  void unpackEmpty() {
    reached = 0;
    failed = 0;
    waitingCount = 0;
    targetsOnFrontier = 0;
  }

  @Override
  void unpack(long[] pool, int at, int length) {
    reached = pool[at];
    failed = pool[at + 1];
    System.arraycopy(pool, at + 2, row, 0, activeCount);
    waitingCount = length - 2 - activeCount;
    if (waitingCount > waiting.length) {
      waiting = new long[waitingCount << 1];
    }
    System.arraycopy(pool, at + 2 + activeCount, waiting, 0, waitingCount);
    targetsOnFrontier = 0;
    for (int i = 0; i < activeCount; i++) {
      if ((reached >>> i & 1) == 0 && plan.problem.target[active[i]]) {
        targetsOnFrontier++;
      }
    }
  }

  @Override
  void pack(StateWords out) {
    out.add(reached);
    out.add(failed);
    for (int i = 0; i < activeCount; i++) {
      out.add((reached >>> i & 1) == 1 ? 0 : row[i] & ~reached);
    }
    Arrays.sort(waiting, 0, waitingCount);
    for (int i = 0; i < waitingCount; i++) {
      if (i == 0 || waiting[i] != waiting[i - 1]) {
        out.add(waiting[i]);
      }
    }
  }

  @Override
  int enter(int node, boolean works) {
    int at = activeCount - 1;
    if (at >= WIDEST) {
      throw new FrontierTooWideException(activeCount, WIDEST);
    }
    row[at] = 0;
    if (!works) {
      failed |= 1L << at;
      return plan.problem.terminal(node) ? SETTLED_FAILS : CONTINUES;
    }
    row[at] = 1L << at;
    if (node == plan.problem.source) {
      reached |= 1L << at;
    } else if (plan.problem.target[node]) {
      targetsOnFrontier++;
    }
    return CONTINUES;
  }

  @Override
  void join(int from, int to, boolean arc) {
    if (((failed >>> from | failed >>> to) & 1) == 1) {
      return;
    }
    pass(from, to);
    if (!arc) {
      pass(to, from);
    }
  }

  /** From now on, whatever reaches {@code from} reaches {@code to}. */
  private void pass(int from, int to) {
    if ((reached >>> to & 1) == 1) {
      return;
    }
    if ((reached >>> from & 1) == 1) {
      reach(row[to]);
      return;
    }
    long before = 0;
    for (int i = 0; i < activeCount; i++) {
      if ((row[i] >>> from & 1) == 1) {
        before |= 1L << i;
        row[i] |= row[to];
      }
    }
    for (int i = 0; i < waitingCount; i++) {
      if ((waiting[i] >>> to & 1) == 1) {
        waiting[i] |= before;
      }
    }
  }

  private void reach(long nodes) {
    long fresh = nodes & ~reached;
    reached |= fresh;
    for (int i = 0; i < activeCount; i++) {
      if ((fresh >>> i & 1) == 1 && plan.problem.target[active[i]]) {
        targetsOnFrontier--;
      }
    }
    int kept = 0;
    for (int i = 0; i < waitingCount; i++) {
      if ((waiting[i] & fresh) == 0) {
        waiting[kept++] = waiting[i];
      }
    }
    waitingCount = kept;
  }

  @Override
  int leave(int node, int at) {
    boolean wasReached = (reached >>> at & 1) == 1;
    if (!wasReached && plan.problem.target[node]) {
      long before = 0;
      for (int i = 0; i < activeCount; i++) {
        if (i != at && (row[i] >>> at & 1) == 1 && (reached >>> i & 1) == 0) {
          before |= 1L << i;
        }
      }
      targetsOnFrontier--;
      await(before);
    }
    reached = without(reached, at);
    failed = without(failed, at);
    for (int i = at; i < activeCount - 1; i++) {
      row[i] = row[i + 1];
    }
    for (int i = 0; i < activeCount - 1; i++) {
      row[i] = without(row[i], at);
    }
    int kept = 0;
    for (int i = 0; i < waitingCount; i++) {
      long set = without(waiting[i], at);
      if (set == 0) {
        return SETTLED_FAILS;
      }
      waiting[kept++] = set;
    }
    waitingCount = kept;
    int op = plan.leavingOf(node);
    boolean cutOff = reached == 0 && plan.enteringOf(plan.problem.source) < op;
    boolean served = answered() && plan.allTerminalsMetBefore(op);
    return cutOff && !served ? SETTLED_FAILS : CONTINUES;
  }

  private void await(long before) {
    if (waitingCount == waiting.length) {
      waiting = Arrays.copyOf(waiting, waiting.length << 1);
    }
    waiting[waitingCount++] = before;
  }

  /** Takes a position out of a set of positions; those above move down by one. */
  private static long without(long set, int at) {
    long below = (1L << at) - 1;
    return (set & below) | ((set >>> 1) & ~below);
  }

  @Override
  boolean answered() {
    return targetsOnFrontier == 0 && waitingCount == 0;
  }
}
