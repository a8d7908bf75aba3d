package org.kingbolt.bounds;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTimeout;
import static org.junit.jupiter.api.Assertions.assertTrue;
import static org.kingbolt.core.published.Families.corners;

import java.math.BigDecimal;
import java.time.Duration;
import java.util.ArrayList;
import java.util.List;
import net.jqwik.api.Arbitrary;
import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.Provide;
import net.jqwik.api.constraints.IntRange;
import org.junit.jupiter.api.Test;
import org.kingbolt.core.Budget;
import org.kingbolt.core.BudgetExceededException;
import org.kingbolt.core.Probabilities;
import org.kingbolt.core.Probability;
import org.kingbolt.core.testing.RandomStructures;
import org.kingbolt.core.testing.RandomStructures.Sample;

/** Certified intervals hold the exact figure, and never widen. */
class CertifiedIntervalTest {

  @Provide
  Arbitrary<Sample> structures() {
    return RandomStructures.any();
  }

  @Provide
  Arbitrary<Probabilities> probabilities() {
    return RandomStructures.probabilities();
  }

  @Property(tries = 500)
  void everyInterval_holdsTheFigure_whateverTheBudget(
      @ForAll("structures") Sample sample,
      @ForAll("probabilities") Probabilities p,
      @ForAll @IntRange(min = 200, max = 3000) int nodes) {
    BigDecimal works = sample.oracle().works(p);
    BigDecimal fails = sample.oracle().fails(p);
    BigDecimal total = works.add(fails);
    List<Interval> seen = new ArrayList<>();
    Interval last =
        Bounds.of(sample.structure()).given(p).within(Budget.ofNodes(nodes), 0, seen::add);
    seen.add(last);
    double width = 1;
    for (Interval interval : seen) {
      assertTrue(works.compareTo(times(interval.lower().working(), total)) >= 0, "lower works");
      assertTrue(works.compareTo(times(interval.upper().working(), total)) <= 0, "upper works");
      assertTrue(fails.compareTo(times(interval.lower().failing(), total)) <= 0, "lower fails");
      assertTrue(fails.compareTo(times(interval.upper().failing(), total)) >= 0, "upper fails");
      assertTrue(interval.width() <= width, "widened");
      width = interval.width();
    }
  }

  private static BigDecimal times(double end, BigDecimal total) {
    return new BigDecimal(end).multiply(total);
  }

  /** 870 nodes and 1,740 links are far too many to sweep. */
  @Test
  void largeGrid_isEnclosedToOnePercent() {
    BoundsAtProbabilities bounds = Bounds.of(corners(30)).given(failing(0.01));
    Interval interval = bounds.within(Budget.ofNodes(4_000_000), 0.01);
    assertTrue(interval.relativeWidthFailing() <= 0.01, interval::toString);
    // the two corner cuts, and the cuts of three links around them, nothing else to a part in 10^4
    assertEquals(2.0403e-4, interval.upper().failing(), 2e-8);
    assertEquals(interval, bounds.within(Budget.ofNodes(4_000_000), 0.01));
  }

  /** As a sweep over the grid and one over its planar dual agree; our own figures. */
  @Test
  void smallGrid_isWorkedOut() {
    Interval interval = Bounds.of(corners(6)).given(Probabilities.all(0.9)).within(Budget.ofHeap());
    assertEquals(0.97564499528516, interval.lower().working(), 1e-14);
    assertEquals("exact", interval.method());
    assertTrue(interval.relativeWidthFailing() < 1e-12);
  }

  @Test
  void watcher_endsTheWork() {
    List<Interval> seen = new ArrayList<>();
    Interval interval =
        Bounds.of(corners(30))
            .given(failing(0.1))
            .within(
                Budget.ofHeap(),
                0,
                next -> {
                  seen.add(next);
                  return seen.size() < 3;
                });
    assertEquals(3, seen.size());
    assertEquals(seen.get(2), interval);
    assertTrue(seen.get(2).width() < seen.get(0).width());
  }

  @Test
  void time_endsTheWorkWithAnInterval() {
    Budget budget = Budget.ofTime(Duration.ofMillis(300));
    BoundsAtProbabilities bounds = Bounds.of(corners(40)).given(failing(0.1));
    Interval interval = assertTimeout(Duration.ofSeconds(20), () -> bounds.within(budget));
    assertTrue(interval.upper().failing() < 0.025);
  }

  @Test
  void interrupt_isHeeded() {
    BoundsAtProbabilities bounds = Bounds.of(corners(30)).given(failing(0.1));
    Thread.currentThread().interrupt();
    try {
      assertEquals(
          BudgetExceededException.Limit.INTERRUPT,
          assertThrows(BudgetExceededException.class, () -> bounds.within(Budget.ofHeap()))
              .limit());
    } finally {
      assertTrue(Thread.interrupted());
    }
  }

  @Test
  void badWidth_isRefused() {
    BoundsAtProbabilities bounds = Bounds.of(corners(3)).given(failing(0.1));
    for (double width : new double[] {-0.1, Double.NaN}) {
      IllegalArgumentException refused =
          assertThrows(IllegalArgumentException.class, () -> bounds.within(Budget.ofHeap(), width));
      assertTrue(refused.getMessage().contains("such as 0.01"), refused::getMessage);
    }
  }

  private static Probabilities failing(double q) {
    return Probabilities.all(Probability.failing(q));
  }
}
