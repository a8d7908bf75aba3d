package org.kingbolt.importance;

import org.kingbolt.core.CoherentSystem;
import org.kingbolt.core.Probabilities;

/**
 * Importance measures of one system's components at given probabilities.
 *
 * <p>Assumes that components fail independently. Immutable; safe to share between threads.
 */
public final class ImportanceAtProbabilities {

  private final CoherentSystem system;
  private final Probabilities p;

  ImportanceAtProbabilities(CoherentSystem system, Probabilities p) {
    this.system = system;
    this.p = p;
  }

  /**
   * Birnbaum importance: the probability that the component decides, {@code r(1_i, p) - r(0_i, p)},
   * which is the partial derivative of the reliability with respect to the component's own.
   *
   * <p>Source: Birnbaum, On the importance of different components in a multicomponent system, in
   * Multivariate Analysis II, 1969, 581.
   *
   * @return from 0, for irrelevant components, to 1. Cost: two scans of the diagram.
   */
  public Ranking birnbaum() {
    return Ranking.of(
        "Birnbaum importance", system.components(), system.evaluation(p).derivatives());
  }

  /**
   * Says what this is and what to call on it.
   *
   * @return one line
   */
  @Override
  public String toString() {
    return "Importance[" + system + "] at given probabilities; call birnbaum()";
  }
}
