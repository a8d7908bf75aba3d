package org.kingbolt.core;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertNotEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTimeout;
import static org.junit.jupiter.api.Assertions.assertTrue;
import static org.kingbolt.core.BudgetExceededException.Limit.INTERRUPT;
import static org.kingbolt.core.BudgetExceededException.Limit.NODES;
import static org.kingbolt.core.BudgetExceededException.Limit.TIME;
import static org.kingbolt.core.BudgetExceededException.Limit.WIDTH;

import java.time.Duration;
import java.util.ArrayList;
import java.util.Collections;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Random;
import java.util.Set;
import java.util.TreeSet;
import java.util.concurrent.Callable;
import java.util.concurrent.CountDownLatch;
import java.util.concurrent.ExecutionException;
import java.util.concurrent.FutureTask;
import java.util.concurrent.TimeUnit;
import java.util.function.Consumer;
import java.util.stream.IntStream;
import java.util.stream.Stream;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.Timeout;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.MethodSource;

@Timeout(120)
class BudgetTest {

  /** Long work that takes a budget, what it says it is doing, and a budget it cannot keep. */
  private record Work(String name, String doing, long nodes, Consumer<Budget> call) {

    BudgetExceededException stoppedBy(Budget budget) {
      return assertThrows(BudgetExceededException.class, () -> call.accept(budget), name);
    }

    @Override
    public String toString() {
      return name;
    }
  }

  private static NetworkBuilder grid(int rows, int columns) {
    NetworkBuilder grid = Structure.network();
    for (int row = 0; row < rows; row++) {
      for (int column = 0; column < columns; column++) {
        String here = row + "." + column;
        if (column < columns - 1) {
          grid.link("h" + here, here, row + "." + (column + 1));
        }
        if (row < rows - 1) {
          grid.link("v" + here, here, (row + 1) + "." + column);
        }
      }
    }
    return grid;
  }

  private static Structure wideGrid() {
    return grid(12, 12).connecting("0.0", "11.11");
  }

  private static NetworkBuilder complete(int nodes, boolean arcs) {
    NetworkBuilder complete = Structure.network();
    for (int i = 0; i < nodes; i++) {
      for (int j = i + 1; j < nodes; j++) {
        if (arcs) {
          complete.arc(i + "-" + j, "n" + i, "n" + j);
        } else {
          complete.link(i + "-" + j, "n" + i, "n" + j);
        }
      }
    }
    return complete;
  }

  /** Sets drawn from 60 components. */
  private static List<List<String>> randomSets(int count, int size) {
    Random random = new Random(5);
    List<List<String>> sets = new ArrayList<>();
    for (int i = 0; i < count; i++) {
      Set<String> set = new TreeSet<>();
      while (set.size() < size) {
        set.add("x" + random.nextInt(60));
      }
      sets.add(List.copyOf(set));
    }
    return sets;
  }

  private static Structure sharedGates() {
    return Structure.series(
        randomSets(60, 7).stream()
            .map(set -> Structure.parallel(set.toArray(new String[0])))
            .toList());
  }

  private static Structure unequalCapacities() {
    Random random = new Random(6);
    Map<String, Long> capacities = new LinkedHashMap<>();
    for (int i = 0; i < 40; i++) {
      capacities.put("u" + i, 1_000_000_007L + random.nextInt(1_000_000_000));
    }
    long sum = capacities.values().stream().mapToLong(Long::longValue).sum();
    return Structure.capacityAtLeast(sum / 2, capacities);
  }

  private static String[] units(int count) {
    return IntStream.range(0, count).mapToObj(i -> "u" + i).toArray(String[]::new);
  }

