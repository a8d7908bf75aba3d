package org.kingbolt.core;

import java.time.Duration;
import org.kingbolt.core.diagram.WorkMeter;

/**
 * How much work a long computation may do: a number of nodes, which bounds its memory, and
 * optionally a time. Interrupting the thread ends the computation too.
 *
 * <p>Whatever limit is met first ends the work in a {@link BudgetExceededException}, which says
 * which one it was, how far the work got, and what to use instead. With a node limit alone the
 * outcome does not depend on the machine's speed.
 *
 * <p>Immutable; safe to share between threads. The time runs anew for every computation.
 *
 * <p>Example: {@code structure.compile(Budget.ofNodes(1_000_000).withTime(Duration.ofSeconds(5)))}.
 */
public final class Budget {

  private static final long POLL_MASK = (1 << 12) - 1;
  private static final long FEWEST_NODES = 1_000;

  private final long nodes;
  private final Duration time;

  private static final Duration UNBOUNDED = Duration.ofSeconds(Long.MAX_VALUE / 4_000_000_000L);

  private Budget(long nodes, Duration time) {
    this.nodes = nodes;
    this.time = time;
  }

  /**
   * The budget of every method that is not given one: as many nodes as fit in a third of the heap's
   * limit, and no limit of time.
   *
   * @return a budget derived from {@link Runtime#maxMemory()}
   */
  public static Budget ofHeap() {
    long nodes = Runtime.getRuntime().maxMemory() / 3 / WorkMeter.BYTES_PER_NODE;
    return new Budget(Math.max(FEWEST_NODES, nodes), UNBOUNDED);
  }

  /**
   * A budget of nodes, at about {@value WorkMeter#BYTES_PER_NODE} bytes each.
   *
   * @param nodes at least 1
   * @return the budget, without a limit of time
   * @throws IllegalArgumentException if the number is less than 1
   */
  public static Budget ofNodes(long nodes) {
    if (nodes < 1) {
      throw new IllegalArgumentException(
          "budget of " + nodes + " nodes; at least 1 is needed, and about a million is usual");
    }
    return new Budget(nodes, UNBOUNDED);
  }

  /**
   * A budget of time, with the node limit of {@link #ofHeap()}.
   *
   * @param time longer than zero
   * @return the budget
   * @throws IllegalArgumentException if the time is zero or negative
   */
  public static Budget ofTime(Duration time) {
    return ofHeap().withTime(time);
  }

  /**
   * Adds or replaces the limit of time.
   *
   * @param limit longer than zero
   * @return a budget with the same node limit
   * @throws IllegalArgumentException if the time is zero or negative
   */
  public Budget withTime(Duration limit) {
    Check.notNull(limit, "time");
    if (limit.isZero() || limit.isNegative()) {
      throw new IllegalArgumentException(
          "budget of " + limit + "; the time must be longer than zero");
    }
    return new Budget(nodes, limit.compareTo(UNBOUNDED) > 0 ? UNBOUNDED : limit);
  }

  /**
   * Returns the node limit.
   *
   * @return at least 1
   */
  public long nodes() {
    return nodes;
  }

  /**
   * Starts the clock for one computation.
   *
   * @param work what is being done, in words that finish "while ..."
   * @return a meter for one thread, which throws {@link BudgetExceededException}
   */
  public WorkMeter start(String work) {
    return new Meter(work, this);
  }

  /** Counts the calls, to look at the clock and the interrupt flag once in a while. */
  private static final class Meter implements WorkMeter {
    private final String work;
    private final Budget budget;
    private final long started = System.nanoTime();
    private final long allowed;
    private long calls;

    Meter(String work, Budget budget) {
      this.work = work;
      this.budget = budget;
      this.allowed = budget.time.toNanos();
    }

    @Override
    public void at(long held) {
      if (held > budget.nodes) {
        throw BudgetExceededException.nodes(work, budget.nodes, held);
      }
      if ((calls++ & POLL_MASK) == 0) {
        poll(held);
      }
    }

    @Override
    public void now(long held) {
      if (held > budget.nodes) {
        throw BudgetExceededException.nodes(work, budget.nodes, held);
      }
      poll(held);
    }

    private void poll(long held) {
      if (Thread.currentThread().isInterrupted()) {
        throw BudgetExceededException.interrupted(work, held);
      }
      if (System.nanoTime() - started > allowed) {
        throw BudgetExceededException.time(work, budget.time, held);
      }
    }
  }

  @Override
  public boolean equals(Object other) {
    return other instanceof Budget that && nodes == that.nodes && time.equals(that.time);
  }

  @Override
  public int hashCode() {
    return 31 * Long.hashCode(nodes) + time.hashCode();
  }

  @Override
  public String toString() {
    return "at most " + nodes + " nodes" + (time.equals(UNBOUNDED) ? "" : " and " + time);
  }
}
