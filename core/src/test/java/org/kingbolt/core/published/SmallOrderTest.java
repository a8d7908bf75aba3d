package org.kingbolt.core.published;

import static java.util.stream.Collectors.joining;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;
import static org.kingbolt.core.published.Exact.sets;

import java.util.ArrayList;
import java.util.List;
import java.util.Set;
import java.util.TreeSet;
import java.util.stream.IntStream;
import java.util.stream.Stream;
import org.apache.commons.math3.fraction.BigFraction;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.kingbolt.core.CoherentSystem;
import org.kingbolt.core.SignatureComparison;
import org.kingbolt.core.SignatureComparison.Outcome;
import org.kingbolt.core.Structure;
import org.kingbolt.core.testing.TruthTable;

/** Coherent systems of few components: how many there are, and their signatures. */
class SmallOrderTest {

  /** All systems of up to four components: the rows of the table below. */
  private static final String SYSTEMS =
      "1 12 1,2 123 13,23 12,13,23 3,12 1,2,3 1234 134,234 "
          + "124,134,234 34,124 123,124,134,234 34,123,124 14,24,34 "
          + "24,34,123 14,23 14,24,34,123 14,23,34 14,23,24,34 13,14,23,24 "
          + "13,14,23,24,34 4,123 12,13,14,23,24,34 4,13,23 4,12,13,23 "
          + "3,4,12 1,2,3,4";

  /**
   * Shaked and Suarez-Llorens, J. Amer. Statist. Assoc. 98 (2003) 693, table 1; Samaniego 2007,
   * table 3.2 (rows from memory). Mean lives follow from the signatures.
   */
  @ParameterizedTest
  @CsvSource(
      delimiter = '|',
      textBlock =
          """
          1 | (1) | 1
          12 | (1, 0) | 1/2
          1,2 | (0, 1) | 3/2
          123 | (1, 0, 0) | 1/3
          13,23 | (1/3, 2/3, 0) | 2/3
          12,13,23 | (0, 1, 0) | 5/6
          3,12 | (0, 2/3, 1/3) | 7/6
          1,2,3 | (0, 0, 1) | 11/6
          1234 | (1, 0, 0, 0) | 1/4
          134,234 | (1/2, 1/2, 0, 0) | 5/12
          124,134,234 | (1/4, 3/4, 0, 0) | 1/2
          34,124 | (1/4, 7/12, 1/6, 0) | 7/12
          123,124,134,234 | (0, 1, 0, 0) | 7/12
          34,123,124 | (0, 5/6, 1/6, 0) | 2/3
          14,24,34 | (1/4, 1/4, 1/2, 0) | 3/4
          24,34,123 | (0, 2/3, 1/3, 0) | 3/4
          14,23 | (0, 2/3, 1/3, 0) | 3/4
          14,24,34,123 | (0, 1/2, 1/2, 0) | 5/6
          14,23,34 | (0, 1/2, 1/2, 0) | 5/6
          14,23,24,34 | (0, 1/3, 2/3, 0) | 11/12
          13,14,23,24 | (0, 1/3, 2/3, 0) | 11/12
          13,14,23,24,34 | (0, 1/6, 5/6, 0) | 1
          4,123 | (0, 1/2, 1/4, 1/4) | 13/12
          12,13,14,23,24,34 | (0, 0, 1, 0) | 13/12
          4,13,23 | (0, 1/6, 7/12, 1/4) | 5/4
          4,12,13,23 | (0, 0, 3/4, 1/4) | 4/3
          3,4,12 | (0, 0, 1/2, 1/2) | 19/12
          1,2,3,4 | (0, 0, 0, 1) | 25/12
          """)
  void signatureAndMeanLife_areThePublishedOnes(String paths, String signature, String meanLife) {
    CoherentSystem system = Structure.ofPathSets(sets(paths)).compile();
    assertEquals(signature, system.signature().toString());
    assertEquals(meanLife, Exact.meanLife(system.signature()).toString().replace(" ", ""));
    assertEquals(meanLife, system.signature().meanLifetime().toString().replace(" ", ""));
  }

  private static List<CoherentSystem> systems() {
    return Stream.of(SYSTEMS.split(" ", -1))
        .map(paths -> Structure.ofPathSets(sets(paths)).compile())
        .toList();
  }

  /**
   * Samaniego 2007, ch. 3 (from memory): with one more component that does not matter, entry k
   * becomes ((n-k+1) s_k + (k-1) s_(k-1)) / (n+1).
   */
  @Test
  void longerSignature_followsThePublishedFormula() {
    for (CoherentSystem system : systems()) {
      List<BigFraction> shorter = system.signature().fractions();
      int n = shorter.size();
      List<BigFraction> longer = system.signature().ofOrder(n + 1).fractions();
      for (int k = 1; k <= n + 1; k++) {
        BigFraction same = k > n ? BigFraction.ZERO : shorter.get(k - 1).multiply(n - k + 1);
        BigFraction before = k == 1 ? BigFraction.ZERO : shorter.get(k - 2).multiply(k - 1);
        assertEquals(same.add(before).divide(n + 1), longer.get(k - 1));
      }
    }
  }

