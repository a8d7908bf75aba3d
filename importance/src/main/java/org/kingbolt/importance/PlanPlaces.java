package org.kingbolt.importance;

import java.util.ArrayList;
import java.util.HashSet;
import java.util.LinkedHashMap;
import java.util.LinkedHashSet;
import java.util.List;
import java.util.Map;
import java.util.Set;
import org.kingbolt.core.Budget;
import org.kingbolt.core.Probability;
import org.kingbolt.core.Structure;

/**
 * Which changes are numbers on a component and which change the structure; and the one structure in
 * which all of the latter are switched by variables of their own: a part that an option brings
 * stands in series with the variable of that option, which works when the option is chosen.
 */
final class PlanPlaces {

  private final Structure base;
  private final Set<String> known;
  private final Map<String, Probability> added = new LinkedHashMap<>();
  private final Map<String, Integer> mentions = new LinkedHashMap<>();

  /** By component: the parts that stand in its place beside the present unit. */
  private final Map<String, Set<Structure>> parts = new LinkedHashMap<>();

  /** Components whose present unit can be taken away. */
  private final Map<String, String> removable = new LinkedHashMap<>();

  /** Components whose units are tested. */
  private final Set<String> tested = new HashSet<>();

  /** Components whose present unit stands in other places too. */
  private final Set<String> named = new HashSet<>();

  private final Map<String, String> switches = new LinkedHashMap<>();
  private final Set<String> taken;

  PlanPlaces(Structure base, List<ImprovementOption> options) {
    this.base = base;
    this.known = new LinkedHashSet<>(base.components());
    this.taken = new HashSet<>(known);
    for (ImprovementOption option : options) {
      for (PlanChange change : option.changes()) {
        register(option, change);
        if (change instanceof PlanChange.Multiply) {
          tested.add(change.component());
        }
      }
    }
    taken.addAll(added.keySet());
    for (ImprovementOption option : options) {
      for (PlanChange change : option.changes()) {
        if (change instanceof PlanChange.Rebuild rebuild && !isNumber(rebuild)) {
          removable.computeIfAbsent(change.component(), c -> free("present " + c));
          named.addAll(rebuild.module().components());
        }
      }
    }
    for (ImprovementOption option : options) {
      option.changes().forEach(change -> place(option, change));
    }
  }

  private void register(ImprovementOption option, PlanChange change) {
    String where = "option " + PlanCheck.quoted(option.name()) + ": ";
    if (!known.contains(change.component())) {
      throw new IllegalArgumentException(
          where
              + "unknown component "
              + PlanCheck.quoted(change.component())
              + "; the system's components are "
              + PlanCheck.listed(known)
              + "; name one of these");
    }
    if (change instanceof PlanChange.Spare spare) {
      if (known.contains(spare.spare())) {
        throw new IllegalArgumentException(
            where
                + "the spare "
                + PlanCheck.quoted(spare.spare())
                + " is a component of the system; one name is one component, so give the spare a"
                + " name of its own, or use rebuilding to connect a present component");
      }
      add(where, spare.spare(), spare.unit());
    } else if (change instanceof PlanChange.Rebuild rebuild) {
      List<String> fresh =
          rebuild.module().components().stream().filter(c -> !known.contains(c)).toList();
      List<Probability> values =
          PlanCheck.naming(where + "new components", () -> rebuild.p().forComponents(fresh));
      for (int i = 0; i < fresh.size(); i++) {
        add(where, fresh.get(i), values.get(i));
      }
    }
  }

  private void add(String where, String name, Probability p) {
    Probability before = added.putIfAbsent(name, p);
    if (before != null && !before.equals(p)) {
      throw new IllegalArgumentException(
          where
              + "the new component "
              + PlanCheck.quoted(name)
              + " has "
              + p
              + ", and in another place "
              + before
              + "; one name is one component, so give one probability or two names");
    }
    mentions.merge(name, 1, Integer::sum);
  }

  /** Whether a change of the structure amounts to another unit. */
  private boolean isNumber(PlanChange.Rebuild rebuild) {
    return !tested.contains(rebuild.component())
        && rebuild.module().components().stream()
            .allMatch(c -> !known.contains(c) && mentions.getOrDefault(c, 0) == 1);
  }

  private boolean isNumber(PlanChange.Spare spare) {
    return mentions.getOrDefault(spare.spare(), 0) == 1
        && !removable.containsKey(spare.component())
        && !named.contains(spare.component());
  }

