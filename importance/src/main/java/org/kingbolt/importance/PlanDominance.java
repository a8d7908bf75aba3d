package org.kingbolt.importance;

import java.util.Arrays;
import java.util.Map;
import java.util.TreeMap;
import org.kingbolt.core.diagram.WorkMeter;

/**
 * Drops partial plans that others beat: with the same remembered decisions, at most the same cost
 * in every resource, and a failing probability of the system that is no larger, whatever is chosen
 * for the variables to come. That probability is a sum of the values that matter, with weights that
 * depend on those variables only; bounds on the weights tell whether one sum can exceed the other.
 * With a tolerance, the sum may be larger by so much, relatively.
 */
final class PlanDominance {

  private static final int CHECKS = 400;
  private static final long MOST_EXACT = 1L << 53;

  private final int first;
  private final double tolerance;
  private final double[] least;
  private final double[] most;
  private final double spare;
  private final WorkMeter meter;

  /** Sorts by one resource first; takes the least and the most that the weights can be. */
  PlanDominance(
      int first, double tolerance, double[] least, double[] most, double spare, WorkMeter meter) {
    this.first = first;
    this.tolerance = tolerance;
    this.least = least;
    this.most = most;
    this.spare = spare;
    this.meter = meter;
  }

  /** The rows to keep, by key, then cost. */
  int[] kept(PlanLabels labels) {
    double[] sums = new double[labels.size];
    for (int row = 0; row < labels.size; row++) {
      sums[row] = middle(labels, row);
    }
    int[] order = PlanSort.sorted(labels.size, (a, b) -> compare(labels, sums, a, b));
    int[] kept = new int[order.length];
    int size = 0;
    int from = 0;
    while (from < order.length) {
      int to = from + 1;
      while (to < order.length && labels.key[order[to]] == labels.key[order[from]]) {
        to++;
      }
      size =
          labels.resources <= 2 && labels.width == 1 && comparable(labels)
              ? byStairs(labels, order, from, to, kept, size)
              : byScan(labels, sums, order, from, to, kept, size);
      from = to;
    }
    return Arrays.copyOf(kept, size);
  }

  /** Whether second costs are whole numbers as doubles too. */
  private static boolean comparable(PlanLabels labels) {
    for (int i = 0; i < labels.size * labels.resources && labels.resources == 2; i++) {
      if (labels.cost[i] > MOST_EXACT) {
        return false;
      }
    }
    return true;
  }

  private int compare(PlanLabels labels, double[] all, int a, int b) {
    int resources = labels.resources;
    int result = Integer.compare(labels.key[a], labels.key[b]);
    if (result == 0) {
      result = Long.compare(labels.cost[a * resources + first], labels.cost[b * resources + first]);
    }
    for (int r = 0; r < resources && result == 0; r++) {
      result = Long.compare(labels.cost[a * resources + r], labels.cost[b * resources + r]);
    }
    result = result == 0 && labels.width > 1 ? Double.compare(all[a], all[b]) : result;
    for (int place = 0; place < labels.width && result == 0; place++) {
      result = Double.compare(labels.rank(a, place), labels.rank(b, place));
    }
    return result;
  }

  /** A rank that is still good enough to beat this one. */
  private double relaxed(double rank) {
    return rank < 0 ? rank / (1 + tolerance) : rank;
  }

  /** With one value and at most one further cost: the best value by that cost. */
  private int byStairs(PlanLabels labels, int[] order, int from, int to, int[] kept, int start) {
    int size = start;
    TreeMap<Long, Double> stairs = new TreeMap<>();
    for (int i = from; i < to; i++) {
      meter.at(labels.size);
      int row = order[i];
      long x = labels.resources == 2 ? labels.cost[row * 2 + 1 - first] : 0;
      double y = labels.rank(row, 0);
      Map.Entry<Long, Double> below = stairs.floorEntry(x);
      if (below != null && below.getValue() <= relaxed(y)) {
        continue;
      }
      kept[size++] = row;
      if (below != null && below.getValue() <= y) {
        continue;
      }
      Map.Entry<Long, Double> next = stairs.ceilingEntry(x);
      while (next != null && next.getValue() >= y) {
        stairs.remove(next.getKey());
        next = stairs.ceilingEntry(x);
      }
      stairs.put(x, y);
    }
    return size;
  }

  private int byScan(
      PlanLabels labels, double[] all, int[] order, int from, int to, int[] kept, int start) {
    int size = start;
    int[] recent = new int[to - from];
    double[] sums = new double[to - from];
    int count = 0;
    for (int i = from; i < to; i++) {
      meter.at(labels.size);
      int row = order[i];
      double sum = all[row];
      double enough = sum * (1 + tolerance);
      int winner = -1;
      int checks = 0;
      for (int at = count - 1; at >= 0 && winner < 0 && checks < CHECKS; at--) {
        if (sums[at] <= enough) {
          checks++;
          winner = beats(labels, recent[at], row) ? at : -1;
        }
      }
      if (winner >= 0) {
        move(recent, sums, winner, count);
      } else {
        kept[size++] = row;
        recent[count] = row;
        sums[count++] = sum;
      }
    }
    return size;
  }

  /** What has just beaten another is tried first the next time. */
  private static void move(int[] recent, double[] sums, int winner, int count) {
    int row = recent[winner];
    double sum = sums[winner];
    System.arraycopy(recent, winner + 1, recent, winner, count - 1 - winner);
    System.arraycopy(sums, winner + 1, sums, winner, count - 1 - winner);
    recent[count - 1] = row;
    sums[count - 1] = sum;
  }

  /** The failing probability at middling weights, to tell quickly what cannot beat another. */
  private double middle(PlanLabels labels, int row) {
    double sum = 0;
    for (int place = 0; place < labels.width; place++) {
      sum += (least[place] + most[place]) / 2 * labels.fails[row * labels.width + place];
    }
    return sum;
  }

  private boolean beats(PlanLabels labels, int a, int b) {
    int resources = labels.resources;
    for (int r = 0; r < resources; r++) {
      if (labels.cost[a * resources + r] > labels.cost[b * resources + r]) {
        return false;
      }
    }
    int width = labels.width;
    double sum = 0;
    double atMost = 0;
    double gain = 0;
    for (int place = 0; place < width; place++) {
      int i = a * width + place;
      int j = b * width + place;
      double more =
          labels.fails[j] <= labels.works[j]
              ? labels.fails[i] - labels.fails[j]
              : labels.works[j] - labels.works[i];
      more -= tolerance * labels.fails[j];
      sum += more * (more > 0 ? most[place] : least[place]);
      atMost += more * most[place];
      gain = Math.max(gain, -more);
    }
    return sum <= 0 || atMost + spare * gain <= 0;
  }
}
