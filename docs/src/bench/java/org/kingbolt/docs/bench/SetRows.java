package org.kingbolt.docs.bench;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.Map;
import java.util.function.DoubleSupplier;
import java.util.function.Supplier;
import org.kingbolt.core.CoherentSystem;
import org.kingbolt.core.CutOff;
import org.kingbolt.core.MinimalSets;
import org.kingbolt.core.Probabilities;
import org.kingbolt.core.Structure;
import org.kingbolt.core.published.Topology;

/** Minimal sets: counted, streamed, searched and truncated. */
final class SetRows {

  private static final String SETS = "sets";

  private SetRows() {}

  static List<Workload> rows() {
    List<Workload> rows = new ArrayList<>();
    rows.add(row("20-of-40: count path sets", () -> half(false)));
    rows.add(row("20-of-40: 1,000 most probable path sets", () -> half(true)));
    rows.add(row("8x8 grid: find and count path sets", SetRows::gridPaths));
    rows.add(row("8x8 grid: find cut sets, stream those of up to 4", SetRows::gridCuts));
    for (Far far : Far.values()) {
      String name = far.file + ", far buses: cut sets of up to " + far.size;
      rows.add(row(name + ", from the graph", () -> truncated(far)));
      if (far.compiles) {
        rows.add(row(name + ", compiled", () -> compiled(far)));
      }
    }
    return rows;
  }

  /** Two buses of greatest distance from each other, or nearly so. */
  private enum Far {
    IEEE118("ieee118", 4, true, "112", "1"),
    IEEE300("ieee300", 4, true, "7166", "244"),
    PEGASE("pegase1354", 3, false, "6612", "1105");

    private final String file;
    private final int size;
    private final boolean compiles;
    private final String from;
    private final String to;

    Far(String file, int size, boolean compiles, String from, String to) {
      this.file = file;
      this.size = size;
      this.compiles = compiles;
      this.from = from;
      this.to = to;
    }

    Structure structure() {
      return Topology.file(file).connecting(from, to);
    }
  }

  private static Workload row(String name, Supplier<Prepared> preparation) {
    return new Workload(name, Effort.USUAL, List.of(), preparation);
  }

  private static Prepared prepared(Structure structure, DoubleSupplier ours) {
    return new Prepared(structure.components().size(), "components", SETS, ours, Map.of());
  }

  private static Prepared half(boolean search) {
    String[] names = new String[40];
    Arrays.setAll(names, i -> "c" + i);
    Structure structure = Structure.atLeast(20, names);
    CoherentSystem system = structure.compile();
    Probabilities p =
        Inputs.probabilities(structure.components(), Inputs.failing(names.length, 0.05, 0.2));
    return prepared(
        structure,
        search
            ? () -> system.minimalPathSets().mostProbable(1000, p).size()
            : () -> system.minimalPathSets().count().doubleValue());
  }

  private static Prepared gridPaths() {
    Structure structure = Inputs.grid(8, 8).connecting(Inputs.corners(8, 8));
    CoherentSystem system = structure.compile();
    return prepared(structure, () -> system.minimalPathSets().count().doubleValue());
  }

  private static Prepared gridCuts() {
    Structure structure = Inputs.grid(8, 8).connecting(Inputs.corners(8, 8));
    CoherentSystem system = structure.compile();
    return prepared(structure, () -> small(system.minimalCutSets(), 4));
  }

  private static Prepared truncated(Far far) {
    Structure structure = far.structure();
    return prepared(
        structure, () -> structure.minimalCutSets(CutOff.size(far.size)).stream().count());
  }

  private static Prepared compiled(Far far) {
    Structure structure = far.structure();
    return prepared(structure, () -> small(structure.compile().minimalCutSets(), far.size));
  }

  private static double small(MinimalSets sets, int size) {
    return sets.ofSizeAtMost(size).stream().count();
  }
}
