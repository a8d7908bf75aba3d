package org.kingbolt.importance;

import static org.kingbolt.importance.ImprovementOption.option;

import java.util.ArrayList;
import java.util.HashMap;
import java.util.LinkedHashMap;
import java.util.LinkedHashSet;
import java.util.List;
import java.util.Map;
import java.util.Random;
import java.util.Set;
import org.kingbolt.core.Probabilities;
import org.kingbolt.core.Probability;
import org.kingbolt.core.Structure;

/**
 * A small random plan, and every choice there is, each worked out on a structure of its own: what
 * stands in each place is put together anew for every choice.
 */
final class RandomPlan {

  /** One choice that the limits allow. */
  record Choice(Set<String> options, Map<String, Double> costs, Probability reliability) {

    double cost(String resource) {
      return costs.getOrDefault(resource, 0.0);
    }
  }

  private record Put(Structure module, Probabilities p) {}

  private final Structure structure;
  private final Probabilities p;
  private final Random random;
  private final List<String> resources;
  private final List<ImprovementOption> options = new ArrayList<>();
  private final List<List<String>> atMost = new ArrayList<>();
  private final List<List<String>> exactly = new ArrayList<>();
  private final List<List<String>> requires = new ArrayList<>();

  RandomPlan(Structure structure, Probabilities p, int options, int resources, long seed) {
    this.structure = structure;
    this.p = p;
    this.random = new Random(seed);
    this.resources = List.of("money", "days").subList(0, resources);
    for (int i = 0; i < options; i++) {
      this.options.add(randomOption(i));
    }
    List<String> names = this.options.stream().map(ImprovementOption::name).toList();
    for (int i = random.nextInt(3); i > 0 && options > 2; i--) {
      List<String> some = new ArrayList<>(names);
      java.util.Collections.shuffle(some, random);
      switch (random.nextInt(4)) {
        case 0 -> exactly.add(some.subList(0, 2));
        case 1 -> requires.add(some.subList(0, 2));
        default -> atMost.add(some.subList(0, 2 + random.nextInt(options - 1)));
      }
    }
  }

  private ImprovementOption randomOption(int number) {
    ImprovementOption made = option("option " + number);
    Set<String> put = new LinkedHashSet<>();
    for (int i = random.nextInt(4) == 0 ? 2 : 1; i > 0; i--) {
      String component = any();
      switch (random.nextInt(6)) {
        case 0, 1 -> {
          made = put.add(component) ? made.replacing(component, anyProbability()) : made;
        }
        case 2 -> {
          made = made.sparing(component, "spare " + number + "." + i, anyProbability());
        }
        case 3 -> {
          made = made.sparing(component, "common spare", Probability.working(0.75));
        }
        case 4 -> {
          made = made.multiplyingFailing(component, random.nextInt(5) / 4.0);
        }
        default -> {
          Structure module = module(component, number + "." + i);
          Probabilities fresh = Probabilities.all(0.75).with("u" + number + "." + i, 0.875);
          made = put.add(component) ? made.rebuilding(component, module, fresh) : made;
        }
      }
    }
    for (String resource : resources) {
      made = made.costing(resource, random.nextInt(8) / 10.0);
    }
    return made;
  }

  private Structure module(String component, String number) {
    Structure unit = Structure.component("u" + number);
    return switch (random.nextInt(4)) {
      case 0 -> Structure.parallel(unit, Structure.component("v" + number));
      case 1 -> Structure.parallel(unit, Structure.component(component));
      case 2 -> Structure.series(unit, Structure.component("common spare"));
      default -> {
        String other = any();
        yield Structure.parallel(unit, Structure.component(other));
      }
    };
  }

  private String any() {
    return structure.components().get(random.nextInt(structure.components().size()));
  }

  private Probability anyProbability() {
    return switch (random.nextInt(5)) {
      case 0 -> Probability.CERTAIN;
      case 1 -> Probability.failing(1e-9 * random.nextDouble());
      default -> Probability.working(random.nextDouble());
    };
  }

  List<String> resources() {
    return resources;
  }

  ImprovementPlan plan() {
    ImprovementPlan plan = ImprovementPlan.of(structure).given(p).withOptions(options);
    for (List<String> names : atMost) {
      plan = plan.atMostOneOf(names.toArray(new String[0]));
    }
    for (List<String> names : exactly) {
      plan = plan.exactlyOneOf(names.toArray(new String[0]));
    }
    for (List<String> names : requires) {
      plan = plan.requires(names.get(0), names.get(1));
    }
    return plan;
  }

