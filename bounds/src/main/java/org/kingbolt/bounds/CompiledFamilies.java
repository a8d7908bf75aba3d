package org.kingbolt.bounds;

import java.math.BigInteger;
import java.util.Arrays;
import java.util.HashMap;
import java.util.Map;
import java.util.Objects;
import java.util.Optional;
import java.util.Set;
import java.util.function.Consumer;
import org.kingbolt.core.Budget;
import org.kingbolt.core.CoherentSystem;
import org.kingbolt.core.MinimalSets;
import org.kingbolt.core.diagram.Diagram;
import org.kingbolt.core.diagram.WorkMeter;

/** The minimal path and cut sets of a compiled system, all of them. For one thread. */
final class CompiledFamilies extends Families {

  private final CoherentSystem system;
  private final Budget budget;
  private final Map<Boolean, MinimalSets> known = new HashMap<>();
  private final Map<String, Integer> index = new HashMap<>();

  /** Probabilities in the order of the system's components. */
  CompiledFamilies(CoherentSystem system, ComponentValues values, Budget budget) {
    super(values);
    this.system = system;
    this.budget = budget;
    for (String name : system.components()) {
      index.put(name, index.size());
    }
  }

  @Override
  void forEach(boolean paths, WorkMeter meter, Consumer<int[]> action) {
    MinimalSets sets = known.get(paths);
    if (sets == null) {
      sets = paths ? system.minimalPathSets(budget) : system.minimalCutSets(budget);
      known.put(paths, sets);
    }
    // too many to go through are told at once
    meter.now(sets.count().min(BigInteger.valueOf(Long.MAX_VALUE)).longValueExact());
    for (Set<String> set : sets) {
      int[] members = new int[set.size()];
      int count = 0;
      for (String name : set) {
        members[count++] = Objects.requireNonNull(index.get(name));
      }
      action.accept(members);
    }
  }

  /**
   * One scan of the diagram for the least sums, and one way down. Where both ways on weigh the same
   * the component is left out, so that the set is minimal.
   */
  @Override
  Optional<int[]> lightest(boolean paths, double[] weights, WorkMeter meter) {
    Diagram diagram = system.diagram();
    double[] least = new double[diagram.size()];
    least[paths ? Diagram.FAILS : Diagram.WORKS] = Double.POSITIVE_INFINITY;
    for (int level = diagram.levels() - 1; level >= 0; level--) {
      double weight = weights[diagram.variableAt(level)];
      for (int id = diagram.from(level); id < diagram.to(level); id++) {
        double with = least[paths ? diagram.high(id) : diagram.low(id)] + weight;
        double without = least[paths ? diagram.low(id) : diagram.high(id)];
        least[id] = Math.min(with, without);
        meter.at(diagram.size() / 8);
      }
    }
    if (least[diagram.root()] == Double.POSITIVE_INFINITY) {
      return Optional.empty();
    }
    int[] members = new int[diagram.levels()];
    int count = 0;
    int id = diagram.root();
    for (int level = 0; level < diagram.levels(); level++) {
      if (id >= diagram.from(level) && id < diagram.to(level)) {
        int without = paths ? diagram.low(id) : diagram.high(id);
        if (least[without] <= least[id]) {
          id = without;
        } else {
          id = paths ? diagram.high(id) : diagram.low(id);
          members[count++] = diagram.variableAt(level);
        }
      }
    }
    return Optional.of(Arrays.copyOf(members, count));
  }

  @Override
  double discarded(boolean paths) {
    return 0;
  }
}
