package org.kingbolt.bounds;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;
import static org.kingbolt.bounds.Holds.assertHolds;
import static org.kingbolt.bounds.Holds.assertWithin;

import java.util.List;
import java.util.Set;
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
import org.kingbolt.core.Structure;
import org.kingbolt.core.testing.RandomStructures;
import org.kingbolt.core.testing.RandomStructures.Sample;

/** Closed forms hold the exact figure for independent components, and are ordered as proven. */
class ClosedFormsTest {

  private static final Budget SMALL = Budget.ofNodes(200_000);

  /** Of up to 70 sets of up to 8 components, taken two at a time. */
  private static final double ROUNDING_OF_SUMS = 1e-11;

  @Provide
  Arbitrary<Sample> structures() {
    return RandomStructures.any();
  }

  @Provide
  Arbitrary<Probabilities> probabilities() {
    return RandomStructures.probabilities();
  }

  @Property(tries = 1500)
  void intervals_holdTheExactFigure(
      @ForAll("structures") Sample sample,
      @ForAll("probabilities") Probabilities p,
      @ForAll @IntRange(min = 1, max = 3) int order) {
    BoundsAtProbabilities bounds = Bounds.of(sample.structure()).given(p);
    for (Interval interval :
        List.of(
            bounds.inclusionExclusion(order, SMALL),
            bounds.secondOrder(),
            bounds.frechet(),
            bounds.linearProgramming(),
            bounds.modular())) {
      assertHolds(sample.oracle(), p, interval);
    }
  }

  @Property(tries = 500)
  void intervals_areOrderedAsProven(
      @ForAll("structures") Sample sample, @ForAll("probabilities") Probabilities p) {
    BoundsAtProbabilities bounds = Bounds.of(sample.structure()).given(p);
    assertWithin(bounds.modular(), bounds.esaryProschan());
    assertWithin(bounds.linearProgramming(), bounds.frechet());
    assertWithin(bounds.minMax(), bounds.frechet());
    assertWithin(bounds.secondOrder(), bounds.inclusionExclusion(2), ROUNDING_OF_SUMS);
    for (int order = 1; order < 4; order++) {
      assertWithin(
          bounds.inclusionExclusion(order + 1, Budget.ofNodes(1_000_000)),
          bounds.inclusionExclusion(order, Budget.ofNodes(1_000_000)),
          ROUNDING_OF_SUMS);
    }
  }

  /** Up to the number of sets, inclusion and exclusion is the figure. */
  @Property(tries = 500)
  void inclusionExclusion_ofAllSets_isExact(
      @ForAll("structures") Sample sample, @ForAll("probabilities") Probabilities p) {
    int sets =
        Math.min(sample.oracle().minimalCuts().size(), sample.oracle().minimalPaths().size());
    if (sets <= 12) {
      Interval interval = Bounds.of(sample.structure()).given(p).inclusionExclusion(sets);
      assertHolds(sample.oracle(), p, interval);
      assertTrue(interval.width() < 1e-9, interval::toString);
    }
  }

  /** Common practice: one path, or one cut, and all methods but Fréchet's sums are exact. */
  @Test
  void seriesAndParallel_attainTheEnds() {
    Probabilities p = Probabilities.all(Probability.failing(1e-6)).with("b", 0.7);
    Structure series = Structure.series("a", "b", "c");
    Structure parallel = Structure.parallel("a", "b", "c");
    for (Structure structure : List.of(series, parallel)) {
      double fails = structure.reliability(p).failing();
      BoundsAtProbabilities bounds = Bounds.of(structure).given(p);
      for (Interval interval :
          List.of(bounds.secondOrder(), bounds.inclusionExclusion(3), bounds.modular())) {
        assertEquals(fails, interval.lower().failing(), 1e-12 * fails, interval::toString);
        assertEquals(fails, interval.upper().failing(), 1e-12 * fails, interval::toString);
      }
    }
    BoundsAtProbabilities ofSeries = Bounds.of(series).given(p);
    double fails = series.reliability(p).failing();
    assertEquals(fails, ofSeries.minMax().lower().failing(), 1e-12 * fails);
    BoundsAtProbabilities ofParallel = Bounds.of(parallel).given(p);
    fails = parallel.reliability(p).failing();
    assertEquals(fails, ofParallel.minMax().upper().failing(), 1e-12 * fails);
    // whatever the dependence: all fail together, or one after the other
    assertEquals(1e-6, ofParallel.frechet().lower().failing(), 1e-18);
    assertEquals(1e-6 + 1e-6 + 0.3, ofSeries.frechet().lower().failing(), 1e-12);
    assertEquals(0.3, ofSeries.linearProgramming().upper().failing(), 1e-9);
  }

