package org.kingbolt.core;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;
import static org.kingbolt.core.Structure.atLeast;
import static org.kingbolt.core.Structure.parallel;
import static org.kingbolt.core.Structure.series;
import static org.kingbolt.core.published.Digits.assertExact;

import java.math.BigDecimal;
import java.math.BigInteger;
import java.math.MathContext;
import java.util.List;
import java.util.Random;
import java.util.function.BiPredicate;
import java.util.stream.IntStream;
import net.jqwik.api.Arbitrary;
import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.Provide;
import org.apache.commons.math3.fraction.BigFraction;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.function.Executable;
import org.kingbolt.core.SignatureComparison.Outcome;
import org.kingbolt.core.testing.CountedGates;
import org.kingbolt.core.testing.RandomStructures;
import org.kingbolt.core.testing.RandomStructures.Sample;

/** Signatures: tails, mean lives, mixtures, and the orders between systems. */
class SignatureTest {

  @Provide
  Arbitrary<Sample> structures() {
    return RandomStructures.any();
  }

  private static String[] names(String prefix, int count) {
    return IntStream.range(0, count).mapToObj(i -> prefix + i).toArray(String[]::new);
  }

  private static BigFraction sum(List<BigFraction> fractions) {
    return fractions.stream().reduce(BigFraction.ZERO, BigFraction::add);
  }

  private static BigFraction harmonic(int n) {
    return sum(IntStream.rangeClosed(1, n).mapToObj(i -> new BigFraction(1, i)).toList());
  }

  @Property(tries = 300)
  void tail_isTheSumOfTheFractionsThatFollow(@ForAll("structures") Sample sample) {
    Signature signature = sample.structure().compile().signature();
    List<BigFraction> fractions = signature.fractions();
    int n = signature.order();
    assertEquals(n + 1, signature.tail().size());
    BigFraction mean = BigFraction.ZERO;
    for (int i = 0; i <= n; i++) {
      assertEquals(sum(fractions.subList(i, n)), signature.tail().get(i));
      assertEquals(signature.tail().get(i).doubleValue(), signature.tailToArray()[i], 1e-16);
      mean = i == 0 ? mean : mean.add(fractions.get(i - 1).multiply(i));
    }
    assertEquals(mean, signature.meanFailures());
  }

  /** Both mixtures give the reliability back, and the mean life in two further ways. */
  @Property(tries = 300)
  void minimalAndMaximalSignature_areTheMixturesOfTheSystem(@ForAll("structures") Sample sample) {
    CoherentSystem system = sample.structure().compile();
    Signature signature = system.signature();
    List<BigInteger> inSeries = signature.minimalSignature();
    List<BigInteger> inParallel = signature.maximalSignature();
    BigFraction p = new BigFraction(3, 7);
    BigFraction bySeries = BigFraction.ZERO;
    BigFraction byParallel = BigFraction.ZERO;
    BigFraction lifeBySeries = BigFraction.ZERO;
    BigFraction lifeByParallel = BigFraction.ZERO;
    for (int i = 1; i <= signature.order(); i++) {
      BigInteger a = inSeries.get(i - 1);
      BigInteger b = inParallel.get(i - 1);
      bySeries = bySeries.add(p.pow(i).multiply(a));
      BigFraction works = BigFraction.ONE.subtract(BigFraction.ONE.subtract(p).pow(i));
      byParallel = byParallel.add(works.multiply(b));
      lifeBySeries = lifeBySeries.add(new BigFraction(a, BigInteger.valueOf(i)));
      lifeByParallel = lifeByParallel.add(harmonic(i).multiply(b));
    }
    assertEquals(signature.order(), inSeries.size());
    assertEquals(signature.order(), inParallel.size());
    assertEquals(BigInteger.ONE, StateTotals.sum(inSeries));
    assertEquals(BigInteger.ONE, StateTotals.sum(inParallel));
    assertEquals(system.polynomial().at(p), bySeries);
    assertEquals(bySeries, byParallel);
    assertEquals(lifeBySeries, signature.meanLifetime());
    assertEquals(lifeByParallel, signature.meanLifetime());
  }

  /** Exponential lives, and lives that are uniform from 0 to 1: the i-th of n at i/(n+1). */
  @Property(tries = 300)
  void meanLifetime_isTheMeanOfTheFailureTimes(@ForAll("structures") Sample sample) {
    Signature signature = sample.structure().compile().signature();
    int n = signature.order();
    double[] exponential = new double[n];
    double[] uniform = new double[n];
    for (int i = 0; i < n; i++) {
      exponential[i] = harmonic(n).subtract(harmonic(n - i - 1)).doubleValue();
      uniform[i] = (i + 1.0) / (n + 1);
    }
    assertEquals(
        signature.meanLifetime().doubleValue(), signature.meanLifetime(exponential), 1e-14 * n);
    double mean = signature.meanFailures().doubleValue() / (n + 1);
    assertEquals(mean, signature.meanLifetime(uniform), 1e-15 * n);
  }

