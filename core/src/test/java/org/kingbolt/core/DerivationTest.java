package org.kingbolt.core;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;
import java.util.Optional;
import java.util.concurrent.atomic.AtomicReference;
import org.junit.jupiter.api.Test;

class DerivationTest {

  private static final Structure BRIDGE =
      Structure.network()
          .link("1", "s", "u")
          .link("2", "s", "v")
          .link("3", "u", "v")
          .link("4", "u", "t")
          .link("5", "v", "t")
          .connecting("s", "t");

  /** Barlow and Proschan 1975, ch. 1: conditioning on the crossing link (from memory). */
  @Test
  void bridge_conditionsOnTheCrossingLink() {
    Derivation derivation = Derivation.of(BRIDGE);
    assertEquals(List.of("3"), derivation.keyComponents());
    assertEquals(
        "r = p(3)·[1 - (1 - p(1))·(1 - p(2))]·[1 - (1 - p(4))·(1 - p(5))]"
            + " + (1 - p(3))·[1 - (1 - p(1)·p(4))·(1 - p(2)·p(5))]",
        derivation.formula());
    assertEquals(0.97848, derivation.reliability(Probabilities.all(0.9)).working(), 1e-15);
  }

  @Test
  void bridge_stepsCarryConditionAndReducedStructure() {
    List<DerivationStep> steps = Derivation.of(BRIDGE).steps();
    assertEquals(3, steps.size());
    assertEquals("no condition", steps.get(0).condition());
    assertEquals(BRIDGE, steps.get(0).structure());
    assertEquals(Optional.of("3"), steps.get(0).key());
    assertEquals("p(3)·r2 + (1 - p(3))·r3", steps.get(0).formula());
    assertEquals("given 3 works", steps.get(1).condition());
    assertEquals("series(parallel(1, 2), parallel(4, 5))", steps.get(1).structure().toString());
    assertEquals("given 3 failed", steps.get(2).condition());
    assertEquals("parallel(series(1, 4), series(2, 5))", steps.get(2).structure().toString());
    assertEquals(Optional.empty(), steps.get(2).key());
  }

  @Test
  void bridge_inLatex() {
    assertEquals(
        "r = p_{\\mathrm{3}} \\, \\left[1 - \\left(1 - p_{\\mathrm{1}}\\right) \\,"
            + " \\left(1 - p_{\\mathrm{2}}\\right)\\right] \\, \\left[1 - \\left(1 -"
            + " p_{\\mathrm{4}}\\right) \\, \\left(1 - p_{\\mathrm{5}}\\right)\\right] + \\left(1 -"
            + " p_{\\mathrm{3}}\\right) \\, \\left[1 - \\left(1 - p_{\\mathrm{1}} \\,"
            + " p_{\\mathrm{4}}\\right) \\, \\left(1 - p_{\\mathrm{2}} \\,"
            + " p_{\\mathrm{5}}\\right)\\right]",
        Derivation.of(BRIDGE).latex());
    assertEquals(
        "r = p_{\\mathrm{a\\_b}} \\, p_{\\mathrm{50\\%\\ c}}",
        Derivation.of(Structure.series("a_b", "50% c")).latex());
  }

  @Test
  void seriesParallel_needsNoKey() {
    Structure structure = Structure.parse("series(a, parallel(b, series(c, d)), e)");
    Derivation derivation = Derivation.of(structure);
    assertEquals(List.of(), derivation.keyComponents());
    assertEquals("r = p(a)·[1 - (1 - p(b))·(1 - p(c)·p(d))]·p(e)", derivation.formula());
  }

  @Test
  void sharedComponent_isTheKey() {
    Structure structure = Structure.parse("parallel(series(a, c), series(b, c))");
    Derivation derivation = Derivation.of(structure);
    assertEquals(List.of("c"), derivation.keyComponents());
    assertEquals("r = p(c)·[1 - (1 - p(a))·(1 - p(b))]", derivation.formula());
  }

