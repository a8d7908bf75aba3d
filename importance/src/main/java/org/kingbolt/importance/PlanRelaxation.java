package org.kingbolt.importance;

import java.util.Arrays;

/**
 * A convex relaxation of the choice of a best plan.
 *
 * <p>The system's failing probability F is a sum, over the paths of the diagram that end in
 * failure, of products of the two sides of parts. Let every part take a mixture of its alternatives
 * and each of its two sides the mixture's geometric mean, as a number of its own. Then each path
 * contributes the exponential of a linear function of the mixtures, the logarithm of F is convex in
 * them, and equals that of the failing probability where no alternatives are mixed. So its tangent
 * at any point, minimised over the plans within limits by prices on the resources, bounds all of
 * them from below.
 *
 * <p>Sides below a floor are taken to be at the floor; F, which increases in each side of each part
 * with a slope of at most 1, is raised by at most the floor times the number of sides, which the
 * bound allows for.
 *
 * <p>Sources: Duffin, Peterson and Zener, Geometric Programming, 1967; Everett, Oper. Res. 11
 * (1963) 399, for the prices (from memory).
 */
final class PlanRelaxation {

  private static final double SHARE = 1e-9;
  private static final int NEWTON = 12;
  private static final double NONE = Double.POSITIVE_INFINITY;

  private final PlanWeb web;
  private final long[] limits;
  private final double[][] logQ;
  private final double[][] logP;
  private final double[][][] cost;
  private final double floors;
  private final int levels;
  private final double[] value;
  private final double[] reach;
  private final double[] u;
  private final double[] v;
  private final double[] q;
  private final double[] p;

  /** The shares of failing with a part failed, and working. */
  private final double[] failedShare;

  private final double[] worksShare;
  private double fails;

  /** The mixture of each part; only alternatives from first to last may be used. */
  final double[][] mix;

  final int[] first;
  final int[] last;
  final double[] price;
  private final PlanTangent tangent;

  PlanRelaxation(PlanWeb web, long[] limits, double floor) {
    this.web = web;
    this.limits = limits;
    this.levels = web.levels();
    this.floors = floor * 2 * levels;
    logQ = new double[levels][];
    logP = new double[levels][];
    cost = new double[levels][limits.length][];
    mix = new double[levels][];
    for (int at = 0; at < levels; at++) {
      PlanPart part = web.part(at);
      logQ[at] = Arrays.stream(part.failing()).map(x -> Math.log(Math.max(x, floor))).toArray();
      logP[at] = Arrays.stream(part.working()).map(x -> Math.log(Math.max(x, floor))).toArray();
      for (int r = 0; r < limits.length; r++) {
        int resource = r;
        cost[at][r] = Arrays.stream(part.cost()).mapToDouble(c -> c[resource]).toArray();
      }
      mix[at] = new double[part.size()];
    }
    value = new double[web.low.length];
    reach = new double[web.low.length];
    value[0] = 1;
    u = new double[levels];
    v = new double[levels];
    q = new double[levels];
    p = new double[levels];
    failedShare = new double[levels];
    worksShare = new double[levels];
    first = new int[levels];
    last = new int[levels];
    price = new double[limits.length];
    tangent = new PlanTangent(cost, limits, first, last);
  }

  /** Makes the state fit the mixtures, which have been changed. */
  void start() {
    for (int at = 0; at < levels; at++) {
      settle(at);
    }
    up(false);
    down(false);
  }

  private void settle(int at) {
    double a = 0;
    double b = 0;
    for (int i = first[at]; i <= last[at]; i++) {
      double share = mix[at][i];
      if (share > 0) {
        a += share * logQ[at][i];
        b += share * logP[at][i];
      }
    }
    u[at] = a;
    v[at] = b;
    q[at] = Math.exp(a);
    p[at] = Math.exp(b);
  }

