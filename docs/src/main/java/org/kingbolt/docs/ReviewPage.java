package org.kingbolt.docs;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import java.util.Locale;
import java.util.Set;
import org.kingbolt.bounds.Bounds;
import org.kingbolt.bounds.Interval;
import org.kingbolt.core.CoherentSystem;
import org.kingbolt.core.Derivation;
import org.kingbolt.core.DerivationStep;
import org.kingbolt.core.MinimalSets;
import org.kingbolt.core.Probabilities;
import org.kingbolt.core.Probability;
import org.kingbolt.core.Structure;
import org.kingbolt.importance.Importance;
import org.kingbolt.importance.Ranking;

/**
 * A review page for one system at one set of probabilities: plain aligned text to be pasted into a
 * report.
 *
 * <p>Immutable; safe to share between threads.
 */
public final class ReviewPage {

  private static final int WIDTH = 96;
  private static final int SETS = 10;

  private final String title;
  private final CoherentSystem system;
  private final Probabilities p;

  private ReviewPage(String title, CoherentSystem system, Probabilities p) {
    this.title = title;
    this.system = system;
    this.p = p;
  }

  /**
   * Prepares the page.
   *
   * @param title its first line
   * @param structure the system
   * @param p the components' probabilities
   * @return the page; {@link #toString()} is its text
   */
  public static ReviewPage of(String title, Structure structure, Probabilities p) {
    return new ReviewPage(title, structure.compile(), p);
  }

  /**
   * The text.
   *
   * @return lines of at most about a hundred characters, separated by line breaks
   */
  @Override
  public String toString() {
    StringBuilder page = new StringBuilder();
    page.append(title).append('\n').append("=".repeat(title.length())).append("\n\n");
    page.append(
        wrapped(
            "",
            "Assumed: every component, and the system, either works or has failed; "
                + "components fail independently; no repair makes the system worse. The figures support "
                + "the judgement of a qualified engineer and replace no code, standard or licence."));
    section(page, "1  Structure", wrapped("  ", system.structure().toString()) + irrelevant());
    section(page, "2  Reliability", reliability());
    section(page, "3  Derivation", derivation());
    section(page, "4  Smallest minimal cut sets", sets(system.minimalCutSets(), "failed"));
    section(page, "5  Smallest minimal path sets", sets(system.minimalPathSets(), "working"));
    section(page, "6  Guaranteed interval", bounds());
    section(page, "7  Birnbaum importance", indented(birnbaum().toString()));
    section(page, "8  What to look at first", advice());
    return page.toString();
  }

  private static void section(StringBuilder page, String heading, String body) {
    page.append('\n').append(heading).append('\n').append("-".repeat(heading.length()));
    page.append('\n').append(body);
  }

  private String irrelevant() {
    List<String> names = system.irrelevantComponents();
    return names.isEmpty()
        ? ""
        : wrapped("  ", "Irrelevant, in no state of any consequence: " + String.join(", ", names));
  }

  private String reliability() {
    Probability diagram = system.reliability(p);
    Probability formula = Derivation.of(system.structure()).reliability(p);
    return row("components", Integer.toString(system.components().size()))
        + row("works", number(diagram.working()))
        + row("fails", number(diagram.failing()))
        + row("fails, by the formula of section 3", number(formula.failing()));
  }

  private String derivation() {
    StringBuilder text = new StringBuilder();
    Derivation derivation = Derivation.of(system.structure());
    for (DerivationStep step : derivation.steps()) {
      String result = step.number() == 1 ? "r" : "r" + step.number();
      text.append("  Step ").append(step.number()).append(", ").append(step.condition());
      step.key().ifPresent(key -> text.append("; key component ").append(key));
      text.append('\n');
      text.append(wrapped("    ", step.structure().toString()));
      text.append(wrapped("    ", result + " = " + step.formula()));
    }
    text.append("  In one formula\n");
    for (String line : derivation.formula().split("\n", -1)) {
      text.append(wrapped("    ", line));
    }
    return text.toString();
  }

