package org.kingbolt.core.diagram;

import java.util.Arrays;

/**
 * Evaluates one diagram again and again, in arrays of its own that are made once: both sides of the
 * whole function, all its derivatives, and both sides with one variable changed.
 *
 * <p>For one thread. Memory: 16 bytes a node, 8 more from the first derivatives on, and 4 more from
 * the first changed variable on.
 *
 * <p>Example: {@code scan.up(working, failing); scan.works();}
 */
public final class Scan {

  /** Nodes summed up at a time, so that long sums do not gather rounding errors. */
  private static final int RUN = 1 << 10;

  private static final double[] NONE = new double[0];

  private final Diagram diagram;
  private final int[] levelOf;
  private final double[] p;
  private final double[] q;
  private final double[] works;
  private final double[] fails;

  /** All zero between two questions. */
  private double[] reach = NONE;

  private final Conditionals conditionals;
  private boolean conditioned;

  /**
   * Prepares.
   *
   * @param diagram any diagram
   * @param variables the number of variables; every variable of the order is below it
   */
  public Scan(Diagram diagram, int variables) {
    this.diagram = diagram;
    this.levelOf = new int[variables];
    this.p = new double[diagram.levels()];
    this.q = new double[diagram.levels()];
    this.works = new double[diagram.size()];
    this.fails = new double[diagram.size()];
    this.conditionals = new Conditionals(diagram);
    works[Diagram.WORKS] = 1;
    fails[Diagram.FAILS] = 1;
    Arrays.fill(levelOf, -1);
    for (int level = 0; level < diagram.levels(); level++) {
      if (diagram.to(level) > diagram.from(level)) {
        levelOf[diagram.variableAt(level)] = level;
      }
    }
  }

  /**
   * Evaluates every node. Gives the same bits as {@link Evaluation#of}.
   *
   * @param working indexed by variable: probability of working, from 0 to 1; not kept
   * @param failing indexed by variable: the complement; not kept
   */
  public void up(double[] working, double[] failing) {
    conditioned = false;
    int[] low = diagram.lows();
    int[] high = diagram.highs();
    for (int level = diagram.levels() - 1; level >= 0; level--) {
      int variable = diagram.variableAt(level);
      // a negative zero becomes zero
      double up = working[variable] + 0.0;
      double down = failing[variable] + 0.0;
      p[level] = up;
      q[level] = down;
      Kernels.up(low, high, works, fails, diagram.from(level), diagram.to(level), up, down);
    }
  }

  /**
   * Returns the probability that the whole function works.
   *
   * @return from 0 to 1, or past 1 by a few units in the last place
   */
  public double works() {
    return works[diagram.root()];
  }

  /**
   * Returns the probability that the whole function fails.
   *
   * @return from 0 to 1, or past 1 by a few units in the last place
   */
  public double fails() {
    return fails[diagram.root()];
  }

  /**
   * Works out every first partial derivative of the probability of working, as plain differences on
   * that side of the function which is less likely. Cost: one scan downwards.
   *
   * <p>Each is off by at most about {@code 8 levels 2^-53} times the sum of itself and the smaller
   * of {@link #works()} and {@link #fails()}, since what is subtracted is part of that side.
   *
   * @param derivatives overwritten; indexed by variable, each from 0 to 1; 0 for variables that do
   *     not matter
   */
  public void derivatives(double[] derivatives) {
    Arrays.fill(derivatives, 0);
    boolean byWorks = works() < fails();
    double[] side = byWorks ? works : fails;
    double[] passed = passed();
    for (int level = 0; level < diagram.levels(); level++) {
      double sum = sum(side, passed, level);
      double derivative = byWorks ? sum : -sum;
      derivatives[diagram.variableAt(level)] = Math.min(1, Math.max(0.0, derivative));
    }
    clearOutcomes(passed);
  }

  private double sum(double[] side, double[] passed, int level) {
    int[] low = diagram.lows();
    int[] high = diagram.highs();
    int end = diagram.to(level);
    double sum = 0;
    for (int from = diagram.from(level); from < end; from += RUN) {
      int to = Math.min(end - from, RUN) + from;
      sum += Kernels.down(low, high, side, passed, from, to, p[level], q[level]);
    }
    return sum;
  }

  /**
   * The probability that the whole function works if one variable's probabilities were others. A
   * sum of non-negative terms, not a difference: no digits are lost. Cost: the first call after
   * {@link #up} makes a scan downwards; each call after it takes two multiplications.
   *
   * @param variable its number
   * @param working its probability of working instead
   * @param failing the complement
   * @return from 0 to 1, or past 1 by a few units in the last place
   */
  public double worksWith(int variable, double working, double failing) {
    int level = levelOf[variable];
    if (level < 0) {
      return works();
    }
    condition();
    return working * conditionals.worksGivenWorking(level)
        + failing * conditionals.worksGivenFailed(level);
  }

  /**
   * The probability that the whole function fails if one variable's probabilities were others; see
   * {@link #worksWith}.
   *
   * @param variable its number
   * @param working its probability of working instead
   * @param failing the complement
   * @return from 0 to 1, or past 1 by a few units in the last place
   */
  public double failsWith(int variable, double working, double failing) {
    int level = levelOf[variable];
    if (level < 0) {
      return fails();
    }
    condition();
    return working * conditionals.failsGivenWorking(level)
        + failing * conditionals.failsGivenFailed(level);
  }

  private void condition() {
    if (!conditioned) {
      double[] passed = passed();
      conditionals.scan(works, fails, passed, p, q);
      clearOutcomes(passed);
      conditioned = true;
    }
  }

  /** The reach of all nodes before the first level has been read. */
  private double[] passed() {
    if (reach.length == 0) {
      reach = new double[diagram.size()];
    }
    reach[diagram.root()] = 1;
    return reach;
  }

  private static void clearOutcomes(double[] passed) {
    passed[Diagram.FAILS] = 0;
    passed[Diagram.WORKS] = 0;
  }
}
