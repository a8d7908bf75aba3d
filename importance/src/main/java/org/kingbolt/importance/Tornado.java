package org.kingbolt.importance;

import com.google.common.collect.ImmutableList;
import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.Objects;
import org.kingbolt.core.CoherentSystem;
import org.kingbolt.core.Probabilities;
import org.kingbolt.core.Probability;
import org.kingbolt.core.diagram.Scan;

/**
 * The range of the reliability as each component, alone, goes from its low to its high value; the
 * widest range stands first.
 *
 * <p>Immutable; safe to share between threads. Example: {@code
 * Sensitivity.of(system).given(p).tornado(low, high)} prints as a table.
 */
public final class Tornado {

  /**
   * One component's bar.
   *
   * @param rank from 1 up; bars whose widths agree to twelve digits share a rank
   * @param component its name
   * @param low its low value
   * @param high its high value
   * @param systemAtLow the system with it at the low value and all others as given
   * @param systemAtHigh the system with it at the high value
   * @param swing how much likelier the system is to work at the high value, to full precision
   */
  public record Bar(
      int rank,
      String component,
      Probability low,
      Probability high,
      Probability systemAtLow,
      Probability systemAtHigh,
      double swing) {

    /**
     * Makes a bar.
     *
     * @param rank from 1 up
     * @param component its name
     * @param low its low value
     * @param high its high value
     * @param systemAtLow the system at the low value
     * @param systemAtHigh the system at the high value
     * @param swing the difference
     */
    public Bar {
      Objects.requireNonNull(component, "component is null; give its name");
      Objects.requireNonNull(low, "low is null; give the low value");
      Objects.requireNonNull(high, "high is null; give the high value");
      Objects.requireNonNull(systemAtLow, "systemAtLow is null; give the reliability");
      Objects.requireNonNull(systemAtHigh, "systemAtHigh is null; give the reliability");
    }
  }

  private final ImmutableList<Bar> bars;

  private Tornado(List<Bar> bars) {
    this.bars = ImmutableList.copyOf(bars);
  }

  static Tornado of(CoherentSystem system, Gains given, Probabilities low, Probabilities high) {
    List<String> names = system.components();
    Scan scan = new Scan(system.diagram(), names.size());
    scan.up(given.working(), given.failing());
    double[] derivatives = given.evaluation().derivatives();
    List<Bar> unranked = new ArrayList<>();
    for (int i = 0; i < names.size(); i++) {
      String name = names.get(i);
      if (isVaried(name, low, high)) {
        Probability from = low.get(name);
        Probability to = high.get(name);
        double swing = Gains.step(to, from) * derivatives[i];
        unranked.add(new Bar(0, name, from, to, at(scan, i, from), at(scan, i, to), swing));
      }
    }
    if (unranked.isEmpty()) {
      throw new IllegalArgumentException(
          "no component has a low and a high value; give both for at least one of "
              + Names.listed(names));
    }
    List<String> varied = unranked.stream().map(Bar::component).toList();
    Map<String, Integer> places = Names.places(varied);
    double[] swings = unranked.stream().mapToDouble(Bar::swing).toArray();
    return new Tornado(
        Ranking.of("swing", varied, swings).entries().stream()
            .map(e -> ranked(e.rank(), unranked.get(Names.place(places, e.component()))))
            .toList());
  }

  private static Bar ranked(int rank, Bar bar) {
    return new Bar(
        rank, bar.component, bar.low, bar.high, bar.systemAtLow, bar.systemAtHigh, bar.swing);
  }

  private static Probability at(Scan scan, int i, Probability value) {
    return Gains.sides(
        scan.worksWith(i, value.working(), value.failing()),
        scan.failsWith(i, value.working(), value.failing()));
  }

  private static boolean isVaried(String name, Probabilities low, Probabilities high) {
    if (low.covers(name) != high.covers(name)) {
      throw new IllegalArgumentException(
          "component "
              + Names.quoted(name)
              + " has a "
              + (low.covers(name) ? "low but no high" : "high but no low")
              + " value; give both or neither");
    }
    if (!low.covers(name)) {
      return false;
    }
    if (low.get(name).compareTo(high.get(name)) > 0) {
      throw new IllegalArgumentException(
          "component "
              + Names.quoted(name)
              + ": its low value, "
              + low.get(name)
              + ", is more likely to work than its high one, "
              + high.get(name)
              + "; swap them");
    }
    return true;
  }

  /**
   * Returns the bars.
   *
   * @return widest first, and tied ones in order of the system's components; unmodifiable
   */
  public List<Bar> bars() {
    return bars;
  }

  @Override
  public boolean equals(Object other) {
    return other instanceof Tornado that && bars.equals(that.bars);
  }

  @Override
  public int hashCode() {
    return bars.hashCode();
  }

  /**
   * An aligned table, of failing probabilities, where digits stand.
   *
   * @return a heading and one line a component
   */
  @Override
  public String toString() {
    int width = Math.max(9, Names.width(bars.stream().map(Bar::component).toList()));
    StringBuilder table = new StringBuilder("rank  ");
    table.append(Names.padded("component", width));
    table.append("  failing: low  high          system: low   high          swing");
    for (Bar bar : bars) {
      table.append(String.format(Locale.ROOT, "%n%4d  ", bar.rank));
      table.append(Names.padded(bar.component, width));
      table.append(
          String.format(
              Locale.ROOT,
              "  %.6e  %.6e  %.6e  %.6e  %.6e",
              bar.low.failing(),
              bar.high.failing(),
              bar.systemAtLow.failing(),
              bar.systemAtHigh.failing(),
              bar.swing));
    }
    return table.toString();
  }
}
