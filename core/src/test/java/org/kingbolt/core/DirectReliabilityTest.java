package org.kingbolt.core;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.MethodSource;
import org.kingbolt.core.published.Topology;

/** The figure without compiling, on structures too large for enumeration. */
class DirectReliabilityTest {

  static List<Structure> structures() {
    List<Structure> modules = new ArrayList<>();
    for (int i = 0; i < 60; i++) {
      String m = "m" + i + ".";
      // the supply s of each module stands in two places, the common supply in every third module
      Structure module =
          Structure.atLeast(
              2,
              Structure.series(m + "a", m + "s"),
              Structure.series(m + "b", m + "s"),
              Structure.series(m + "c", i % 3 == 0 ? "common" : m + "d"));
      modules.add(module);
    }
    String[] names = new String[200];
    for (int i = 0; i < names.length; i++) {
      names[i] = "n" + i;
    }
    return List.of(
        Topology.file("ieee118").connecting("1", "112"),
        Topology.file("ieee118").connectingAll(),
        Topology.file("ieee300").connecting("1", "100"),
        Topology.file("ieee57").connecting("1", "57", "30").dual(),
        Structure.series(modules),
        Structure.atLeast(50, modules),
        Structure.atLeast(120, names),
        Structure.withoutFailureRunAround(4, names),
        Structure.series(
            Structure.withoutFailureRun(3, names), Structure.atLeast(2, modules.subList(0, 5))));
  }

  @ParameterizedTest
  @MethodSource("structures")
  void direct_equalsCompiled(Structure structure) {
    Probabilities p = Probabilities.all(0.5);
    int i = 0;
    for (String name : structure.components()) {
      p = p.with(name, Probability.failing(i % 5 == 0 ? 1e-6 : 0.02 + 0.001 * (i % 7)));
      i++;
    }
    Probability compiled = structure.compile().reliability(p);
    Probability direct = structure.reliability(p);
    assertEquals(compiled.working(), direct.working(), 1e-12 * compiled.working());
    assertEquals(compiled.failing(), direct.failing(), 1e-12 * compiled.failing());
  }

  @Test
  void tooMuch_endsInABudgetException() {
    Structure network = Topology.file("ieee300").connectingAll();
    BudgetExceededException tooMuch =
        assertThrows(
            BudgetExceededException.class,
            () -> network.reliability(Probabilities.all(0.9), Budget.ofNodes(1_000)));
    assertEquals(BudgetExceededException.Limit.NODES, tooMuch.limit());
    assertTrue(tooMuch.getMessage().contains("without a diagram"), tooMuch.getMessage());
  }

  @Test
  void missingProbabilities_areListed() {
    IllegalArgumentException missing =
        assertThrows(
            IllegalArgumentException.class,
            () ->
                Structure.series("a", "b", "c")
                    .reliability(Probabilities.working(Map.of("b", 1.0))));
    assertTrue(missing.getMessage().contains("\"a\", \"c\""), missing.getMessage());
  }

  @Test
  void frontierWidth_isKnownBeforehand() {
    assertEquals(0, Structure.series("a", "b").frontierWidth());
    assertEquals(
        0,
        Structure.network()
            .link("a", "x", "y")
            .link("b", "y", "z")
            .link("c", "x", "z")
            .connecting("x", "z")
            .frontierWidth(),
        "series and parallel links leave nothing to sweep");
    assertTrue(Topology.file("ieee118").connecting("1", "112").frontierWidth() <= 7);
    assertTrue(Topology.file("ieee300").connectingAll().frontierWidth() <= 10);
  }
}
