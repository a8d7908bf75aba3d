package org.kingbolt.core;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import com.sun.management.ThreadMXBean;
import java.lang.management.ManagementFactory;
import java.math.BigDecimal;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.Collections;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import net.jqwik.api.Arbitrary;
import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.Provide;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.function.Executable;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.kingbolt.core.testing.Close;
import org.kingbolt.core.testing.Oracle;
import org.kingbolt.core.testing.RandomStructures;
import org.kingbolt.core.testing.RandomStructures.Sample;

/** An evaluator against all states, against the other ways to ask, and with bad input. */
class EvaluatorTest {

  private static final double ULP = Math.scalb(1.0, -53);

  private static final List<Probability> CHANGES =
      List.of(
          Probability.CERTAIN,
          Probability.IMPOSSIBLE,
          Probability.working(0.3),
          Probability.failing(1e-15),
          Probability.working(1e-12));

  @Provide
  Arbitrary<Sample> structures() {
    return RandomStructures.any();
  }

  @Provide
  Arbitrary<Sample> networks() {
    return RandomStructures.networks();
  }

  @Provide
  Arbitrary<Probabilities> probabilities() {
    return RandomStructures.probabilities();
  }

  @Property(tries = 1000)
  void bothSides_agreeWithAllStates(
      @ForAll("structures") Sample sample, @ForAll("probabilities") Probabilities p) {
    CoherentSystem system = sample.structure().compile();
    Evaluator evaluator = system.evaluator();
    evaluator.evaluate(working(system, p), failing(system, p));
    Close.assertReliability(sample.oracle(), p, current(evaluator), "arrays");
    assertEquals(system.reliability(p), current(evaluator), "same bits");
    evaluator.evaluate(new double[system.components().size()]);
    assertEquals(0, evaluator.working());
    evaluator.evaluate(p);
    assertEquals(system.reliability(p), current(evaluator), "same bits");
  }

  @Property(tries = 300)
  void workingSideAlone_meansTheRestFails(@ForAll("structures") Sample sample) {
    CoherentSystem system = sample.structure().compile();
    Probabilities p = Probabilities.all(0.5);
    for (String name : system.components()) {
      p = p.with(name, 1.0 / (2 + name.charAt(0)));
    }
    Evaluator evaluator = system.evaluator();
    evaluator.evaluate(working(system, p));
    assertEquals(system.reliability(p), current(evaluator), "same bits");
  }

  @Property(tries = 1000)
  void derivatives_areAsGoodAsPromised(
      @ForAll("structures") Sample sample, @ForAll("probabilities") Probabilities p) {
    CoherentSystem system = sample.structure().compile();
    Evaluator evaluator = system.evaluator();
    evaluator.evaluate(p);
    double[] derivatives = new double[system.components().size()];
    evaluator.derivatives(derivatives);
    double smallerSide = Math.min(evaluator.working(), evaluator.failing());
    for (int i = 0; i < derivatives.length; i++) {
      String name = system.components().get(i);
      BigDecimal exact = sample.oracle().decides(name, p);
      double off = exact.subtract(new BigDecimal(derivatives[i])).abs().doubleValue();
      double allowed = 8 * system.order().size() * ULP * (exact.doubleValue() + smallerSide);
      assertTrue(off <= allowed, () -> name + " at " + sample.oracle().shown(p));
      assertTrue(derivatives[i] >= 0 && derivatives[i] <= 1, name);
    }
    assertEquals(system.reliability(p), current(evaluator), "the evaluation stays");
  }

  @Property(tries = 500)
  void oneComponentChanged_agreesWithAllStates(
      @ForAll("structures") Sample sample, @ForAll("probabilities") Probabilities p) {
    assertChangesAgree(sample, p);
  }

  @Property(tries = 500)
  void oneComponentChangedInANetwork_agreesWithAllStates(
      @ForAll("networks") Sample sample, @ForAll("probabilities") Probabilities p) {
    assertChangesAgree(sample, p);
  }

  private static void assertChangesAgree(Sample sample, Probabilities p) {
    CoherentSystem system = sample.structure().compile();
    Oracle oracle = sample.oracle();
    Evaluator evaluator = system.evaluator();
    evaluator.evaluate(p);
    for (int i = 0; i < system.components().size(); i++) {
      String name = system.components().get(i);
      for (Probability change : CHANGES) {
        Probabilities changed = p.with(name, change);
        Close.assertReliability(oracle, changed, with(evaluator, i, change), name + " changed");
      }
    }
    assertEquals(system.reliability(p), current(evaluator), "the evaluation stays");
    for (String name : system.irrelevantComponents()) {
      int i = system.components().indexOf(name);
      assertEquals(current(evaluator), with(evaluator, i, Probability.IMPOSSIBLE), name);
    }
  }

