package org.kingbolt.importance;

import java.util.Collection;
import java.util.List;
import java.util.Objects;
import org.kingbolt.core.Budget;
import org.kingbolt.core.CoherentSystem;
import org.kingbolt.core.Probabilities;
import org.kingbolt.core.Probability;

/**
 * How the reliability of one system moves with some of its components, the others staying as given.
 * All answers are exact but for rounding: the reliability is linear in each component, and a
 * polynomial in a probability that several share.
 *
 * <p>Assumes that components fail independently. Immutable; safe to share between threads.
 */
public final class SensitivityAtProbabilities {

  private final CoherentSystem system;
  private final Gains given;

  SensitivityAtProbabilities(CoherentSystem system, Gains given) {
    this.system = system;
    this.given = given;
  }

  /**
   * The reliability along one component: a straight line.
   *
   * @param component its name
   * @return a curve of degree 1. Cost: one scan.
   * @throws IllegalArgumentException if the system has no such component
   */
  public ReliabilityCurve along(String component) {
    Objects.requireNonNull(component, "component is null; give the name of one of the system's");
    return along(List.of(component));
  }

  /**
   * The reliability along a group of components that share one probability, within {@link
   * Budget#ofHeap()}; see {@link #along(Collection, Budget)}.
   *
   * @param group the components' names
   * @return a curve whose degree is the group's size
   * @throws IllegalArgumentException if there are none, or one is unknown or named twice
   * @throws org.kingbolt.core.BudgetExceededException if the numbers are too many for the heap
   */
  public ReliabilityCurve along(Collection<String> group) {
    return along(group, Budget.ofHeap());
  }

  /**
   * The reliability along a group of components that share one probability: a polynomial in it.
   *
   * @param group the components' names
   * @param budget how much work it may cost
   * @return a curve whose degree is the group's size. Cost: one scan, with as many numbers at a
   *     node as there are members at or below it.
   * @throws IllegalArgumentException if there are none, or one is unknown or named twice
   * @throws org.kingbolt.core.BudgetExceededException if the budget is used up
   */
  public ReliabilityCurve along(Collection<String> group, Budget budget) {
    int[] members = Names.places(system.components(), group, "the group");
    Objects.requireNonNull(budget, "budget is null; it must be given");
    return CountPass.curve(
        system, given, members, budget.start("following the reliability along a group"));
  }

  /**
   * The probability that one component needs for the system to meet a target.
   *
   * @param component its name
   * @param target the reliability wanted
   * @return the least probability, or why there is none
   * @throws IllegalArgumentException if the system has no such component
   */
  public BreakEven breakEven(String component, Probability target) {
    return along(component).breakEven(target);
  }

  /**
   * The range of the reliability as each component, alone, goes from a low to a high value.
   *
   * @param low the low value of each component to be varied
   * @param high its high value; components that neither register covers stay out
   * @return the ranges, widest first. Cost: one pass and one more scan up and down.
   * @throws IllegalArgumentException if a component has only one of the two values, if its low
   *     value is more likely to work than its high one, or if no component has values
   */
  public Tornado tornado(Probabilities low, Probabilities high) {
    Objects.requireNonNull(low, "low is null; give the low values of the components to vary");
    Objects.requireNonNull(high, "high is null; give the high values of the components to vary");
    return Tornado.of(system, given, low, high);
  }

  /**
   * Says what this is and what to call on it.
   *
   * @return one line
   */
  @Override
  public String toString() {
    return "Sensitivity["
        + system
        + "] at given probabilities; call along(component), tornado(low, high) or"
        + " breakEven(component, target)";
  }
}
