package org.kingbolt.core.diagram;

import java.util.ArrayDeque;
import java.util.Deque;

/**
 * One run of a {@link Composer}: the table, the open operators, and the parts built on their own.
 */
final class Composition {

  /** An operator being built towards two nodes. */
  private static final class Frame {
    final int expression;
    final Diagram template;
    final int[] made;

    /**
     * Whether the operator is built on its own, towards the two outcomes; the operator around it
     * then finds the result in {@link Composition#alone} and joins it.
     */
    final boolean alone;

    int next = 2;
    int level;

    Frame(int expression, Diagram template, int fails, int works) {
      this.expression = expression;
      this.template = template;
      this.alone = fails == Diagram.FAILS && works == Diagram.WORKS;
      this.made = new int[template.size()];
      made[Diagram.FAILS] = fails;
      made[Diagram.WORKS] = works;
      this.level = template.levels() - 1;
    }
  }

  private final Composer composer;
  private final ExpressionOrder order;
  private final NodeTable table;
  private final WorkMeter meter;

  /** Diagram of each expression built on its own, or 0. */
  private final int[] alone;

  private final Deque<Frame> frames = new ArrayDeque<>();
  private long framesHold;

  Composition(Composer composer, ExpressionOrder order, WorkMeter meter) {
    this.composer = composer;
    this.order = order;
    this.meter = meter;
    this.table = new NodeTable(composer.variables(), held -> meter.at(held + framesHold));
    this.alone = new int[composer.count()];
  }

  Diagram diagram(int root) {
    return table.diagram(build(root), order.variableAtLevel());
  }

  /** Builds one expression on its own, beside what has been built before. */
  int build(int expression) {
    if (composer.isLeaf(expression)) {
      return leaf(expression, Diagram.FAILS, Diagram.WORKS);
    }
    open(expression, Diagram.FAILS, Diagram.WORKS);
    return run();
  }

  /** The table in which expressions are built. */
  NodeTable table() {
    return table;
  }

  private void open(int expression, int fails, int works) {
    Frame frame =
        new Frame(expression, composer.operatorOf(expression).template(meter), fails, works);
    framesHold += frame.made.length / 8;
    frames.push(frame);
  }

  private int run() {
    while (true) {
      Frame frame = frames.getFirst();
      if (!advance(frame)) {
        continue;
      }
      frames.pop();
      framesHold -= frame.made.length / 8;
      int result = frame.made[frame.template.root()];
      if (frame.alone) {
        alone[frame.expression] = result;
      }
      if (frames.isEmpty()) {
        return result;
      }
      if (!frame.alone) {
        Frame outer = frames.getFirst();
        outer.made[outer.next++] = result;
      }
    }
  }

  /** Builds template nodes until one needs a part built first; true when none is left. */
  private boolean advance(Frame frame) {
    Diagram template = frame.template;
    int[] made = frame.made;
    while (frame.next < template.size()) {
      while (frame.next >= template.to(frame.level)) {
        frame.level--;
      }
      int part = composer.partAt(frame.expression, frame.level);
      int fails = made[template.low(frame.next)];
      int works = made[template.high(frame.next)];
      int result;
      if (fails == works) {
        result = fails;
      } else if (composer.isLeaf(part)) {
        result = leaf(part, fails, works);
      } else if (alone[part] != 0) {
        result = table.ifThenElse(alone[part], works, fails);
      } else if (isDirect(part, fails, works)) {
        open(part, fails, works);
        return false;
      } else {
        open(part, Diagram.FAILS, Diagram.WORKS);
        return false;
      }
      made[frame.next++] = result;
    }
    return true;
  }

  /** Whether a part can be built straight towards two nodes, all of which it is read before. */
  private boolean isDirect(int part, int fails, int works) {
    return !order.isKnot(part)
        && order.deepest(part) < Math.min(table.level(fails), table.level(works));
  }

  private int leaf(int part, int fails, int works) {
    int level = order.levelOf(composer.variableOf(part));
    if (level < table.level(fails) && level < table.level(works)) {
      return table.node(level, fails, works);
    }
    int variable = table.node(level, Diagram.FAILS, Diagram.WORKS);
    return table.ifThenElse(variable, works, fails);
  }
}
