package org.kingbolt.importance;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.Collection;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Objects;
import org.kingbolt.core.Budget;
import org.kingbolt.core.CoherentSystem;
import org.kingbolt.core.diagram.Scan;
import org.kingbolt.core.diagram.WorkMeter;

/**
 * Compares all courses of inspection by dynamic programming over what may be known: of each
 * component nothing, that it works, or that it has failed, written as a number to the base three.
 * Numbers are joint with the evidence, so that nothing is divided until the end.
 */
final class InspectionCosts {

  /** How many components are compared exactly. */
  static final int MOST = 12;

  private InspectionCosts() {}

  /** The costs of components not yet known, in the system's order. */
  static Map<String, Double> checked(
      Map<String, Double> costs, List<String> components, Collection<String> known) {
    Objects.requireNonNull(costs, "costs are null; give a map from components to costs");
    Map<String, Integer> places = Names.places(components);
    costs.forEach(
        (name, cost) -> {
          Names.place(places, name);
          Objects.requireNonNull(cost, () -> "cost of " + Names.quoted(name) + " is null");
          if (!(cost > 0 && cost < Double.POSITIVE_INFINITY)) {
            throw new IllegalArgumentException(
                "component "
                    + Names.quoted(name)
                    + ": the cost of its inspection is "
                    + cost
                    + "; it must be a number above 0");
          }
        });
    Map<String, Double> left = new LinkedHashMap<>();
    for (String name : components) {
      if (costs.containsKey(name) && !known.contains(name)) {
        left.put(name, costs.get(name));
      }
    }
    return left;
  }

  static CheapestInspection cheapest(
      CoherentSystem system, Gains given, Map<String, Boolean> known, Map<String, Double> costs) {
    int n = costs.size();
    if (n > MOST) {
      throw new IllegalArgumentException(
          n
              + " components may be inspected; at most "
              + MOST
              + " can be compared exactly: list those most likely to have failed, see posterior(),"
              + " or use failedPerCost(costs)");
    }
    List<String> names = new ArrayList<>(costs.keySet());
    Map<String, Integer> byName = Names.places(system.components());
    int[] inspected = names.stream().mapToInt(name -> Names.place(byName, name)).toArray();
    double[] cost = names.stream().mapToDouble(costs::get).toArray();
    WorkMeter meter = Budget.ofHeap().start("comparing courses of inspection");
    double[] weights = weights(system, given, inspected, meter);
    boolean[] failed = new boolean[byName.size()];
    known.forEach((name, works) -> failed[Names.place(byName, name)] = !works);
    boolean[] explained = explained(system, failed, inspected);
    return compared(names, cost, weights, explained, meter);
  }

  /** By set of inspected components that work: its probability together with system failure. */
  private static double[] weights(
      CoherentSystem system, Gains given, int[] inspected, WorkMeter meter) {
    double[] working = given.working();
    double[] failing = given.failing();
    Scan scan = new Scan(system.diagram(), working.length);
    double[] weights = new double[1 << inspected.length];
    for (int set = 0; set < weights.length; set++) {
      meter.now(set);
      double product = 1;
      for (int k = 0; k < inspected.length; k++) {
        int i = inspected[k];
        boolean works = (set >>> k & 1) != 0;
        product *= works ? given.working(i) : given.failing(i);
        working[i] = works ? 1 : 0;
        failing[i] = works ? 0 : 1;
      }
      if (product > 0) {
        scan.up(working, failing);
        weights[set] = product * scan.fails();
      }
    }
    return weights;
  }

  /** By set of inspected components that have failed: whether these and the known ones suffice. */
  private static boolean[] explained(CoherentSystem system, boolean[] failed, int[] inspected) {
    boolean[] explained = new boolean[1 << inspected.length];
    boolean[] working = new boolean[failed.length];
    for (int i = 0; i < failed.length; i++) {
      working[i] = !failed[i];
    }
    for (int set = 0; set < explained.length; set++) {
      for (int k = 0; k < inspected.length; k++) {
        working[inspected[k]] = (set >>> k & 1) == 0;
      }
      explained[set] = !system.diagram().works(working);
    }
    return explained;
  }

  private static CheapestInspection compared(
      List<String> names, double[] cost, double[] weights, boolean[] explained, WorkMeter meter) {
    int n = cost.length;
    int[] power = new int[n + 1];
    Arrays.setAll(power, k -> (int) Math.round(Math.pow(3, k)));
    double[] weight = new double[power[n]];
    double[] value = new double[power[n]];
    double[] start = new double[n];
    for (int state = power[n] - 1; state >= 0; state--) {
      meter.at(state);
      int works = 0;
      int fails = 0;
      int unknown = -1;
      for (int k = 0; k < n; k++) {
        int digit = state / power[k] % 3;
        works |= digit == 1 ? 1 << k : 0;
        fails |= digit == 2 ? 1 << k : 0;
        unknown = digit == 0 ? k : unknown;
      }
      if (unknown < 0) {
        weight[state] = weights[works];
        continue;
      }
      weight[state] = weight[state + power[unknown]] + weight[state + 2 * power[unknown]];
      if (!explained[fails]) {
        double best = Double.POSITIVE_INFINITY;
        for (int k = 0; k < n; k++) {
          if (state / power[k] % 3 == 0) {
            double all =
                cost[k] * weight[state] + value[state + power[k]] + value[state + 2 * power[k]];
            best = Math.min(best, all);
            start[k] = all / weight[0];
          }
        }
        value[state] = best;
      }
    }
    boolean done = n == 0 || explained[0];
    Map<String, Double> starting = new LinkedHashMap<>();
    for (int k = 0; k < n && !done; k++) {
      starting.put(names.get(k), start[k]);
    }
    return new CheapestInspection(starting);
  }
}
