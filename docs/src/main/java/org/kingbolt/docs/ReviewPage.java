package org.kingbolt.docs;

import java.util.ArrayList;
import java.util.Arrays;
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

  /** What a page can hold. */
  public enum Section {
    /** The description, and the components that never matter. */
    STRUCTURE("Structure"),
    /** The figure in both tails. */
    RELIABILITY("Reliability"),
    /** The formula, step by step; long for networks that do not fall apart. */
    DERIVATION("Derivation"),
    /** The smallest ways to fail, and how many there are of each size. */
    SMALLEST_CUT_SETS("Smallest minimal cut sets"),
    /** The likeliest ways to fail, and the share of the failing probability that each makes up. */
    LIKELIEST_CUT_SETS("Most probable minimal cut sets"),
    /** The smallest ways to work, and how many there are of each size. */
    SMALLEST_PATH_SETS("Smallest minimal path sets"),
    /** Intervals that hold. */
    INTERVAL("Guaranteed interval"),
    /** The ranking of the components. */
    BIRNBAUM("Birnbaum importance"),
    /** Single points of failure and the largest gains. */
    ADVICE("What to look at first");

    private final String heading;

    Section(String heading) {
      this.heading = heading;
    }
  }

  private static final List<Section> USUAL =
      Arrays.stream(Section.values())
          .filter(section -> section != Section.LIKELIEST_CUT_SETS)
          .toList();

  private final String title;
  private final CoherentSystem system;
  private final Probabilities p;
  private final List<Section> sections;

  private ReviewPage(String title, CoherentSystem system, Probabilities p, List<Section> sections) {
    this.title = title;
    this.system = system;
    this.p = p;
    this.sections = sections;
  }

  /**
   * Prepares the usual page: all sections but the most probable cut sets.
   *
   * @param title its first line
   * @param structure the system
   * @param p the components' probabilities
   * @return the page; {@link #toString()} is its text
   */
  public static ReviewPage of(String title, Structure structure, Probabilities p) {
    return new ReviewPage(title, structure.compile(), p, USUAL);
  }

  /**
   * Chooses what to show.
   *
   * @param chosen the sections, in their order on the page
   * @return a page of these sections, numbered from 1
   */
  public ReviewPage showing(Section... chosen) {
    return new ReviewPage(title, system, p, List.of(chosen));
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
    for (int i = 0; i < sections.size(); i++) {
      String heading = (i + 1) + "  " + sections.get(i).heading;
      page.append('\n').append(heading).append('\n').append("-".repeat(heading.length()));
      page.append('\n').append(body(sections.get(i)));
    }
    return page.toString();
  }

  private String body(Section section) {
    return switch (section) {
      case STRUCTURE -> wrapped("  ", system.structure().toString()) + irrelevant();
      case RELIABILITY -> reliability();
      case DERIVATION -> derivation();
      case SMALLEST_CUT_SETS -> sets(system.minimalCutSets(), "failed");
      case LIKELIEST_CUT_SETS -> likeliest();
      case SMALLEST_PATH_SETS -> sets(system.minimalPathSets(), "working");
      case INTERVAL -> bounds();
      case BIRNBAUM -> indented(birnbaum().toString());
      case ADVICE -> advice();
    };
  }

  private String irrelevant() {
    List<String> names = system.irrelevantComponents();
    return names.isEmpty()
        ? ""
        : wrapped("  ", "Irrelevant, in no state of any consequence: " + String.join(", ", names));
  }

  private String reliability() {
    Probability diagram = system.reliability(p);
    String text =
        row("components", Integer.toString(system.components().size()))
            + row("works", number(diagram.working()))
            + row("fails", number(diagram.failing()));
    int derived = sections.indexOf(Section.DERIVATION) + 1;
    if (derived > 0) {
      Probability formula = Derivation.of(system.structure()).reliability(p);
      text += row("fails, by the formula of section " + derived, number(formula.failing()));
    }
    return text;
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

  private String likeliest() {
    MinimalSets cuts = system.minimalCutSets();
    double fails = system.reliability(p).failing();
    StringBuilder text = new StringBuilder();
    text.append(String.format(Locale.ROOT, "  %-12s  %8s  %s%n", "all failed", "share", "set"));
    for (Set<String> set : cuts.mostProbable(SETS, p)) {
      double all = cuts.probability(set, p);
      String row = String.format(Locale.ROOT, "  %-12.4e  %6.2f %%  ", all, 100 * all / fails);
      text.append(wrapped(row, " ".repeat(row.length()), String.join(", ", set)));
    }
    return text.toString();
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
