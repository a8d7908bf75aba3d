package org.kingbolt.bounds;

/**
 * A generator whose numbers follow from a seed, a stage and the number of a batch, the same on
 * every machine, so that batches can be drawn in any order.
 *
 * <p>Method: xoshiro256++ of Blackman &amp; Vigna, Scrambled linear pseudorandom number generators,
 * ACM Trans. Math. Softw. 47 (2021) no. 36, its state filled by SplitMix64 of Steele, Lea &amp;
 * Flood, OOPSLA 2014 (both from memory). Different batches of a stage have different states. For
 * one thread.
 */
final class SimulationRandom {

  private static final long GOLDEN = 0x9E3779B97F4A7C15L;
  private static final double UNIT = 0x1p-53;

  private long a;
  private long b;
  private long c;
  private long d;

  SimulationRandom(long seed, long stage, long batch) {
    long mixed = mix(mix(mix(seed + GOLDEN) + stage + GOLDEN) + batch + GOLDEN);
    mixed += GOLDEN;
    a = mix(mixed);
    mixed += GOLDEN;
    b = mix(mixed);
    mixed += GOLDEN;
    c = mix(mixed);
    mixed += GOLDEN;
    d = mix(mixed);
  }

  /** Starts from a state, not all of which is 0. */
  SimulationRandom(long a, long b, long c, long d) {
    this.a = a;
    this.b = b;
    this.c = c;
    this.d = d;
  }

  private static long mix(long value) {
    long mixed = (value ^ (value >>> 30)) * 0xBF58476D1CE4E5B9L;
    mixed = (mixed ^ (mixed >>> 27)) * 0x94D049BB133111EBL;
    return mixed ^ (mixed >>> 31);
  }

  /** 64 random bits. */
  long next() {
    long result = Long.rotateLeft(a + d, 23) + a;
    long shifted = b << 17;
    c ^= a;
    d ^= b;
    b ^= c;
    a ^= d;
    c ^= shifted;
    d = Long.rotateLeft(d, 45);
    return result;
  }

  /** A multiple of 2^-53, at least 0 and less than 1. */
  double uniform() {
    return (next() >>> 11) * UNIT;
  }

  /** True with a probability, however small: where 53 bits cannot tell, more are drawn. */
  boolean happens(double probability) {
    double rest = probability;
    while (true) {
      double above = rest - uniform();
      if (above <= 0) {
        return false;
      }
      if (above >= UNIT) {
        return true;
      }
      rest = above / UNIT;
    }
  }

  /** True with the first of two probabilities that add up to 1, the smaller of which is used. */
  boolean happens(double probability, double complement) {
    return probability <= complement ? happens(probability) : !happens(complement);
  }
}
