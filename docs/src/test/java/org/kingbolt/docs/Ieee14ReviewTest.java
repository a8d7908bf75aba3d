package org.kingbolt.docs;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;
import static org.kingbolt.core.published.Digits.assertPrinted;

import java.math.BigDecimal;
import java.math.MathContext;
import java.util.ArrayList;
import java.util.Collection;
import java.util.List;
import java.util.Set;
import java.util.TreeSet;
import java.util.regex.MatchResult;
import java.util.regex.Pattern;
import java.util.stream.Collectors;
import java.util.stream.IntStream;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.MethodSource;
import org.kingbolt.core.published.StateTable;
import org.kingbolt.core.published.Topology;

/**
 * What the 14-bus review prints, against all 2^20 states in exact arithmetic. The topology is the
 * published one of the IEEE 14-bus test case (from memory).
 */
class Ieee14ReviewTest {

  private static final Topology NETWORK = Topology.file("ieee14");
  private static final List<String> BRANCHES =
      NETWORK.links().stream().map(Topology.Link::name).toList();
  private static final BigDecimal P = new BigDecimal("0.99");
  private static final BigDecimal Q = new BigDecimal("0.01");
  private static final List<String> PAGES =
      List.of(Ieee14Review.page().split("(?=IEEE 14-bus test case: )", -1));

  private static final List<Question> QUESTIONS =
      List.of(
          new Question("bus 1 to bus 14", 0, List.of("1", "14")),
          new Question("all buses", 1, NETWORK.nodes()));

  static List<Question> questions() {
    return QUESTIONS;
  }

  /** A question with its page and its states. */
  private static final class Question {
    final String name;
    final String page;
    final StateTable states;
    final LinkCounts counts;
    final Set<Set<String>> cuts;

    Question(String name, int page, List<String> terminals) {
      this.name = name;
      this.page = PAGES.get(page);
      states = StateTable.of(NETWORK, terminals.toArray(String[]::new));
      counts = LinkCounts.of(NETWORK, terminals);
      cuts = states.minimalCuts();
    }

    String section(String heading) {
      List<String> parts = List.of(page.split("\n\\d  (?=.*\n-+\n)", -1));
      return parts.stream().filter(part -> part.startsWith(heading)).findFirst().orElseThrow();
    }

    BigDecimal birnbaum(String branch) {
      return counts.birnbaum(BRANCHES.indexOf(branch), P);
    }

    @Override
    public String toString() {
      return name;
    }
  }

  @ParameterizedTest
  @MethodSource("questions")
  void bothTails_areThoseOfTheEnumeration(Question question) {
    BigDecimal works = question.states.reliability(P.toString());
    assertEquals(0, works.compareTo(question.counts.reliability(P)), "two enumerations");
    List<String> printed = values("(?:works|fails) +(\\S+)", question.section("Reliability"));
    assertEquals(2, printed.size());
    assertPrinted(printed.get(0), works.doubleValue());
    assertPrinted(printed.get(1), BigDecimal.ONE.subtract(works).doubleValue());
  }

  @ParameterizedTest
  @MethodSource("questions")
  void smallestCutSets_areThoseOfTheEnumeration(Question question) {
    String section = question.section("Smallest minimal cut sets");
    List<Integer> sizes = sizes(question.cuts);
    int most = sizes.get(sizes.size() - 1);
    String bySize =
        IntStream.rangeClosed(1, most)
            .mapToObj(size -> sizes.stream().filter(s -> s == size).count())
            .map(String::valueOf)
            .collect(Collectors.joining(", "));
    String summary = "in all " + question.cuts.size() + "; by size, from 1 up: " + bySize;
    assertTrue(section.contains(summary), () -> summary + "\n" + section);
    assertSmallest(question, section, " +(\\d+) +(\\S+) +(\\d.*)");
  }

  /** With branches all alike, the smallest cut sets are the most probable. */
  @ParameterizedTest
  @MethodSource("questions")
  void likeliestCutSets_areThoseOfTheEnumeration(Question question) {
    String section = question.section("Most probable minimal cut sets");
    assertSmallest(question, section, " +()(\\S+) +\\S+ %  (.*)");
    BigDecimal fails = BigDecimal.ONE.subtract(question.states.reliability(P.toString()));
    for (MatchResult row : rows(" +(\\S+) +(\\S+) %  (.*)", section)) {
      BigDecimal share = Q.pow(members(row.group(3)).size()).divide(fails, MathContext.DECIMAL64);
      assertPrinted(row.group(2), share.movePointRight(2).doubleValue());
    }
  }