  static Stream<Work> compilations() {
    String doing = "while compiling the structure";
    Structure grid = wideGrid();
    List<String> order = new ArrayList<>(grid.components());
    Collections.reverse(order);
    Structure gates = sharedGates();
    Structure paths = Structure.ofPathSets(randomSets(300, 6));
    Structure cuts = Structure.ofCutSets(randomSets(300, 6));
    Structure capacities = unequalCapacities();
    Structure half = Structure.atLeast(500, units(1000));
    Structure ring = Structure.withoutFailureRunAround(60, units(400));
    Structure links = complete(60, false).connecting("n0", "n1");
    Structure arcs = complete(60, true).reachingAllFrom("n0");
    return Stream.of(
        new Work("network", doing, 10_000, grid::compile),
        new Work("dual network", doing, 10_000, grid.dual()::compile),
        new Work("in an order", doing, 10_000, budget -> grid.compile(order, budget)),
        new Work("shared gates", doing, 10_000, gates::compile),
        new Work("path sets", doing, 10_000, paths::compile),
        new Work("cut sets", doing, 10_000, cuts::compile),
        new Work("capacities", doing, 10_000, capacities::compile),
        new Work("500 out of 1000", doing, 10_000, half::compile),
        new Work("runs around", doing, 10_000, ring::compile),
        new Work("60 nodes, all linked", doing, 100_000, links::compile),
        new Work("60 nodes, all arcs", doing, 100_000, arcs::compile));
  }

  static Stream<Work> questions() {
    CoherentSystem system = grid(6, 20).connecting("0.0", "5.19").compile();
    Structure grid = grid(6, 6).connecting("0.0", "5.5");
    Structure gates = sharedGates();
    Structure paths = Structure.ofPathSets(randomSets(300, 6));
    MinimalSets many = grid(4, 4).connecting("0.0", "3.3").compile().minimalPathSets();
    Probabilities p = Probabilities.all(0.9);
    String finding = "while finding minimal cut sets with size at most";
    String deriving = "while deriving the formula";
    return Stream.of(
        new Work("paths", "while finding minimal path sets", 5_000, system::minimalPathSets),
        new Work("cuts", "while finding minimal cut sets", 5_000, system::minimalCutSets),
        new Work("cuts of a network", finding, 100, b -> truncated(wideGrid(), 8, b)),
        new Work(
            "paths of a network",
            "while finding minimal path sets with size at most 26",
            100,
            b -> paths(wideGrid(), 26, b)),
        new Work("cuts of gates", finding, 100, b -> truncated(sharedGates(), 8, b)),
        new Work("cuts of capacities", finding, 100, b -> truncated(unequalCapacities(), 20, b)),
        new Work("cuts of path sets", finding, 20, b -> truncated(paths, 20, b)),
        new Work("inclusion", "while expanding by incl", 1_000, b -> many.inclusionExclusion(p, b)),
        new Work("products", "while expanding by disj", 50, b -> many.disjointProducts(p, b)),
        new Work("network formula", deriving, 20, budget -> Derivation.of(grid, budget)),
        new Work("gates formula", deriving, 20, budget -> Derivation.of(gates, budget)));
  }

  private static TruncatedSets truncated(Structure structure, int size, Budget budget) {
    return structure.minimalCutSets(CutOff.size(size), budget);
  }

  private static TruncatedSets paths(Structure structure, int size, Budget budget) {
    return structure.minimalPathSets(CutOff.size(size), budget);
  }

  @ParameterizedTest
  @MethodSource({"compilations", "questions"})
  void nodes(Work work) {
    BudgetExceededException stopped = work.stoppedBy(Budget.ofNodes(work.nodes));
    assertEquals(NODES, stopped.limit());
    assertTrue(stopped.reached() > work.nodes, () -> "reached " + stopped.reached());
    String message = stopped.getMessage();
    for (String word :
        List.of(
            "limit of " + work.nodes + " nodes",
            work.doing,
            "a larger Budget",
            "compile the parts of the system one by one",
            "Bounds.of(structure).given(p).within(budget)")) {
      assertTrue(message.contains(word), message);
    }
    assertEquals(stopped.reached(), work.stoppedBy(Budget.ofNodes(work.nodes)).reached());
  }

  @ParameterizedTest
  @MethodSource({"compilations", "questions"})
  void time(Work work) {
    Duration instant = Duration.ofNanos(1);
    BudgetExceededException stopped = work.stoppedBy(Budget.ofTime(instant));
    assertEquals(TIME, stopped.limit());
    for (String word :
        List.of(
            "limit of " + instant,
            work.doing,
            "with " + stopped.reached() + " nodes made",
            "a larger Budget",
            "compile the parts of the system one by one",
            "Bounds.of(structure).given(p).within(budget)")) {
      assertTrue(stopped.getMessage().contains(word), stopped.getMessage());
    }
  }

