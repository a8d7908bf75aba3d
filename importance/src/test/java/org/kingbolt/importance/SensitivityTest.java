package org.kingbolt.importance;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.Random;
import net.jqwik.api.Arbitrary;
import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.Provide;
import org.junit.jupiter.api.Test;
import org.kingbolt.core.Budget;
import org.kingbolt.core.BudgetExceededException;
import org.kingbolt.core.CoherentSystem;
import org.kingbolt.core.Probabilities;
import org.kingbolt.core.Probability;
import org.kingbolt.core.Structure;
import org.kingbolt.core.published.Families;
import org.kingbolt.core.testing.Close;
import org.kingbolt.core.testing.RandomStructures;
import org.kingbolt.core.testing.RandomStructures.Sample;

/** Curves, tornados and break-even points. */
class SensitivityTest {

  @Provide
  Arbitrary<Sample> structures() {
    return RandomStructures.any();
  }

  @Provide
  Arbitrary<Probabilities> probabilities() {
    return RandomStructures.probabilities();
  }

  @Property(tries = 500)
  void curve_isTheReliability(
      @ForAll("structures") Sample sample,
      @ForAll("probabilities") Probabilities p,
      @ForAll("probabilities") Probabilities moved,
      @ForAll Random random) {
    List<String> group = group(sample, random);
    ReliabilityCurve curve = Sensitivity.of(sample.structure()).given(p).along(group);
    assertEquals(group.size(), curve.degree());
    for (String name : RandomStructures.NAMES.subList(0, 4)) {
      Probability x = moved.get(name);
      Probabilities at = p;
      for (String member : group) {
        at = at.with(member, x);
      }
      Close.assertReliability(sample.oracle(), at, curve.at(x), "curve");
    }
  }

  /** By powers, at a point where they do not cancel much. */
  @Property(tries = 200)
  void coefficients_areThoseOfThePolynomial(
      @ForAll("structures") Sample sample,
      @ForAll("probabilities") Probabilities p,
      @ForAll Random random) {
    List<String> group = group(sample, random);
    ReliabilityCurve curve = Sensitivity.of(sample.structure()).given(p).along(group);
    double[] coefficients = curve.coefficients();
    for (double x : new double[] {0, 0.3, 0.8, 1}) {
      double sum = 0;
      for (int j = coefficients.length - 1; j >= 0; j--) {
        sum = sum * x + coefficients[j];
      }
      assertEquals(curve.at(x).working(), sum, 1e-12);
    }
    for (int k = 1; k <= curve.degree(); k++) {
      assertTrue(curve.givenWorking(k).working() >= curve.givenWorking(k - 1).working() - 1e-14);
    }
  }

  private static List<String> group(Sample sample, Random random) {
    List<String> group = new ArrayList<>();
    for (String name : sample.structure().components()) {
      if (group.isEmpty() || random.nextBoolean()) {
        group.add(name);
      }
    }
    return group;
  }

  /** All components together: the reliability polynomial. */
  @Test
  void wholeSystem_givesItsPolynomial() {
    CoherentSystem bridge = Families.corners(3).compile();
    ReliabilityCurve curve =
        Sensitivity.of(bridge).given(Probabilities.all(0.5)).along(bridge.components());
    double[] coefficients = curve.coefficients();
    for (int j = 0; j < bridge.polynomial().coefficients().size(); j++) {
      assertEquals(bridge.polynomial().coefficients().get(j).doubleValue(), coefficients[j], 1e-9);
    }
  }

  @Property(tries = 500)
  void breakEven_isTheLeastProbabilityThatMeetsTheTarget(
      @ForAll("structures") Sample sample,
      @ForAll("probabilities") Probabilities p,
      @ForAll Random random) {
    List<String> group = group(sample, random);
    ReliabilityCurve curve = Sensitivity.of(sample.structure()).given(p).along(group);
    Probability worst = curve.at(Probability.IMPOSSIBLE);
    Probability best = curve.at(Probability.CERTAIN);
    Probability target = curve.at(random.nextDouble());
    if (random.nextInt(4) == 0) {
      target = Probability.working(random.nextDouble());
    }
    BreakEven found = curve.breakEven(target);
    Optional<Probability> least = found.probability();
    assertEquals(best.compareTo(target) >= 0, found.isReachable());
    if (least.isEmpty()) {
      assertTrue(found.toString().startsWith("out of reach"), found::toString);
    } else if (worst.compareTo(target) >= 0) {
      assertEquals(Probability.IMPOSSIBLE, least.get());
    } else {
      Probability met = curve.at(least.get());
      double off = Math.min(met.working(), met.failing()) * 1e-12;
      assertEquals(target.working(), met.working(), Math.max(off, 1e-15), found::toString);
    }
  }

