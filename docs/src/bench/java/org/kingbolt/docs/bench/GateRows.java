package org.kingbolt.docs.bench;

import com.google.common.base.Suppliers;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.Map;
import java.util.function.Supplier;
import org.kingbolt.core.CoherentSystem;
import org.kingbolt.core.Evaluator;
import org.kingbolt.core.Probabilities;
import org.kingbolt.core.Structure;
import org.kingbolt.core.diagram.Diagram;

/** Gates: one wide one, nested ones that share components, very many that do not. */
final class GateRows {

  /** Of the first hundred, that with the largest diagram in the order of first mention. */
  private static final long SEED_OF_SHARED = 17;

  private static final int MILLION = 1_000_000;

  private GateRows() {}

  static List<Workload> rows() {
    List<Workload> rows = new ArrayList<>();
    rows.add(
        new Workload(
            "500-of-1000: compile, reliability", Effort.USUAL, List.of("JDD"), GateRows::half));
    rows.add(
        new Workload(
            "shared gates: compile",
            Effort.USUAL,
            List.of("JDD", "LogicNG", "JDD, order given"),
            GateRows::shared));
    for (int millions : new int[] {1, 10}) {
      Effort effort = millions == 1 ? Effort.LONG : Effort.ONCE;
      String name = millions + " million in gates: ";
      rows.add(
          new Workload(name + "compile", effort, List.of(), () -> compiled(millions * MILLION)));
      rows.add(
          new Workload(name + "evaluate", effort, List.of(), () -> evaluated(millions * MILLION)));
    }
    return rows;
  }

  /** The peer gets the nodes one by one and scans one tail. */
  private static Prepared half() {
    String[] names = new String[1000];
    Arrays.setAll(names, i -> "c" + i);
    double[] failing = Inputs.failing(names.length, 0.3, 0.7);
    Probabilities p = Inputs.probabilities(List.of(names), failing);
    Structure structure = Structure.atLeast(names.length / 2, names);
    Supplier<Diagram> nodes = Suppliers.memoize(() -> structure.compile().diagram());
    return new Prepared(
        names.length,
        "components",
        "failing",
        () -> structure.compile().reliability(p).failing(),
        Map.of("JDD", () -> new JddNodes(nodes.get()).fails(Inputs.byLevel(failing, nodes.get()))));
  }

  /**
   * 40 gates, 200 components, a fifth of the leaves a second time. The peers get the components in
   * the order of their first mention, or in the order that ours has found.
   */
  private static Prepared shared() {
    NestedGates gates = new NestedGates(40, 200, 50, SEED_OF_SHARED);
    Structure structure = gates.structure();
    List<String> mention = structure.components();
    Supplier<List<String>> found = Suppliers.memoize(() -> structure.compile().order());
    return new Prepared(
        mention.size(),
        "components",
        Prepared.NODES,
        () -> structure.compile().diagram().nodeCount(),
        Map.of(
            "JDD", () -> gates.jddNodes(mention),
            "LogicNG", () -> gates.logicNgNodes(mention),
            "JDD, order given", () -> gates.jddNodes(found.get())));
  }

  private static Prepared compiled(int components) {
    Structure structure = UnsharedGates.of(components, 1);
    return new Prepared(
        components,
        "components",
        Prepared.NODES,
        () -> structure.compile().diagram().nodeCount(),
        Map.of());
  }

  private static Prepared evaluated(int components) {
    CoherentSystem system = UnsharedGates.of(components, 1).compile();
    double[] working = new double[components];
    Arrays.fill(working, 0.9);
    Evaluator evaluator = system.evaluator();
    return new Prepared(
        components,
        "components",
        "failing",
        () -> {
          evaluator.evaluate(working);
          return evaluator.failing();
        },
        Map.of());
  }
}
