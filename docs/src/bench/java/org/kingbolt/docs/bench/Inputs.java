package org.kingbolt.docs.bench;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.HashMap;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import org.kingbolt.core.Budget;
import org.kingbolt.core.Probabilities;
import org.kingbolt.core.Probability;
import org.kingbolt.core.diagram.Diagram;
import org.kingbolt.core.diagram.FrontierSweep;
import org.kingbolt.core.diagram.NetworkProblem;
import org.kingbolt.core.published.Topology;

/** Networks and probabilities that the workloads share. */
final class Inputs {

  private static final double GOLDEN = 0.618033988749895;

  private Inputs() {}

  /** Named by column and row. */
  static Topology grid(int width, int length) {
    List<String> pairs = new ArrayList<>();
    for (int column = 0; column < length; column++) {
      for (int row = 0; row < width; row++) {
        String here = node(column, row);
        if (row + 1 < width) {
          pairs.add(here + " " + node(column, row + 1));
        }
        if (column + 1 < length) {
          pairs.add(here + " " + node(column + 1, row));
        }
      }
    }
    return Topology.ofPairs(pairs);
  }

  /** Two opposite corners. */
  static String[] corners(int width, int length) {
    return new String[] {node(0, 0), node(length - 1, width - 1)};
  }

  private static String node(int column, int row) {
    return column + "." + row;
  }

  /** The layered template of a network, straight from the engine. */
  static Diagram sweep(Topology network, String... terminals) {
    Map<String, Integer> numbers = new HashMap<>();
    network.nodes().forEach(node -> numbers.put(node, numbers.size()));
    List<Topology.Link> links = network.links();
    int[] slots = new int[links.size()];
    int[] nodeSlots = new int[numbers.size()];
    boolean[] targets = new boolean[numbers.size()];
    Arrays.setAll(slots, slot -> slot);
    Arrays.fill(nodeSlots, NetworkProblem.PERFECT);
    for (String terminal : terminals) {
      targets[numbers.get(terminal)] = true;
    }
    NetworkProblem problem =
        new NetworkProblem(
            links.stream().mapToInt(link -> numbers.get(link.a())).toArray(),
            links.stream().mapToInt(link -> numbers.get(link.b())).toArray(),
            new boolean[links.size()],
            slots,
            nodeSlots,
            numbers.get(terminals[0]),
            targets);
    return FrontierSweep.template(problem, Budget.ofHeap().start("sweeping the peer's network"));
  }

  /** Probabilities of failing, all different, spread evenly between two bounds. */
  static double[] failing(int count, double from, double to) {
    double[] failing = new double[count];
    Arrays.setAll(failing, i -> from + (to - from) * (i * GOLDEN % 1));
    return failing;
  }

  static Probabilities probabilities(List<String> components, double[] failing) {
    Map<String, Probability> byName = new LinkedHashMap<>();
    for (int i = 0; i < failing.length; i++) {
      byName.put(components.get(i), Probability.failing(failing[i]));
    }
    return Probabilities.of(byName);
  }

  /** From an order by variables to an order by levels. */
  static double[] byLevel(double[] byVariable, Diagram diagram) {
    return Arrays.stream(diagram.order()).mapToDouble(variable -> byVariable[variable]).toArray();
  }
}
