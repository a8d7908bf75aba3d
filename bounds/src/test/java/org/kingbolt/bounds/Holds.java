package org.kingbolt.bounds;

import static org.junit.jupiter.api.Assertions.assertTrue;

import java.math.BigDecimal;
import org.kingbolt.core.Probabilities;
import org.kingbolt.core.testing.Oracle;

/** Checks that an interval holds an exact figure on both sides. */
final class Holds {

  private Holds() {}

  /** The sides of a component add up to 1 within a rounding only, hence those of the system. */
  static void assertHolds(Oracle oracle, Probabilities p, Interval interval) {
    assertHolds(oracle.works(p), oracle.fails(p), interval);
  }

  static void assertHolds(BigDecimal works, BigDecimal fails, Interval interval) {
    BigDecimal total = works.add(fails);
    String of = interval + "\n" + interval.reason() + "\nexactly ";
    String exact = of + works.doubleValue() + ", " + fails.doubleValue();
    assertTrue(works.compareTo(times(interval.lower().working(), total)) >= 0, "lower w " + exact);
    assertTrue(works.compareTo(times(interval.upper().working(), total)) <= 0, "upper w " + exact);
    assertTrue(fails.compareTo(times(interval.lower().failing(), total)) <= 0, "lower f " + exact);
    assertTrue(fails.compareTo(times(interval.upper().failing(), total)) >= 0, "upper f " + exact);
  }

  private static BigDecimal times(double end, BigDecimal total) {
    return new BigDecimal(end).multiply(total);
  }

  /** Whether one interval lies within another, but for rounding of the last places. */
  static void assertWithin(Interval inner, Interval outer) {
    assertWithin(inner, outer, 1e-15);
  }

  /**
   * Whether one interval lies within another, but for rounding.
   *
   * @param rounding what ends may lose by it: sums that cancel lose by their terms, not by what is
   *     left
   */
  static void assertWithin(Interval inner, Interval outer, double rounding) {
    String both = inner + "\n" + outer;
    assertNoLess(inner.lower().working(), outer.lower().working(), rounding, both);
    assertNoLess(outer.lower().failing(), inner.lower().failing(), rounding, both);
    assertNoLess(outer.upper().working(), inner.upper().working(), rounding, both);
    assertNoLess(inner.upper().failing(), outer.upper().failing(), rounding, both);
  }

  private static void assertNoLess(double more, double less, double rounding, String both) {
    assertTrue(more >= less * (1 - 1e-12) - rounding, both);
  }
}
