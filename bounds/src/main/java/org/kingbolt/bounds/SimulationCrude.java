package org.kingbolt.bounds;

import org.kingbolt.core.StateEvaluator;
import org.kingbolt.core.Structure;

/** Draws states and counts the failed ones. */
final class SimulationCrude implements SimulationTrial {

  private final SimulationStates states;
  private final StateEvaluator evaluator;
  private final boolean[] state;

  private SimulationCrude(Structure structure, SimulationStates states) {
    this.states = states;
    this.evaluator = StateEvaluator.of(structure);
    this.state = new boolean[states.size()];
  }

  static SimulationModel model(Structure structure, SimulationStates states) {
    return new SimulationModel(
        () -> new SimulationCrude(structure, states),
        true,
        1,
        0,
        0,
        "crude Monte Carlo",
        "the number of failed states among independent ones is binomial");
  }

  @Override
  public boolean hits(SimulationRandom random) {
    states.draw(state, random);
    return !evaluator.works(state);
  }
}