  private String sets(MinimalSets sets, String state) {
    StringBuilder text = new StringBuilder();
    text.append(String.format(Locale.ROOT, "  %4s  %-12s  %s%n", "size", "all " + state, "set"));
    for (Set<String> set : sets.stream().limit(SETS).toList()) {
      String row =
          String.format(Locale.ROOT, "  %4d  %-12.4e  ", set.size(), sets.probability(set, p));
      text.append(wrapped(row, " ".repeat(row.length()), String.join(", ", set)));
    }
    text.append("  in all ").append(sets.count()).append("; by size, from 1 up: ");
    List<String> counts = new ArrayList<>();
    sets.countBySize().stream().skip(1).forEach(count -> counts.add(count.toString()));
    return text.append(String.join(", ", counts)).append('\n').toString();
  }

  private String bounds() {
    Interval esaryProschan = Bounds.of(system).given(p).esaryProschan();
    Interval minMax = Bounds.of(system).given(p).minMax();
    return String.format(
        Locale.ROOT,
        "  %-34s  %-14s  %-14s%n  %-34s  %-14s  %-14s%n  %-34s  %-14s  %-14s%n",
        "failing side",
        "at least",
        "at most",
        "Esary-Proschan, independent",
        number(esaryProschan.upper().failing()),
        number(esaryProschan.lower().failing()),
        "min-max, associated",
        number(minMax.upper().failing()),
        number(minMax.lower().failing()));
  }

  private Ranking birnbaum() {
    return Importance.of(system).given(p).birnbaum();
  }

  private String advice() {
    StringBuilder text = new StringBuilder();
    List<String> single =
        system.minimalCutSets().stream()
            .takeWhile(set -> set.size() == 1)
            .map(set -> set.iterator().next())
            .toList();
    text.append(
        wrapped(
            "  ",
            single.isEmpty()
                ? "No single failure stops the system."
                : "Single points of failure: " + String.join(", ", single) + "."));
    Ranking birnbaum = birnbaum();
    List<String> byGain =
        system.components().stream()
            .sorted(Comparator.comparingDouble((String name) -> -gain(birnbaum, name)))
            .limit(3)
            .toList();
    double fails = system.reliability(p).failing();
    text.append("  Largest gain if it could not fail (failing probability times Birnbaum):\n");
    for (String name : byGain) {
      double gain = gain(birnbaum, name);
      text.append(
          String.format(
              Locale.ROOT,
              "    %-20s  %.4e, which is %4.1f %% of the system's failing probability%n",
              name,
              gain,
              100 * gain / fails));
    }
    return text.toString();
  }

  private double gain(Ranking birnbaum, String name) {
    return p.get(name).failing() * birnbaum.value(name);
  }

  private static String row(String label, String value) {
    return String.format(Locale.ROOT, "  %-34s  %s%n", label, value);
  }

  private static String number(double value) {
    return value > 0.001
        ? String.format(Locale.ROOT, "%.12f", value)
        : String.format(Locale.ROOT, "%.6e", value);
  }

  private static String indented(String text) {
    return text.strip().lines().map(line -> "  " + line + "\n").reduce("", String::concat);
  }

  /** Breaks a long line at blanks and after product dots; continued lines are indented further. */
  private static String wrapped(String indent, String text) {
    return wrapped(indent, indent + (indent.isEmpty() ? "" : "  "), text);
  }

  private static String wrapped(String first, String continued, String text) {
    StringBuilder page = new StringBuilder();
    String line = first;
    for (String word : text.split("(?<=[ ·])", -1)) {
      if (line.length() + word.stripTrailing().length() > WIDTH && !line.isBlank()) {
        page.append(line.stripTrailing()).append('\n');
        line = continued;
      }
      line += word;
    }
    return page.append(line.stripTrailing()).append('\n').toString();
  }
}