  @Test
  void time_endsLongWork() {
    Structure wide = grid(20, 20).connecting("0.0", "19.19");
    Budget budget = Budget.ofNodes(Long.MAX_VALUE).withTime(Duration.ofMillis(50));
    BudgetExceededException stopped =
        assertThrows(BudgetExceededException.class, () -> wide.compile(budget));
    assertEquals(TIME, stopped.limit());
  }

  /** Each of its steps is long work by itself. */
  @Test
  void time_endsDerivation() {
    Structure grid = grid(8, 8).connecting("0.0", "7.7");
    Budget budget = Budget.ofNodes(3_000).withTime(Duration.ofMillis(200));
    BudgetExceededException stopped =
        assertTimeout(
            Duration.ofSeconds(5),
            () -> assertThrows(BudgetExceededException.class, () -> Derivation.of(grid, budget)));
    assertEquals(TIME, stopped.limit());
  }

  /** Before the first key is found. */
  @Test
  void time_endsDerivation_withinOneStep() {
    Structure grid = grid(40, 40).connecting("0.0", "39.39");
    Budget budget = Budget.ofNodes(3_000).withTime(Duration.ofMillis(200));
    BudgetExceededException stopped =
        assertTimeout(
            Duration.ofSeconds(5),
            () -> assertThrows(BudgetExceededException.class, () -> Derivation.of(grid, budget)));
    assertEquals(TIME, stopped.limit());
    assertEquals(1, stopped.reached());
  }

  @ParameterizedTest
  @MethodSource({"compilations", "questions"})
  void interrupt(Work work) {
    Thread.currentThread().interrupt();
    boolean stillSet;
    BudgetExceededException stopped;
    try {
      stopped = work.stoppedBy(Budget.ofHeap());
    } finally {
      stillSet = Thread.interrupted();
    }
    assertEquals(INTERRUPT, stopped.limit());
    assertTrue(stillSet);
    for (String word :
        List.of(
            "interrupted " + work.doing,
            "with " + stopped.reached() + " nodes made",
            "clear its flag with Thread.interrupted()",
            "give a Budget of time")) {
      assertTrue(stopped.getMessage().contains(word), stopped.getMessage());
    }
  }

  @Test
  void interrupt_endsQuestionsWithoutBudget() {
    CoherentSystem system = grid(5, 12).connecting("0.0", "4.11").compile();
    MinimalSets sets = system.minimalPathSets();
    List<Runnable> questions =
        List.of(
            () -> system.polynomial(),
            () -> system.signature(),
            () -> system.pivot("h0.0"),
            () -> sets.count(),
            () -> sets.stream(),
            () -> sets.mostProbable(5, Probabilities.all(0.9)));
    for (Runnable question : questions) {
      Thread.currentThread().interrupt();
      boolean stillSet;
      BudgetExceededException stopped;
      try {
        stopped = assertThrows(BudgetExceededException.class, question::run);
      } finally {
        stillSet = Thread.interrupted();
      }
      assertEquals(INTERRUPT, stopped.limit());
      assertTrue(stillSet);
    }
  }

  /** Interrupts the work a while after it began; its outcome. */
  private static BudgetExceededException interrupted(Callable<?> work) throws Exception {
    CountDownLatch begun = new CountDownLatch(1);
    FutureTask<Object> task =
        new FutureTask<>(
            () -> {
              begun.countDown();
              return work.call();
            });
    Thread thread = new Thread(task);
    thread.setDaemon(true);
    thread.start();
    begun.await();
    Thread.sleep(100);
    thread.interrupt();
    ExecutionException ended =
        assertThrows(ExecutionException.class, () -> task.get(20, TimeUnit.SECONDS));
    return (BudgetExceededException) ended.getCause();
  }

