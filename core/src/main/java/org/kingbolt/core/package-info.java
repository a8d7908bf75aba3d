/**
 * Describe a structure, compile it once, ask it anything.
 *
 * <p>Reading order for a newcomer:
 *
 * <ol>
 *   <li>{@link org.kingbolt.core.Structure}: how the system works in terms of its components;
 *   <li>{@link org.kingbolt.core.Probabilities}: how likely each component is to work;
 *   <li>{@link org.kingbolt.core.CoherentSystem}: the compiled structure, which answers;
 *   <li>{@link org.kingbolt.core.Derivation}: the figure as a formula that a reviewer can follow.
 * </ol>
 *
 * <p>Assumed throughout: a component, and the system, either works or has failed; the system is
 * coherent, so that no repair makes it worse; and, wherever probabilities are used, components fail
 * independently of each other. Results support a qualified engineer's judgement; they never replace
 * local codes, standards and licensed practice, least of all where people can be hurt.
 *
 * <p>All values are immutable and safe to share between threads; an {@link
 * org.kingbolt.core.Evaluator}, which owns scratch, is for one thread. Nothing accepts or returns
 * null. The package may use {@code org.kingbolt.core.diagram}, Guava and commons-math3; it does no
 * input or output and keeps no global state.
 */
@NullMarked
package org.kingbolt.core;

import org.jspecify.annotations.NullMarked;
