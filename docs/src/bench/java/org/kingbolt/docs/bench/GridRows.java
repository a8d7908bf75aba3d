package org.kingbolt.docs.bench;

import com.google.common.base.Suppliers;
import com.google.common.collect.Maps;
import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.function.DoubleSupplier;
import java.util.function.Supplier;
import org.kingbolt.core.Structure;
import org.kingbolt.core.diagram.Diagram;
import org.kingbolt.core.published.Topology;

/** Grids from corner to corner, compiled to diagrams. */
final class GridRows {

  private static final String SWEPT = "sweep and JDD";
  private static final String GIVEN = "JDD, nodes given";
  private static final String LOGIC_NG = "LogicNG, nodes given";

  private GridRows() {}

  static List<Workload> rows() {
    List<Workload> rows = new ArrayList<>();
    rows.add(compiled(10, 10, Effort.USUAL, List.of(SWEPT, GIVEN, LOGIC_NG)));
    rows.add(compiled(6, 50, Effort.USUAL, List.of(SWEPT)));
    rows.add(compiled(6, 500, Effort.USUAL, List.of(SWEPT)));
    rows.add(compiled(6, 5000, Effort.LONG, List.of(SWEPT)));
    return rows;
  }

  /** The peers sweep the network first, or get the nodes of our diagram, each one once. */
  private static Workload compiled(int width, int length, Effort effort, List<String> peers) {
    return new Workload(
        width + "x" + length + " grid: compile",
        effort,
        peers,
        () -> {
          Topology grid = Inputs.grid(width, length);
          String[] corners = Inputs.corners(width, length);
          Structure structure = grid.connecting(corners);
          Supplier<Diagram> given = Suppliers.memoize(() -> structure.compile().diagram());
          Map<String, DoubleSupplier> sides =
              Map.of(
                  SWEPT, () -> new JddNodes(Inputs.sweep(grid, corners)).size(),
                  GIVEN, () -> new JddNodes(given.get()).size(),
                  LOGIC_NG, () -> LogicNgNodes.of(given.get()).nodeCount());
          return new Prepared(
              grid.links().size(),
              "links",
              Prepared.NODES,
              () -> structure.compile().diagram().nodeCount(),
              Maps.filterKeys(sides, peers::contains));
        });
  }
}
