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

  /** A lower end on the working side, from a positive value and an absolute error. */
  static Probability below(double working, double error) {
    double less = Math.nextDown(working - error);
    return Probability.of(less, Math.min(1, Math.nextUp(1 - less)));
  }

  /** An upper end on the working side, from a value and an absolute error that stay below 1. */
  static Probability above(double working, double error) {
    if (working == 0 && error == 0) {
      return Probability.IMPOSSIBLE;
    }
    double more = Math.min(1, Math.nextUp(working + error));
    return Probability.of(more, Math.max(0, Math.nextDown(1 - more)));
  }

  /** An upper end, from both sides, each with its error; 1 if above. The smaller side decides. */
  static Probability above(
      double working, double workingError, double failing, double failingError) {
    double less = Math.nextDown(failing - failingError);
    if (less <= 0) {
      return Probability.CERTAIN;
    }
    return less < 0.5
        ? Probability.of(Math.min(1, Math.nextUp(1 - less)), less)
        : above(working, workingError);
  }

  /** A share of a value that its rounding in so many operations does not exceed. */
  static double share(long operations) {
    return operations * UNIT;
  }

  private static double slack(long operations) {
    return Math.min(0.5, operations * UNIT);
  }
}
