package org.kingbolt.core.diagram;

import java.util.Arrays;

/**
 * The probability that one function works while a lesser one fails, for pairs of nodes of one
 * diagram, without losing digits where the two are nearly equally likely to work.
 *
 * <p>A difference of the two nodes' probabilities is taken where it keeps all but three bits;
 * elsewhere the pair is split by the variable that it reads first. For one thread.
 */
final class PairGains {

  /** A difference of at least this share of its terms is good enough. */
  private static final double SHARE = 0.125;

  private static final long FEWEST = 1 << 14;
  private static final long MOST = 1 << 22;

  private final Diagram diagram;
  private final double[] working;
  private final double[] failing;
  private final double[] works;
  private final double[] fails;

  /** Pairs split so far, by open addressing; 0 is an empty place. */
  private long[] pairs = new long[1 << 8];

  private double[] gains = new double[1 << 8];
  private int held;
  private final long most;
  private long[] stack = new long[64];

  /**
   * Prepares for one evaluation.
   *
   * @param working indexed by variable
   * @param failing indexed by variable
   * @param works indexed by node
   * @param fails indexed by node
   */
  PairGains(Diagram diagram, double[] working, double[] failing, double[] works, double[] fails) {
    this.diagram = diagram;
    this.working = working;
    this.failing = failing;
    this.works = works;
    this.fails = fails;
    this.most = Math.min(MOST, Math.max(FEWEST, 4L * diagram.size()));
  }

  static boolean keepsDigits(double difference, double term) {
    return difference >= SHARE * term;
  }

  /** The difference, on the side where its terms are smaller. */
  double difference(int high, int low) {
    return works[high] < fails[low] ? works[high] - works[low] : fails[low] - fails[high];
  }

  /**
   * Works out one pair.
   *
   * @param high a node
   * @param low a node whose function never works where that of the other one fails
   * @return the probability that the first works and the second fails; the plain difference when
   *     more pairs than a few times the diagram's nodes have been split already
   */
  double gain(int high, int low) {
    int depth = 0;
    stack[depth++] = pair(high, low);
    while (depth > 0) {
      long pair = stack[depth - 1];
      int h = (int) (pair >>> 32);
      int l = (int) pair;
      if (!Double.isNaN(known(h, l))) {
        depth--;
        continue;
      }
      int top = Math.max(h, l);
      int level = diagram.levelOf(top);
      int from = diagram.from(level);
      int lowH = h >= from ? diagram.low(h) : h;
      int lowL = l >= from ? diagram.low(l) : l;
      int highH = h >= from ? diagram.high(h) : h;
      int highL = l >= from ? diagram.high(l) : l;
      double whenFailed = known(lowH, lowL);
      double whenWorking = known(highH, highL);
      if (!Double.isNaN(whenFailed) && !Double.isNaN(whenWorking)) {
        int variable = diagram.variableAt(level);
        put(pair, working[variable] * whenWorking + failing[variable] * whenFailed);
        depth--;
        continue;
      }
      if (depth + 2 > stack.length) {
        stack = Arrays.copyOf(stack, stack.length << 1);
      }
      if (Double.isNaN(whenFailed)) {
        stack[depth++] = pair(lowH, lowL);
      }
      if (Double.isNaN(whenWorking)) {
        stack[depth++] = pair(highH, highL);
      }
    }
    return known(high, low);
  }

  /** NaN where the pair must be split. */
  private double known(int high, int low) {
    if (high == low) {
      return 0;
    }
    if (high == Diagram.WORKS) {
      return fails[low];
    }
    if (low == Diagram.FAILS) {
      return works[high];
    }
    double difference = difference(high, low);
    if (keepsDigits(difference, Math.min(works[high], fails[low]))) {
      return difference;
    }
    long pair = pair(high, low);
    int mask = pairs.length - 1;
    for (int at = place(pair, mask); pairs[at] != 0; at = at + 1 & mask) {
      if (pairs[at] == pair) {
        return gains[at];
      }
    }
    return held >= most ? Math.max(0, difference) : Double.NaN;
  }

  private void put(long pair, double gain) {
    if (++held * 2 > pairs.length) {
      long[] oldPairs = pairs;
      double[] oldGains = gains;
      pairs = new long[oldPairs.length << 1];
      gains = new double[oldPairs.length << 1];
      for (int i = 0; i < oldPairs.length; i++) {
        if (oldPairs[i] != 0) {
          insert(oldPairs[i], oldGains[i]);
        }
      }
    }
    insert(pair, gain);
  }

  private void insert(long pair, double gain) {
    int mask = pairs.length - 1;
    int at = place(pair, mask);
    while (pairs[at] != 0) {
      at = at + 1 & mask;
    }
    pairs[at] = pair;
    gains[at] = gain;
  }

  private static int place(long pair, int mask) {
    long mixed = pair * 0x9E3779B97F4A7C15L;
    return (int) (mixed >>> 32 ^ mixed >>> 13) & mask;
  }

  private static long pair(int high, int low) {
    return (long) high << 32 | low;
  }
}
