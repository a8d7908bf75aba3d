package org.kingbolt.docs.bench;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import java.util.Map;
import java.util.function.DoubleSupplier;
import java.util.stream.DoubleStream;
import org.kingbolt.core.Evaluator;
import org.kingbolt.core.Probabilities;
import org.kingbolt.core.Structure;
import org.kingbolt.core.diagram.Diagram;
import org.kingbolt.core.published.Topology;

/** The IEEE power flow test cases: diagram, reliability and all derivatives in one go. */
final class BusRows {

  private BusRows() {}

  static List<Workload> rows() {
    List<Workload> rows = new ArrayList<>();
    for (int buses : new int[] {57, 118, 300}) {
      rows.add(asked(buses, false));
      rows.add(asked(buses, true));
    }
    return rows;
  }

  private static Workload asked(int buses, boolean all) {
    return new Workload(
        "IEEE " + buses + "-bus, " + (all ? "all buses" : "first to last bus") + ": everything",
        Effort.USUAL,
        List.of("sweep and JDD"),
        () -> prepared(Topology.file("ieee" + buses), all));
  }

  /** The peer scans one tail. */
  private static Prepared prepared(Topology network, boolean all) {
    String last =
        network.nodes().stream().max(Comparator.comparingInt(Integer::parseInt)).orElseThrow();
    String[] terminals = all ? network.nodes().toArray(new String[0]) : new String[] {"1", last};
    Structure structure = all ? network.connectingAll() : network.connecting(terminals);
    double[] failing = Inputs.failing(network.links().size(), 0.001, 0.01);
    Probabilities p = Inputs.probabilities(structure.components(), failing);
    DoubleSupplier peer =
        () -> {
          Diagram states = Inputs.sweep(network, terminals);
          return new JddNodes(states).derivatives(Inputs.byLevel(failing, states));
        };
    return new Prepared(
        failing.length,
        "branches",
        "sum of derivatives",
        () -> {
          Evaluator evaluator = structure.compile().evaluator();
          double[] out = new double[failing.length];
          evaluator.evaluate(p);
          evaluator.derivatives(out);
          return DoubleStream.of(out).sum();
        },
        Map.of("sweep and JDD", peer));
  }
}
