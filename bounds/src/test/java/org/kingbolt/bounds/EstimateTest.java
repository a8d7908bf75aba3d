package org.kingbolt.bounds;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertNotEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTimeout;
import static org.junit.jupiter.api.Assertions.assertTrue;
import static org.kingbolt.core.published.Families.corners;

import java.time.Duration;
import java.util.Arrays;
import java.util.List;
import java.util.Set;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.function.Executable;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.kingbolt.bounds.Simulation.Method;
import org.kingbolt.core.Budget;
import org.kingbolt.core.BudgetExceededException;
import org.kingbolt.core.NetworkBuilder;
import org.kingbolt.core.Probabilities;
import org.kingbolt.core.Probability;
import org.kingbolt.core.Structure;

/** Simulation: rare events, limits, seeds, and what is refused. */
class EstimateTest {

  private static final Structure TWO_OF_THREE = Structure.atLeast(2, "a", "b", "c");

  /** 100 nodes and 180 links, against the sweep of the whole. */
  @Test
  void rareFailureOfAGrid_isEstimatedToOnePercent() {
    Structure grid = corners(10);
    Probabilities p = failing(1e-4);
    Probability exact = grid.reliability(p);
    Estimate estimate = Bounds.of(grid).given(p).simulate(Simulation.toRelativeError(0.01));
    assertTrue(estimate.contains(exact), estimate::toString);
    assertTrue(estimate.relativeError() <= 0.01, estimate::toString);
    assertEquals("conditional Monte Carlo", estimate.method());
    assertTrue(estimate.samples() < 20_000, estimate::toString);
    assertTrue(estimate.upper().failing() < exact.failing(), "nothing was left to be estimated");
  }

  /** As the links become perfect no more samples are needed, and every digit is kept. */
  @Test
  void relativeError_staysBounded() {
    Structure grid = corners(5);
    for (double q : new double[] {1e-2, 1e-4, 1e-8, 1e-15}) {
      Probabilities p = failing(q);
      for (Method method : List.of(Method.CONDITIONAL, Method.COVERAGE)) {
        Simulation simulation =
            Simulation.toRelativeError(0.02).withMethod(method).withConfidence(0.999);
        Estimate estimate =
            Bounds.of(grid).given(p).simulate(simulation.withBudget(Budget.ofNodes(20_000)));
        assertTrue(estimate.contains(grid.reliability(p)), estimate::toString);
        assertTrue(estimate.relativeError() <= 0.02, estimate::toString);
        assertTrue(estimate.samples() <= 20_000, estimate::toString);
      }
    }
  }

  /** The mirror image: links that hardly ever work, and paths in the place of cuts. */
  @Test
  void rareWorking_isEstimated() {
    Structure grid = corners(4);
    Probabilities p = Probabilities.all(1e-3);
    double exact = grid.reliability(p).working();
    for (Method method : List.of(Method.CONDITIONAL, Method.COVERAGE)) {
      Simulation simulation =
          Simulation.toRelativeError(0.02).withMethod(method).withConfidence(0.999);
      Estimate estimate =
          Bounds.of(grid).given(p).simulate(simulation.withBudget(Budget.ofNodes(20_000)));
      assertTrue(exact < 1e-16);
      assertEquals(exact, estimate.value().working(), 0.02 * exact);
      assertTrue(estimate.contains(Probability.working(exact)), estimate::toString);
      assertTrue(estimate.relativeError() <= 0.02, estimate::toString);
    }
  }

  /**
   * A standard example of rare events, links between opposite nodes of a dodecahedron: Cancela and
   * El Khadiri 2003; L'Ecuyer, Rubino, Saggadi and Tuffin, IEEE Trans. Reliab. 60 (2011) 590, which
   * print 2.8796e-3, 2.0619e-6 and 2.006e-9; from memory.
   */
  @ParameterizedTest
  @CsvSource({"1e-1, 2.8796e-3", "1e-2, 2.0619e-6", "1e-3, 2.006e-9"})
  void dodecahedron_hasThePublishedUnreliability(double q, double printed) {
    NetworkBuilder network = Structure.network();
    for (int i = 0; i < 10; i++) {
      network = network.link("out" + i, "out" + i, "out" + (i + 1) % 10);
      network = network.link("spoke" + i, "out" + i, "in" + i);
      network = network.link("in" + i, "in" + i, "in" + (i + 2) % 10);
    }
    BoundsAtProbabilities bounds = Bounds.of(network.connecting("out0", "out5")).given(failing(q));
    Simulation simulation =
        Simulation.toRelativeError(0.01).withConfidence(0.9999).withBudget(Budget.ofNodes(500));
    Estimate estimate = bounds.simulate(simulation);
    assertTrue(estimate.contains(Probability.failing(printed)), estimate::toString);
    assertTrue(estimate.relativeError() <= 0.01, estimate::toString);
    assertTrue(estimate.reason().contains("only when a simpler one does"), estimate::reason);
  }

