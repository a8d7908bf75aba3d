package org.kingbolt.core;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;
import static org.junit.jupiter.params.provider.Arguments.arguments;

import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.stream.Stream;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.Arguments;
import org.junit.jupiter.params.provider.MethodSource;
import org.junit.jupiter.params.provider.ValueSource;

/** Texts of structures, both ways. What cannot be read is in {@link StructureSyntaxTest}. */
class StructureTextTest {

  private static final Structure AB = Structure.series("a", "b");

  private static Structure named(String name) {
    return Structure.component(name);
  }

  private static Map<String, Long> capacities() {
    Map<String, Long> capacities = new LinkedHashMap<>();
    capacities.put("a", 50L);
    capacities.put("b", 0L);
    capacities.put("c", 9_000_000_000L);
    return capacities;
  }

  static Stream<Arguments> examples() {
    return Stream.of(
        arguments("a", named("a")),
        arguments("series(a)", Structure.series("a")),
        arguments("series(a, b)", AB),
        arguments("parallel(a, b, c)", Structure.parallel("a", "b", "c")),
        arguments("parallel(series(a, b), c)", Structure.parallel(AB, named("c"))),
        arguments("atLeast(2, a, b, c)", Structure.atLeast(2, "a", "b", "c")),
        arguments("atLeast(1, series(a, b), a)", Structure.atLeast(1, AB, named("a"))),
        arguments(
            "ofPathSets({a, b}, {c}, {b, d})",
            Structure.ofPathSets(List.of(List.of("a", "b"), List.of("c"), List.of("b", "d")))),
        arguments(
            "ofCutSets({a, b}, {b})",
            Structure.ofCutSets(List.of(List.of("a", "b"), List.of("b")))),
        arguments(
            "ofPathSets({series(a, b), d}, {c})",
            Structure.ofPathSets(List.of(List.of("x", "d"), List.of("c"))).replace("x", AB)),
        arguments(
            "capacityAtLeast(9000000000, a: 50, b: 0, c: 9000000000)",
            Structure.capacityAtLeast(9_000_000_000L, capacities())),
        arguments(
            "capacityAtLeast(51, series(x, y): 50, b: 0, c: 9000000000)",
            Structure.capacityAtLeast(51, capacities()).replace("a", Structure.series("x", "y"))),
        arguments("withoutFailureRun(2, a, b, c)", Structure.withoutFailureRun(2, "a", "b", "c")),
        arguments(
            "withoutFailureRun(2, a, parallel(b, d), c)",
            Structure.withoutFailureRun(2, "a", "x", "c")
                .replace("x", Structure.parallel("b", "d"))),
        arguments(
            "withoutFailureRunAround(3, a, b, c, d)",
            Structure.withoutFailureRunAround(3, "a", "b", "c", "d")),
        arguments(
            "dual(withoutFailureRun(2, a, b, c))",
            Structure.withoutFailureRun(2, "a", "b", "c").dual()),
        arguments(
            "dual(withoutFailureRunAround(2, a, parallel(d, e), c))",
            Structure.withoutFailureRunAround(2, "a", "b", "c")
                .dual()
                .replace("b", Structure.series("d", "e"))),
        arguments("always()", Structure.parallel("a", "b").givenWorking("a")),
        arguments("never()", AB.givenFailed("a")));
  }

  @ParameterizedTest
  @MethodSource("examples")
  void textOfStructure(String text, Structure structure) {
    assertEquals(text, structure.toString());
  }

  @ParameterizedTest
  @MethodSource({"examples", "networks"})
  void structureOfText(String text, Structure structure) {
    Structure parsed = Structure.parse(text);
    assertEquals(structure, parsed);
    assertEquals(structure.hashCode(), parsed.hashCode());
    assertEquals(structure.components(), parsed.components());
    assertEquals(text, parsed.toString());
  }

  private static NetworkBuilder yard() {
    return Structure.network()
        .link("L1", "s", "u")
        .arc("A1", "u", "t")
        .link(Structure.parallel("L2", "L3"), "s", "v")
        .perfectLink("v", "w")
        .perfectArc("w", "t")
        .arc(AB, "v", "u")
        .node("u", "bus")
        .node("v", Structure.series("feed", "a"));
  }

