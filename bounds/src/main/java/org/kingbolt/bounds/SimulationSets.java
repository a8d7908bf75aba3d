package org.kingbolt.bounds;

import java.util.Arrays;
import java.util.List;
import java.util.Map;
import java.util.Objects;
import java.util.Set;
import org.kingbolt.core.StateEvaluator;

/** Reads the cut sets, or path sets, of a structure, and refuses what is none. */
final class SimulationSets {

  private final StateEvaluator evaluator;
  private final Map<String, Integer> numbers;
  private final boolean cuts;
  private final boolean[] state;
  private int read;

  SimulationSets(StateEvaluator evaluator, Map<String, Integer> numbers, boolean cuts) {
    this.evaluator = evaluator;
    this.numbers = numbers;
    this.cuts = cuts;
    this.state = new boolean[numbers.size()];
    Arrays.fill(state, cuts);
  }

  /** The members of a set by number. */
  int[] members(Set<String> set) {
    read++;
    Objects.requireNonNull(set, () -> what() + " is null; list the names of its members");
    int[] members = new int[set.size()];
    int count = 0;
    for (String name : set) {
      Integer number =
          numbers.get(
              Objects.requireNonNull(name, () -> what() + ": a name is null; leave it out"));
      if (number == null) {
        throw new IllegalArgumentException(
            what() + " names \"" + name + "\", which is no component of the structure");
      }
      members[count++] = number;
    }
    Arrays.sort(members);
    set(members, !cuts);
    boolean works = evaluator.works(state);
    set(members, cuts);
    if (works == cuts) {
      throw new IllegalArgumentException(
          what()
              + ", "
              + List.copyOf(set)
              + (cuts
                  ? ", is none: the system works with all of them failed and all others working"
                  : ", is none: the system fails with all of them working and all others failed")
              + "; give those of this very structure");
    }
    return members;
  }

  private void set(int[] members, boolean works) {
    for (int member : members) {
      state[member] = works;
    }
  }

  private String what() {
    return (cuts ? "cut" : "path") + " set " + read;
  }

  void requireSome() {
    if (read == 0) {
      throw new IllegalArgumentException(
          "there are no " + (cuts ? "cut" : "path") + " sets; give all minimal ones");
    }
  }
}