  /**
   * Kochar, Mukerjee and Samaniego, Naval Res. Logist. 46 (1999) 507 (from memory): ordered
   * signatures give ordered reliabilities, and the stronger orders imply the weaker ones.
   */
  @Test
  void orderedSignatures_orderTheLives() {
    int ordered = 0;
    for (CoherentSystem one : systems()) {
      for (CoherentSystem two : systems()) {
        SignatureComparison outcome = one.signature().compare(two.signature());
        assertTrue(
            outcome.hazardRate() == outcome.likelihoodRatio()
                || outcome.likelihoodRatio() == Outcome.INCOMPARABLE);
        assertTrue(
            outcome.stochastic() == outcome.hazardRate()
                || outcome.hazardRate() == Outcome.INCOMPARABLE);
        if (outcome.stochastic() == Outcome.SHORTER) {
          ordered++;
          for (int i = 1; i < 16; i++) {
            BigFraction p = new BigFraction(i, 16);
            BigFraction less = one.polynomial().at(p);
            assertTrue(less.compareTo(two.polynomial().at(p)) < 0, () -> one + " at " + p);
          }
        }
      }
    }
    assertTrue(ordered > 300, "ordered pairs: " + ordered);
  }

  /**
   * By number of components, with components told apart and not. Told apart: OEIS A006126 (from
   * memory). Up to renaming: Shaked and Suarez-Llorens 2003 and Rao and Naqvi, J. Appl. Probab.
   * 2024 (seen) for 3 and 4; Barlow and Proschan 1975 (from memory) for 1 and 2; Navarro and Rubio,
   * Commun. Stat. Simul. Comput. 39 (2010) 68 (seen) for 5.
   */
  @ParameterizedTest
  @CsvSource({"1, 1, 1", "2, 2, 2", "3, 9, 5", "4, 114, 20", "5, 6894, 180"})
  void coherentSystems_areAsManyAsPublished(int order, int labelled, int upToRenaming) {
    List<CoherentSystem> systems = coherentSystems(order);
    assertEquals(labelled, systems.size());
    List<List<Integer>> renamings = permutations(order);
    Set<String> kinds = new TreeSet<>();
    for (CoherentSystem system : systems) {
      int[] paths = masks(system.minimalPathSets());
      kinds.add(renamings.stream().map(to -> renamed(paths, to)).min(String::compareTo).orElse(""));
    }
    assertEquals(upToRenaming, kinds.size());
  }

  /**
   * Labelled systems of order 7 with two minimal path sets: the list of coherent systems that goes
   * with Navarro and Rubio 2010 (seen).
   */
  @Test
  void coherentSystemsOfOrder7WithTwoPaths_areAsManyAsPublished() {
    int found = 0;
    for (int a = 1; a < 128; a++) {
      for (int b = a + 1; b < 128; b++) {
        if ((a | b) == 127) {
          CoherentSystem system = Structure.ofPathSets(List.of(set(a), set(b))).compile();
          found += system.minimalPathSets().count().intValue() == 2 ? 1 : 0;
        }
      }
    }
    assertEquals(966, found);
  }

  /** Every monotone function of so many variables, compiled; kept where all components matter. */
  private static List<CoherentSystem> coherentSystems(int order) {
    List<CoherentSystem> systems = new ArrayList<>();
    for (int table : TruthTable.monotone(order)) {
      List<Set<String>> paths = new ArrayList<>();
      for (int state = 1; state < 1 << order; state++) {
        if ((table >>> state & 1) != 0) {
          paths.add(set(state));
        }
      }
      boolean constant = paths.isEmpty() || (table & 1) != 0;
      if (!constant) {
        CoherentSystem system = Structure.ofPathSets(paths).compile();
        if (system.components().size() - system.irrelevantComponents().size() == order) {
          systems.add(system);
        }
      }
    }
    return systems;
  }

  private static Set<String> set(int mask) {
    Set<String> names = new TreeSet<>();
    for (int i = 0; i < 7; i++) {
      if ((mask >> i & 1) != 0) {
        names.add(String.valueOf(i));
      }
    }
    return names;
  }

  private static int[] masks(Iterable<Set<String>> sets) {
    return Exact.sets(sets).stream()
        .mapToInt(set -> set.stream().mapToInt(name -> 1 << Integer.parseInt(name)).sum())
        .toArray();
  }

  private static String renamed(int[] paths, List<Integer> to) {
    return IntStream.of(paths)
        .map(
            path ->
                IntStream.range(0, to.size())
                    .filter(i -> (path >> i & 1) != 0)
                    .map(i -> 1 << to.get(i))
                    .sum())
        .sorted()
        .mapToObj(String::valueOf)
        .collect(joining(","));
  }

  private static List<List<Integer>> permutations(int n) {
    List<List<Integer>> all = List.of(List.of());
    for (int i = 0; i < n; i++) {
      List<List<Integer>> longer = new ArrayList<>();
      for (List<Integer> one : all) {
        for (int place = 0; place <= i; place++) {
          List<Integer> more = new ArrayList<>(one);
          more.add(place, i);
          longer.add(more);
        }
      }
      all = longer;
    }
    return all;
  }
}
