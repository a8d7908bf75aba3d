package org.kingbolt.bounds;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.math.BigDecimal;
import java.util.List;
import java.util.Set;
import net.jqwik.api.Arbitrary;
import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.Provide;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.function.Executable;
import org.kingbolt.core.Budget;
import org.kingbolt.core.BudgetExceededException;
import org.kingbolt.core.CoherentSystem;
import org.kingbolt.core.Probabilities;
import org.kingbolt.core.Probability;
import org.kingbolt.core.Structure;
import org.kingbolt.core.testing.Oracle;
import org.kingbolt.core.testing.RandomStructures;
import org.kingbolt.core.testing.RandomStructures.Sample;

/** Intervals hold what they promise, on random structures and in both tails. */
class BoundsTest {

  private static final BigDecimal TOLERANCE = new BigDecimal("1e-12");

  @Provide
  Arbitrary<Sample> structures() {
    return RandomStructures.any();
  }

  @Provide
  Arbitrary<Probabilities> probabilities() {
    return RandomStructures.probabilities();
  }

  @Property(tries = 1000)
  void intervals_holdTheExactFigure(
      @ForAll("structures") Sample sample, @ForAll("probabilities") Probabilities p) {
    BoundsAtProbabilities bounds = Bounds.of(sample.structure()).given(p);
    Probability computed = sample.structure().compile().reliability(p);
    for (Interval interval : List.of(bounds.esaryProschan(), bounds.minMax())) {
      BigDecimal works = sample.oracle().works(p);
      BigDecimal fails = sample.oracle().fails(p);
      // the sides of a component add up to 1 within a rounding only, hence those of the system
      BigDecimal total = works.add(fails);
      assertTrue(works.compareTo(times(interval.lower().working(), total)) >= 0, "lower works");
      assertTrue(works.compareTo(times(interval.upper().working(), total)) <= 0, "upper works");
      assertTrue(fails.compareTo(times(interval.lower().failing(), total)) <= 0, "lower fails");
      assertTrue(fails.compareTo(times(interval.upper().failing(), total)) >= 0, "upper fails");
      assertTrue(interval.contains(computed), () -> interval + " without " + computed);
    }
  }

  private static BigDecimal times(double end, BigDecimal total) {
    return new BigDecimal(end).multiply(total);
  }

  /** The definitions, from the truth table's minimal sets and in exact arithmetic. */
  @Property(tries = 500)
  void ends_areThoseOfTheDefinition(
      @ForAll("structures") Sample sample, @ForAll("probabilities") Probabilities p) {
    Oracle oracle = sample.oracle();
    BoundsAtProbabilities bounds = Bounds.of(sample.structure()).given(p);
    BigDecimal noCut = BigDecimal.ONE;
    BigDecimal worstCut = BigDecimal.ONE;
    for (Set<String> cut : oracle.minimalCuts()) {
      BigDecimal holds = BigDecimal.ONE.subtract(product(cut, p, false));
      noCut = noCut.multiply(holds);
      worstCut = worstCut.min(holds);
    }
    BigDecimal noPath = BigDecimal.ONE;
    BigDecimal bestPath = BigDecimal.ZERO;
    for (Set<String> path : oracle.minimalPaths()) {
      BigDecimal works = product(path, p, true);
      noPath = noPath.multiply(BigDecimal.ONE.subtract(works));
      bestPath = bestPath.max(works);
    }
    assertEnd(noCut, bounds.esaryProschan().lower().working());
    assertEnd(noPath, bounds.esaryProschan().upper().failing());
    assertEnd(bestPath, bounds.minMax().lower().working());
    assertEnd(worstCut, bounds.minMax().upper().working());
  }

  private static BigDecimal product(Set<String> set, Probabilities p, boolean working) {
    BigDecimal product = BigDecimal.ONE;
    for (String name : set) {
      Probability value = p.get(name);
      product = product.multiply(new BigDecimal(working ? value.working() : value.failing()));
    }
    return product;
  }

  /** To 1e-12 of the end, or of 1 where the sides of the components only add up to nearly 1. */
  private static void assertEnd(BigDecimal exact, double end) {
    BigDecimal off = new BigDecimal(end).subtract(exact).abs();
    BigDecimal allowed = exact.abs().multiply(TOLERANCE).max(new BigDecimal("1e-15"));
    assertTrue(off.compareTo(allowed) <= 0, () -> "exactly " + exact.doubleValue() + ", " + end);
  }

  /** Common practice: series and parallel structures attain the bounds. */
  @Test
  void esaryProschan_ofSeriesAndParallel_isTheFigureItself() {
    Probabilities p = Probabilities.all(Probability.failing(1e-6)).with("b", 0.7);
    for (Structure structure :
        List.of(Structure.series("a", "b", "c"), Structure.parallel("a", "b", "c"))) {
      Interval interval = Bounds.of(structure).given(p).esaryProschan();
      Probability exact = structure.compile().reliability(p);
      assertTrue(interval.contains(exact));
      assertEquals(exact.failing(), interval.lower().failing(), 1e-13 * exact.failing());
      assertEquals(exact.failing(), interval.upper().failing(), 1e-13 * exact.failing());
    }
  }

