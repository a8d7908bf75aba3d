package org.kingbolt.importance;

import com.google.common.collect.ImmutableList;
import com.google.common.collect.ImmutableMap;
import java.util.LinkedHashMap;
import java.util.Map;
import java.util.function.IntToDoubleFunction;
import org.kingbolt.core.Probability;

/**
 * How many units of which type shall stand in the place of a component: redundancy allocation, with
 * types mixed as wanted. The units are new components that fail independently.
 *
 * <p>In a plan, each content of the place, such as two units of one type and one of another, is an
 * option, and exactly one is chosen. Contents that others beat in every cost and in reliability are
 * left out beforehand.
 *
 * <p>Source of the problem: Fyffe, Hines &amp; Lee, IEEE Trans. Reliab. 17 (1968) 64; Coit &amp;
 * Smith, IEEE Trans. Reliab. 45 (1996) 254, with mixed types.
 *
 * <p>Immutable; safe to share between threads. Equal when described in the same way; functions are
 * compared by identity.
 *
 * <p>Example: {@code allocation("stage1").unit("A", 0.90).costing("money", 1).costing("kg", 3)
 * .unit("B", 0.93).costing("money", 1).costing("kg", 4).between(1, 8)}.
 */
public final class ImprovementAllocation {

  private static final int MOST_UNITS = 100;

  /** A type of unit: its costs are functions of how many there are. */
  record Unit(String name, Probability p, ImmutableMap<String, IntToDoubleFunction> costs) {}

  /** A cost in proportion. */
  private record Each(double amount) implements IntToDoubleFunction {
    @Override
    public double applyAsDouble(int count) {
      return count * amount;
    }
  }

  private final String component;
  private final ImmutableList<Unit> units;
  private final int fewest;
  private final int most;
  private final int needed;
  private final boolean beside;

  private ImprovementAllocation(
      String component,
      ImmutableList<Unit> units,
      int fewest,
      int most,
      int needed,
      boolean beside) {
    this.component = component;
    this.units = units;
    this.fewest = fewest;
    this.most = most;
    this.needed = needed;
    this.beside = beside;
  }

  /**
   * Begins the choice of all units in a component's place: as yet of no types, at least one unit,
   * at most eight, one of which must work. The component itself is a place only; it needs no
   * probability.
   *
   * @param component one of the system's components, which no option changes
   * @return the allocation
   * @throws IllegalArgumentException if the name is blank
   */
  public static ImprovementAllocation allocation(String component) {
    return new ImprovementAllocation(
        PlanCheck.name(component, "allocation: the component's name"),
        ImmutableList.of(),
        1,
        8,
        1,
        false);
  }

  /**
   * Begins the choice of spares in parallel to the unit that a component has: as yet of no types,
   * from none to eight.
   *
   * @param component one of the system's components
   * @return the allocation
   * @throws IllegalArgumentException if the name is blank
   */
  public static ImprovementAllocation sparesOf(String component) {
    return new ImprovementAllocation(
        PlanCheck.name(component, "allocation: the component's name"),
        ImmutableList.of(),
        0,
        8,
        1,
        true);
  }

  /**
   * Adds a type of unit; {@code costing} then says what units of this type cost.
   *
   * @param type its name, unique in this allocation
   * @param working a unit's probability of working, from 0 to 1
   * @return the allocation with one more type
   * @throws IllegalArgumentException if the number is NaN or outside [0, 1], or the name is blank
   *     or given twice
   */
  public ImprovementAllocation unit(String type, double working) {
    return unit(
        type,
        PlanCheck.naming(
            where() + "unit " + PlanCheck.quoted(type), () -> Probability.working(working)));
  }

  /**
   * Adds a type of unit; {@code costing} then says what units of this type cost.
   *
   * @param type its name, unique in this allocation
   * @param p a unit's probability
   * @return the allocation with one more type
   * @throws IllegalArgumentException if the name is blank or given twice
   */
  public ImprovementAllocation unit(String type, Probability p) {
    PlanCheck.name(type, where() + "the unit's name");
    PlanCheck.notNull(p, where() + "the probability of unit " + PlanCheck.quoted(type));
    if (units.stream().anyMatch(unit -> unit.name.equals(type))) {
      throw new IllegalArgumentException(
          where() + "unit " + PlanCheck.quoted(type) + " is given twice; name each type once");
    }
    return with(
        ImmutableList.<Unit>builder()
            .addAll(units)
            .add(new Unit(type, p, ImmutableMap.of()))
            .build());
  }

