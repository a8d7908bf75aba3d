package org.kingbolt.core.diagram;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.stream.IntStream;

/**
 * The probability that several pieces have all failed, from below and from above. Pieces that share
 * nothing are independent. Those that are tied to each other are, given what they have in common;
 * where that is too much, failures being associated, the product is a lower end, and any of them an
 * upper one. For one thread.
 */
final class JointFailure {

  /** Of more tied pieces, only so many are looked at for the upper end. */
  private static final int MOST_TIED = 6;

  /** What a result that is kept takes, in nodes. */
  private static final int KEPT = 3;

  /** Tied pieces are worked out over so many common variables at most. */
  private static final int MOST_COMMON = 10;

  /** Both ends. */
  record Ends(double low, double high) {}

  private final Ensemble pieces;
  private final long end;
  private final double[] fails;
  private final Map<List<Integer>, Ends> tied = new HashMap<>();

  /** By piece, and by the variables held. */
  private final List<Map<List<Integer>, double[]>> tables = new ArrayList<>();

  /**
   * Prepares the work.
   *
   * @param allowance how many nodes may be evaluated, about
   */
  JointFailure(Ensemble pieces, long allowance) {
    this.pieces = pieces;
    this.end = pieces.work() + allowance;
    this.fails = new double[pieces.size()];
    for (int piece = 0; piece < fails.length; piece++) {
      fails[piece] = pieces.at(piece).fails();
      tables.add(new HashMap<>());
    }
  }

  /** The first so many of some distinct pieces; they change places. */
  Ends of(int[] some, int count) {
    double low = 1;
    double high = 1;
    int from = 0;
    pieces.spend((long) count * count);
    while (from < count) {
      int to = group(some, from, count);
      if (to == from + 1) {
        low *= fails[some[from]];
        high *= fails[some[from]];
      } else {
        int[] group = Arrays.copyOfRange(some, from, to);
        Arrays.sort(group);
        Ends ends = tied(group);
        low *= ends.low;
        high *= ends.high;
      }
      from = to;
    }
    return new Ends(low, high);
  }

  /** Brings all that are tied to the first one, by way of others, next to it. */
  private int group(int[] some, int from, int count) {
    int to = from + 1;
    for (int next = from; next < to; next++) {
      int[] neighbours = pieces.neighbours(some[next]);
      for (int other = to; other < count; other++) {
        if (Arrays.binarySearch(neighbours, some[other]) >= 0) {
          int found = some[other];
          some[other] = some[to];
          some[to++] = found;
        }
      }
    }
    return to;
  }

  private Ends tied(int[] group) {
    List<Integer> key = Arrays.stream(group).boxed().toList();
    Ends known = tied.get(key);
    if (known == null) {
      known = workedOut(group);
      tied.put(key, known);
      pieces.keep(KEPT);
    }
    return known;
  }

  private Ends workedOut(int[] group) {
    double product = 1;
    double least = 1;
    for (int piece : group) {
      product *= fails[piece];
      least = Math.min(least, fails[piece]);
    }
    if (least == 0) {
      return new Ends(0, 0);
    }
    if (group.length > MOST_TIED) {
      return new Ends(product, of(Arrays.copyOf(group, MOST_TIED), MOST_TIED).high);
    }
    IntSet common = new IntSet();
    for (int i = 0; i < group.length; i++) {
      for (int j = i + 1; j < group.length; j++) {
        for (int variable : pieces.common(group[i], group[j])) {
          common.add(variable);
        }
      }
    }
    if (pieces.work() > end || common.size() > MOST_COMMON) {
      return new Ends(product, fewer(group, least));
    }
    double sum = given(group, common.toArray());
    return new Ends(sum, sum);
  }

  /** All but one of them fail more often than all of them; depth is at most MOST_TIED. */
  private double fewer(int[] group, double least) {
    double most = least;
    for (int i = 0; group.length > 2 && i < group.length; i++) {
      int[] others = group.clone();
      others[i] = others[group.length - 1];
      most = Math.min(most, of(others, group.length - 1).high);
    }
    return most;
  }

  private double given(int[] group, int[] common) {
    int[][] places = new int[group.length][];
    double[][] tables = new double[group.length][];
    for (int i = 0; i < group.length; i++) {
      int[] open = pieces.open(group[i]);
      places[i] =
          IntStream.range(0, common.length)
              .filter(place -> Arrays.binarySearch(open, common[place]) >= 0)
              .toArray();
      tables[i] = table(group[i], Arrays.stream(places[i]).map(place -> common[place]).toArray());
    }
    double sum = 0;
    pieces.spend((long) group.length << common.length);
    for (int state = 0; state < 1 << common.length; state++) {
      double term = 1;
      for (int place = 0; place < common.length; place++) {
        boolean failed = (state >>> place & 1) != 0;
        term *= failed ? pieces.down(common[place]) : pieces.up(common[place]);
      }
      for (int i = 0; i < group.length && term > 0; i++) {
        int row = 0;
        for (int bit = 0; bit < places[i].length; bit++) {
          row |= (state >>> places[i][bit] & 1) << bit;
        }
        term *= tables[i][row];
      }
      sum += term;
    }
    return sum;
  }

  /** The probability that a piece fails in every state of some variables; set bits have failed. */
  private double[] table(int piece, int[] held) {
    List<Integer> key = Arrays.stream(held).boxed().toList();
    double[] known = tables.get(piece).get(key);
    if (known == null) {
      known = tabulated(piece, held);
      tables.get(piece).put(key, known);
      pieces.keep(KEPT + known.length / 8);
    }
    return known;
  }

  private double[] tabulated(int piece, int[] held) {
    double[] table = new double[1 << held.length];
    for (int state = 0; state < table.length; state++) {
      for (int bit = 0; bit < held.length; bit++) {
        pieces.hold(held[bit], (state >>> bit & 1) == 0);
      }
      table[state] = pieces.at(piece).fails();
    }
    for (int variable : held) {
      pieces.free(variable);
    }
    return table;
  }
}
