package org.kingbolt.importance;

import com.google.common.collect.ImmutableMap;
import java.util.ArrayList;
import java.util.Collection;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.Objects;
import java.util.OptionalDouble;
import org.kingbolt.core.Budget;
import org.kingbolt.core.CoherentSystem;
import org.kingbolt.core.Probability;

/**
 * What a finite change of some components' probabilities does to the reliability, split exactly
 * into the effects of each component and the interactions of each set of them.
 *
 * <p>Since the reliability is linear in each component, the change is the sum, over all sets S of
 * the changed components, of {@code d^|S| r / dp_S times the product of the changes in S}, with the
 * derivative taken before the change. A component's first-order effect is that of the set of itself
 * alone; its total-order effect is the sum of the effects of all sets that contain it, which is
 * what the system would lose if this component's change were left out.
 *
 * <p>Source: Borgonovo, The reliability importance of components and prime implicants in coherent
 * and non-coherent systems including total-order interactions, Eur. J. Oper. Res. 204 (2010) 485
 * (from memory).
 *
 * <p>Immutable; safe to share between threads. Example: {@code
 * Importance.of(system).given(p).change(Map.of("a", Probability.CERTAIN)).total()}.
 */
public final class FiniteChange {

  private final CoherentSystem system;
  private final Gains before;
  private final Gains after;
  private final FirstOrder first;
  private final ImmutableMap<String, Integer> changed;

  FiniteChange(
      CoherentSystem system, Gains before, FirstOrder first, Map<String, Probability> changes) {
    Objects.requireNonNull(
        changes, "changes are null; give a map from components to probabilities");
    Map<String, Integer> places = Names.places(system.components());
    ImmutableMap.Builder<String, Integer> byName = ImmutableMap.builder();
    Map<Integer, Probability> values = new HashMap<>();
    for (String name : system.components()) {
      if (changes.containsKey(name)) {
        Probability value = changes.get(name);
        Objects.requireNonNull(value, () -> "probability of " + Names.quoted(name) + " is null");
        int place = Names.place(places, name);
        values.put(place, value);
        byName.put(name, place);
      }
    }
    changes.keySet().forEach(name -> Names.place(places, name));
    this.system = system;
    this.before = before;
    this.after = before.with(values);
    this.first = first;
    this.changed = byName.buildOrThrow();
  }

  /**
   * The whole change of the reliability.
   *
   * @return from -1 to 1; where a difference would lose digits, as a sum of gains and losses,
   *     component by component. Cost: two scans, or else a pass for every changed component.
   */
  public double total() {
    OptionalDouble difference = after.plainly(before);
    if (difference.isPresent()) {
      return difference.getAsDouble();
    }
    double sum = 0;
    Gains state = before;
    for (int i : changed.values()) {
      sum += after.change(i, before) * state.evaluation().derivatives()[i];
      state = state.with(i, value(i));
    }
    return sum;
  }

  private Probability value(int i) {
    return Probability.of(after.working(i), after.failing(i));
  }

  /**
   * The effect of one set: for two or more components, their interaction.
   *
   * @param set some of the changed components
   * @return the mixed derivative before the change, times the changes. Cost: a few scans.
   * @throws IllegalArgumentException if the set is empty, names a component twice, or one that is
   *     not changed
   */
  public double effect(Collection<String> set) {
    Names.places(new ArrayList<>(changed.keySet()), set, "the set");
    int[] members = Names.places(system.components(), set, "the set");
    double product = 1;
    for (int i : members) {
      product *= after.change(i, before);
    }
    return product == 0
        ? 0
        : product
            * new MixedDerivatives(
                    system.diagram(),
                    before.working(),
                    before.failing(),
                    Budget.ofHeap().start("working out an interaction"))
                .of(members);
  }

  /**
   * Each component's effect by itself.
   *
   * @return the change in reliability if it alone changed, negative where it gets worse
   */
  public Ranking firstOrder() {
    return ranking("first-order effect", first.derivatives());
  }

  /**
   * Each component's effect with all its interactions.
   *
   * @return the change in reliability that is lost if its change is left out, negative where it
   *     gets worse. Cost: one pass, for the sum over all sets is the derivative after the change.
   */
  public Ranking totalOrder() {
    return ranking("total-order effect", after.evaluation().derivatives());
  }

  private Ranking ranking(String measure, double[] derivatives) {
    List<String> names = changed.keySet().asList();
    double[] values =
        changed.values().stream()
            .mapToDouble(i -> after.change(i, before) * derivatives[i])
            .map(value -> value + 0.0)
            .toArray();
    return Ranking.of(measure, names, values);
  }

  /**
   * Says what this is and what to call on it.
   *
   * @return one line
   */
  @Override
  public String toString() {
    return "FiniteChange of "
        + Names.listed(changed.keySet())
        + "; call total(), effect(set), firstOrder() or totalOrder()";
  }
}
