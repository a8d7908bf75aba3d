package org.kingbolt.importance;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.Comparator;
import java.util.List;
import java.util.Map;
import java.util.TreeMap;
import java.util.function.IntToDoubleFunction;
import org.kingbolt.core.Probability;

/** The contents that an allocation leaves to choose from. */
final class PlanContents {

  /** One content: its name, its costs by resource, how likely it is to work. */
  record Content(String name, Map<String, Double> costs, Probability p) {}

  private static final int MOST = 200_000;

  private PlanContents() {}

  /** All contents that no other beats, cheapest names first as they are counted up. */
  static List<Content> of(ImprovementAllocation allocation) {
    if (allocation.units().isEmpty()) {
      throw new IllegalArgumentException(
          allocation.where() + "it has no units; add a type with unit(name, probability)");
    }
    List<Content> contents = new ArrayList<>();
    int[] counts = new int[allocation.units().size()];
    int total = 0;
    while (true) {
      if (total >= allocation.fewest()) {
        contents.add(content(allocation, counts, total));
        if (contents.size() > MOST) {
          throw new IllegalArgumentException(
              allocation.where()
                  + "more than "
                  + MOST
                  + " contents; give fewer types or fewer units");
        }
      }
      int place = 0;
      if (total == allocation.most()) {
        while (place < counts.length && counts[place] == 0) {
          place++;
        }
        total -= counts[place];
        counts[place] = 0;
        place++;
      }
      if (place == counts.length) {
        return unbeaten(contents);
      }
      counts[place]++;
      total++;
    }
  }

  private static Content content(ImprovementAllocation allocation, int[] counts, int total) {
    Map<String, Double> costs = new TreeMap<>();
    List<String> names = new ArrayList<>();
    double[] working = new double[total + 1];
    working[0] = 1;
    int made = 0;
    for (int type = 0; type < counts.length; type++) {
      ImprovementAllocation.Unit unit = allocation.units().get(type);
      if (counts[type] > 0) {
        names.add(counts[type] + " " + unit.name());
        for (Map.Entry<String, IntToDoubleFunction> cost : unit.costs().entrySet()) {
          costs.merge(cost.getKey(), cost(allocation, unit, counts[type], cost), Double::sum);
        }
      }
      for (int i = 0; i < counts[type]; i++) {
        made++;
        for (int j = made; j >= 0; j--) {
          double more = j == 0 ? 0 : working[j - 1] * unit.p().working();
          working[j] = working[j] * unit.p().failing() + more;
        }
      }
    }
    double fails = 0;
    double works = 0;
    for (int j = total; j >= 0; j--) {
      if (j >= allocation.needed()) {
        works += working[j];
      } else {
        fails += working[j];
      }
    }
    String what = names.isEmpty() ? "no spares" : String.join(", ", names);
    return new Content(
        allocation.component() + ": " + what,
        costs,
        Probability.of(Math.min(1, works), Math.min(1, fails)));
  }

  private static double cost(
      ImprovementAllocation allocation,
      ImprovementAllocation.Unit unit,
      int count,
      Map.Entry<String, IntToDoubleFunction> cost) {
    return PlanCheck.amount(
        cost.getValue().applyAsDouble(count),
        allocation.where()
            + "the cost of "
            + count
            + " "
            + unit.name()
            + " in "
            + PlanCheck.quoted(cost.getKey()));
  }

  /** Of equal ones the first stays. */
  private static List<Content> unbeaten(List<Content> contents) {
    String[] resources =
        contents.stream()
            .flatMap(content -> content.costs.keySet().stream())
            .distinct()
            .sorted()
            .toArray(String[]::new);
    double[][] costs = new double[contents.size()][];
    Integer[] order = new Integer[contents.size()];
    for (int i = 0; i < order.length; i++) {
      Map<String, Double> own = contents.get(i).costs;
      costs[i] = Arrays.stream(resources).mapToDouble(r -> own.getOrDefault(r, 0.0)).toArray();
      order[i] = i;
    }
    Arrays.sort(
        order,
        Comparator.comparing((Integer i) -> contents.get(i).p)
            .reversed()
            .thenComparing(i -> costs[i], Arrays::compare));
    List<Integer> kept = new ArrayList<>();
    for (int candidate : order) {
      if (kept.stream().noneMatch(other -> noDearer(costs[other], costs[candidate]))) {
        kept.add(candidate);
      }
    }
    return kept.stream().sorted().map(contents::get).toList();
  }

  private static boolean noDearer(double[] costs, double[] others) {
    for (int r = 0; r < costs.length; r++) {
      if (costs[r] > others[r]) {
        return false;
      }
    }
    return true;
  }
}
