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
import java.util.OptionalDouble;
import java.util.stream.Collectors;
import java.util.stream.DoubleStream;
import java.util.stream.IntStream;

/**
 * The components of a system in order of an importance measure, most important first.
 *
 * <p>Values that agree to twelve digits are tied: they share a rank, and stand in order of the
 * system's components. A value may be infinite where the measure says so, and is never NaN.
 *
 * <p>Measures that add up, such as those that split a derivative or a probability among the
 * components, also have a total, and each component its share of it. For others, whose sum means
 * nothing, both are empty.
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
  private final OptionalDouble total;

  private Ranking(String measure, List<Entry> entries, OptionalDouble total) {
    this.measure = measure;
    this.total = total;
    this.entries = ImmutableList.copyOf(entries);
    Map<String, Double> values = new LinkedHashMap<>();
    entries.forEach(entry -> values.put(entry.component, entry.value));
    this.byComponent = ImmutableMap.copyOf(values);
  }

  /** For a measure whose sum means nothing. */
  static Ranking of(String measure, List<String> components, double[] values) {
    return of(measure, components, values, OptionalDouble.empty());
  }

  /** For a measure whose values add up to something, and are not negative. */
  static Ranking ofParts(String measure, List<String> components, double[] values) {
    return of(measure, components, values, OptionalDouble.of(DoubleStream.of(values).sum()));
  }

  private static Ranking of(
      String measure, List<String> components, double[] values, OptionalDouble total) {
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
      while (to < order.size() && tied(first, values[order.get(to)])) {
        to++;
      }
      for (int index : order.subList(from, to).stream().sorted().toList()) {
        entries.add(new Entry(from + 1, components.get(index), values[index]));
      }
      from = to;
    }
    return new Ranking(measure, entries, total);
  }

  private static boolean tied(double first, double value) {
    return first == value || (!Double.isInfinite(first) && first - value <= TIED * Math.abs(first));
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

  /**
   * Returns the sum of all values, of a measure that adds up.
   *
   * @return the sum; empty where it would mean nothing
   */
  public OptionalDouble total() {
    return total;
  }

  /**
   * Returns one component's share of the total, of a measure that adds up.
   *
   * @param component its name
   * @return from 0 to 1, and 0 if the total is 0; empty where a sum would mean nothing
   * @throws IllegalArgumentException if the system has no such component
   */
  public OptionalDouble share(String component) {
    double value = value(component);
    return total.isPresent() ? OptionalDouble.of(part(value)) : total;
  }

  private double part(double value) {
    double all = total.orElse(0);
    return all == 0 ? 0 : Math.min(1, value / all);
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
   * @return a heading and one line a component: rank, component, value, and its share in percent
   *     where the measure adds up
   */
  @Override
  public String toString() {
    int width = Math.max("component".length(), Names.width(byComponent.keySet()));
    boolean shares = total.isPresent();
    StringBuilder table = new StringBuilder("rank  ");
    table.append(Names.padded("component", width)).append("  ").append(measure);
    table.append(shares ? "   share" : "");
    for (Entry entry : entries) {
      String value = String.format(Locale.ROOT, "%.6e", entry.value);
      table.append(String.format(Locale.ROOT, "%n%4d  ", entry.rank));
      table.append(Names.padded(entry.component, width)).append("  ");
      table.append(shares ? Names.padded(value, measure.length()) : value);
      if (shares) {
        table.append(String.format(Locale.ROOT, "  %5.1f%%", 100 * part(entry.value)));
      }
    }
    return table.toString();
  }
}