  static Stream<Arguments> networks() {
    String items =
        "network(link(L1, s, u), arc(A1, u, t), link(parallel(L2, L3), s, v), perfectLink(v, w),"
            + " perfectArc(w, t), arc(series(a, b), v, u), node(u, bus),"
            + " node(v, series(feed, a)), ";
    NetworkBuilder ring =
        Structure.network().link("1", "a", "b").link("2", "b", "c").link("3", "c", "a");
    String links = "network(link(1, a, b), link(2, b, c), link(3, c, a), ";
    return Stream.of(
        arguments(items + "connecting(s, t))", yard().connecting("s", "t")),
        arguments(items + "connecting(s, w, u))", yard().connecting("s", "w", "u")),
        arguments(items + "reachingAllFrom(s))", yard().reachingAllFrom("s")),
        arguments(links + "connecting(a, c))", ring.connecting("a", "c")),
        arguments(links + "connecting(c, b, a))", ring.connecting("c", "b", "a")),
        arguments(links + "connectingAll())", ring.connectingAll()),
        arguments(links + "reachingAllFrom(b))", ring.reachingAllFrom("b")),
        arguments("dual(" + links + "connectingAll()))", ring.connectingAll().dual()));
  }

  @ParameterizedTest
  @MethodSource("networks")
  void textOfNetwork(String text, Structure structure) {
    assertEquals(text, structure.toString());
  }

  /** Hebrew letters, a combining accent and a smiling face stand as escapes, so as to be seen. */
  static Stream<Arguments> names() {
    return Stream.of(
        arguments("a_b-c.1", "a_b-c.1"),
        arguments("-5", "-5"),
        arguments("...", "..."),
        arguments("series", "series"),
        arguments("network", "network"),
        arguments("Süd", "Süd"),
        arguments("\u05e9\u05dc\u05d5\u05dd", "\u05e9\u05dc\u05d5\u05dd"),
        arguments("\u6cf5\u7ad9", "\u6cf5\u7ad9"),
        arguments("\ud800\udf48", "\ud800\udf48"),
        arguments("pump A", "\"pump A\""),
        arguments(" a ", "\" a \""),
        arguments("a\u00a0b", "\"a\u00a0b\""),
        arguments("50 % (a, b): {c}", "\"50 % (a, b): {c}\""),
        arguments("the \"old\" one", "\"the \\\"old\\\" one\""),
        arguments("C:\\new\\table", "\"C:\\\\new\\\\table\""),
        arguments("\\", "\"\\\\\""),
        arguments("\"", "\"\\\"\""),
        arguments("two\nlines", "\"two\\nlines\""),
        arguments("tab\there", "\"tab\\there\""),
        arguments("nul\u0000 cr\r del\u007f", "\"nul\\u0000 cr\\u000d del\\u007f\""),
        arguments("\ud83d\ude00", "\"\ud83d\ude00\""),
        arguments("e\u0301", "\"e\u0301\""),
        arguments("\u05d0\u200f1", "\"\u05d0\u200f1\""),
        arguments("half \ud83d", "\"half \\ud83d\""),
        arguments("halves \ud83d\ud83d\ud83d", "\"halves \\ud83d\\ud83d\\ud83d\""),
        arguments("half \ud83d\ud83d\ude00\ude00", "\"half \\ud83d\ud83d\ude00\\ude00\""),
        arguments("\ude00 half", "\"\\ude00 half\""));
  }

  @ParameterizedTest
  @MethodSource
  void names(String name, String text) {
    assertEquals(text, named(name).toString());
    assertEquals(named(name), Structure.parse(text));
    assertEquals(List.of(name), Structure.parse(text).components());
    assertEquals(named(name), Structure.parse("component(" + text + ")"));
  }

