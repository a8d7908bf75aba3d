package org.kingbolt.core.diagram;

import org.jspecify.annotations.Nullable;

/**
 * What an operator of an expression does with its slots: a template, which is built when it is
 * needed, or the two probabilities straight from those of the slots, for which it need not be.
 *
 * <p>For one thread.
 */
public abstract class Operator {

  private @Nullable Diagram template;

  Operator() {}

  /** The number of slots read at most, which is the number of levels of the template. */
  abstract int levels();

  /** The slot read on a level of the template. */
  int slotAt(int level) {
    return level;
  }

  /** Whether the template is known to be reduced. */
  boolean isReduced() {
    return true;
  }

  /** Whether a slot that works never makes the operator fail. */
  boolean isMonotone() {
    return true;
  }

  /** The template; the same object every time. */
  final Diagram template(WorkMeter meter) {
    Diagram made = template;
    if (made == null) {
      made = make(meter);
      template = made;
    }
    return made;
  }

  /** Builds the template. */
  abstract Diagram make(WorkMeter meter);

  /**
   * The probabilities that the operator works and fails, when its slots are independent.
   *
   * @param works indexed by slot
   * @param fails indexed by slot
   * @param result receives both
   */
  void expect(double[] works, double[] fails, double[] result, WorkMeter meter) {
    Evaluation evaluation = Evaluation.of(template(meter), works, fails);
    result[0] = evaluation.works();
    result[1] = evaluation.fails();
  }

  /** An operator with a reduced template at hand. */
  static Operator of(Diagram template) {
    return new Fixed(template);
  }

  /** An operator that decides slot by slot. */
  static Operator swept(StateRule rule) {
    return new Swept(rule);
  }

  /**
   * An operator that decides slot by slot, with the likeliest states of each layer only.
   *
   * @param works indexed by slot, to tell which states are likely
   * @param most how many states of a layer are followed
   * @param otherwise where the others settle
   */
  static Operator likely(StateRule rule, double[] works, double[] fails, int most, int otherwise) {
    return new Likely(rule, works, fails, most, otherwise);
  }

  /** The operator that works exactly where another one fails with every slot inverted. */
  static Operator dual(Operator operator) {
    return new Dual(operator);
  }

  private static final class Fixed extends Operator {
    private final Diagram fixed;

    Fixed(Diagram fixed) {
      this.fixed = fixed;
    }

    @Override
    int levels() {
      return fixed.levels();
    }

    @Override
    int slotAt(int level) {
      return fixed.variableAt(level);
    }

    @Override
    Diagram make(WorkMeter meter) {
      return fixed;
    }
  }

  private static class Swept extends Operator {
    final StateRule rule;

    Swept(StateRule rule) {
      this.rule = rule;
    }

    @Override
    int levels() {
      return rule.steps();
    }

    @Override
    int slotAt(int level) {
      return rule.slot(level);
    }

    @Override
    boolean isReduced() {
      return false;
    }

    @Override
    Diagram make(WorkMeter meter) {
      return StateSweep.template(rule, meter);
    }

    @Override
    void expect(double[] works, double[] fails, double[] result, WorkMeter meter) {
      StateSweep.expect(rule, works, fails, result, meter);
    }
  }

  private static final class Likely extends Swept {
    private final double[] works;
    private final double[] fails;
    private final int most;
    private final int otherwise;

    Likely(StateRule rule, double[] works, double[] fails, int most, int otherwise) {
      super(rule);
      this.works = works;
      this.fails = fails;
      this.most = most;
      this.otherwise = otherwise;
    }

    /** What is followed after one slot has failed may be cut off after it has worked. */
    @Override
    boolean isMonotone() {
      return false;
    }

    @Override
    Diagram make(WorkMeter meter) {
      return TruncatedSweep.template(rule, works, fails, most, otherwise, meter);
    }

    /** Follows the states that are likely at these probabilities, not those of the template. */
    @Override
    void expect(double[] up, double[] down, double[] result, WorkMeter meter) {
      double[] both = TruncatedSweep.expect(rule, up, down, most, otherwise, meter);
      result[0] = both[0];
      result[1] = both[1];
    }
  }

  private static final class Dual extends Operator {
    private final Operator primal;

    Dual(Operator primal) {
      this.primal = primal;
    }

    @Override
    int levels() {
      return primal.levels();
    }

    @Override
    int slotAt(int level) {
      return primal.slotAt(level);
    }

    @Override
    boolean isReduced() {
      return primal.isReduced();
    }

    @Override
    boolean isMonotone() {
      return primal.isMonotone();
    }

    @Override
    Diagram make(WorkMeter meter) {
      return Templates.dual(primal.make(meter));
    }

    @Override
    void expect(double[] works, double[] fails, double[] result, WorkMeter meter) {
      primal.expect(fails, works, result, meter);
      double dualWorks = result[1];
      result[1] = result[0];
      result[0] = dualWorks;
    }
  }
}