  List<Choice> choices() {
    List<Choice> choices = new ArrayList<>();
    for (int mask = 0; mask < 1 << options.size(); mask++) {
      List<ImprovementOption> chosen = new ArrayList<>();
      for (int i = 0; i < options.size(); i++) {
        if ((mask >>> i & 1) != 0) {
          chosen.add(options.get(i));
        }
      }
      Set<String> names = new LinkedHashSet<>();
      chosen.forEach(one -> names.add(one.name()));
      if (isAllowed(names) && fits(chosen)) {
        choices.add(new Choice(names, costs(chosen), reliability(chosen)));
      }
    }
    return choices;
  }

  private boolean isAllowed(Set<String> names) {
    return atMost.stream().allMatch(some -> count(some, names) <= 1)
        && exactly.stream().allMatch(some -> count(some, names) == 1)
        && requires.stream()
            .allMatch(two -> !names.contains(two.get(0)) || names.contains(two.get(1)));
  }

  private static long count(List<String> some, Set<String> names) {
    return some.stream().filter(names::contains).count();
  }

  /** Whether no two options put different things in the same place. */
  private static boolean fits(List<ImprovementOption> chosen) {
    Map<String, PlanChange> put = new HashMap<>();
    for (ImprovementOption one : chosen) {
      for (PlanChange change : one.changes()) {
        if (change instanceof PlanChange.Replace || change instanceof PlanChange.Rebuild) {
          PlanChange before = put.putIfAbsent(change.component(), change);
          if (before != null && !before.equals(change)) {
            return false;
          }
        }
      }
    }
    return true;
  }

  private Map<String, Double> costs(List<ImprovementOption> chosen) {
    Map<String, Double> costs = new LinkedHashMap<>();
    for (String resource : resources) {
      long tenths =
          chosen.stream().mapToLong(one -> Math.round(10 * one.costs().get(resource))).sum();
      costs.put(resource, tenths / 10.0);
    }
    return costs;
  }

  private Probability reliability(List<ImprovementOption> chosen) {
    Map<String, Probability> units = new LinkedHashMap<>();
    structure.components().forEach(component -> units.put(component, p.get(component)));
    units.put("common spare", Probability.working(0.75));
    Map<String, Put> put = new LinkedHashMap<>();
    Map<String, Set<String>> spares = new LinkedHashMap<>();
    for (ImprovementOption one : chosen) {
      for (PlanChange change : one.changes()) {
        if (change instanceof PlanChange.Replace replace) {
          units.put(replace.component(), replace.unit());
        } else if (change instanceof PlanChange.Rebuild rebuild) {
          put.put(rebuild.component(), new Put(rebuild.module(), rebuild.p()));
        } else if (change instanceof PlanChange.Spare spare) {
          spares.computeIfAbsent(spare.component(), c -> new LinkedHashSet<>()).add(spare.spare());
          units.put(spare.spare(), spare.unit());
        }
      }
    }
    for (ImprovementOption one : chosen) {
      for (PlanChange change : one.changes()) {
        if (change instanceof PlanChange.Multiply multiply) {
          Probability unit = units.get(multiply.component());
          double factor = multiply.factor();
          double works = unit.working() + unit.failing() * (1 - factor);
          units.put(multiply.component(), Probability.of(works, unit.failing() * factor));
        }
      }
    }
    return assemble(units, put, spares).reliability(Probabilities.of(units));
  }

  private Structure assemble(
      Map<String, Probability> units, Map<String, Put> put, Map<String, Set<String>> spares) {
    Structure whole = structure;
    for (String component : structure.components()) {
      whole = replaced(whole, component, Structure.component("at " + component));
    }
    for (String component : structure.components()) {
      Put there = put.get(component);
      Structure stands = there == null ? Structure.component(component) : there.module();
      if (there != null) {
        for (String name : there.module().components()) {
          units.putIfAbsent(name, there.p().get(name));
        }
      }
      Set<Structure> all = new LinkedHashSet<>(List.of(stands));
      spares.getOrDefault(component, Set.of()).forEach(s -> all.add(Structure.component(s)));
      whole = replaced(whole, "at " + component, Structure.parallel(new ArrayList<>(all)));
    }
    return whole;
  }

  /** Replacing one component may take others away that do not matter. */
  private static Structure replaced(Structure whole, String component, Structure module) {
    return whole.components().contains(component) ? whole.replace(component, module) : whole;
  }

  @Override
  public String toString() {
    StringBuilder out = new StringBuilder(structure + "\n" + p);
    options.forEach(one -> out.append("\n").append(one).append(one.changes()));
    return out + "\n" + atMost + exactly + requires;
  }
}
