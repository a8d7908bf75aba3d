package org.kingbolt.core;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;
import static org.kingbolt.core.Structure.atLeast;
import static org.kingbolt.core.Structure.parallel;
import static org.kingbolt.core.Structure.series;

import java.util.Optional;
import java.util.Random;
import java.util.stream.IntStream;
import net.jqwik.api.Arbitrary;
import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.Provide;
import org.apache.commons.math3.fraction.BigFraction;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.ValueSource;
import org.kingbolt.core.testing.CountedGates;
import org.kingbolt.core.testing.RandomStructures;
import org.kingbolt.core.testing.RandomStructures.Sample;

/** Where the curve crosses the diagonal and where it is steepest. */
class CurveShapeTest {

  @Provide
  Arbitrary<Sample> structures() {
    return RandomStructures.any();
  }

  private static ReliabilityPolynomial polynomial(Structure structure) {
    return structure.compile().polynomial();
  }

  private static String[] names(int count) {
    return IntStream.range(0, count).mapToObj(i -> "c" + i).toArray(String[]::new);
  }

  @Property(tries = 500)
  void crossing_isWhereTheExactCurveMeetsTheDiagonal(@ForAll("structures") Sample sample) {
    CoherentSystem system = sample.structure().compile();
    boolean path = system.minimalPathSets().stream().anyMatch(set -> set.size() == 1);
    boolean cut = system.minimalCutSets().stream().anyMatch(set -> set.size() == 1);
    ReliabilityPolynomial polynomial = system.polynomial();
    assertEquals(!path && !cut, polynomial.crossing().isPresent());
    polynomial.crossing().ifPresent(p -> assertCrosses(polynomial, p));
    Optional<Probability> better = polynomial.betterThanComponentFrom();
    if (cut) {
      assertEquals(Optional.empty(), better);
    } else if (path) {
      assertEquals(Optional.of(Probability.IMPOSSIBLE), better);
    } else {
      assertEquals(polynomial.crossing(), better);
    }
    for (int i = 1; i < 64; i++) {
      BigFraction p = new BigFraction(i, 64);
      boolean isBetter = polynomial.at(p).compareTo(p) > 0;
      double from = better.map(Probability::working).orElse(1.0);
      assertEquals(isBetter, i / 64.0 > from, () -> "at " + p + ", better from " + from);
    }
  }

  /** Below the diagonal a little below, above it a little above, in exact arithmetic. */
  private static void assertCrosses(ReliabilityPolynomial polynomial, Probability p) {
    double little = 1e-13 * Math.min(p.working(), p.failing());
    BigFraction at =
        p.working() < p.failing()
            ? new BigFraction(p.working())
            : BigFraction.ONE.subtract(new BigFraction(p.failing()));
    BigFraction below = at.subtract(new BigFraction(little));
    BigFraction above = at.add(new BigFraction(little));
    assertTrue(polynomial.at(below).compareTo(below) < 0, () -> "below " + p);
    assertTrue(polynomial.at(above).compareTo(above) > 0, () -> "above " + p);
  }

  @ParameterizedTest
  @CsvSource({"2, 3", "2, 400", "399, 400", "150, 400", "2, 1000"})
  void kOutOfN_crossesExactly(int k, int n) {
    ReliabilityPolynomial polynomial = polynomial(atLeast(k, names(n)));
    assertCrosses(polynomial, polynomial.crossing().orElseThrow());
    assertEquals(
        polynomial.crossing().map(Probability::complement),
        polynomial(atLeast(n + 1 - k, names(n))).crossing());
  }