  /** Five pairs of components that fail with 1e-9: the tail of 5e-18 keeps its digits. */
  @Test
  void ends_keepTheirDigitsInTheTail() {
    Structure pairs =
        Structure.series(
            Structure.parallel("a1", "a2"),
            Structure.parallel("b1", "b2"),
            Structure.parallel("c1", "c2"),
            Structure.parallel("d1", "d2"),
            Structure.parallel("e1", "e2"));
    BoundsAtProbabilities bounds =
        Bounds.of(pairs).given(Probabilities.all(Probability.failing(1e-9)));
    BigDecimal pair = new BigDecimal("1e-9").pow(2);
    BigDecimal exact = BigDecimal.ONE.subtract(BigDecimal.ONE.subtract(pair).pow(5));
    assertEquals(
        exact.doubleValue(), bounds.esaryProschan().lower().failing(), 1e-12 * exact.doubleValue());
    assertEquals(pair.doubleValue(), bounds.minMax().upper().failing(), 1e-12 * pair.doubleValue());
    assertEquals(1.0, bounds.minMax().upper().working());
  }

  /** Millions of sets: both sides of an end stay complements of each other. */
  @Test
  void ends_ofManySets_haveSidesThatAddUpToOne() {
    String[] names = new String[22];
    for (int i = 0; i < names.length; i++) {
      names[i] = "c" + i;
    }
    BoundsAtProbabilities bounds =
        Bounds.of(Structure.atLeast(11, names)).given(Probabilities.all(0.95));
    for (Probability end :
        List.of(bounds.esaryProschan().lower(), bounds.esaryProschan().upper())) {
      assertEquals(1, end.working() + end.failing(), 1e-15);
    }
  }

  @Test
  void tooManySets_endInABudgetException() {
    String[] names = new String[30];
    for (int i = 0; i < names.length; i++) {
      names[i] = "c" + i;
    }
    BoundsAtProbabilities bounds =
        Bounds.of(Structure.atLeast(15, names)).given(Probabilities.all(0.9));
    BudgetExceededException tooMany =
        assertThrows(
            BudgetExceededException.class, () -> bounds.esaryProschan(Budget.ofNodes(10_000)));
    assertEquals(BudgetExceededException.Limit.NODES, tooMany.limit());
    assertTrue(bounds.minMax(Budget.ofNodes(10_000)).lower().working() > 0);
  }

  @Test
  void badInput_isNamed() {
    Structure pair = Structure.parallel("a", "b");
    IllegalArgumentException missing =
        assertThrows(
            IllegalArgumentException.class,
            () -> Bounds.of(pair).given(Probabilities.working(java.util.Map.of("a", 0.5))));
    assertTrue(missing.getMessage().contains("\"b\""), missing.getMessage());
  }

  private static void assertNullRefused(String message, Executable call) {
    assertEquals(message, assertThrows(NullPointerException.class, call).getMessage());
  }

  @Test
  void nullArguments_areNamed() {
    Structure pair = Structure.series("a", "b");
    assertNullRefused(
        "structure is null; give a structure, or a system compiled from one",
        () -> Bounds.of((Structure) null));
    assertNullRefused(
        "system is null; give a compiled system, or a structure to compile",
        () -> Bounds.of((CoherentSystem) null));
    assertNullRefused(
        "probabilities are null; give those of all components, such as Probabilities.all(0.9)",
        () -> Bounds.of(pair).given(null));
    BoundsAtProbabilities bounds = Bounds.of(pair).given(Probabilities.all(0.5));
    String budget = "budget is null; give one, such as Budget.ofHeap()";
    assertNullRefused(budget, () -> bounds.minMax(null));
    assertNullRefused(budget, () -> bounds.esaryProschan(null));
    assertNullRefused(
        "probability is null; give one, such as Probability.failing(1e-6)",
        () -> bounds.minMax().contains(null));
  }

  @Test
  void interval_showsItsEndsAndItsAssumption() {
    Interval interval =
        Bounds.of(Structure.atLeast(2, "a", "b", "c"))
            .given(Probabilities.all(0.9))
            .esaryProschan();
    assertEquals(Assumption.INDEPENDENT, interval.assumption());
    assertTrue(interval.toString().startsWith("Esary-Proschan, for "), interval::toString);
    assertTrue(interval.toString().contains("at least  working 0.970299"), interval::toString);
    assertEquals(interval.upper().working() - interval.lower().working(), interval.width(), 1e-13);
    assertTrue(interval.relativeWidthFailing() > 3);
  }
}