  /** Ten different minimal cut sets, none larger than the tenth smallest, smallest first. */
  private static void assertSmallest(Question question, String section, String pattern) {
    List<Set<String>> printed = new ArrayList<>();
    for (MatchResult row : rows(pattern, section)) {
      Set<String> set = members(row.group(3));
      printed.add(set);
      assertPrinted(row.group(2), Q.pow(set.size()).doubleValue());
      assertTrue(row.group(1).isEmpty() || row.group(1).equals(set.size() + ""), row.group());
    }
    assertTrue(question.cuts.containsAll(printed), () -> "not all minimal cuts: " + printed);
    assertEquals(10, Set.copyOf(printed).size());
    assertEquals(
        sizes(question.cuts).subList(0, 10), printed.stream().map(Set::size).toList(), section);
  }

  @ParameterizedTest
  @MethodSource("questions")
  void birnbaumRanking_isThatOfTheEnumeration(Question question) {
    List<MatchResult> rows =
        rows(" +(\\d+)  (\\S+) +(\\S+)", question.section("Birnbaum importance"));
    Set<String> ranked = rows.stream().map(row -> row.group(2)).collect(Collectors.toSet());
    assertEquals(Set.copyOf(BRANCHES), ranked);
    assertEquals(BRANCHES.size(), rows.size());
    for (MatchResult row : rows) {
      BigDecimal exact = question.birnbaum(row.group(2));
      assertPrinted(row.group(3), exact.doubleValue());
      assertEquals(exact.signum(), new BigDecimal(row.group(3)).signum(), row.group());
      long ahead =
          BRANCHES.stream().filter(other -> question.birnbaum(other).compareTo(exact) > 0).count();
      assertEquals(ahead + 1, Long.parseLong(row.group(1)), row.group());
    }
    List<Integer> ranks = rows.stream().map(row -> Integer.valueOf(row.group(1))).toList();
    assertEquals(ranks.stream().sorted().toList(), ranks);
  }

  /** Esary and Proschan, Technometrics 5 (1963) 191: formula from memory. */
  @ParameterizedTest
  @MethodSource("questions")
  void esaryProschan_isTheFormulaOverTheSetsOfTheEnumeration(Question question) {
    List<MatchResult> rows =
        rows(" +Esary-Proschan, independent +(\\S+) +(\\S+) *", question.section("Guaranteed"));
    BigDecimal noPathWorks = noneOf(question.states.minimalPaths(), P);
    BigDecimal someCutFails = BigDecimal.ONE.subtract(noneOf(question.cuts, Q));
    assertPrinted(rows.get(0).group(1), noPathWorks.doubleValue());
    assertPrinted(rows.get(0).group(2), someCutFails.doubleValue());
    BigDecimal fails = BigDecimal.ONE.subtract(question.states.reliability(P.toString()));
    assertTrue(noPathWorks.compareTo(fails) <= 0 && fails.compareTo(someCutFails) <= 0);
  }

  @ParameterizedTest
  @MethodSource("questions")
  void advice_namesTheSinglePointsAndTheLargestGains(Question question) {
    String section = question.section("What to look at first");
    String single =
        question.cuts.stream()
            .filter(set -> set.size() == 1)
            .flatMap(Set::stream)
            .collect(Collectors.joining(", "));
    assertTrue(
        section.contains(
            single.isEmpty()
                ? "No single failure stops the system."
                : "Single points of failure: " + single + "."),
        section);
    List<MatchResult> rows = rows(" +(\\d+-\\d+) +(\\S+), which is .*", section);
    List<BigDecimal> largest =
        BRANCHES.stream().map(question::birnbaum).sorted((a, b) -> b.compareTo(a)).toList();
    assertEquals(3, rows.size());
    for (int i = 0; i < 3; i++) {
      BigDecimal gain = Q.multiply(question.birnbaum(rows.get(i).group(1)));
      assertEquals(0, gain.compareTo(Q.multiply(largest.get(i))), rows.get(i).group());
      assertPrinted(rows.get(i).group(2), gain.doubleValue());
    }
  }

  @ParameterizedTest
  @MethodSource("questions")
  void page_hasLinesThatFitAReport(Question question) {
    assertTrue(question.page.lines().allMatch(line -> line.length() <= 104));
  }

  /** The probability that of sets that share nothing no one occurs as a whole. */
  private static BigDecimal noneOf(Collection<Set<String>> sets, BigDecimal member) {
    MathContext digits = new MathContext(60);
    BigDecimal none = BigDecimal.ONE;
    for (Set<String> set : sets) {
      none = none.multiply(BigDecimal.ONE.subtract(member.pow(set.size())), digits);
    }
    return none;
  }

  private static List<Integer> sizes(Collection<Set<String>> sets) {
    return sets.stream().map(Set::size).sorted().toList();
  }

  private static Set<String> members(String list) {
    return new TreeSet<>(List.of(list.split(", ", -1)));
  }

  private static List<String> values(String pattern, String text) {
    return Pattern.compile(pattern).matcher(text).results().map(found -> found.group(1)).toList();
  }

  /** Whole lines. */
  private static List<MatchResult> rows(String pattern, String text) {
    return Pattern.compile("^" + pattern + "$", Pattern.MULTILINE)
        .matcher(text)
        .results()
        .collect(Collectors.toList());
  }
}
