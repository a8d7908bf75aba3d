package org.kingbolt.docs.bench;

import java.util.ArrayDeque;
import java.util.ArrayList;
import java.util.Deque;
import java.util.HashMap;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.function.Supplier;
import org.kingbolt.bounds.Bounds;
import org.kingbolt.bounds.Interval;
import org.kingbolt.core.Budget;
import org.kingbolt.core.Probabilities;
import org.kingbolt.core.Probability;
import org.kingbolt.core.Structure;
import org.kingbolt.core.published.Topology;

/** Certified intervals for what is too large to be worked out. */
final class IntervalRows {

  private IntervalRows() {}

  static List<Workload> rows() {
    List<Workload> rows = new ArrayList<>();
    for (double q : new double[] {0.1, 0.01, 0.001}) {
      rows.add(row("30x30 grid, failing " + q + ": to 1 %", q, 0.01, () -> grid(30)));
    }
    rows.add(row("200x200 grid, failing 0.01: to 5 %", 0.01, 0.05, () -> grid(200)));
    for (double q : new double[] {0.01, 0.001}) {
      rows.add(
          row("1354-bus, far pair, failing " + q + ": to 0.1 %", q, 0.001, () -> buses(false)));
      rows.add(
          row("1354-bus, all buses, failing " + q + ": to 0.1 %", q, 0.001, () -> buses(true)));
    }
    for (int seed = 1; seed <= 3; seed++) {
      rows.add(plant(seed));
    }
    return rows;
  }

  /** Two thousand components, one in five shared, failing with 0.001 to 0.01. */
  private static Workload plant(long seed) {
    return new Workload(
        "2,000 components, 400 shared, seed " + seed + ": to 1 %",
        Effort.USUAL,
        List.of(),
        () -> {
          Structure structure = SharedPlant.of(2_000, 400, seed);
          double[] failing = Inputs.failing(structure.components().size(), 0.001, 0.01);
          Probabilities p = Inputs.probabilities(structure.components(), failing);
          return prepared(structure, p, 0.01);
        });
  }

  private static Prepared prepared(Structure structure, Probabilities p, double relativeWidth) {
    return new Prepared(
        structure.components().size(),
        "components",
        "relative width",
        () -> width(structure, p, relativeWidth),
        Map.of());
  }

  private static Workload row(
      String name, double failing, double relativeWidth, Supplier<Structure> input) {
    return new Workload(
        name,
        Effort.USUAL,
        List.of(),
        () -> {
          Structure structure = input.get();
          return prepared(
              structure, Probabilities.all(Probability.failing(failing)), relativeWidth);
        });
  }

  private static double width(Structure structure, Probabilities p, double relativeWidth) {
    Interval interval = Bounds.of(structure).given(p).within(Budget.ofHeap(), relativeWidth);
    if (interval.relativeWidthFailing() > relativeWidth) {
      throw new IllegalStateException("wider than asked for: " + interval);
    }
    return interval.relativeWidthFailing();
  }

  private static Structure grid(int side) {
    return Inputs.grid(side, side).connecting(Inputs.corners(side, side));
  }

  private static Structure buses(boolean all) {
    Topology network = Topology.file("pegase1354");
    if (all) {
      return network.connectingAll();
    }
    String one = farthest(network, network.nodes().iterator().next());
    return network.connecting(one, farthest(network, one));
  }

  /** One of the nodes that are the most links away. */
  static String farthest(Topology network, String start) {
    Map<String, List<String>> neighbours = new HashMap<>();
    for (Topology.Link link : network.links()) {
      neighbours.computeIfAbsent(link.a(), node -> new ArrayList<>()).add(link.b());
      neighbours.computeIfAbsent(link.b(), node -> new ArrayList<>()).add(link.a());
    }
    Map<String, Integer> distance = new LinkedHashMap<>();
    Deque<String> open = new ArrayDeque<>(List.of(start));
    distance.put(start, 0);
    String last = start;
    while (!open.isEmpty()) {
      last = open.remove();
      for (String next : neighbours.getOrDefault(last, List.of())) {
        if (distance.putIfAbsent(next, distance.getOrDefault(last, 0) + 1) == null) {
          open.add(next);
        }
      }
    }
    return last;
  }
}
