package org.kingbolt.bounds;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;
import static org.kingbolt.core.published.Families.corners;

import java.util.ArrayList;
import java.util.List;
import java.util.stream.Stream;
import org.apache.commons.math3.distribution.BinomialDistribution;
import org.junit.jupiter.api.Tag;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.Arguments;
import org.junit.jupiter.params.provider.MethodSource;
import org.kingbolt.bounds.Simulation.Method;
import org.kingbolt.core.Budget;
import org.kingbolt.core.Probabilities;
import org.kingbolt.core.Probability;
import org.kingbolt.core.Structure;

/**
 * Over 1,000 seeds the intervals hold the exact figure as often as they state: the hypothesis that
 * they do is put to a binomial test and must not be rejected at one in a thousand.
 */
@Tag("slow")
class SimulationCoverageRateTest {

  private static final int SEEDS = 1000;
  private static final double REJECTED = 1e-3;

  private static final Structure BRIDGE =
      Structure.network()
          .link("1", "s", "a")
          .link("2", "s", "b")
          .link("3", "a", "b")
          .link("4", "a", "t")
          .link("5", "b", "t")
          .connecting("s", "t");

  private static final Structure GRID = corners(4);

  /** Too few nodes for the whole, so that a simpler system takes its place. */
  private static final Budget FEW_NODES = Budget.ofNodes(150);

  static Stream<Arguments> simulations() {
    List<Arguments> rows = new ArrayList<>();
    for (double confidence : new double[] {0.95, 0.8}) {
      Simulation fixed = Simulation.ofSamples(400).withConfidence(confidence);
      Simulation error = Simulation.toRelativeError(0.08).withConfidence(confidence);
      for (Simulation simulation : List.of(fixed, error)) {
        rows.add(Arguments.of(BRIDGE, 0.2, simulation.withMethod(Method.CRUDE)));
        rows.add(Arguments.of(GRID, 0.15, simulation.withMethod(Method.CRUDE)));
        for (double failing : new double[] {0.3, 0.01, 1e-5}) {
          Simulation few = simulation.withMethod(Method.CONDITIONAL).withBudget(FEW_NODES);
          rows.add(Arguments.of(GRID, failing, few));
          rows.add(Arguments.of(BRIDGE, failing, simulation.withMethod(Method.COVERAGE)));
          rows.add(Arguments.of(GRID, failing, simulation.withMethod(Method.COVERAGE)));
        }
        Simulation paths = simulation.withMethod(Method.COVERAGE);
        rows.add(Arguments.of(GRID, 0.9, paths));
        Simulation few = paths.withMethod(Method.CONDITIONAL).withBudget(FEW_NODES);
        rows.add(Arguments.of(GRID, 0.9, few));
      }
    }
    return rows.stream();
  }

  @ParameterizedTest
  @MethodSource("simulations")
  void intervals_holdAsOftenAsStated(Structure structure, double failing, Simulation simulation) {
    Probabilities p = Probabilities.all(Probability.failing(failing));
    Probability exact = structure.compile().reliability(p);
    BoundsAtProbabilities bounds = Bounds.of(structure).given(p);
    int held = 0;
    for (int seed = 0; seed < SEEDS; seed++) {
      Estimate estimate = bounds.simulate(simulation.withSeed(seed).withThreads(1));
      held += estimate.contains(exact) ? 1 : 0;
      if (simulation.method() == Method.CONDITIONAL) {
        assertTrue(estimate.reason().contains("only when a simpler one does"), estimate::reason);
      }
      if (simulation.relativeError() > 0) {
        assertTrue(estimate.relativeError() <= simulation.relativeError(), estimate::toString);
      }
      assertEquals(simulation.confidence(), estimate.confidence());
    }
    BinomialDistribution counts = new BinomialDistribution(null, SEEDS, simulation.confidence());
    double atMostSoMany = counts.cumulativeProbability(held);
    int count = held;
    assertTrue(atMostSoMany > REJECTED, () -> "held " + count + " times in " + SEEDS);
  }
}
