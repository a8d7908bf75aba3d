package org.kingbolt.bounds;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.math.BigDecimal;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.ValueSource;
import org.kingbolt.core.CoherentSystem;
import org.kingbolt.core.Probabilities;
import org.kingbolt.core.Probability;
import org.kingbolt.core.Structure;
import org.kingbolt.core.published.Topology;

/**
 * Published Esary-Proschan bounds. The ends of an interval are rounded outwards by a few units in
 * the last place.
 */
class EsaryProschanPublishedTest {

  private static final double RELATIVE = 1e-12;

  private final CoherentSystem bridge =
      Topology.of("s-u s-v u-v u-t v-t").connecting("s", "t").compile();

  private static Interval at(Probabilities p, CoherentSystem system) {
    return Bounds.of(system).given(p).esaryProschan();
  }

  /** Esary and Proschan, Technometrics 5 (1963) 191 (from memory). */
  @ParameterizedTest
  @CsvSource({
    "0.5, 0.4306640625, 0.5693359375",
    "0.9, 0.9781407801, 0.9973487799",
    "0.95, 0.9947575139845, 0.9998066249022",
    "0.99, 0.9997980104010, 0.9999996506600"
  })
  void bridge_hasThePublishedBounds(double p, BigDecimal lower, BigDecimal upper) {
    Interval interval = at(Probabilities.all(p), bridge);
    assertNear(lower, interval.lower().working());
    assertNear(upper, interval.upper().working());
    assertTrue(interval.contains(bridge.reliability(p)));
  }

  /**
   * Esary and Proschan 1963 (formula from memory): (1-q^2)^2 (1-q^3)^2 and 1 - (1-p^2)^2 (1-p^3)^2,
   * in exact decimals and on both sides.
   */
  @ParameterizedTest
  @ValueSource(strings = {"0.5", "0.1", "0.05", "0.01", "0.000001"})
  void bridge_hasTheBoundsOfThePublishedFormula(BigDecimal q) {
    BigDecimal cutsHold = noneOfTheBridgesSets(q);
    BigDecimal pathsFail = noneOfTheBridgesSets(BigDecimal.ONE.subtract(q));
    Probability link = Probability.failing(q.doubleValue());
    Interval interval = at(Probabilities.all(link), bridge);
    assertNear(cutsHold, interval.lower().working());
    assertNear(BigDecimal.ONE.subtract(cutsHold), interval.lower().failing());
    assertNear(BigDecimal.ONE.subtract(pathsFail), interval.upper().working());
    assertNear(pathsFail, interval.upper().failing());
  }

  /** Barlow and Proschan 1975 (from memory): (1-q^2)^3 and 1 - (1-p^2)^3. */
  @Test
  void twoOutOfThree_hasThePublishedBounds() {
    CoherentSystem system = Structure.atLeast(2, "1", "2", "3").compile();
    Interval interval = at(Probabilities.all(0.9), system);
    assertNear(new BigDecimal("0.970299"), interval.lower().working());
    assertNear(new BigDecimal("0.029701"), interval.lower().failing());
    assertNear(new BigDecimal("0.993141"), interval.upper().working());
    assertNear(new BigDecimal("0.006859"), interval.upper().failing());
    assertTrue(interval.contains(system.reliability(0.9)));
  }

  /** Two sets of two and two of three, whose members occur with the given probability. */
  private static BigDecimal noneOfTheBridgesSets(BigDecimal member) {
    BigDecimal two = BigDecimal.ONE.subtract(member.pow(2));
    BigDecimal three = BigDecimal.ONE.subtract(member.pow(3));
    return two.pow(2).multiply(three.pow(2));
  }

  private static void assertNear(BigDecimal exact, double value) {
    assertEquals(exact.doubleValue(), value, RELATIVE * exact.doubleValue());
  }
}
