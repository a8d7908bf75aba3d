package org.kingbolt.importance;

import com.google.common.collect.ImmutableList;
import com.google.common.collect.ImmutableMap;
import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import java.util.Locale;
import java.util.Objects;
import java.util.PriorityQueue;

/**
 * The joint importance of every pair of components: the second mixed derivative of the reliability,
 * {@code r(1_i,1_j) - r(1_i,0_j) - r(0_i,1_j) + r(0_i,0_j)}, which is how much the Birnbaum
 * importance of one changes when the other goes from failed to working.
 *
 * <p>Positive where the two need each other (the state of the rest makes a series of them more
 * often than a parallel), negative where each stands in for the other, 0 where neither.
 *
 * <p>Source: Armstrong, Joint reliability-importance of components, IEEE Trans. Reliab. 44 (1995)
 * 408; Hong &amp; Lie, Joint reliability-importance of two edges in an undirected network, IEEE
 * Trans. Reliab. 42 (1993) 17 (from memory).
 *
 * <p>Immutable; safe to share between threads. Example: {@code
 * Importance.of(system).given(p).jointImportance().top(3)}.
 */
public final class JointImportance {

  /**
   * Two components and their joint importance.
   *
   * @param first the one that comes first among the system's components
   * @param second the other
   * @param value from -1 to 1
   */
  public record Pair(String first, String second, double value) {

    /**
     * Makes a pair.
     *
     * @param first a component
     * @param second another
     * @param value their joint importance
     */
    public Pair {
      Objects.requireNonNull(first, "first is null; give a component's name");
      Objects.requireNonNull(second, "second is null; give a component's name");
    }
  }

  private static final Comparator<int[]> BY_PLACE =
      Comparator.<int[]>comparingInt(pair -> pair[0]).thenComparingInt(pair -> pair[1]);

  private final ImmutableList<String> components;
  private final ImmutableMap<String, Integer> places;

  /** Row i holds the pairs of i with those after it. */
  private final double[][] rows;

  JointImportance(List<String> components, double[][] rows) {
    this.components = ImmutableList.copyOf(components);
    this.rows = rows;
    ImmutableMap.Builder<String, Integer> byName = ImmutableMap.builder();
    for (int i = 0; i < components.size(); i++) {
      byName.put(components.get(i), i);
    }
    this.places = byName.buildOrThrow();
  }

  /**
   * Returns the components.
   *
   * @return in the order of rows and columns of {@link #matrix()}
   */
  public List<String> components() {
    return components;
  }

  /**
   * Returns one pair's joint importance.
   *
   * @param first a component
   * @param second another
   * @return from -1 to 1
   * @throws IllegalArgumentException if the system has no such component, or both are the same
   */
  public double value(String first, String second) {
    int i = Names.place(places, first);
    int j = Names.place(places, second);
    if (i == j) {
      throw new IllegalArgumentException(
          Names.quoted(first) + " is paired with itself; name two components");
    }
    return at(i, j);
  }

  private double at(int i, int j) {
    return i < j ? rows[i][j - i - 1] : rows[j][i - j - 1];
  }

  /**
   * Returns all values.
   *
   * @return a fresh symmetric matrix in the order of {@link #components()}; 0 on its diagonal, for
   *     the reliability is linear in each component
   */
  public double[][] matrix() {
    int n = components.size();
    double[][] matrix = new double[n][n];
    for (int i = 0; i < n; i++) {
      for (int j = i + 1; j < n; j++) {
        matrix[i][j] = at(i, j);
        matrix[j][i] = at(i, j);
      }
    }
    return matrix;
  }

  /**
   * The pairs that matter most to each other, of either sign.
   *
   * @param n how many, at least 0; fewer are returned when there are not so many
   * @return by absolute value, largest first, and within equal ones in order of the components
   * @throws IllegalArgumentException if n is negative
   */
  public List<Pair> top(int n) {
    return top(n, Comparator.comparingDouble(pair -> -Math.abs(at(pair[0], pair[1]))));
  }

  /**
   * The pairs that need each other most.
   *
   * @param n how many, at least 0
   * @return the positive ones, largest first
   * @throws IllegalArgumentException if n is negative
   */
  public List<Pair> topComplements(int n) {
    return top(n, Comparator.comparingDouble(pair -> -at(pair[0], pair[1]))).stream()
        .filter(pair -> pair.value > 0)
        .toList();
  }

  /**
   * The pairs that stand in for each other most.
   *
   * @param n how many, at least 0
   * @return the negative ones, most negative first
   * @throws IllegalArgumentException if n is negative
   */
  public List<Pair> topSubstitutes(int n) {
    return top(n, Comparator.comparingDouble(pair -> at(pair[0], pair[1]))).stream()
        .filter(pair -> pair.value < 0)
        .toList();
  }

  private List<Pair> top(int n, Comparator<int[]> order) {
    if (n < 0) {
      throw new IllegalArgumentException("top " + n + " asked for; ask for 0 or more");
    }
    Comparator<int[]> whole = order.thenComparing(BY_PLACE);
    PriorityQueue<int[]> best = new PriorityQueue<>(whole.reversed());
    for (int i = 0; i < components.size(); i++) {
      for (int j = i + 1; j < components.size(); j++) {
        best.add(new int[] {i, j});
        if (best.size() > n) {
          best.remove();
        }
      }
    }
    List<int[]> sorted = new ArrayList<>(best);
    sorted.sort(whole);
    return sorted.stream()
        .map(
            pair ->
                new Pair(components.get(pair[0]), components.get(pair[1]), at(pair[0], pair[1])))
        .toList();
  }

  /**
   * The ten pairs that matter most, as an aligned table.
   *
   * @return a heading and one line a pair
   */
  @Override
  public String toString() {
    List<Pair> shown = top(10);
    int first = Math.max(5, Names.width(shown.stream().map(Pair::first).toList()));
    int second = Math.max(6, Names.width(shown.stream().map(Pair::second).toList()));
    StringBuilder table = new StringBuilder();
    table.append(Names.padded("first", first)).append("  ");
    table.append(Names.padded("second", second)).append("  joint importance");
    for (Pair pair : shown) {
      table.append(String.format("%n")).append(Names.padded(pair.first, first)).append("  ");
      table.append(Names.padded(pair.second, second));
      table.append(String.format(Locale.ROOT, "  %+.6e", pair.value));
    }
    return table.toString();
  }
}
