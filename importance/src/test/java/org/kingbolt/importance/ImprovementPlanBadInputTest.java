package org.kingbolt.importance;

import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;
import static org.kingbolt.core.Structure.component;
import static org.kingbolt.core.Structure.parallel;
import static org.kingbolt.core.Structure.series;
import static org.kingbolt.importance.ImprovementAllocation.allocation;
import static org.kingbolt.importance.ImprovementAllocation.sparesOf;
import static org.kingbolt.importance.ImprovementOption.option;

import java.util.Arrays;
import java.util.Collections;
import java.util.List;
import java.util.Map;
import java.util.stream.Stream;
import org.junit.jupiter.api.function.Executable;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.MethodSource;
import org.kingbolt.core.Budget;
import org.kingbolt.core.CoherentSystem;
import org.kingbolt.core.Probabilities;
import org.kingbolt.core.Probability;
import org.kingbolt.core.Structure;

/** What plans refuse, and that they say what is wrong and what to do. */
class ImprovementPlanBadInputTest {

  /** A call that must be refused, and what its message must say. */
  private record Bad(Class<? extends Exception> refusal, Executable call, List<String> words) {
    @Override
    public String toString() {
      return String.join(", ", words);
    }
  }

  private static final ImprovementPlan PLAN =
      ImprovementPlan.of(parallel("a", "b"))
          .given(Probabilities.all(0.9))
          .with(
              option("x").replacing("a", 0.99).costing(1),
              option("y").replacing("b", 0.99).costing(2));
  private static final ImprovementPlan TWO =
      PLAN.with(option("z").multiplyingFailing("a", 0.5).costing("days", 3));
  private static final Structure NO_STRUCTURE = null;
  private static final CoherentSystem NO_SYSTEM = null;
  private static final Probability NO_PROBABILITY = null;
  private static final ImprovementOption[] NO_OPTIONS = null;
  private static final ImprovementAllocation[] NO_ALLOCATIONS = null;

  private static Bad illegal(Executable call, String... words) {
    return new Bad(IllegalArgumentException.class, call, List.of(words));
  }

  private static Bad isNull(Executable call, String word) {
    return new Bad(NullPointerException.class, call, List.of(word, "null"));
  }

  private static ImprovementPlan with(ImprovementOption... options) {
    return ImprovementPlan.of(parallel("a", "b")).given(Probabilities.all(0.9)).with(options);
  }

  static Stream<Bad> options() {
    ImprovementOption o = option("o");
    Probabilities p = Probabilities.all(0.5);
    return Stream.of(
        illegal(() -> option(" "), "the option's name", "visible"),
        illegal(() -> o.replacing("a", 1.5), "option \"o\"", "\"a\"", "1.5", "from 0 to 1"),
        illegal(() -> o.replacing("", 0.5), "option \"o\"", "visible"),
        illegal(() -> o.sparing("a", "s", Double.NaN), "option \"o\"", "\"s\"", "NaN"),
        illegal(() -> o.sparing("a", "", 0.5), "the spare's name", "visible"),
        illegal(() -> o.multiplyingFailing("a", -1), "\"a\"", "-1.0", "from 0 to 1"),
        illegal(() -> o.costing(-2), "option \"o\"", "\"cost\"", "-2.0", "from 0 up"),
        illegal(() -> o.costing("days", Double.POSITIVE_INFINITY), "\"days\"", "Infinity"),
        illegal(() -> o.costing(" ", 1), "the resource's name", "visible"),
        illegal(
            () -> o.rebuilding("a", component("c").givenWorking("c"), p), "no components", "give"),
        illegal(() -> with(o.replacing("c", 0.5)).bestWithin(1), "\"o\"", "\"c\"", "\"a\", \"b\""),
        illegal(() -> with(o.sparing("a", "b", 0.5)).bestWithin(1), "\"b\"", "a name of its own"),
        illegal(
            () -> with(o.sparing("a", "s", 0.5).sparing("b", "s", 0.6)).bestWithin(1),
            "\"s\"",
            "one probability or two names"),
        illegal(
            () -> with(o.replacing("a", 0.95).replacing("a", 0.96)).bestWithin(1),
            "\"o\"",
            "two things",
            "two options"),
        illegal(
            () ->
                with(o.rebuilding("a", series("a", "n"), Probabilities.of(Map.of()))).bestWithin(1),
            "\"o\"",
            "no probability for \"n\""),
        isNull(() -> option(null), "the option's name"),
        isNull(() -> o.replacing("a", NO_PROBABILITY), "\"a\""),
        isNull(() -> o.sparing("a", "s", NO_PROBABILITY), "\"s\""),
        isNull(() -> o.rebuilding("a", null, p), "the structure"),
        isNull(() -> o.rebuilding("a", component("c"), null), "the probabilities"));
  }

