package org.kingbolt.core;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;
import static org.junit.jupiter.params.provider.Arguments.arguments;
import static org.kingbolt.core.BadCall.illegal;
import static org.kingbolt.core.BadCall.incoherent;

import java.util.List;
import java.util.Random;
import java.util.stream.Stream;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.Arguments;
import org.junit.jupiter.params.provider.MethodSource;
import org.junit.jupiter.params.provider.ValueSource;

/** Texts that cannot be read: where the fault is, and what was expected there. */
class StructureSyntaxTest {

  private static final String PART = "a component or a structure";
  private static final String MORE = "a comma or a closing parenthesis";
  private static final String KINDS = "one of series, parallel, atLeast, network,";
  private static final String ITEMS = "one of link, arc, perfectLink, perfectArc, node,";

  static Stream<Arguments> faults() {
    return Stream.of(
        arguments("", 1, 1, PART),
        arguments("   ", 1, 4, PART),
        arguments("\n\n ", 3, 2, PART),
        arguments(")", 1, 1, PART),
        arguments("series(a, b", 1, 12, MORE),
        arguments("series(a b)", 1, 10, MORE),
        arguments("series(a: b)", 1, 9, MORE),
        arguments("series(a,, b)", 1, 10, PART),
        arguments("series(a, b,)", 1, 13, PART),
        arguments("series(", 1, 8, PART),
        arguments("series a", 1, 8, "the end of the text"),
        arguments("series(a, b))", 1, 13, "the end of the text"),
        arguments("\"series\"(a)", 1, 9, "the end of the text"),
        arguments("series(a,\n  b;c)", 2, 4, "a name (in double quotes if"),
        arguments("series(\r\n a\r\n b)", 3, 2, MORE),
        arguments("sum(a, b)", 1, 1, KINDS),
        arguments("series(a,\n\t Series(b, c))", 2, 3, KINDS),
        arguments("atLeast(a, b)", 1, 9, "the number of parts that must work"),
        arguments("atLeast(2.5, a)", 1, 9, "the number of parts"),
        arguments("atLeast(\"2\", a)", 1, 9, "the number of parts"),
        arguments("atLeast(2)", 1, 10, "a comma"),
        arguments("atLeast(2147483648, a)", 1, 9, "below 2147483648"),
        arguments("atLeast(99999999999999999999, a)", 1, 9, "fits 64 bits"),
        arguments("withoutFailureRun(x, a)", 1, 19, "the length of the run"),
        arguments("withoutFailureRunAround(2, )", 1, 28, PART),
        arguments("capacityAtLeast(lots, a: 1)", 1, 17, "the demand"),
        arguments("capacityAtLeast(10, a, b: 5)", 1, 22, "a colon and the capacity"),
        arguments("capacityAtLeast(10, a: many)", 1, 24, "the capacity, a whole number"),
        arguments("ofPathSets(a, b)", 1, 12, "a set in braces"),
        arguments("ofPathSets({a, b)", 1, 17, "a comma or a closing brace"),
        arguments("ofCutSets({}, {a})", 1, 12, PART),
        arguments("ofCutSets({a}, b)", 1, 16, "a set in braces"),
        arguments("dual(a, b)", 1, 7, "a closing parenthesis"),
        arguments("component()", 1, 11, "the component's name"),
        arguments("always(a)", 1, 8, "a closing parenthesis"));
  }

  static Stream<Arguments> faultsInNames() {
    return Stream.of(
        arguments("\"  \"", 1, 1, "a name with at least one visible character"),
        arguments("series(a, \"\u200b\")", 1, 11, "a name with at least one visible character"),
        arguments("a\nb", 2, 1, "the end of the text"),
        arguments("\"open", 1, 6, "a closing double quote for the name that begins at line 1"),
        arguments("series(a,\n \"b\n\"", 3, 2, MORE),
        arguments("series(a,\n \"b\n", 3, 1, "begins at line 2, column 2"),
        arguments("\"a\\q\"", 1, 4, "one of \\\" \\\\ \\n \\t \\u"),
        arguments("\"a\\", 1, 4, "one of \\\" \\\\ \\n \\t \\u"),
        arguments("\"a\\u12\"", 1, 4, "four hexadecimal digits after \\u"),
        arguments("\"a\\u00g0\"", 1, 4, "four hexadecimal digits after \\u"),
        arguments("series(\ud83d\ude00, a)", 1, 8, "a name (in double quotes if"),
        arguments("series(\"\ud83d\ude00\ud83d\ude00\" a)", 1, 13, MORE),
        arguments("series(\u05d0 \u05d1)", 1, 10, MORE),
        arguments("series(e\u0301)", 1, 9, "a name (in double quotes if"));
  }

