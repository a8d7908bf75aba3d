package org.kingbolt.bounds;

import org.kingbolt.core.Probability;

/** Rounds the ends of intervals outwards, by more than rounding can have moved them. */
final class Rounding {

  private static final double UNIT = 0x1p-51;

  private Rounding() {}

  /** A lower end: less working, more failing. */
  static Probability down(double working, double failing, long operations) {
    double slack = slack(operations);
    return Probability.of(working * (1 - slack), Math.min(1, failing * (1 + slack)));
  }

  /** An upper end: more working, less failing. */
  static Probability up(double working, double failing, long operations) {
    return down(/* working= */ failing, /* failing= */ working, operations).complement();
  }

  private static double slack(long operations) {
    return Math.min(0.5, operations * UNIT);
  }
}
