package org.kingbolt.importance;

import com.google.common.collect.ImmutableList;
import com.google.common.collect.ImmutableMap;
import java.util.LinkedHashMap;
import java.util.Map;
import org.kingbolt.core.Probabilities;
import org.kingbolt.core.Probability;
import org.kingbolt.core.Structure;

/**
 * One thing that could be bought to make a system more reliable: what it changes, and what it costs
 * in one or more resources.
 *
 * <p>An option may make several changes; it is bought as a whole. Changes to the same component
 * combine as follows.
 *
 * <ul>
 *   <li>At most one chosen option can put another unit or structure in a component's place, unless
 *       both put the same unit there.
 *   <li>Tests multiply the probability of failing of the unit, present or new; several tests
 *       multiply together. They do nothing to a structure that takes the unit's place.
 *   <li>Spares stand in parallel to whatever is in the component's place; several spares add up. A
 *       spare named in several places is one and the same unit everywhere.
 *   <li>Inside a structure that takes a component's place, names of the system's components mean
 *       the units there, with what replacements and tests do to them, and all other names are new
 *       components.
 * </ul>
 *
 * <p>Immutable; safe to share between threads. Equal when name, changes and costs are equal.
 *
 * <p>Example: {@code option("new pump A").replacing("pumpA", 0.99).costing(12.5)}.
 */
public final class ImprovementOption {

  /** The resource of costs that name none. */
  static final String COST = "cost";

  private final String name;
  private final ImmutableList<PlanChange> changes;
  private final ImmutableMap<String, Double> costs;

  private ImprovementOption(
      String name, ImmutableList<PlanChange> changes, ImmutableMap<String, Double> costs) {
    this.name = name;
    this.changes = changes;
    this.costs = costs;
  }

  /**
   * Begins an option that as yet changes nothing and costs nothing. It may stay without changes,
   * such as a foundation that other options require.
   *
   * @param name any text with at least one visible character; unique in a plan
   * @return the option
   * @throws IllegalArgumentException if the name is blank
   */
  public static ImprovementOption option(String name) {
    return new ImprovementOption(
        PlanCheck.name(name, "the option's name"), ImmutableList.of(), ImmutableMap.of());
  }

  /**
   * Puts another unit in a component's place.
   *
   * @param component one of the system's components
   * @param working the new unit's probability of working, from 0 to 1
   * @return the option with this change
   * @throws IllegalArgumentException if the number is NaN or outside [0, 1], or the name is blank
   */
  public ImprovementOption replacing(String component, double working) {
    return replacing(component, probability(component, working));
  }

  /**
   * Puts another unit in a component's place.
   *
   * @param component one of the system's components
   * @param unit the new unit's probability
   * @return the option with this change
   * @throws IllegalArgumentException if the name is blank
   */
  public ImprovementOption replacing(String component, Probability unit) {
    return with(new PlanChange.Replace(component(component), probability(component, unit)));
  }

  /**
   * Adds a spare in parallel, which works from the start.
   *
   * @param component one of the system's components
   * @param spare the spare's name, which is no component of the system; the same name in several
   *     places is one unit
   * @param working the spare's probability of working, from 0 to 1
   * @return the option with this change
   * @throws IllegalArgumentException if the number is NaN or outside [0, 1], or a name is blank
   */
  public ImprovementOption sparing(String component, String spare, double working) {
    return sparing(component, spare, probability(spare, working));
  }

  /**
   * Adds a spare in parallel, which works from the start.
   *
   * @param component one of the system's components
   * @param spare the spare's name, which is no component of the system; the same name in several
   *     places is one unit
   * @param unit the spare's probability
   * @return the option with this change
   * @throws IllegalArgumentException if a name is blank
   */
  public ImprovementOption sparing(String component, String spare, Probability unit) {
    PlanCheck.name(spare, where() + "the spare's name");
    return with(new PlanChange.Spare(component(component), spare, probability(spare, unit)));
  }

