package org.kingbolt.core;

import static org.kingbolt.core.BadCall.illegal;
import static org.kingbolt.core.BadCall.isNull;

import java.util.Arrays;
import java.util.Collections;
import java.util.List;
import java.util.Map;
import java.util.Set;
import java.util.function.Consumer;
import java.util.stream.Stream;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.MethodSource;

/** Names that are null, blank, unknown, missing or repeated, wherever a name is taken. */
class BadNameTest {

  private static final String VISIBLE = "at least one visible character";
  private static final Structure AB = Structure.series("a", "b");
  private static final Probability HALF = Probability.working(0.5);

  private record NameTaker(String where, Consumer<String> call) {}

  private static NetworkBuilder line() {
    return Structure.network().link("L1", "x", "y").link("L2", "y", "z");
  }

  private static List<String> with(String name) {
    return Arrays.asList("a", name);
  }

  private static Stream<NameTaker> nameTakers() {
    return Stream.of(
        new NameTaker("component", name -> Structure.component(name)),
        new NameTaker("series", name -> Structure.series("a", name)),
        new NameTaker("parallel", name -> Structure.parallel("a", name)),
        new NameTaker("atLeast", name -> Structure.atLeast(1, "a", name)),
        new NameTaker("ofPathSets", name -> Structure.ofPathSets(List.of(with(name)))),
        new NameTaker("ofCutSets", name -> Structure.ofCutSets(List.of(with(name)))),
        new NameTaker("ofRule", name -> Structure.ofRule(with(name), Set::isEmpty)),
        new NameTaker(
            "capacityAtLeast",
            name -> Structure.capacityAtLeast(1, Collections.singletonMap(name, 1L))),
        new NameTaker("withoutFailureRun", name -> Structure.withoutFailureRun(1, "a", name)),
        new NameTaker("withoutFailureRun", name -> Structure.withoutFailureRun(1, with(name))),
        new NameTaker(
            "withoutFailureRunAround", name -> Structure.withoutFailureRunAround(1, "a", name)),
        new NameTaker(
            "withoutFailureRunAround", name -> Structure.withoutFailureRunAround(1, with(name))),
        new NameTaker("component", name -> Structure.network().link(name, "x", "y")),
        new NameTaker("network node", name -> Structure.network().link("L", name, "y")),
        new NameTaker("network node", name -> Structure.network().link("L", "x", name)),
        new NameTaker("component", name -> Structure.network().arc(name, "x", "y")),
        new NameTaker("network node", name -> Structure.network().arc("L", name, "y")),
        new NameTaker("network node", name -> Structure.network().arc("L", "x", name)),
        new NameTaker("network node", name -> Structure.network().perfectLink(name, "y")),
        new NameTaker("network node", name -> Structure.network().perfectLink("x", name)),
        new NameTaker("network node", name -> Structure.network().perfectArc(name, "y")),
        new NameTaker("network node", name -> Structure.network().perfectArc("x", name)),
        new NameTaker("network node", name -> Structure.network().node(name, "a")),
        new NameTaker("component", name -> Structure.network().node("x", name)),
        new NameTaker("connecting", name -> line().connecting("x", name)),
        new NameTaker("reachingAllFrom", name -> line().reachingAllFrom(name)),
        new NameTaker("order of components", name -> AB.compile(with(name), Budget.ofHeap())),
        new NameTaker("component", name -> AB.givenWorking(name)),
        new NameTaker("component", name -> AB.givenFailed(name)),
        new NameTaker("component", name -> AB.replace(name, Structure.component("c"))),
        new NameTaker("component", name -> AB.compile().pivot(name)),
        new NameTaker(
            "probabilities", name -> Probabilities.of(Collections.singletonMap(name, HALF))),
        new NameTaker(
            "probabilities", name -> Probabilities.working(Collections.singletonMap(name, 0.5))),
        new NameTaker(
            "probabilities", name -> Probabilities.failing(Collections.singletonMap(name, 0.5))),
        new NameTaker("probabilities", name -> Probabilities.all(0.5).with(name, 0.5)),
        new NameTaker("probabilities", name -> Probabilities.all(0.5).with(name, HALF)));
  }

  static Stream<BadCall> nullNames() {
    return nameTakers()
        .map(taker -> isNull(taker.where, () -> taker.call.accept(null), taker.where, "null"));
  }

  @ParameterizedTest
  @MethodSource
  void nullNames(BadCall bad) {
    bad.check();
  }

