package org.kingbolt.importance;

import java.util.function.IntToDoubleFunction;
import java.util.stream.DoubleStream;

/**
 * The measures that follow from one pass, each as a function of {@link FirstOrder}. B stands for
 * the derivative, r for the system's probability of working, F for that of having failed, q and p
 * for a component's. None takes a difference that loses digits, and none is ever NaN.
 */
final class Measures {

  private Measures() {}

  /** q_i B_i / F; 0 where F = 0. */
  static double[] criticalityFailing(FirstOrder f) {
    return each(f, i -> share(f.failing(i) * f.derivative(i), f.fails()));
  }

  /** p_i B_i / r; 0 where r = 0. */
  static double[] criticalityWorking(FirstOrder f) {
    return each(f, i -> share(f.working(i) * f.derivative(i), f.works()));
  }

  /** q_i F(0_i) / F; 0 where F = 0. */
  static double[] diagnosticFailing(FirstOrder f) {
    return each(f, i -> share(f.failing(i) * f.failsGivenFailed(i), f.fails()));
  }

  /** p_i r(1_i) / r; 0 where r = 0. */
  static double[] diagnosticWorking(FirstOrder f) {
    return each(f, i -> share(f.working(i) * f.worksGivenWorking(i), f.works()));
  }

  /** F(0_i) / F; where F = 0: 1 if F(0_i) = 0 too, and infinite if not. */
  static double[] riskAchievementWorth(FirstOrder f) {
    return each(f, i -> ratio(f.failsGivenFailed(i), f.fails()));
  }

  /** F / F(1_i); where F(1_i) = 0: 1 if F = 0 too, and infinite if not. */
  static double[] riskReductionWorth(FirstOrder f) {
    return each(f, i -> ratio(f.fails(), f.failsGivenWorking(i)));
  }

  /** q_i B_i = r(1_i) - r. */
  static double[] improvementPotential(FirstOrder f) {
    return each(f, i -> f.failing(i) * f.derivative(i));
  }

  /** B_i over the sum of all; all 0 where the sum is. */
  static double[] differentialUniform(FirstOrder f) {
    return parts(f.derivatives());
  }

  /** q_i B_i over the sum of all; all 0 where the sum is. */
  static double[] differentialProportional(FirstOrder f) {
    return parts(improvementPotential(f));
  }

  private static double[] each(FirstOrder f, IntToDoubleFunction measure) {
    double[] values = new double[f.size()];
    for (int i = 0; i < values.length; i++) {
      values[i] = measure.applyAsDouble(i);
    }
    return values;
  }

  /** A conditional probability, 0 where the condition has none. */
  static double share(double part, double whole) {
    return part == 0 ? 0 : Math.min(1, part / whole);
  }

  /** A ratio that is at least 1: rounding may have brought it below. */
  static double ratio(double larger, double smaller) {
    if (smaller == 0) {
      return larger == 0 ? 1 : Double.POSITIVE_INFINITY;
    }
    return Math.max(1, larger / smaller);
  }

  /** Values over their sum. */
  static double[] parts(double[] values) {
    double sum = DoubleStream.of(values).sum();
    return DoubleStream.of(values).map(value -> value == 0 ? 0 : value / sum).toArray();
  }
}