  static Stream<Arguments> faultsInNetworks() {
    return Stream.of(
        arguments("network()", 1, 9, ITEMS),
        arguments("network(a)", 1, 10, "an opening parenthesis"),
        arguments("network(rope(a, x, y))", 1, 9, ITEMS),
        arguments("network(link(a, x), connecting(x, y))", 1, 18, "a comma"),
        arguments("network(link(a, x, y))", 1, 22, "a comma and the next item"),
        arguments("network(link(a, x, y), )", 1, 24, ITEMS),
        arguments("network(arc(a, (, y))", 1, 16, "a node's name"),
        arguments("network(link((x), x, y))", 1, 14, PART),
        arguments("network(perfectLink(x y))", 1, 23, "a comma"),
        arguments("network(perfectArc(x, y, z))", 1, 24, "a closing parenthesis"),
        arguments("network(node(x), connectingAll())", 1, 15, "a comma"),
        arguments(
            "network(node(x, a),\n node(x, b), link(l, x, y), connecting(x, y))",
            2,
            7,
            "a node that is described once (this one already depends on a; a node that needs both"
                + " takes series of the two)"),
        arguments("network(link(a, x, y), connecting x)", 1, 35, "an opening parenthesis"),
        arguments("network(link(a, x, y), connecting())", 1, 35, "a node's name"),
        arguments("network(link(a, x, y), connecting(x y))", 1, 37, MORE),
        arguments("network(link(a, x, y), connecting(x, y)", 1, 40, "a closing parenthesis"),
        arguments("network(link(a, x, y), connectingAll(x))", 1, 38, "a closing parenthesis"),
        arguments("network(link(a, x, y), reachingAllFrom())", 1, 40, "a node's name"),
        arguments(
            "network(link(a, x, y), connecting(x, y), link(b, y, z))", 1, 40, "a closing paren"));
  }

  @ParameterizedTest
  @MethodSource({"faults", "faultsInNames", "faultsInNetworks"})
  void faultIsLocated(String text, int line, int column, String expected) {
    StructureSyntaxException fault =
        assertThrows(StructureSyntaxException.class, () -> Structure.parse(text));
    assertTrue(
        fault.expected().startsWith(expected) || fault.expected().endsWith(expected),
        fault::getMessage);
    assertEquals(List.of(line, column), List.of(fault.line(), fault.column()), fault::getMessage);
    String begin = "line " + line + ", column " + column + ": expected " + fault.expected();
    assertTrue(fault.getMessage().startsWith(begin + ", found "), fault::getMessage);
  }

  @Test
  void messageSaysWhatWasFound() {
    List<String> found =
        Stream.of(
                "series(a b)",
                "series(a",
                "series(a,)",
                "series(a; b)",
                "series(a \"b c\")",
                "\"\\\ud83d\ude00\"")
            .map(text -> assertThrows(IllegalArgumentException.class, () -> Structure.parse(text)))
            .map(fault -> fault.getMessage().replaceFirst(".*, found ", ""))
            .toList();
    assertEquals(
        List.of("\"b\"", "the end of the text", "')'", "';'", "\"b c\"", "'\\\ud83d\ude00'"),
        found);
  }

  static Stream<BadCall> refusedByTheMethodItNames() {
    return Stream.of(
        illegal("series", () -> Structure.parse("series()"), "series: there are no parts"),
        illegal("twice", () -> Structure.parse("series(a, a)"), "part 2 repeats part 1"),
        illegal("range", () -> Structure.parse("atLeast(3, a, b)"), "atLeast: k is 3"),
        illegal("minus", () -> Structure.parse("withoutFailureRun(-1, a)"), "the run is -1"),
        incoherent("demand", () -> Structure.parse("capacityAtLeast(9, a: 8)"), "demand of 9"),
        illegal("capacity", () -> Structure.parse("capacityAtLeast(1, a: -8)"), "is -8"),
        illegal("set", () -> Structure.parse("ofPathSets({a, b, a})"), "set 1 lists a twice"),
        incoherent("constant", () -> Structure.parse("series(a, always())"), "part 2 always"),
        illegal("loop", () -> Structure.parse("network(link(a, x, x), connectingAll())"), "\"x\""),
        illegal(
            "terminal",
            () -> Structure.parse("network(link(a, x, y), connecting(x, z))"),
            "\"z\" is not a node"),
        illegal("blank", () -> Structure.parse("component(\" \")"), "\" \"", "visible character"));
  }

