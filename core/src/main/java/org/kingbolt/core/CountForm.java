package org.kingbolt.core;

import java.math.BigInteger;
import java.util.List;

/**
 * A sum of c_j p^j (1-p)^(m-j), j from 0 to m, with integers c_j that are not negative and may be
 * far too large for a double: each is held as a mantissa and an exponent, and so are the powers.
 *
 * <p>No term cancels another, so a value has a relative error of a few units in the last place.
 */
final class CountForm {

  /** Powers of a number from 1 to 2 up to this one are no larger than a double. */
  private static final int STRIDE = 1_000;

  /** Of terms that are so much smaller than the largest, nothing is left in the sum. */
  private static final long NEGLIGIBLE = -200;

  private final double[] mantissas;
  private final long[] exponents;

  CountForm(List<BigInteger> counts) {
    mantissas = new double[counts.size()];
    exponents = new long[counts.size()];
    for (int j = 0; j < mantissas.length; j++) {
      BigInteger count = counts.get(j);
      int shift = Math.max(0, count.bitLength() - STRIDE);
      put(j, count.shiftRight(shift).doubleValue(), shift, mantissas, exponents);
    }
  }

  /** Splits a number, which is not negative, into a mantissa from 1 to 2 and an exponent. */
  private static void put(int j, double value, long exponent, double[] mantissas, long[] powers) {
    if (value == 0) {
      return;
    }
    boolean tiny = value < Double.MIN_NORMAL;
    double normal = tiny ? value * 0x1p64 : value;
    int own = Math.getExponent(normal);
    mantissas[j] = Math.scalb(normal, -own);
    powers[j] = exponent + own - (tiny ? 64 : 0);
  }

  /** The value; both sides of the probability are used as they stand. */
  double at(Probability p) {
    int m = mantissas.length - 1;
    Powers up = new Powers(p.working(), m);
    Powers down = new Powers(p.failing(), m);
    double[] terms = new double[m + 1];
    long[] powers = new long[m + 1];
    long largest = Long.MIN_VALUE;
    for (int j = 0; j <= m; j++) {
      terms[j] = mantissas[j] * up.mantissas[j] * down.mantissas[m - j];
      powers[j] = exponents[j] + up.exponents[j] + down.exponents[m - j];
      if (terms[j] != 0) {
        largest = Math.max(largest, powers[j]);
      }
    }
    if (largest == Long.MIN_VALUE) {
      return 0;
    }
    double sum = 0;
    double rest = 0;
    for (int j = 0; j <= m; j++) {
      if (terms[j] != 0 && powers[j] - largest > NEGLIGIBLE) {
        double term = Math.scalb(terms[j], (int) (powers[j] - largest));
        double next = sum + term;
        rest += sum >= term ? sum - next + term : term - next + sum;
        sum = next;
      }
    }
    return Math.scalb(sum + rest, (int) Math.max(-10_000, Math.min(10_000, largest)));
  }

  /** The powers of a probability from 0 to m. */
  private static final class Powers {
    private final double[] mantissas;
    private final long[] exponents;

    Powers(double base, int m) {
      mantissas = new double[m + 1];
      exponents = new long[m + 1];
      mantissas[0] = 1;
      if (m == 0 || base == 0) {
        return;
      }
      put(1, base, 0, mantissas, exponents);
      double one = mantissas[1];
      long exponent = exponents[1];
      for (int j = 2; j <= m; j++) {
        int start = (j - 1) / STRIDE * STRIDE;
        double value = mantissas[start] * Math.pow(one, j - start);
        put(j, value, exponents[start] + exponent * (j - start), mantissas, exponents);
      }
    }
  }
}
