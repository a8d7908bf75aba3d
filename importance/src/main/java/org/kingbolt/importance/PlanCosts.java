package org.kingbolt.importance;

import java.math.BigDecimal;
import java.math.RoundingMode;
import java.util.List;

/**
 * Costs of one resource as whole numbers: the amounts are taken as the decimals that they print as,
 * times a power of ten, so that sums are exact.
 */
final class PlanCosts {

  /** No sum comes near the end of a long. */
  static final long MOST = 4_000_000_000_000_000_000L;

  private static final BigDecimal LARGEST = BigDecimal.valueOf(MOST / 2);

  private final int decimals;

  /** Takes all amounts that will be added; each at most once in a sum. */
  PlanCosts(List<Double> amounts) {
    BigDecimal sum = BigDecimal.ONE;
    int wanted = 0;
    for (double amount : amounts) {
      BigDecimal exact = BigDecimal.valueOf(amount).stripTrailingZeros();
      sum = sum.add(exact);
      wanted = Math.max(wanted, exact.scale());
    }
    int room = LARGEST.precision() - (sum.precision() - sum.scale()) - 1;
    this.decimals = Math.min(wanted, room);
  }

  long units(double amount) {
    return BigDecimal.valueOf(amount)
        .setScale(decimals, RoundingMode.HALF_EVEN)
        .unscaledValue()
        .longValueExact();
  }

  /** The largest number of units within a limit; a very large one stands for none. */
  long limit(double amount) {
    if (amount == Double.POSITIVE_INFINITY) {
      return MOST;
    }
    BigDecimal units =
        BigDecimal.valueOf(amount)
            .setScale(decimals, RoundingMode.FLOOR)
            .scaleByPowerOfTen(decimals);
    return units.min(BigDecimal.valueOf(MOST)).longValue();
  }

  double amount(long units) {
    return BigDecimal.valueOf(units, decimals).doubleValue();
  }
}
