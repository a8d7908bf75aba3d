package org.kingbolt.core.diagram;

/**
 * The caller's hand on long work: every builder reports here, in its innermost loop, how much it
 * holds, and the meter ends the work by throwing.
 *
 * <p>A meter is used by one thread, for one question.
 */
public interface WorkMeter {

  /** A meter that never stops the work; for structures known to be small. */
  WorkMeter UNLIMITED = held -> {};

  /**
   * Called about once for every node, state or set that the work creates.
   *
   * @param held the number of nodes now held by the caller of this method, at least 0; larger items
   *     are counted as several nodes of {@value #BYTES_PER_NODE} bytes
   * @throws RuntimeException of the implementation's choice, to end the work
   */
  void at(long held);

  /**
   * Called about once for every piece of work that takes long by itself: what {@link #at} looks at
   * once in a while, such as a clock, is looked at in this call.
   *
   * @param held as in {@link #at}
   * @throws RuntimeException of the implementation's choice, to end the work
   */
  default void now(long held) {
    at(held);
  }

  /** The memory that one counted node stands for, in bytes, tables and growth included. */
  int BYTES_PER_NODE = 96;
}
