package org.kingbolt.core.diagram;

import java.util.Arrays;
import java.util.HashMap;
import java.util.Map;

/**
 * Pieces at one vector of independent variables, some of which may be held failed or working for a
 * while. Pieces share something when both depend on a variable that may be in either state. For one
 * thread.
 */
final class Ensemble {

  /** The joint failure of two pieces is worked out over so many common variables at most. */
  private static final int MOST_COMMON = 6;

  /** What else an evaluation takes, in nodes. */
  private static final int OVERHEAD = 20;

  private final Piece[] pieces;
  private final double[] givenUp;
  private final double[] givenDown;
  private final double[] up;
  private final double[] down;
  private final WorkMeter meter;
  private long held;

  /** How many nodes have been evaluated; a measure of time that is the same every time. */
  private long work;

  private final Map<Long, Double> pairs = new HashMap<>();
  private final double[] sums;

  /** The variables of each piece that may be in either state, in increasing order. */
  private final int[][] open;

  /** The other pieces that each piece shares something with, in increasing order. */
  private final int[][] neighbours;

  Ensemble(Piece[] pieces, double[] up, double[] down, WorkMeter meter) {
    this.pieces = pieces;
    this.givenUp = up;
    this.givenDown = down;
    this.up = up.clone();
    this.down = down.clone();
    this.meter = meter;
    this.open = new int[pieces.length][];
    this.neighbours = new int[pieces.length][];
    this.sums = new double[pieces.length];
    Arrays.fill(sums, -1);
    Map<Integer, IntSet> users = new HashMap<>();
    long nodes = 0;
    for (int piece = 0; piece < pieces.length; piece++) {
      nodes += pieces[piece].size();
      open[piece] =
          Arrays.stream(pieces[piece].variables()).filter(v -> up[v] > 0 && down[v] > 0).toArray();
      Arrays.sort(open[piece]);
      for (int variable : open[piece]) {
        users.computeIfAbsent(variable, absent -> new IntSet()).add(piece);
      }
    }
    this.held = nodes;
    for (int piece = 0; piece < pieces.length; piece++) {
      IntSet found = new IntSet();
      found.add(piece);
      for (int variable : open[piece]) {
        meter.at(nodes);
        for (int user : users.getOrDefault(variable, new IntSet()).toArray()) {
          found.add(user);
        }
      }
      int self = piece;
      neighbours[piece] = Arrays.stream(found.sorted()).filter(other -> other != self).toArray();
    }
  }

  int size() {
    return pieces.length;
  }

  /** Counts what else is kept, in nodes. */
  void keep(long nodes) {
    held += nodes;
    meter.at(held);
  }

  /** Counts other work in nodes. */
  void spend(long nodes) {
    meter.at(held);
    work += nodes;
  }

  /** How many nodes have been evaluated so far. */
  long work() {
    return work;
  }

  int[] open(int piece) {
    return open[piece];
  }

  int[] neighbours(int piece) {
    return neighbours[piece];
  }

  void hold(int variable, boolean works) {
    up[variable] = works ? 1 : 0;
    down[variable] = works ? 0 : 1;
  }

  void free(int variable) {
    up[variable] = givenUp[variable];
    down[variable] = givenDown[variable];
  }

  double up(int variable) {
    return givenUp[variable];
  }

  double down(int variable) {
    return givenDown[variable];
  }

  /** Evaluates a piece, given what is held, and returns it. */
  Piece at(int piece) {
    meter.at(held);
    work += pieces[piece].size() + OVERHEAD;
    pieces[piece].evaluate(up, down);
    return pieces[piece];
  }

  /** The open variables of both pieces. */
  int[] common(int one, int other) {
    return Arrays.stream(open[one])
        .filter(variable -> Arrays.binarySearch(open[other], variable) >= 0)
        .toArray();
  }

  /** The probability that two pieces have both failed, nothing being held, or a little more. */
  double bothFail(int one, int other) {
    long key = (long) Math.min(one, other) * pieces.length + Math.max(one, other);
    Double known = pairs.get(key);
    if (known == null) {
      known = bothFail(one, other, common(one, other));
      pairs.put(key, known);
      keep(1);
    }
    return known;
  }

  /** The sum of that over all that a piece shares something with. */
  double bothFailSum(int piece) {
    if (sums[piece] < 0) {
      double sum = 0;
      for (int other : neighbours[piece]) {
        sum += bothFail(piece, other);
      }
      sums[piece] = sum;
    }
    return sums[piece];
  }

  /**
   * The probability that two pieces have both failed, given what is held, or a little more: no more
   * than either of them.
   *
   * @param common what both depend on and what is not held
   */
  double bothFail(int one, int other, int[] common) {
    double oneFails = at(one).fails();
    double otherFails = at(other).fails();
    double least = Math.min(oneFails, otherFails);
    if (common.length == 0 || least == 0) {
      return oneFails * otherFails;
    }
    if (common.length > MOST_COMMON) {
      return least;
    }
    // given the common ones, the two are independent
    double sum = 0;
    for (int state = 0; state < 1 << common.length; state++) {
      double weight = 1;
      for (int i = 0; i < common.length; i++) {
        boolean works = (state >>> i & 1) != 0;
        weight *= works ? givenUp[common[i]] : givenDown[common[i]];
        hold(common[i], works);
      }
      double fails = at(one).fails();
      if (fails > 0) {
        sum += weight * fails * at(other).fails();
      }
    }
    for (int variable : common) {
      free(variable);
    }
    return Math.min(sum, least);
  }
}
