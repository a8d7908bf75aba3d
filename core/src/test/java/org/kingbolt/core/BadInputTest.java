package org.kingbolt.core;

import static org.kingbolt.core.BadCall.illegal;
import static org.kingbolt.core.BadCall.incoherent;

import java.time.Duration;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Set;
import java.util.function.DoubleConsumer;
import java.util.function.IntConsumer;
import java.util.stream.IntStream;
import java.util.stream.Stream;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.MethodSource;

/** Numbers out of range and descriptions without sense; names are in {@link BadNameTest}. */
class BadInputTest {

  private static final Structure AB = Structure.series("a", "b");
  private static final Structure ALWAYS = Structure.parallel("a", "b").givenWorking("a");
  private static final Structure NEVER = Structure.series("a", "b").givenFailed("a");

  private record NumberTaker(String where, DoubleConsumer call) {}

  static Stream<BadCall> numbersOutsideZeroToOne() {
    CoherentSystem system = AB.compile();
    ReliabilityPolynomial polynomial = system.polynomial();
    String pA = "component \"a\": probability of working";
    String qA = "component \"a\": probability of failing";
    List<NumberTaker> takers =
        List.of(
            new NumberTaker("probability of working", x -> Probability.working(x)),
            new NumberTaker("probability of failing", x -> Probability.failing(x)),
            new NumberTaker("probability of working", x -> Probability.of(x, 0.5)),
            new NumberTaker("probability of failing", x -> Probability.of(0.5, x)),
            new NumberTaker("probability of working", x -> Probabilities.all(x)),
            new NumberTaker(pA, x -> Probabilities.working(Map.of("a", x))),
            new NumberTaker(qA, x -> Probabilities.failing(Map.of("a", x))),
            new NumberTaker(pA, x -> Probabilities.all(0.5).with("a", x)),
            new NumberTaker("probability of working", x -> system.reliability(x)),
            new NumberTaker("probability of working", x -> polynomial.at(x)),
            new NumberTaker("probability of working", x -> polynomial.derivative(x)));
    return Stream.of(
            Double.NaN,
            -0.1,
            1.1,
            -Double.MIN_VALUE,
            Math.nextUp(1.0),
            Double.POSITIVE_INFINITY,
            Double.NEGATIVE_INFINITY)
        .flatMap(
            number ->
                takers.stream()
                    .map(
                        taker ->
                            illegal(
                                taker.where + " " + number,
                                () -> taker.call.accept(number),
                                taker.where + " is " + number,
                                "a number from 0 to 1")));
  }

  @ParameterizedTest
  @MethodSource
  void numbersOutsideZeroToOne(BadCall bad) {
    bad.check();
  }

  static Stream<BadCall> sidesThatDoNotAddUp() {
    return Stream.of(new double[] {0.5, 0.4}, new double[] {1, 1}, new double[] {0.5, 0.50000002})
        .map(
            sides ->
                illegal(
                    sides[0] + " and " + sides[1],
                    () -> Probability.of(sides[0], sides[1]),
                    "working " + sides[0],
                    "failing " + sides[1],
                    "add up to " + (sides[0] + sides[1]),
                    "must add up to 1",
                    "Probability.working or Probability.failing"));
  }

  @ParameterizedTest
  @MethodSource
  void sidesThatDoNotAddUp(BadCall bad) {
    bad.check();
  }

  private record CountTaker(String where, IntConsumer call) {}

  static Stream<BadCall> countsOutOfRange() {
    List<String> names = List.of("a", "b", "c");
    List<CountTaker> takers =
        List.of(
            new CountTaker("atLeast: k", k -> Structure.atLeast(k, "a", "b", "c")),
            new CountTaker(
                "atLeast: k",
                k -> Structure.atLeast(k, AB, Structure.component("b"), Structure.component("c"))),
            new CountTaker(
                "withoutFailureRun: the run", k -> Structure.withoutFailureRun(k, names)),
            new CountTaker(
                "withoutFailureRunAround: the run",
                k -> Structure.withoutFailureRunAround(k, names)));
    return Stream.of(0, 4, -1, Integer.MIN_VALUE, Integer.MAX_VALUE)
        .flatMap(
            k ->
                takers.stream()
                    .map(
                        taker ->
                            illegal(
                                taker.where + " " + k,
                                () -> taker.call.accept(k),
                                taker.where + " is " + k + " with 3 parts",
                                "it must be from 1 to 3")));
  }

