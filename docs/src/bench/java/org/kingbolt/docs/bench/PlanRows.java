package org.kingbolt.docs.bench;

import static org.kingbolt.importance.ImprovementAllocation.allocation;
import static org.kingbolt.importance.ImprovementOption.option;

import java.time.Duration;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.Map;
import java.util.Random;
import org.kingbolt.core.Budget;
import org.kingbolt.core.Probabilities;
import org.kingbolt.core.Probability;
import org.kingbolt.core.Structure;
import org.kingbolt.importance.ImprovementAllocation;
import org.kingbolt.importance.ImprovementOption;
import org.kingbolt.importance.ImprovementPlan;

/** Improvement plans: redundancy allocation, and many options on a system with shared parts. */
final class PlanRows {

  /**
   * By subsystem, by type: reliability, cost, weight. Fyffe, Hines and Lee, IEEE Trans. Reliab. 17
   * (1968) 64 (from memory).
   */
  private static final double[][][] TYPES = {
    {{.90, 1, 3}, {.93, 1, 4}, {.91, 2, 2}, {.95, 2, 5}},
    {{.95, 2, 8}, {.94, 1, 10}, {.93, 1, 9}},
    {{.85, 2, 7}, {.90, 3, 5}, {.87, 1, 6}, {.92, 4, 4}},
    {{.83, 3, 5}, {.87, 4, 6}, {.85, 5, 4}},
    {{.94, 2, 4}, {.93, 2, 3}, {.95, 3, 5}},
    {{.99, 3, 5}, {.98, 3, 4}, {.97, 2, 5}, {.96, 2, 4}},
    {{.91, 4, 7}, {.92, 4, 8}, {.94, 5, 9}},
    {{.81, 3, 4}, {.90, 5, 7}, {.91, 6, 6}},
    {{.97, 2, 8}, {.99, 3, 9}, {.96, 4, 7}, {.91, 3, 8}},
    {{.83, 4, 6}, {.85, 4, 5}, {.90, 5, 6}},
    {{.94, 3, 5}, {.95, 4, 6}, {.96, 5, 6}},
    {{.79, 2, 4}, {.82, 3, 5}, {.85, 4, 6}, {.90, 5, 7}},
    {{.98, 2, 5}, {.99, 3, 5}, {.97, 2, 6}},
    {{.90, 4, 6}, {.92, 4, 7}, {.95, 5, 6}, {.99, 6, 9}}
  };

  private static final int COST = 130;
  private static final int LIGHTEST = 159;
  private static final int HEAVIEST = 191;
  private static final int MOST_UNITS = 8;
  private static final int OPTIONS = 200;
  private static final int SUBSYSTEMS = 13;
  private static final int GRID = 6;
  private static final long SEED = 4;

  private PlanRows() {}

  static List<Workload> rows() {
    return List.of(
        new Workload(
            "redundancy allocation: 33 optima", Effort.LONG, List.of("loop"), PlanRows::fyffe),
        new Workload("200 options, shared gates: to 1 %", Effort.LONG, List.of(), PlanRows::gates),
        new Workload(
            "200 options, shared supports: to 1 %", Effort.LONG, List.of(), PlanRows::plant),
        new Workload("200 options, 6x6 grid: to 1 %", Effort.LONG, List.of(), PlanRows::grid));
  }

  /** The peer is the dynamic programme over cost and weight in plain loops, once for all. */
  private static Prepared fyffe() {
    return new Prepared(
        HEAVIEST - LIGHTEST + 1,
        "instances",
        "working, summed",
        PlanRows::byPlans,
        Map.of("loop", PlanRows::byLoops));
  }

  private static double byPlans() {
    String[] names = new String[TYPES.length];
    List<ImprovementAllocation> allocations = new ArrayList<>();
    for (int i = 0; i < TYPES.length; i++) {
      names[i] = "s" + i;
      ImprovementAllocation allocation = allocation(names[i]).between(1, MOST_UNITS);
      for (double[] type : TYPES[i]) {
        allocation =
            allocation
                .unit("r" + type[0], type[0])
                .costing("cost", type[1])
                .costing("weight", type[2]);
      }
      allocations.add(allocation);
    }
    ImprovementPlan plan =
        ImprovementPlan.of(Structure.series(names))
            .with(allocations.toArray(new ImprovementAllocation[0]));
    double sum = 0;
    for (int weight = LIGHTEST; weight <= HEAVIEST; weight++) {
      sum +=
          plan.bestWithin(Map.of("cost", (double) COST, "weight", (double) weight))
              .reliability()
              .working();
    }
    return sum;
  }

