package org.kingbolt.bounds;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;
import static org.kingbolt.bounds.Holds.assertHolds;

import java.util.List;
import net.jqwik.api.Arbitrary;
import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.Provide;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.function.Executable;
import org.kingbolt.core.Budget;
import org.kingbolt.core.Probabilities;
import org.kingbolt.core.Probability;
import org.kingbolt.core.Structure;
import org.kingbolt.core.testing.RandomStructures;
import org.kingbolt.core.testing.RandomStructures.Sample;

/** Intervals combine, and say what they need. */
class IntervalTest {

  @Provide
  Arbitrary<Sample> structures() {
    return RandomStructures.any();
  }

  @Provide
  Arbitrary<Probabilities> probabilities() {
    return RandomStructures.probabilities();
  }

  @Property(tries = 500)
  void allIntervalsOfOneFigure_haveItInCommon(
      @ForAll("structures") Sample sample, @ForAll("probabilities") Probabilities p) {
    BoundsTable table = Bounds.of(sample.structure()).given(p).all(Budget.ofNodes(50_000));
    Interval common = table.rows().get(0).interval();
    for (BoundsTable.Row row : table) {
      Interval next = common.intersection(row.interval());
      assertHolds(sample.oracle(), p, next);
      assertTrue(next.width() <= common.width() * (1 + 1e-9) + 1e-15);
      common = next;
    }
  }

  private static Interval of(double fewest, double most, Assumption assumption) {
    return new Interval(
        Probability.failing(most), Probability.failing(fewest), assumption, "given", "it is given");
  }

  @Test
  void intersection_takesBothEnds_andTheStricterAssumption() {
    Interval low = of(1e-9, 3e-9, Assumption.NONE);
    Interval high = of(2e-9, 4e-9, Assumption.ASSOCIATED);
    Interval both = low.intersection(high);
    assertEquals(2e-9, both.upper().failing());
    assertEquals(3e-9, both.lower().failing());
    assertEquals(Assumption.ASSOCIATED, both.assumption());
    assertEquals(1e-9, both.width(), 1e-21);
    assertEquals(0.5, both.relativeWidthFailing(), 1e-9);
    assertEquals("given from below, given from above", both.method());
    assertEquals(low, low.intersection(of(0, 1, Assumption.INDEPENDENT)));
    assertEquals(0, of(0, 0, Assumption.NONE).relativeWidthFailing());
    assertEquals(Double.POSITIVE_INFINITY, of(0, 0.1, Assumption.NONE).relativeWidthFailing());
  }

  @Test
  void emptyIntersection_isADefect() {
    Interval one = of(1e-9, 2e-9, Assumption.NONE);
    Interval other = of(3e-9, 4e-9, Assumption.NONE);
    IllegalStateException defect =
        assertThrows(IllegalStateException.class, () -> one.intersection(other));
    assertTrue(defect.getMessage().contains("have nothing in common"), defect::getMessage);
    assertThrows(IllegalStateException.class, () -> of(0.2, 0.1, Assumption.NONE));
    assertFalse(one.contains(Probability.failing(3e-9)));
  }

  @Test
  void nullArguments_areNamed() {
    BoundsAtProbabilities bounds =
        Bounds.of(Structure.series("a", "b")).given(Probabilities.all(0.5));
    SetBoundsAtProbabilities sets =
        Bounds.ofSets(List.of(), List.of(List.of("a"))).given(Probabilities.all(0.5));
    List<Executable> calls =
        List.of(
            () -> bounds.modular(null),
            () -> bounds.frechet(null),
            () -> bounds.linearProgramming(null),
            () -> bounds.inclusionExclusion(1, null),
            () -> bounds.secondOrder(null),
            () -> bounds.deltaStar(null),
            () -> bounds.all(null),
            () -> sets.linearProgramming(null),
            () -> sets.inclusionExclusion(1, null),
            () -> sets.secondOrder(null),
            () -> sets.all(null));
    for (Executable call : calls) {
      assertEquals(
          "budget is null; give one, such as Budget.ofHeap()",
          assertThrows(NullPointerException.class, call).getMessage());
    }
    assertThrows(NullPointerException.class, () -> Bounds.ofSets(null, List.of()));
    assertThrows(NullPointerException.class, () -> Bounds.ofSets(List.of(), null));
  }
}
