package org.kingbolt.core.published;

import static org.junit.jupiter.api.Assertions.assertTrue;

import java.math.BigDecimal;

/** Comparison with numbers as they are printed. */
public final class Digits {

  private Digits() {}

  /**
   * Checks that a value rounds to the digits that are printed: it may be off by half a unit in the
   * last digit, and by the rounding of a double.
   *
   * @param printed the decimal number
   * @param value what was computed
   */
  public static void assertPrinted(String printed, double value) {
    BigDecimal expected = new BigDecimal(printed);
    BigDecimal half =
        BigDecimal.ONE.movePointLeft(expected.scale()).multiply(new BigDecimal("0.5"));
    BigDecimal rounding = expected.abs().multiply(new BigDecimal("1e-14"));
    BigDecimal off = new BigDecimal(value).subtract(expected).abs();
    assertTrue(
        off.compareTo(half.add(rounding)) <= 0, () -> "printed " + printed + ", computed " + value);
  }

  /**
   * Checks a value against an exact one.
   *
   * @param exact the number, without rounding
   * @param value what was computed, right to 13 digits
   */
  public static void assertExact(BigDecimal exact, double value) {
    BigDecimal off = new BigDecimal(value).subtract(exact).abs();
    assertTrue(
        off.compareTo(exact.abs().multiply(new BigDecimal("1e-13"))) <= 0,
        () -> "exactly " + exact + ", computed " + value);
  }
}
