package org.kingbolt.importance;

import java.util.Arrays;
import java.util.BitSet;
import org.kingbolt.core.diagram.WorkMeter;

/** Improves whole plans by changing one part, or two at a time, within limits. */
final class PlanRounding {

  private static final double GAIN = 1e-12;

  /** How far the first of two changes may go, in alternatives. */
  private static final int FARTHEST = 4;

  private final PlanWeb web;
  private final long[] limits;
  private final WorkMeter meter;
  private final int levels;
  private final double[] value;
  private final double[] reach;
  private final double[] onFailed;
  private final double[] onWorking;
  private final long[] left;
  private double fails;
  private int bestAt;
  private int bestChoice;
  private double bestFails;

  PlanRounding(PlanWeb web, long[] limits, WorkMeter meter) {
    this.web = web;
    this.limits = limits;
    this.meter = meter;
    levels = web.levels();
    value = new double[web.low.length];
    value[0] = 1;
    reach = new double[value.length];
    onFailed = new double[levels];
    onWorking = new double[levels];
    left = new long[limits.length];
  }

  /** Whether a plan keeps the limits; leaves what it leaves of them. */
  boolean fits(int[] choice) {
    System.arraycopy(limits, 0, left, 0, left.length);
    boolean fits = true;
    for (int r = 0; r < left.length; r++) {
      for (int at = 0; at < levels; at++) {
        left[r] -= web.part(at).cost()[choice[at]][r];
      }
      fits &= left[r] >= 0;
    }
    return fits;
  }

  double fails() {
    return fails;
  }

  BitSet chosen(int[] choice) {
    BitSet chosen = new BitSet();
    for (int at = 0; at < levels; at++) {
      chosen.or(web.part(at).chosen()[choice[at]]);
    }
    return chosen;
  }

  private void scan(int[] choice) {
    meter.now(value.length / 4);
    for (int at = 0; at < levels; at++) {
      double q = web.part(at).failing()[choice[at]];
      double p = web.part(at).working()[choice[at]];
      for (int id = web.from[at]; id < web.from[at + 1]; id++) {
        value[id] = q * value[web.low[id]] + p * value[web.high[id]];
      }
    }
    fails = value[web.root];
    Arrays.fill(reach, 0);
    reach[web.root] = 1;
    for (int at = levels - 1; at >= 0; at--) {
      double q = web.part(at).failing()[choice[at]];
      double p = web.part(at).working()[choice[at]];
      double a = 0;
      double b = 0;
      for (int id = web.from[at]; id < web.from[at + 1]; id++) {
        double by = reach[id];
        a += by * value[web.low[id]];
        b += by * value[web.high[id]];
        reach[web.low[id]] += q * by;
        reach[web.high[id]] += p * by;
      }
      onFailed[at] = a;
      onWorking[at] = b;
    }
  }

  /** Spends what is left on one change after another; the plan must keep the limits. */
  void fill(int[] choice) {
    fits(choice);
    scan(choice);
    while (findBest(choice, -1, true)) {
      change(choice, bestAt, bestChoice);
      scan(choice);
    }
  }

  private void change(int[] choice, int at, int to) {
    long[][] cost = web.part(at).cost();
    for (int r = 0; r < left.length; r++) {
      left[r] += cost[choice[at]][r] - cost[to][r];
    }
    choice[at] = to;
  }

  /** The change of a part that gains most, for its cost or in all. */
  private boolean findBest(int[] choice, int not, boolean forCost) {
    double best = forCost ? 0 : Double.NEGATIVE_INFINITY;
    boolean found = false;
    for (int at = 0; at < levels; at++) {
      PlanPart part = web.part(at);
      int now = choice[at];
      for (int i = forCost ? now + 1 : 0; i < part.size() && at != not; i++) {
        double dq = part.failing()[i] - part.failing()[now];
        double dp = part.working()[i] - part.working()[now];
        double gain = -(onFailed[at] * dq + onWorking[at] * dp);
        double price = price(part.cost()[now], part.cost()[i]);
        double worth = forCost ? gain / (price + 1e-9) : gain;
        if (price >= 0 && worth > best && (!forCost || gain > GAIN * fails)) {
          best = worth;
          found = true;
          bestAt = at;
          bestChoice = i;
          bestFails = fails - gain;
        }
      }
    }
    return found;
  }

  /** What a change takes of what is limited, as a share; negative if there is not so much left. */
  private double price(long[] from, long[] to) {
    double price = 0;
    for (int r = 0; r < left.length; r++) {
      long more = to[r] - from[r];
      if (more > left[r]) {
        return -1;
      }
      price += Math.max(0, more) / (1.0 + limits[r]);
    }
    return price;
  }

  /** Changes two parts at a time as long as that helps. */
  void exchange(int[] choice) {
    fill(choice);
    double now = fails;
    int quiet = 0;
    for (int at = 0; quiet < levels; at = (at + 1) % levels) {
      quiet++;
      int before = choice[at];
      int from = Math.max(0, before - FARTHEST);
      int to = Math.min(web.part(at).size() - 1, before + FARTHEST);
      for (int i = from; i <= to; i++) {
        if (i == choice[at]) {
          continue;
        }
        int old = choice[at];
        change(choice, at, i);
        scan(choice);
        boolean helps = findBest(choice, at, false) && bestFails < now * (1 - GAIN);
        if (helps) {
          change(choice, bestAt, bestChoice);
          now = bestFails;
          quiet = 0;
        } else {
          change(choice, at, old);
        }
      }
    }
    scan(choice);
  }
}
