package org.kingbolt.bounds;

import java.util.ArrayList;
import java.util.BitSet;
import java.util.Collection;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Objects;
import org.kingbolt.core.Probabilities;

/**
 * Path sets and cut sets that the caller has, from which bounds follow without the structure.
 *
 * <p>Immutable; safe to share between threads.
 *
 * <p>Example: {@code Bounds.ofSets(paths, cuts).given(p).minMax()}.
 */
public final class SetBounds {

  /** More pairs than this are not looked through for a path and a cut with nothing in common. */
  private static final long MOST_PAIRS = 10_000_000;

  private final List<String> components;
  private final List<int[]> paths;
  private final List<int[]> cuts;

  private SetBounds(List<String> components, List<int[]> paths, List<int[]> cuts) {
    this.components = List.copyOf(components);
    this.paths = List.copyOf(paths);
    this.cuts = List.copyOf(cuts);
  }

  static SetBounds of(
      Collection<? extends Collection<String>> pathSets,
      Collection<? extends Collection<String>> cutSets) {
    Objects.requireNonNull(pathSets, "path sets are null; give a list, which may be empty");
    Objects.requireNonNull(cutSets, "cut sets are null; give a list, which may be empty");
    if (pathSets.isEmpty() && cutSets.isEmpty()) {
      throw new IllegalArgumentException(
          "there are no path sets and no cut sets; give at least one of either");
    }
    Map<String, Integer> index = new LinkedHashMap<>();
    List<int[]> paths = numbered(pathSets, "path set ", index);
    List<int[]> cuts = numbered(cutSets, "cut set ", index);
    List<String> names = new ArrayList<>(index.keySet());
    requireCommonComponents(paths, cuts, names);
    return new SetBounds(names, paths, cuts);
  }

  private static List<int[]> numbered(
      Collection<? extends Collection<String>> sets, String what, Map<String, Integer> index) {
    List<int[]> numbered = new ArrayList<>();
    for (Collection<String> set : sets) {
      String where = what + (numbered.size() + 1);
      Objects.requireNonNull(set, () -> where + " is null; give the names of its components");
      if (set.isEmpty()) {
        throw new IllegalArgumentException(
            where + " is empty; leave it out, or name its components");
      }
      BitSet members = new BitSet();
      for (String name : set) {
        Objects.requireNonNull(name, () -> where + ": a name is null; name a component");
        if (name.isBlank()) {
          throw new IllegalArgumentException(
              where + ": a name is blank; it must have at least one visible character");
        }
        int member = index.computeIfAbsent(name, unknown -> index.size());
        if (members.get(member)) {
          throw new IllegalArgumentException(
              where + " names component \"" + name + "\" twice; name it once");
        }
        members.set(member);
      }
      numbered.add(members.stream().toArray());
    }
    return numbered;
  }

  private static void requireCommonComponents(
      List<int[]> paths, List<int[]> cuts, List<String> names) {
    if ((long) paths.size() * cuts.size() > MOST_PAIRS) {
      return;
    }
    for (int i = 0; i < paths.size(); i++) {
      boolean[] inPath = new boolean[names.size()];
      for (int member : paths.get(i)) {
        inPath[member] = true;
      }
      for (int j = 0; j < cuts.size(); j++) {
        boolean meets = false;
        for (int member : cuts.get(j)) {
          meets |= inPath[member];
        }
        if (!meets) {
          throw new IllegalArgumentException(
              "path set "
                  + (i + 1)
                  + " and cut set "
                  + (j + 1)
                  + " have no component in common, so that the system would both work and fail;"
                  + " correct one of them");
        }
      }
    }
  }

  /**
   * Fixes the components' probabilities. The families are taken to be cut off, with nothing known
   * of what is missing, until {@link SetBoundsAtProbabilities#complete()} or {@link
   * SetBoundsAtProbabilities#discarding(double, double)} says otherwise.
   *
   * @param p the probability of each component; a register may name more
   * @return the bounds at these probabilities
   * @throws IllegalArgumentException if components have no probability; the message lists them
   */
  public SetBoundsAtProbabilities given(Probabilities p) {
    Objects.requireNonNull(
        p, "probabilities are null; give those of all components, such as Probabilities.all(0.9)");
    ComponentValues values = new ComponentValues(components, p.forComponents(components));
    return new SetBoundsAtProbabilities(new GivenFamilies(values, paths, cuts, 1, 1));
  }

  /**
   * Says what this is and what to call on it.
   *
   * @return one line
   */
  @Override
  public String toString() {
    return "SetBounds["
        + paths.size()
        + " path sets, "
        + cuts.size()
        + " cut sets]; call given(probabilities)";
  }
}