  @Test
  void crude_isHonestAboutWhatItHasNotSeen() {
    Simulation simulation = Simulation.ofSamples(1000).withMethod(Method.CRUDE);
    Estimate estimate = Bounds.of(TWO_OF_THREE).given(failing(1e-9)).simulate(simulation);
    assertEquals(Probability.CERTAIN, estimate.value());
    assertEquals(-Math.expm1(Math.log(0.025) / 1000), estimate.lower().failing(), 1e-9);
    assertEquals(0, estimate.upper().failing());
    assertEquals(Double.POSITIVE_INFINITY, estimate.relativeError());
  }

  @Test
  void impossibleFailure_needsNoSamples() {
    Probabilities p = Probabilities.all(Probability.CERTAIN);
    for (Method method : List.of(Method.BEST, Method.CONDITIONAL, Method.COVERAGE)) {
      Estimate estimate =
          Bounds.of(TWO_OF_THREE)
              .given(p)
              .simulate(Simulation.toRelativeError(0.1).withMethod(method));
      assertEquals(0, estimate.lower().failing());
      assertEquals(0, estimate.samples());
      assertEquals(0, estimate.relativeError());
    }
  }

  @Test
  void cutSetsAtHand_areEnough() {
    List<Set<String>> cuts = List.of(Set.of("a", "b"), Set.of("c", "b"), Set.of("a", "c"));
    Probabilities p = failing(1e-3);
    BoundsAtProbabilities bounds = Bounds.of(TWO_OF_THREE).given(p);
    Estimate estimate = bounds.simulate(Simulation.ofSamples(5000).withCutSets(cuts));
    assertEquals("coverage by cut sets", estimate.method());
    assertTrue(estimate.contains(TWO_OF_THREE.reliability(p)), estimate::toString);
    assertTrue(estimate.relativeError() < 0.01);
    refused(
        () -> bounds.simulate(Simulation.ofSamples(1).withCutSets(List.of(Set.of("b")))),
        "cut set 1, [b], is none");
    refused(
        () -> bounds.simulate(Simulation.ofSamples(1).withCutSets(List.of(Set.of("b", "x")))),
        "cut set 1 names \"x\"");
    refused(() -> Simulation.ofSamples(1).withCutSets(List.of()), "no cut sets");
  }

  @Test
  void seeds_giveDifferentEstimates() {
    BoundsAtProbabilities bounds = Bounds.of(TWO_OF_THREE).given(Probabilities.all(0.7));
    Simulation simulation = Simulation.ofSamples(1000).withMethod(Method.CRUDE);
    Estimate one = bounds.simulate(simulation.withSeed(1));
    assertEquals(one, bounds.simulate(simulation.withSeed(1)));
    assertEquals(one.hashCode(), bounds.simulate(simulation.withSeed(1)).hashCode());
    assertNotEquals(one.value(), bounds.simulate(simulation.withSeed(2)).value());
    assertEquals(1, one.seed());
    assertEquals(1000, one.samples());
  }

  @Test
  void time_endsTheWork_andIsLabelled() {
    BoundsAtProbabilities bounds = Bounds.of(corners(12)).given(failing(0.01));
    Simulation simulation = Simulation.ofTime(Duration.ofMillis(300));
    Estimate estimate = assertTimeout(Duration.ofSeconds(20), () -> bounds.simulate(simulation));
    assertFalse(estimate.isReproducible());
    assertTrue(estimate.toString().contains("not reproducible"), estimate::toString);
    assertTrue(estimate.samples() > 0);
    Simulation crude = Simulation.toRelativeError(1e-6).withMethod(Method.CRUDE);
    Estimate cut =
        assertTimeout(
            Duration.ofSeconds(20),
            () -> bounds.simulate(crude.withTime(Duration.ofMillis(300)).withThreads(3)));
    assertTrue(cut.relativeError() > 1e-6 && cut.samples() > 0, cut::toString);
  }

  @Test
  void samples_endTheWorkBeforeTheError() {
    Simulation simulation =
        Simulation.toRelativeError(1e-3).withSamples(700).withMethod(Method.CRUDE);
    Estimate estimate = Bounds.of(TWO_OF_THREE).given(Probabilities.all(0.7)).simulate(simulation);
    assertEquals(700, estimate.samples());
    assertTrue(estimate.relativeError() > 1e-3);
  }

