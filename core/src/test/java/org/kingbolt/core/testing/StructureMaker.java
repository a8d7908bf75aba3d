package org.kingbolt.core.testing;

import java.util.ArrayList;
import java.util.Collections;
import java.util.LinkedHashMap;
import java.util.LinkedHashSet;
import java.util.List;
import java.util.Map;
import java.util.Random;
import java.util.Set;
import java.util.function.Predicate;
import org.kingbolt.core.Structure;
import org.kingbolt.core.testing.RandomStructures.Sample;

/** Makes one random structure and, step by step beside it, its truth table. For one thread. */
final class StructureMaker {

  /** A structure in the making, over the whole pool of components. */
  private record Draft(Structure structure, TruthTable table) {}

  private final int pool;
  private final Random random;

  StructureMaker(int pool, long seed) {
    this.pool = pool;
    this.random = new Random(seed);
  }

  Sample sample(int depth) {
    return closed(draft(depth));
  }

  Sample network(int nodes) {
    while (true) {
      Draft draft = network(nodes, 0);
      if (!draft.table.isConstant()) {
        return closed(draft);
      }
    }
  }

  private Sample closed(Draft draft) {
    List<String> components = draft.structure.components();
    Oracle oracle = new Oracle(RandomStructures.NAMES.subList(0, pool), draft.table);
    if (!oracle.irrelevant().containsAll(lost(components))) {
      throw new AssertionError(draft.structure + " has lost a component that matters");
    }
    return new Sample(draft.structure, oracle.over(components));
  }

  private List<String> lost(List<String> components) {
    return RandomStructures.NAMES.subList(0, pool).stream()
        .filter(name -> !components.contains(name))
        .toList();
  }

  /** Depth is at most three. */
  private Draft draft(int depth) {
    if (depth == 0) {
      return component(random.nextInt(pool));
    }
    return switch (random.nextInt(14)) {
      case 0, 1, 2 -> gate(1 + random.nextInt(4), depth);
      case 3, 4 -> family(random.nextBoolean());
      case 5 -> rule();
      case 6 -> capacity();
      case 7 -> run(random.nextBoolean());
      case 8 -> dual(draft(depth - 1));
      case 9 -> conditioned(draft(depth));
      case 10 -> replaced(draft(depth - 1), draft(depth - 1));
      default -> network(2 + random.nextInt(5), depth - 1);
    };
  }

  private Draft component(int index) {
    return new Draft(
        Structure.component(RandomStructures.NAMES.get(index)), TruthTable.component(pool, index));
  }

  private Draft gate(int most, int depth) {
    Map<Structure, TruthTable> parts = new LinkedHashMap<>();
    for (int i = 0; i < most; i++) {
      Draft part = draft(depth - 1);
      parts.put(part.structure, part.table);
    }
    List<Structure> structures = List.copyOf(parts.keySet());
    int k = 1 + random.nextInt(structures.size());
    Structure structure =
        switch (random.nextInt(3)) {
          case 0 -> {
            k = structures.size();
            yield Structure.series(structures);
          }
          case 1 -> {
            k = 1;
            yield Structure.parallel(structures);
          }
          default -> Structure.atLeast(k, structures);
        };
    int needed = k;
    return over(structure, List.copyOf(parts.values()), works -> count(works) >= needed);
  }

  private Draft family(boolean paths) {
    List<List<Integer>> sets = new ArrayList<>();
    int number = 1 + random.nextInt(5);
    for (int i = 0; i < number; i++) {
      sets.add(some());
    }
    List<List<String>> named = sets.stream().map(StructureMaker::names).toList();
    Structure structure = paths ? Structure.ofPathSets(named) : Structure.ofCutSets(named);
    return over(
        structure,
        all(),
        works ->
            paths == sets.stream().anyMatch(set -> set.stream().allMatch(i -> works[i] == paths)));
  }

  /** A rule by two sets, one of which must work. */
  private Draft rule() {
    List<Integer> first = some();
    List<Integer> second = some();
    List<String> named = new ArrayList<>(names(first));
    names(second).stream().filter(name -> !named.contains(name)).forEach(named::add);
    return over(
        Structure.ofRule(
            named,
            up ->
                up.containsAll(names(first))
                    || names(second).stream().filter(up::contains).count() * 2 > second.size()),
        all(),
        works ->
            first.stream().allMatch(i -> works[i])
                || second.stream().filter(i -> works[i]).count() * 2 > second.size());
  }