  @ParameterizedTest
  @MethodSource
  void countsOutOfRange(BadCall bad) {
    bad.check();
  }

  private static Map<String, Long> capacities(long first, long second) {
    Map<String, Long> capacities = new LinkedHashMap<>();
    capacities.put("a", first);
    capacities.put("b", second);
    return capacities;
  }

  static Stream<BadCall> demandsAndCapacities() {
    String kind = "capacityAtLeast";
    return Stream.of(
        incoherent(
            "nothing asked for",
            () -> Structure.capacityAtLeast(0, capacities(3, 4)),
            kind,
            "a demand of 0",
            "at least 1"),
        incoherent(
            "less than nothing",
            () -> Structure.capacityAtLeast(Long.MIN_VALUE, capacities(3, 4)),
            kind,
            "a demand of " + Long.MIN_VALUE,
            "at least 1"),
        incoherent(
            "one too many",
            () -> Structure.capacityAtLeast(8, capacities(3, 4)),
            kind,
            "a demand of 8",
            "only 7",
            "ask for less or add capacity"),
        incoherent(
            "all zero",
            () -> Structure.capacityAtLeast(1, capacities(0, 0)),
            kind,
            "a demand of 1",
            "only 0"),
        illegal(
            "negative capacity",
            () -> Structure.capacityAtLeast(1, capacities(3, -4)),
            kind,
            "the capacity of b is -4",
            "0 or more"),
        illegal(
            "sum too large",
            () -> Structure.capacityAtLeast(1, capacities(Long.MAX_VALUE, 1)),
            kind,
            "more than " + Long.MAX_VALUE,
            "use a larger unit"));
  }

  @ParameterizedTest
  @MethodSource
  void demandsAndCapacities(BadCall bad) {
    bad.check();
  }

  static Stream<BadCall> nothingGiven() {
    String mend = "list at least one component or structure";
    return Stream.of(
        illegal("series", () -> Structure.series(List.of()), "series: there are no parts", mend),
        illegal("parallel", () -> Structure.parallel(new String[0]), "parallel: there", mend),
        illegal("atLeast", () -> Structure.atLeast(0, List.of()), "atLeast: there", mend),
        illegal(
            "capacities", () -> Structure.capacityAtLeast(1, Map.of()), "capacityAtLeast", mend),
        illegal("run", () -> Structure.withoutFailureRun(1, List.of()), "withoutFailureRun", mend),
        illegal(
            "around",
            () -> Structure.withoutFailureRunAround(1, List.of()),
            "withoutFailureRunAround",
            mend),
        illegal(
            "ofRule",
            () -> Structure.ofRule(List.of(), working -> true),
            "ofRule: there are 0 names",
            "from 1 to 20"),
        incoherent(
            "path sets",
            () -> Structure.ofPathSets(List.of()),
            "ofPathSets: there are no sets",
            "never work",
            "list at least one"),
        incoherent(
            "cut sets",
            () -> Structure.ofCutSets(List.of()),
            "ofCutSets: there are no sets",
            "always work",
            "list at least one"),
        incoherent(
            "path set",
            () -> Structure.ofPathSets(List.of(List.of("a"), List.of())),
            "ofPathSets: set 2 is empty",
            "always work",
            "leave it out"),
        incoherent(
            "cut set",
            () -> Structure.ofCutSets(List.of(List.of(), List.of("a"))),
            "ofCutSets: set 1 is empty",
            "never work",
            "leave it out"));
  }

  @ParameterizedTest
  @MethodSource
  void nothingGiven(BadCall bad) {
    bad.check();
  }