  @Test
  void interrupt_isHeeded() throws InterruptedException {
    BoundsAtProbabilities bounds = Bounds.of(TWO_OF_THREE).given(Probabilities.all(0.7));
    Simulation simulation = Simulation.ofSamples(1L << 40).withMethod(Method.CRUDE);
    BudgetExceededException[] thrown = new BudgetExceededException[1];
    boolean[] flag = new boolean[1];
    Thread worker =
        new Thread(
            () -> {
              thrown[0] =
                  assertThrows(BudgetExceededException.class, () -> bounds.simulate(simulation));
              flag[0] = Thread.currentThread().isInterrupted();
            });
    worker.start();
    Thread.sleep(100);
    worker.interrupt();
    worker.join(10_000);
    assertFalse(worker.isAlive());
    assertEquals(BudgetExceededException.Limit.INTERRUPT, thrown[0].limit());
    assertTrue(flag[0], "the interrupt was swallowed");
  }

  @Test
  void preparationTooLarge_isRefusedOrReplaced() {
    String[] names = new String[60];
    Arrays.setAll(names, i -> "c" + i);
    BoundsAtProbabilities bounds =
        Bounds.of(Structure.atLeast(30, names)).given(Probabilities.all(0.5));
    Simulation simulation = Simulation.ofSamples(1000).withBudget(Budget.ofNodes(100));
    assertEquals("crude Monte Carlo", bounds.simulate(simulation).method());
    for (Method method : List.of(Method.CONDITIONAL, Method.COVERAGE)) {
      BudgetExceededException over =
          assertThrows(
              BudgetExceededException.class, () -> bounds.simulate(simulation.withMethod(method)));
      assertEquals(BudgetExceededException.Limit.NODES, over.limit());
    }
  }

  @Test
  void text_saysThatItIsStatistical() {
    Estimate estimate =
        Bounds.of(TWO_OF_THREE)
            .given(Probabilities.all(0.9))
            .simulate(Simulation.ofSamples(100).withConfidence(0.99).withSeed(3));
    String first = estimate.toString().lines().findFirst().orElseThrow();
    assertEquals(
        "statistical, 99 % confidence: conditional Monte Carlo, independent components,"
            + " 100 samples, seed 3",
        first);
    assertEquals(
        "Simulation[best, 99.9 % confidence, seed 0, to a relative error of 0.01, at most 500"
            + " samples]",
        Simulation.toRelativeError(0.01).withSamples(500).withConfidence(0.999).toString());
  }

  @Test
  void badSettings_areRefused() {
    Simulation simulation = Simulation.ofSamples(10);
    for (double bad : new double[] {0, -1, 1, Double.NaN, Double.POSITIVE_INFINITY}) {
      refused(() -> Simulation.toRelativeError(bad), "relative error " + bad);
      refused(() -> simulation.withRelativeError(bad), "such as 0.01");
      refused(() -> simulation.withConfidence(bad), "confidence " + bad);
    }
    refused(() -> simulation.withConfidence(Math.nextDown(1.0)), "below 1");
    refused(() -> Simulation.ofSamples(0), "0 samples; at least 1");
    refused(() -> simulation.withSamples(-5), "-5 samples; at least 1");
    refused(() -> Simulation.ofTime(Duration.ZERO), "longer than zero");
    refused(() -> simulation.withTime(Duration.ofSeconds(-1)), "longer than zero");
    refused(() -> simulation.withThreads(0), "0 threads; at least 1");
    assertNullRefused(() -> Simulation.ofTime(null), "time is null");
    assertNullRefused(() -> simulation.withMethod(null), "method is null");
    assertNullRefused(() -> simulation.withBudget(null), "budget is null");
    assertNullRefused(() -> simulation.withCutSets(null), "cut sets are null");
    assertNullRefused(
        () -> simulation.withCutSets(Arrays.asList(Set.of("a"), null)), "cut set 2 is null");
    BoundsAtProbabilities bounds = Bounds.of(TWO_OF_THREE).given(Probabilities.all(0.9));
    assertNullRefused(() -> bounds.simulate(null), "simulation is null");
    assertNullRefused(() -> bounds.simulate(simulation).contains(null), "probability is null");
  }

  private static void refused(Executable call, String part) {
    IllegalArgumentException refused = assertThrows(IllegalArgumentException.class, call);
    assertTrue(refused.getMessage().contains(part), refused::getMessage);
  }

  private static void assertNullRefused(Executable call, String part) {
    NullPointerException refused = assertThrows(NullPointerException.class, call);
    assertTrue(refused.getMessage().contains(part), refused::getMessage);
  }

  private static Probabilities failing(double q) {
    return Probabilities.all(Probability.failing(q));
  }
}