  /** Barlow and Proschan 1975, ch. 2 (from memory): good components favour one, bad the other. */
  @Property(tries = 500)
  void esaryProschanAndMinMax_changePlaces(@ForAll("structures") Sample sample) {
    Set<Set<String>> cuts = sample.oracle().minimalCuts();
    Set<Set<String>> paths = sample.oracle().minimalPaths();
    int smallestCut = cuts.stream().mapToInt(Set::size).min().orElseThrow();
    int smallestPath = paths.stream().mapToInt(Set::size).min().orElseThrow();
    BoundsAtProbabilities good =
        Bounds.of(sample.structure()).given(Probabilities.all(Probability.failing(1e-5)));
    BoundsAtProbabilities bad =
        Bounds.of(sample.structure()).given(Probabilities.all(Probability.working(1e-5)));
    if (smallestCut >= 2) {
      assertTrue(
          good.esaryProschan().lower().failing() <= good.minMax().lower().failing() * (1 + 1e-9));
    }
    if (smallestPath >= 2) {
      assertTrue(
          bad.esaryProschan().upper().working() <= bad.minMax().upper().working() * (1 + 1e-9));
    }
    if (cuts.size() > smallestPath) {
      assertTrue(bad.minMax().lower().working() > bad.esaryProschan().lower().working());
    }
    if (paths.size() > smallestCut) {
      assertTrue(good.minMax().upper().failing() > good.esaryProschan().upper().failing());
    }
  }

  /** Pairs that fail with about 1e-15 each: both ends keep their digits. */
  @Test
  void rareFailures_keepTheirDigitsOnBothEnds() {
    Structure twoOfThree = Structure.atLeast(2, "a", "b", "c");
    double q = 3e-8;
    double exact = 3 * q * q - 2 * q * q * q;
    BoundsAtProbabilities bounds =
        Bounds.of(twoOfThree).given(Probabilities.all(Probability.failing(q)));
    for (Interval interval :
        List.of(bounds.secondOrder(), bounds.inclusionExclusion(2), bounds.inclusionExclusion(3))) {
      assertTrue(interval.lower().failing() >= exact);
      assertTrue(interval.upper().failing() <= exact);
      assertTrue(interval.relativeWidthFailing() < 3 * q, interval::toString);
    }
    assertTrue(bounds.inclusionExclusion(3).relativeWidthFailing() < 1e-12);
    Interval any =
        Bounds.of(twoOfThree)
            .given(Probabilities.all(Probability.failing(1e-15)))
            .linearProgramming();
    assertEquals(1.5e-15, any.lower().failing(), 1e-23);
  }

  @Test
  void sumsThatSayNothing_areNamed() {
    Interval interval =
        Bounds.of(Structure.atLeast(3, "a", "b", "c", "d", "e"))
            .given(Probabilities.all(0.5))
            .inclusionExclusion(1);
    assertEquals(Probability.IMPOSSIBLE, interval.lower());
    assertEquals(Probability.CERTAIN, interval.upper());
    assertTrue(interval.reason().contains("exceeds 1"), interval::reason);
  }

