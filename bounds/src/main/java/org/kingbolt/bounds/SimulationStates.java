package org.kingbolt.bounds;

import java.util.List;
import org.kingbolt.core.Probabilities;
import org.kingbolt.core.Probability;

/** The components' probabilities in arrays, and random states of independent components. */
final class SimulationStates {

  final double[] working;
  final double[] failing;

  SimulationStates(List<String> components, Probabilities p) {
    List<Probability> values = p.forComponents(components);
    working = new double[values.size()];
    failing = new double[values.size()];
    for (int i = 0; i < working.length; i++) {
      working[i] = values.get(i).working();
      failing[i] = values.get(i).failing();
    }
  }

  int size() {
    return working.length;
  }

  /** The probability that a component is in a state. */
  double side(int component, boolean works) {
    return works ? working[component] : failing[component];
  }

  /** Whether a component works in a random state. */
  boolean draw(int component, SimulationRandom random) {
    return random.happens(working[component], failing[component]);
  }

  /** A random state of all components. */
  void draw(boolean[] state, SimulationRandom random) {
    for (int i = 0; i < state.length; i++) {
      state[i] = draw(i, random);
    }
  }
}
