package org.kingbolt.core.diagram;

import java.util.Arrays;

/**
 * A module with parts that share something, taken out of its expression: an expression of its own
 * over units, which are the largest modules inside. Parts of a series or parallel gate that stand
 * nowhere else are one unit together.
 */
final class Knot {

  private final Composer whole;
  private final Modules modules;

  /** One more than the place of each expression of the whole in this one; 0 where it has none. */
  private final int[] place;

  /** The knot over its units as variables. */
  final Composer composer = new Composer(0);

  final int root;

  /** The expression, in the whole, of each unit. */
  private int[] units = new int[16];

  /**
   * Takes a knot out.
   *
   * @param place one entry for each expression of the whole, zero in the beginning; may be passed
   *     on from knot to knot, as they have no operators in common
   */
  Knot(Composer whole, Modules modules, int[] place, int knot) {
    this.whole = whole;
    this.modules = modules;
    this.place = place;
    int copied = 0;
    for (int operator : operators(knot)) {
      copied = copy(operator);
      // the knot itself may be a unit of another one
      place[operator] = operator == knot ? 0 : copied + 1;
    }
    this.root = copied;
  }

  int[] units() {
    return Arrays.copyOf(units, composer.variables());
  }

  /** The knot and what is between it and its units, parts before wholes. */
  private int[] operators(int knot) {
    int[] found = new int[16];
    int count = 1;
    found[0] = knot;
    for (int next = 0; next < count; next++) {
      int operator = found[next];
      for (int level = 0; level < whole.levels(operator); level++) {
        int part = whole.partAt(operator, level);
        if (place[part] == 0 && !modules.isModule(part)) {
          place[part] = 1;
          if (count == found.length) {
            found = Arrays.copyOf(found, count << 1);
          }
          found[count++] = part;
        }
      }
    }
    int[] operators = Arrays.copyOf(found, count);
    Arrays.sort(operators);
    return operators;
  }

  private int copy(int expression) {
    Operator operator = whole.operatorOf(expression);
    int[] parts = whole.parts(expression);
    int singles = 0;
    for (int level = 0; level < operator.levels(); level++) {
      singles += modules.isSingle(whole.partAt(expression, level)) ? 1 : 0;
    }
    if (singles > 1 && operator instanceof Threshold gate && gate.isChain()) {
      return joined(parts, gate.isSeries(), singles);
    }
    for (int level = 0; level < operator.levels(); level++) {
      int slot = operator.slotAt(level);
      parts[slot] = placed(parts[slot]);
    }
    return composer.operator(operator, parts);
  }

  /** A gate whose single parts become one unit, in the place of the first of them. */
  private int joined(int[] parts, boolean series, int singles) {
    int[] unit = new int[singles];
    int[] joined = new int[parts.length - singles + 1];
    int single = 0;
    int next = 0;
    int at = 0;
    for (int part : parts) {
      if (!modules.isSingle(part)) {
        joined[next++] = placed(part);
        continue;
      }
      at = single == 0 ? next++ : at;
      unit[single++] = part;
    }
    joined[at] = unit(series ? whole.all(unit) : whole.any(unit));
    return series ? composer.all(joined) : composer.any(joined);
  }

  private int placed(int part) {
    if (modules.isModule(part) && place[part] == 0) {
      place[part] = unit(part) + 1;
    }
    return place[part] - 1;
  }

  private int unit(int expression) {
    if (composer.variables() == units.length) {
      units = Arrays.copyOf(units, units.length << 1);
    }
    units[composer.variables()] = expression;
    return composer.variable(composer.variables());
  }
}
