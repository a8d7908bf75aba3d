package org.kingbolt.core.diagram;

import java.util.Arrays;

/**
 * Which parts of an expression are modules: operators all of whose variables are used inside them
 * and nowhere else, so that the rest of the expression knows them by their values alone. A module
 * with two parts that share something is a knot.
 *
 * <p>Method: Dutuit &amp; Rauzy, A linear-time algorithm to find modules of fault trees, IEEE
 * Trans. Reliab. 45 (1996) 422 (from memory): one depth-first pass takes the time of the first and
 * of the last visit to everything; a module is visited below only between its opening and its
 * closing. Explicit stack.
 */
final class Modules {

  private final Composer composer;
  private final int root;

  /** First and last visit to each expression; 0 where there is none. */
  private final int[] first;

  private final int[] last;
  private final boolean[] module;
  private final boolean[] single;

  Modules(Composer composer, int root) {
    this.composer = composer;
    this.root = root;
    this.first = new int[root + 1];
    this.last = new int[root + 1];
    this.module = new boolean[root + 1];
    this.single = new boolean[root + 1];
    int[] closing = new int[root + 1];
    visit(closing);
    for (int expression = 0; expression <= root; expression++) {
      if (first[expression] > 0) {
        judge(expression, closing[expression]);
      }
    }
  }

  private void visit(int[] closing) {
    int[] open = new int[64];
    int[] nextLevel = new int[64];
    int depth = 0;
    int clock = 1;
    first[root] = clock;
    last[root] = clock;
    open[depth++] = root;
    while (depth > 0) {
      int operator = open[depth - 1];
      if (nextLevel[depth - 1] == composer.levels(operator)) {
        closing[operator] = ++clock;
        depth--;
        continue;
      }
      int part = composer.partAt(operator, nextLevel[depth - 1]++);
      last[part] = ++clock;
      if (first[part] == 0) {
        first[part] = clock;
        if (depth == open.length) {
          open = Arrays.copyOf(open, depth << 1);
          nextLevel = Arrays.copyOf(nextLevel, depth << 1);
        }
        open[depth] = part;
        nextLevel[depth++] = 0;
      }
    }
  }

  /** Parts are judged before their wholes; their visits then stand for all that is below them. */
  private void judge(int expression, int closing) {
    int earliest = Integer.MAX_VALUE;
    int latest = 0;
    for (int level = composer.levels(expression) - 1; level >= 0; level--) {
      int part = composer.partAt(expression, level);
      earliest = Math.min(earliest, first[part]);
      latest = Math.max(latest, last[part]);
    }
    boolean reads = composer.isLeaf(expression) || composer.levels(expression) > 0;
    module[expression] =
        first[expression] < earliest && latest < closing && (reads || expression == root);
    single[expression] = module[expression] && first[expression] == last[expression];
    first[expression] = Math.min(first[expression], earliest);
    last[expression] = Math.max(last[expression], latest);
  }

  /**
   * Whether nothing outside uses what the expression uses; true for a leaf, false for a constant.
   */
  boolean isModule(int expression) {
    return module[expression];
  }

  /** Whether the expression is a module and stands in one place only. */
  boolean isSingle(int expression) {
    return single[expression];
  }

  /** Whether two parts of a module share something. */
  boolean isKnot(int expression) {
    for (int level = composer.levels(expression) - 1; level >= 0; level--) {
      if (!single[composer.partAt(expression, level)]) {
        return true;
      }
    }
    return false;
  }
}
