package org.kingbolt.bounds;

import org.kingbolt.core.Probability;

/**
 * What is known of the probability that any set of a family occurs; "working" stands for "occurs".
 *
 * @param lower at least as likely as this
 * @param upper at most as likely as this
 * @param lowerWhy where the lower end comes from
 * @param upperWhy where the upper end comes from
 */
record UnionBounds(Probability lower, Probability upper, String lowerWhy, String upperWhy) {

  private static final String BELOW_ZERO = "the sum is below 0, so that only 0 is sure";
  private static final String ABOVE_ONE =
      "the sum exceeds 1, which no probability does, so that only 1 is sure";

  /**
   * From a sum that the probability is not below and one that it is not above, each with its error.
   * A sum that says nothing gives way to 0 or 1, and the reason says so.
   *
   * @param discarded added to the upper sum
   */
  static UnionBounds ofSums(
      double lower,
      double lowerError,
      String lowerWhy,
      double upper,
      double upperError,
      String upperWhy,
      double discarded) {
    boolean tellsLower = lower - lowerError > 0;
    double most = upper + discarded;
    boolean tellsUpper = most + upperError < 1;
    return new UnionBounds(
        tellsLower ? Rounding.below(lower, lowerError) : Probability.IMPOSSIBLE,
        tellsUpper ? Rounding.above(most, upperError) : Probability.CERTAIN,
        tellsLower ? lowerWhy : lowerWhy + ": " + BELOW_ZERO,
        tellsUpper
            ? upperWhy + (discarded > 0 ? " and the probability discarded" : "")
            : upperWhy + ": " + (discarded == 1 ? "the family is cut off" : ABOVE_ONE));
  }

  /** No set can occur, but for those discarded. */
  static UnionBounds ofNothing(double discarded) {
    return new UnionBounds(
        Probability.IMPOSSIBLE,
        discarded < 1 ? Rounding.above(discarded, 0) : Probability.CERTAIN,
        "no set is known to be able to occur",
        discarded == 0 ? "no set can occur" : "the probability discarded");
  }
}
