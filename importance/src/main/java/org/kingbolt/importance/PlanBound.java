package org.kingbolt.importance;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import org.kingbolt.core.diagram.WorkMeter;

/**
 * Lower bounds on the failing probability that a partial plan can lead to within limits: from a few
 * references with prices, and from the best of everything that is not decided.
 */
final class PlanBound {

  /** How often the reference is moved towards the choices that its own bound prefers. */
  private static final int MOVES = 40;

  private static final int KEPT = 3;
  private static final int HALVINGS = 30;
  private static final double FARTHEST = 60;

  private final PlanSteps steps;
  private final WorkMeter meter;
  private final List<PlanPrices> prices = new ArrayList<>();
  private final PlanCeiling ceiling;
  private double root = Double.NEGATIVE_INFINITY;

  PlanBound(
      PlanSteps steps,
      PlanAlternative[][] menus,
      long[] limits,
      double[][] start,
      WorkMeter meter) {
    this.steps = steps;
    this.meter = meter;
    this.ceiling = new PlanCeiling(steps, menus);
    List<PlanPrices> tried = new ArrayList<>();
    double[] odds = new double[steps.count()];
    for (int at = 0; at < odds.length; at++) {
      odds[at] = odds(start[0][at], start[1][at]);
    }
    for (int move = 0; move < MOVES; move++) {
      PlanReference reference = reference(odds);
      if (!reference.isUseful()) {
        break;
      }
      PlanTerms terms = new PlanTerms(menus, reference);
      PlanPrices best = priced(reference, terms, limits);
      tried.add(best);
      double step = 2.0 / (move + 3);
      for (int at = 0; at < odds.length; at++) {
        PlanAlternative choice = menus[at][best.choice(at)];
        odds[at] += step * (odds(choice.working(), choice.failing()) - odds[at]);
      }
    }
    tried.sort(Comparator.comparingDouble((PlanPrices p) -> -orNothing(p.whole(limits))));
    for (PlanPrices best : tried.subList(0, Math.min(KEPT, tried.size()))) {
      if (orNothing(best.whole(limits)) == Double.NEGATIVE_INFINITY) {
        continue;
      }
      root = Math.max(root, best.whole(limits));
      PlanTerms terms = new PlanTerms(menus, best.reference());
      prices.add(best);
      for (double scale : new double[] {0.5, 0.75, 1.35, 2}) {
        for (int r = 0; r < limits.length; r++) {
          double[] other = best.prices();
          other[r] *= scale;
          prices.add(new PlanPrices(best.reference(), terms, other));
        }
      }
    }
    root = Math.max(root, ceiling.logRoot());
  }

  private static double orNothing(double value) {
    return Double.isNaN(value) ? Double.NEGATIVE_INFINITY : value;
  }

  private static double odds(double working, double failing) {
    double odds = Math.log(failing / working);
    return Math.max(-FARTHEST, Math.min(FARTHEST, Double.isNaN(odds) ? 0 : odds));
  }

  private PlanReference reference(double[] odds) {
    double[] working = new double[odds.length];
    double[] failing = new double[odds.length];
    for (int at = 0; at < odds.length; at++) {
      working[at] = 1 / (1 + Math.exp(odds[at]));
      failing[at] = 1 / (1 + Math.exp(-odds[at]));
    }
    return new PlanReference(steps, working, failing);
  }

  /** The prices at which a reference says most, resource by resource. */
  private PlanPrices priced(PlanReference reference, PlanTerms terms, long[] limits) {
    double[] price = new double[limits.length];
    PlanPrices best = new PlanPrices(reference, terms, price);
    int rounds = limits.length == 1 ? 1 : 3;
    for (int round = 0; round < rounds; round++) {
      for (int r = 0; r < limits.length; r++) {
        double low = 0;
        price[r] = 0;
        PlanPrices at = new PlanPrices(reference, terms, price);
        double high = 1 / (1.0 + limits[r]);
        while (at.spent(r) > limits[r] && high < 1e30) {
          low = price[r];
          price[r] = high;
          high *= 2;
          at = new PlanPrices(reference, terms, price);
        }
        high = price[r];
        for (int i = 0; i < HALVINGS && high > low; i++) {
          meter.at(0);
          price[r] = (low + high) / 2;
          at = new PlanPrices(reference, terms, price);
          if (at.spent(r) > limits[r]) {
            low = price[r];
          } else {
            high = price[r];
          }
        }
        price[r] = high;
        best = new PlanPrices(reference, terms, price.clone());
      }
    }
    return best;
  }

  /** A bound on the log of every plan's failing probability within the limits given at first. */
  double root() {
    return root;
  }

  /** A quick bound: with everything to come at its best. */
  double simple(int step, PlanLabels labels, int label) {
    return ceiling.log(step, labels, label);
  }

  /** A bound for the plans that a partial one leads to, with these amounts left to spend. */
  double of(int step, PlanLabels labels, int label, long[] left, double[] logs) {
    int width = labels.width;
    for (int place = 0; place < width; place++) {
      logs[place] = Math.log(labels.fails[label * width + place]);
    }
    double best = ceiling.log(step, labels, label);
    PlanReference last = null;
    double base = 0;
    for (PlanPrices price : prices) {
      if (price.reference() != last) {
        last = price.reference();
        base = last.at(step, logs);
      }
      double bound = base + price.rest(step, left);
      if (bound > best) {
        best = bound;
      }
    }
    return best;
  }

  /**
   * The least amount of a resource that must be left for a partial plan to reach a target, as far
   * as the bounds tell; a very large number where it cannot be reached at all.
   */
  double needed(
      int step,
      PlanLabels labels,
      int label,
      long[] left,
      int resource,
      double logTarget,
      double[] logs) {
    if (ceiling.log(step, labels, label) > logTarget) {
      return Double.POSITIVE_INFINITY;
    }
    int width = labels.width;
    for (int place = 0; place < width; place++) {
      logs[place] = Math.log(labels.fails[label * width + place]);
    }
    double most = 0;
    for (PlanPrices price : prices) {
      if (price.price(resource) > 0) {
        double bound = price.reference().at(step, logs) + price.rest(step, left);
        double short_ = (bound - logTarget) / price.price(resource);
        double amount = left[resource] + short_;
        if (amount > most) {
          most = amount;
        }
      }
    }
    return most;
  }
}
