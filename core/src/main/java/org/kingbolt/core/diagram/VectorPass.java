package org.kingbolt.core.diagram;

/** One way to evaluate a run of vectors, with scratch of its own. For one thread. */
interface VectorPass {

  /**
   * Evaluates some of the vectors of a batch.
   *
   * @param batch the vectors, and where the results go
   * @param first the first vector
   * @param count how many
   * @param meter hears of every few nodes
   */
  void run(VectorBatch batch, int first, int count, WorkMeter meter);
}
