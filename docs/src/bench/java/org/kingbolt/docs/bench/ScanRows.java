package org.kingbolt.docs.bench;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import java.util.Map;
import java.util.function.Supplier;
import java.util.stream.DoubleStream;
import org.kingbolt.core.BatchResult;
import org.kingbolt.core.CoherentSystem;
import org.kingbolt.core.Evaluator;
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
      rows.add(row(name + "evaluate, derivatives", () -> scanned(grid[0], grid[1], true)));
    }
    rows.add(row("7x26 grid: derivatives, every digit", () -> everyDigit(7, 26)));
    rows.add(row("IEEE 118-bus: 1000 vectors, 1 thread", () -> batch("ieee118", 1)));
    rows.add(row("IEEE 118-bus: 1000 vectors, 2 threads", () -> batch("ieee118", 2)));
    rows.add(row("IEEE 300-bus: 1000 vectors, 1 thread", () -> batch("ieee300", 1)));
    rows.add(row("IEEE 300-bus: 1000 vectors, 2 threads", () -> batch("ieee300", 2)));
    return rows;
  }

  private static Workload row(String name, Supplier<Prepared> preparation) {
    return new Workload(name, Effort.USUAL, List.of(LOOP), preparation);
  }

  private static Prepared scanned(int width, int length, boolean derivatives) {
    CoherentSystem system =
        Inputs.grid(width, length).connecting(Inputs.corners(width, length)).compile();
    double[] failing = Inputs.failing(system.components().size(), 0.01, 0.05);
    double[] working = complement(failing);
    PlainLoop loop = new PlainLoop(system.diagram());
    double[] byLevel = Inputs.byLevel(failing, system.diagram());
    Evaluator evaluator = system.evaluator();
    double[] out = new double[failing.length];
    return new Prepared(
        system.diagram().nodeCount(),
        "nodes",
        derivatives ? "sum of derivatives" : "failing",
        () -> {
          evaluator.evaluate(working, failing);
          if (derivatives) {
            evaluator.derivatives(out);
            return DoubleStream.of(out).sum();
          }
          return evaluator.failing();
        },
        Map.of(LOOP, () -> derivatives ? loop.derivatives(byLevel) : loop.fails(byLevel)));
  }

  private static Prepared everyDigit(int width, int length) {
    CoherentSystem system =
        Inputs.grid(width, length).connecting(Inputs.corners(width, length)).compile();
    double[] failing = Inputs.failing(system.components().size(), 0.01, 0.05);
    Probabilities p = Inputs.probabilities(system.components(), failing);
    PlainLoop loop = new PlainLoop(system.diagram());
    double[] byLevel = Inputs.byLevel(failing, system.diagram());
    return new Prepared(
        system.diagram().nodeCount(),
        "nodes",
        "sum of derivatives",
        () -> DoubleStream.of(system.evaluation(p).derivatives()).sum(),
        Map.of(LOOP, () -> loop.derivatives(byLevel)));
  }

  private static double[] complement(double[] failing) {
    return DoubleStream.of(failing).map(q -> 1 - q).toArray();
  }

  private static Prepared batch(String network, int threads) {
    Topology topology = Topology.file(network);
    String last =
        topology.nodes().stream().max(Comparator.comparingInt(Integer::parseInt)).orElseThrow();
    CoherentSystem system = topology.connecting("1", last).compile();
    PlainLoop loop = new PlainLoop(system.diagram());
    double[][] failing = new double[1000][];
    double[][] working = new double[1000][];
    List<double[]> plain = new ArrayList<>();
    for (int vector = 0; vector < failing.length; vector++) {
      double most = 0.01 + 1e-5 * vector;
      failing[vector] = Inputs.failing(system.components().size(), 0.001, most);
      working[vector] = complement(failing[vector]);
      plain.add(Inputs.byLevel(failing[vector], system.diagram()));
    }
    Evaluator evaluator = system.evaluator();
    return new Prepared(
        failing.length * (long) system.diagram().nodeCount(),
        "nodes × vectors",
        "failing in all",
        () -> {
          BatchResult results = evaluator.evaluateBatch(working, failing, threads);
          double sum = 0;
          for (int vector = 0; vector < results.size(); vector++) {
            sum += results.failing(vector);
          }
          return sum;
        },
        Map.of(LOOP, () -> plain.stream().mapToDouble(loop::fails).sum()));
  }
}
