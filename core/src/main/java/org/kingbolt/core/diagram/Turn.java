package org.kingbolt.core.diagram;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.Comparator;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.PriorityQueue;

/**
 * The probability that one piece fails, given that all the pieces before it work, from below and
 * from above; see {@link Chain}.
 */
final class Turn {

  /** Bits of a state; further variables are never split. */
  private static final int MOST_BITS = 40;

  /** Where the two ends are closer than that, relative to the piece alone, no state is split. */
  private static final double CLOSE = 1e-9;

  /** Some of the shared variables held, the lower bits of the state; the rest are open. */
  private record Branch(
      int number, int bits, long failed, double fails, double works, double low, double high) {

    double gap() {
      return fails * (high - low);
    }
  }

  private final Ensemble pieces;
  private final int piece;

  /** Where the work of the pieces has come to when this turn must end. */
  private final long end;

  /** What the piece shares with pieces before it; what matters most to it comes first. */
  private final int[] shared;

  private final int bits;

  /** The pieces before that it shares something with. */
  private final int[] near;

  /** The shared variables of each of them. */
  private final long[] bitsOf;

  /** For each of them, the pieces it meets when the shared variables are held, and over what. */
  private final int[][] meets;

  private final int[][][] meetsOver;
  private final long[][] meetsBits;

  /** At most the probability that all of these work. */
  private final double[] metWork;

  /** By near piece, and by state of what it shares: the probability that it works. */
  private final List<Map<Long, double[]>> alone = new ArrayList<>();

  /** By near piece, and by the piece met and the state: the probability that both fail. */
  private final List<Map<Long, Double>> both = new ArrayList<>();

  double failsAtLeast;
  double failsAtMost;
  double worksAtMost;

  /**
   * Works it out.
   *
   * @param allowance how many nodes may be evaluated, about; what goes beyond is left out, on the
   *     safe side
   */
  Turn(Ensemble pieces, int piece, long allowance) {
    this.pieces = pieces;
    this.end = pieces.work() + allowance;
    this.piece = piece;
    this.near = Arrays.stream(pieces.neighbours(piece)).filter(k -> k < piece).toArray();
    this.shared = shared();
    this.bits = Math.min(MOST_BITS, shared.length);
    this.bitsOf = new long[near.length];
    this.meets = new int[near.length][];
    this.meetsOver = new int[near.length][][];
    this.meetsBits = new long[near.length][];
    this.metWork = new double[near.length];
    for (int i = 0; i < near.length; i++) {
      alone.add(new HashMap<>());
      both.add(new HashMap<>());
    }
    double fails = pieces.at(piece).fails();
    double works = pieces.at(piece).works();
    if (near.length == 0) {
      failsAtLeast = fails;
      failsAtMost = fails;
      worksAtMost = works;
      return;
    }
    double least = 1;
    double most = 1;
    for (int i = 0; i < near.length; i++) {
      bitsOf[i] = bitsOf(near[i]);
      meet(i);
      double one = pieces.at(near[i]).works();
      double fail = pieces.at(near[i]).fails();
      least *= one;
      most *= before(i, one, fail);
    }
    for (int i = 0; i < near.length; i++) {
      metWork[i] = allMetWork(i);
    }
    split(fails, works, least, most);
  }

  private boolean isOver() {
    return pieces.work() > end;
  }

  private int[] shared() {
    IntSet found = new IntSet();
    for (int other : near) {
      for (int variable : pieces.common(piece, other)) {
        found.add(variable);
      }
    }
    int[] variables = found.sorted();
    double[] effect = new double[variables.length];
    for (int i = 0; i < effect.length; i++) {
      pieces.hold(variables[i], false);
      effect[i] = pieces.down(variables[i]) * pieces.at(piece).fails();
      pieces.free(variables[i]);
    }
    Integer[] order = new Integer[variables.length];
    Arrays.setAll(order, i -> i);
    Arrays.sort(order, Comparator.comparingDouble(i -> -effect[i]));
    return Arrays.stream(order).mapToInt(i -> variables[i]).toArray();
  }

  private long bitsOf(int other) {
    long mask = 0;
    for (int bit = 0; bit < bits; bit++) {
      if (Arrays.binarySearch(pieces.open(other), shared[bit]) >= 0) {
        mask |= 1L << bit;
      }
    }
    return mask;
  }

  /** Whether a piece before this one is placed before another one, the near ones coming last. */
  private boolean isBefore(int one, int other) {
    return one < piece && (one < other || Arrays.binarySearch(near, one) < 0) && one != other;
  }

  private void meet(int i) {
    int[] others =
        Arrays.stream(pieces.neighbours(near[i])).filter(k -> isBefore(k, near[i])).toArray();
    int[][] over = new int[others.length][];
    int count = 0;
    for (int other : others) {
      int[] common =
          Arrays.stream(pieces.common(near[i], other))
              .filter(variable -> Arrays.stream(shared).noneMatch(held -> held == variable))
              .toArray();
      if (common.length > 0) {
        others[count] = other;
        over[count++] = common;
      }
    }
    meets[i] = Arrays.copyOf(others, count);
    meetsOver[i] = Arrays.copyOf(over, count);
    meetsBits[i] = Arrays.stream(meets[i]).mapToLong(k -> bitsOf(k) | bitsOf[i]).toArray();
  }

