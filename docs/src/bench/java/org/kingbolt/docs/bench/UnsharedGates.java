package org.kingbolt.docs.bench;

import java.util.ArrayList;
import java.util.List;
import java.util.Random;
import org.kingbolt.core.Structure;

/** Very many components in nested gates, each component in one place. */
final class UnsharedGates {

  /** A structure and about how likely it is to fail. */
  private record Part(Structure structure, double fails) {}

  private UnsharedGates() {}

  /** Joins two to five neighbours at a time, layer by layer, until one structure is left. */
  static Structure of(int components, long seed) {
    Random random = new Random(seed);
    List<Part> layer = new ArrayList<>(components);
    for (int i = 0; i < components; i++) {
      layer.add(new Part(Structure.component("c" + i), 0.1));
    }
    while (layer.size() > 1) {
      List<Part> next = new ArrayList<>();
      for (int from = 0; from < layer.size(); ) {
        int to = Math.min(layer.size(), from + 2 + random.nextInt(4));
        next.add(to - from == 1 ? layer.get(from) : joined(layer.subList(from, to), random));
        from = to;
      }
      layer = next;
    }
    return layer.get(0).structure();
  }

  /** Weak parts stand side by side and strong ones in a row, lest the whole be sure of anything. */
  private static Part joined(List<Part> parts, Random random) {
    List<Structure> structures = parts.stream().map(Part::structure).toList();
    double fails = parts.stream().mapToDouble(Part::fails).average().orElseThrow();
    int n = parts.size();
    if (fails > 0.2) {
      return new Part(Structure.parallel(structures), Math.pow(fails, n));
    }
    if (fails < 0.01 || n == 2) {
      return new Part(Structure.series(structures), n * fails);
    }
    if (n == 3 && random.nextBoolean()) {
      return new Part(Structure.atLeast(2, structures), 3 * fails * fails);
    }
    return new Part(Structure.parallel(structures), Math.pow(fails, n));
  }
}
