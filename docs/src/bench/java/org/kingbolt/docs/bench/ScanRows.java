package org.kingbolt.docs.bench;

import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.function.Supplier;
import java.util.stream.DoubleStream;
import org.kingbolt.core.CoherentSystem;
import org.kingbolt.core.Probabilities;
import org.kingbolt.core.published.Topology;

/** Questions asked of a compiled system, beside a plain loop over one tail. */
final class ScanRows {

  private static final String LOOP = "plain loop";

  private ScanRows() {}

  static List<Workload> rows() {
    List<Workload> rows = new ArrayList<>();
    int[][] grids = {{6, 8}, {7, 26}, {8, 32}, {9, 33}};
    for (int[] grid : grids) {
      String name = grid[0] + "x" + grid[1] + " grid: ";
      rows.add(row(name + "evaluate", () -> scanned(grid[0], grid[1], false)));
      rows.add(row(name + "derivatives", () -> scanned(grid[0], grid[1], true)));
    }
    rows.add(row("IEEE 118-bus: 1000 vectors", ScanRows::batch));
    return rows;
  }

  private static Workload row(String name, Supplier<Prepared> preparation) {
    return new Workload(name, Effort.USUAL, List.of(LOOP), preparation);
  }

  private static Prepared scanned(int width, int length, boolean derivatives) {
    CoherentSystem system =
        Inputs.grid(width, length).connecting(Inputs.corners(width, length)).compile();
    double[] failing = Inputs.failing(system.components().size(), 0.01, 0.05);
    Probabilities p = Inputs.probabilities(system.components(), failing);
    PlainLoop loop = new PlainLoop(system.diagram());
    double[] byLevel = Inputs.byLevel(failing, system.diagram());
    return new Prepared(
        system.diagram().nodeCount(),
        "nodes",
        derivatives ? "sum of derivatives" : "failing",
        derivatives
            ? () -> DoubleStream.of(system.evaluation(p).derivatives()).sum()
            : () -> system.evaluation(p).fails(),
        Map.of(LOOP, () -> derivatives ? loop.derivatives(byLevel) : loop.fails(byLevel)));
  }

  private static Prepared batch() {
    CoherentSystem system = Topology.file("ieee118").connecting("1", "118").compile();
    PlainLoop loop = new PlainLoop(system.diagram());
    List<Probabilities> vectors = new ArrayList<>();
    List<double[]> plain = new ArrayList<>();
    for (int vector = 0; vector < 1000; vector++) {
      double most = 0.01 + 1e-5 * vector;
      double[] failing = Inputs.failing(system.components().size(), 0.001, most);
      vectors.add(Inputs.probabilities(system.components(), failing));
      plain.add(Inputs.byLevel(failing, system.diagram()));
    }
    return new Prepared(
        vectors.size(),
        "vectors",
        "failing in all",
        () -> failingInAll(system, vectors),
        Map.of(LOOP, () -> plain.stream().mapToDouble(loop::fails).sum()));
  }

  private static double failingInAll(CoherentSystem system, List<Probabilities> vectors) {
    return vectors.stream().mapToDouble(p -> system.evaluation(p).fails()).sum();
  }
}
