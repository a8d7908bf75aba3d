package org.kingbolt.core;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.HashSet;
import java.util.List;
import java.util.Set;
import java.util.stream.Collectors;
import net.jqwik.api.Arbitrary;
import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.Provide;
import org.kingbolt.core.testing.RandomStructures;
import org.kingbolt.core.testing.RandomStructures.Sample;

/**
 * Minimal path sets and minimal cut sets are each other's minimal transversals. Computed here set
 * by set: Berge, Hypergraphs, 1989, ch. 2 (from memory).
 */
class TransversalTest {

  @Provide
  Arbitrary<Sample> networks() {
    return RandomStructures.networks();
  }

  @Provide
  Arbitrary<Sample> structures() {
    return RandomStructures.any();
  }

  private static Set<Set<String>> transversals(List<Set<String>> sets) {
    Set<Set<String>> hitting = Set.of(Set.of());
    for (Set<String> set : sets) {
      Set<Set<String>> next = new HashSet<>();
      for (Set<String> old : hitting) {
        if (old.stream().anyMatch(set::contains)) {
          next.add(old);
        } else {
          for (String member : set) {
            Set<String> more = new HashSet<>(old);
            more.add(member);
            next.add(more);
          }
        }
      }
      hitting = next.stream().filter(set1 -> isMinimal(set1, next)).collect(Collectors.toSet());
    }
    return hitting;
  }

  private static boolean isMinimal(Set<String> set, Set<Set<String>> among) {
    return among.stream().noneMatch(other -> other.size() < set.size() && set.containsAll(other));
  }

  private static void assertDual(CoherentSystem system) {
    List<Set<String>> paths = system.minimalPathSets().stream().toList();
    List<Set<String>> cuts = system.minimalCutSets().stream().toList();
    assertEquals(transversals(paths), new HashSet<>(cuts));
    assertEquals(transversals(cuts), new HashSet<>(paths));
    for (Set<String> path : paths) {
      for (Set<String> cut : cuts) {
        assertTrue(path.stream().anyMatch(cut::contains), () -> path + " misses " + cut);
      }
    }
  }

  @Property(tries = 500)
  void networks_areDual(@ForAll("networks") Sample sample) {
    assertDual(sample.structure().compile());
  }

  @Property(tries = 500)
  void structures_areDual(@ForAll("structures") Sample sample) {
    assertDual(sample.structure().compile());
  }
}
