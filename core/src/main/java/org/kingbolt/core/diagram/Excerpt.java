package org.kingbolt.core.diagram;

import java.util.Arrays;

/** A copy of one expression and of what is below it, its variables numbered anew. */
final class Excerpt {

  final Composer composer = new Composer(0);
  final int root;

  /** The former number of each variable. */
  private int[] variables = new int[16];

  Excerpt(Composer whole, int expression, WorkMeter meter) {
    int[] below = below(whole, expression, meter);
    for (int i = 0; i < below.length; i++) {
      int from = below[i];
      if (whole.isLeaf(from)) {
        int number = composer.variables();
        if (number == variables.length) {
          variables = Arrays.copyOf(variables, number << 1);
        }
        variables[number] = whole.variableOf(from);
        composer.variable(number);
      } else {
        int[] parts = whole.parts(from);
        for (int slot = 0; slot < parts.length; slot++) {
          // slots that are never read may hold anything
          parts[slot] = Math.max(0, Arrays.binarySearch(below, 0, i, parts[slot]));
        }
        composer.operator(whole.operatorOf(from), parts);
      }
    }
    this.root = below.length - 1;
  }

  int[] variables() {
    return Arrays.copyOf(variables, composer.variables());
  }

  /** All that an expression reads, itself last. */
  private static int[] below(Composer whole, int expression, WorkMeter meter) {
    IntSet found = new IntSet();
    found.add(expression);
    for (int next = 0; next < found.size(); next++) {
      meter.at(found.size());
      int operator = found.get(next);
      for (int level = whole.levels(operator) - 1; level >= 0; level--) {
        found.add(whole.partAt(operator, level));
      }
    }
    return found.sorted();
  }
}
