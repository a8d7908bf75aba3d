package org.kingbolt.core;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.math.BigInteger;
import java.util.ArrayList;
import java.util.Comparator;
import java.util.HashSet;
import java.util.List;
import java.util.Set;
import java.util.function.Predicate;
import java.util.stream.Collectors;
import net.jqwik.api.Arbitrary;
import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.Provide;
import net.jqwik.api.constraints.IntRange;
import org.kingbolt.core.testing.Close;
import org.kingbolt.core.testing.Oracle;
import org.kingbolt.core.testing.RandomStructures;
import org.kingbolt.core.testing.RandomStructures.Sample;

/** Questions to families of minimal sets, against all states of random structures. */
class SetSelectionTest {

  @Provide
  Arbitrary<Sample> structures() {
    return RandomStructures.any();
  }

  @Provide
  Arbitrary<Sample> networks() {
    return RandomStructures.networks();
  }

  @Provide
  Arbitrary<Probabilities> probabilities() {
    return RandomStructures.probabilities();
  }

  private static MinimalSets sets(Sample sample, boolean paths) {
    CoherentSystem system = sample.structure().compile();
    return paths ? system.minimalPathSets() : system.minimalCutSets();
  }

  private static Set<Set<String>> minimal(Sample sample, boolean paths) {
    return paths ? sample.oracle().minimalPaths() : sample.oracle().minimalCuts();
  }

  private static Set<Set<String>> those(Set<Set<String>> sets, Predicate<Set<String>> wanted) {
    return sets.stream().filter(wanted).collect(Collectors.toSet());
  }

  private static void assertSelected(Set<Set<String>> expected, MinimalSets sets) {
    assertEquals(expected, sets.stream().collect(Collectors.toSet()));
    assertEquals(BigInteger.valueOf(expected.size()), sets.count());
  }

  @Property(tries = 1000)
  void selections_areThoseOfTheList(
      @ForAll("structures") Sample sample,
      @ForAll boolean paths,
      @ForAll @IntRange(max = 8) int size) {
    MinimalSets sets = sets(sample, paths);
    Set<Set<String>> all = minimal(sample, paths);
    int least = all.stream().mapToInt(Set::size).min().orElseThrow();
    assertSelected(those(all, set -> set.size() == least), sets.smallest());
    assertSelected(those(all, set -> set.size() <= size), sets.ofSizeAtMost(size));
    for (String name : sample.oracle().names()) {
      MinimalSets with = sets.containing(name);
      assertSelected(those(all, set -> set.contains(name)), with);
      assertSelected(those(all, set -> !set.contains(name)), sets.without(name));
      assertSelected(
          those(all, set -> set.contains(name) && set.size() <= size), with.ofSizeAtMost(size));
    }
  }

  @Property(tries = 500)
  void tests_agreeWithEveryState(@ForAll("structures") Sample sample, @ForAll boolean paths) {
    Oracle oracle = sample.oracle();
    Structure structure = sample.structure();
    MinimalSets sets = sets(sample, paths);
    Set<Set<String>> all = minimal(sample, paths);
    for (int state = 0; state < 1 << oracle.names().size(); state++) {
      Set<String> set = oracle.set(state);
      Set<String> rest = new HashSet<>(oracle.names());
      rest.removeAll(set);
      boolean decides = paths ? oracle.works(set) : !oracle.works(rest);
      assertEquals(all.contains(set), sets.contains(set));
      assertEquals(decides, sets.containsPartOf(set));
      assertEquals(decides, paths ? structure.isPathSet(set) : structure.isCutSet(set));
      assertEquals(
          all.contains(set),
          paths ? structure.isMinimalPathSet(set) : structure.isMinimalCutSet(set));
    }
  }

  private static void assertInOrder(Sample sample, MinimalSets sets) {
    List<String> names = sample.oracle().names();
    List<List<Integer>> listed = new ArrayList<>();
    for (Set<String> set : sets) {
      listed.add(set.stream().map(names::indexOf).toList());
    }
    Comparator<List<Integer>> bySize = Comparator.comparingInt(List::size);
    Comparator<List<Integer>> byMembers =
        (a, b) -> {
          int i = 0;
          while (i < a.size() && a.get(i).equals(b.get(i))) {
            i++;
          }
          return i < a.size() ? a.get(i) - b.get(i) : 0;
        };
    assertEquals(listed.stream().sorted(bySize.thenComparing(byMembers)).toList(), listed);
  }

  @Property(tries = 500)
  void streams_areInOrderOfSizeAndComponents(
      @ForAll("networks") Sample sample, @ForAll boolean paths) {
    MinimalSets sets = sets(sample, paths);
    assertInOrder(sample, sets);
    assertEquals(minimal(sample, paths), sets.stream().collect(Collectors.toSet()));
  }

  @Property(tries = 500)
  void bestFirst_isTheSortedList(
      @ForAll("structures") Sample sample,
      @ForAll boolean paths,
      @ForAll("probabilities") Probabilities p) {
    MinimalSets sets = sets(sample, paths);
    List<Set<String>> best = sets.mostProbable(Integer.MAX_VALUE, p);
    assertEquals(minimal(sample, paths), new HashSet<>(best));
    List<Double> sorted =
        minimal(sample, paths).stream()
            .map(set -> sets.probability(set, p))
            .sorted(Comparator.reverseOrder())
            .toList();
    for (int i = 0; i < best.size(); i++) {
      double value = sets.probability(best.get(i), p);
      assertEquals(sorted.get(i), value, 1e-12 * value, "place " + i);
      assertEquals(
          value,
          sets.mostProbable(i + 1, p).stream()
              .mapToDouble(set -> sets.probability(set, p))
              .min()
              .orElseThrow());
    }
  }

  @Property(tries = 1000)
  void expansions_agreeWithEveryState(
      @ForAll("structures") Sample sample,
      @ForAll boolean paths,
      @ForAll("probabilities") Probabilities p) {
    MinimalSets sets = sets(sample, paths);
    Oracle oracle = sample.oracle();
    Close.assertReliability(oracle, p, sets.disjointProducts(p), "disjoint products");
    if (sets.count().intValueExact() <= 14) {
      Close.assertReliability(oracle, p, sets.inclusionExclusion(p), "inclusion-exclusion");
    }
  }

  @Property(tries = 300)
  void rows_shareTheSum(
      @ForAll("structures") Sample sample,
      @ForAll boolean paths,
      @ForAll("probabilities") Probabilities p) {
    MinimalSets sets = sets(sample, paths);
    double sum = minimal(sample, paths).stream().mapToDouble(s -> sets.probability(s, p)).sum();
    assertEquals(sum, sets.sumOfProbabilities(p), 1e-12 * sum);
    double shares = 0;
    List<Set<String>> listed = new ArrayList<>();
    for (MinimalSets.Row row : sets.rows(p)) {
      listed.add(row.set());
      shares += row.share();
      assertEquals(row.set().size(), row.size());
      assertEquals(sets.probability(row.set(), p), row.probability());
    }
    assertEquals(sets.stream().toList(), listed);
    assertTrue(sum == 0 ? shares == 0 : Math.abs(shares - 1) < 1e-12, "shares " + shares);
  }
}
