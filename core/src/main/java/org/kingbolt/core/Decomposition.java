package org.kingbolt.core;

import java.util.ArrayDeque;
import java.util.ArrayList;
import java.util.Collections;
import java.util.Deque;
import java.util.HashMap;
import java.util.HashSet;
import java.util.IdentityHashMap;
import java.util.LinkedHashSet;
import java.util.List;
import java.util.Map;
import java.util.Set;

/**
 * A structure written as a formula as far as independent series and parallel parts go; whatever is
 * left stands in it as a result still to be derived.
 */
final class Decomposition {

  /** How far a structure has come apart: less is better, compared field by field. */
  record Measure(int unresolved, int symbols, int depth) {}

  private record Pending(Structure structure, Formula parent, int place, int depth, Uses uses) {}

  /** Which components occur more than once within one structure, and where they are. */
  private static final class Uses {
    final Set<String> repeated = new LinkedHashSet<>();
    private final IdentityHashMap<Structure, Boolean> holdsRepeated = new IdentityHashMap<>();

    Uses(Structure root) {
      List<Structure> order = Fold.postOrder(root);
      // the number of times each sub-structure stands in the structure written out, up to two
      IdentityHashMap<Structure, Integer> times = new IdentityHashMap<>();
      times.put(root, 1);
      Map<String, Integer> timesByName = new HashMap<>();
      for (int i = order.size() - 1; i >= 0; i--) {
        Structure structure = order.get(i);
        int here = times.getOrDefault(structure, 1);
        for (Structure part : structure.parts()) {
          times.merge(part, here, (a, b) -> Math.min(2, a + b));
        }
        if (structure instanceof ComponentStructure component) {
          timesByName.merge(component.name(), here, Integer::sum);
        }
      }
      timesByName.forEach(
          (name, count) -> {
            if (count > 1) {
              repeated.add(name);
            }
          });
      for (Structure structure : order) {
        boolean holds =
            structure instanceof ComponentStructure component
                ? repeated.contains(component.name())
                : structure.parts().stream().anyMatch(this::holdsRepeated);
        holdsRepeated.put(structure, holds);
      }
    }

    boolean holdsRepeated(Structure structure) {
      return holdsRepeated.getOrDefault(structure, true);
    }
  }

  private final Formula holder = Formula.of(Formula.Kind.PRODUCT);
  private final Deque<Pending> pending = new ArrayDeque<>();
  private final Runnable pause;
  private int unresolved;
  private int symbols;
  private int depth;

  private Decomposition(Structure structure, Runnable pause) {
    this.pause = pause;
    holder.operands.add(Formula.of(Formula.Kind.ONE));
    pending.push(new Pending(structure, holder, 0, 0, new Uses(structure)));
    while (!pending.isEmpty()) {
      resolve(pending.pop());
    }
  }

  /**
   * Takes a structure apart.
   *
   * @param pause called once in a while; may end the work by throwing
   */
  static Decomposition of(Structure structure, Runnable pause) {
    return new Decomposition(structure, pause);
  }

  Formula formula() {
    return holder.operands.get(0);
  }

  Measure measure() {
    return new Measure(unresolved, symbols, depth);
  }

  private void resolve(Pending item) {
    Structure structure = item.structure;
    Uses uses = item.uses;
    if (structure instanceof NetworkStructure network) {
      structure = NetworkReduction.of(network, pause);
      uses = new Uses(structure);
    }
    depth = Math.max(depth, item.depth);
    Formula formula;
    if (structure instanceof ComponentStructure component) {
      symbols++;
      formula = Formula.symbol(component.name());
    } else if (structure instanceof ConstantStructure) {
      formula = Formula.of(structure.isAlwaysWorking() ? Formula.Kind.ONE : Formula.Kind.ZERO);
    } else if (structure instanceof GateStructure gate && (gate.isSeries() || gate.isParallel())) {
      List<Structure> flat = flattened(gate, gate.isSeries());
      if (flat.size() == 1) {
        Structure only = flat.get(0);
        pending.push(new Pending(only, item.parent, item.place, item.depth, new Uses(only)));
        return;
      }
      formula = gate(flat, gate.isSeries(), item.depth, uses);
    } else {
      unresolved += structure.components().size();
      formula = Formula.result(structure);
    }
    item.parent.operands.set(item.place, formula);
  }

