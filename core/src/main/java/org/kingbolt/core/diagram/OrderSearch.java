package org.kingbolt.core.diagram;

import java.util.function.IntUnaryOperator;

/**
 * Looks for an order of a knot's units with a small diagram. Four depth-first orders are tried:
 * parts with fewer leaves first, improved by what {@link OrderCost} guesses of its neighbours; the
 * same without improvement; parts with more leaves first; and parts as they are described. The
 * smallest diagram is kept.
 *
 * <p>An order is given up as soon as its table exceeds a limit, which grows until the first one is
 * done, and half of the smallest table from then on; so the search costs a small multiple of the
 * cheapest order. It ends at once where there is little to gain.
 */
final class OrderSearch {

  private static final long FIRST_LIMIT = 1 << 11;
  private static final int GROWTH = 8;

  /** A diagram with so many nodes a unit, on the average, is not worth another order. */
  private static final double SMALL = 2;

  /** Guesses at neighbours: so many for each expression, as long as all are so many visits. */
  private static final int GUESSES = 2;

  private static final int MOST_VISITS = 1 << 20;

  /** Ends an order that has grown too large. */
  private static final class GivenUp extends RuntimeException {
    private static final long serialVersionUID = 1L;

    private GivenUp() {
      super("given up", null, false, false);
    }
  }

  private final Composer composer;
  private final int root;
  private final double[] sizes;
  private final WorkMeter meter;

  private Diagram best = Diagram.constant(false);
  private double bestSize = Double.POSITIVE_INFINITY;

  /** How large a table may become. */
  private long limit = FIRST_LIMIT;

  private OrderSearch(Composer composer, int root, double[] sizes, WorkMeter meter) {
    this.composer = composer;
    this.root = root;
    this.sizes = sizes;
    this.meter = meter;
  }

  /**
   * Builds a knot's diagram.
   *
   * @param sizes how many nodes each unit will count for
   */
  static Diagram smallest(Knot knot, double[] sizes, WorkMeter meter) {
    return smallest(knot.composer, knot.root, sizes, meter);
  }

  /** Builds the diagram of any expression that all of a composer is for. */
  static Diagram smallest(Composer composer, int root, double[] sizes, WorkMeter meter) {
    OrderSearch search = new OrderSearch(composer, root, sizes, meter);
    for (int expression = 0; expression < composer.count(); expression++) {
      // once for all orders, and not within their limits
      composer.operatorOf(expression).template(meter);
    }
    if (search.hasChoice()) {
      search.run();
    } else {
      search.limit = Long.MAX_VALUE;
      search.build();
    }
    return search.best;
  }

  private boolean hasChoice() {
    for (int expression = 0; expression < composer.count(); expression++) {
      if (composer.operatorOf(expression) instanceof Threshold && composer.slots(expression) > 1) {
        return true;
      }
    }
    return false;
  }

  private void run() {
    int[] leaves = leaves();
    int[] described = composer.arrangement();
    sortGates(part -> leaves[part]);
    int[] fewestFirst = composer.arrangement();
    sortGates(part -> -leaves[part]);
    int[] mostFirst = composer.arrangement();
    composer.arrange(fewestFirst);
    improve();
    int[][] candidates = {composer.arrangement(), fewestFirst, mostFirst, described};
    double small = 0;
    for (double size : sizes) {
      small += SMALL * size;
    }
    while (bestSize == Double.POSITIVE_INFINITY) {
      for (int[] candidate : candidates) {
        if (bestSize > small) {
          composer.arrange(candidate);
          build();
        }
      }
      limit *= GROWTH;
    }
  }

  /** Builds the present arrangement, unless it grows beyond the limit. */
  private void build() {
    long most = limit;
    WorkMeter limited =
        held -> {
          meter.at(held);
          if (held > most) {
            throw new GivenUp();
          }
        };
    try {
      ExpressionOrder order = ExpressionOrder.depthFirst(composer, root);
      Composition composition = new Composition(composer, order, limited);
      Diagram diagram = composition.diagram(root);
      limit = Math.min(limit, composition.size() / 2);
      double size = 0;
      for (int level = 0; level < diagram.levels(); level++) {
        size += (diagram.to(level) - diagram.from(level)) * sizes[diagram.variableAt(level)];
      }
      if (size < bestSize) {
        bestSize = size;
        best = diagram;
      }
    } catch (GivenUp givenUp) {
      // the next one may do better
    }
  }

  /** Moves single parts of gates to other places where that makes the guess smaller. */
  private void improve() {
    OrderCost cost = new OrderCost(composer, root, sizes);
    int count = composer.count();
    int left = Math.min(GUESSES * count, MOST_VISITS / count);
    double least = cost.ofPresent();
    double before;
    do {
      before = least;
      for (int gate = count - 1; gate >= 0; gate--) {
        long slots = composer.operatorOf(gate) instanceof Threshold ? composer.slots(gate) : 0;
        for (long move = 0; move < slots * slots && left > 0; move++) {
          int from = (int) (move / slots);
          int to = (int) (move % slots);
          if (from != to) {
            left--;
            meter.at(count);
            int[] parts = composer.parts(gate);
            composer.arrange(gate, moved(parts, from, to));
            double guess = cost.ofPresent();
            if (guess < least) {
              least = guess;
            } else {
              composer.arrange(gate, parts);
            }
          }
        }
      }
    } while (least < before && left > 0);
  }

  private static int[] moved(int[] parts, int from, int to) {
    int[] moved = parts.clone();
    if (from < to) {
      System.arraycopy(parts, from + 1, moved, from, to - from);
    } else {
      System.arraycopy(parts, to, moved, to + 1, from - to);
    }
    moved[to] = parts[from];
    return moved;
  }

  private void sortGates(IntUnaryOperator key) {
    for (int gate = 0; gate < composer.count(); gate++) {
      if (composer.operatorOf(gate) instanceof Threshold) {
        composer.arrange(gate, composer.sortedParts(gate, key));
      }
    }
  }

  /** The number of leaves below each expression, those in several places counted as often. */
  private int[] leaves() {
    int[] leaves = new int[composer.count()];
    for (int expression = 0; expression < leaves.length; expression++) {
      long sum = composer.isLeaf(expression) ? 1 : 0;
      for (int level = composer.levels(expression) - 1; level >= 0; level--) {
        sum += leaves[composer.partAt(expression, level)];
      }
      leaves[expression] = (int) Math.min(Integer.MAX_VALUE, sum);
    }
    return leaves;
  }
}
