package org.kingbolt.importance;

import com.google.common.collect.ImmutableList;
import java.util.ArrayList;
import java.util.HashMap;
import java.util.LinkedHashMap;
import java.util.LinkedHashSet;
import java.util.List;
import java.util.Map;
import java.util.Set;
import org.jspecify.annotations.Nullable;
import org.kingbolt.core.Budget;
import org.kingbolt.core.CoherentSystem;
import org.kingbolt.core.Probabilities;
import org.kingbolt.core.Probability;
import org.kingbolt.core.Structure;

/** From the description of a plan to its model. */
final class PlanModeler {

  private final PlanDescription plan;
  private final Map<String, List<PlanContents.Content>> contents = new LinkedHashMap<>();
  private final List<String> resources;
  private final List<PlanCosts> costs = new ArrayList<>();
  private final List<PlanItem> items = new ArrayList<>();
  private final List<PlanLimit> limits = new ArrayList<>();

  private PlanModeler(PlanDescription plan) {
    this.plan = plan;
    plan.allocations().forEach(a -> contents.put(a.component(), PlanContents.of(a)));
    this.resources = resources();
    for (String resource : resources) {
      costs.add(new PlanCosts(amounts(resource)));
    }
  }

  static PlanModel model(PlanDescription plan, Budget budget) {
    return new PlanModeler(plan).build(budget);
  }

  private List<String> resources() {
    Set<String> names = new LinkedHashSet<>();
    plan.options().forEach(option -> names.addAll(option.costs().keySet()));
    for (ImprovementAllocation allocation : plan.allocations()) {
      allocation.units().forEach(unit -> names.addAll(unit.costs().keySet()));
    }
    return List.copyOf(names.isEmpty() ? Set.of(ImprovementOption.COST) : new ArrayList<>(names));
  }

  private List<Double> amounts(String resource) {
    List<Double> amounts = new ArrayList<>();
    plan.options().forEach(option -> amounts.add(option.costs().getOrDefault(resource, 0.0)));
    contents
        .values()
        .forEach(list -> list.forEach(c -> amounts.add(c.costs().getOrDefault(resource, 0.0))));
    return amounts;
  }

  private PlanModel build(Budget budget) {
    checkAllocations();
    PlanPlaces places = new PlanPlaces(plan.structure(), plan.options());
    plan.allocations().forEach(places::check);
    Structure whole = places.structure();
    CoherentSystem system = whole.compile(budget);
    List<String> names = system.components();
    Map<String, Integer> variables = new HashMap<>();
    names.forEach(name -> variables.put(name, variables.size()));
    double[] working = new double[names.size()];
    double[] failing = new double[names.size()];
    present(places.fixed())
        .forEach(
            (name, p) -> {
              int variable = variables.getOrDefault(name, -1);
              if (variable >= 0) {
                working[variable] = p.working();
                failing[variable] = p.failing();
              }
            });
    Map<String, Integer> numbers = new HashMap<>();
    for (ImprovementOption option : plan.options()) {
      numbers.put(option.name(), items.size());
      List<PlanEffect> effects = places.effects(option, variables, budget);
      add(option.name(), option.costs(), effects);
    }
    conflicts(numbers);
    plan.limits().forEach(limit -> limits.add(limit.numbered(numbers)));
    plan.allocations().forEach(allocation -> allocate(allocation, variables));
    return new PlanModel(
        system,
        working,
        failing,
        ImmutableList.copyOf(items),
        ImmutableList.copyOf(limits),
        ImmutableList.copyOf(resources),
        ImmutableList.copyOf(costs));
  }

  private void add(String name, Map<String, Double> amounts, List<PlanEffect> effects) {
    long[] cost = new long[resources.size()];
    for (int r = 0; r < cost.length; r++) {
      cost[r] = costs.get(r).units(amounts.getOrDefault(resources.get(r), 0.0));
    }
    items.add(new PlanItem(name, cost, ImmutableList.copyOf(effects)));
  }

