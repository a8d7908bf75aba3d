package org.kingbolt.importance;

import java.util.Arrays;

/**
 * Partial plans after a step: for each its costs, both sides of the values that matter, its
 * remembered decisions, where it came from, and a bound on what it can lead to. Rows of growing
 * arrays.
 */
final class PlanLabels {

  private static final double SAME = 1e-12;

  final int resources;
  final int width;
  int size;
  long[] cost;
  double[] works;
  double[] fails;
  double[] bound;
  int[] key;
  int[] parent;
  int[] choice;

  PlanLabels(int resources, int width, int room) {
    this.resources = resources;
    this.width = width;
    cost = new long[room * resources];
    works = new double[room * width];
    fails = new double[room * width];
    bound = new double[room];
    key = new int[room];
    parent = new int[room];
    choice = new int[room];
  }

  /** A number that is the smaller the likelier to work, to full precision on both sides. */
  static double rank(double working, double failing) {
    return failing <= working ? -1 / failing : 1 / working;
  }

  /** Whether two ranks agree to twelve digits. */
  static boolean sameRank(double rank, double other) {
    double off = Math.abs(rank - other);
    return rank == other
        || (off < Double.POSITIVE_INFINITY
            && off <= SAME * Math.min(Math.abs(rank), Math.abs(other)));
  }

  double rank(int label, int place) {
    int at = label * width + place;
    return rank(works[at], fails[at]);
  }

  /** Makes room for one more row and counts it. */
  int add() {
    if (size == key.length) {
      int room = Math.max(16, size + size / 2);
      cost = Arrays.copyOf(cost, room * resources);
      works = Arrays.copyOf(works, room * width);
      fails = Arrays.copyOf(fails, room * width);
      bound = Arrays.copyOf(bound, room);
      key = Arrays.copyOf(key, room);
      parent = Arrays.copyOf(parent, room);
      choice = Arrays.copyOf(choice, room);
    }
    return size++;
  }

  /** Takes back the row added last. */
  void drop() {
    size--;
  }

  /** Some of the rows, in a new order. */
  PlanLabels take(int[] rows) {
    PlanLabels taken = new PlanLabels(resources, width, rows.length);
    taken.size = rows.length;
    for (int i = 0; i < rows.length; i++) {
      int row = rows[i];
      System.arraycopy(cost, row * resources, taken.cost, i * resources, resources);
      System.arraycopy(works, row * width, taken.works, i * width, width);
      System.arraycopy(fails, row * width, taken.fails, i * width, width);
      taken.bound[i] = bound[row];
      taken.key[i] = key[row];
      taken.parent[i] = parent[row];
      taken.choice[i] = choice[row];
    }
    return taken;
  }
}
