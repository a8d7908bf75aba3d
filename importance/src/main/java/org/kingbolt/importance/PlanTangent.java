package org.kingbolt.importance;

/**
 * A linear function of the choice of alternatives, one of each part, and its least value within
 * limits, as far as prices on the resources tell (Everett, Oper. Res. 11 (1963) 399, from memory).
 * Any prices give a lower bound on the value.
 */
final class PlanTangent {

  private static final int HALVINGS = 12;
  private static final double STRIDE = 1.3;
  private static final double HIGHEST = 1e30;

  private final double[][][] cost;
  private final long[] limits;
  private final int[] first;
  private final int[] last;
  private final int levels;

  /** The terms without prices, and with those of the other resources. */
  private final double[][] base;

  private final double[][] others;
  private final double[] tangentPrice;
  private final int[] choice;

  /** Takes costs by part, resource and alternative; the ends of what may be used can change. */
  PlanTangent(double[][][] cost, long[] limits, int[] first, int[] last) {
    this.cost = cost;
    this.limits = limits;
    this.first = first;
    this.last = last;
    levels = cost.length;
    base = new double[levels][];
    others = new double[levels][];
    for (int at = 0; at < levels; at++) {
      base[at] = new double[cost[at][0].length];
      others[at] = new double[base[at].length];
    }
    tangentPrice = new double[limits.length];
    choice = new int[levels];
  }

  void put(int at, int i, double term) {
    base[at][i] = term;
  }

  /** A bound on the least sum of terms within limits; begins with some prices, leaves its own. */
  double least(double[] price) {
    System.arraycopy(price, 0, tangentPrice, 0, price.length);
    double best = Double.NEGATIVE_INFINITY;
    for (int round = 0; round < (limits.length == 1 ? 1 : 2); round++) {
      for (int r = 0; r < limits.length; r++) {
        best = priceOut(r);
      }
    }
    return best;
  }

  double price(int r) {
    return tangentPrice[r];
  }

  int[] choices() {
    return choice.clone();
  }

  /** What an alternative's costs are at some prices. */
  double priced(double[] prices, int at, int i) {
    double sum = 0;
    for (int r = 0; r < prices.length; r++) {
      sum += prices[r] == 0 ? 0 : prices[r] * cost[at][r][i];
    }
    return sum;
  }

  /** Sets a price so that the least priced tangent just keeps a limit; returns what it is then. */
  private double priceOut(int r) {
    double start = tangentPrice[r] > 0 ? tangentPrice[r] : 1 / (1.0 + limits[r]);
    tangentPrice[r] = 0;
    for (int at = 0; at < levels; at++) {
      for (int i = first[at]; i <= last[at]; i++) {
        others[at][i] = term(at, i);
      }
    }
    if (spent(r, 0) <= limits[r]) {
      return tangent();
    }
    double low = 0;
    double high = start;
    while (spent(r, high) > limits[r] && high < HIGHEST) {
      low = high;
      high *= STRIDE;
    }
    while (low == 0) {
      double lower = high / STRIDE;
      if (spent(r, lower) > limits[r] || lower < Double.MIN_NORMAL) {
        low = lower;
      } else {
        high = lower;
      }
    }
    for (int i = 0; i < HALVINGS; i++) {
      double middle = (low + high) / 2;
      if (spent(r, middle) > limits[r]) {
        low = middle;
      } else {
        high = middle;
      }
    }
    tangentPrice[r] = high;
    return tangent();
  }

  /** What the choices of the least priced tangent cost at a price. */
  private double spent(int r, double at) {
    double sum = 0;
    for (int level = 0; level < levels; level++) {
      double[] base = others[level];
      double[] costs = cost[level][r];
      int best = first[level];
      double least = base[best] + at * costs[best];
      for (int i = best + 1; i <= last[level]; i++) {
        double term = base[i] + at * costs[i];
        if (term < least) {
          least = term;
          best = i;
        }
      }
      sum += costs[best];
    }
    return sum;
  }

  /** A part's alternative of the least priced term. */
  int cheapest(int at) {
    int best = first[at];
    double least = Double.POSITIVE_INFINITY;
    for (int i = first[at]; i <= last[at]; i++) {
      double term = term(at, i);
      if (term < least) {
        least = term;
        best = i;
      }
    }
    return best;
  }

  /** The priced term of an alternative. */
  double term(int at, int i) {
    return base[at][i] + priced(tangentPrice, at, i);
  }

  private double tangent() {
    double sum = 0;
    for (int at = 0; at < levels; at++) {
      choice[at] = cheapest(at);
      sum += term(at, choice[at]);
    }
    for (int r = 0; r < limits.length; r++) {
      sum -= tangentPrice[r] == 0 ? 0 : tangentPrice[r] * limits[r];
    }
    return sum;
  }
}