  @Property(tries = 300)
  void oneComponentSure_agreesWithThePivot(
      @ForAll("structures") Sample sample, @ForAll("probabilities") Probabilities p) {
    CoherentSystem system = sample.structure().compile();
    Evaluator evaluator = system.evaluator();
    evaluator.evaluate(p);
    for (int i = 0; i < system.components().size(); i++) {
      Pivot pivot = system.pivot(system.components().get(i));
      assertSide(p, pivot.givenWorking(), with(evaluator, i, Probability.CERTAIN));
      assertSide(p, pivot.givenFailed(), with(evaluator, i, Probability.IMPOSSIBLE));
    }
  }

  /** A side may have lost components, or be constant. */
  private static void assertSide(Probabilities p, CoherentSystem side, Probability changed) {
    Evaluator evaluator = side.evaluator();
    evaluator.evaluate(p);
    assertEquals(evaluator.working(), changed.working(), 1e-13 * changed.working());
    assertEquals(evaluator.failing(), changed.failing(), 1e-13 * changed.failing());
    double[][] working = new double[9][];
    double[][] failing = new double[9][];
    Arrays.fill(working, working(side, p));
    Arrays.fill(failing, failing(side, p));
    GridEvaluatorTest.assertSameBits(evaluator, working, failing, 1);
  }

  @Property(tries = 100)
  void batch_givesTheBitsOfSingleCalls(
      @ForAll("structures") Sample sample, @ForAll("probabilities") Probabilities p) {
    CoherentSystem system = sample.structure().compile();
    Evaluator evaluator = system.evaluator();
    for (int vectors : new int[] {0, 1, 7, 8, 9, 67, 130}) {
      double[][] working = new double[vectors][];
      double[][] failing = new double[vectors][];
      for (int v = 0; v < vectors; v++) {
        String shifted = system.components().get(v % system.components().size());
        Probabilities q = p.with(shifted, v / 200.0);
        working[v] = working(system, q);
        failing[v] = failing(system, q);
      }
      GridEvaluatorTest.assertSameBits(evaluator, working, failing, 1, 2, 3);
    }
  }

  @ParameterizedTest
  @CsvSource(
      delimiter = '|',
      value = {
        "0.5|0.5|NaN|0.5|component \"b\": probability of working is NaN; it must be a number from",
        "0.5|0.5|0.5|NaN|component \"b\": probability of failing is NaN; it must be a number from",
        "-1e-300|1|0.5|0.5|component \"a\": probability of working is -1.0E-300; it must be",
        "0|1.5|0.5|0.5|component \"a\": probability of failing is 1.5; it must be a number from 0",
        "Infinity|0|0.5|0.5|component \"a\": probability of working is Infinity; it must be a",
        "0.5|0.5|0.9|0.2|component \"b\": working 0.9 and failing 0.2 add up to 1.1; they must add",
        "0.5|0.50000002|1|0|component \"a\": working 0.5 and failing 0.50000002 add up to 1.0000000"
      })
  void badNumbers_areRefused(double wa, double fa, double wb, double fb, String message) {
    Evaluator evaluator = Structure.parallel("a", "b").compile().evaluator();
    double[] working = {wa, wb};
    double[] failing = {fa, fb};
    evaluator.evaluate(new double[] {0.5, 0.5});
    assertRefused(message, () -> evaluator.evaluate(working, failing));
    double[][] workings = {{0.5, 0.5}, working};
    double[][] failings = {{0.5, 0.5}, failing};
    assertRefused("vector 1: " + message, () -> evaluator.evaluateBatch(workings, failings, 2));
    int bad = message.startsWith("component \"a\"") ? 0 : 1;
    assertRefused(message, () -> evaluator.workingWith(bad, working[bad], failing[bad]));
    assertRefused(message, () -> evaluator.failingWith(bad, working[bad], failing[bad]));
    if (message.contains("of working")) {
      assertRefused(message, () -> evaluator.evaluate(working));
    }
    assertEquals(0.75, evaluator.working(), "the earlier evaluation");
  }

  @Test
  void badShapes_areRefused() {
    Evaluator evaluator = Structure.parallel("a", "b").compile().evaluator();
    double[] one = {1};
    double[] two = {0.5, 0.5};
    String mend = "; give one value for each, in the order of system.components()";
    String length = " has length 1 and the system has 2 components" + mend;
    assertRefused("working" + length, () -> evaluator.evaluate(one, two));
    assertRefused("failing" + length, () -> evaluator.evaluate(two, one));
    assertRefused("working" + length, () -> evaluator.evaluate(one));
    double[][] good = {two, two};
    double[][] bad = {two, one};
    assertRefused("vector 1: failing" + length, () -> evaluator.evaluateBatch(good, bad, 1));
    assertRefused(
        "working has 2 vectors and failing has 1; give one of each kind",
        () -> evaluator.evaluateBatch(good, new double[][] {two}, 1));
    assertRefused("0 threads; at least 1", () -> evaluator.evaluateBatch(good, good, 0));
    evaluator.evaluate(two);
    assertRefused("out" + length, () -> evaluator.derivatives(one));
    assertThrows(IndexOutOfBoundsException.class, () -> evaluator.workingWith(2, 1, 0));
    assertThrows(IndexOutOfBoundsException.class, () -> evaluator.failingWith(-1, 1, 0));
  }

