package org.kingbolt.core.diagram;

import java.util.Arrays;

/**
 * One function among several over common variables, with a diagram of its own over those that it
 * reads, to be evaluated again and again. For one thread.
 */
final class Piece {

  private final Diagram diagram;

  /** The common number of each variable of the diagram. */
  private final int[] variables;

  private final double[] works;
  private final double[] fails;

  private Piece(Diagram diagram, int[] variables) {
    this.diagram = diagram;
    this.variables = variables;
    this.works = new double[diagram.size()];
    this.fails = new double[diagram.size()];
    works[Diagram.WORKS] = 1;
    fails[Diagram.FAILS] = 1;
  }

  /**
   * Builds the diagram of an expression.
   *
   * @param meter hears of every node, and may end the work
   */
  static Piece of(Composer whole, int expression, WorkMeter meter) {
    Excerpt excerpt = new Excerpt(whole, expression, meter);
    int[] variables = excerpt.variables();
    double[] ones = new double[variables.length];
    Arrays.fill(ones, 1);
    Diagram diagram = OrderSearch.smallest(excerpt.composer, excerpt.root, ones, meter);
    return new Piece(diagram, variables);
  }

  /** The function that works where this one fails with every variable inverted. */
  Piece dual() {
    return new Piece(Templates.dual(diagram), variables);
  }

  /** The variables that the function depends on. */
  int[] variables() {
    int[] read = new int[diagram.levels()];
    int count = 0;
    for (int level = 0; level < read.length; level++) {
      if (diagram.to(level) > diagram.from(level)) {
        read[count++] = variables[diagram.variableAt(level)];
      }
    }
    return Arrays.copyOf(read, count);
  }

  int size() {
    return diagram.size();
  }

  /** Evaluates the function at independent variables, both vectors by common number. */
  void evaluate(double[] up, double[] down) {
    int[] low = diagram.lows();
    int[] high = diagram.highs();
    for (int level = diagram.levels() - 1; level >= 0; level--) {
      int variable = variables[diagram.variableAt(level)];
      double p = up[variable];
      double q = down[variable];
      for (int id = diagram.from(level); id < diagram.to(level); id++) {
        works[id] = p * works[high[id]] + q * works[low[id]];
        fails[id] = p * fails[high[id]] + q * fails[low[id]];
      }
    }
  }

  /** The probability of working, as evaluated last. */
  double works() {
    return works[diagram.root()];
  }

  /** The probability of failing, as evaluated last. */
  double fails() {
    return fails[diagram.root()];
  }
}