  private Formula gate(List<Structure> flat, boolean series, int gateDepth, Uses uses) {
    List<Structure> groups = independent(flat, series, uses);
    if (groups.size() == 1) {
      Structure whole = groups.get(0);
      unresolved += whole.components().size();
      return Formula.result(whole);
    }
    Formula formula = Formula.of(series ? Formula.Kind.PRODUCT : Formula.Kind.COPRODUCT);
    for (int i = groups.size() - 1; i >= 0; i--) {
      formula.operands.add(Formula.of(Formula.Kind.ONE));
    }
    for (int i = groups.size() - 1; i >= 0; i--) {
      // a group that is one of the parts keeps what is known of the whole; a joined one is new
      Structure group = groups.get(i);
      boolean joined = groups.size() < flat.size() && !containsIdentical(flat, group);
      pending.push(new Pending(group, formula, i, gateDepth + 1, joined ? new Uses(group) : uses));
    }
    return formula;
  }

  @SuppressWarnings("ReferenceEquality")
  private static boolean containsIdentical(List<Structure> structures, Structure wanted) {
    return structures.stream().anyMatch(structure -> structure == wanted);
  }

  /** The parts of a gate, with gates of the same kind among them opened. */
  private static List<Structure> flattened(GateStructure gate, boolean series) {
    List<Structure> flat = new ArrayList<>();
    Set<Structure> seen = new HashSet<>();
    Set<Structure> opened = Collections.newSetFromMap(new IdentityHashMap<>());
    Deque<Structure> open = new ArrayDeque<>();
    open.push(gate);
    while (!open.isEmpty()) {
      Structure structure = open.pop();
      boolean same =
          structure instanceof GateStructure inner
              && (series ? inner.isSeries() : inner.isParallel());
      if (same && opened.add(structure)) {
        List<Structure> parts = structure.parts();
        for (int i = parts.size() - 1; i >= 0; i--) {
          open.push(parts.get(i));
        }
      } else if (!same && seen.add(structure)) {
        flat.add(structure);
      }
    }
    return flat;
  }

  /** Joins parts that share components, directly or through others, into one structure each. */
  private static List<Structure> independent(List<Structure> parts, boolean series, Uses uses) {
    List<Integer> sharing = new ArrayList<>();
    for (int i = 0; i < parts.size(); i++) {
      if (uses.holdsRepeated(parts.get(i))) {
        sharing.add(i);
      }
    }
    if (sharing.size() < 2) {
      return parts;
    }
    int[] group = new int[parts.size()];
    for (int i = 0; i < group.length; i++) {
      group[i] = i;
    }
    Map<String, Integer> holder = new HashMap<>();
    for (int i : sharing) {
      for (String name : Fold.componentSet(parts.get(i))) {
        Integer before = uses.repeated.contains(name) ? holder.putIfAbsent(name, i) : null;
        if (before != null) {
          unite(group, before, i);
        }
      }
    }
    Map<Integer, List<Structure>> groups = new java.util.LinkedHashMap<>();
    for (int i = 0; i < group.length; i++) {
      groups.computeIfAbsent(find(group, i), root -> new ArrayList<>()).add(parts.get(i));
    }
    return groups.values().stream()
        .map(members -> series ? GateStructure.allOf(members) : GateStructure.anyOf(members))
        .toList();
  }

  private static int find(int[] group, int start) {
    int at = start;
    while (group[at] != at) {
      group[at] = group[group[at]];
      at = group[at];
    }
    return at;
  }

  private static void unite(int[] group, int a, int b) {
    int rootA = find(group, a);
    int rootB = find(group, b);
    group[Math.max(rootA, rootB)] = Math.min(rootA, rootB);
  }

  /** Components that occur more than once, so that parts that hold them are not independent. */
  static Set<String> repeated(Structure structure) {
    return new Uses(structure).repeated;
  }
}