  private static void assertRefused(String message, Executable call) {
    String found = assertThrows(IllegalArgumentException.class, call).getMessage();
    assertTrue(found.startsWith(message), found);
  }

  @Test
  void nothingEvaluated_isAnError() {
    Evaluator evaluator = Structure.component("a").compile().evaluator();
    for (Executable call :
        List.<Executable>of(
            evaluator::working,
            evaluator::failing,
            () -> evaluator.derivatives(new double[1]),
            () -> evaluator.workingWith(0, 1, 0),
            () -> evaluator.failingWith(0, 1, 0))) {
      assertEquals(
          "nothing has been evaluated; call evaluate first",
          assertThrows(IllegalStateException.class, call).getMessage());
    }
  }

  @Test
  void negativeZero_countsAsZero() {
    CoherentSystem system = Structure.parallel("a", "b").compile();
    Evaluator evaluator = system.evaluator();
    double[] zero = {-0.0, -0.0};
    double[] one = {1, 1};
    evaluator.evaluate(zero, one);
    assertEquals(Probability.IMPOSSIBLE, current(evaluator));
    double[][] zeros = new double[8][];
    double[][] ones = new double[8][];
    Arrays.fill(zeros, zero);
    Arrays.fill(ones, one);
    assertEquals("0.0", "" + evaluator.evaluateBatch(zeros, ones, 1).working(0));
    assertEquals("0.0", "" + evaluator.evaluateBatch(ones, zeros, 1).failing(7));
  }

  @Test
  void calls_makeNoObjects() {

    Structure structure = Structure.parse("series(a, parallel(b, c), atLeast(2, d, e, f))");
    Evaluator evaluator = structure.compile().evaluator();
    double[] working = new double[6];
    double[] failing = new double[6];
    double[] out = new double[6];
    Runnable calls =
        () -> {
          for (int i = 0; i < 1000; i++) {
            Arrays.fill(working, i / 1000.0);
            Arrays.fill(failing, 1 - working[0]);
            evaluator.evaluate(working, failing);
            evaluator.derivatives(out);
            out[0] += evaluator.workingWith(1, 0.25, 0.75) + evaluator.failingWith(2, 1, 0);
            evaluator.evaluate(working);
            out[0] += evaluator.working() + evaluator.failing();
          }
        };
    for (int i = 0; i < 30; i++) {
      calls.run();
    }
    ThreadMXBean threads = (ThreadMXBean) ManagementFactory.getThreadMXBean();
    long before = threads.getCurrentThreadAllocatedBytes();
    calls.run();
    long made = threads.getCurrentThreadAllocatedBytes() - before;
    assertTrue(made < 1000, () -> made + " bytes in 1000 rounds");
  }

  @Test
  void registersInAnyOrder_giveTheSameBits() {
    CoherentSystem system = Structure.parse("series(a, b, parallel(c, d), e)").compile();
    Map<String, Probability> values = new LinkedHashMap<>();
    for (String name : system.components()) {
      values.put(name, Probability.working(1.0 / name.charAt(0)));
    }
    List<String> names = new ArrayList<>(values.keySet());
    names.add("spare");
    values.put("spare", Probability.CERTAIN);
    Probability expected = system.reliability(Probabilities.of(values));
    for (int turn = 0; turn < names.size(); turn++) {
      Collections.rotate(names, 1);
      Map<String, Probability> turned = new LinkedHashMap<>();
      names.forEach(name -> turned.put(name, values.getOrDefault(name, Probability.CERTAIN)));
      assertEquals(expected, system.reliability(Probabilities.of(turned)));
    }
    Probabilities partial = Probabilities.all(0.5).with("b", 0.25).with("a", 0.125);
    assertEquals(0.125 * 0.25 * 0.75 * 0.5, system.reliability(partial).working());
    Map<String, Double> few = Map.of("a", 0.5, "d", 0.5);
    assertRefused(
        "no probability for \"b\", \"c\", \"e\"; set each with Probabilities.with, or all at once",
        () -> system.evaluator().evaluate(Probabilities.working(few)));
  }

  static double[] working(CoherentSystem system, Probabilities p) {
    return system.components().stream().mapToDouble(name -> p.get(name).working()).toArray();
  }

  static double[] failing(CoherentSystem system, Probabilities p) {
    return system.components().stream().mapToDouble(name -> p.get(name).failing()).toArray();
  }

  static Probability current(Evaluator evaluator) {
    return Probability.of(evaluator.working(), evaluator.failing());
  }

  private static Probability with(Evaluator evaluator, int component, Probability p) {
    return Probability.of(
        evaluator.workingWith(component, p.working(), p.failing()),
        evaluator.failingWith(component, p.working(), p.failing()));
  }
}