  @Test
  void linesAndParallels_doNotCross() {
    ReliabilityPolynomial single = polynomial(Structure.component("a"));
    ReliabilityPolynomial line = polynomial(series("a", "b", "c"));
    ReliabilityPolynomial parallel = polynomial(parallel("a", "b", "c"));
    ReliabilityPolynomial idle = polynomial(parallel(Structure.component("a"), series("a", "b")));
    for (ReliabilityPolynomial each :
        new ReliabilityPolynomial[] {single, line, parallel, idle, single.dual()}) {
      assertEquals(Optional.empty(), each.crossing());
    }
    assertEquals(Optional.empty(), single.betterThanComponentFrom());
    assertEquals(Optional.empty(), idle.betterThanComponentFrom());
    assertEquals(Optional.empty(), line.betterThanComponentFrom());
    assertEquals(Optional.of(Probability.IMPOSSIBLE), parallel.betterThanComponentFrom());
    assertEquals(Probability.CERTAIN, line.steepest());
    assertEquals(Probability.IMPOSSIBLE, parallel.steepest());
    assertEquals(Probability.IMPOSSIBLE, single.steepest());
    assertEquals(Probability.IMPOSSIBLE, idle.steepest());
  }

  @Test
  void constants_haveNoCrossing() {
    Pivot pivot = parallel("a", "b").compile().pivot("a");
    ReliabilityPolynomial always = pivot.givenWorking().polynomial();
    ReliabilityPolynomial never = series("a", "b").compile().pivot("a").givenFailed().polynomial();
    assertEquals(Optional.empty(), always.crossing());
    assertEquals(Optional.empty(), never.crossing());
    assertEquals(Optional.of(Probability.IMPOSSIBLE), always.betterThanComponentFrom());
    assertEquals(Optional.empty(), never.betterThanComponentFrom());
    assertEquals(Probability.IMPOSSIBLE, always.steepest());
    assertEquals(Probability.IMPOSSIBLE, never.steepest());
  }

  /**
   * David and Nagaraja, Order Statistics, ch. 2 (from memory): the density of the k-th smallest of
   * n uniform numbers, which is the slope, is largest at (k-1)/(n-1).
   */
  @ParameterizedTest
  @CsvSource({"2, 3", "2, 4", "3, 4", "2, 5", "30, 100", "99, 100", "2, 1000"})
  void kOutOfN_isSteepestAtTheModeOfItsBetaDensity(int k, int n) {
    Probability steepest = polynomial(atLeast(k, names(n))).steepest();
    assertEquals((k - 1.0) / (n - 1), steepest.working(), 1e-9 * (k - 1.0) / (n - 1));
    assertEquals((n - k + 0.0) / (n - 1), steepest.failing(), 1e-9 * (n - k) / (n - 1));
  }

  @Property(tries = 300)
  void steepest_isSteeperThanAllOthers(@ForAll("structures") Sample sample) {
    assertSteepest(sample.structure());
  }

  @ParameterizedTest
  @ValueSource(longs = {1, 2, 3, 4})
  void steepestOfLargeGates_isSteeperThanAllOthers(long seed) {
    assertSteepest(CountedGates.random(250, new Random(seed)).structure());
  }

  private static void assertSteepest(Structure structure) {
    ReliabilityPolynomial polynomial = polynomial(structure);
    Probability steepest = polynomial.steepest();
    double slope = polynomial.derivative(steepest) * (1 + 1e-12);
    for (int i = 0; i <= 500; i++) {
      double p = i / 500.0;
      assertTrue(
          polynomial.derivative(p) <= slope, () -> p + " is steeper than " + steepest.working());
    }
  }

  /** Two humps: first one gate of a pair comes in, then the other one. */
  @ParameterizedTest
  @CsvSource({"3, 60, 55", "10, 60, 51", "20, 60, 41", "2, 200, 190"})
  void curvesThatTurnSeveralTimes_areSteepestAtTheHighestHump(int low, int n, int high) {
    Structure early = atLeast(low, names(n));
    Structure late = atLeast(high, names(n));
    Structure both = parallel(series(Structure.component("key"), early), late);
    assertSteepest(both);
    assertSteepest(both.dual());
    assertTrue(humps(polynomial(both)) >= 2, "not an example of several humps");
  }

  private static int humps(ReliabilityPolynomial polynomial) {
    int humps = 0;
    boolean rising = true;
    for (int i = 1; i <= 500; i++) {
      boolean rises = polynomial.derivative(i / 500.0) > polynomial.derivative((i - 1) / 500.0);
      humps += rising && !rises ? 1 : 0;
      rising = rises;
    }
    return humps;
  }
}
