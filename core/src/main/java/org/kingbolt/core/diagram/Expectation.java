package org.kingbolt.core.diagram;

import java.util.Arrays;

/**
 * The probability of an expression at one vector of independent variables, operator by operator.
 * Parts that share variables are built as diagrams inside the smallest operator that holds all
 * uses; everything else is evaluated straight from the values of its parts.
 */
final class Expectation {

  private final Composer composer;
  private final int root;
  private final ExpressionOrder order;
  private final Composition composition;
  private final double[] working;
  private final double[] failing;
  private final WorkMeter meter;

  /** Values of the nodes in the composition's table, as far as they have been computed. */
  private double[] nodeWorks = {0, 1};

  private double[] nodeFails = {1, 0};
  private int known = 2;

  Expectation(Composer composer, int root, double[] working, double[] failing, WorkMeter meter) {
    this.composer = composer;
    this.root = root;
    this.working = working;
    this.failing = failing;
    this.meter = meter;
    this.order = ExpressionOrder.depthFirst(composer, root);
    this.composition = new Composition(composer, order, meter);
  }

  double[] result() {
    boolean[] needed = needed();
    double[] works = new double[root + 1];
    double[] fails = new double[root + 1];
    double[] both = new double[2];
    for (int expression = 0; expression <= root; expression++) {
      if (!needed[expression]) {
        continue;
      }
      if (composer.isLeaf(expression)) {
        both[0] = working[composer.variableOf(expression)];
        both[1] = failing[composer.variableOf(expression)];
      } else if (order.isKnot(expression)) {
        int node = composition.build(expression);
        evaluateNodes();
        both[0] = nodeWorks[node];
        both[1] = nodeFails[node];
      } else {
        int[] parts = composer.parts(expression);
        double[] up = new double[parts.length];
        double[] down = new double[parts.length];
        for (int slot = 0; slot < parts.length; slot++) {
          up[slot] = works[parts[slot]];
          down[slot] = fails[parts[slot]];
        }
        composer.operatorOf(expression).expect(up, down, both, meter);
      }
      works[expression] = both[0];
      fails[expression] = both[1];
    }
    return new double[] {works[root], fails[root]};
  }

  /** From the root down to leaves and to operators that must be built as a whole. */
  private boolean[] needed() {
    boolean[] needed = new boolean[root + 1];
    needed[root] = true;
    for (int expression = root; expression >= 0; expression--) {
      if (needed[expression] && !composer.isLeaf(expression) && !order.isKnot(expression)) {
        for (int part : composer.parts(expression)) {
          needed[part] = true;
        }
      }
    }
    return needed;
  }

  /** Children have smaller ids than their parents. */
  private void evaluateNodes() {
    NodeTable table = composition.table();
    int size = table.size();
    if (size > nodeWorks.length) {
      nodeWorks = Arrays.copyOf(nodeWorks, Math.max(size, nodeWorks.length << 1));
      nodeFails = Arrays.copyOf(nodeFails, nodeWorks.length);
    }
    int[] variables = order.variableAtLevel();
    for (int id = known; id < size; id++) {
      int variable = variables[table.level(id)];
      double p = working[variable];
      double q = failing[variable];
      nodeWorks[id] = p * nodeWorks[table.high(id)] + q * nodeWorks[table.low(id)];
      nodeFails[id] = p * nodeFails[table.high(id)] + q * nodeFails[table.low(id)];
    }
    known = size;
  }
}