  /** A standby of two with 1e-6: the third needs 1e-3 for the whole to fail with 1e-15. */
  @Test
  void breakEven_keepsTheDigitsOfSmallTargets() {
    Structure three = Structure.parallel("a", "b", "c");
    Probabilities p = Probabilities.all(Probability.failing(1e-6));
    SensitivityAtProbabilities at = Sensitivity.of(three).given(p);
    BreakEven single = at.breakEven("c", Probability.failing(1e-15));
    assertEquals(1e-3, single.probability().orElseThrow().failing(), 1e-15);
    BreakEven pair = at.along(List.of("b", "c")).breakEven(Probability.failing(1e-18));
    assertEquals(1e-6, pair.probability().orElseThrow().failing(), 1e-18);
    assertEquals(
        "out of reach: with a certain to work the system has working 0.9, failing 0.1, which misses"
            + " the target of working 0.99, failing 0.01; improve others too",
        Sensitivity.of(Structure.series("a", "b"))
            .given(Probabilities.all(0.9))
            .breakEven("a", Probability.working(0.99))
            .toString());
  }

  @Property(tries = 300)
  void tornado_hasEachComponentsRange(
      @ForAll("structures") Sample sample,
      @ForAll("probabilities") Probabilities p,
      @ForAll("probabilities") Probabilities one,
      @ForAll("probabilities") Probabilities other) {
    Probabilities low = p;
    Probabilities high = p;
    for (String name : sample.structure().components()) {
      boolean inOrder = one.get(name).compareTo(other.get(name)) <= 0;
      low = low.with(name, inOrder ? one.get(name) : other.get(name));
      high = high.with(name, inOrder ? other.get(name) : one.get(name));
    }
    Tornado tornado = Sensitivity.of(sample.structure()).given(p).tornado(low, high);
    assertEquals(sample.structure().components().size(), tornado.bars().size());
    double before = 2;
    for (Tornado.Bar bar : tornado.bars()) {
      Probabilities atLow = p.with(bar.component(), low.get(bar.component()));
      Probabilities atHigh = p.with(bar.component(), high.get(bar.component()));
      Close.assertReliability(sample.oracle(), atLow, bar.systemAtLow(), "low");
      Close.assertReliability(sample.oracle(), atHigh, bar.systemAtHigh(), "high");
      double swing = bar.systemAtHigh().working() - bar.systemAtLow().working();
      assertEquals(swing, bar.swing(), 1e-14);
      assertTrue(bar.swing() <= before * (1 + 1e-11));
      before = bar.swing();
    }
  }

  @Test
  void tornado_printsAligned_andVariesOnlyThoseGiven() {
    Structure structure = Structure.parse("series(pump, parallel(a, b))");
    Probabilities low = Probabilities.working(Map.of("pump", 0.8, "a", 0.5));
    Probabilities high = Probabilities.working(Map.of("pump", 0.95, "a", 0.99));
    Tornado tornado = Sensitivity.of(structure).given(Probabilities.all(0.9)).tornado(low, high);
    List<String> lines = tornado.toString().lines().toList();
    assertEquals(3, lines.size());
    assertEquals(lines.get(1).length(), lines.get(2).length());
    assertEquals("pump", tornado.bars().get(0).component());
    assertEquals(1, tornado.bars().get(0).rank());
  }

  @Test
  void badInput_isNamed() {
    SensitivityAtProbabilities at =
        Sensitivity.of(Structure.parallel("a", "b")).given(Probabilities.all(0.9));
    Probabilities some = Probabilities.working(Map.of("a", 0.5));
    Probabilities none = Probabilities.of(Map.of());
    assertMessage(
        "component \"a\" has a low but no high value; give both or neither",
        () -> at.tornado(some, none));
    assertMessage(
        "no component has a low and a high value; give both for at least one of \"a\", \"b\"",
        () -> at.tornado(none, none));
    assertMessage(
        "component \"a\": its low value, working 0.5, failing 0.5, is more likely to work than its"
            + " high one, working 0.4, failing 0.6; swap them",
        () -> at.tornado(some, Probabilities.working(Map.of("a", 0.4))));
    assertMessage("the group is empty; name at least one component", () -> at.along(List.of()));
    BudgetExceededException stopped =
        assertThrows(
            BudgetExceededException.class, () -> at.along(List.of("a", "b"), Budget.ofNodes(1)));
    assertEquals(BudgetExceededException.Limit.NODES, stopped.limit());
  }

  private static void assertMessage(
      String message, org.junit.jupiter.api.function.Executable call) {
    assertEquals(message, assertThrows(IllegalArgumentException.class, call).getMessage());
  }
}
