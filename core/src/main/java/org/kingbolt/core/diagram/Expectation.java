package org.kingbolt.core.diagram;

/**
 * The probability of an expression at one vector of independent variables, module by module. Knots
 * are built as diagrams over the largest modules inside them; everything else is evaluated straight
 * from the values of its parts.
 */
final class Expectation {

  private final Composer composer;
  private final Modules modules;
  private final WorkMeter meter;
  private final int[] place;
  private final double[] works;
  private final double[] fails;
  private final double[] both = new double[2];

  private Expectation(Composer composer, int root, WorkMeter meter) {
    this.composer = composer;
    this.modules = new Modules(composer, root);
    this.meter = meter;
    this.place = new int[root + 1];
    this.works = new double[root + 1];
    this.fails = new double[root + 1];
  }

  /** Both probabilities of an expression. */
  static double[] of(
      Composer composer, int root, double[] working, double[] failing, WorkMeter meter) {
    Expectation expectation = new Expectation(composer, root, meter);
    for (int expression = 0; expression <= root; expression++) {
      if (composer.isLeaf(expression)) {
        expectation.both[0] = working[composer.variableOf(expression)];
        expectation.both[1] = failing[composer.variableOf(expression)];
      } else if (expectation.modules.isModule(expression)) {
        expectation.evaluate(expression);
      } else {
        continue;
      }
      expectation.works[expression] = expectation.both[0];
      expectation.fails[expression] = expectation.both[1];
    }
    return expectation.both;
  }

  private void evaluate(int module) {
    if (!modules.isKnot(module)) {
      expect(module);
      return;
    }
    Knot knot = new Knot(composer, modules, place, module);
    int[] units = knot.units();
    double[] ones = new double[units.length];
    double[] up = new double[units.length];
    double[] down = new double[units.length];
    for (int unit = 0; unit < units.length; unit++) {
      if (units[unit] < works.length) {
        both[0] = works[units[unit]];
        both[1] = fails[units[unit]];
      } else {
        expect(units[unit]);
      }
      ones[unit] = 1;
      up[unit] = both[0];
      down[unit] = both[1];
    }
    Operator.of(OrderSearch.smallest(knot, ones, meter)).expect(up, down, both, meter);
  }

  /** From the values of the parts. */
  private void expect(int operator) {
    int[] parts = composer.parts(operator);
    double[] up = new double[parts.length];
    double[] down = new double[parts.length];
    for (int slot = 0; slot < parts.length; slot++) {
      up[slot] = works[parts[slot]];
      down[slot] = fails[parts[slot]];
    }
    composer.operatorOf(operator).expect(up, down, both, meter);
  }
}
