package org.kingbolt.importance;

import static org.kingbolt.importance.ImprovementAllocation.allocation;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.Map;
import org.kingbolt.core.Structure;

/**
 * The redundancy allocation problem of Fyffe, Hines and Lee, IEEE Trans. Reliab. 17 (1968) 64, with
 * mixed types as in Coit and Smith, IEEE Trans. Reliab. 45 (1996) 254 (from memory); and its exact
 * dynamic programme over cost and weight, which shares nothing with the library.
 */
final class FyffeProblem {

  static final int COST = 130;
  private static final int MOST_UNITS = 8;

  /** By subsystem, by type: reliability, cost, weight. */
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

  private FyffeProblem() {}

  static ImprovementPlan plan() {
    String[] names = new String[TYPES.length];
    List<ImprovementAllocation> allocations = new ArrayList<>();
    for (int i = 0; i < TYPES.length; i++) {
      names[i] = "subsystem" + (i + 1);
      ImprovementAllocation allocation = allocation(names[i]).between(1, MOST_UNITS);
      for (int j = 0; j < TYPES[i].length; j++) {
        double[] type = TYPES[i][j];
        allocation =
            allocation
                .unit("type" + (j + 1), type[0])
                .costing("cost", type[1])
                .costing("weight", type[2]);
      }
      allocations.add(allocation);
    }
    return ImprovementPlan.of(Structure.series(names))
        .with(allocations.toArray(new ImprovementAllocation[0]));
  }

  static Map<String, Double> within(int weight) {
    return Map.of("cost", (double) COST, "weight", (double) weight);
  }

  /** The best reliability within the cost, by weight from 0 up. */
  static double[] best(int mostWeight) {
    double[][] whole = new double[COST + 1][mostWeight + 1];
    for (double[] row : whole) {
      Arrays.fill(row, 1);
    }
    for (double[][] types : TYPES) {
      double[][] next = new double[COST + 1][mostWeight + 1];
      for (int[] content : contents(types.length)) {
        double fails = 1;
        int cost = 0;
        int weight = 0;
        for (int j = 0; j < types.length; j++) {
          fails *= Math.pow(1 - types[j][0], content[j]);
          cost += (int) (types[j][1] * content[j]);
          weight += (int) (types[j][2] * content[j]);
        }
        for (int c = cost; c <= COST; c++) {
          for (int w = weight; w <= mostWeight; w++) {
            next[c][w] = Math.max(next[c][w], (1 - fails) * whole[c - cost][w - weight]);
          }
        }
      }
      whole = next;
    }
    return whole[COST];
  }

  /** All numbers of units of each type, from one to the most together. */
  private static List<int[]> contents(int types) {
    List<int[]> contents = new ArrayList<>();
    int[] count = new int[types];
    int number = (int) Math.pow(MOST_UNITS + 1, types);
    for (int code = 1; code < number; code++) {
      int rest = code;
      for (int j = 0; j < types; j++) {
        count[j] = rest % (MOST_UNITS + 1);
        rest /= MOST_UNITS + 1;
      }
      if (Arrays.stream(count).sum() <= MOST_UNITS) {
        contents.add(count.clone());
      }
    }
    return contents;
  }
}
