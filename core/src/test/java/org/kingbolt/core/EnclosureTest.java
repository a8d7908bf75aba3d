package org.kingbolt.core;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;
import static org.kingbolt.core.published.Families.corners;

import java.math.BigDecimal;
import java.time.Duration;
import net.jqwik.api.Arbitrary;
import net.jqwik.api.Assume;
import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.Provide;
import net.jqwik.api.constraints.IntRange;
import org.junit.jupiter.api.Test;
import org.kingbolt.core.testing.NestedNetworks;
import org.kingbolt.core.testing.RandomStructures;
import org.kingbolt.core.testing.RandomStructures.Sample;

/** With hardly any effort allowed, even small structures are enclosed and not worked out. */
class EnclosureTest {

  private static final BigDecimal SLACK = new BigDecimal("1e-12");

  @Provide
  Arbitrary<Sample> structures() {
    return RandomStructures.any();
  }

  @Provide
  Arbitrary<Sample> networks() {
    return RandomStructures.networks();
  }

  @Provide
  Arbitrary<Probabilities> probabilities() {
    return RandomStructures.probabilities();
  }

  @Property(tries = 2000)
  void networks_stayInside(
      @ForAll("networks") Sample sample,
      @ForAll("probabilities") Probabilities p,
      @ForAll @IntRange(min = 1, max = 60) int effort) {
    assertEncloses(sample, p, effort);
  }

  @Property(tries = 500)
  void structures_stayInside(
      @ForAll("structures") Sample sample,
      @ForAll("probabilities") Probabilities p,
      @ForAll @IntRange(min = 1, max = 60) int effort) {
    assertEncloses(sample, p, effort);
  }

  @Property(tries = 600)
  void networksWithinNetworks_stayInside(
      @ForAll @IntRange(min = 1, max = 3) int depth,
      @ForAll long seed,
      @ForAll @IntRange(min = 1, max = 500) int effort) {
    NestedNetworks nested = new NestedNetworks(seed);
    Structure structure = nested.structure(depth);
    Assume.that(structure.components().size() <= 120);
    Probabilities p = nested.probabilities(structure);
    Probability exact = structure.compile().reliability(p);
    narrowed(
        structure, p, effort, new BigDecimal(exact.working()), new BigDecimal(exact.failing()));
  }

  private static void assertEncloses(Sample sample, Probabilities p, int effort) {
    Enclosure enclosure =
        narrowed(sample.structure(), p, effort, sample.oracle().works(p), sample.oracle().fails(p));
    assertTrue(enclosure.isExact());
    assertEquals(0, enclosure.lower().failing() - enclosure.upper().failing(), 1e-15);
    assertFalse(enclosure.narrow());
  }

  /** Narrowed until it ends, and held against the right answer after every step. */
  private static Enclosure narrowed(
      Structure structure, Probabilities p, int effort, BigDecimal works, BigDecimal fails) {
    Enclosure enclosure = Enclosure.of(structure, p, Budget.ofNodes(1_000_000), effort);
    boolean again = true;
    double width = Double.POSITIVE_INFINITY;
    double otherWidth = Double.POSITIVE_INFINITY;
    while (again) {
      again = enclosure.narrow();
      Probability lower = enclosure.lower();
      Probability upper = enclosure.upper();
      assertNotAbove(lower.working(), works, enclosure);
      assertNotAbove(upper.failing(), fails, enclosure);
      assertNotBelow(upper.working(), works, enclosure);
      assertNotBelow(lower.failing(), fails, enclosure);
      assertTrue(lower.failing() - upper.failing() <= width + 1e-15, "widened: " + enclosure);
      width = lower.failing() - upper.failing();
      double working = upper.working() - lower.working();
      assertTrue(working <= otherWidth + 1e-15, "widened: " + enclosure);
      otherWidth = working;
    }
    return enclosure;
  }

  private static void assertNotAbove(double end, BigDecimal exact, Enclosure enclosure) {
    BigDecimal most = exact.add(exact.multiply(SLACK));
    assertTrue(new BigDecimal(end).compareTo(most) <= 0, exact + " outside " + enclosure);
  }

  private static void assertNotBelow(double end, BigDecimal exact, Enclosure enclosure) {
    BigDecimal least = exact.subtract(exact.multiply(SLACK));
    assertTrue(new BigDecimal(end).compareTo(least) >= 0, exact + " outside " + enclosure);
  }

  @Test
  void smallBudget_endsQuietlyWithAnInterval() {
    Structure grid = corners(12);
    Enclosure enclosure =
        Enclosure.of(grid, Probabilities.all(Probability.failing(0.01)), Budget.ofNodes(100_000));
    while (enclosure.narrow()) {
      assertFalse(enclosure.isExact());
    }
    double least = enclosure.upper().failing();
    assertTrue(least > 2.0e-4 && enclosure.lower().failing() < least * 1.01, enclosure::toString);
  }

  @Test
  void timeAndInterrupt_endTheStep() {
    Probabilities p = Probabilities.all(0.9);
    Budget none = Budget.ofHeap().withTime(Duration.ofNanos(1));
    assertEquals(
        BudgetExceededException.Limit.TIME,
        assertThrows(
                BudgetExceededException.class, () -> Enclosure.of(corners(9), p, none).narrow())
            .limit());
    Enclosure interrupted = Enclosure.of(corners(9), p, Budget.ofHeap());
    Thread.currentThread().interrupt();
    try {
      assertEquals(
          BudgetExceededException.Limit.INTERRUPT,
          assertThrows(BudgetExceededException.class, interrupted::narrow).limit());
    } finally {
      Thread.interrupted();
    }
    assertEquals(1, interrupted.upper().working());
    assertFalse(interrupted.isExact());
    while (interrupted.narrow()) {
      assertFalse(interrupted.isExact());
    }
    assertTrue(interrupted.isExact());
  }

  /** Without a pass over all that is below each network, which takes minutes. */
  @Test
  void manySmallNetworks_areReadAtOnce() {
    Structure chain = Structure.component("x");
    for (int i = 0; i < 25_000; i++) {
      chain =
          Structure.network()
              .link(chain, "a", "b")
              .link("c" + i, "b", "t")
              .link("l" + i, "a", "k")
              .link("n" + i, "k", "t")
              .link("o" + i, "k", "b")
              .connecting("a", "t");
    }
    Probabilities p = Probabilities.all(Probability.failing(0.001));
    Budget budget = Budget.ofHeap().withTime(Duration.ofSeconds(25));
    Enclosure enclosure = Enclosure.of(chain, p, budget);
    while (enclosure.narrow()) {
      assertFalse(enclosure.isExact());
    }
    assertTrue(enclosure.isExact());
    assertEquals(chain.reliability(p).failing(), enclosure.upper().failing(), 1e-15);
  }
}
