package org.kingbolt.bounds;

import java.util.Collection;
import java.util.Objects;
import org.jspecify.annotations.Nullable;
import org.kingbolt.core.CoherentSystem;
import org.kingbolt.core.Probabilities;
import org.kingbolt.core.Structure;

/**
 * Where bounds on a system's reliability begin: {@code Bounds.of(system).given(p).esaryProschan()}.
 *
 * <p>Immutable; safe to share between threads.
 */
public final class Bounds {

  private final Structure structure;
  private final @Nullable CoherentSystem system;

  private Bounds(Structure structure, @Nullable CoherentSystem system) {
    this.structure = structure;
    this.system = system;
  }

  /**
   * Bounds for a structure, which may be too large to compile: only the bounds that need all
   * minimal sets compile it, when they are asked for.
   *
   * @param structure the system's structure
   * @return a start for questions
   */
  public static Bounds of(Structure structure) {
    return new Bounds(
        Objects.requireNonNull(
            structure, "structure is null; give a structure, or a system compiled from one"),
        null);
  }

  /**
   * Bounds for a compiled system.
   *
   * @param system the system
   * @return a start for questions
   */
  public static Bounds of(CoherentSystem system) {
    Objects.requireNonNull(
        system, "system is null; give a compiled system, or a structure to compile");
    return new Bounds(system.structure(), system);
  }

  /**
   * Bounds from path sets and cut sets that the caller has: all of them, or, where a system has too
   * many, some.
   *
   * @param pathSets sets of components that keep the system working; may be empty
   * @param cutSets sets of components whose failure makes the system fail; may be empty
   * @return a start for questions
   * @throws IllegalArgumentException if there are no sets at all, or a set is empty or names a
   *     component twice, or a name is blank, or a path set and a cut set have no component in
   *     common
   */
  public static SetBounds ofSets(
      Collection<? extends Collection<String>> pathSets,
      Collection<? extends Collection<String>> cutSets) {
    return SetBounds.of(pathSets, cutSets);
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
        structure,
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
    return "Bounds[" + structure.components().size() + " components]; call given(probabilities)";
  }
}
