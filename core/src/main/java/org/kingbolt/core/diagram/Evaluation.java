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
    evaluation.works[Diagram.WORKS] = 1;
    evaluation.fails[Diagram.FAILS] = 1;
    for (int level = diagram.levels() - 1; level >= 0; level--) {
      int variable = diagram.variableAt(level);
      evaluation.scan(diagram.from(level), diagram.to(level), working[variable], failing[variable]);
    }
    return evaluation;
  }

  private void scan(int from, int to, double p, double q) {
    for (int id = from; id < to; id++) {
      int low = diagram.low(id);
      int high = diagram.high(id);
      works[id] = p * works[high] + q * works[low];
      fails[id] = p * fails[high] + q * fails[low];
    }
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
   * digits. Cost: one more scan, downwards.
   *
   * @return indexed by variable, each from 0 to 1; 0 for variables that do not matter
   */
  public double[] derivatives() {
    double[] derivative = new double[working.length];
    double[] reach = new double[diagram.size()];
    reach[diagram.root()] = 1;
    for (int level = 0; level < diagram.levels(); level++) {
      int variable = diagram.variableAt(level);
      derivative[variable] =
          descend(
              reach, diagram.from(level), diagram.to(level), working[variable], failing[variable]);
    }
    return derivative;
  }

  private double descend(double[] reach, int from, int to, double p, double q) {
    double sum = 0;
    for (int id = from; id < to; id++) {
      int low = diagram.low(id);
      int high = diagram.high(id);
      double here = reach[id];
      reach[low] += q * here;
      reach[high] += p * here;
      double gain = works[high] < fails[low] ? works[high] - works[low] : fails[low] - fails[high];
      sum += here * gain;
    }
    return sum;
  }
}
