package org.kingbolt.core;

import java.math.BigInteger;
import java.util.List;
import java.util.Optional;

/**
 * Where a reliability polynomial meets the diagonal. Which kind of curve it is follows from counts:
 * exactly, and without looking at values.
 */
final class Crossing {

  /** No crossing is below 1/n^2 or so, as r(p) is at most the sum of C(n, j) p^j from 2 up. */
  private static final double LOWEST = 0x1p-100;

  private Crossing() {}

  static Optional<Probability> of(List<BigInteger> working) {
    int n = working.size() - 1;
    if (n < 2 || isConstant(working) || working.get(1).signum() > 0 || hasSingleCut(working)) {
      return Optional.empty();
    }
    BigInteger half = BigInteger.TWO.pow(n - 1);
    int side = StateTotals.sum(working).compareTo(half);
    if (side == 0) {
      return Optional.of(Probability.working(0.5));
    }
    return Optional.of(
        side > 0
            ? Probability.working(belowHalf(new CountForm(working)))
            : Probability.failing(belowHalf(new CountForm(StateTotals.dual(working)))));
  }

  /** Where the curve, which is above the diagonal at 1/2, crosses it; by halving. */
  private static double belowHalf(CountForm works) {
    double below = LOWEST;
    double above = 0.5;
    double ratio = above / below;
    while (true) {
      double middle = ratio > 2 ? below * Math.sqrt(ratio) : below / 2 + above / 2;
      if (middle <= below || middle >= above) {
        return above;
      }
      if (works.at(Probability.working(middle)) < middle) {
        below = middle;
      } else {
        above = middle;
      }
      ratio = above / below;
    }
  }

  static Optional<Probability> betterFrom(List<BigInteger> working) {
    if (isConstant(working)) {
      boolean works = working.get(0).signum() > 0;
      return works ? Optional.of(Probability.IMPOSSIBLE) : Optional.empty();
    }
    if (hasSingleCut(working)) {
      return Optional.empty();
    }
    // a component that is a path by itself: r(p) = p + (1-p) g(p), and g is not 0 without such a
    // cut
    return working.get(1).signum() > 0 ? Optional.of(Probability.IMPOSSIBLE) : of(working);
  }

  /** Whether all states work or none does. */
  private static boolean isConstant(List<BigInteger> working) {
    return working.get(0).signum() > 0 || working.get(working.size() - 1).signum() == 0;
  }

  /** Whether some component alone makes the system fail. */
  private static boolean hasSingleCut(List<BigInteger> working) {
    int n = working.size() - 1;
    return working.get(n - 1).compareTo(BigInteger.valueOf(n)) < 0;
  }
}
