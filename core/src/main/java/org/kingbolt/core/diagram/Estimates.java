package org.kingbolt.core.diagram;

import java.util.Arrays;

/**
 * What the expressions of a composer are likely to come to: their probabilities as if no two parts
 * of an operator shared anything. A guide for choices, not a result. For one thread.
 */
final class Estimates {

  private final Composer composer;
  private final double[] working;
  private final double[] failing;
  private final WorkMeter meter;
  private double[] works = new double[16];
  private double[] fails = new double[16];
  private int known;

  Estimates(Composer composer, double[] working, double[] failing, WorkMeter meter) {
    this.composer = composer;
    this.working = working;
    this.failing = failing;
    this.meter = meter;
  }

  /** Estimates everything up to an expression. */
  private void reach(int expression) {
    if (expression >= works.length) {
      int size = Math.max(works.length << 1, expression + 1);
      works = Arrays.copyOf(works, size);
      fails = Arrays.copyOf(fails, size);
    }
    double[] both = new double[2];
    for (; known <= expression; known++) {
      if (composer.isLeaf(known)) {
        works[known] = working[composer.variableOf(known)];
        fails[known] = failing[composer.variableOf(known)];
      } else {
        int[] parts = composer.parts(known);
        composer.operatorOf(known).expect(pick(works, parts), pick(fails, parts), both, meter);
        works[known] = both[0];
        fails[known] = both[1];
      }
    }
  }

  private static double[] pick(double[] values, int[] parts) {
    double[] picked = new double[parts.length];
    for (int slot = 0; slot < parts.length; slot++) {
      picked[slot] = values[parts[slot]];
    }
    return picked;
  }

  double[] works(int[] parts) {
    Arrays.stream(parts).max().ifPresent(this::reach);
    return pick(works, parts);
  }

  double[] fails(int[] parts) {
    Arrays.stream(parts).max().ifPresent(this::reach);
    return pick(fails, parts);
  }
}
