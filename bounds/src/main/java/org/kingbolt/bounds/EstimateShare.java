package org.kingbolt.bounds;

import org.apache.commons.math3.special.Beta;

/**
 * An interval for the probability that a trial hits, from the number of hits: the exact one of
 * Clopper &amp; Pearson, Biometrika 26 (1934) 404. Whatever the probability, it is missed at most
 * as often as stated. Complements are kept beside the ends, so that neither small ones lose digits.
 *
 * @param low the lower end
 * @param high the upper end
 * @param lowMiss the lower end for misses, 1 - high
 * @param highMiss the upper end for misses, 1 - low
 */
record EstimateShare(double low, double high, double lowMiss, double highMiss) {

  private static final int STEPS = 64;

  /**
   * Works the interval out.
   *
   * @param hits from 0 to samples
   * @param samples at least 1
   * @param missed how often the interval may miss the probability
   */
  static EstimateShare of(long hits, long samples, double missed) {
    double fewer = Math.min(hits, samples - hits);
    double others = samples - fewer;
    double low = fewer == 0 ? 0 : below(fewer, others + 1, missed / 2);
    double high =
        fewer == 0
            ? -Math.expm1(Math.log(missed / 2) / samples)
            : above(fewer + 1, others, missed / 2);
    return hits <= samples - hits
        ? new EstimateShare(low, high, 1 - high, 1 - low)
        : new EstimateShare(1 - high, 1 - low, low, high);
  }

  /** Where the beta distribution has at most a tail to the left; found from below. */
  private static double below(double alpha, double beta, double tail) {
    double from = 0;
    double to = alpha / (alpha + beta);
    for (int step = 0; step < STEPS; step++) {
      double middle = 0.5 * (from + to);
      if (Beta.regularizedBeta(middle, alpha, beta) <= tail) {
        from = middle;
      } else {
        to = middle;
      }
    }
    return from;
  }

  /** Where the beta distribution has at most a tail to the right; found from above. */
  private static double above(double alpha, double beta, double tail) {
    double from = 0;
    double to = 1;
    for (int step = 0; step < STEPS; step++) {
      double middle = 0.5 * (from + to);
      if (1 - Beta.regularizedBeta(middle, alpha, beta) <= tail) {
        to = middle;
      } else {
        from = middle;
      }
    }
    return to;
  }
}
