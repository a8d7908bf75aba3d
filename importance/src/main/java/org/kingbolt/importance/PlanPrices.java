package org.kingbolt.importance;

/**
 * A reference with a price for each resource: the sum of the references' terms is least, within any
 * budget, at no less than {@code sum over steps of min(term + price cost) - price budget}
 * (Lagrange).
 */
final class PlanPrices {

  private final PlanReference reference;
  private final double[] prices;

  /** After each step: the sum of the least priced terms of all later steps. */
  private final double[] rest;

  private final int[] choices;
  private final double[] spent;

  PlanPrices(PlanReference reference, PlanTerms terms, double[] prices) {
    this.reference = reference;
    this.prices = prices;
    int count = terms.count();
    this.rest = new double[count];
    this.choices = new int[count];
    this.spent = new double[prices.length];
    double sum = 0;
    for (int at = count - 1; at >= 0; at--) {
      rest[at] = sum;
      double least = Double.POSITIVE_INFINITY;
      for (int choice = 0; choice < terms.choices(at); choice++) {
        double value = terms.value(at, choice);
        for (int r = 0; r < prices.length; r++) {
          value += prices[r] * terms.cost(at, choice, r);
        }
        if (value < least) {
          least = value;
          choices[at] = choice;
        }
      }
      sum += least;
      for (int r = 0; r < prices.length && terms.choices(at) > 0; r++) {
        spent[r] += terms.cost(at, choices[at], r);
      }
    }
    this.whole = sum;
  }

  private final double whole;

  PlanReference reference() {
    return reference;
  }

  /** What the cheapest choices at these prices cost. */
  double spent(int resource) {
    return spent[resource];
  }

  int choice(int at) {
    return choices[at];
  }

  double price(int resource) {
    return prices[resource];
  }

  double[] prices() {
    return prices.clone();
  }

  /** The bound on the log of the failing probability of every plan within limits. */
  double whole(long[] limits) {
    return reference.logFails() + whole - priced(limits);
  }

  private double priced(long[] amounts) {
    double sum = 0;
    for (int r = 0; r < prices.length; r++) {
      sum += prices[r] == 0 ? 0 : prices[r] * amounts[r];
    }
    return sum;
  }

  /** The least that the later steps add, at given amounts left. */
  double rest(int step, long[] left) {
    return rest[step] - priced(left);
  }
}
