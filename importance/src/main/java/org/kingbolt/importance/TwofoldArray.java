package org.kingbolt.importance;

import java.util.Arrays;

/**
 * Numbers of about 31 digits, each held as the sum of two doubles, for signed sums whose terms
 * cancel.
 *
 * <p>Source: Dekker, A floating-point technique for extending the available precision, Numer. Math.
 * 18 (1971) 224. An addition is off by at most about 2^-104 of its terms. For one thread.
 */
final class TwofoldArray {

  private final double[] high;
  private final double[] low;

  TwofoldArray(int size) {
    this.high = new double[size];
    this.low = new double[size];
  }

  double high(int at) {
    return high[at];
  }

  double low(int at) {
    return low[at];
  }

  double get(int at) {
    return high[at] + low[at];
  }

  void set(int at, double value) {
    high[at] = value;
    low[at] = 0;
  }

  /** Sets a place to one minus a number. */
  void setComplement(int at, double value) {
    set(at, 1);
    add(at, -value, 0);
  }

  void clear() {
    Arrays.fill(high, 0);
    Arrays.fill(low, 0);
  }

  void add(int at, double h, double l) {
    double had = high[at];
    double sum = had + h;
    double part = sum - had;
    double error = (had - (sum - part)) + (h - part) + (low[at] + l);
    double total = sum + error;
    high[at] = total;
    low[at] = error - (total - sum);
  }

  void addProduct(int at, double aHigh, double aLow, double bHigh, double bLow) {
    double product = aHigh * bHigh;
    double error = Math.fma(aHigh, bHigh, -product) + (aHigh * bLow + aLow * bHigh);
    add(at, product, error);
  }
}