  static Stream<BadCall> blankNames() {
    return Stream.of(
            "",
            " ",
            " \t\n",
            "\u2003",
            "\u00a0",
            "\u200b",
            "\u2060\ufeff",
            "\u0007",
            "\ud83d",
            "\u00ad \u0378")
        .flatMap(
            name ->
                nameTakers()
                    .map(
                        taker ->
                            illegal(
                                taker.where,
                                () -> taker.call.accept(name),
                                taker.where,
                                "\"" + name + "\"",
                                VISIBLE)));
  }

  @ParameterizedTest
  @MethodSource
  void blankNames(BadCall bad) {
    bad.check();
  }

  private static Stream<NameTaker> listTakers() {
    return Stream.of(
        new NameTaker("series: name 2", name -> Structure.series("a", name)),
        new NameTaker("parallel: name 1", name -> Structure.parallel(name, "a")),
        new NameTaker("atLeast: name 3", name -> Structure.atLeast(1, "a", "b", name)),
        new NameTaker(
            "withoutFailureRun: name 2", name -> Structure.withoutFailureRun(1, "a", name)),
        new NameTaker(
            "withoutFailureRunAround: name 2",
            name -> Structure.withoutFailureRunAround(1, with(name))),
        new NameTaker(
            "ofPathSets: set 2: name 2",
            name -> Structure.ofPathSets(List.of(List.of("b"), with(name)))),
        new NameTaker("ofCutSets: set 1: name 2", name -> Structure.ofCutSets(List.of(with(name)))),
        new NameTaker("ofRule: name 2", name -> Structure.ofRule(with(name), Set::isEmpty)),
        new NameTaker("connecting: name 2", name -> line().connecting("x", name)),
        new NameTaker(
            "the order of components: name 2", name -> AB.compile(with(name), Budget.ofHeap())));
  }

  static Stream<BadCall> placeInAList() {
    return listTakers()
        .flatMap(
            taker ->
                Stream.of(
                    isNull(taker.where, () -> taker.call.accept(null), taker.where + " is null"),
                    illegal(taker.where, () -> taker.call.accept(" "), taker.where + " is \" \"")));
  }

  @ParameterizedTest
  @MethodSource
  void placeInAList(BadCall bad) {
    bad.check();
  }

  static Stream<BadCall> invisibleNames_areSpelledOut() {
    return Stream.of(
        illegal("space", () -> Structure.component("\u200b\u00a0"), "(U+200B U+00A0); it must"),
        illegal("tag", () -> Structure.component("\udb40\udc01"), "(U+E0001); it must"),
        illegal("nothing", () -> Structure.component(""), "a name is \"\"; it must"));
  }

  @ParameterizedTest
  @MethodSource
  void invisibleNames_areSpelledOut(BadCall bad) {
    bad.check();
  }

  static Stream<BadCall> unknownNames() {
    Probabilities onlyA = Probabilities.of(Map.of("a", HALF));
    String[] known = {"unknown component", "\"q\"", "the components are \"a\", \"b\""};
    String[] nodes = {"\"q\"", "not a node", "the nodes are \"x\", \"y\", \"z\""};
    return Stream.of(
        illegal("works", () -> AB.works(Set.of("q")), known),
        illegal("givenWorking", () -> AB.givenWorking("q"), known),
        illegal("givenFailed", () -> AB.givenFailed("q"), known),
        illegal("replace", () -> AB.replace("q", AB), known),
        illegal("pivot", () -> AB.compile().pivot("q"), known),
        illegal("order", () -> AB.compile(List.of("a", "b", "q"), Budget.ofHeap()), known),
        illegal("connecting", () -> line().connecting("x", "q"), nodes),
        illegal("reachingAllFrom", () -> line().reachingAllFrom("q"), nodes),
        illegal("get", () -> onlyA.get("q"), "no probability for \"q\"", "Probabilities.with"),
        illegal("get blank", () -> onlyA.get(""), "no probability for \"\""),
        illegal("works blank", () -> AB.works(Set.of("")), "unknown component \"\""));
  }

  @ParameterizedTest
  @MethodSource
  void unknownNames(BadCall bad) {
    bad.check();
  }

