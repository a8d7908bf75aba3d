package org.kingbolt.core.diagram;

import java.util.Arrays;

/**
 * k-out-of-n:G; series is n out of n, parallel 1 out of n. All slots are alike, so that parts may
 * change places.
 */
final class Threshold extends Operator {

  private final int k;
  private final int n;

  Threshold(int k, int n) {
    this.k = k;
    this.n = n;
  }

  /** How many slots must work. */
  int needed() {
    return k;
  }

  boolean isSeries() {
    return k == n;
  }

  boolean isChain() {
    return k == n || k == 1;
  }

  /** The number of nodes on a level of the template: the counts of working slots still open. */
  int width(int level) {
    return most(level) - least(level) + 1;
  }

  /** The largest count of working slots before a level that has not settled the outcome. */
  private int most(int level) {
    return Math.min(level, k - 1);
  }

  private int least(int level) {
    return Math.max(0, k - (n - level));
  }

  @Override
  int levels() {
    return n;
  }

  @Override
  Diagram make(WorkMeter meter) {
    if (isChain()) {
      return n == 0 ? Diagram.constant(isSeries()) : Layers.chain(n, isSeries());
    }
    Layers layers = new Layers();
    long held = 0;
    for (int level = 0; level < n; level++) {
      int least = least(level);
      int nextLeast = least(level + 1);
      int[] low = new int[width(level)];
      int[] high = new int[low.length];
      for (int c = least; c <= most(level); c++) {
        low[c - least] = c < nextLeast ? Layers.TO_FAILS : c - nextLeast;
        high[c - least] = c + 1 == k ? Layers.TO_WORKS : c + 1 - nextLeast;
      }
      held += low.length;
      meter.at(held);
      layers.add(level, low, high);
    }
    return layers.diagram();
  }

  /** By number of working slots so far; those that can no longer change anything settle. */
  @Override
  void expect(double[] works, double[] fails, double[] result, WorkMeter meter) {
    Arrays.fill(result, 0);
    if (isChain()) {
      int all = isSeries() ? 0 : 1;
      result[all] = 1;
      for (int slot = 0; slot < n; slot++) {
        result[1 - all] += result[all] * (isSeries() ? fails : works)[slot];
        result[all] *= (isSeries() ? works : fails)[slot];
      }
      return;
    }
    double[] mass = new double[k];
    mass[0] = 1;
    for (int slot = 0; slot < n; slot++) {
      meter.at(k >> 3);
      double up = works[slot];
      double down = fails[slot];
      int most = most(slot);
      int least = least(slot);
      if (most == k - 1) {
        result[0] += mass[most] * up;
        mass[most] *= down;
      } else {
        mass[most + 1] = mass[most] * up;
        mass[most] *= down;
      }
      for (int count = most - 1; count >= least; count--) {
        mass[count + 1] += mass[count] * up;
        mass[count] *= down;
      }
      if (k - (n - slot) >= 0) {
        result[1] += mass[least];
        mass[least] = 0;
      }
    }
  }
}
