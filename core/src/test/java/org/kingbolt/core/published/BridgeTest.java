package org.kingbolt.core.published;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.kingbolt.core.published.Digits.assertPrinted;
import static org.kingbolt.core.published.Exact.integers;
import static org.kingbolt.core.published.Exact.sets;

import org.apache.commons.math3.fraction.BigFraction;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.kingbolt.core.CoherentSystem;

/** The bridge of five components, of which 3 is the crossing one. */
class BridgeTest {

  private final CoherentSystem bridge = Families.bridge().connecting("s", "t").compile();

  /** Barlow and Proschan, Statistical Theory of Reliability, 1975, ch. 1 (from memory). */
  @Test
  void minimalSets_areThePublishedOnes() {
    assertEquals(sets("14,25,135,234"), sets(bridge.minimalPathSets()));
    assertEquals(sets("12,45,135,234"), sets(bridge.minimalCutSets()));
  }

  /**
   * Barlow and Proschan 1975, ch. 2; Moore and Shannon, J. Franklin Inst. 262 (1956) 191 (from
   * memory).
   */
  @Test
  void polynomial_isThePublishedOne() {
    assertEquals("2p^2 + 2p^3 - 5p^4 + 2p^5", bridge.polynomial().toString());
    assertEquals(integers(0, 0, 2, 2, -5, 2), bridge.polynomial().coefficients());
    assertEquals(integers(0, 0, 2, 8, 5, 1), bridge.polynomial().workingStates());
  }

  /** Values of the polynomial above. */
  @ParameterizedTest
  @CsvSource({"0.5, 0.5", "0.7, 0.80164", "0.9, 0.97848", "0.95, 0.994780625"})
  void reliability_isThePublishedOne(double p, String printed) {
    assertPrinted(printed, bridge.reliability(p).working());
    assertPrinted(printed, bridge.polynomial().at(p).working());
  }

  /** Value of the polynomial above, to the digits that ten decimals hold. */
  @Test
  void reliability_ofGoodComponents_isThePublishedOne() {
    assertPrinted("0.9997980498", bridge.reliability(0.99).working());
    assertPrinted("0.0002019502", bridge.reliability(0.99).failing());
  }

  /**
   * Samaniego, IEEE Trans. Reliab. 34 (1985) 69; Kochar, Mukerjee and Samaniego, Naval Res. Logist.
   * 46 (1999) 507 (from memory).
   */
  @Test
  void signature_isThePublishedOne() {
    assertEquals("(0, 1/5, 3/5, 1/5, 0)", bridge.signature().toString());
  }

  /** Follows from the signature: Samaniego 2007 (from memory). */
  @Test
  void meanLife_isThePublishedOne() {
    assertEquals(new BigFraction(49, 60), Exact.meanLife(bridge.signature()));
    assertEquals(new BigFraction(49, 60), bridge.signature().meanLifetime());
  }

  /**
   * Navarro, Ruiz and Sandoval, Commun. Statist. Theory Methods 36 (2007) 175 (from memory): the
   * powers of the polynomial; the bridge is its own dual.
   */
  @Test
  void minimalAndMaximalSignature_arePublishedPowers() {
    assertEquals(integers(0, 2, 2, -5, 2), bridge.signature().minimalSignature());
    assertEquals(integers(0, 2, 2, -5, 2), bridge.signature().maximalSignature());
  }

  /** The bridge is its own dual: Moore and Shannon 1956 (from memory). */
  @Test
  void dual_hasTheSamePolynomial() {
    CoherentSystem dual = bridge.structure().dual().compile();
    assertEquals(bridge.polynomial(), dual.polynomial());
    assertEquals(
        sets(bridge.minimalPathSets()), sets(dual.minimalCutSets()), "paths are the dual's cuts");
  }
}
