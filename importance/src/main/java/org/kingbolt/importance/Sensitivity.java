package org.kingbolt.importance;

import java.util.Objects;
import org.kingbolt.core.CoherentSystem;
import org.kingbolt.core.Probabilities;
import org.kingbolt.core.Structure;

/**
 * Where sensitivity questions begin: {@code Sensitivity.of(system).given(p).along("pump")}.
 *
 * <p>Immutable; safe to share between threads.
 */
public final class Sensitivity {

  private final CoherentSystem system;

  private Sensitivity(CoherentSystem system) {
    this.system = system;
  }

  /**
   * Sensitivity of a structure, which is compiled within the default budget.
   *
   * @param structure the system's structure
   * @return a start for questions
   * @throws org.kingbolt.core.BudgetExceededException if the structure is too large to compile
   */
  public static Sensitivity of(Structure structure) {
    return of(
        Objects.requireNonNull(
                structure, "structure is null; give a structure, or a system compiled from one")
            .compile());
  }

  /**
   * Sensitivity of a compiled system.
   *
   * @param system the system
   * @return a start for questions
   */
  public static Sensitivity of(CoherentSystem system) {
    return new Sensitivity(
        Objects.requireNonNull(
            system, "system is null; give a compiled system, or a structure to compile"));
  }

  /**
   * Fixes the components' probabilities.
   *
   * @param p the probability of each component; a register may name more
   * @return the questions at these probabilities
   * @throws IllegalArgumentException if components have no probability; the message lists them
   */
  public SensitivityAtProbabilities given(Probabilities p) {
    Objects.requireNonNull(
        p, "probabilities are null; give those of all components, such as Probabilities.all(0.9)");
    return new SensitivityAtProbabilities(system, Gains.of(system, p));
  }

  /**
   * Says what this is and what to call on it.
   *
   * @return one line
   */
  @Override
  public String toString() {
    return "Sensitivity[" + system + "]; call given(probabilities) first";
  }
}
