package org.kingbolt.importance;

import com.google.common.collect.ImmutableMap;
import java.math.BigInteger;
import java.util.Arrays;
import java.util.Map;
import org.apache.commons.math3.fraction.BigFraction;
import org.kingbolt.core.Budget;
import org.kingbolt.core.CoherentSystem;
import org.kingbolt.core.diagram.Diagram;
import org.kingbolt.core.diagram.StateCounts;
import org.kingbolt.core.diagram.WorkMeter;

/**
 * Barlow-Proschan importance where all lifetimes are alike: the integral of B_i(p) over p from 0 to
 * 1, whatever the common distribution.
 */
final class AlikeLifetimes {

  private AlikeLifetimes() {}

  /** By Gauss-Legendre quadrature with enough points to be exact for the degree. */
  static double[] rounded(CoherentSystem system, Budget budget) {
    int n = system.components().size();
    WorkMeter meter = budget.start("integrating over a common probability");
    GaussLegendre rule = GaussLegendre.of(Math.max(1, (n + 1) / 2), meter);
    double[] values = new double[n];
    double[] working = new double[n];
    double[] failing = new double[n];
    for (int k = 0; k < rule.size(); k++) {
      meter.now(system.diagram().size());
      Arrays.fill(working, rule.point(k));
      Arrays.fill(failing, rule.complement(k));
      double[] derivatives = Gradient.of(system.diagram(), working, failing).derivatives();
      for (int i = 0; i < n; i++) {
        values[i] += rule.weight(k) * derivatives[i];
      }
    }
    return values;
  }

  /** By counts of states. */
  static Map<String, BigFraction> exact(CoherentSystem system, Budget budget) {
    WorkMeter meter = budget.start("counting the states that each component decides");
    Diagram diagram = system.diagram();
    ImmutableMap.Builder<String, BigFraction> values = ImmutableMap.builder();
    for (int i = 0; i < system.components().size(); i++) {
      BigInteger[] with = StateCounts.workingBySize(diagram.holding(i, true, meter), meter);
      BigInteger[] without = StateCounts.workingBySize(diagram.holding(i, false, meter), meter);
      // each state of the others is counted twice, with the component held in both its states
      int n = with.length - 1;
      BigFraction sum = BigFraction.ZERO;
      BigInteger choices = BigInteger.ONE;
      for (int size = 0; size <= n; size++) {
        BigInteger decided = with[size].subtract(without[size]);
        sum = sum.add(new BigFraction(decided, choices));
        choices =
            choices.multiply(BigInteger.valueOf(n - size)).divide(BigInteger.valueOf(size + 1));
      }
      values.put(system.components().get(i), sum.divide(BigInteger.valueOf(n + 1)));
    }
    return values.buildOrThrow();
  }
}
