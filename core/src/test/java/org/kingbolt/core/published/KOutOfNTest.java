package org.kingbolt.core.published;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.kingbolt.core.published.Digits.assertPrinted;
import static org.kingbolt.core.published.Exact.integers;

import java.math.BigInteger;
import org.apache.commons.math3.fraction.BigFraction;
import org.apache.commons.math3.util.CombinatoricsUtils;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.kingbolt.core.CoherentSystem;
import org.kingbolt.core.Structure;

/** k-out-of-n:G systems. */
class KOutOfNTest {

  private static CoherentSystem system(int k, int n) {
    return Structure.atLeast(k, Families.components(n)).compile();
  }

  /** Barlow and Proschan 1975 (from memory). */
  @Test
  void twoOutOfThree_hasThePublishedPolynomial() {
    assertEquals(integers(0, 0, 3, -2), system(2, 3).polynomial().coefficients());
    assertPrinted("0.972", system(2, 3).reliability(0.9).working());
  }

  /** Barlow and Proschan 1975 (from memory): C(n, k) path sets, C(n, n-k+1) cut sets. */
  @ParameterizedTest
  @CsvSource({"1, 1", "1, 5", "2, 3", "5, 5", "4, 9", "10, 20", "15, 30"})
  void minimalSets_areAsManyAsPublished(int k, int n) {
    assertEquals(
        BigInteger.valueOf(CombinatoricsUtils.binomialCoefficient(n, k)),
        system(k, n).minimalPathSets().count());
    assertEquals(
        BigInteger.valueOf(CombinatoricsUtils.binomialCoefficient(n, n - k + 1)),
        system(k, n).minimalCutSets().count());
  }

  /** Barlow and Proschan 1965/1975; MIL-HDBK-338B sec. 7 (from memory): sum of 1/j, j = k..n. */
  @ParameterizedTest
  @CsvSource({"1, 2, 3/2", "1, 3, 11/6", "2, 3, 5/6", "3, 3, 1/3", "2, 4, 13/12", "3, 5, 47/60"})
  void meanLife_isThePublishedOne(int k, int n, String mean) {
    String[] fraction = mean.split("/", -1);
    assertEquals(
        new BigFraction(new BigInteger(fraction[0]), new BigInteger(fraction[1])),
        Exact.meanLife(system(k, n).signature()));
  }
}