  static Stream<BadCall> partsWithoutComponents() {
    String mend = "it has no components, so leave it out";
    return Stream.of(
        incoherent(
            "series", () -> Structure.series(AB, ALWAYS), "series: part 2 always works", mend),
        incoherent("parallel", () -> Structure.parallel(NEVER, AB), "parallel: part 1 never", mend),
        incoherent("atLeast", () -> Structure.atLeast(1, AB, NEVER), "atLeast: part 2 never", mend),
        illegal("conditioned again", () -> NEVER.givenFailed("b"), "\"b\"", "components are none"));
  }

  @ParameterizedTest
  @MethodSource
  void partsWithoutComponents(BadCall bad) {
    bad.check();
  }

  static Stream<BadCall> rules() {
    List<String> many = IntStream.range(0, 21).mapToObj(i -> "u" + i).toList();
    return Stream.of(
        incoherent(
            "never",
            () -> Structure.ofRule(List.of("a", "b"), working -> false),
            "ofRule: the rule never works",
            "when all components work"),
        incoherent(
            "always",
            () -> Structure.ofRule(List.of("a", "b"), working -> true),
            "ofRule: the rule always works",
            "when all components have failed"),
        incoherent(
            "exactly one",
            () -> Structure.ofRule(List.of("a", "b"), working -> working.size() == 1),
            "ofRule: the rule is not monotone",
            "works with [b] working but fails with [a, b]",
            "must never do harm"),
        incoherent(
            "upside down",
            () -> Structure.ofRule(List.of("a"), working -> working.isEmpty()),
            "works with [] working but fails with [a]"),
        illegal(
            "too many",
            () -> Structure.ofRule(many, working -> true),
            "ofRule: there are 21 names",
            "from 1 to 20",
            "build larger systems from several rules"));
  }

  @ParameterizedTest
  @MethodSource
  void rules(BadCall bad) {
    bad.check();
  }

  static Stream<BadCall> budgetsAndAmounts() {
    MinimalSets cuts = AB.compile().minimalCutSets();
    Probabilities p = Probabilities.all(0.5);
    String longer = "must be longer than zero";
    return Stream.of(
        illegal("no nodes", () -> Budget.ofNodes(0), "budget of 0 nodes", "at least 1"),
        illegal("negative", () -> Budget.ofNodes(-5), "budget of -5 nodes", "at least 1"),
        illegal("no time", () -> Budget.ofTime(Duration.ZERO), "budget of PT0S", longer),
        illegal("past", () -> Budget.ofTime(Duration.ofSeconds(-1)), "budget of PT-1S", longer),
        illegal("no time added", () -> Budget.ofNodes(5).withTime(Duration.ZERO), "PT0S", longer),
        illegal("size", () -> CutOff.size(0), "cut-off at size 0", "at least 1"),
        illegal("sure", () -> CutOff.probability(0, p), "cut-off at probability 0.0", "above 0"),
        illegal("above", () -> CutOff.probability(1.5, p), "1.5", "at most 1"),
        illegal("nothing", () -> CutOff.probability(Double.NaN, p), "NaN", "such as 1e-9"),
        illegal(
            "uncovered",
            () -> AB.minimalCutSets(CutOff.probability(0.1, Probabilities.of(Map.of()))),
            "no probability for \"a\", \"b\""),
        illegal("largest", () -> cuts.ofSizeAtMost(-1), "size at most -1", "0 or more"),
        illegal("containing", () -> cuts.containing("c"), "unknown component \"c\""),
        illegal("without", () -> cuts.without("c"), "unknown component \"c\""),
        illegal("contains", () -> cuts.contains(Set.of("c")), "unknown component \"c\""),
        illegal("cut set", () -> AB.isCutSet(Set.of("c")), "unknown component \"c\""),
        illegal("rows", () -> cuts.table(p, -1), "-1 sets", "0 or more"),
        illegal("sets", () -> cuts.mostProbable(-1, p), "-1 sets", "0 or more"));
  }

  @ParameterizedTest
  @MethodSource
  void budgetsAndAmounts(BadCall bad) {
    bad.check();
  }
}
