package org.kingbolt.core.diagram;

/**
 * The probability that a function works, and that it fails, at every node of its diagram, for one
 * vector of independent variables.
 *
 * <p>Both sides are sums of products of non-negative numbers, so that neither loses digits to
 * cancellation: the relative error of each is at most about {@code 4 levels 2^-53}. Cost: one scan
 * of the arrays.
 *
 * <p>Immutable; safe to share between threads.
 */
public final class Evaluation {

  private final Diagram diagram;
  private final double[] working;
  private final double[] failing;
  private final double[] works;
  private final double[] fails;

  private Evaluation(Diagram diagram, double[] working, double[] failing) {
    this.diagram = diagram;
    this.working = working;
    this.failing = failing;
    this.works = new double[diagram.size()];
    this.fails = new double[diagram.size()];
  }

  /**
   * Evaluates a diagram.
   *
   * @param diagram any diagram
   * @param working indexed by variable: probability of working, from 0 to 1; not changed and not
   *     kept
   * @param failing indexed by variable: the complement, given separately so that a small one keeps
   *     its digits
   * @return the probabilities at every node
   */
  public static Evaluation of(Diagram diagram, double[] working, double[] failing) {
    Evaluation evaluation = new Evaluation(diagram, working.clone(), failing.clone());
    double[] works = evaluation.works;
    double[] fails = evaluation.fails;
    works[Diagram.WORKS] = 1;
    fails[Diagram.FAILS] = 1;
    int[] low = diagram.lows();
    int[] high = diagram.highs();
    for (int level = diagram.levels() - 1; level >= 0; level--) {
      int variable = diagram.variableAt(level);
      double p = working[variable];
      double q = failing[variable];
      Kernels.up(low, high, works, fails, diagram.from(level), diagram.to(level), p, q);
    }
    return evaluation;
  }

  /**
   * Returns the probability that the whole function works.
   *
   * @return from 0 to 1
   */
  public double works() {
    return works[diagram.root()];
  }

  /**
   * Returns the probability that the whole function fails.
   *
   * @return from 0 to 1
   */
  public double fails() {
    return fails[diagram.root()];
  }

  /**
   * Returns every first partial derivative of the probability of working: the probability that the
   * function works with the variable working and fails with it failed (Birnbaum 1969).
   *
   * <p>At each node the difference of its two children is taken on the side where it keeps more
   * digits. Where digits would be lost even so, pairs of nodes are followed down to where none are,
   * as long as these pairs are not more than a few times the nodes and a few millions; beyond that
   * a derivative can only be trusted to about {@code 4 levels 2^-53} of the smaller of the two
   * sides. Cost: one more scan, downwards, and the pairs.
   *
   * @return indexed by variable, each from 0 to 1; 0 for variables that do not matter
   */
  public double[] derivatives() {
    double[] derivative = new double[working.length];
    double[] reach = new double[diagram.size()];
    double[] totals = new double[2];
    PairGains gains = new PairGains(diagram, working, failing, works, fails);
    reach[diagram.root()] = 1;
    for (int level = 0; level < diagram.levels(); level++) {
      int variable = diagram.variableAt(level);
      int from = diagram.from(level);
      int to = diagram.to(level);
      descend(reach, from, to, working[variable], failing[variable], totals);
      derivative[variable] =
          PairGains.keepsDigits(totals[0], totals[1])
              ? totals[0]
              : refinedSum(reach, from, to, Math.max(0, totals[0]), gains);
    }
    return derivative;
  }

  /** Passes reach on to the children; leaves the sum of differences, and that of their terms. */
  private void descend(double[] reach, int from, int to, double p, double q, double[] totals) {
    double sum = 0;
    double terms = 0;
    for (int id = from; id < to; id++) {
      int low = diagram.low(id);
      int high = diagram.high(id);
      double here = reach[id];
      reach[low] += q * here;
      reach[high] += p * here;
      boolean byWorks = works[high] < fails[low];
      double term = byWorks ? works[high] : fails[low];
      sum += here * (term - (byWorks ? works[low] : fails[high]));
      terms += here * term;
    }
    totals[0] = sum;
    totals[1] = terms;
  }

  /** Refines the nodes whose lost digits would show in the sum, until it no longer shrinks. */
  private double refinedSum(double[] reach, int from, int to, double roughSum, PairGains gains) {
    double sum = roughSum;
    while (true) {
      double refined = 0;
      for (int id = from; id < to; id++) {
        int high = diagram.high(id);
        int low = diagram.low(id);
        double term = reach[id] * Math.min(works[high], fails[low]);
        boolean shows = term * diagram.levels() > sum;
        refined += reach[id] * (shows ? gains.gain(high, low) : gains.difference(high, low));
      }
      refined = Math.max(0, refined);
      if (refined >= sum / 2) {
        return refined;
      }
      sum = refined;
    }
  }
}
