package org.kingbolt.bounds;

import org.kingbolt.core.Probability;

/** Rounds the ends of intervals outwards, by more than rounding can have moved them. */
final class Rounding {

  private static final double UNIT = 0x1p-51;

  private Rounding() {}

  /**
   * A lower end: less working, more failing. The smaller side gives way by its own rounding; the
   * larger one follows from it.
   */
  static Probability down(double working, double failing, long operations) {
    double slack = slack(operations);
    if (failing <= working) {
      double more = Math.min(1, failing * (1 + slack));
      return Probability.of(Math.max(0, Math.nextDown(1 - more)), more);
    }
    double less = working * (1 - slack);
    return Probability.of(less, Math.min(1, Math.nextUp(1 - less)));
  }

  /** An upper end: more working, less failing. */
  static Probability up(double working, double failing, long operations) {
    double slack = slack(operations);
    if (failing <= working) {
      double less = failing * (1 - slack);
      return Probability.of(Math.min(1, Math.nextUp(1 - less)), less);
    }
    double more = Math.min(1, working * (1 + slack));
    return Probability.of(more, Math.max(0, Math.nextDown(1 - more)));
  }

  private static double slack(long operations) {
    return Math.min(0.5, operations * UNIT);
  }
}