  @ParameterizedTest
  @MethodSource
  void refusedByTheMethodItNames(BadCall bad) {
    bad.check();
  }

  /** All kinds of structure; the two failing nodes stay apart when one sign of a name changes. */
  private static final String EVERYTHING =
      """
      series(intake, "pump \\"A\\" \\u00e9", parallel(series(a, b), atLeast(2, c, d, e)),
        ofPathSets({p1, p2}, {p2, p3}), ofCutSets({q1}, {q2, q3}),
        capacityAtLeast(100, u1: 60, u2: 50, u3: 40),
        withoutFailureRun(2, r1, r2, r3), dual(withoutFailureRunAround(2, o1, o2, o3)),
        network(link(l1, s, m), arc(l2, m, t), perfectLink(s, v), perfectArc(v, w),
          link(series(l3, l4), w, t), node(m, busM), node(goal, "b\\\\us"),
          link(l5, t, goal), connecting(s, t, goal)),
        network(link(k1, x, y), link(k2, y, z), connectingAll()),
        network(arc(k3, x, y), arc(k4, y, z), reachingAllFrom(x)))
      """;

  private static boolean reads(String text) {
    Structure structure;
    try {
      structure = Structure.parse(text);
    } catch (IllegalArgumentException refused) {
      return false;
    }
    assertEquals(structure, Structure.parse(structure.toString()), text);
    return true;
  }

  @Test
  void everyPrefix_isRefused() {
    assertTrue(reads(EVERYTHING));
    // shorter ones are names of components
    for (int end = "series(".length(); end < EVERYTHING.stripTrailing().length(); end++) {
      String prefix = EVERYTHING.substring(0, end);
      StructureSyntaxException fault =
          assertThrows(StructureSyntaxException.class, () -> Structure.parse(prefix));
      assertTrue(fault.line() >= 1 && fault.column() >= 1, fault::getMessage);
    }
  }

  @Test
  void everySingleDeletion_isReadOrRefused() {
    int read = 0;
    for (int at = 0; at < EVERYTHING.length(); at++) {
      read += reads(EVERYTHING.substring(0, at) + EVERYTHING.substring(at + 1)) ? 1 : 0;
    }
    assertTrue(read > 100 && read < EVERYTHING.length() - 100, "read " + read);
  }

  @ParameterizedTest
  @ValueSource(longs = {1, 2, 3, 4, 5, 6, 7, 8})
  void randomReplacements_areReadOrRefused(long seed) {
    String signs = "(){},:\"\\ \n-_.09aelnostu;$\u0000\u0301\u05d0\u2028\ud83d\ude00";
    Random random = new Random(seed);
    int read = 0;
    for (int at = 0; at < EVERYTHING.length(); at++) {
      StringBuilder text = new StringBuilder(EVERYTHING);
      text.setCharAt(at, signs.charAt(random.nextInt(signs.length())));
      read += reads(text.toString()) ? 1 : 0;
    }
    assertTrue(read > 20 && read < EVERYTHING.length() - 20, "read " + read);
  }

  @ParameterizedTest
  @ValueSource(longs = {11, 12, 13, 14})
  void randomWordsInAnyOrder_areReadOrRefused(long seed) {
    String[] words = EVERYTHING.split("(?<=[(){},: ])|(?=[(){},:])", -1);
    Random random = new Random(seed);
    for (int round = 0; round < 2_000; round++) {
      StringBuilder text = new StringBuilder();
      for (int count = random.nextInt(20); count >= 0; count--) {
        text.append(words[random.nextInt(words.length)]).append(random.nextBoolean() ? " " : "");
      }
      reads(text.toString());
    }
  }
}