  @Test
  void interrupt_fromAnotherThread() throws Exception {
    Structure wide = grid(20, 20).connecting("0.0", "19.19");
    assertEquals(INTERRUPT, interrupted(wide::compile).limit());
    Structure grid = grid(9, 9).connecting("0.0", "8.8");
    assertEquals(INTERRUPT, interrupted(() -> Derivation.of(grid)).limit());
  }

  /** Every node must work and none is done with before the last is met. */
  @Test
  void width_ofNetworksWithArcs() {
    NetworkBuilder wide = Structure.network();
    for (int i = 0; i < 70; i++) {
      wide.node("n" + i, "u" + i);
      for (int j = i + 1; j < 70; j++) {
        wide.perfectArc("n" + i, "n" + j);
      }
    }
    Structure network = wide.reachingAllFrom("n0");
    BudgetExceededException stopped =
        assertThrows(BudgetExceededException.class, () -> network.compile());
    assertEquals(WIDTH, stopped.limit());
    for (String word :
        List.of(
            "a frontier of 65 nodes is wider than the 64 that a state can hold",
            "compile the parts of the network one by one",
            "Bounds.of(structure).given(p).within(budget)")) {
      assertTrue(stopped.getMessage().contains(word), stopped.getMessage());
    }
  }

  @Test
  void nothingIsLeftBehind() {
    Structure network = grid(6, 6).connecting("0.0", "5.5");
    Probability before = network.compile().reliability(0.9);
    assertThrows(BudgetExceededException.class, () -> network.compile(Budget.ofNodes(100)));
    assertEquals(before, network.compile(Budget.ofNodes(1_000_000)).reliability(0.9));
  }

  @Test
  void smallWork_fitsASmallBudget() {
    Budget budget = Budget.ofNodes(10).withTime(Duration.ofSeconds(100));
    assertEquals(0.81, Structure.series("a", "b").compile(budget).reliability(0.9).working());
  }

  @Test
  void budgetsAreValues() {
    Budget budget = Budget.ofNodes(1_000);
    Budget timed = budget.withTime(Duration.ofSeconds(5));
    assertEquals(Budget.ofNodes(1_000), budget);
    assertEquals(Budget.ofNodes(1_000).hashCode(), budget.hashCode());
    assertNotEquals(Budget.ofNodes(1_001), budget);
    assertNotEquals(budget, timed);
    assertEquals(timed, budget.withTime(Duration.ofSeconds(9)).withTime(Duration.ofSeconds(5)));
    assertEquals(1_000, timed.nodes());
    assertEquals("at most 1000 nodes", budget.toString());
    assertEquals("at most 1000 nodes and PT5S", timed.toString());
    assertEquals(Budget.ofHeap(), Budget.ofHeap());
    assertEquals(Budget.ofHeap().nodes(), Budget.ofTime(Duration.ofSeconds(1)).nodes());
    assertFalse(Budget.ofHeap().nodes() < 1_000);
  }

  @Test
  void endlessTime_isNoLimit() {
    Budget budget = Budget.ofNodes(1_000).withTime(Duration.ofSeconds(Long.MAX_VALUE));
    assertEquals(Budget.ofNodes(1_000), budget);
    assertEquals(0.99, Structure.parallel("a", "b").compile(budget).reliability(0.9).working());
  }

  /** Wide operators, one inside the other: their sizes multiply past any int. */
  @Test
  void nestedWideOperators_endInTheirBudget() {
    Structure nested = scattered("a", 1).replace("a20", scattered("b", 2));
    BudgetExceededException tooLarge =
        assertThrows(
            BudgetExceededException.class, () -> nested.compile(Budget.ofNodes(45_000_000)));
    assertEquals(NODES, tooLarge.limit());
  }

  /** Forty capacities with few equal sums. */
  private static Structure scattered(String prefix, long seed) {
    Random random = new Random(seed);
    Map<String, Long> capacities = new LinkedHashMap<>();
    long sum = 0;
    for (int i = 0; i < 40; i++) {
      long capacity = 1L + random.nextInt(1 << 16);
      capacities.put(prefix + i, capacity);
      sum += capacity;
    }
    return Structure.capacityAtLeast(sum / 2, capacities);
  }
}
