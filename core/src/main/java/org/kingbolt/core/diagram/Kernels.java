package org.kingbolt.core.diagram;

/**
 * The innermost loops over the nodes of one level.
 *
 * <p>Each has a method of its own, with its arrays as parameters. The two that matter most are
 * written out four nodes at a time: so they are too long for the compiler to copy them into their
 * callers, where it has been seen to make them run at half the speed.
 */
final class Kernels {

  private Kernels() {}

  /** Works out nodes from their children; from the deepest level up. */
  static void up(
      int[] low, int[] high, double[] works, double[] fails, int from, int to, double p, double q) {
    int id = from;
    for (; id <= to - 4; id += 4) {
      int l = low[id];
      int h = high[id];
      works[id] = p * works[h] + q * works[l];
      fails[id] = p * fails[h] + q * fails[l];
      l = low[id + 1];
      h = high[id + 1];
      works[id + 1] = p * works[h] + q * works[l];
      fails[id + 1] = p * fails[h] + q * fails[l];
      l = low[id + 2];
      h = high[id + 2];
      works[id + 2] = p * works[h] + q * works[l];
      fails[id + 2] = p * fails[h] + q * fails[l];
      l = low[id + 3];
      h = high[id + 3];
      works[id + 3] = p * works[h] + q * works[l];
      fails[id + 3] = p * fails[h] + q * fails[l];
    }
    for (; id < to; id++) {
      int l = low[id];
      int h = high[id];
      works[id] = p * works[h] + q * works[l];
      fails[id] = p * fails[h] + q * fails[l];
    }
  }

  /**
   * Passes reach on to the children and leaves zero behind; from the first level down.
   *
   * @return the sum of what was passed on times the difference that the variable makes
   */
  static double down(
      int[] low, int[] high, double[] side, double[] reach, int from, int to, double p, double q) {
    double sum0 = 0;
    double sum1 = 0;
    double sum2 = 0;
    double sum3 = 0;
    int id = from;
    for (; id <= to - 4; id += 4) {
      double here0 = reach[id];
      double here1 = reach[id + 1];
      double here2 = reach[id + 2];
      double here3 = reach[id + 3];
      reach[id] = 0;
      reach[id + 1] = 0;
      reach[id + 2] = 0;
      reach[id + 3] = 0;
      int l = low[id];
      int h = high[id];
      reach[l] += q * here0;
      reach[h] += p * here0;
      sum0 += here0 * (side[h] - side[l]);
      l = low[id + 1];
      h = high[id + 1];
      reach[l] += q * here1;
      reach[h] += p * here1;
      sum1 += here1 * (side[h] - side[l]);
      l = low[id + 2];
      h = high[id + 2];
      reach[l] += q * here2;
      reach[h] += p * here2;
      sum2 += here2 * (side[h] - side[l]);
      l = low[id + 3];
      h = high[id + 3];
      reach[l] += q * here3;
      reach[h] += p * here3;
      sum3 += here3 * (side[h] - side[l]);
    }
    for (; id < to; id++) {
      double here = reach[id];
      reach[id] = 0;
      int l = low[id];
      int h = high[id];
      reach[l] += q * here;
      reach[h] += p * here;
      sum0 += here * (side[h] - side[l]);
    }
    return sum0 + sum1 + (sum2 + sum3);
  }

  /** Works out nodes for a run of vectors each; row of a node: all works, then all fails. */
  static void rows(
      double[][] rows, int[] row, int[] low, int[] high, int from, int to, double[] p, double[] q) {
    for (int id = from; id < to; id++) {
      combine(rows[row[id]], rows[row[high[id]]], rows[row[low[id]]], p, q);
    }
  }

  /** The loop that the compiler turns into vector instructions: one array written, one index. */
  private static void combine(double[] to, double[] high, double[] low, double[] p, double[] q) {
    for (int i = 0; i < p.length; i++) {
      to[i] = p[i] * high[i] + q[i] * low[i];
    }
  }
}
