package org.kingbolt.core.diagram;

import java.util.Arrays;

/**
 * The probability of an expression from below and from above, module by module like {@link
 * Expectation}: knots whose diagrams grow beyond a limit are bounded by {@link KnotBounds},
 * everything else is exact. A module whose parts are only bounded is evaluated at both ends of
 * them, as it is monotone, or stands for something monotone that it is an end of.
 */
final class ExpectationBounds {

  private final Composer composer;
  private final Modules modules;
  private final long effort;
  private final WorkMeter meter;
  private final int[] place;

  /** The lower and the upper end of each module. */
  private final End lower;

  private final End upper;

  /** One end of everything. */
  private static final class End {
    final double[] works;
    final double[] fails;
    final double[] both = new double[2];

    End(int size) {
      this.works = new double[size];
      this.fails = new double[size];
    }

    void set(int expression) {
      works[expression] = both[0];
      fails[expression] = both[1];
    }
  }

  private ExpectationBounds(Composer composer, int root, long effort, WorkMeter meter) {
    this.composer = composer;
    this.modules = new Modules(composer, root);
    this.effort = effort;
    this.meter = meter;
    this.place = new int[root + 1];
    this.lower = new End(root + 1);
    this.upper = new End(root + 1);
  }

  /** Both ends of both probabilities of an expression. */
  static Bracket of(
      Composer composer,
      int root,
      double[] working,
      double[] failing,
      long effort,
      WorkMeter meter) {
    ExpectationBounds bounds = new ExpectationBounds(composer, root, effort, meter);
    End lower = bounds.lower;
    End upper = bounds.upper;
    for (int expression = 0; expression <= root; expression++) {
      if (composer.isLeaf(expression)) {
        lower.both[0] = working[composer.variableOf(expression)];
        lower.both[1] = failing[composer.variableOf(expression)];
        upper.both[0] = lower.both[0];
        upper.both[1] = lower.both[1];
      } else if (!bounds.modules.isModule(expression)) {
        continue;
      } else if (bounds.modules.isKnot(expression)) {
        bounds.untie(expression);
      } else {
        bounds.expect(expression, lower);
        bounds.expect(expression, upper);
      }
      lower.set(expression);
      upper.set(expression);
    }
    return new Bracket(lower.works[root], lower.fails[root], upper.works[root], upper.fails[root]);
  }

  private void untie(int module) {
    Knot knot = new Knot(composer, modules, place, module);
    int[] units = knot.units();
    double[] ones = new double[units.length];
    Arrays.fill(ones, 1);
    double[][] low = units(units, lower);
    double[][] high = units(units, upper);
    Diagram diagram;
    try {
      diagram = OrderSearch.smallest(knot, ones, new Cap(meter, effort));
    } catch (Cap.Reached reached) {
      bound(knot, low, high);
      return;
    }
    Operator operator = Operator.of(diagram);
    operator.expect(low[0], low[1], lower.both, meter);
    operator.expect(high[0], high[1], upper.both, meter);
  }

  private void bound(Knot knot, double[][] low, double[][] high) {
    if (!knot.composer.isMonotone()) {
      // these bounds rest on the association of increasing events
      composer.giveUp();
      lower.both[0] = 0;
      lower.both[1] = 1;
      upper.both[0] = 1;
      upper.both[1] = 0;
      return;
    }
    KnotBounds bounds = new KnotBounds(knot.composer, knot.root, effort, meter);
    Bracket below = bounds.at(low[0], low[1]);
    Bracket above = Arrays.deepEquals(low, high) ? below : bounds.at(high[0], high[1]);
    lower.both[0] = below.worksAtLeast();
    lower.both[1] = below.failsAtMost();
    upper.both[0] = above.worksAtMost();
    upper.both[1] = above.failsAtLeast();
  }

  /** Both probabilities of all units, at one end. */
  private double[][] units(int[] units, End end) {
    double[][] both = new double[2][units.length];
    for (int unit = 0; unit < units.length; unit++) {
      if (units[unit] < end.works.length) {
        both[0][unit] = end.works[units[unit]];
        both[1][unit] = end.fails[units[unit]];
      } else {
        // several single parts of a gate, joined by the knot
        expect(units[unit], end);
        both[0][unit] = end.both[0];
        both[1][unit] = end.both[1];
      }
    }
    return both;
  }

  /** From the values of the parts, at one end. */
  private void expect(int operator, End end) {
    int[] parts = composer.parts(operator);
    double[] up = new double[parts.length];
    double[] down = new double[parts.length];
    for (int slot = 0; slot < parts.length; slot++) {
      up[slot] = end.works[parts[slot]];
      down[slot] = end.fails[parts[slot]];
    }
    composer.operatorOf(operator).expect(up, down, end.both, meter);
  }
}
