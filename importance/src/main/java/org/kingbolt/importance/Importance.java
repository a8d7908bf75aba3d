package org.kingbolt.importance;

import java.util.Objects;
import org.kingbolt.core.CoherentSystem;
import org.kingbolt.core.Probabilities;
import org.kingbolt.core.Structure;

/**
 * Where importance measures begin: {@code Importance.of(system).given(p).birnbaum()}.
 *
 * <p>Immutable; safe to share between threads.
 */
public final class Importance {

  private final CoherentSystem system;

  private Importance(CoherentSystem system) {
    this.system = system;
  }

  /**
   * Importance in a structure, which is compiled within the default budget.
   *
   * @param structure the system's structure
   * @return a start for questions
   * @throws org.kingbolt.core.BudgetExceededException if the structure is too large to compile
   */
  public static Importance of(Structure structure) {
    return of(
        Objects.requireNonNull(
                structure, "structure is null; give a structure, or a system compiled from one")
            .compile());
  }

  /**
   * Importance in a compiled system.
   *
   * @param system the system
   * @return a start for questions
   */
  public static Importance of(CoherentSystem system) {
    return new Importance(
        Objects.requireNonNull(
            system, "system is null; give a compiled system, or a structure to compile"));
  }

  /**
   * Birnbaum structural importance: the share of the states of the other components in which this
   * component decides whether the system works.
   *
   * <p>Source: Birnbaum, On the importance of different components in a multicomponent system, in
   * Multivariate Analysis II, 1969, 581. Equal to the Birnbaum importance with all probabilities
   * one half. Needs no probabilities.
   *
   * @return from 0, for irrelevant components, to 1. Cost: two scans of the diagram.
   */
  public Ranking structural() {
    return Ranking.of(
        "Birnbaum structural importance",
        system.components(),
        system.evaluation(Probabilities.all(0.5)).derivatives());
  }

  /**
   * Fixes the components' probabilities.
   *
   * @param p the probability of each component; a register may name more
   * @return the measures at these probabilities
   * @throws IllegalArgumentException if components have no probability; the message lists them
   */
  public ImportanceAtProbabilities given(Probabilities p) {
    Objects.requireNonNull(
            p,
            "probabilities are null; give those of all components, such as Probabilities.all(0.9)")
        .forComponents(system.components());
    return new ImportanceAtProbabilities(system, p);
  }

  /**
   * Says what this is and what to call on it.
   *
   * @return one line
   */
  @Override
  public String toString() {
    return "Importance[" + system + "]; call structural(), or given(probabilities) first";
  }
}