  /** Refuses spares of an allocation where they would stand in several places. */
  void check(ImprovementAllocation allocation) {
    String component = allocation.component();
    if (allocation.beside() && (named.contains(component) || removable.containsKey(component))) {
      throw new IllegalArgumentException(
          allocation.where()
              + "an option changes the structure around this component, so its spares would not be"
              + " clear; give the spares as options, with sparing");
    }
  }

  private void place(ImprovementOption option, PlanChange change) {
    Structure part = null;
    if (change instanceof PlanChange.Spare spare && !isNumber(spare)) {
      part = Structure.component(spare.spare());
    } else if (change instanceof PlanChange.Rebuild rebuild && !isNumber(rebuild)) {
      part = rebuild.module();
    }
    if (part != null) {
      String chosen = switches.computeIfAbsent(option.name(), name -> free("chosen " + name));
      parts
          .computeIfAbsent(change.component(), c -> new LinkedHashSet<>())
          .add(Structure.series(Structure.component(chosen), part));
    }
  }

  private String free(String wanted) {
    String name = wanted;
    while (!taken.add(name)) {
      name += "'";
    }
    return name;
  }

  /** The structure that holds everything. */
  Structure structure() {
    Structure whole = base;
    Map<String, String> marks = new LinkedHashMap<>();
    for (String component : parts.keySet()) {
      String mark = free("place of " + component);
      marks.put(component, mark);
      whole = replaced(whole, component, Structure.component(mark));
    }
    for (Map.Entry<String, Set<Structure>> place : parts.entrySet()) {
      Structure unit = Structure.component(place.getKey());
      String present = removable.get(place.getKey());
      List<Structure> all = new ArrayList<>();
      all.add(present == null ? unit : Structure.series(Structure.component(present), unit));
      all.addAll(place.getValue());
      String mark = marks.getOrDefault(place.getKey(), "");
      whole = replaced(whole, mark, Structure.parallel(all));
    }
    return whole;
  }

  /** Components that do not matter may have gone already. */
  private static Structure replaced(Structure whole, String component, Structure module) {
    return whole.components().contains(component) ? whole.replace(component, module) : whole;
  }

  /** The probabilities of what is not in the present system, with nothing chosen. */
  Map<String, Probability> fixed() {
    Map<String, Probability> fixed = new LinkedHashMap<>(added);
    switches.values().forEach(name -> fixed.put(name, Probability.IMPOSSIBLE));
    removable.values().forEach(name -> fixed.put(name, Probability.CERTAIN));
    return fixed;
  }

  /** What choosing an option does to variables, given their numbers by name. */
  List<PlanEffect> effects(
      ImprovementOption option, Map<String, Integer> variables, Budget budget) {
    Map<String, PlanEffect> sets = new LinkedHashMap<>();
    Map<String, PlanEffect> factors = new LinkedHashMap<>();
    for (PlanChange change : option.changes()) {
      String component = change.component();
      if (change instanceof PlanChange.Replace replace) {
        set(sets, variables, component, replace.unit());
      } else if (change instanceof PlanChange.Multiply multiply) {
        double factor = multiply.factor();
        multiply(factors, variables, component, Probability.failing(factor));
      } else if (change instanceof PlanChange.Spare spare && isNumber(spare)) {
        multiply(factors, variables, component, spare.unit());
      } else if (change instanceof PlanChange.Rebuild rebuild) {
        if (isNumber(rebuild)) {
          set(sets, variables, component, rebuild.module().reliability(rebuild.p(), budget));
        } else {
          set(sets, variables, removable.getOrDefault(component, ""), Probability.IMPOSSIBLE);
        }
      }
    }
    String chosen = switches.get(option.name());
    if (chosen != null) {
      set(sets, variables, chosen, Probability.CERTAIN);
    }
    List<PlanEffect> all = new ArrayList<>(sets.values());
    all.addAll(factors.values());
    return all.stream().filter(effect -> effect.variable() >= 0).toList();
  }

  private static void set(
      Map<String, PlanEffect> sets, Map<String, Integer> variables, String name, Probability p) {
    int variable = variables.getOrDefault(name, -1);
    sets.put(name, new PlanEffect(variable, true, p.working(), p.failing()));
  }

  /** Both as the failing of units in parallel. */
  private static void multiply(
      Map<String, PlanEffect> factors, Map<String, Integer> variables, String name, Probability p) {
    int variable = variables.getOrDefault(name, -1);
    PlanEffect before = factors.get(name);
    double working = before == null ? 0 : before.working();
    double failing = before == null ? 1 : before.failing();
    double more = Math.min(1, working + failing * p.working());
    factors.put(name, new PlanEffect(variable, false, more, failing * p.failing()));
  }
}
