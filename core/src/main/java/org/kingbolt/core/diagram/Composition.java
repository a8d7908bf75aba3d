package org.kingbolt.core.diagram;

import java.util.ArrayDeque;
import java.util.Arrays;
import java.util.Deque;

/**
 * One run over an expression whose parts may share variables: the table, the open operators, and
 * the parts built on their own.
 *
 * <p>A leaf that is itself a part of a series gate need not be looked at again inside the other
 * parts of that gate, which only matter while it works; likewise in a parallel gate, while it has
 * failed. So it is taken for granted there, in operators that are used nowhere else.
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

  /** Diagram of each expression built on its own, or -1. */
  private final int[] alone;

  private final int[] uses;

  /** Series gates around in which a leaf works, minus parallel gates around in which it failed. */
  private final int[] granted;

  private final int[] lastPass;
  private int passes;

  /** Open operators that are used in several places, so that nothing is granted inside them. */
  private int sharedOpen;

  private final Deque<Frame> frames = new ArrayDeque<>();
  private long framesHold;

  Composition(Composer composer, ExpressionOrder order, WorkMeter meter) {
    this.composer = composer;
    this.order = order;
    this.meter = meter;
    this.table = new NodeTable(composer.variables(), held -> meter.at(held + framesHold));
    this.alone = new int[composer.count()];
    Arrays.fill(alone, -1);
    this.uses = composer.uses();
    this.granted = new int[composer.count()];
    this.lastPass = new int[composer.count()];
  }

  Diagram diagram(int root) {
    if (composer.isLeaf(root)) {
      int leaf = leaf(root, Diagram.FAILS, Diagram.WORKS);
      return table.diagram(leaf, order.variableAtLevel());
    }
    open(root, Diagram.FAILS, Diagram.WORKS);
    return table.diagram(run(), order.variableAtLevel());
  }

  /** The number of nodes made. */
  int size() {
    return table.size();
  }

  private void open(int expression, int fails, int works) {
    Frame frame =
        new Frame(expression, composer.operatorOf(expression).template(meter), fails, works);
    framesHold += frame.made.length / 8;
    frames.push(frame);
    sharedOpen += uses[expression] > 1 ? 1 : 0;
    grant(expression, 1);
  }

  private void close(Frame frame) {
    grant(frame.expression, -1);
    sharedOpen -= uses[frame.expression] > 1 ? 1 : 0;
    framesHold -= frame.made.length / 8;
  }

  /** Grants the parts of a gate, each once, or takes that back. */
  private void grant(int expression, int times) {
    int sign = sign(expression);
    passes++;
    for (int slot = sign == 0 ? -1 : composer.slots(expression) - 1; slot >= 0; slot--) {
      int part = composer.part(expression, slot);
      granted[part] += lastPass[part] == passes ? 0 : sign * times;
      lastPass[part] = passes;
    }
  }

  /** 1 for a series gate, -1 for a parallel gate, 0 for others and where nothing is granted. */
  private int sign(int expression) {
    boolean grants =
        sharedOpen == 0
            && composer.operatorOf(expression) instanceof Threshold gate
            && gate.isChain();
    return grants ? ((Threshold) composer.operatorOf(expression)).isSeries() ? 1 : -1 : 0;
  }

  private int run() {
    while (true) {
      Frame frame = frames.getFirst();
      if (!advance(frame)) {
        continue;
      }
      frames.pop();
      close(frame);
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
        int sure = sharedOpen > 0 ? 0 : granted[part] - sign(frame.expression);
        result = sure > 0 ? works : sure < 0 ? fails : leaf(part, fails, works);
      } else if (alone[part] >= 0) {
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
