package org.kingbolt.core.published;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.math.BigInteger;
import java.util.ArrayDeque;
import java.util.ArrayList;
import java.util.Deque;
import java.util.HashMap;
import java.util.HashSet;
import java.util.List;
import java.util.Map;
import java.util.Set;
import java.util.stream.Collectors;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.kingbolt.core.CoherentSystem;
import org.kingbolt.core.CutOff;
import org.kingbolt.core.MinimalSets;
import org.kingbolt.core.Probabilities;
import org.kingbolt.core.Probability;
import org.kingbolt.core.Structure;
import org.kingbolt.core.TruncatedSets;

/**
 * The smallest cut sets of the IEEE and PEGASE test cases (published topologies) between buses far
 * apart: from the compiled system, straight from the graph, and by trying all sets of branches.
 */
class SmallestCutsTest {

  @ParameterizedTest
  @CsvSource({"ieee118, 112, 1, 4", "ieee118, 1, 118, 5", "ieee300, 7166, 244, 4"})
  void bothWays_giveTheSameSetsInTheSameOrder(String name, String from, String to, int size) {
    Structure structure = Topology.file(name).connecting(from, to);
    MinimalSets compiled = structure.compile().minimalCutSets().ofSizeAtMost(size);
    TruncatedSets direct = structure.minimalCutSets(CutOff.size(size));
    assertEquals(compiled.stream().toList(), direct.stream().toList());
    assertEquals(compiled.countBySize(), direct.sets().countBySize());
  }

  @ParameterizedTest
  @CsvSource({"ieee118, 112, 1, 13", "ieee300, 7166, 244, 14"})
  void bothWays_giveTheSamePaths(String name, String from, String to, int size) {
    Structure structure = Topology.file(name).connecting(from, to);
    MinimalSets compiled = structure.compile().minimalPathSets().ofSizeAtMost(size);
    assertEquals(
        compiled.stream().toList(), structure.minimalPathSets(CutOff.size(size)).stream().toList());
  }

  /** Every set of up to three of the 41 branches is taken out, and the far bus looked for. */
  @Test
  void cutsOfThirtyBuses_areThoseOfTryingAllSets() {
    Topology grid = Topology.file("ieee30");
    Structure structure = grid.connecting("1", "30");
    Set<Set<String>> direct =
        structure.minimalCutSets(CutOff.size(3)).stream().collect(Collectors.toSet());
    assertEquals(new Cuts(grid, "1", "30").ofAllSets(), direct);
  }

  @Test
  void cutsOfTheLargeGrid_areThoseOfAPlainSearch() {
    Topology grid = Topology.file("pegase1354");
    Set<Set<String>> direct =
        grid.connecting("6612", "1105").minimalCutSets(CutOff.size(3)).stream()
            .collect(Collectors.toSet());
    assertEquals(new Cuts(grid, "6612", "1105").ofBranchesOnPaths(), direct);
  }

  @Test
  void allBuses_agreeWithTheCompiledSystem() {
    Structure structure = Topology.file("ieee118").connectingAll();
    assertEquals(
        structure.compile().minimalCutSets().ofSizeAtMost(3).stream().toList(),
        structure.minimalCutSets(CutOff.size(3)).stream().toList());
  }

  /** The number of paths: OEIS A007764 (seen). */
  @Test
  void gridOfEight_hasTheSameSmallCutsBothWays() {
    Structure structure = Families.grid(8, 8).connecting("r0c0", "r7c7");
    CoherentSystem system = structure.compile();
    assertEquals(new BigInteger("789360053252"), system.minimalPathSets().count());
    assertEquals(
        system.minimalCutSets().ofSizeAtMost(4).stream().toList(),
        structure.minimalCutSets(CutOff.size(4)).stream().toList());
    assertEquals(
        system.minimalCutSets().smallest().stream().toList(),
        structure.minimalCutSets(CutOff.size(2)).stream().toList());
  }

