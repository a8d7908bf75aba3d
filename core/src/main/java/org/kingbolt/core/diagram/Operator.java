package org.kingbolt.core.diagram;

import org.jspecify.annotations.Nullable;

/**
 * What an operator of an expression does with its slots: a template, which is built when it is
 * needed, or the two probabilities straight from those of the slots, for which it need not be.
 *
 * <p>For one thread.
 */
public abstract class Operator {

  Operator() {}

  /** The number of slots read at most, which is the number of levels of the template. */
  abstract int levels();

  /** The slot read on a level of the template. */
  abstract int slotAt(int level);

  /** The template; the same object every time. */
  abstract Diagram template(WorkMeter meter);

  /**
   * The probabilities that the operator works and fails, when its slots are independent.
   *
   * @param works indexed by slot
   * @param fails indexed by slot
   * @param result receives both
   */
  abstract void expect(double[] works, double[] fails, double[] result, WorkMeter meter);

  /** An operator with a template at hand. */
  static Operator of(Diagram template) {
    return new Fixed(template);
  }

  /** k-out-of-n:G. */
  static Operator threshold(int k, int n) {
    return new Threshold(k, n);
  }

  /** An operator that decides slot by slot. */
  static Operator swept(StateRule rule) {
    return new Swept(rule);
  }

  /** The operator that works exactly where another one fails with every slot inverted. */
  static Operator dual(Operator operator) {
    return new Dual(operator);
  }

  private static final class Fixed extends Operator {
    private final Diagram template;

    Fixed(Diagram template) {
      this.template = template;
    }

    @Override
    int levels() {
      return template.levels();
    }

    @Override
    int slotAt(int level) {
      return template.variableAt(level);
    }

    @Override
    Diagram template(WorkMeter meter) {
      return template;
    }

    @Override
    void expect(double[] works, double[] fails, double[] result, WorkMeter meter) {
      Evaluation evaluation = Evaluation.of(template, works, fails);
      result[0] = evaluation.works();
      result[1] = evaluation.fails();
    }
  }

  private static final class Threshold extends Operator {
    private final int k;
    private final int n;
    private @Nullable Diagram template;

    Threshold(int k, int n) {
      this.k = k;
      this.n = n;
    }

    @Override
    int levels() {
      return n;
    }

    @Override
    int slotAt(int level) {
      return level;
    }

    @Override
    Diagram template(WorkMeter meter) {
      Diagram made = template;
      if (made == null) {
        made = Templates.threshold(k, n, meter);
        template = made;
      }
      return made;
    }

    /** By number of working slots so far; those that can no longer change anything settle. */
    @Override
    void expect(double[] works, double[] fails, double[] result, WorkMeter meter) {
      double[] mass = new double[k];
      mass[0] = 1;
      result[0] = 0;
      result[1] = 0;
      for (int slot = 0; slot < n; slot++) {
        meter.at(k >> 3);
        int most = Math.min(slot, k - 1);
        int least = Math.max(0, k - (n - slot));
        double up = works[slot];
        double down = fails[slot];
        if (most == k - 1) {
          result[0] += mass[most] * up;
          mass[most] *= down;
        } else {
          mass[most + 1] = mass[most] * up;
          mass[most] *= down;
        }
        for (int count = most - 1; count >= least; count--) {
          mass[count + 1] += mass[count] * up;
          mass[count] *= down;
        }
        if (k - (n - slot) >= 0) {
          result[1] += mass[least];
          mass[least] = 0;
        }
      }
    }
  }

  private static final class Swept extends Operator {
    private final StateRule rule;
    private @Nullable Diagram template;

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
    Diagram template(WorkMeter meter) {
      Diagram made = template;
      if (made == null) {
        made = StateSweep.template(rule, meter);
        template = made;
      }
      return made;
    }

    @Override
    void expect(double[] works, double[] fails, double[] result, WorkMeter meter) {
      StateSweep.expect(rule, works, fails, result, meter);
    }
  }

  private static final class Dual extends Operator {
    private final Operator primal;
    private @Nullable Diagram template;

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
    Diagram template(WorkMeter meter) {
      Diagram made = template;
      if (made == null) {
        made = Templates.dual(primal.template(meter));
        template = made;
      }
      return made;
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