  /** The bound with each part at the best that is left of it, whatever that costs. */
  double ceiling() {
    for (int at = 0; at < levels; at++) {
      double failing = web.part(at).failing()[last[at]];
      double working = web.part(at).working()[last[at]];
      for (int id = web.from[at]; id < web.from[at + 1]; id++) {
        value[id] = failing * value[web.low[id]] + working * value[web.high[id]];
      }
    }
    return Math.log(value[web.root]);
  }

  /** Improves all mixtures at the present prices, each by one exchange on the way up and down. */
  void improve() {
    up(true);
    down(true);
  }

  private void up(boolean improving) {
    for (int at = 0; at < levels; at++) {
      if (improving && first[at] < last[at]) {
        exchange(at);
      }
      double failing = q[at];
      double working = p[at];
      for (int id = web.from[at]; id < web.from[at + 1]; id++) {
        value[id] = failing * value[web.low[id]] + working * value[web.high[id]];
      }
    }
    fails = value[web.root];
  }

  private void down(boolean improving) {
    Arrays.fill(reach, 0);
    reach[web.root] = 1;
    for (int at = levels - 1; at >= 0; at--) {
      if (improving && first[at] < last[at]) {
        exchange(at);
      }
      double failing = q[at];
      double working = p[at];
      double a = 0;
      double b = 0;
      for (int id = web.from[at]; id < web.from[at + 1]; id++) {
        double by = reach[id];
        int low = web.low[id];
        int high = web.high[id];
        a += by * value[low];
        b += by * value[high];
        reach[low] += failing * by;
        reach[high] += working * by;
      }
      failedShare[at] = a * failing / fails;
      worksShare[at] = b * working / fails;
    }
  }

  /** Moves share from the part's worst alternative in the mixture to the best one. */
  private void exchange(int at) {
    double a = 0;
    double b = 0;
    for (int id = web.from[at]; id < web.from[at + 1]; id++) {
      a += reach[id] * value[web.low[id]];
      b += reach[id] * value[web.high[id]];
    }
    a *= q[at];
    b *= p[at];
    double rest = Math.max(0, fails - a - b);
    double[] shares = mix[at];
    int best = -1;
    int worst = -1;
    double least = NONE;
    double most = -NONE;
    for (int i = first[at]; i <= last[at]; i++) {
      double term = (a * logQ[at][i] + b * logP[at][i]) / fails + tangent.priced(price, at, i);
      if (term < least) {
        least = term;
        best = i;
      }
      if (shares[i] > 0 && term > most) {
        most = term;
        worst = i;
      }
    }
    if (best < 0 || worst < 0 || most - least < SHARE) {
      return;
    }
    double dq = logQ[at][best] - logQ[at][worst];
    double dp = logP[at][best] - logP[at][worst];
    double dc = tangent.priced(price, at, best) - tangent.priced(price, at, worst);
    double t = lineMinimum(a, b, rest, dq, dp, dc, shares[worst]);
    shares[best] += t;
    shares[worst] -= t;
    if (shares[worst] < SHARE) {
      shares[best] += shares[worst];
      shares[worst] = 0;
    }
    settle(at);
    fails = a * Math.exp(t * dq) + b * Math.exp(t * dp) + rest;
  }

  /** Where log(a e^(t dq) + b e^(t dp) + rest) + t dc is least between 0 and the end. */
  private static double lineMinimum(
      double a, double b, double rest, double dq, double dp, double dc, double end) {
    double low = 0;
    double high = end;
    double t = end;
    for (int i = 0; i < NEWTON; i++) {
      double x = a * Math.exp(t * dq);
      double y = b * Math.exp(t * dp);
      double sum = x + y + rest;
      double mean = (x * dq + y * dp) / sum;
      double slope = mean + dc;
      if (i == 0 && slope <= 0) {
        return end;
      }
      if (slope > 0) {
        high = t;
      } else {
        low = t;
      }
      double curve = (x * dq * dq + y * dp * dp) / sum - mean * mean;
      double next = curve > 0 ? t - slope / curve : low;
      next = next > low && next < high ? next : (low + high) / 2;
      if (Math.abs(next - t) < 1e-4 * end) {
        return next;
      }
      t = next;
    }
    return t;
  }

