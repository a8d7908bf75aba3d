package org.kingbolt.core;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.math.BigInteger;
import java.time.Duration;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.HashSet;
import java.util.Iterator;
import java.util.List;
import java.util.Set;
import java.util.function.IntUnaryOperator;
import java.util.stream.IntStream;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;
import org.kingbolt.core.diagram.MinimalSolutions;
import org.kingbolt.core.diagram.SetDiagram;
import org.kingbolt.core.diagram.SetWalk;
import org.kingbolt.core.diagram.WorkMeter;

/** Streams of minimal sets that are large, or many. */
class MinimalSetsTest {

  /** Level by level in series and in parallel with a series of so many new components. */
  private static Structure ladder(int levels, IntUnaryOperator width) {
    Structure whole = Structure.component("x");
    for (int level = 1; level <= levels; level++) {
      Structure module = Structure.series(module(level, width));
      whole = level % 2 == 0 ? Structure.series(whole, module) : Structure.parallel(whole, module);
    }
    return whole;
  }

  private static String[] module(int level, IntUnaryOperator width) {
    return IntStream.range(0, width.applyAsInt(level))
        .mapToObj(i -> level + "." + i)
        .toArray(String[]::new);
  }

  /** A parallel level adds a path; a series level lengthens all of them. */
  private static Set<Set<String>> ladderPaths(int levels, IntUnaryOperator width) {
    List<Set<String>> paths = new ArrayList<>();
    paths.add(new HashSet<>(Set.of("x")));
    for (int level = 1; level <= levels; level++) {
      Set<String> module = Set.of(module(level, width));
      if (level % 2 == 0) {
        paths.forEach(path -> path.addAll(module));
      } else {
        paths.add(new HashSet<>(module));
      }
    }
    return new HashSet<>(paths);
  }

  @ParameterizedTest
  @ValueSource(ints = {1, 2, 3, 64, 65})
  void sizesFarApart_areListedInOrder(int factor) {
    IntUnaryOperator width = level -> factor * (1 + level * level % 5);
    Set<Set<String>> expected = ladderPaths(60, width);
    MinimalSets paths = ladder(60, width).compile().minimalPathSets();
    List<Set<String>> listed = paths.stream().toList();
    assertEquals(expected.size(), listed.size());
    assertEquals(expected, new HashSet<>(listed));
    List<Integer> sizes = listed.stream().map(Set::size).toList();
    assertEquals(sizes.stream().sorted().toList(), sizes);
  }

  private static SetDiagram family(int levels, int width) {
    CoherentSystem system = ladder(levels, level -> width).compile();
    return MinimalSolutions.paths(system.diagram(), WorkMeter.UNLIMITED);
  }

  @Test
  void sizesWithoutGaps_needLittleMemory() {
    int levels = 10_000;
    SetDiagram family = family(levels, 1);
    long nodes = family.nodes().size() / 4;
    SetWalk walk = family.walk(Budget.ofNodes(nodes).start("listing"));
    int count = 0;
    for (int[] set = walk.next(); set != null; set = walk.next()) {
      count++;
    }
    assertEquals(levels / 2 + 1, count);
  }

  @Test
  void sizesWithGaps_endAtTheBudget() {
    SetDiagram family = family(10_000, 2);
    long nodes = family.nodes().size() / 2;
    SetWalk walk = family.walk(Budget.ofNodes(nodes).start("listing"));
    BudgetExceededException stopped =
        assertThrows(
            BudgetExceededException.class,
            () -> {
              int last = 0;
              for (int[] set = walk.next(); set != null; set = walk.next()) {
                assertTrue(set.length >= last);
                last = set.length;
              }
            });
    assertEquals(BudgetExceededException.Limit.NODES, stopped.limit());
    assertTrue(stopped.reached() > nodes, () -> "reached " + stopped.reached());
  }

  @Test
  void table_isAligned() {
    Structure bridge =
        Structure.ofCutSets(
            List.of(List.of("line", "bus tie"), List.of("busbar"), List.of("line", "relay")));
    Probabilities p =
        Probabilities.all(Probability.failing(0.01)).with("busbar", Probability.failing(1e-6));
    MinimalSets cuts = bridge.compile().minimalCutSets();
    String expected =
        """
        size  components     probability   share
           2  line, bus tie   1.0000e-04  49.75%
           2  line, relay     1.0000e-04  49.75%
           1  busbar          1.0000e-06   0.50%
        """;
    assertEquals(expected, cuts.table(p, 5));
    assertTrue(cuts.table(p, 1).endsWith("49.75%\nand 2 more\n"), cuts.table(p, 1));
  }

