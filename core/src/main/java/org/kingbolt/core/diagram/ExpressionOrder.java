package org.kingbolt.core.diagram;

import java.util.Arrays;

/**
 * What is known of an expression before it is built: the level of each variable, the deepest level
 * each sub-expression uses, and which operators have parts that share something ("knots").
 *
 * <p>One depth-first pass with an explicit stack. Two uses of one thing are found to lie in
 * different parts of the deepest operator on the stack that was already open at the earlier use.
 */
final class ExpressionOrder {

  private final Composer composer;
  private final int[] variableAtLevel;
  private final int[] level;
  private final int[] deepest;
  private final boolean[] knot;
  private int levels;

  private ExpressionOrder(Composer composer) {
    this.composer = composer;
    this.variableAtLevel = new int[composer.variables()];
    this.level = new int[composer.variables()];
    Arrays.fill(level, -1);
    this.deepest = new int[composer.count()];
    this.knot = new boolean[composer.count()];
  }

  /** Variables in order of their first use. */
  static ExpressionOrder depthFirst(Composer composer, int root) {
    ExpressionOrder order = new ExpressionOrder(composer);
    order.visit(root);
    for (int variable = 0; variable < composer.variables(); variable++) {
      order.place(variable);
    }
    order.measure();
    return order;
  }

  /** The caller's order; the parts of gates are brought into it as far as they can be. */
  static ExpressionOrder given(Composer composer, int root, int[] variables) {
    ExpressionOrder order = new ExpressionOrder(composer);
    for (int variable : variables) {
      order.place(variable);
    }
    order.sortParts();
    order.visit(root);
    order.measure();
    return order;
  }

  private void place(int variable) {
    if (level[variable] < 0) {
      level[variable] = levels;
      variableAtLevel[levels++] = variable;
    }
  }

  /** Reads the parts of each gate and of each family in order of their first variables. */
  private void sortParts() {
    int[] shallowest = new int[composer.count()];
    for (int expression = 0; expression < shallowest.length; expression++) {
      int least = Integer.MAX_VALUE;
      if (composer.isLeaf(expression)) {
        least = level[composer.variableOf(expression)];
      } else if (composer.operatorOf(expression) instanceof Threshold) {
        composer.arrange(expression, composer.sortedParts(expression, part -> shallowest[part]));
      } else if (composer.operatorOf(expression) instanceof Family family) {
        int[] slots = composer.sortedSlots(expression, part -> shallowest[part]);
        composer.replace(expression, family.inOrder(slots), composer.parts(expression));
      }
      for (int l = composer.levels(expression) - 1; l >= 0; l--) {
        least = Math.min(least, shallowest[composer.partAt(expression, l)]);
      }
      shallowest[expression] = least;
    }
  }

  /** Depth-first: places variables at their first use and finds the knots. */
  private void visit(int root) {
    int[] lastUse = new int[composer.count()];
    int[] open = new int[64];
    int[] nextLevel = new int[64];
    int[] opened = new int[64];
    int depth = 0;
    int clock = 0;
    int arriving = root;
    while (true) {
      if (arriving >= 0) {
        clock++;
        int before = lastUse[arriving];
        lastUse[arriving] = clock;
        if (before > 0) {
          knot[open[deepestOpenBefore(opened, depth, before)]] = true;
        } else if (composer.isLeaf(arriving)) {
          place(composer.variableOf(arriving));
        } else {
          if (depth == open.length) {
            open = Arrays.copyOf(open, depth << 1);
            nextLevel = Arrays.copyOf(nextLevel, depth << 1);
            opened = Arrays.copyOf(opened, depth << 1);
          }
          open[depth] = arriving;
          nextLevel[depth] = 0;
          opened[depth] = clock;
          depth++;
        }
      }
      if (depth == 0) {
        return;
      }
      int operator = open[depth - 1];
      if (nextLevel[depth - 1] < composer.levels(operator)) {
        arriving = composer.partAt(operator, nextLevel[depth - 1]++);
      } else {
        depth--;
        arriving = -1;
      }
    }
  }

  /** Index of the deepest open operator that was opened no later than a moment. */
  private static int deepestOpenBefore(int[] opened, int depth, int moment) {
    int at = Arrays.binarySearch(opened, 0, depth, moment);
    return at >= 0 ? at : -at - 2;
  }

  private void measure() {
    for (int expression = 0; expression < composer.count(); expression++) {
      int most = composer.isLeaf(expression) ? level[composer.variableOf(expression)] : -1;
      for (int l = composer.levels(expression) - 1; l >= 0; l--) {
        most = Math.max(most, deepest[composer.partAt(expression, l)]);
      }
      deepest[expression] = most;
    }
  }

  int levelOf(int variable) {
    return level[variable];
  }

  /** Deepest level that the expression reads. */
  int deepest(int expression) {
    return deepest[expression];
  }

  /** Whether two parts of this operator share a variable or an operator. */
  boolean isKnot(int expression) {
    return knot[expression];
  }

  int[] variableAtLevel() {
    return variableAtLevel;
  }
}
