package org.kingbolt.bounds;

import org.kingbolt.core.StateEvaluator;
import org.kingbolt.core.Structure;
import org.kingbolt.core.diagram.Diagram;

/**
 * Draws states in which a simpler system fails, which fails whenever the structure does, and counts
 * those in which the structure fails; or the same with working in the place of failing. The simpler
 * system is a diagram: a walk from its root that turns with the conditional probabilities ends in
 * exactly those states, as often as they deserve.
 */
final class SimulationConditional implements SimulationTrial {

  /** What all threads share: the diagram, and how likely it is to turn either way at each node. */
  private static final class Shared {
    private final Structure structure;
    private final SimulationStates states;
    private final Diagram diagram;
    private final boolean failing;
    private final int[] variable;
    private final double[] lowShare;
    private final double[] highShare;
    private final double probability;

    Shared(Structure structure, SimulationStates states, Diagram diagram, boolean failing) {
      this.structure = structure;
      this.states = states;
      this.diagram = diagram;
      this.failing = failing;
      this.variable = new int[diagram.size()];
      this.lowShare = new double[diagram.size()];
      this.highShare = new double[diagram.size()];
      double[] value = values(states, diagram, !failing);
      this.probability = value[diagram.root()];
      for (int level = 0; level < diagram.levels(); level++) {
        int component = diagram.variableAt(level);
        for (int id = diagram.from(level); id < diagram.to(level); id++) {
          variable[id] = component;
          double low = states.failing[component] * value[diagram.low(id)];
          double high = states.working[component] * value[diagram.high(id)];
          lowShare[id] = low / (low + high);
          highShare[id] = high / (low + high);
        }
      }
    }
  }

  private final Shared shared;
  private final StateEvaluator evaluator;
  private final boolean[] state;

  private SimulationConditional(Shared shared) {
    this.shared = shared;
    this.evaluator = StateEvaluator.of(shared.structure);
    this.state = new boolean[shared.states.size()];
  }

  /**
   * Prepares.
   *
   * @param diagram fails whenever the structure fails, or works whenever it works
   * @param failing which of both
   * @param whole whether the diagram is the structure itself
   */
  static SimulationModel model(
      Structure structure,
      SimulationStates states,
      Diagram diagram,
      boolean failing,
      boolean whole) {
    Shared shared = new Shared(structure, states, diagram, failing);
    return new SimulationModel(
        () -> new SimulationConditional(shared),
        failing,
        shared.probability,
        values(states, diagram, failing)[diagram.root()],
        4L * diagram.levels(),
        "conditional Monte Carlo",
        reason(shared.probability, failing, whole));
  }

  private static String reason(double probability, boolean failing, boolean whole) {
    String does = failing ? "fails" : "works";
    if (whole) {
      return "the probability that the system "
          + does
          + ", "
          + probability
          + ", was worked out, and states in which it does were drawn";
    }
    return "the system "
        + does
        + " only when a simpler one does, whose probability "
        + probability
        + " was worked out; among states in which that one "
        + does
        + " the number of those in which the system does is binomial";
  }

  /** The probability, at every node, of an outcome. */
  private static double[] values(SimulationStates states, Diagram diagram, boolean works) {
    double[] value = new double[diagram.size()];
    value[works ? Diagram.WORKS : Diagram.FAILS] = 1;
    for (int level = diagram.levels() - 1; level >= 0; level--) {
      double p = states.working[diagram.variableAt(level)];
      double q = states.failing[diagram.variableAt(level)];
      for (int id = diagram.from(level); id < diagram.to(level); id++) {
        value[id] = p * value[diagram.high(id)] + q * value[diagram.low(id)];
      }
    }
    return value;
  }

  @Override
  public boolean hits(SimulationRandom random) {
    Diagram diagram = shared.diagram;
    shared.states.draw(state, random);
    int id = diagram.root();
    while (id > Diagram.WORKS) {
      boolean works = random.happens(shared.highShare[id], shared.lowShare[id]);
      state[shared.variable[id]] = works;
      id = works ? diagram.high(id) : diagram.low(id);
    }
    return evaluator.works(state) != shared.failing;
  }
}
