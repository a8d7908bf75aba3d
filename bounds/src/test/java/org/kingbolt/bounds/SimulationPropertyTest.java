package org.kingbolt.bounds;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.math.BigDecimal;
import net.jqwik.api.Arbitrary;
import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.Provide;
import net.jqwik.api.constraints.IntRange;
import org.kingbolt.core.Budget;
import org.kingbolt.core.Probabilities;
import org.kingbolt.core.testing.RandomStructures;
import org.kingbolt.core.testing.RandomStructures.Sample;

/**
 * On random structures: with the fixed seed of the tests the intervals, which miss once in 100,000
 * simulations at most, do not miss; and threads do not show.
 */
class SimulationPropertyTest {

  private static final double SURE = 0.99999;

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

  @Property(tries = 200)
  void structures_areInsideWithEveryMethod(
      @ForAll("structures") Sample sample,
      @ForAll("probabilities") Probabilities p,
      @ForAll @IntRange(min = 1, max = 1000) int seed) {
    for (Simulation.Method method : Simulation.Method.values()) {
      assertInside(sample, p, Simulation.ofSamples(1000).withMethod(method).withSeed(seed));
    }
  }

  /** With so few nodes a simpler system takes the place of most networks. */
  @Property(tries = 400)
  void networks_areInsideWithSimplerSystems(
      @ForAll("networks") Sample sample,
      @ForAll("probabilities") Probabilities p,
      @ForAll @IntRange(min = 20, max = 200) int nodes,
      @ForAll @IntRange(min = 1, max = 1000) int seed) {
    Simulation simulation =
        Simulation.toRelativeError(0.1)
            .withSamples(20_000)
            .withSeed(seed)
            .withBudget(Budget.ofNodes(nodes));
    assertInside(sample, p, simulation);
    // the dual at the complements fails as often as the structure works
    BigDecimal dualWorks = sample.oracle().fails(p);
    BigDecimal dualFails = sample.oracle().works(p);
    assertInside(
        dualWorks,
        dualFails,
        Bounds.of(sample.structure().dual()).given(opposite(sample, p)),
        simulation);
  }

  private static Probabilities opposite(Sample sample, Probabilities p) {
    Probabilities opposite = p;
    for (String name : sample.structure().components()) {
      opposite = opposite.with(name, p.get(name).complement());
    }
    return opposite;
  }

  private static void assertInside(Sample sample, Probabilities p, Simulation simulation) {
    BigDecimal works = sample.oracle().works(p);
    BigDecimal fails = sample.oracle().fails(p);
    assertInside(works, fails, Bounds.of(sample.structure()).given(p), simulation);
  }

  private static void assertInside(
      BigDecimal works, BigDecimal fails, BoundsAtProbabilities bounds, Simulation simulation) {
    BigDecimal total = works.add(fails);
    Estimate estimate = bounds.simulate(simulation.withConfidence(SURE).withThreads(1));
    assertTrue(works.compareTo(times(estimate.lower().working(), total)) >= 0, "lower works");
    assertTrue(works.compareTo(times(estimate.upper().working(), total)) <= 0, "upper works");
    assertTrue(fails.compareTo(times(estimate.lower().failing(), total)) <= 0, "lower fails");
    assertTrue(fails.compareTo(times(estimate.upper().failing(), total)) >= 0, "upper fails");
    assertTrue(estimate.contains(estimate.value()));
  }

  private static BigDecimal times(double end, BigDecimal total) {
    return new BigDecimal(end).multiply(total);
  }

  @Property(tries = 60)
  void threads_doNotShow(
      @ForAll("networks") Sample sample, @ForAll @IntRange(min = 1, max = 1000) int seed) {
    BoundsAtProbabilities bounds = Bounds.of(sample.structure()).given(Probabilities.all(0.8));
    for (Simulation.Method method : Simulation.Method.values()) {
      Simulation simulation =
          Simulation.toRelativeError(0.1)
              .withSamples(3000)
              .withMethod(method)
              .withSeed(seed)
              .withBudget(Budget.ofNodes(1000));
      Estimate one = bounds.simulate(simulation.withThreads(1));
      assertTrue(one.isReproducible());
      assertEquals(one, bounds.simulate(simulation.withThreads(2)));
      assertEquals(one, bounds.simulate(simulation.withThreads(5)));
      assertEquals(one.toString(), bounds.simulate(simulation).toString());
    }
  }
}
