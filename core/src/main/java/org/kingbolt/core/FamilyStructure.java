package org.kingbolt.core;

import java.util.ArrayList;
import java.util.BitSet;
import java.util.Collection;
import java.util.LinkedHashMap;
import java.util.LinkedHashSet;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.Set;
import org.kingbolt.core.diagram.Composer;
import org.kingbolt.core.diagram.RouteFinder;
import org.kingbolt.core.diagram.Routes;
import org.kingbolt.core.diagram.Templates;
import org.kingbolt.core.diagram.WorkMeter;

/** A family of path sets or of cut sets, minimal or not, over parts. */
final class FamilyStructure extends Structure {

  static final String PATHS = "ofPathSets";
  static final String CUTS = "ofCutSets";

  /** Up to this many sets, simplification also drops sets that contain others. */
  private static final int ABSORBED = 4096;

  private static final long serialVersionUID = 1L;

  private final boolean paths;
  private final transient List<BitSet> sets;

  private FamilyStructure(boolean paths, List<Structure> parts, List<BitSet> sets) {
    super(parts, 31 * sets.hashCode() + (paths ? 1 : 0));
    this.paths = paths;
    this.sets = sets;
  }

  static Structure described(boolean paths, Collection<? extends Collection<String>> sets) {
    String kind = paths ? PATHS : CUTS;
    Check.notNull(sets, kind + ": the collection of sets");
    List<List<Structure>> structures = new ArrayList<>();
    for (Collection<String> set : sets) {
      List<Structure> members = new ArrayList<>();
      String where = kind + ": set " + (structures.size() + 1);
      for (String name : Check.notNull(set, where)) {
        members.add(new ComponentStructure(Check.name(name, where, members.size() + 1)));
      }
      structures.add(members);
    }
    return describedByParts(paths, structures);
  }

  static Structure describedByParts(boolean paths, List<List<Structure>> sets) {
    String kind = paths ? PATHS : CUTS;
    if (sets.isEmpty()) {
      throw new NotCoherentException(
          kind
              + ": there are no sets, so the structure would "
              + (paths ? "never" : "always")
              + " work; list at least one");
    }
    Map<Structure, Integer> slots = new LinkedHashMap<>();
    Set<BitSet> distinct = new LinkedHashSet<>();
    for (int i = 0; i < sets.size(); i++) {
      if (sets.get(i).isEmpty()) {
        throw new NotCoherentException(
            kind
                + ": set "
                + (i + 1)
                + " is empty, so the structure would "
                + (paths ? "always" : "never")
                + " work; leave it out");
      }
      BitSet set = new BitSet();
      for (Structure part : sets.get(i)) {
        GateStructure.requireComponents(kind + ": a member of set " + (i + 1), part);
        slots.putIfAbsent(part, slots.size());
        int slot = slots.get(part);
        if (set.get(slot)) {
          throw new IllegalArgumentException(
              kind
                  + ": set "
                  + (i + 1)
                  + " lists "
                  + TextWriter.excerpt(part)
                  + " twice; list every member once");
        }
        set.set(slot);
      }
      distinct.add(set);
    }
    return new FamilyStructure(paths, List.copyOf(slots.keySet()), List.copyOf(distinct));
  }

  /** Simplified; parts may be constants or repeat. */
  static Structure of(boolean paths, List<Structure> parts, List<BitSet> sets) {
    Structure neutral = ConstantStructure.of(paths);
    Structure killing = ConstantStructure.of(!paths);
    Map<Structure, Integer> slots = new LinkedHashMap<>();
    Set<BitSet> open = new LinkedHashSet<>();
    for (BitSet set : sets) {
      BitSet members = new BitSet();
      boolean killed = false;
      for (int slot = set.nextSetBit(0); slot >= 0; slot = set.nextSetBit(slot + 1)) {
        Structure part = parts.get(slot);
        killed |= part.equals(killing);
        if (!(part instanceof ConstantStructure)) {
          slots.putIfAbsent(part, slots.size());
          members.set(slots.get(part));
        }
      }
      if (!killed) {
        if (members.isEmpty()) {
          return neutral;
        }
        open.add(members);
      }
    }
    if (open.isEmpty()) {
      return killing;
    }
    List<BitSet> kept =
        parts.stream().anyMatch(ConstantStructure.class::isInstance)
            ? minimal(open)
            : List.copyOf(open);
    return renumbered(paths, List.copyOf(slots.keySet()), kept);
  }

  /** Drops parts that are in no set, and turns families of one kind of gate into that gate. */
  private static Structure renumbered(boolean paths, List<Structure> parts, List<BitSet> sets) {
    BitSet used = new BitSet();
    sets.forEach(used::or);
    List<Structure> kept = used.stream().mapToObj(parts::get).toList();
    if (sets.size() == 1) {
      return paths ? GateStructure.allOf(kept) : GateStructure.anyOf(kept);
    }
    if (sets.stream().allMatch(set -> set.cardinality() == 1)) {
      return paths ? GateStructure.anyOf(kept) : GateStructure.allOf(kept);
    }
    // slots in order of first mention in the sets, as a reader of the text will meet them
    Map<Integer, Integer> slots = new LinkedHashMap<>();
    List<BitSet> moved = new ArrayList<>();
    for (BitSet set : sets) {
      BitSet to = new BitSet();
      set.stream()
          .forEach(
              slot -> {
                slots.putIfAbsent(slot, slots.size());
                to.set(slots.get(slot));
              });
      moved.add(to);
    }
    return new FamilyStructure(
        paths, slots.keySet().stream().map(parts::get).toList(), List.copyOf(moved));
  }

  private static List<BitSet> minimal(Set<BitSet> sets) {
    if (sets.size() > ABSORBED) {
      return List.copyOf(sets);
    }
    return sets.stream()
        .filter(set -> sets.stream().noneMatch(other -> !other.equals(set) && isWithin(other, set)))
        .toList();
  }

  private static boolean isWithin(BitSet inner, BitSet outer) {
    BitSet rest = (BitSet) inner.clone();
    rest.andNot(outer);
    return rest.isEmpty();
  }

  @Override
  boolean evaluate(boolean[] partWorks) {
    for (BitSet set : sets) {
      if (set.stream().allMatch(slot -> partWorks[slot] == paths)) {
        return paths;
      }
    }
    return !paths;
  }

  @Override
  Structure rebuild(List<Structure> newParts) {
    return of(paths, newParts, sets);
  }

  @Override
  Structure dualOver(List<Structure> dualParts) {
    return new FamilyStructure(!paths, dualParts, sets);
  }

  @Override
  List<RouteFinder> routes() {
    return paths ? List.of(Routes.listed(slotSets())) : super.routes();
  }

  @Override
  Optional<List<int[]>> slotCuts() {
    return paths ? Optional.empty() : Optional.of(slotSets());
  }

  private List<int[]> slotSets() {
    return sets.stream().map(set -> set.stream().toArray()).toList();
  }

  @Override
  int express(Composer composer, int[] partExpressions, WorkMeter meter) {
    return composer.operator(Templates.family(parts().size(), sets, paths), partExpressions);
  }

  @Override
  void write(TextWriter out) {
    out.token(paths ? PATHS : CUTS).token("(");
    String separator = "{";
    for (BitSet set : sets) {
      out.token(separator).list(set.stream().mapToObj(parts()::get).toList()).token("}");
      separator = ", {";
    }
    out.token(")");
  }

  @Override
  boolean sameOperator(Structure other) {
    return other instanceof FamilyStructure that && paths == that.paths && sets.equals(that.sets);
  }
}
