package org.kingbolt.core;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTimeoutPreemptively;
import static org.junit.jupiter.api.Assertions.assertTrue;
import static org.kingbolt.core.published.Digits.assertExact;

import java.math.BigDecimal;
import java.math.BigInteger;
import java.math.MathContext;
import java.time.Duration;
import java.util.List;
import java.util.Random;
import java.util.stream.IntStream;
import net.jqwik.api.Arbitrary;
import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.Provide;
import org.apache.commons.math3.fraction.BigFraction;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.function.Executable;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;
import org.kingbolt.core.testing.CountedGates;
import org.kingbolt.core.testing.RandomStructures;
import org.kingbolt.core.testing.RandomStructures.Sample;

/** Polynomials: counts, powers, values and slopes, of small systems and of large ones. */
class ReliabilityPolynomialTest {

  private static final MathContext DIGITS = new MathContext(60);

  @Provide
  Arbitrary<Sample> structures() {
    return RandomStructures.any();
  }

  private static String[] names(int count) {
    return IntStream.range(0, count).mapToObj(i -> "c" + i).toArray(String[]::new);
  }

  private static BigDecimal decimal(BigFraction fraction) {
    return new BigDecimal(fraction.getNumerator())
        .divide(new BigDecimal(fraction.getDenominator()), DIGITS);
  }

  /** The derivative by powers, in exact arithmetic. */
  private static BigFraction slope(List<BigInteger> powers, BigFraction p) {
    BigFraction sum = BigFraction.ZERO;
    for (int j = powers.size() - 1; j >= 1; j--) {
      sum = sum.multiply(p).add(powers.get(j).multiply(BigInteger.valueOf(j)));
    }
    return sum;
  }

  @Property(tries = 500)
  void valuesAndSlopes_areThoseOfThePowers(@ForAll("structures") Sample sample) {
    ReliabilityPolynomial polynomial = sample.structure().compile().polynomial();
    List<BigInteger> powers = polynomial.coefficients();
    for (int i = 0; i <= 16; i++) {
      BigFraction p = new BigFraction(i, 16);
      BigFraction value = BigFraction.ZERO;
      for (int j = powers.size() - 1; j >= 0; j--) {
        value = value.multiply(p).add(powers.get(j));
      }
      assertEquals(value, polynomial.at(p));
      assertExact(decimal(value), polynomial.at(i / 16.0).working());
      assertExact(decimal(BigFraction.ONE.subtract(value)), polynomial.at(i / 16.0).failing());
      assertExact(decimal(slope(powers, p)), polynomial.derivative(i / 16.0));
    }
    assertEquals(BigFraction.ONE, polynomial.at(BigFraction.ONE));
    assertEquals(BigFraction.ZERO, polynomial.at(BigFraction.ZERO));
  }

  @Property(tries = 300)
  void criticalStates_areThoseInWhichOneDecides(@ForAll("structures") Sample sample) {
    int n = sample.oracle().names().size();
    long[] pairs = new long[n];
    for (int state = 0; state < 1 << n; state++) {
      for (int i = 0; i < n; i++) {
        boolean without = (state >>> i & 1) == 0;
        if (without
            && sample.oracle().table().works(state | 1 << i)
            && !sample.oracle().table().works(state)) {
          pairs[Integer.bitCount(state)]++;
        }
      }
    }
    assertEquals(
        IntStream.range(0, n).mapToObj(j -> BigInteger.valueOf(pairs[j])).toList(),
        sample.structure().compile().polynomial().criticalStates());
  }

  @Property(tries = 300)
  void dual_isThePolynomialOfTheDual(@ForAll("structures") Sample sample) {
    ReliabilityPolynomial polynomial = sample.structure().compile().polynomial();
    assertEquals(sample.structure().dual().compile().polynomial(), polynomial.dual());
    assertEquals(polynomial, polynomial.dual().dual());
  }

  @ParameterizedTest
  @ValueSource(ints = {63, 64, 65, 127, 128, 200, 400})
  void largeGates_areCountedLikeProductsOfPolynomials(int components) {
    Random random = new Random(components);
    for (int i = 0; i < 5; i++) {
      CountedGates gates = CountedGates.random(components, random);
      ReliabilityPolynomial polynomial = gates.structure().compile().polynomial();
      assertEquals(gates.working(), polynomial.workingStates());
      BigInteger states = gates.working().stream().reduce(BigInteger.ZERO, BigInteger::add);
      assertEquals(
          new BigFraction(states, BigInteger.TWO.pow(components)),
          polynomial.at(BigFraction.ONE_HALF));
      assertEquals(BigFraction.ONE, polynomial.at(BigFraction.ONE));
    }
  }

