package org.kingbolt.bounds;

/**
 * A sum of non-negative numbers whose rounding does not grow with their number.
 *
 * <p>Source: Neumaier, Z. Angew. Math. Mech. 54 (1974) 39 (from memory). For one thread.
 */
final class PreciseSum {

  private double sum;
  private double rest;

  void add(double value) {
    double next = sum + value;
    rest += sum >= value ? (sum - next) + value : (value - next) + sum;
    sum = next;
  }

  double value() {
    return sum + rest;
  }
}
