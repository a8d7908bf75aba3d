package org.kingbolt.docs.bench;

import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.function.DoubleSupplier;
import org.kingbolt.core.Probabilities;
import org.kingbolt.core.Structure;
import org.kingbolt.core.diagram.Diagram;
import org.kingbolt.core.published.Topology;

/** Grids from corner to corner, every link its own probability: the figure alone, no diagram. */
final class ReliabilityRows {

  private ReliabilityRows() {}

  static List<Workload> rows() {
    List<Workload> rows = new ArrayList<>();
    rows.add(asked(10, 10, Effort.USUAL, true));
    rows.add(asked(12, 12, Effort.LONG, false));
    rows.add(asked(6, 50, Effort.USUAL, false));
    rows.add(asked(6, 500, Effort.USUAL, false));
    rows.add(asked(6, 5000, Effort.LONG, false));
    return rows;
  }

  /** The peer gets the template of the same sweep, and then scans its own nodes. */
  private static Workload asked(int width, int length, Effort effort, boolean compared) {
    return new Workload(
        width + "x" + length + " grid: reliability",
        effort,
        compared ? List.of("sweep and JDD") : List.of(),
        () -> {
          Topology grid = Inputs.grid(width, length);
          String[] corners = Inputs.corners(width, length);
          Structure structure = grid.connecting(corners);
          double[] failing = Inputs.failing(grid.links().size(), 0.01, 0.05);
          Probabilities p = Inputs.probabilities(structure.components(), failing);
          DoubleSupplier peer =
              () -> {
                Diagram states = Inputs.sweep(grid, corners);
                return new JddNodes(states).fails(Inputs.byLevel(failing, states));
              };
          return new Prepared(
              failing.length,
              "links",
              "failing",
              () -> structure.reliability(p).failing(),
              compared ? Map.of("sweep and JDD", peer) : Map.of());
        });
  }
}