  private Draft capacity() {
    List<Integer> members = some();
    Map<String, Long> capacities = new LinkedHashMap<>();
    long[] weights = new long[pool];
    long sum = 0;
    for (int i : members) {
      weights[i] = random.nextInt(3) == 0 ? 1 : random.nextInt(20);
      sum += weights[i];
      capacities.put(RandomStructures.NAMES.get(i), weights[i]);
    }
    if (sum == 0) {
      return component(members.get(0));
    }
    long demand = 1L + random.nextInt((int) sum);
    return over(
        Structure.capacityAtLeast(demand, capacities),
        all(),
        works -> {
          long capacity = 0;
          for (int i : members) {
            capacity += works[i] ? weights[i] : 0;
          }
          return capacity >= demand;
        });
  }

  private Draft run(boolean around) {
    List<Integer> members = some();
    int n = members.size();
    int k = 1 + random.nextInt(n);
    String[] named = names(members).toArray(new String[0]);
    Structure structure =
        around
            ? Structure.withoutFailureRunAround(k, named)
            : Structure.withoutFailureRun(k, named);
    return over(
        structure,
        all(),
        works -> {
          for (int start = 0; start < n; start++) {
            int failed = 0;
            while (failed < k
                && (around || start + failed < n)
                && !works[members.get((start + failed) % n)]) {
              failed++;
            }
            if (failed == k) {
              return false;
            }
          }
          return true;
        });
  }

  private static Draft dual(Draft draft) {
    return new Draft(draft.structure.dual(), draft.table.dual());
  }

  /** Conditioned on one of its components, unless that leaves nothing. */
  private Draft conditioned(Draft draft) {
    String name = any(draft.structure.components());
    boolean works = random.nextBoolean();
    TruthTable table = draft.table.given(RandomStructures.NAMES.indexOf(name), works);
    return table.isConstant()
        ? draft
        : new Draft(
            works ? draft.structure.givenWorking(name) : draft.structure.givenFailed(name), table);
  }

  private Draft replaced(Draft draft, Draft module) {
    String name = any(draft.structure.components());
    return new Draft(
        draft.structure.replace(name, module.structure),
        draft.table.replace(RandomStructures.NAMES.indexOf(name), module.table));
  }

  private Draft network(int nodes, int depth) {
    for (int attempt = 0; attempt < 50; attempt++) {
      RandomNetwork network = new RandomNetwork(nodes, random);
      List<TruthTable> tables = new ArrayList<>();
      int slots = network.slots();
      for (int i = 0; i < slots; i++) {
        Draft part = draft(random.nextInt(3) == 0 ? depth : 0);
        network.part(part.structure);
        tables.add(part.table);
      }
      TruthTable table = TruthTable.over(pool, tables, network::works);
      if (!table.isConstant()) {
        return new Draft(network.structure(), table);
      }
    }
    return component(random.nextInt(pool));
  }

  private Draft over(Structure structure, List<TruthTable> parts, Predicate<boolean[]> operator) {
    return new Draft(structure, TruthTable.over(pool, parts, operator));
  }

  private List<TruthTable> all() {
    List<TruthTable> tables = new ArrayList<>();
    for (int i = 0; i < pool; i++) {
      tables.add(TruthTable.component(pool, i));
    }
    return tables;
  }

  /** Between one and all of the pool's components, each once, in any order. */
  private List<Integer> some() {
    List<Integer> indices = new ArrayList<>();
    for (int i = 0; i < pool; i++) {
      indices.add(i);
    }
    Collections.shuffle(indices, random);
    return List.copyOf(indices.subList(0, 1 + random.nextInt(pool)));
  }

  private String any(List<String> names) {
    return names.get(random.nextInt(names.size()));
  }

  private static List<String> names(List<Integer> indices) {
    Set<String> names = new LinkedHashSet<>();
    indices.forEach(i -> names.add(RandomStructures.NAMES.get(i)));
    return List.copyOf(names);
  }

  private static int count(boolean[] works) {
    int count = 0;
    for (boolean one : works) {
      count += one ? 1 : 0;
    }
    return count;
  }
}
