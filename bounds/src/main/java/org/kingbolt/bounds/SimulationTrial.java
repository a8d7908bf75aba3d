package org.kingbolt.bounds;

/** One thread's hand in a simulation: draws one state after the other. */
interface SimulationTrial {

  /** Draws a state and tells whether it counts. */
  boolean hits(SimulationRandom random);
}
