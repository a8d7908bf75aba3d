package org.kingbolt.importance;

import com.google.common.collect.ImmutableList;
import com.google.common.collect.ImmutableSet;
import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import java.util.Objects;
import java.util.Set;
import java.util.stream.Collectors;
import org.kingbolt.core.MinimalSets;
import org.kingbolt.core.Probabilities;

/**
 * The minimal cut sets that matter most: the probability that all members of a set have failed,
 * given that the system has, which is {@code product of q_i / F}, exactly, since a failed cut set
 * is a failed system.
 *
 * <p>Several cut sets may have failed at once, so that the values of all may add up to more than 1.
 *
 * <p>Source: the cut set importance of Fussell, How to hand-calculate system reliability and safety
 * characteristics, IEEE Trans. Reliab. 24 (1975) 169 (from memory).
 *
 * <p>Immutable; safe to share between threads. Example: {@code
 * Importance.of(system).given(p).cutSets(5).entries().get(0).members()}.
 */
public final class CutSetImportance {

  /**
   * One minimal cut set.
   *
   * @param rank from 1 up; equally probable sets share the rank of the first of them
   * @param members the components, in the system's order
   * @param probability that all members have failed
   * @param givenFailure the same, given that the system has failed; 0 if it never fails
   */
  public record Entry(int rank, Set<String> members, double probability, double givenFailure) {

    /**
     * Makes an entry.
     *
     * @param rank from 1 up
     * @param members the components
     * @param probability that all have failed
     * @param givenFailure the same, given that the system has failed
     */
    public Entry {
      members = ImmutableSet.copyOf(Objects.requireNonNull(members, "members are null; give them"));
    }
  }

  private final ImmutableList<Entry> entries;

  private CutSetImportance(List<Entry> entries) {
    this.entries = ImmutableList.copyOf(entries);
  }

  static CutSetImportance of(MinimalSets cuts, int n, Probabilities p, double fails) {
    List<Entry> entries = new ArrayList<>();
    for (Set<String> set : cuts.mostProbable(n, p)) {
      double probability = cuts.probability(set, p);
      int place = entries.size();
      boolean tied =
          place > 0 && entries.get(place - 1).probability - probability <= 1e-12 * probability;
      int rank = tied ? entries.get(place - 1).rank : place + 1;
      entries.add(new Entry(rank, set, probability, Measures.share(probability, fails)));
    }
    return new CutSetImportance(entries);
  }

  /**
   * Returns the sets.
   *
   * @return most probable first; unmodifiable
   */
  public List<Entry> entries() {
    return entries;
  }

  @Override
  public boolean equals(Object other) {
    return other instanceof CutSetImportance that && entries.equals(that.entries);
  }

  @Override
  public int hashCode() {
    return entries.hashCode();
  }

  /**
   * An aligned table.
   *
   * @return a heading and one line a set
   */
  @Override
  public String toString() {
    List<String> sets = entries.stream().map(entry -> shown(entry.members)).toList();
    int width = Math.max("minimal cut set".length(), Names.width(sets));
    StringBuilder table = new StringBuilder("rank  ");
    table.append(Names.padded("minimal cut set", width)).append("  probability   given failure");
    for (int i = 0; i < sets.size(); i++) {
      Entry entry = entries.get(i);
      table.append(String.format(Locale.ROOT, "%n%4d  ", entry.rank));
      table.append(Names.padded(sets.get(i), width));
      table.append(
          String.format(Locale.ROOT, "  %.6e  %.6e", entry.probability, entry.givenFailure));
    }
    return table.toString();
  }

  private static String shown(Set<String> members) {
    return members.stream().collect(Collectors.joining(", ", "{", "}"));
  }
}
