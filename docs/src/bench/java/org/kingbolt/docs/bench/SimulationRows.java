package org.kingbolt.docs.bench;

import java.util.List;
import java.util.Map;
import org.kingbolt.bounds.Bounds;
import org.kingbolt.bounds.BoundsAtProbabilities;
import org.kingbolt.bounds.Simulation;
import org.kingbolt.core.Probabilities;
import org.kingbolt.core.Probability;

/** Simulation of rare failures, until the 95 % interval is within one percent of the estimate. */
final class SimulationRows {

  private SimulationRows() {}

  static List<Workload> rows() {
    return List.of(toOnePercent(10, "1e-4"), toOnePercent(30, "1e-3"), toOnePercent(30, "1e-2"));
  }

  private static Workload toOnePercent(int side, String failing) {
    return new Workload(
        side + "x" + side + " grid, failing " + failing + ": simulate to 1 %",
        Effort.USUAL,
        List.of(),
        () -> {
          BoundsAtProbabilities bounds =
              Bounds.of(Inputs.grid(side, side).connecting(Inputs.corners(side, side)))
                  .given(Probabilities.all(Probability.failing(Double.parseDouble(failing))));
          Simulation simulation = Simulation.toRelativeError(0.01);
          return new Prepared(
              2L * side * (side - 1),
              "links",
              "failing",
              () -> bounds.simulate(simulation).value().failing(),
              Map.of());
        });
  }
}