  /**
   * The bound against the exact remainder: the system fails, and the union of the sets does not.
   */
  @ParameterizedTest
  @CsvSource({"ieee118, 112, 1, 2", "ieee118, 112, 1, 3", "ieee300, 7166, 244, 3"})
  void bound_isOfTheOrderOfWhatIsLeftOut(String name, String from, String to, int size) {
    Structure structure = Topology.file(name).connecting(from, to);
    TruncatedSets sets = structure.minimalCutSets(CutOff.size(size));
    Probabilities p = Probabilities.all(Probability.failing(1e-3));
    double exact = structure.compile().reliability(p).failing();
    double listed = Structure.ofCutSets(sets.stream().toList()).compile().reliability(p).failing();
    double bound = sets.discarded(p);
    double leftOut = exact - listed;
    double rounding = 1e-13 * exact;
    assertTrue(bound >= leftOut - rounding, "bound " + bound + ", left out " + leftOut);
    double next = Math.pow(1e-3, size + 1);
    assertTrue(bound <= 1e5 * next, "bound " + bound + " against sets of " + next);
  }

  /** Finds cuts of up to three branches, by plain ways. */
  private static final class Cuts {
    private final List<String> names;
    private final String from;
    private final String to;
    private final Map<String, List<Topology.Link>> at = new HashMap<>();

    Cuts(Topology grid, String from, String to) {
      this.names = grid.links().stream().map(Topology.Link::name).toList();
      this.from = from;
      this.to = to;
      for (Topology.Link link : grid.links()) {
        at.computeIfAbsent(link.a(), node -> new ArrayList<>()).add(link);
        at.computeIfAbsent(link.b(), node -> new ArrayList<>()).add(link);
      }
    }

    Set<Set<String>> ofAllSets() {
      Set<Set<String>> cuts = new HashSet<>();
      for (String a : names) {
        for (String b : names.subList(names.indexOf(a), names.size())) {
          for (String c : names.subList(names.indexOf(b), names.size())) {
            Set<String> set = new HashSet<>(List.of(a));
            set.add(b);
            set.add(c);
            if (path(set).isEmpty()) {
              cuts.add(set);
            }
          }
        }
      }
      return minimal(cuts);
    }

    /** A cut holds a branch of every path, so that trying those of one path leaves none out. */
    Set<Set<String>> ofBranchesOnPaths() {
      Set<Set<String>> cuts = new HashSet<>();
      Set<Set<String>> seen = new HashSet<>();
      Deque<Set<String>> open = new ArrayDeque<>(List.of(Set.of()));
      while (!open.isEmpty()) {
        Set<String> removed = open.pop();
        List<String> path = path(removed);
        if (path.isEmpty()) {
          cuts.add(removed);
        } else if (removed.size() < 3) {
          for (String link : path) {
            Set<String> more = new HashSet<>(removed);
            more.add(link);
            if (seen.add(more)) {
              open.push(more);
            }
          }
        }
      }
      return minimal(cuts);
    }

    private static Set<Set<String>> minimal(Set<Set<String>> cuts) {
      return cuts.stream()
          .filter(cut -> cuts.stream().noneMatch(o -> o.size() < cut.size() && cut.containsAll(o)))
          .collect(Collectors.toSet());
    }

    /** A shortest path by breadth-first search; empty where there is none. */
    private List<String> path(Set<String> removed) {
      Map<String, Topology.Link> cameBy = new HashMap<>();
      Deque<String> queue = new ArrayDeque<>(List.of(from));
      Set<String> seen = new HashSet<>(Set.of(from));
      while (!queue.isEmpty() && !seen.contains(to)) {
        String node = queue.remove();
        for (Topology.Link link : at.getOrDefault(node, List.of())) {
          String other = link.a().equals(node) ? link.b() : link.a();
          if (!removed.contains(link.name()) && seen.add(other)) {
            cameBy.put(other, link);
            queue.add(other);
          }
        }
      }
      List<String> path = new ArrayList<>();
      String node = to;
      for (Topology.Link link = cameBy.get(node); link != null; link = cameBy.get(node)) {
        path.add(link.name());
        node = link.a().equals(node) ? link.b() : link.a();
      }
      return path;
    }
  }
}
