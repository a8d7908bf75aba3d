package org.kingbolt.core;

import static org.kingbolt.core.BadCall.illegal;
import static org.kingbolt.core.BadCall.incoherent;
import static org.kingbolt.core.BadCall.isNull;

import java.util.List;
import java.util.stream.Stream;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.MethodSource;

/** Networks that cannot be, and questions that have no answer. */
class BadNetworkTest {

  private static final Structure ALWAYS = Structure.parallel("a", "b").givenWorking("a");
  private static final Structure NEVER = Structure.series("a", "b").givenFailed("a");

  private static NetworkBuilder line() {
    return Structure.network().link("L1", "x", "y").link("L2", "y", "z");
  }

  private static NetworkBuilder apart() {
    return line().link("L3", "p", "q");
  }

  static Stream<BadCall> loops() {
    String mend = "leave it out";
    String link = "link from \"x\" to itself";
    String arc = "arc from \"x\" to itself";
    return Stream.of(
        illegal("link", () -> line().link("L", "x", "x"), link, mend),
        illegal("arc", () -> line().arc("L", "x", "x"), arc, mend),
        illegal("perfect link", () -> line().perfectLink("x", "x"), link, mend),
        illegal("perfect arc", () -> line().perfectArc("x", "x"), arc, mend));
  }

  @ParameterizedTest
  @MethodSource
  void loops(BadCall bad) {
    bad.check();
  }

  @Test
  void nodeDescribedTwice() {
    new BadCall(
            "node",
            IllegalStateException.class,
            () -> line().node("x", "bus").node("x", "board"),
            List.of("node \"x\"", "already depends on bus", "Structure.series of the two"))
        .check();
  }

  static Stream<BadCall> names() {
    String link = "link from \"x\" to \"z\": the component's name is ";
    String arc = "arc from \"x\" to \"z\": the component's name is ";
    String end = ": a network node's name is ";
    return Stream.of(
        isNull("link", () -> line().link((String) null, "x", "z"), link + "null"),
        illegal("link", () -> line().link(" ", "x", "z"), link + "\" \""),
        isNull("arc", () -> line().arc((String) null, "x", "z"), arc + "null"),
        illegal("arc", () -> line().arc(" ", "x", "z"), arc + "\" \""),
        isNull(
            "node",
            () -> line().node("x", (String) null),
            "node \"x\": the component's name is null"),
        illegal("node", () -> line().node("x", " "), "node \"x\": the component's name is \" \""),
        isNull("from", () -> line().link("L", null, "z"), "link from null to \"z\"" + end + "null"),
        illegal("to", () -> line().arc("L", "x", ""), "arc from \"x\" to \"\"" + end + "\"\""),
        isNull(
            "perfect link",
            () -> line().perfectLink("x", null),
            "link from \"x\" to null" + end + "null"),
        illegal(
            "perfect arc",
            () -> line().perfectArc("", "z"),
            "arc from \"\" to \"z\"" + end + "\"\""));
  }

  @ParameterizedTest
  @MethodSource
  void names(BadCall bad) {
    bad.check();
  }

  static Stream<BadCall> partsWithoutComponents() {
    String mend = "it has no components, so leave it out";
    return Stream.of(
        incoherent(
            "link",
            () -> line().link(ALWAYS, "x", "z"),
            "link from \"x\" to \"z\" always works",
            mend),
        incoherent(
            "arc", () -> line().arc(NEVER, "x", "z"), "arc from \"x\" to \"z\" never works", mend),
        incoherent("node", () -> line().node("x", NEVER), "node \"x\" never works", mend));
  }

  @ParameterizedTest
  @MethodSource
  void partsWithoutComponents(BadCall bad) {
    bad.check();
  }

  static Stream<BadCall> tooFewNodes() {
    return Stream.of(
        illegal("none", () -> line().connecting(), "connecting: 0 nodes", "[]", "at least 2"),
        illegal("one", () -> line().connecting("x"), "connecting: 1 nodes", "[x]", "at least 2"),
        illegal(
            "empty network",
            () -> Structure.network().connecting("x", "y"),
            "connecting: \"x\" is not a node",
            "the nodes are none"),
        illegal(
            "all of none",
            () -> Structure.network().connectingAll(),
            "connectingAll: the network has 0 nodes",
            "at least two"),
        illegal(
            "all of one",
            () -> Structure.network().node("x", "bus").connectingAll(),
            "connectingAll: the network has 1 nodes",
            "at least two"),
        illegal(
            "reaching none",
            () -> Structure.network().node("x", "bus").reachingAllFrom("x"),
            "reachingAllFrom: the network has no node besides \"x\"",
            "add a link or an arc"));
  }

  @ParameterizedTest
  @MethodSource
  void tooFewNodes(BadCall bad) {
    bad.check();
  }

  static Stream<BadCall> arcsWithoutSource() {
    String[] words = {"connectingAll: the network has arcs", "reachingAllFrom(source)"};
    return Stream.of(
        illegal("arc", () -> line().arc("A", "z", "x").connectingAll(), words),
        illegal("perfect arc", () -> line().perfectArc("z", "x").connectingAll(), words));
  }

  @ParameterizedTest
  @MethodSource
  void arcsWithoutSource(BadCall bad) {
    bad.check();
  }

  static Stream<BadCall> unconnected() {
    String toP = "no route from \"x\" to \"p\"";
    String mend = "even when everything works; add the missing link";
    return Stream.of(
        incoherent("two", () -> apart().connecting("x", "p"), toP, mend),
        incoherent("three", () -> apart().connecting("x", "y", "p"), toP, mend),
        incoherent("all", () -> apart().connectingAll(), toP, mend),
        incoherent("reaching", () -> apart().reachingAllFrom("x"), toP, mend),
        incoherent(
            "against the arc",
            () -> Structure.network().arc("A", "y", "x").connecting("x", "y"),
            "no route from \"x\" to \"y\"",
            mend),
        incoherent(
            "source behind an arc",
            () -> line().arc("A", "w", "x").reachingAllFrom("y"),
            "no route from \"y\" to \"w\"",
            mend),
        incoherent(
            "lone failing node",
            () -> line().node("island", "bus").connectingAll(),
            "no route from \"x\" to \"island\"",
            mend),
        illegal(
            "misspelt failing node",
            () -> line().node("X", "bus").connecting("x", "z"),
            "node \"X\"",
            "no link touches it",
            "the linked nodes are \"x\""));
  }

  @ParameterizedTest
  @MethodSource
  void unconnected(BadCall bad) {
    bad.check();
  }

  static Stream<BadCall> neverFailing() {
    String mend = "let some of them depend on a component";
    return Stream.of(
        incoherent(
            "two",
            () -> line().perfectLink("x", "z").connecting("x", "z"),
            "\"x\", \"z\" are connected by links that cannot fail",
            "always works",
            mend),
        incoherent(
            "all",
            () -> line().perfectLink("x", "z").perfectLink("z", "y").connectingAll(),
            "\"x\", \"y\", \"z\" are connected",
            mend),
        incoherent(
            "reaching",
            () -> line().perfectArc("y", "x").perfectArc("y", "z").reachingAllFrom("y"),
            "\"y\", \"x\", \"z\" are connected",
            mend));
  }

  @ParameterizedTest
  @MethodSource
  void neverFailing(BadCall bad) {
    bad.check();
  }
}