  /** Few cut sets of two links, but far too many pairs of paths. */
  @Test
  void familyThatIsTooLarge_leavesTheOther() {
    StringBuilder text = new StringBuilder("series(");
    for (int i = 0; i < 12; i++) {
      text.append(i == 0 ? "" : ", ").append("parallel(a" + i + ", b" + i + ")");
    }
    Structure pairs = Structure.parse(text + ")");
    BoundsAtProbabilities bounds =
        Bounds.of(pairs).given(Probabilities.all(Probability.failing(1e-6)));
    Interval interval = bounds.secondOrder(Budget.ofNodes(5_000));
    assertTrue(interval.relativeWidthFailing() < 1e-11, interval::toString);
    assertTrue(interval.contains(pairs.reliability(Probabilities.all(Probability.failing(1e-6)))));
    BudgetExceededException none =
        assertThrows(
            BudgetExceededException.class, () -> bounds.inclusionExclusion(9, Budget.ofNodes(900)));
    assertEquals(BudgetExceededException.Limit.NODES, none.limit());
  }

  /** What conditioning can lead to: every interval is the figure itself. */
  @Test
  void constantStructures_haveExactIntervals() {
    Probabilities p = Probabilities.all(0.9);
    Structure always = Structure.parallel("a", "b").givenWorking("a");
    Structure never = Structure.series("a", "b").givenFailed("a");
    for (Structure structure : List.of(always, never)) {
      BoundsTable table = Bounds.of(structure).given(p).all();
      assertEquals(8, table.rows().size(), table::toString);
      for (BoundsTable.Row row : table) {
        double works = structure.equals(always) ? 1 : 0;
        assertEquals(works, row.interval().lower().working(), 1e-14, table::toString);
        assertEquals(works, row.interval().upper().working(), 1e-14, table::toString);
      }
    }
  }

  /** Slack for rounding grows with the components, and must not take the sides apart. */
  @Test
  void largeSystems_haveEndsWhoseSidesAddUp() {
    String[] names = new String[20_000];
    for (int i = 0; i < names.length; i++) {
      names[i] = "c" + i;
    }
    Probabilities p = Probabilities.all(Probability.failing(2e-5));
    BoundsAtProbabilities bounds = Bounds.of(Structure.series(names)).given(p);
    Probability exact = Structure.series(names).reliability(p);
    for (Interval interval :
        List.of(
            bounds.frechet(),
            bounds.minMax(),
            bounds.modular(),
            bounds.inclusionExclusion(1),
            bounds.esaryProschan())) {
      for (Probability end : List.of(interval.lower(), interval.upper())) {
        assertEquals(1, end.working() + end.failing(), 1e-14, interval::toString);
      }
      assertTrue(interval.contains(exact), interval::toString);
    }
    assertEquals(0.4, bounds.frechet().lower().failing(), 1e-9);
  }

  @Test
  void interrupts_areHeeded() {
    BoundsAtProbabilities bounds =
        Bounds.of(Structure.atLeast(3, "a", "b", "c", "d", "e").compile())
            .given(Probabilities.all(0.9));
    List<org.junit.jupiter.api.function.Executable> calls =
        List.of(
            bounds::frechet,
            bounds::minMax,
            bounds::secondOrder,
            bounds::linearProgramming,
            bounds::modular,
            bounds::all,
            () -> bounds.inclusionExclusion(3));
    for (org.junit.jupiter.api.function.Executable call : calls) {
      Thread.currentThread().interrupt();
      try {
        assertEquals(
            BudgetExceededException.Limit.INTERRUPT,
            assertThrows(BudgetExceededException.class, call).limit());
      } finally {
        assertTrue(Thread.interrupted());
      }
    }
  }

  @Test
  void badOrder_isRefused() {
    BoundsAtProbabilities bounds =
        Bounds.of(Structure.parallel("a", "b")).given(Probabilities.all(0.9));
    IllegalArgumentException refused =
        assertThrows(IllegalArgumentException.class, () -> bounds.inclusionExclusion(0));
    assertTrue(refused.getMessage().contains("give 1 or more"), refused::getMessage);
  }
}
