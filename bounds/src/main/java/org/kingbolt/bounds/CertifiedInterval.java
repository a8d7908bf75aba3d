package org.kingbolt.bounds;

import java.util.function.Predicate;
import org.kingbolt.core.Budget;
import org.kingbolt.core.BudgetExceededException;
import org.kingbolt.core.Enclosure;
import org.kingbolt.core.Probabilities;
import org.kingbolt.core.Structure;

/** Narrows an enclosure until it is enough, and rounds its ends outwards. */
final class CertifiedInterval {

  private CertifiedInterval() {}

  static Interval of(
      Structure structure,
      Probabilities p,
      Budget budget,
      double relativeWidth,
      Predicate<Interval> goOn,
      long operations) {
    Enclosure enclosure = Enclosure.of(structure, p, budget);
    Interval interval = interval(enclosure, operations);
    boolean again = true;
    while (again) {
      try {
        again = enclosure.narrow();
      } catch (BudgetExceededException over) {
        if (over.limit() == BudgetExceededException.Limit.INTERRUPT) {
          throw over;
        }
        again = false;
      }
      Interval next = interval(enclosure, operations);
      boolean changed = !next.equals(interval);
      interval = next;
      again &= interval.relativeWidthFailing() > relativeWidth;
      if (changed) {
        again &= goOn.test(interval);
      }
    }
    return interval;
  }

  private static Interval interval(Enclosure enclosure, long operations) {
    return new Interval(
        Rounding.down(enclosure.lower().working(), enclosure.lower().failing(), operations),
        Rounding.up(enclosure.upper().working(), enclosure.upper().failing(), operations),
        Assumption.INDEPENDENT,
        enclosure.isExact() ? "exact" : "certified",
        enclosure.isExact()
            ? "the figure was worked out; only rounding is left"
            : "a coherent system works less often with components held failed, and more often with"
                + " components held working");
  }
}
