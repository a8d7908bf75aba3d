package org.kingbolt.importance;

import com.google.common.collect.ImmutableList;
import com.google.common.collect.ImmutableMap;
import java.util.ArrayList;
import java.util.Comparator;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.Objects;
import java.util.stream.Collectors;
import java.util.stream.IntStream;

/**
 * The components of a system in order of an importance measure, most important first.
 *
 * <p>Values that agree to twelve digits are tied: they share a rank, and stand in order of the
 * system's components.
 *
 * <p>Immutable; safe to share between threads. Equal when measure and entries are equal.
 *
 * <p>Example: {@code ranking.top(3).get(0).component()} is the most important component.
 */
public final class Ranking {

  private static final double TIED = 1e-12;

  /** How many components a message names. */
  private static final int SHOWN = 12;

  /**
   * One line of a ranking.
   *
   * @param rank from 1 up; tied components share the rank of the first of them
   * @param component the component's name
   * @param value the measure's value
   */
  public record Entry(int rank, String component, double value) {

    /**
     * Makes an entry.
     *
     * @param rank from 1 up
     * @param component the component's name
     * @param value the measure's value
     */
    public Entry {
      Objects.requireNonNull(component, "component is null; give its name");
    }
  }

  private final String measure;
  private final ImmutableList<Entry> entries;
  private final ImmutableMap<String, Double> byComponent;

  private Ranking(String measure, List<Entry> entries) {
    this.measure = measure;
    this.entries = ImmutableList.copyOf(entries);
    Map<String, Double> values = new LinkedHashMap<>();
    entries.forEach(entry -> values.put(entry.component, entry.value));
    this.byComponent = ImmutableMap.copyOf(values);
  }

  static Ranking of(String measure, List<String> components, double[] values) {
    List<Integer> order =
        new ArrayList<>(
            IntStream.range(0, components.size())
                .boxed()
                .sorted(
                    Comparator.comparingDouble((Integer index) -> -values[index])
                        .thenComparing(Comparator.naturalOrder()))
                .toList());
    List<Entry> entries = new ArrayList<>();
    for (int from = 0; from < order.size(); ) {
      double first = values[order.get(from)];
      int to = from + 1;
      while (to < order.size() && first - values[order.get(to)] <= TIED * first) {
        to++;
      }
      for (int index : order.subList(from, to).stream().sorted().toList()) {
        entries.add(new Entry(from + 1, components.get(index), values[index]));
      }
      from = to;
    }
    return new Ranking(measure, entries);
  }

  /**
   * Returns the measure's name.
   *
   * @return such as {@code Birnbaum importance}
   */
  public String measure() {
    return measure;
  }

  /**
   * Returns one component's value.
   *
   * @param component its name
   * @return the measure's value
   * @throws IllegalArgumentException if the system has no such component
   */
  public double value(String component) {
    Double value =
        byComponent.get(
            Objects.requireNonNull(component, "component is null; give the name of one ranked"));
    if (value == null) {
      throw new IllegalArgumentException(
          "unknown component \""
              + component
              + "\"; the ranking holds "
              + known()
              + "; name one of these");
    }
    return value;
  }

  /** The first few components, quoted, and how many more there are. */
  private String known() {
    int more = entries.size() - SHOWN;
    return top(SHOWN).stream()
            .map(entry -> "\"" + entry.component + "\"")
            .collect(Collectors.joining(", "))
        + (more > 0 ? " and " + more + " more" : "");
  }

  /**
   * Returns all entries.
   *
   * @return most important first; unmodifiable
   */
  public List<Entry> entries() {
    return entries;
  }

  /**
   * Returns the first entries.
   *
   * @param n how many, at least 0; fewer are returned when there are not so many
   * @return most important first; unmodifiable
   * @throws IllegalArgumentException if n is negative
   */
  public List<Entry> top(int n) {
    if (n < 0) {
      throw new IllegalArgumentException("top " + n + " asked for; ask for 0 or more");
    }
    return entries.subList(0, Math.min(n, entries.size()));
  }

  /**
   * Returns all values by component.
   *
   * @return most important first; unmodifiable
   */
  public Map<String, Double> asMap() {
    return byComponent;
  }

  @Override
  public boolean equals(Object other) {
    return other instanceof Ranking that
        && measure.equals(that.measure)
        && entries.equals(that.entries);
  }

  @Override
  public int hashCode() {
    return 31 * measure.hashCode() + entries.hashCode();
  }

  /**
   * The ranking as an aligned table.
   *
   * @return a heading and one line a component: rank, component, value
   */
  @Override
  public String toString() {
    int width = "component".length();
    for (Entry entry : entries) {
      width = Math.max(width, entry.component.codePointCount(0, entry.component.length()));
    }
    StringBuilder table = new StringBuilder();
    table.append(String.format(Locale.ROOT, "rank  %-" + width + "s  %s", "component", measure));
    for (Entry entry : entries) {
      table.append(
          String.format(
              Locale.ROOT,
              "%n%4d  %-" + width + "s  %.6e",
              entry.rank,
              entry.component,
              entry.value));
    }
    return table.toString();
  }
}