  /** Raises prices of what the mixtures overspend, lowers those of what they leave. */
  void reprice(double rate) {
    for (int r = 0; r < price.length; r++) {
      double spent = 0;
      for (int at = 0; at < levels; at++) {
        for (int i = first[at]; i <= last[at]; i++) {
          spent += mix[at][i] > 0 ? mix[at][i] * cost[at][r][i] : 0;
        }
      }
      double off = (spent - limits[r]) / Math.max(1, limits[r]);
      double start = tangent.price(r) > 0 ? tangent.price(r) : 1e-3 / (1.0 + limits[r]);
      price[r] = price[r] > 0 ? price[r] : start;
      price[r] *= Math.exp(rate * Math.max(-1, Math.min(1, off)));
    }
  }

  /** The bound from the tangent here; leaves the choices and the shares that belong to it. */
  double bound() {
    up(true);
    down(false);
    for (int at = 0; at < levels; at++) {
      for (int i = first[at]; i <= last[at]; i++) {
        double term =
            failedShare[at] * (logQ[at][i] - u[at]) + worksShare[at] * (logP[at][i] - v[at]);
        tangent.put(at, i, term);
      }
    }
    double log = Math.log(fails) + tangent.least(price);
    double raised = Math.log(floors);
    return log > raised ? log + Math.log1p(-Math.exp(raised - log)) : -NONE;
  }

  /** By part: the alternative that the last bound's tangent prefers. */
  int[] choices() {
    return tangent.choices();
  }

  /** Takes away the outermost alternatives with which the last bound would be above a cutoff. */
  boolean fix(double bound, double cutoff) {
    boolean changed = false;
    for (int at = 0; at < levels; at++) {
      int from = first[at];
      int to = last[at];
      double least = from < to ? tangent.term(at, tangent.cheapest(at)) : 0;
      while (from < to && bound + tangent.term(at, from) - least > cutoff) {
        from++;
      }
      while (from < to && bound + tangent.term(at, to) - least > cutoff) {
        to--;
      }
      if (to - from < last[at] - first[at]) {
        narrow(at, from, to);
        settle(at);
        changed = true;
      }
    }
    if (changed) {
      up(false);
      down(false);
    }
    return changed;
  }

  private void drop(int at, int gone, int instead) {
    double share = mix[at][gone];
    mix[at][gone] = 0;
    mix[at][instead] += share;
  }

  /** Narrows a part's alternatives; the mixture moves to the nearest that stay. */
  void narrow(int at, int from, int to) {
    while (first[at] < from) {
      drop(at, first[at]++, first[at]);
    }
    while (last[at] > to) {
      drop(at, last[at]--, last[at]);
    }
  }

  /**
   * How much a division of a part's alternatives promises to raise the bounds: the product of what
   * the nearest alternatives to both sides of its mixture add, all else unchanged.
   */
  double promise(int at) {
    if (first[at] == last[at]) {
      return -1;
    }
    double mean = 0;
    for (int i = first[at]; i <= last[at]; i++) {
      mean += mix[at][i] > 0 ? mix[at][i] * tangent.priced(price, at, i) : 0;
    }
    int middle = middle(at);
    return Math.max(0, added(at, middle, mean)) * Math.max(0, added(at, middle + 1, mean));
  }

  private double added(int at, int i, double mean) {
    double more =
        failedShare[at] * Math.expm1(logQ[at][i] - u[at])
            + worksShare[at] * Math.expm1(logP[at][i] - v[at]);
    return Math.log1p(more) + tangent.priced(price, at, i) - mean;
  }

  /** The last alternative that is at least as bad as the mixture: where to divide. */
  int middle(int at) {
    int to = first[at];
    while (to < last[at] - 1 && logQ[at][to + 1] >= u[at]) {
      to++;
    }
    return to;
  }
}
