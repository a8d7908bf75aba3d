package org.kingbolt.core;

import static org.kingbolt.core.BadCall.isNull;

import java.util.Arrays;
import java.util.Collection;
import java.util.Collections;
import java.util.HashSet;
import java.util.List;
import java.util.Map;
import java.util.Set;
import java.util.stream.Stream;
import org.apache.commons.math3.fraction.BigFraction;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.MethodSource;

/** Nothing takes null, and the complaint names the argument. */
class NullArgumentTest {

  private static final Structure AB = Structure.series("a", "b");
  private static final CoherentSystem SYSTEM = AB.compile();
  private static final Structure NO_STRUCTURE = null;
  private static final List<Structure> NO_PARTS = null;
  private static final List<String> NO_LIST = null;
  private static final String[] NO_NAMES = null;
  private static final Collection<List<String>> NO_SETS = null;
  private static final Budget NO_BUDGET = null;
  private static final Probabilities NO_PROBABILITIES = null;
  private static final Probability NO_PROBABILITY = null;
  private static final BigFraction NO_FRACTION = null;

  static Stream<BadCall> descriptions() {
    List<List<String>> nullSecond = Arrays.asList(List.of("a"), null);
    return Stream.of(
        isNull("series names", () -> Structure.series(NO_NAMES), "series: the list of names"),
        isNull("series list", () -> Structure.series(NO_PARTS), "series: the list of parts"),
        isNull("series part", () -> Structure.series(AB, NO_STRUCTURE), "series: part 2"),
        isNull("series member", () -> Structure.series(Arrays.asList(AB, null)), "series: part 2"),
        isNull("parallel names", () -> Structure.parallel(NO_NAMES), "parallel: the list of names"),
        isNull("parallel list", () -> Structure.parallel(NO_PARTS), "parallel: the list of parts"),
        isNull("parallel part", () -> Structure.parallel(AB, NO_STRUCTURE), "parallel: part 2"),
        isNull("atLeast names", () -> Structure.atLeast(1, NO_NAMES), "atLeast: the list of names"),
        isNull("atLeast list", () -> Structure.atLeast(1, NO_PARTS), "atLeast: the list of parts"),
        isNull("atLeast part", () -> Structure.atLeast(1, NO_STRUCTURE, AB), "atLeast: part 1"),
        isNull("paths", () -> Structure.ofPathSets(NO_SETS), "ofPathSets: the collection"),
        isNull("path set", () -> Structure.ofPathSets(nullSecond), "ofPathSets: set 2"),
        isNull("cuts", () -> Structure.ofCutSets(NO_SETS), "ofCutSets: the collection"),
        isNull("cut set", () -> Structure.ofCutSets(nullSecond), "ofCutSets: set 2"),
        isNull("rule names", () -> Structure.ofRule(null, Set::isEmpty), "ofRule: the list"),
        isNull("rule", () -> Structure.ofRule(List.of("a"), null), "ofRule: the rule"),
        isNull("capacities", () -> Structure.capacityAtLeast(1, null), "capacityAtLeast: the map"),
        isNull(
            "capacity",
            () -> Structure.capacityAtLeast(1, Collections.singletonMap("a", null)),
            "the capacity of \"a\""),
        isNull("run", () -> Structure.withoutFailureRun(1, NO_LIST), "withoutFailureRun: the list"),
        isNull("run", () -> Structure.withoutFailureRun(1, NO_NAMES), "withoutFailureRun: the"),
        isNull(
            "around",
            () -> Structure.withoutFailureRunAround(1, NO_LIST),
            "withoutFailureRunAround: the list"),
        isNull(
            "around",
            () -> Structure.withoutFailureRunAround(1, NO_NAMES),
            "withoutFailureRunAround: the list"),
        isNull(
            "link",
            () -> Structure.network().link(NO_STRUCTURE, "x", "y"),
            "link from \"x\" to \"y\""),
        isNull(
            "arc",
            () -> Structure.network().arc(NO_STRUCTURE, "x", "y"),
            "arc from \"x\" to \"y\""),
        isNull("node", () -> Structure.network().node("x", NO_STRUCTURE), "node \"x\""),
        isNull(
            "connecting",
            () -> Structure.network().link("L", "x", "y").connecting(NO_NAMES),
            "connecting: the list of nodes"),
        isNull("parse", () -> Structure.parse(null), "text"));
  }

  @ParameterizedTest
  @MethodSource
  void descriptions(BadCall bad) {
    bad.check();
  }

