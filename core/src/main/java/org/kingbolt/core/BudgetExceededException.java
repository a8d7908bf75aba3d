package org.kingbolt.core;

import java.time.Duration;
import org.kingbolt.core.diagram.FrontierTooWideException;

/**
 * A computation met a limit of its {@link Budget}, or its thread was interrupted, and was ended
 * before it was done. Nothing of it is left behind.
 *
 * <p>The message says which limit, how far the work got, and what to do instead. The interrupt flag
 * of the thread stays set.
 */
public final class BudgetExceededException extends RuntimeException {

  private static final long serialVersionUID = 1L;

  /** What ended the computation. */
  public enum Limit {
    /** The number of nodes, and so the memory. */
    NODES,
    /** The time. */
    TIME,
    /** The number of nodes on the frontier of a network. */
    WIDTH,
    /** The thread was interrupted. */
    INTERRUPT
  }

  private final Limit limit;
  private final long reached;

  private BudgetExceededException(Limit limit, long reached, String message) {
    super(message);
    this.limit = limit;
    this.reached = reached;
  }

  static BudgetExceededException nodes(String work, long allowed, long reached) {
    return new BudgetExceededException(
        Limit.NODES,
        reached,
        "stopped at the limit of "
            + allowed
            + " nodes while "
            + work
            + "; give a larger Budget or heap, compile the parts of the system one by one, or ask for"
            + " a certified interval instead, Bounds.of(structure).given(p).within(budget)");
  }

  static BudgetExceededException time(String work, Duration allowed, long reached) {
    return new BudgetExceededException(
        Limit.TIME,
        reached,
        "stopped at the limit of "
            + allowed
            + " while "
            + work
            + ", with "
            + reached
            + " nodes made; give a larger Budget, compile the parts of the system one by one, or ask"
            + " for a certified interval instead, Bounds.of(structure).given(p).within(budget)");
  }

  static BudgetExceededException width(FrontierTooWideException wide) {
    return new BudgetExceededException(
        Limit.WIDTH,
        0,
        wide.getMessage()
            + "; compile the parts of the network one by one, or ask for a certified interval"
            + " instead, Bounds.of(structure).given(p).within(budget)");
  }

  static BudgetExceededException interrupted(String work, long reached) {
    return new BudgetExceededException(
        Limit.INTERRUPT,
        reached,
        "the thread was interrupted while "
            + work
            + ", with "
            + reached
            + " nodes made; to go on, clear its flag with Thread.interrupted() and ask again; to end"
            + " long work without interrupting it, give a Budget of time");
  }

  /**
   * Returns what ended the computation.
   *
   * @return the limit
   */
  public Limit limit() {
    return limit;
  }

  /**
   * Returns how far the computation got.
   *
   * @return the number of nodes held when it was ended
   */
  public long reached() {
    return reached;
  }
}