  @Test
  void largeSystems_haveTheMeanLifeOfTheFormula() {
    // k-out-of-n: 1/k + ... + 1/n
    Signature signature = atLeast(100, names("c", 300)).compile().signature();
    assertEquals(harmonic(300).subtract(harmonic(99)), signature.meanLifetime());
    assertEquals(new BigFraction(201), signature.meanFailures());
    assertEquals(1.0, signature.toArray()[200]);
    assertEquals(harmonic(2000), parallel(names("c", 2000)).compile().signature().meanLifetime());
  }

  /** Numerators and denominators far outside the range of a double. */
  @Test
  void smallFractions_keepTheirDigits() {
    Signature signature =
        parallel(series(names("a", 540)), series(names("b", 540))).compile().signature();
    double[] rounded = signature.toArray();
    double[] tail = signature.tailToArray();
    MathContext digits = new MathContext(40);
    int compared = 0;
    for (int i = 0; i < rounded.length; i++) {
      BigFraction exact = signature.fractions().get(i);
      BigFraction rest = signature.tail().get(i);
      if (rest.compareTo(new BigFraction(BigInteger.ONE, BigInteger.TWO.pow(1000))) > 0) {
        assertExact(exact.bigDecimalValue(400, 4).round(digits), rounded[i]);
        assertExact(rest.bigDecimalValue(400, 4).round(digits), tail[i]);
        compared++;
      }
    }
    assertTrue(compared > 500, "compared " + compared);
    assertTrue(tail[500] > 0 && tail[500] < 1e-200, "far below what a plain quotient keeps");
  }

  @Property(tries = 300)
  void longerSignature_isThatOfTheSystemWithAnIdleComponent(@ForAll("structures") Sample sample) {
    Structure structure = sample.structure();
    Structure idle = parallel(structure, series(structure, Structure.component("idle")));
    Signature signature = structure.compile().signature();
    Signature longer = signature.ofOrder(signature.order() + 1);
    assertEquals(idle.compile().signature(), longer);
    assertEquals(signature.meanLifetime(), longer.meanLifetime(), "the same life");
    assertEquals(signature, signature.ofOrder(signature.order()));
    assertEquals(longer.ofOrder(11), signature.ofOrder(11));
    assertEquals(Outcome.EQUAL, signature.compare(longer).likelihoodRatio());
  }

  /** By the definitions of the orders, over all pairs of places and in fractions. */
  @Property(tries = 1000)
  void comparison_isThatOfTheDefinitions(
      @ForAll("structures") Sample one, @ForAll("structures") Sample two) {
    Signature first = one.structure().compile().signature();
    Signature second = two.structure().compile().signature();
    SignatureComparison comparison = first.compare(second);
    int order = Math.max(first.order(), second.order());
    Signature a = first.ofOrder(order);
    Signature b = second.ofOrder(order);
    assertEquals(outcome(a, b, SignatureTest::tailAtMost), comparison.stochastic());
    assertEquals(outcome(a, b, (x, y) -> ratioRises(x.tail(), y.tail())), comparison.hazardRate());
    assertEquals(
        outcome(a, b, (x, y) -> ratioRises(x.fractions(), y.fractions())),
        comparison.likelihoodRatio());
    if (comparison.likelihoodRatio() != Outcome.INCOMPARABLE) {
      assertEquals(comparison.likelihoodRatio(), comparison.hazardRate());
    }
    if (comparison.hazardRate() != Outcome.INCOMPARABLE) {
      assertEquals(comparison.hazardRate(), comparison.stochastic());
    }
    if (comparison.stochastic() == Outcome.SHORTER) {
      assertShorterLives(one.structure(), two.structure());
    }
  }

  private static Outcome outcome(
      Signature a, Signature b, BiPredicate<Signature, Signature> atMost) {
    boolean shorter = atMost.test(a, b);
    boolean longer = atMost.test(b, a);
    return shorter && longer
        ? Outcome.EQUAL
        : shorter ? Outcome.SHORTER : longer ? Outcome.LONGER : Outcome.INCOMPARABLE;
  }

  private static boolean tailAtMost(Signature a, Signature b) {
    return IntStream.range(0, a.tail().size())
        .allMatch(i -> a.tail().get(i).compareTo(b.tail().get(i)) <= 0);
  }

  private static boolean ratioRises(List<BigFraction> a, List<BigFraction> b) {
    for (int x = 0; x < a.size(); x++) {
      for (int y = x + 1; y < a.size(); y++) {
        if (a.get(x).multiply(b.get(y)).compareTo(a.get(y).multiply(b.get(x))) < 0) {
          return false;
        }
      }
    }
    return true;
  }