  @ParameterizedTest
  @MethodSource("names")
  void namesInEveryPlace(String name, String text) {
    Structure everywhere =
        Structure.series(
            Structure.atLeast(2, name, "x", "y"),
            Structure.ofPathSets(List.of(List.of(name, "x"), List.of("y"))),
            Structure.ofCutSets(List.of(List.of("x", name))),
            Structure.capacityAtLeast(1, Map.of(name, 2L)),
            Structure.withoutFailureRun(2, "x", "y", name),
            Structure.withoutFailureRunAround(2, name, "x", "y"),
            Structure.network().link(name, "from", name).connecting(name, "from"),
            Structure.network().arc("x", "from", name).node(name, name).reachingAllFrom("from"));
    String pattern =
        "series(atLeast(2, #, x, y), ofPathSets({#, x}, {y}), ofCutSets({x, #}),"
            + " capacityAtLeast(1, #: 2), withoutFailureRun(2, x, y, #),"
            + " withoutFailureRunAround(2, #, x, y), network(link(#, from, #), connecting(#, from)),"
            + " network(arc(x, from, #), node(#, #), reachingAllFrom(from)))";
    assertEquals(pattern.replace("#", text), everywhere.toString());
    assertEquals(everywhere, Structure.parse(everywhere.toString()));
  }

  /** Sixty characters of a part are quoted; a smiling face takes two. */
  @ParameterizedTest
  @ValueSource(ints = {57, 58, 59, 60, 61})
  void shortenedText_keepsPairsWhole(int before) {
    String name = "a".repeat(before) + "\ud83d\ude00".repeat(9);
    String message =
        assertThrows(IllegalArgumentException.class, () -> Structure.series(name, name))
            .getMessage();
    assertTrue(message.contains("repeats part 1, \"" + "a".repeat(57)), message);
    assertTrue(message.contains("..."), message);
    assertEquals(
        List.of(),
        message
            .codePoints()
            .filter(c -> Character.getType(c) == Character.SURROGATE)
            .boxed()
            .toList(),
        message);
  }

  @Test
  void escapesThatTheTextNeverHas() {
    assertEquals(named("A \u00e9\n"), Structure.parse("\"\\u0041 \\u00e9\\u000A\""));
    assertEquals(named("plain"), Structure.parse("\"plain\""));
  }

  @ParameterizedTest
  @ValueSource(
      strings = {
        "parallel(series(a,b),\"c d\")",
        "  parallel  (  series  (  a  ,  b  )  ,  \"c d\"  )  ",
        "parallel(\n  series(a, b),\n  \"c d\"\n)\n",
        "parallel(\r\n\tseries(a,\r\n\tb), \"c d\")\r\n",
        "\ufeffparallel(series(a, b), \"c d\")",
        "parallel(\u00a0series(a,\u2003b),\u2028\u3000\"c d\")",
        "parallel(series(component(a), component(\"b\")), component(\"c d\"))"
      })
  void blankSpaceBetweenWords(String text) {
    assertEquals(Structure.parallel(AB, named("c d")), Structure.parse(text));
  }

  @Test
  void blankSpaceInNetworksAndSets() {
    assertEquals(
        Structure.network().link("L", "x", "y").node("x", "b").connecting("x", "y"),
        Structure.parse("network ( link ( L , x , y )\n,\nnode ( x , b ) , connecting(x , y) ) "));
    assertEquals(
        Structure.ofPathSets(List.of(List.of("a", "b"), List.of("c"))),
        Structure.parse("ofPathSets ( { a , b } ,\n { c } )"));
    assertEquals(
        Structure.capacityAtLeast(1, Map.of("a", 2L)),
        Structure.parse("capacityAtLeast ( 1 , a : 2 ) "));
  }

  @Test
  void rules_becomePathSets() {
    Structure twoOfThree = Structure.ofRule(List.of("a", "b", "c"), working -> working.size() >= 2);
    assertEquals("ofPathSets({a, b}, {a, c}, {b, c})", twoOfThree.toString());
    assertEquals(twoOfThree, Structure.parse(twoOfThree.toString()));
  }

  @Test
  void orderAndOperatorsMatterForEquality() {
    assertEquals(
        7,
        Stream.of(
                "series(a, b)",
                "series(b, a)",
                "atLeast(2, a, b)",
                "ofPathSets({a, b})",
                "ofCutSets({a}, {b})",
                "capacityAtLeast(2, a: 1, b: 1)",
                "withoutFailureRun(1, a, b)")
            .map(Structure::parse)
            .distinct()
            .count());
  }
}
