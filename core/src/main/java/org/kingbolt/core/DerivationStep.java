package org.kingbolt.core;

import java.util.Optional;

/**
 * One step of a {@link Derivation}: what is looked at, under which condition, and its formula.
 *
 * <p>Immutable; safe to share between threads.
 *
 * @param number from 1 up; step 1 is the whole system, whose result is r, and the result of step n
 *     is written {@code rn}
 * @param condition the components held working or failed on the way here, such as {@code given L3
 *     works}; {@code no condition} for the whole system
 * @param structure what is left under the condition, reduced
 * @param key the key component, or the key part as text, on which this step conditions; empty when
 *     the structure falls apart without
 * @param formula the step's formula, in terms of components and of results of other steps
 */
public record DerivationStep(
    int number, String condition, Structure structure, Optional<String> key, String formula) {

  /**
   * Makes a step.
   *
   * @param number from 1 up
   * @param condition what is held on the way here
   * @param structure what is left under the condition
   * @param key what this step conditions on
   * @param formula the step's formula
   * @throws NullPointerException if anything is null
   */
  public DerivationStep {
    Check.notNull(condition, "condition");
    Check.notNull(structure, "structure");
    Check.notNull(key, "key");
    Check.notNull(formula, "formula");
  }
}