  private static double byLoops() {
    double[][] whole = new double[COST + 1][HEAVIEST + 1];
    for (double[] row : whole) {
      Arrays.fill(row, 1);
    }
    for (double[][] types : TYPES) {
      double[][] next = new double[COST + 1][HEAVIEST + 1];
      int number = (int) Math.pow(MOST_UNITS + 1, types.length);
      for (int code = 1; code < number; code++) {
        add(types, code, whole, next);
      }
      whole = next;
    }
    double sum = 0;
    for (int weight = LIGHTEST; weight <= HEAVIEST; weight++) {
      sum += whole[COST][weight];
    }
    return sum;
  }

  private static void add(double[][] types, int code, double[][] whole, double[][] next) {
    double fails = 1;
    int units = 0;
    int cost = 0;
    int weight = 0;
    int rest = code;
    for (double[] type : types) {
      int count = rest % (MOST_UNITS + 1);
      rest /= MOST_UNITS + 1;
      units += count;
      fails *= Math.pow(1 - type[0], count);
      cost += (int) (type[1] * count);
      weight += (int) (type[2] * count);
    }
    if (units > MOST_UNITS) {
      return;
    }
    for (int c = cost; c <= COST; c++) {
      for (int w = weight; w <= HEAVIEST; w++) {
        next[c][w] = Math.max(next[c][w], (1 - fails) * whole[c - cost][w - weight]);
      }
    }
  }

  /** Gates of which a fifth of the leaves repeat a component. */
  private static Prepared gates() {
    return options(new NestedGates(14, 60, 12, SEED).structure());
  }

  /** Two trains of pump and valve in each subsystem; buses, cooling and controls in common. */
  private static Prepared plant() {
    Random random = new Random(SEED);
    List<Structure> subsystems = new ArrayList<>();
    for (int i = 0; i < SUBSYSTEMS; i++) {
      List<Structure> trains = new ArrayList<>();
      for (int train = 0; train < 2; train++) {
        trains.add(
            Structure.series(
                "pump " + i + "." + train,
                "valve " + i + "." + train,
                "bus " + (2 * random.nextInt(2) + train),
                (random.nextBoolean() ? "cooling " : "control ") + train));
      }
      subsystems.add(Structure.parallel(trains));
    }
    return options(Structure.series(subsystems));
  }

  private static Prepared grid() {
    return options(Inputs.grid(GRID, GRID).connecting(Inputs.corners(GRID, GRID)));
  }

  /** Replacements, spares, tests. */
  private static Prepared options(Structure structure) {
    Random random = new Random(SEED);
    List<String> components = structure.components();
    double[] failing = Inputs.failing(components.size(), 0.005, 0.1);
    Probabilities p = Inputs.probabilities(components, failing);
    List<ImprovementOption> options = new ArrayList<>();
    double total = 0;
    for (int i = 0; i < OPTIONS; i++) {
      int number = i % components.size();
      String component = components.get(number);
      double cost = 1 + random.nextInt(20);
      total += cost;
      ImprovementOption made = option("option " + i).costing(cost);
      double share = 0.05 + 0.4 * random.nextDouble();
      double unit = failing[number] * share;
      options.add(
          switch (i / components.size() % 3) {
            case 0 -> made.replacing(component, Probability.failing(unit));
            case 1 -> made.sparing(component, "spare " + i, 1 - 2 * failing[number]);
            default -> made.multiplyingFailing(component, share);
          });
    }
    double budget = Math.floor(total / 8);
    ImprovementPlan plan =
        ImprovementPlan.of(structure)
            .given(p)
            .withOptions(options)
            .toWithin(0.01)
            .within(Budget.ofTime(Duration.ofSeconds(10)));
    return new Prepared(
        OPTIONS,
        "options",
        "failing",
        () -> plan.bestWithin(budget).reliability().failing(),
        Map.of());
  }
}