  @Test
  void moduleAsKey_isConditionedOnAsAWhole() {
    Structure structure = Structure.parse("atLeast(2, series(a, b), series(c, d), series(e, f))");
    Derivation derivation = Derivation.of(structure);
    assertEquals(Optional.of("series(a, b)"), derivation.steps().get(0).key());
    assertEquals(
        "r = p(a)·p(b)·[1 - (1 - p(c)·p(d))·(1 - p(e)·p(f))]"
            + " + (1 - p(a)·p(b))·p(c)·p(d)·p(e)·p(f)",
        derivation.formula());
  }

  @Test
  void largeKOutOfN_sharesResults() {
    String[] names = new String[40];
    for (int i = 0; i < names.length; i++) {
      names[i] = "u" + i;
    }
    Structure structure = Structure.atLeast(20, names);
    Derivation derivation = Derivation.of(structure);
    assertTrue(derivation.steps().size() < 20 * 21 + 40, () -> "" + derivation.steps().size());
    Probability engine = structure.compile().reliability(0.7);
    assertEquals(engine.failing(), derivation.reliability(Probabilities.all(0.7)).failing(), 1e-15);
  }

  @Test
  void conditionedToNothing_isSaid() {
    assertEquals("r = 1", Derivation.of(Structure.parallel("a", "b").givenWorking("a")).formula());
    assertEquals("r = 0", Derivation.of(Structure.series("a", "b").givenFailed("a")).formula());
  }

  @Test
  void smallTails_keepTheirDigits() {
    Probabilities p = Probabilities.all(Probability.failing(1e-9));
    double exact = 2e-18; // 2q^2 + 2q^3 - 5q^4 + 2q^5, the bridge being self-dual
    assertEquals(exact, Derivation.of(BRIDGE).reliability(p).failing(), 1e-8 * exact);
    double engine = BRIDGE.compile().reliability(p).failing();
    assertEquals(engine, Derivation.of(BRIDGE).reliability(p).failing(), 1e-14 * engine);
  }

  @Test
  void missingProbabilities_areListed() {
    IllegalArgumentException missing =
        assertThrows(
            IllegalArgumentException.class,
            () ->
                Derivation.of(BRIDGE)
                    .reliability(Probabilities.working(java.util.Map.of("1", 0.5, "2", 0.5))));
    assertTrue(missing.getMessage().contains("\"3\", \"4\", \"5\""), missing.getMessage());
  }

  @Test
  void budget_endsTheWork() {
    NetworkBuilder grid = Structure.network();
    for (int row = 0; row < 6; row++) {
      for (int column = 0; column < 6; column++) {
        String here = row + "." + column;
        if (column < 5) {
          grid.link("h" + here, here, row + "." + (column + 1));
        }
        if (row < 5) {
          grid.link("v" + here, here, (row + 1) + "." + column);
        }
      }
    }
    Structure network = grid.connecting("0.0", "5.5");
    BudgetExceededException stopped =
        assertThrows(
            BudgetExceededException.class, () -> Derivation.of(network, Budget.ofNodes(50)));
    assertEquals(BudgetExceededException.Limit.NODES, stopped.limit());
  }

  @Test
  void deepNesting_needsNoStack() throws InterruptedException {
    Structure deep = Structure.component("x0");
    for (int i = 1; i <= 100_000; i++) {
      Structure next = Structure.component("x" + i);
      deep = i % 2 == 0 ? Structure.series(deep, next) : Structure.parallel(deep, next);
    }
    Structure structure = deep;
    AtomicReference<Object> outcome = new AtomicReference<>("nothing");
    Thread thread =
        new Thread(
            null,
            () -> {
              try {
                Derivation derivation = Derivation.of(structure);
                assertFalse(derivation.formula().isEmpty());
                outcome.set(derivation.reliability(Probabilities.all(0.9)));
              } catch (StackOverflowError | RuntimeException failure) {
                outcome.set(failure);
              }
            },
            "deep",
            256 << 10);
    thread.start();
    thread.join();
    Probability engine = structure.compile().reliability(0.9);
    assertEquals(engine.working(), ((Probability) outcome.get()).working(), 1e-14);
  }
}