  @ParameterizedTest
  @ValueSource(ints = {150, 500, 1200})
  void largeSystems_keepTheDigitsOfBothTails(int components) {
    ReliabilityPolynomial polynomial =
        components > 1000
            ? Structure.withoutFailureRun(3, names(components)).compile().polynomial()
            : CountedGates.random(components, new Random(7)).structure().compile().polynomial();
    List<BigInteger> powers = polynomial.coefficients();
    ReliabilityPolynomial dual = polynomial.dual();
    for (int i = 1; i < 64; i += 6) {
      BigFraction p = new BigFraction(i, 64);
      assertBoth(polynomial.at(p), dual.at(BigFraction.ONE.subtract(p)), polynomial.at(i / 64.0));
      assertExactOrTiny(decimal(slope(powers, p)), polynomial.derivative(i / 64.0));
    }
    // exact fractions of many components at small p have a great many bits
    for (int exponent : components > 200 ? new int[] {10, 50} : new int[] {10, 60, 200}) {
      BigFraction tiny = new BigFraction(BigInteger.ONE, BigInteger.TWO.pow(exponent));
      BigFraction rest = BigFraction.ONE.subtract(tiny);
      double small = Math.scalb(1.0, -exponent);
      Probability good = polynomial.at(Probability.failing(small));
      assertBoth(polynomial.at(rest), dual.at(tiny), good);
      Probability bad = polynomial.at(Probability.working(small));
      assertBoth(polynomial.at(tiny), dual.at(rest), bad);
    }
  }

  private static void assertBoth(BigFraction works, BigFraction fails, Probability computed) {
    assertExactOrTiny(decimal(works), computed.working());
    assertExactOrTiny(decimal(fails), computed.failing());
  }

  /** To 13 digits, unless it is below the range of a double. */
  private static void assertExactOrTiny(BigDecimal exact, double computed) {
    if (exact.compareTo(BigDecimal.valueOf(Double.MIN_NORMAL)) > 0) {
      assertExact(exact, computed);
    } else {
      assertTrue(computed <= 2 * Double.MIN_NORMAL, () -> "computed " + computed);
    }
  }

  @Test
  void manyInParallel_areCountedQuickly() {
    assertTimeoutPreemptively(
        Duration.ofSeconds(20),
        () -> {
          CoherentSystem system = Structure.parallel(names(2_000)).compile();
          ReliabilityPolynomial polynomial = system.polynomial();
          assertEquals(
              BigInteger.TWO.pow(2_000).subtract(BigInteger.ONE),
              polynomial.workingStates().stream().reduce(BigInteger.ZERO, BigInteger::add));
          // 1 - (1-p)^n
          List<BigInteger> powers = polynomial.coefficients();
          assertEquals(BigInteger.valueOf(2_000), powers.get(1));
          assertEquals(BigInteger.valueOf(-1_999_000), powers.get(2));
          assertEquals(BigInteger.ONE.negate(), powers.get(2_000));
          assertExact(new BigDecimal("0.75").pow(2_000), polynomial.at(0.25).failing());
        });
  }

  @Test
  void constantsAndSingleComponents_haveTheirPolynomials() {
    Pivot pivot = Structure.component("a").compile().pivot("a");
    ReliabilityPolynomial always = pivot.givenWorking().polynomial();
    ReliabilityPolynomial never = pivot.givenFailed().polynomial();
    ReliabilityPolynomial single = Structure.component("a").compile().polynomial();
    assertEquals("1, 0, p", always + ", " + never + ", " + single);
    assertEquals(Probability.CERTAIN, always.at(0.25));
    assertEquals(Probability.IMPOSSIBLE, never.at(0.25));
    assertEquals(Probability.working(0.25), single.at(0.25));
    assertEquals(0, always.derivative(0.25));
    assertEquals(1, single.derivative(0.25));
    assertEquals(List.of(), always.criticalStates());
    assertEquals(new BigFraction(1, 4), single.at(new BigFraction(1, 4)));
  }

  @Test
  void fractionsOutsideZeroToOne_areRefused() {
    ReliabilityPolynomial polynomial = Structure.component("a").compile().polynomial();
    for (BigFraction p : List.of(new BigFraction(-1, 9), new BigFraction(10, 9))) {
      String message =
          assertThrows(IllegalArgumentException.class, () -> polynomial.at(p)).getMessage();
      assertTrue(message.contains(p.toString()) && message.contains("from 0 to 1"), message);
    }
  }

  @Test
  void counting_keepsToItsBudget() {
    CoherentSystem system = Structure.atLeast(100, names(200)).compile();
    List<Executable> calls =
        List.of(
            () -> system.polynomial(Budget.ofNodes(500)),
            () -> system.signature(Budget.ofNodes(500)));
    for (Executable call : calls) {
      BudgetExceededException stopped = assertThrows(BudgetExceededException.class, call);
      assertTrue(stopped.getMessage().contains("counting working states"));
    }
    assertEquals(
        system.polynomial(), system.polynomial(Budget.ofNodes(1_000_000)), "enough of a budget");
  }

  @Test
  void interrupts_endLongWork() {
    CoherentSystem system = Structure.parallel(names(50)).compile();
    ReliabilityPolynomial polynomial = system.polynomial();
    Signature signature = system.signature();
    List<Executable> calls =
        List.of(
            polynomial::coefficients,
            polynomial::toString,
            signature::minimalSignature,
            signature::maximalSignature,
            () -> signature.ofOrder(60));
    for (Executable call : calls) {
      Thread.currentThread().interrupt();
      try {
        assertThrows(BudgetExceededException.class, call);
      } finally {
        assertTrue(Thread.interrupted());
      }
    }
    assertFalse(polynomial.coefficients().isEmpty(), "answered when asked again");
  }
}
