package org.kingbolt.core.diagram;

/**
 * How a structure decides: a finite sequence of decisions (one a slot), each of which turns a state
 * into the next one or settles the outcome. Two histories with equal states must have equal
 * futures.
 *
 * <p>For one thread; a rule may keep scratch memory.
 */
interface StateRule {

  /** The decision goes on: the state written is the next one. */
  int CONTINUES = 0;

  /** The outcome is settled: the structure fails. */
  int SETTLED_FAILS = Layers.TO_FAILS;

  /** The outcome is settled: the structure works. */
  int SETTLED_WORKS = Layers.TO_WORKS;

  /** Number of decisions. */
  int steps();

  /** The slot that a decision is about; no slot is decided twice. */
  int slot(int step);

  /** Writes the state before the first decision, or settles. */
  int start(StateWords out);

  /**
   * Writes the state after a decision, or settles; after the last decision it must settle.
   *
   * @param step the decision's number
   * @param works how it goes
   * @param pool holds the present state
   * @param at where the present state starts
   * @param length its number of words
   * @param out cleared by the caller
   */
  int next(int step, boolean works, long[] pool, int at, int length, StateWords out);
}