  private static void assertShorterLives(Structure one, Structure two) {
    ReliabilityPolynomial a = one.compile().polynomial();
    ReliabilityPolynomial b = two.compile().polynomial();
    for (int i = 0; i <= 16; i++) {
      BigFraction p = new BigFraction(i, 16);
      assertTrue(a.at(p).compareTo(b.at(p)) <= 0, () -> "more reliable at " + p);
    }
  }

  /** With equal neighbours on both sides of places where both are zero. */
  @Test
  void gapsInBothSignatures_areBridged() {
    Structure wide = series(Structure.component("x"), parallel(names("c", 6)));
    Structure whole = series(names("c", 7));
    Structure spread = series(parallel("x", "y"), parallel(names("c", 5)));
    for (Structure other : List.of(whole, spread)) {
      Signature a = wide.compile().signature();
      Signature b = other.compile().signature();
      assertEquals(
          outcome(a, b, (x, y) -> ratioRises(x.fractions(), y.fractions())),
          a.compare(b).likelihoodRatio());
    }
  }

  @Test
  void outcomes_areNamedFromTheFirstSystem() {
    Signature two = parallel("a", "b").compile().signature();
    Signature three = parallel("a", "b", "c").compile().signature();
    SignatureComparison longer =
        new SignatureComparison(Outcome.LONGER, Outcome.LONGER, Outcome.LONGER);
    assertEquals(longer, three.compare(two));
    SignatureComparison shorter =
        new SignatureComparison(Outcome.SHORTER, Outcome.SHORTER, Outcome.SHORTER);
    assertEquals(shorter, two.compare(three));
    assertEquals(Outcome.EQUAL, two.compare(two).stochastic());
  }

  @Test
  void largeSystems_areCompared() {
    Signature gates = CountedGates.random(300, new Random(1)).structure().compile().signature();
    Signature line = series(names("c", 200)).compile().signature();
    assertEquals(Outcome.SHORTER, line.compare(gates).stochastic());
    assertEquals(Outcome.LONGER, gates.compare(line).hazardRate());
  }

  @Test
  void badArguments_areNamed() {
    Signature signature = atLeast(2, "a", "b", "c").compile().signature();
    BadCall.illegal("few", () -> signature.meanLifetime(1, 2), "2 mean", "3 components").check();
    BadCall.illegal("none", () -> signature.meanLifetime(new double[0]), "0 mean", "3 components")
        .check();
    BadCall.illegal("NaN", () -> signature.meanLifetime(1, Double.NaN, 2), "failure 2", "NaN")
        .check();
    BadCall.illegal("falls", () -> signature.meanLifetime(1, 2, 1.5), "failure 3", "1.5", "2.0")
        .check();
    BadCall.illegal("negative", () -> signature.meanLifetime(-1, 2, 3), "failure 1", "-1.0")
        .check();
    BadCall.illegal(
            "infinite", () -> signature.meanLifetime(1, 2, 1.0 / 0), "failure 3", "Infinity")
        .check();
    BadCall.illegal("order", () -> signature.ofOrder(2), "order 2", "3 components").check();
    BadCall.isNull("comparison", () -> signature.compare(null), "signature").check();
    BadCall.isNull("times", () -> signature.meanLifetime((double[]) null), "mean").check();
    assertThrows(
        BudgetExceededException.class, () -> signature.ofOrder(Integer.MAX_VALUE), "at once");
  }

  @Test
  void constants_haveEmptySignatures() {
    Signature none = Structure.component("a").compile().pivot("a").givenFailed().signature();
    assertEquals("()", none.toString());
    assertEquals(List.of(), none.minimalSignature());
    assertEquals(BigFraction.ZERO, none.meanLifetime());
    assertArrayEquals(new double[0], none.toArray());
    assertEquals(List.of(BigFraction.ZERO), none.tail());
    Signature always = Structure.component("a").compile().pivot("a").givenWorking().signature();
    assertEquals(List.of(BigFraction.ONE), always.tail());
    for (Executable mean :
        List.<Executable>of(always::meanLifetime, () -> always.meanLifetime(new double[0]))) {
      String message = assertThrows(IllegalStateException.class, mean).getMessage();
      assertTrue(message.contains("never fails"), message);
    }
  }

  @Test
  void quotients_areRoundedToTheNearestDouble() {
    Random random = new Random(5);
    for (int i = 0; i < 2000; i++) {
      BigInteger a = new BigInteger(1 + random.nextInt(300), random).add(BigInteger.ONE);
      BigInteger b = new BigInteger(1 + random.nextInt(300), random).add(BigInteger.ONE);
      a = random.nextBoolean() ? a : a.negate();
      double exact =
          new BigDecimal(a).divide(new BigDecimal(b), new MathContext(400)).doubleValue();
      assertEquals(exact, Ratios.toDouble(a, b));
    }
    assertEquals(0, Ratios.toDouble(BigInteger.ZERO, BigInteger.TEN));
  }
}
