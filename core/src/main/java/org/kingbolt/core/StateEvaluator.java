package org.kingbolt.core;

import java.util.List;
import java.util.function.Predicate;
import org.kingbolt.core.diagram.WorkMeter;

/**
 * The structure function for very many states, without compiling: {@link Structure#works} in
 * arrays, without allocating anything for a state.
 *
 * <p>For one thread; makes no assumption on how components fail.
 *
 * <p>Example: {@code StateEvaluator.of(Structure.parallel("a", "b")).works(new boolean[] {true,
 * false})}.
 */
public final class StateEvaluator {

  private final List<String> components;

  /** By number of the sub-structure: what it does with its parts; leaves are never asked. */
  private final List<Predicate<boolean[]>> operators;

  /** By number: the variable of a leaf, or -1. */
  private final int[] variable;

  /** By number: the numbers of the parts, and their values. */
  private final int[][] parts;

  private final boolean[][] partWorks;
  private final boolean[] works;

  private StateEvaluator(Numbering numbering) {
    this.components = numbering.components();
    int size = numbering.size();
    @SuppressWarnings({"unchecked", "rawtypes"})
    Predicate<boolean[]>[] found = new Predicate[size];
    this.variable = new int[size];
    this.parts = new int[size][];
    this.partWorks = new boolean[size][];
    this.works = new boolean[size];
    int variables = 0;
    for (int number = 0; number < size; number++) {
      Structure structure = numbering.structure(number);
      int slots = structure.parts().size();
      found[number] = structure.evaluation();
      variable[number] = structure instanceof ComponentStructure ? variables++ : -1;
      parts[number] = new int[slots];
      partWorks[number] = new boolean[slots];
      for (int slot = 0; slot < slots; slot++) {
        parts[number][slot] = numbering.part(number, slot);
      }
    }
    this.operators = List.of(found);
  }

  /**
   * Makes an evaluator.
   *
   * @param structure the structure
   * @return a fresh one, for one thread. Cost: linear in the size of the structure.
   */
  public static StateEvaluator of(Structure structure) {
    return new StateEvaluator(
        new Numbering(Check.notNull(structure, "structure"), WorkMeter.UNLIMITED));
  }

  /**
   * Returns the components.
   *
   * @return the names in order of their first mention in the structure
   */
  public List<String> components() {
    return components;
  }

  /**
   * The structure function.
   *
   * @param working by component, in the order of {@link #components()}: whether it works; not
   *     changed and not kept
   * @return φ of the state. Cost: linear in the size of the structure.
   * @throws IllegalArgumentException if there are not as many entries as components
   */
  public boolean works(boolean[] working) {
    if (Check.notNull(working, "working").length != components.size()) {
      throw new IllegalArgumentException(
          "working has length "
              + working.length
              + " and the structure has "
              + components.size()
              + " components; give one entry for each, in the order of components()");
    }
    for (int number = 0; number < works.length; number++) {
      if (variable[number] >= 0) {
        works[number] = working[variable[number]];
      } else {
        boolean[] values = partWorks[number];
        int[] from = parts[number];
        for (int slot = 0; slot < values.length; slot++) {
          values[slot] = works[from[slot]];
        }
        works[number] = operators.get(number).test(values);
      }
    }
    return works[works.length - 1];
  }

  /**
   * Says what this is and what to call on it.
   *
   * @return one line
   */
  @Override
  public String toString() {
    return "StateEvaluator[" + components.size() + " components]; call works(state)";
  }
}