  static Stream<Bad> allocations() {
    ImprovementAllocation a = allocation("a").unit("u", 0.5);
    return Stream.of(
        illegal(() -> allocation(""), "allocation", "visible"),
        illegal(() -> a.unit("u", 0.6), "\"a\"", "\"u\" is given twice"),
        illegal(() -> a.unit("v", 2), "\"a\"", "\"v\"", "2.0"),
        illegal(() -> a.costing(-1), "\"a\"", "-1.0", "from 0 up"),
        illegal(() -> a.between(0, 3), "\"a\"", "from 0 to 3", "1 or more"),
        illegal(() -> a.between(3, 2), "from 3 to 2"),
        illegal(() -> a.between(1, 1000), "1000", "100"),
        illegal(() -> a.needing(0), "0 units are needed", "1 or more"),
        illegal(() -> sparesOf("a").needing(2), "2 units are needed"),
        illegal(() -> PLAN.with(a, a), "\"a\"", "given twice"),
        illegal(() -> PLAN.with(a).bestWithin(1), "\"a\"", "an option changes this component"),
        illegal(
            () -> PLAN.with(allocation("c").unit("u", 0.5)).bestWithin(1), "\"c\"", "\"a\", \"b\""),
        illegal(
            () -> with().with(allocation("a")).bestWithin(1), "\"a\"", "no units", "add a type"),
        illegal(() -> with().with(a.costing("m", n -> -n)).bestWithin(Map.of()), "1 u", "-1.0"),
        illegal(() -> with().with(many()).bestWithin(1), "\"a\"", "more than 200000"),
        new Bad(
            IllegalStateException.class,
            () -> allocation("a").costing(1),
            List.of("before any unit")),
        isNull(() -> allocation(null), "name"),
        isNull(() -> a.unit("v", NO_PROBABILITY), "\"v\""),
        isNull(() -> a.costing("m", null), "\"m\""),
        isNull(() -> PLAN.with(NO_ALLOCATIONS), "the list of allocations"));
  }

  private static ImprovementAllocation many() {
    ImprovementAllocation a = allocation("a").between(1, 100);
    for (int i = 0; i < 6; i++) {
      a = a.unit("u" + i, 0.5).costing(i);
    }
    return a;
  }

  static Stream<Bad> questions() {
    ImprovementPlan tight = PLAN.exactlyOneOf("x").exactlyOneOf("y");
    return Stream.of(
        illegal(() -> PLAN.with(option("x")), "\"x\" is given twice"),
        illegal(() -> PLAN.atMostOneOf("x", "w"), "atMostOneOf", "\"w\"", "\"x\", \"y\""),
        illegal(() -> PLAN.atMostOneOf("x"), "atMostOneOf", "at least 2"),
        illegal(() -> PLAN.exactlyOneOf(), "exactlyOneOf", "at least 1"),
        illegal(() -> PLAN.requires("x", "x"), "requires", "all different"),
        illegal(() -> PLAN.limiting("cost", -1), "\"cost\"", "-1.0"),
        illegal(() -> PLAN.limiting("days", 1).bestWithin(1), "\"days\"", "\"cost\""),
        illegal(() -> PLAN.toWithin(-0.1), "-0.1", "from 0 to 1"),
        illegal(() -> PLAN.bestWithin(-1), "the budget", "-1.0"),
        illegal(() -> PLAN.bestWithin(Double.NaN), "the budget", "NaN"),
        illegal(() -> PLAN.bestWithin(Map.of("euro", 1.0)), "\"euro\"", "\"cost\""),
        illegal(() -> TWO.bestWithin(1), "bestWithin", "\"cost\", \"days\"", "name the one"),
        illegal(() -> TWO.cheapestReaching(0.5), "cheapestReaching", "several resources"),
        illegal(() -> TWO.frontier(), "frontier", "several resources"),
        illegal(() -> TWO.frontier("euro"), "\"euro\"", "name one of these"),
        illegal(() -> PLAN.cheapestReaching(1.1), "the target", "1.1"),
        illegal(() -> tight.bestWithin(2), "no choice of options keeps all limits"),
        illegal(() -> tight.limiting("cost", 2).frontier(), "no choice of options"),
        illegal(
            () -> ImprovementPlan.of(parallel("a", "b")).bestWithin(1),
            "no probability for \"a\", \"b\""),
        illegal(
            () -> ImprovementPlan.of(component("c").givenWorking("c")), "no components", "give"),
        illegal(() -> PLAN.bestWithin(1).cost("euro"), "\"euro\"", "\"cost\""),
        illegal(() -> PLAN.frontier().within(-1), "-1.0"),
        isNull(() -> ImprovementPlan.of(NO_STRUCTURE), "structure"),
        isNull(() -> ImprovementPlan.of(NO_SYSTEM), "system"),
        isNull(() -> PLAN.given(null), "probabilities"),
        isNull(() -> PLAN.with(NO_OPTIONS), "the list of options"),
        isNull(() -> PLAN.withOptions(Arrays.asList(option("w"), null)), "an option"),
        isNull(() -> PLAN.requires("x", null), "requires"),
        isNull(() -> PLAN.within((Budget) null), "budget"),
        isNull(() -> PLAN.bestWithin(null), "amounts"),
        isNull(() -> PLAN.bestWithin(Collections.singletonMap("cost", null)), "\"cost\""),
        isNull(() -> PLAN.cheapestReaching(NO_PROBABILITY), "the target"),
        isNull(() -> PLAN.frontier(null), "the resource"));
  }

  @ParameterizedTest
  @MethodSource({"options", "allocations", "questions"})
  void isRefused(Bad bad) {
    String message = assertThrows(bad.refusal, bad.call).getMessage();
    for (String word : bad.words) {
      assertTrue(message.contains(word), () -> "no " + word + " in: " + message);
    }
  }
}