  /** At most the probability that a near piece works, given that those before it do. */
  private double before(int i, double works, double fails) {
    double joint = 0;
    double allWork = 1;
    for (int other : pieces.neighbours(near[i])) {
      if (isOver()) {
        return 1;
      }
      if (isBefore(other, near[i])) {
        joint += pieces.bothFail(near[i], other);
        allWork *= Math.min(1, pieces.at(other).works() + pieces.bothFailSum(other));
      }
    }
    return atMost(works, fails, joint, allWork);
  }

  private void split(double fails, double works, double least, double most) {
    PriorityQueue<Branch> open =
        new PriorityQueue<>(
            Comparator.comparingDouble((Branch branch) -> -branch.gap())
                .thenComparingInt(Branch::number));
    int number = 0;
    open.add(branch(number++, 0, 0, fails, works, least, most));
    double gap = open.element().gap();
    double lower = 0;
    double upper = 0;
    double up = 0;
    while (!open.isEmpty()) {
      Branch branch = open.remove();
      if (isOver() || branch.bits == bits || gap <= CLOSE * fails) {
        lower += branch.fails * branch.low;
        upper += branch.fails * branch.high;
        up += branch.works * branch.high;
        continue;
      }
      gap -= branch.gap();
      for (int state = 0; state < 2; state++) {
        long failed = branch.failed | ((long) state << branch.bits);
        int variable = shared[branch.bits];
        double weight = state == 0 ? pieces.up(variable) : pieces.down(variable);
        double before = weight(failed, branch.bits) * weight;
        hold(failed, branch.bits + 1);
        double oneFails = before * pieces.at(piece).fails();
        double oneWorks = before * pieces.at(piece).works();
        release();
        Branch part = branch(number++, branch.bits + 1, failed, oneFails, oneWorks, least, most);
        gap += part.gap();
        open.add(part);
      }
    }
    failsAtLeast = Math.min(1, lower);
    failsAtMost = Math.min(fails, upper);
    worksAtMost = Math.min(1, up);
  }

  private double weight(long failed, int held) {
    double weight = 1;
    for (int bit = 0; bit < held; bit++) {
      weight *= (failed >>> bit & 1) == 0 ? pieces.up(shared[bit]) : pieces.down(shared[bit]);
    }
    return weight;
  }

  private void hold(long failed, int held) {
    for (int bit = 0; bit < held; bit++) {
      pieces.hold(shared[bit], (failed >>> bit & 1) == 0);
    }
  }

  private void holdAll(long failed, boolean rest) {
    hold(failed, bits);
    for (int i = bits; i < shared.length; i++) {
      pieces.hold(shared[i], rest);
    }
  }

  private void release() {
    for (int variable : shared) {
      pieces.free(variable);
    }
  }

  private Branch branch(
      int number, int held, long failed, double fails, double works, double least, double most) {
    if (fails == 0 && works == 0) {
      return new Branch(number, held, failed, 0, 0, 0, 0);
    }
    double low = 1;
    long worst = failed | (held < bits ? ((1L << bits) - 1) & -(1L << held) : 0);
    for (int i = 0; i < near.length && low > 0; i++) {
      low *= alone(i, worst, false)[0];
    }
    double high = 1;
    for (int i = 0; i < near.length && high > 0; i++) {
      double[] one = alone(i, failed, true);
      high *= atMost(one[0], one[1], meeting(i, failed), metWork[i]);
    }
    return new Branch(
        number,
        held,
        failed,
        fails,
        works,
        most > 0 ? low / most : 1,
        least > 0 ? high / least : Double.MAX_VALUE);
  }

  /** The probabilities that a near piece works and fails, all shared variables being held. */
  private double[] alone(int i, long failed, boolean rest) {
    // the two differ where variables are beyond the bits
    long key = (failed & bitsOf[i]) | (rest ? 1L << MOST_BITS : 0);
    double[] known = alone.get(i).get(key);
    if (known == null) {
      holdAll(failed, rest);
      Piece held = pieces.at(near[i]);
      known = new double[] {held.works(), held.fails()};
      release();
      alone.get(i).put(key, known);
    }
    return known;
  }

  /**
   * At most the probability that a piece works, given that those do which it meets.
   *
   * @param joint sum over these of the probability that both have failed
   * @param allWork at most the probability that all of these work
   */
  private static double atMost(double works, double fails, double joint, double allWork) {
    double gain = allWork > 0 ? Math.max(0, fails - joint) * ((1 - allWork) / allWork) : 0;
    return Math.min(1, Math.max(works, works + joint - gain));
  }

  /** At most the probability that all work which a near piece meets, the shared ones working. */
  private double allMetWork(int i) {
    double most = 1;
    for (int other : meets[i]) {
      int place = Arrays.binarySearch(near, other);
      double works = place < 0 ? pieces.at(other).works() : alone(place, 0, true)[0];
      most *= isOver() ? 1 : Math.min(1, works + pieces.bothFailSum(other));
    }
    return most;
  }

  /** Sum over what a near piece meets of the probability that both have failed. */
  private double meeting(int i, long failed) {
    double sum = 0;
    for (int k = 0; k < meets[i].length; k++) {
      if (isOver()) {
        return 1;
      }
      long key = (failed & meetsBits[i][k]) | ((long) k << MOST_BITS);
      Double known = both.get(i).get(key);
      if (known == null) {
        holdAll(failed, true);
        known = pieces.bothFail(near[i], meets[i][k], meetsOver[i][k]);
        release();
        both.get(i).put(key, known);
      }
      sum += known;
    }
    return sum;
  }
}