  static Stream<BadCall> questions() {
    Set<String> nullMember = new HashSet<>(Arrays.asList("a", null));
    MinimalSets cuts = SYSTEM.minimalCutSets();
    TruncatedSets truncated = AB.minimalCutSets(CutOff.size(1));
    return Stream.of(
        isNull("works", () -> AB.works(null), "the set of working components"),
        isNull("works member", () -> AB.works(nullMember), "a name in the set"),
        isNull("replace", () -> AB.replace("a", null), "module"),
        isNull("compile", () -> AB.compile(NO_BUDGET), "budget"),
        isNull("order", () -> AB.compile(NO_LIST, Budget.ofHeap()), "the order of components"),
        isNull("order budget", () -> AB.compile(List.of("a", "b"), null), "budget"),
        isNull("reliability", () -> SYSTEM.reliability(NO_PROBABILITIES), "probabilities"),
        isNull("evaluation", () -> SYSTEM.evaluation(null), "probabilities"),
        isNull("paths", () -> SYSTEM.minimalPathSets(null), "budget"),
        isNull("cuts", () -> SYSTEM.minimalCutSets(null), "budget"),
        isNull("cut-off", () -> AB.minimalPathSets((CutOff) null), "cut-off"),
        isNull("cut-off", () -> AB.minimalCutSets(CutOff.size(1), null), "budget"),
        isNull("cut-off", () -> CutOff.probability(0.1, null), "probabilities"),
        isNull("discarded", () -> truncated.discarded(null), "probabilities"),
        isNull("discarded", () -> truncated.discarded(Probabilities.all(0.5), null), "budget"),
        isNull("path set", () -> AB.isPathSet(null), "the set of working components"),
        isNull("cut set", () -> AB.isCutSet(null), "the set of failed components"),
        isNull("cut set member", () -> AB.isCutSet(nullMember), "a name in the set of failed"),
        isNull("containing", () -> cuts.containing(null), "component"),
        isNull("without", () -> cuts.without(null), "component"),
        isNull("contains", () -> cuts.contains(null), "set"),
        isNull("contains member", () -> cuts.contains(nullMember), "component"),
        isNull("part", () -> cuts.containsPartOf(null), "set"),
        isNull("sum", () -> cuts.sumOfProbabilities(null), "probabilities"),
        isNull("rows", () -> cuts.rows(null), "probabilities"),
        isNull("table", () -> cuts.table(null, 1), "probabilities"),
        isNull("expansion", () -> cuts.inclusionExclusion(null), "probabilities"),
        isNull("expansion", () -> cuts.inclusionExclusion(Probabilities.all(0.5), null), "budget"),
        isNull("products", () -> cuts.disjointProducts(null), "probabilities"),
        isNull("products", () -> cuts.disjointProducts(Probabilities.all(0.5), null), "budget"),
        isNull("pivot", () -> SYSTEM.pivot("a").reliability(null), "probabilities"),
        isNull("equation", () -> SYSTEM.pivot("a").equation(null), "probabilities"),
        isNull("polynomial", () -> SYSTEM.polynomial().at(NO_PROBABILITY), "probability"),
        isNull("polynomial", () -> SYSTEM.polynomial().at(NO_FRACTION), "probability"),
        isNull("slope", () -> SYSTEM.polynomial().derivative(NO_PROBABILITY), "probability"),
        isNull("polynomial budget", () -> SYSTEM.polynomial(null), "budget"),
        isNull("signature budget", () -> SYSTEM.signature(null), "budget"),
        isNull("most probable", () -> cuts.mostProbable(1, null), "probabilities"),
        isNull("set", () -> cuts.probability(null, Probabilities.all(0.5)), "set"),
        isNull("set", () -> cuts.probability(Set.of("a"), null), "probabilities"),
        isNull("set member", () -> cuts.probability(nullMember, Probabilities.all(0.5)), "a name"),
        isNull("derivation", () -> Derivation.of(null), "structure"),
        isNull("derivation", () -> Derivation.of(AB, null), "budget"),
        isNull("derivation", () -> Derivation.of(AB).reliability(null), "probabilities"),
        isNull("budget", () -> Budget.ofTime(null), "time"),
        isNull("budget", () -> Budget.ofNodes(1).withTime(null), "time"));
  }

  @ParameterizedTest
  @MethodSource
  void questions(BadCall bad) {
    bad.check();
  }

  static Stream<BadCall> probabilities() {
    Map<String, Double> noNumber = Collections.singletonMap("a", null);
    List<String> noName = Collections.singletonList(null);
    return Stream.of(
        isNull("all", () -> Probabilities.all(NO_PROBABILITY), "probability"),
        isNull("of", () -> Probabilities.of(null), "the map of probabilities"),
        isNull(
            "of value",
            () -> Probabilities.of(Collections.singletonMap("a", null)),
            "probability of \"a\""),
        isNull("working", () -> Probabilities.working(null), "the map of probabilities"),
        isNull("working value", () -> Probabilities.working(noNumber), "probability of \"a\""),
        isNull("failing", () -> Probabilities.failing(null), "the map of probabilities"),
        isNull("failing value", () -> Probabilities.failing(noNumber), "probability of \"a\""),
        isNull("with", () -> Probabilities.all(0.5).with("a", null), "probability of \"a\""),
        isNull("get", () -> Probabilities.all(0.5).get(null), "component"),
        isNull("covers", () -> Probabilities.all(0.5).covers(null), "component"),
        isNull("covers", () -> Probabilities.of(Map.of()).covers(null), "component"),
        isNull("list", () -> Probabilities.all(0.5).forComponents(null), "list of components"),
        isNull("name", () -> Probabilities.all(0.5).forComponents(noName), "list of components"),
        isNull("name", () -> Probabilities.of(Map.of()).forComponents(noName), "list of comp"));
  }

  @ParameterizedTest
  @MethodSource
  void probabilities(BadCall bad) {
    bad.check();
  }
}
