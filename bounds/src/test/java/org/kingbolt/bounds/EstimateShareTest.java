package org.kingbolt.bounds;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import org.apache.commons.math3.distribution.BinomialDistribution;
import org.junit.jupiter.api.Test;

/** The exact binomial interval. */
class EstimateShareTest {

  /** Clopper and Pearson, Biometrika 26 (1934) 404: 8 of 10 at 95 %; from memory. */
  @Test
  void eightOfTen_hasThePublishedInterval() {
    EstimateShare share = EstimateShare.of(8, 10, 0.05);
    assertEquals(0.44390, share.low(), 5e-6);
    assertEquals(0.97479, share.high(), 5e-6);
    EstimateShare mirrored = EstimateShare.of(2, 10, 0.05);
    assertEquals(share.low(), mirrored.lowMiss());
    assertEquals(share.high(), mirrored.highMiss());
  }

  /** None of n: 1 - (0.025)^(1/n), a closed form; common practice. */
  @Test
  void noneAtAll_hasTheClosedForm() {
    for (long n : new long[] {1, 10, 59, 1_000_000, 10_000_000_000L}) {
      EstimateShare none = EstimateShare.of(0, n, 0.05);
      assertEquals(0, none.low());
      assertEquals(1, none.highMiss());
      double high = -Math.expm1(Math.log(0.025) / n);
      assertEquals(high, none.high(), 1e-9 * high);
      EstimateShare all = EstimateShare.of(n, n, 0.05);
      assertEquals(none.high(), all.highMiss());
      assertEquals(1, all.high());
    }
  }

  /**
   * Summed over all counts, the interval misses as often as stated at most, whatever the
   * probability; at its ends half of that is reached.
   */
  @Test
  void interval_missesAsOftenAsStatedAtMost() {
    for (int n : new int[] {1, 7, 40, 200}) {
      for (double p : new double[] {1e-9, 1e-3, 0.02, 0.3, 0.5, 0.77, 0.999}) {
        for (double missed : new double[] {0.5, 0.05, 1e-5}) {
          BinomialDistribution counts = new BinomialDistribution(null, n, p);
          double misses = 0;
          for (int hits = 0; hits <= n; hits++) {
            EstimateShare share = EstimateShare.of(hits, n, missed);
            boolean outside = p < share.low() || p > share.high();
            misses += outside ? counts.probability(hits) : 0;
          }
          double seen = misses;
          assertTrue(misses <= missed, () -> n + " at " + p + " misses " + seen);
        }
      }
    }
    EstimateShare share = EstimateShare.of(30, 200, 0.05);
    BinomialDistribution atLow = new BinomialDistribution(null, 200, share.low());
    assertEquals(0.025, 1 - atLow.cumulativeProbability(29), 1e-12);
    BinomialDistribution atHigh = new BinomialDistribution(null, 200, share.high());
    assertEquals(0.025, atHigh.cumulativeProbability(30), 1e-12);
  }

  @Test
  void manySamples_areNoTrouble() {
    EstimateShare share = EstimateShare.of(500_000_000, 1_000_000_000, 0.05);
    double deviations = (share.high() - 0.5) / (0.5 / Math.sqrt(1e9));
    assertEquals(1.95996, deviations, 1e-4);
  }
}