  private void checkAllocations() {
    Set<String> changed = new LinkedHashSet<>();
    plan.options().forEach(o -> o.changes().forEach(c -> changed.add(c.component())));
    for (ImprovementAllocation allocation : plan.allocations()) {
      if (!plan.structure().components().contains(allocation.component())) {
        throw new IllegalArgumentException(
            allocation.where()
                + "the system has no such component; its components are "
                + PlanCheck.listed(plan.structure().components())
                + "; name one of these");
      }
      if (!allocation.beside() && changed.contains(allocation.component())) {
        throw new IllegalArgumentException(
            allocation.where()
                + "an option changes this component, whose units are to be chosen; give what the"
                + " option does as a unit of the allocation");
      }
    }
  }

  /** The present probabilities of the components that have any, and of what options bring. */
  private Map<String, Probability> present(Map<String, Probability> fixed) {
    Set<String> places = new LinkedHashSet<>();
    for (ImprovementAllocation allocation : plan.allocations()) {
      if (!allocation.beside()) {
        places.add(allocation.component());
      }
    }
    List<String> units =
        plan.structure().components().stream().filter(c -> !places.contains(c)).toList();
    @Nullable Probabilities p = plan.p();
    if (p == null) {
      p = Probabilities.of(Map.of());
    }
    List<Probability> values = p.forComponents(units);
    Map<String, Probability> present = new LinkedHashMap<>(fixed);
    for (int i = 0; i < units.size(); i++) {
      present.put(units.get(i), values.get(i));
    }
    places.forEach(place -> present.put(place, Probability.IMPOSSIBLE));
    return present;
  }

  /** Options that put different things in the same place. */
  private void conflicts(Map<String, Integer> numbers) {
    Map<String, Map<Object, Set<Integer>>> byPlace = new LinkedHashMap<>();
    for (ImprovementOption option : plan.options()) {
      for (PlanChange change : option.changes()) {
        if (change instanceof PlanChange.Replace || change instanceof PlanChange.Rebuild) {
          Map<Object, Set<Integer>> there =
              byPlace.computeIfAbsent(change.component(), c -> new LinkedHashMap<>());
          int number = numbers.getOrDefault(option.name(), -1);
          boolean again = there.values().stream().anyMatch(set -> set.contains(number));
          if (again) {
            throw new IllegalArgumentException(
                "option "
                    + PlanCheck.quoted(option.name())
                    + " puts two things in the place of "
                    + PlanCheck.quoted(change.component())
                    + "; make them two options");
          }
          there.computeIfAbsent(change, c -> new LinkedHashSet<>()).add(number);
        }
      }
    }
    for (Map<Object, Set<Integer>> there : byPlace.values()) {
      List<Set<Integer>> sets = List.copyOf(there.values());
      if (sets.stream().allMatch(set -> set.size() == 1)) {
        limit(sets.stream().flatMap(Set::stream).toList());
        continue;
      }
      for (int i = 0; i < sets.size(); i++) {
        for (int j = 0; j < i; j++) {
          for (int a : sets.get(i)) {
            sets.get(j).forEach(b -> limit(List.of(b, a)));
          }
        }
      }
    }
  }

  private void limit(List<Integer> members) {
    if (members.size() > 1) {
      limits.add(new PlanLimit(PlanLimit.Kind.AT_MOST_ONE, ImmutableList.copyOf(members)));
    }
  }

  private void allocate(ImprovementAllocation allocation, Map<String, Integer> variables) {
    int variable = variables.getOrDefault(allocation.component(), -1);
    ImmutableList.Builder<Integer> members = ImmutableList.builder();
    for (PlanContents.Content content : contents.getOrDefault(allocation.component(), List.of())) {
      members.add(items.size());
      Probability p = content.p();
      PlanEffect effect = new PlanEffect(variable, !allocation.beside(), p.working(), p.failing());
      add(content.name(), content.costs(), variable < 0 ? List.of() : List.of(effect));
    }
    limits.add(new PlanLimit(PlanLimit.Kind.EXACTLY_ONE, members.build()));
  }
}
