package org.kingbolt.core;

import java.util.Optional;

/**
 * Where the generation of minimal sets ends: at a number of components, or at a probability. What
 * is not cut off is generated completely.
 *
 * <p>Immutable; safe to share between threads.
 *
 * <p>Example: {@code structure.minimalCutSets(CutOff.size(3))} are all minimal cut sets of up to
 * three components.
 */
public final class CutOff {

  private final int size;
  private final double threshold;
  private final Optional<Probabilities> probabilities;

  private CutOff(int size, double threshold, Optional<Probabilities> probabilities) {
    this.size = size;
    this.threshold = threshold;
    this.probabilities = probabilities;
  }

  /**
   * Keeps the sets of up to so many components.
   *
   * @param largest the largest size that is wanted, at least 1
   * @return the cut-off
   * @throws IllegalArgumentException if the number is less than 1
   */
  public static CutOff size(int largest) {
    if (largest < 1) {
      throw new IllegalArgumentException(
          "cut-off at size " + largest + "; it must be at least 1, and 2 to 4 is usual");
    }
    return new CutOff(largest, 0, Optional.empty());
  }

  /**
   * Keeps the sets that are at least so probable: cut sets by the probability that all their
   * components have failed, path sets by the probability that all work. A set whose product is
   * short of the threshold by no more than rounding is kept: two of 0.7 reach 0.49.
   *
   * @param threshold the least probability that is wanted, above 0 and at most 1
   * @param p the components' probabilities
   * @return the cut-off
   * @throws IllegalArgumentException if the threshold is NaN, not above 0, or above 1
   */
  public static CutOff probability(double threshold, Probabilities p) {
    if (!(threshold > 0 && threshold <= 1)) {
      throw new IllegalArgumentException(
          "cut-off at probability "
              + threshold
              + "; it must be above 0 and at most 1, such as 1e-9");
    }
    return new CutOff(Integer.MAX_VALUE, threshold, Optional.of(Check.notNull(p, "probabilities")));
  }

  /** The largest size; without meaning where there are probabilities. */
  int size() {
    return size;
  }

  double threshold() {
    return threshold;
  }

  Optional<Probabilities> probabilities() {
    return probabilities;
  }

  @Override
  public boolean equals(Object other) {
    return other instanceof CutOff that
        && size == that.size
        && Double.compare(threshold, that.threshold) == 0
        && probabilities.equals(that.probabilities);
  }

  @Override
  public int hashCode() {
    return 31 * (31 * size + Double.hashCode(threshold)) + probabilities.hashCode();
  }

  /**
   * Shows the limit, such as {@code size at most 3}.
   *
   * @return a few words
   */
  @Override
  public String toString() {
    return probabilities.isPresent()
        ? "probability at least " + Probability.digits(threshold)
        : "size at most " + size;
  }
}
