package org.kingbolt.core.diagram;

import java.util.Arrays;
import java.util.BitSet;
import java.util.List;

/**
 * Chooses the order in which the slots of a set family are read: slots that stand in common sets
 * close together. Tried are the order as given and a breadth-first one from its far end, both then
 * drawn together by putting every slot at the mean of the centres of its sets; the one whose sets
 * span least is kept.
 *
 * <p>Source of the drawing together: Aloul, Markov &amp; Sakallah, FORCE: a fast and
 * easy-to-implement variable-ordering heuristic, GLSVLSI 2003, 116. Deterministic. Cost: rounds ×
 * total size of the sets.
 */
final class FamilyOrder {

  private static final int ROUNDS = 60;

  private final int[][] sets;
  private final int[][] setsOf;
  private int[] best;
  private long bestSpan = Long.MAX_VALUE;

  private FamilyOrder(int slots, List<BitSet> family) {
    this.sets = family.stream().map(set -> set.stream().toArray()).toArray(int[][]::new);
    int[] count = new int[slots];
    for (int[] set : sets) {
      for (int slot : set) {
        count[slot]++;
      }
    }
    this.setsOf = new int[slots][];
    for (int slot = 0; slot < slots; slot++) {
      setsOf[slot] = new int[count[slot]];
    }
    for (int set = sets.length - 1; set >= 0; set--) {
      for (int slot : sets[set]) {
        setsOf[slot][--count[slot]] = set;
      }
    }
    this.best = StateSweep.identity(slots);
  }

  /** The slots in reading order. */
  static int[] of(int slots, List<BitSet> family) {
    FamilyOrder order = new FamilyOrder(slots, family);
    order.drawTogether(StateSweep.identity(slots));
    int[] first = order.breadthFirst(0);
    order.drawTogether(order.breadthFirst(first[slots - 1]));
    return order.best;
  }

  private int[] breadthFirst(int start) {
    int slots = setsOf.length;
    int[] order = new int[slots];
    boolean[] seen = new boolean[slots];
    boolean[] done = new boolean[sets.length];
    int filled = 0;
    int next = 0;
    for (int i = -1; i < slots; i++) {
      int root = i < 0 ? start : i;
      if (!seen[root]) {
        seen[root] = true;
        order[filled++] = root;
      }
      for (; next < filled; next++) {
        for (int set : setsOf[order[next]]) {
          for (int slot : done[set] ? new int[0] : sets[set]) {
            if (!seen[slot]) {
              seen[slot] = true;
              order[filled++] = slot;
            }
          }
          done[set] = true;
        }
      }
    }
    return order;
  }

  private void drawTogether(int[] start) {
    int slots = setsOf.length;
    int[] order = start;
    double[] place = new double[slots];
    long last = Long.MAX_VALUE;
    for (int round = 0; round < ROUNDS; round++) {
      for (int i = 0; i < slots; i++) {
        place[order[i]] = i;
      }
      long span = span(place);
      if (span < bestSpan) {
        bestSpan = span;
        best = order.clone();
      }
      if (round > 0 && span >= last) {
        return;
      }
      last = span;
      order = sorted(order, drawn(place));
    }
  }

  private long span(double[] place) {
    double sum = 0;
    for (int[] set : sets) {
      double least = Double.MAX_VALUE;
      double most = 0;
      for (int slot : set) {
        least = Math.min(least, place[slot]);
        most = Math.max(most, place[slot]);
      }
      sum += most - least;
    }
    return (long) sum;
  }

  private double[] drawn(double[] place) {
    double[] centre = new double[sets.length];
    for (int set = 0; set < sets.length; set++) {
      double sum = 0;
      for (int slot : sets[set]) {
        sum += place[slot];
      }
      centre[set] = sum / sets[set].length;
    }
    double[] drawn = new double[place.length];
    for (int slot = 0; slot < drawn.length; slot++) {
      double sum = 0;
      for (int set : setsOf[slot]) {
        sum += centre[set];
      }
      drawn[slot] = setsOf[slot].length == 0 ? place[slot] : sum / setsOf[slot].length;
    }
    return drawn;
  }

  /** By drawn place, ties as they stood. */
  private static int[] sorted(int[] order, double[] drawn) {
    return Arrays.stream(order)
        .boxed()
        .sorted((a, b) -> Double.compare(drawn[a], drawn[b]))
        .mapToInt(Integer::intValue)
        .toArray();
  }
}
