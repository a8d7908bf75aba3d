package org.kingbolt.core.published;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;
import static org.kingbolt.core.Structure.atLeast;
import static org.kingbolt.core.Structure.parallel;
import static org.kingbolt.core.Structure.series;
import static org.kingbolt.core.published.Digits.assertPrinted;

import java.math.BigInteger;
import java.util.List;
import java.util.stream.Stream;
import org.apache.commons.math3.fraction.BigFraction;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.MethodSource;
import org.kingbolt.core.CoherentSystem;
import org.kingbolt.core.Probability;
import org.kingbolt.core.Structure;

/** The S-shape of h(p): one crossing of the diagonal, and a slope that is steep enough. */
class ShapeTest {

  private static final Structure TWO_PAIRS = parallel(series("a", "b"), series("c", "d"));

  /** Moore and Shannon, J. Franklin Inst. 262 (1956) 191 (from memory): golden section. */
  @Test
  void pairs_crossTheDiagonalAtTheGoldenSection() {
    assertCrosses("0.6180339887499", TWO_PAIRS);
    assertCrosses("0.3819660112501", TWO_PAIRS.dual());
  }

  /** Moore and Shannon 1956 (from memory): a self-dual structure crosses at 1/2. */
  @Test
  void bridge_crossesTheDiagonalAtOneHalf() {
    assertCrosses("0.5000000000000", Families.bridge().connecting("s", "t"));
  }

  /** Moore and Shannon 1956 (formula from memory). */
  @ParameterizedTest
  @CsvSource({
    "2, 4, 0.232408120756",
    "3, 4, 0.767591879244",
    "2, 5, 0.131123147904",
    "3, 5, 0.500000000000",
    "4, 5, 0.868876852096"
  })
  void kOutOfN_crossesTheDiagonalWherePublished(int k, int n, String printed) {
    assertCrosses(printed, atLeast(k, Families.components(n)));
  }

  private static void assertCrosses(String printed, Structure structure) {
    CoherentSystem system = structure.compile();
    assertPrinted(printed, fixedPoint(system));
    Probability crossing = system.polynomial().crossing().orElseThrow();
    assertPrinted(printed, crossing.working());
    assertEquals(crossing, system.polynomial().betterThanComponentFrom().orElseThrow());
  }

  static Stream<Structure> structures() {
    return Stream.of(
        TWO_PAIRS,
        TWO_PAIRS.dual(),
        Families.bridge().connecting("s", "t"),
        atLeast(2, Families.components(5)),
        Families.petersen().connecting("0", "2"),
        Families.petersen().connectingAll(),
        Structure.withoutFailureRun(2, Families.components(9)));
  }

  /**
   * p(1-p) h'(p) >= h(p) (1 - h(p)), in exact arithmetic: Moore and Shannon 1956; Barlow and
   * Proschan, Mathematical Theory of Reliability, 1965, appendix 2 (from memory).
   */
  @ParameterizedTest
  @MethodSource("structures")
  void slope_isAtLeastAsSteepAsPublished(Structure structure) {
    List<BigInteger> powers = structure.compile().polynomial().coefficients();
    for (int percent = 0; percent <= 100; percent += 5) {
      BigFraction p = new BigFraction(percent, 100);
      BigFraction q = BigFraction.ONE.subtract(p);
      BigFraction h = value(powers, p);
      BigFraction slope = derivative(powers, p);
      BigFraction left = p.multiply(q).multiply(slope);
      BigFraction right = h.multiply(BigFraction.ONE.subtract(h));
      assertTrue(left.compareTo(right) >= 0, () -> "at p = " + p);
    }
  }

  private static BigFraction value(List<BigInteger> powers, BigFraction p) {
    BigFraction sum = BigFraction.ZERO;
    for (int j = powers.size() - 1; j >= 0; j--) {
      sum = sum.multiply(p).add(powers.get(j));
    }
    return sum;
  }

  private static BigFraction derivative(List<BigInteger> powers, BigFraction p) {
    BigFraction sum = BigFraction.ZERO;
    for (int j = powers.size() - 1; j >= 1; j--) {
      sum = sum.multiply(p).add(powers.get(j).multiply(BigInteger.valueOf(j)));
    }
    return sum;
  }

  /** By halving: below the crossing h(p) < p, above it h(p) > p. */
  private static double fixedPoint(CoherentSystem system) {
    double below = 0.01;
    double above = 0.99;
    while (above - below > 1e-15) {
      double middle = (below + above) / 2;
      if (middle == below || middle == above) {
        break;
      }
      if (system.reliability(middle).working() < middle) {
        below = middle;
      } else {
        above = middle;
      }
    }
    return (below + above) / 2;
  }
}