  static Stream<BadCall> almostKnownNames() {
    Structure pumps = Structure.series("pump 1", "pump 2", "valve", "Intake filter", "bus");
    NetworkBuilder yard = Structure.network().link("L", "north gate", "south gate");
    String valve = "(did you mean \"valve\"?); the components are \"pump 1\"";
    String filter = "(did you mean \"Intake filter\"?); the";
    return Stream.of(
        illegal("left out", () -> pumps.givenFailed("vave"), valve, "; name one of these"),
        illegal("added", () -> pumps.givenWorking("vallve"), valve),
        illegal("changed", () -> pumps.works(Set.of("value")), valve),
        illegal("swapped", () -> pumps.compile().pivot("vavle"), valve),
        illegal("two slips", () -> pumps.givenFailed("intakefiltre"), filter),
        illegal("nearest", () -> pumps.givenFailed("pump2"), "(did you mean \"pump 2\"?); the"),
        illegal("too far", () -> pumps.givenFailed("vacuum"), "component \"vacuum\"; the"),
        illegal("two of five", () -> pumps.givenFailed("halbe"), "component \"halbe\"; the"),
        illegal("too short", () -> AB.givenFailed("c"), "component \"c\"; the components"),
        illegal(
            "node",
            () -> yard.connecting("north gate", "suoth gate"),
            "\"suoth gate\" is not a node of the network (did you mean \"south gate\"?); the nodes",
            "; name one of these"),
        illegal("case", () -> AB.givenFailed("A"), "\"A\"", "did you mean \"a\"?"),
        illegal("blanks", () -> AB.works(Set.of(" b ")), "\" b \"", "did you mean \"b\"?"));
  }

  @ParameterizedTest
  @MethodSource
  void almostKnownNames(BadCall bad) {
    bad.check();
  }

  static Stream<BadCall> repeatedNames() {
    String[] part = {"part 3 repeats part 1, a", "second unit its own name"};
    return Stream.of(
        illegal("series", () -> Structure.series("a", "b", "a"), part),
        illegal("parallel", () -> Structure.parallel("a", "b", "a"), part),
        illegal("atLeast", () -> Structure.atLeast(2, "a", "b", "a"), part),
        illegal("run", () -> Structure.withoutFailureRun(2, "a", "b", "a"), part),
        illegal("around", () -> Structure.withoutFailureRunAround(2, "a", "b", "a"), part),
        illegal("structures", () -> Structure.parallel(AB, AB), "part 2", "series(a, b)"),
        illegal(
            "paths",
            () -> Structure.ofPathSets(List.of(List.of("a", "b"), List.of("b", "c", "b"))),
            "ofPathSets: set 2 lists b twice",
            "every member once"),
        illegal(
            "cuts",
            () -> Structure.ofCutSets(List.of(List.of("a", "a"), List.of("b"))),
            "ofCutSets: set 1 lists a twice",
            "every member once"),
        illegal(
            "ofRule",
            () -> Structure.ofRule(List.of("a", "a"), Set::isEmpty),
            "ofRule",
            "\"a\" is listed twice",
            "once"),
        illegal(
            "order",
            () -> AB.compile(List.of("a", "b", "a"), Budget.ofHeap()),
            "the order of components",
            "\"a\" twice",
            "once"),
        illegal(
            "connecting",
            () -> line().connecting("x", "z", "x"),
            "connecting",
            "\"x\" is listed twice",
            "once"));
  }

  @ParameterizedTest
  @MethodSource
  void repeatedNames(BadCall bad) {
    bad.check();
  }

  static Stream<BadCall> missingNames() {
    String[] names = new String[30];
    Arrays.setAll(names, i -> "unit" + i);
    String[] words = Arrays.stream(names).map(name -> "\"" + name + "\"").toArray(String[]::new);
    words[7] = "set each with Probabilities.with, or all at once with Probabilities.all";
    CoherentSystem system = Structure.series(names).compile();
    Probabilities p = Probabilities.working(Map.of("unit7", 0.5, "other", 0.5));
    return Stream.of(
        illegal("reliability", () -> system.reliability(p), words),
        illegal("evaluation", () -> system.evaluation(p), words),
        illegal("pivot", () -> system.pivot("unit3").reliability(p), words),
        illegal("equation", () -> system.pivot("unit3").equation(p), words),
        illegal("derivation", () -> Derivation.of(system.structure()).reliability(p), words),
        illegal("most probable", () -> system.minimalPathSets().mostProbable(1, p), words),
        illegal("set", () -> system.minimalCutSets().probability(Set.of(names), p), words),
        illegal("list", () -> p.forComponents(List.of(names)), words),
        illegal(
            "order",
            () -> AB.compile(List.of("b"), Budget.ofHeap()),
            "the order of components",
            "leaves out \"a\"",
            "every component once"));
  }

  @ParameterizedTest
  @MethodSource
  void missingNames(BadCall bad) {
    bad.check();
  }
}
