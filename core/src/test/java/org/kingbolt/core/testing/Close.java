package org.kingbolt.core.testing;

import static org.junit.jupiter.api.Assertions.assertTrue;

import java.math.BigDecimal;
import org.kingbolt.core.Probabilities;
import org.kingbolt.core.Probability;

/** Comparison of doubles with exact numbers, relative to their size on each side. */
public final class Close {

  private static final BigDecimal TOLERANCE = new BigDecimal("1e-13");

  private Close() {}

  /**
   * Checks both sides of a system's probability against all states.
   *
   * @param oracle the right answers
   * @param p the probabilities of the components
   * @param computed the result to check, each side to 1e-13 of itself
   * @param method its origin, for the message
   */
  public static void assertReliability(
      Oracle oracle, Probabilities p, Probability computed, String method) {
    assertClose(oracle.works(p), computed.working(), method + " works", oracle, p);
    assertClose(oracle.fails(p), computed.failing(), method + " fails", oracle, p);
  }

  private static void assertClose(
      BigDecimal exact, double value, String what, Oracle oracle, Probabilities p) {
    assertTrue(
        isClose(exact, value),
        () ->
            what
                + ": exactly "
                + exact.doubleValue()
                + ", computed "
                + value
                + " at "
                + oracle.shown(p));
  }

  /**
   * Compares.
   *
   * @param exact the number
   * @param value what was computed
   * @return whether it is within 1e-13 of the number, relative to the number
   */
  public static boolean isClose(BigDecimal exact, double value) {
    BigDecimal off = new BigDecimal(value).subtract(exact).abs();
    return off.compareTo(exact.abs().multiply(TOLERANCE)) <= 0;
  }
}