  /** Wide signs take two columns of a terminal, combining marks none. */
  @Test
  void table_isAlignedForWideSignsAndMarks() {
    MinimalSets cuts =
        Structure.series("\u6bcd\u7dda", "ke\u0301y", "relay").compile().minimalCutSets();
    String expected =
        """
        size  components  probability   share
           1  \u6bcd\u7dda         1.0000e-02  33.33%
           1  ke\u0301y          1.0000e-02  33.33%
           1  relay        1.0000e-02  33.33%
        """;
    assertEquals(expected, cuts.table(Probabilities.all(Probability.failing(0.01)), 3));
  }

  @Test
  void structuresWithoutComponents_haveNoSetsOrTheEmptyOne() {
    Structure never = Structure.component("a").givenFailed("a");
    Structure always = Structure.component("a").givenWorking("a");
    assertEquals(List.of(Set.of()), never.minimalCutSets(CutOff.size(1)).stream().toList());
    assertEquals(List.of(), never.minimalPathSets(CutOff.size(1)).stream().toList());
    assertEquals(List.of(), always.minimalCutSets(CutOff.size(1)).stream().toList());
    assertEquals(List.of(Set.of()), always.minimalPathSets(CutOff.size(1)).stream().toList());
    assertTrue(always.minimalPathSets(CutOff.size(1)).isComplete());
  }

  /** One component stands at both ends, so that what is below each network is looked at. */
  @Test
  void deepNetworksThatShare_areSearchedInTime() {
    Structure chain = Structure.component("s");
    for (int i = 0; i < 30_000; i++) {
      chain =
          Structure.network()
              .link(chain, "a", "b")
              .link("c" + i, "b", "t")
              .link("d" + i, "a", "t")
              .connecting("a", "t");
    }
    Structure whole = Structure.series(chain, Structure.parallel("s", "other"));
    Budget budget = Budget.ofHeap().withTime(Duration.ofSeconds(20));
    assertEquals(
        Set.of(Set.of("s", "other"), Set.of("c29999", "d29999")),
        new HashSet<>(whole.minimalCutSets(CutOff.size(2), budget).stream().toList()));
  }

  @Test
  void longLine_hasItsWindowsAsCuts() {
    String[] names = IntStream.range(0, 100_000).mapToObj(i -> "u" + i).toArray(String[]::new);
    TruncatedSets cuts = Structure.withoutFailureRun(3, names).minimalCutSets(CutOff.size(3));
    assertEquals(BigInteger.valueOf(99_998), cuts.sets().count());
    assertTrue(cuts.isComplete());
  }

  /** 1.4e11 sets in a jumbled order of components, and more than 10^17 without compiling. */
  @Test
  void fewOfVeryMany_areThereAtOnce() {
    String[] names = IntStream.range(0, 40).mapToObj(i -> "u" + i * 7 % 40).toArray(String[]::new);
    List<String> order = IntStream.range(0, 40).mapToObj(i -> "u" + i * 11 % 40).toList();
    MinimalSets sets =
        Structure.atLeast(20, names).compile(order, Budget.ofNodes(1_000)).minimalPathSets();
    assertEquals(new BigInteger("137846528820"), sets.count());
    List<Set<String>> first = sets.stream().limit(10).toList();
    assertEquals(Set.of(Arrays.copyOf(names, 20)), first.get(0));
    assertEquals(10, new HashSet<>(first).size());
    assertEquals(10, sets.mostProbable(10, Probabilities.all(0.9)).size());
    assertEquals(0, sets.ofSizeAtMost(19).count().signum());
    assertEquals(sets.count(), sets.smallest().count());
    assertEquals(new BigInteger("68923264410"), sets.containing("u3").count());
  }

  @Test
  void interrupt_endsAStream() {
    String[] names = IntStream.range(0, 24).mapToObj(i -> "u" + i).toArray(String[]::new);
    Iterator<Set<String>> sets = Structure.atLeast(12, names).compile().minimalCutSets().iterator();
    assertEquals(13, sets.next().size());
    Thread.currentThread().interrupt();
    boolean stillSet;
    BudgetExceededException stopped;
    try {
      stopped =
          assertThrows(
              BudgetExceededException.class,
              () -> {
                while (sets.hasNext()) {
                  sets.next();
                }
              });
    } finally {
      stillSet = Thread.interrupted();
    }
    assertEquals(BudgetExceededException.Limit.INTERRUPT, stopped.limit());
    assertTrue(stillSet);
    assertTrue(stopped.getMessage().contains("while listing minimal sets"), stopped.getMessage());
  }
}
