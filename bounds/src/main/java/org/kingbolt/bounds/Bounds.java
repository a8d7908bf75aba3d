package org.kingbolt.bounds;

import java.util.Objects;
import org.kingbolt.core.CoherentSystem;
import org.kingbolt.core.Probabilities;
import org.kingbolt.core.Structure;

/**
 * Where bounds on a system's reliability begin: {@code Bounds.of(system).given(p).esaryProschan()}.
 *
 * <p>Immutable; safe to share between threads.
 */
public final class Bounds {

  private final CoherentSystem system;

  private Bounds(CoherentSystem system) {
    this.system = system;
  }

  /**
   * Bounds for a structure, which is compiled within the default budget.
   *
   * @param structure the system's structure
   * @return a start for questions
   * @throws org.kingbolt.core.BudgetExceededException if the structure is too large to compile
   */
  public static Bounds of(Structure structure) {
    return of(
        Objects.requireNonNull(
                structure, "structure is null; give a structure, or a system compiled from one")
            .compile());
  }

  /**
   * Bounds for a compiled system.
   *
   * @param system the system
   * @return a start for questions
   */
  public static Bounds of(CoherentSystem system) {
    return new Bounds(
        Objects.requireNonNull(
            system, "system is null; give a compiled system, or a structure to compile"));
  }

  /**
   * Fixes the components' probabilities.
   *
   * @param p the probability of each component; a register may name more
   * @return the bounds at these probabilities
   * @throws IllegalArgumentException if components have no probability; the message lists them
   */
  public BoundsAtProbabilities given(Probabilities p) {
    return new BoundsAtProbabilities(
        system,
        Objects.requireNonNull(
            p,
            "probabilities are null; give those of all components, such as Probabilities.all(0.9)"));
  }

  /**
   * Says what this is and what to call on it.
   *
   * @return one line
   */
  @Override
  public String toString() {
    return "Bounds[" + system + "]; call given(probabilities)";
  }
}
