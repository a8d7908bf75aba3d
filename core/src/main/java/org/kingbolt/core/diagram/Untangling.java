package org.kingbolt.core.diagram;

/**
 * Turns an expression into one that {@link Concatenation} can build: knots, and operators that may
 * not be reduced, are replaced by their diagrams over the largest modules inside them.
 */
final class Untangling {

  private final Composer composer;
  private final Modules modules;
  private final WorkMeter meter;
  private final int[] place;

  /** The number of nodes that each module is going to have. */
  private final double[] size;

  /** Nodes of the diagrams put in. */
  private long kept;

  private Untangling(Composer composer, int root, WorkMeter meter) {
    this.composer = composer;
    this.modules = new Modules(composer, root);
    this.meter = meter;
    this.place = new int[root + 1];
    this.size = new double[root + 1];
    for (int expression = 0; expression <= root; expression++) {
      if (composer.isLeaf(expression)) {
        size[expression] = 1;
      } else if (modules.isModule(expression)) {
        settle(expression);
      }
    }
  }

  /** Does it, and returns the number of nodes of the whole. */
  static double of(Composer composer, int root, WorkMeter meter) {
    return new Untangling(composer, root, meter).size[root];
  }

  private void settle(int module) {
    if (!composer.operatorOf(module).isReduced() || modules.isKnot(module)) {
      Knot knot = new Knot(composer, modules, place, module);
      int[] units = knot.units();
      double[] sizes = new double[units.length];
      for (int unit = 0; unit < units.length; unit++) {
        sizes[unit] = size(units[unit]);
      }
      Diagram diagram = OrderSearch.smallest(knot, sizes, held -> meter.at(kept + held));
      kept += diagram.size() >> 3;
      composer.replace(module, Operator.of(diagram), units);
    } else if (composer.operatorOf(module) instanceof Threshold gate && !gate.isChain()) {
      arrange(module);
    }
    size[module] = measured(module);
  }

  private double size(int unit) {
    return unit < size.length ? size[unit] : measured(unit);
  }

  private double measured(int module) {
    Operator operator = composer.operatorOf(module);
    double sum = 0;
    if (operator instanceof Threshold gate) {
      for (int level = 0; level < gate.levels(); level++) {
        sum += gate.width(level) * size[composer.partAt(module, level)];
      }
    } else {
      Diagram template = operator.template(meter);
      for (int level = 0; level < template.levels(); level++) {
        int width = template.to(level) - template.from(level);
        sum += width * size(composer.partAt(module, level));
      }
    }
    return sum;
  }

  /** Larger parts go to the two ends of the gate, where its template is narrowest. */
  private void arrange(int module) {
    int[] parts = composer.sortedParts(module, part -> -Float.floatToIntBits((float) size[part]));
    int end = parts.length - 1;
    if (size[parts[0]] > size[parts[end]]) {
      int[] dealt = new int[parts.length];
      for (int i = 0; i <= end; i++) {
        dealt[i % 2 == 0 ? i / 2 : end - i / 2] = parts[i];
      }
      composer.arrange(module, dealt);
    }
  }
}