  /**
   * Multiplies the probability of failing of the unit in a component's place: a test, an
   * inspection, better maintenance.
   *
   * @param component one of the system's components
   * @param factor from 0 to 1; 0.2 leaves a fifth of the failures
   * @return the option with this change
   * @throws IllegalArgumentException if the factor is NaN or outside [0, 1], or the name is blank
   */
  public ImprovementOption multiplyingFailing(String component, double factor) {
    if (!(factor >= 0 && factor <= 1)) {
      throw new IllegalArgumentException(
          where()
              + "the factor for "
              + PlanCheck.quoted(component(component))
              + " is "
              + factor
              + "; it must be a number from 0 to 1, the share of failures that is left");
    }
    return with(new PlanChange.Multiply(component(component), factor + 0.0));
  }

  /**
   * Puts a structure in a component's place.
   *
   * @param component one of the system's components
   * @param module what takes its place; may use the system's components, this one among them
   * @param p the probabilities of its new components
   * @return the option with this change
   * @throws IllegalArgumentException if the name is blank or the module has no components
   */
  public ImprovementOption rebuilding(String component, Structure module, Probabilities p) {
    PlanCheck.notNull(module, where() + "the structure");
    PlanCheck.notNull(p, where() + "the probabilities of the structure's components");
    if (module.isAlwaysWorking() || module.isNeverWorking()) {
      throw new IllegalArgumentException(
          where() + "the structure has no components; give one that has, or replace the unit");
    }
    return with(new PlanChange.Rebuild(component(component), module, p));
  }

  /**
   * Sets the cost where there is one resource only, which is called {@code cost}.
   *
   * @param amount 0 or more
   * @return the option at this cost
   * @throws IllegalArgumentException if the amount is negative, infinite or NaN
   */
  public ImprovementOption costing(double amount) {
    return costing(COST, amount);
  }

  /**
   * Sets the cost in one resource. Amounts are taken as the decimal numbers that they print as and
   * added exactly, as long as no sum needs more than 18 digits.
   *
   * @param resource such as {@code money} or {@code days}
   * @param amount 0 or more
   * @return the option at this cost in the resource, and its other costs
   * @throws IllegalArgumentException if the amount is negative, infinite or NaN, or the name blank
   */
  public ImprovementOption costing(String resource, double amount) {
    PlanCheck.name(resource, where() + "the resource's name");
    PlanCheck.amount(amount, where() + "the cost in " + PlanCheck.quoted(resource));
    Map<String, Double> changed = new LinkedHashMap<>(costs);
    changed.put(resource, amount + 0.0);
    return new ImprovementOption(name, changes, ImmutableMap.copyOf(changed));
  }

  /**
   * Returns the name.
   *
   * @return unique in a plan
   */
  public String name() {
    return name;
  }

  /**
   * Returns the costs.
   *
   * @return by resource; resources not listed cost nothing
   */
  public Map<String, Double> costs() {
    return costs;
  }

  ImmutableList<PlanChange> changes() {
    return changes;
  }

  private ImprovementOption with(PlanChange change) {
    ImmutableList<PlanChange> more =
        ImmutableList.<PlanChange>builder().addAll(changes).add(change).build();
    return new ImprovementOption(name, more, costs);
  }

  private String component(String component) {
    return PlanCheck.name(component, where() + "the component's name");
  }

  private Probability probability(String component, double working) {
    return PlanCheck.naming(
        where() + "component " + PlanCheck.quoted(component), () -> Probability.working(working));
  }

  private Probability probability(String component, Probability unit) {
    return PlanCheck.notNull(unit, where() + "the probability of " + PlanCheck.quoted(component));
  }

  private String where() {
    return "option " + PlanCheck.quoted(name) + ": ";
  }

  @Override
  public boolean equals(Object other) {
    return other instanceof ImprovementOption that
        && name.equals(that.name)
        && changes.equals(that.changes)
        && costs.equals(that.costs);
  }

  @Override
  public int hashCode() {
    return 31 * (31 * name.hashCode() + changes.hashCode()) + costs.hashCode();
  }

  /**
   * Shows name and costs.
   *
   * @return such as {@code new pump A {cost=12.5}}
   */
  @Override
  public String toString() {
    return name + " " + costs;
  }
}
