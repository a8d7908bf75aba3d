package org.kingbolt.bounds;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.Set;
import org.kingbolt.core.StateEvaluator;
import org.kingbolt.core.Structure;
import org.kingbolt.core.diagram.WorkMeter;

/**
 * Draws a cut set, each as often as its probability deserves, and a state in which all of its
 * members have failed; counts the states in which no cut set has failed that comes before it. Every
 * failed state is so counted with one cut set only, the first. Path sets and working alike.
 */
final class SimulationCoverage implements SimulationTrial {

  /** One set: its probability, and the members by number. */
  private static final class Weighted {
    private final double weight;
    private final int[] members;

    Weighted(double weight, int[] members) {
      this.weight = weight;
      this.members = members;
    }
  }

  /** What all threads share; sums run over the sets' probabilities. */
  private static final class Shared {
    private final SimulationStates states;
    private final boolean cuts;
    private final List<Weighted> sets;
    private final double[] sums;

    Shared(SimulationStates states, boolean cuts, List<Weighted> sets) {
      this.states = states;
      this.cuts = cuts;
      this.sets = sets;
      this.sums = new double[sets.size()];
      double sum = 0;
      for (int i = 0; i < sums.length; i++) {
        sum += sets.get(i).weight;
        sums[i] = sum;
      }
    }

    double sum() {
      return sums.length == 0 ? 0 : sums[sums.length - 1];
    }
  }

  private final Shared shared;
  private final boolean[] state;

  private SimulationCoverage(Shared shared) {
    this.shared = shared;
    this.state = new boolean[shared.states.size()];
  }

  /**
   * Prepares.
   *
   * @param family all minimal sets, or more
   * @param cuts whether they are cut sets, or path sets
   * @param meter hears of every set
   */
  static SimulationModel model(
      Structure structure,
      SimulationStates states,
      Iterable<? extends Set<String>> family,
      boolean cuts,
      WorkMeter meter) {
    Map<String, Integer> numbers = new HashMap<>();
    structure.components().forEach(name -> numbers.put(name, numbers.size()));
    SimulationSets reader = new SimulationSets(StateEvaluator.of(structure), numbers, cuts);
    List<Weighted> sets = new ArrayList<>();
    long held = 0;
    for (Set<String> set : family) {
      int[] members = reader.members(set);
      held += 1 + members.length / 8;
      meter.at(held);
      double weight = 1;
      for (int member : members) {
        weight *= states.side(member, !cuts);
      }
      if (weight > 0) {
        sets.add(new Weighted(weight, members));
      }
    }
    reader.requireSome();
    sets.sort(Comparator.comparingDouble((Weighted set) -> -set.weight));
    Shared shared = new Shared(states, cuts, sets);
    double sum = shared.sum();
    return new SimulationModel(
        () -> new SimulationCoverage(shared),
        cuts,
        sum,
        1 - sum,
        sets.size() + (long) states.size(),
        "coverage by " + (cuts ? "cut" : "path") + " sets",
        (cuts
                ? "the system fails only when a cut set does"
                : "the system works only when a path does")
            + "; the probabilities of the "
            + sets.size()
            + " sets add up to "
            + sum
            + ", and the number of states that are drawn with the first of their sets is binomial");
  }

  @Override
  public boolean hits(SimulationRandom random) {
    int drawn = drawn(random);
    shared.states.draw(state, random);
    for (int member : shared.sets.get(drawn).members) {
      state[member] = !shared.cuts;
    }
    for (int i = 0; i < drawn; i++) {
      if (isThere(shared.sets.get(i))) {
        return false;
      }
    }
    return true;
  }

  /** The number of a set, by its share of the sum. */
  private int drawn(SimulationRandom random) {
    double[] sums = shared.sums;
    double at = random.uniform() * sums[sums.length - 1];
    int first = 0;
    int last = sums.length - 1;
    while (first < last) {
      int middle = (first + last) >>> 1;
      if (at < sums[middle]) {
        last = middle;
      } else {
        first = middle + 1;
      }
    }
    return first;
  }

  private boolean isThere(Weighted set) {
    for (int member : set.members) {
      if (state[member] == shared.cuts) {
        return false;
      }
    }
    return true;
  }
}
