package org.kingbolt.importance;

import static org.kingbolt.importance.ImprovementOption.option;

import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Random;
import org.kingbolt.core.Probabilities;
import org.kingbolt.core.Probability;
import org.kingbolt.core.Structure;

/** 200 random options on the components of a system: replacements, spares, tests. */
final class LargePlan {

  private static final int OPTIONS = 200;

  private final ImprovementPlan plan;
  private final double budget;

  LargePlan(Structure structure, long seed) {
    Random random = new Random(seed);
    Map<String, Double> failing = new LinkedHashMap<>();
    List<String> components = structure.components();
    components.forEach(c -> failing.put(c, 0.005 * Math.pow(20, random.nextDouble())));
    List<ImprovementOption> options = new ArrayList<>();
    int total = 0;
    for (int i = 0; i < OPTIONS; i++) {
      String component = components.get(i % components.size());
      double q = failing.get(component);
      int cost = 1 + random.nextInt(20);
      total += cost;
      ImprovementOption made = option("option " + i).costing(cost);
      options.add(
          switch (i / components.size() % 4) {
            case 0 ->
                made.replacing(
                    component, Probability.failing(q * (0.1 + 0.4 * random.nextDouble())));
            case 1 ->
                made.replacing(
                    component, Probability.failing(q * (0.02 + 0.2 * random.nextDouble())));
            case 2 ->
                made.sparing(
                    component, "spare " + i, Probability.failing(q * (1 + random.nextDouble())));
            default -> made.multiplyingFailing(component, 0.2 + 0.5 * random.nextDouble());
          });
    }
    this.plan =
        ImprovementPlan.of(structure).given(Probabilities.failing(failing)).withOptions(options);
    this.budget = Math.floor(total / 8.0);
  }

  ImprovementPlan plan() {
    return plan;
  }

  double budget() {
    return budget;
  }

  /**
   * A plant of 13 subsystems in two trains each, of two components of its own in every train, and
   * of four buses, two cooling loops and two controls that all of them share: 60 components.
   */
  static Structure plant(long seed) {
    Random random = new Random(seed);
    List<Structure> subsystems = new ArrayList<>();
    for (int i = 0; i < 13; i++) {
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
    return Structure.series(subsystems);
  }
}
