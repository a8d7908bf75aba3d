package org.kingbolt.core.diagram;

import java.util.Arrays;

/**
 * The probabilities that a function works and fails given the state of each one of its variables,
 * all from one scan downwards.
 *
 * <p>Given the variable of a level, the function's value is decided on paths of three kinds: those
 * that have ended above the level, those that pass by the level, from a node above to one below,
 * and those through a node on the level. The first are counted as they end; the second are added to
 * stretches of levels in a tree of sums, so that nothing ever has to be taken away again; the third
 * are summed on the level. All terms are non-negative and no digits are lost.
 *
 * <p>Cost: one scan, and the logarithm of the number of levels passed by for every such edge. For
 * one thread.
 */
final class Conditionals {

  private static final int[] NONE = new int[0];
  private static final int RUN = 1 << 10;

  private final Diagram diagram;
  private int[] levelOf = NONE;

  /**
   * The trees of sums over levels, for both sides: what is added to the inner node i holds for all
   * the leaves under it; level L is the leaf at {@code levels + L}.
   */
  private double[] worksPassing = new double[0];

  private double[] failsPassing = new double[0];

  /** The deepest level passed to so far. */
  private int passedTo;

  /** Four values a level. */
  private double[] given = new double[0];

  // sums over a run of nodes
  private double worksHigh;
  private double worksLow;
  private double failsHigh;
  private double failsLow;

  Conditionals(Diagram diagram) {
    this.diagram = diagram;
  }

  double worksGivenWorking(int level) {
    return given[4 * level];
  }

  double worksGivenFailed(int level) {
    return given[4 * level + 1];
  }

  double failsGivenWorking(int level) {
    return given[4 * level + 2];
  }

  double failsGivenFailed(int level) {
    return given[4 * level + 3];
  }

  /**
   * Works all of them out.
   *
   * @param works indexed by node
   * @param fails indexed by node
   * @param reach indexed by node: 1 at the root and 0 elsewhere; 0 at all inner nodes afterwards
   * @param p indexed by level
   * @param q indexed by level
   */
  void scan(double[] works, double[] fails, double[] reach, double[] p, double[] q) {
    int levels = diagram.levels();
    prepare(levels);
    for (int level = 0; level < levels; level++) {
      double worksElsewhere = reach[Diagram.WORKS];
      double failsElsewhere = reach[Diagram.FAILS];
      if (level < passedTo) {
        worksElsewhere += passing(worksPassing, levels + level);
        failsElsewhere += passing(failsPassing, levels + level);
      }
      double sumWorksHigh = 0;
      double sumWorksLow = 0;
      double sumFailsHigh = 0;
      double sumFailsLow = 0;
      int end = diagram.to(level);
      for (int from = diagram.from(level); from < end; from += RUN) {
        int to = Math.min(end - from, RUN) + from;
        sum(works, fails, reach, from, to);
        sumWorksHigh += worksHigh;
        sumWorksLow += worksLow;
        sumFailsHigh += failsHigh;
        sumFailsLow += failsLow;
        pass(works, fails, reach, level, from, to, p[level], q[level]);
      }
      given[4 * level] = worksElsewhere + sumWorksHigh;
      given[4 * level + 1] = worksElsewhere + sumWorksLow;
      given[4 * level + 2] = failsElsewhere + sumFailsHigh;
      given[4 * level + 3] = failsElsewhere + sumFailsLow;
    }
  }

  private void prepare(int levels) {
    if (levelOf.length == 0) {
      levelOf = new int[diagram.size()];
      for (int level = 0; level < levels; level++) {
        Arrays.fill(levelOf, diagram.from(level), diagram.to(level), level);
      }
      worksPassing = new double[2 * levels];
      failsPassing = new double[2 * levels];
      given = new double[4 * levels];
    }
    passedTo = 0;
    Arrays.fill(worksPassing, 0);
    Arrays.fill(failsPassing, 0);
  }

  private void sum(double[] works, double[] fails, double[] reach, int from, int to) {
    int[] low = diagram.lows();
    int[] high = diagram.highs();
    double sumWorksHigh = 0;
    double sumWorksLow = 0;
    double sumFailsHigh = 0;
    double sumFailsLow = 0;
    for (int id = from; id < to; id++) {
      double here = reach[id];
      int l = low[id];
      int h = high[id];
      sumWorksHigh += here * works[h];
      sumWorksLow += here * works[l];
      sumFailsHigh += here * fails[h];
      sumFailsLow += here * fails[l];
    }
    worksHigh = sumWorksHigh;
    worksLow = sumWorksLow;
    failsHigh = sumFailsHigh;
    failsLow = sumFailsLow;
  }

  private void pass(
      double[] works,
      double[] fails,
      double[] reach,
      int level,
      int from,
      int to,
      double p,
      double q) {
    int[] low = diagram.lows();
    int[] high = diagram.highs();
    // nodes below this one lie deeper than the next level
    int next = level + 1 < diagram.levels() ? diagram.from(level + 1) : 0;
    for (int id = from; id < to; id++) {
      double here = reach[id];
      reach[id] = 0;
      int l = low[id];
      int h = high[id];
      double toLow = q * here;
      double toHigh = p * here;
      reach[l] += toLow;
      reach[h] += toHigh;
      if (l < next && l > Diagram.WORKS) {
        passBy(level + 1, levelOf[l], toLow * works[l], toLow * fails[l]);
      }
      if (h < next && h > Diagram.WORKS) {
        passBy(level + 1, levelOf[h], toHigh * works[h], toHigh * fails[h]);
      }
    }
  }

  /** Adds to the levels from the first one to the one before the last, where the edge ends. */
  private void passBy(int first, int last, double worksTerm, double failsTerm) {
    passedTo = Math.max(passedTo, last);
    int levels = diagram.levels();
    int a = first + levels;
    int b = last + levels;
    while (a < b) {
      if ((a & 1) != 0) {
        worksPassing[a] += worksTerm;
        failsPassing[a++] += failsTerm;
      }
      if ((b & 1) != 0) {
        worksPassing[--b] += worksTerm;
        failsPassing[b] += failsTerm;
      }
      a >>= 1;
      b >>= 1;
    }
  }

  private static double passing(double[] tree, int leaf) {
    double sum = 0;
    for (int i = leaf; i >= 1; i >>= 1) {
      sum += tree[i];
    }
    return sum;
  }
}
