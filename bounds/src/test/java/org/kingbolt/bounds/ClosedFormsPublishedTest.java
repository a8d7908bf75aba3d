package org.kingbolt.bounds;

import static org.junit.jupiter.api.Assertions.assertEquals;

import java.math.BigDecimal;
import java.util.ArrayList;
import java.util.List;
import java.util.Set;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.ValueSource;
import org.kingbolt.core.Probabilities;
import org.kingbolt.core.Probability;
import org.kingbolt.core.Structure;
import org.kingbolt.core.published.Topology;

/** Published formulas on the bridge and on k-out-of-n systems. */
class ClosedFormsPublishedTest {

  private static final double RELATIVE = 1e-11;

  private final Structure bridge = Topology.of("s-u s-v u-v u-t v-t").connecting("s", "t");

  private BoundsAtProbabilities bridge(BigDecimal q) {
    return Bounds.of(bridge).given(Probabilities.all(Probability.failing(q.doubleValue())));
  }

  private static void assertNear(BigDecimal exact, double value) {
    assertEquals(exact.doubleValue(), value, RELATIVE * exact.doubleValue());
  }

  private static BigDecimal sum(BigDecimal q, int... coefficients) {
    BigDecimal sum = BigDecimal.ZERO;
    for (int power = 0; power < coefficients.length; power++) {
      sum = sum.add(q.pow(power).multiply(BigDecimal.valueOf(coefficients[power])));
    }
    return sum;
  }

  /**
   * Bonferroni 1936; Feller, vol. 1, ch. IV (formula from memory), over the cut sets of two, two,
   * three and three links: sums 2q^2 + 2q^3, 5q^4 + q^5, 4q^5, q^5; together the published
   * polynomial of the bridge.
   */
  @ParameterizedTest
  @ValueSource(strings = {"0.1", "0.01", "0.000001"})
  void bridge_hasTheSumsOfEachOrder(BigDecimal q) {
    BigDecimal first = sum(q, 0, 0, 2, 2);
    BigDecimal second = sum(q, 0, 0, 2, 2, -5, -1);
    BigDecimal third = sum(q, 0, 0, 2, 2, -5, 3);
    BigDecimal exact = sum(q, 0, 0, 2, 2, -5, 2);
    assertNear(first, bridge(q).inclusionExclusion(1).lower().failing());
    assertNear(first, bridge(q).inclusionExclusion(2).lower().failing());
    assertNear(second, bridge(q).inclusionExclusion(2).upper().failing());
    assertNear(third, bridge(q).inclusionExclusion(3).lower().failing());
    assertNear(exact, bridge(q).inclusionExclusion(4).lower().failing());
    assertNear(exact, bridge(q).inclusionExclusion(4).upper().failing());
  }

  /** Hunter 1976; Worsley 1982 (formula from memory): any tree takes three pairs of q^4. */
  @ParameterizedTest
  @ValueSource(strings = {"0.1", "0.01", "0.000001"})
  void bridge_hasTheBoundOfTheBestTree(BigDecimal q) {
    assertNear(sum(q, 0, 0, 2, 2, -3), bridge(q).secondOrder().lower().failing());
  }

  /** Dawson and Sankoff 1967 (formula from memory): k = 1 while pairs are rare. */
  @ParameterizedTest
  @ValueSource(strings = {"0.1", "0.01", "0.000001"})
  void bridge_hasTheBoundOfDawsonAndSankoff(BigDecimal q) {
    assertNear(sum(q, 0, 0, 2, 2, -5, -1), bridge(q).secondOrder().upper().failing());
  }

  /**
   * Dawson and Sankoff 1967 (formula from memory): a 2-out-of-4 system of components that work with
   * p has six paths of p^2, twelve pairs of p^3 and three of p^4. With p = 1/4 the sums are 3/8 and
   * 51/256, so that k = 2; with p = 1/2 they are 3/2 and 27/16, so that k = 3.
   */
  @ParameterizedTest
  @CsvSource({"0.25, 0.18359375", "0.5, 0.46875"})
  void twoOutOfFour_hasTheBoundOfDawsonAndSankoff(double p, BigDecimal lower) {
    List<Set<String>> paths = new ArrayList<>();
    for (String pair : List.of("ab", "ac", "ad", "bc", "bd", "cd")) {
      paths.add(Set.of(pair.substring(0, 1), pair.substring(1)));
    }
    Interval interval = Bounds.ofSets(paths, List.of()).given(Probabilities.all(p)).secondOrder();
    assertNear(lower, interval.lower().working());
  }

  /** Barlow and Proschan 1975 (from memory): the best path p^2, the worst cut 1 - q^2. */
  @Test
  void bridge_hasThePublishedMinMaxBounds() {
    Interval interval = bridge(new BigDecimal("0.1")).minMax();
    assertNear(new BigDecimal("0.81"), interval.lower().working());
    assertNear(new BigDecimal("0.99"), interval.upper().working());
  }

  /** Fréchet 1935 (from memory): a path of two links fails at most as often as both in sum. */
  @Test
  void bridge_hasTheBoundsOfFrechet() {
    Interval interval = bridge(new BigDecimal("0.1")).frechet();
    assertNear(new BigDecimal("0.8"), interval.lower().working());
    assertEquals(1, interval.upper().working());
    Interval poor = bridge(new BigDecimal("0.9")).frechet();
    assertEquals(0, poor.lower().working());
    assertNear(new BigDecimal("0.2"), poor.upper().working());
  }

  /**
   * Rüger, Metrika 25 (1978) 171 (formula from memory): k of n events of probability q each occur
   * with at most n q / k, whatever the dependence, and some dependence attains it.
   */
  @ParameterizedTest
  @CsvSource({"2, 3, 0.1, 0.15", "3, 5, 0.3, 0.5", "4, 10, 0.2, 0.5", "5, 8, 1e-15, 1.6e-15"})
  void kOutOfN_hasThePublishedBoundForAnyDependence(int k, int n, double q, BigDecimal most) {
    String[] names = new String[n];
    for (int i = 0; i < n; i++) {
      names[i] = "c" + i;
    }
    Interval interval =
        Bounds.of(Structure.atLeast(n - k + 1, names))
            .given(Probabilities.all(Probability.failing(q)))
            .linearProgramming();
    assertEquals(most.doubleValue(), interval.lower().failing(), 1e-9 * most.doubleValue());
  }
}