  /**
   * Sets what each unit of the type added last costs, where there is one resource only.
   *
   * @param each 0 or more
   * @return the allocation
   * @throws IllegalArgumentException if the amount is negative, infinite or NaN
   * @throws IllegalStateException if no type has been added
   */
  public ImprovementAllocation costing(double each) {
    return costing(ImprovementOption.COST, each);
  }

  /**
   * Sets what each unit of the type added last costs in one resource.
   *
   * @param resource such as {@code money}
   * @param each 0 or more
   * @return the allocation
   * @throws IllegalArgumentException if the amount is negative, infinite or NaN, or the name blank
   * @throws IllegalStateException if no type has been added
   */
  public ImprovementAllocation costing(String resource, double each) {
    PlanCheck.amount(each, where() + "the cost in " + PlanCheck.quoted(resource));
    return costing(resource, new Each(each));
  }

  /**
   * Sets what several units of the type added last cost together in one resource, where that is not
   * in proportion.
   *
   * @param resource such as {@code volume}
   * @param ofCount given the number of units, from 1 up, tells their cost, 0 or more
   * @return the allocation
   * @throws IllegalArgumentException if the name is blank
   * @throws IllegalStateException if no type has been added
   */
  public ImprovementAllocation costing(String resource, IntToDoubleFunction ofCount) {
    PlanCheck.name(resource, where() + "the resource's name");
    PlanCheck.notNull(ofCount, where() + "the cost in " + PlanCheck.quoted(resource));
    if (units.isEmpty()) {
      throw new IllegalStateException(
          where() + "a cost is given before any unit; call unit(type, probability) first");
    }
    Unit last = units.get(units.size() - 1);
    Map<String, IntToDoubleFunction> costs = new LinkedHashMap<>(last.costs);
    costs.put(resource, ofCount);
    return with(
        ImmutableList.<Unit>builder()
            .addAll(units.subList(0, units.size() - 1))
            .add(new Unit(last.name, last.p, ImmutableMap.copyOf(costs)))
            .build());
  }

  /**
   * Limits the number of units of all types together.
   *
   * @param leastUnits at least 1, or 0 for spares
   * @param mostUnits from the least up to 100
   * @return the allocation
   * @throws IllegalArgumentException if a number is out of range
   */
  public ImprovementAllocation between(int leastUnits, int mostUnits) {
    if (leastUnits < (beside ? 0 : 1) || mostUnits < leastUnits || mostUnits > MOST_UNITS) {
      throw new IllegalArgumentException(
          where()
              + "from "
              + leastUnits
              + " to "
              + mostUnits
              + " units; the least must be "
              + (beside ? 0 : 1)
              + " or more, and the most from there to "
              + MOST_UNITS);
    }
    return new ImprovementAllocation(component, units, leastUnits, mostUnits, needed, beside);
  }

  /**
   * Sets how many of the units must work: k-out-of-n:G, whatever n is chosen.
   *
   * @param k at least 1; 1 for spares
   * @return the allocation; contents of fewer than k units never work
   * @throws IllegalArgumentException if k is out of range
   */
  public ImprovementAllocation needing(int k) {
    if (k < 1 || (beside && k > 1)) {
      throw new IllegalArgumentException(
          where()
              + k
              + " units are needed; it must be 1 or more, and 1 where spares stand beside a unit");
    }
    return new ImprovementAllocation(component, units, fewest, most, k, beside);
  }

  String component() {
    return component;
  }

  ImmutableList<Unit> units() {
    return units;
  }

  int fewest() {
    return fewest;
  }

  int most() {
    return most;
  }

  int needed() {
    return needed;
  }

  /** Whether the units stand beside one that is there already. */
  boolean beside() {
    return beside;
  }

  String where() {
    return "allocation " + PlanCheck.quoted(component) + ": ";
  }

  private ImprovementAllocation with(ImmutableList<Unit> changed) {
    return new ImprovementAllocation(component, changed, fewest, most, needed, beside);
  }

  @Override
  public boolean equals(Object other) {
    return other instanceof ImprovementAllocation that
        && component.equals(that.component)
        && units.equals(that.units)
        && fewest == that.fewest
        && most == that.most
        && needed == that.needed
        && beside == that.beside;
  }

  @Override
  public int hashCode() {
    return 31 * component.hashCode() + units.hashCode();
  }

  /**
   * Shows the component and the types.
   *
   * @return one line
   */
  @Override
  public String toString() {
    return (beside ? "spares of " : "units for ")
        + component
        + ": "
        + fewest
        + " to "
        + most
        + " of "
        + String.join(", ", units.stream().map(Unit::name).toList());
  }
}
