package org.kingbolt.importance;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertNotEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;
import static org.kingbolt.core.Structure.component;
import static org.kingbolt.core.Structure.parallel;
import static org.kingbolt.core.Structure.series;
import static org.kingbolt.importance.ImprovementAllocation.allocation;
import static org.kingbolt.importance.ImprovementAllocation.sparesOf;
import static org.kingbolt.importance.ImprovementOption.option;

import java.time.Duration;
import java.util.List;
import java.util.Map;
import java.util.stream.IntStream;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;
import org.kingbolt.core.Budget;
import org.kingbolt.core.BudgetExceededException;
import org.kingbolt.core.Probabilities;
import org.kingbolt.core.Probability;
import org.kingbolt.core.Structure;
import org.kingbolt.core.published.Families;
import org.kingbolt.core.testing.NestedGates;

class ImprovementPlanTest {

  private static final Structure STATION = series(component("intake"), parallel("pumpA", "pumpB"));
  private static final Probabilities P = Probabilities.all(0.9);

  private static ImprovementPlan station() {
    return ImprovementPlan.of(STATION)
        .given(P)
        .with(
            option("new intake").replacing("intake", 0.99).costing(10),
            option("tested intake").multiplyingFailing("intake", 0.5).costing(4),
            option("third pump").sparing("pumpA", "pumpC", 0.8).costing(5),
            option("rebuilt pump B")
                .rebuilding("pumpB", parallel("b1", "b2"), Probabilities.all(0.95))
                .costing(7));
  }

  @Test
  void nothing_isChosenWithoutABudget() {
    ImprovementResult result = station().bestWithin(0);
    assertEquals(List.of(), result.options());
    assertEquals(List.of(), result.steps());
    assertEquals(STATION.reliability(P), result.reliability());
    assertEquals("tested intake", result.nextBest().orElseThrow().option());
  }

  @Test
  void cost_withoutAName_isRefusedForSeveralResources() {
    ImprovementResult result =
        ImprovementPlan.of(STATION)
            .given(P)
            .with(
                option("new intake")
                    .replacing("intake", 0.99)
                    .costing("kEUR", 1)
                    .costing("days", 2))
            .bestWithin(Map.of("kEUR", 1.0, "days", 2.0));
    IllegalStateException refused = assertThrows(IllegalStateException.class, result::cost);
    assertTrue(refused.getMessage().contains("name one of these"), refused::getMessage);
    assertEquals(2, result.cost("days"));
  }

  @Test
  void bestWithin_choosesAndExplains() {
    ImprovementResult result = station().bestWithin(15);
    assertEquals(List.of("new intake", "third pump"), result.options());
    assertEquals(15, result.cost("cost"));
    assertEquals(15, result.cost());
    assertEquals(0.99 * 0.998, result.reliability().working(), 1e-15);
    assertEquals(
        List.of("new intake", "third pump"),
        result.steps().stream().map(ImprovementStep::option).toList());
    assertEquals(0.09 * 0.99 / 10, result.steps().get(0).gainPer("cost"), 1e-15);
    assertTrue(result.isProved());
    assertEquals(0, result.absoluteGap());
    assertEquals(0, result.relativeGap());
    assertEquals("tested intake", result.nextBest().orElseThrow().option());
  }

  @Test
  void answer_printsAsATable() {
    String expected =
        String.join(
            System.lineSeparator(),
            "best plan within cost 15",
            "step                     cost  failing after        gain  gain per cost",
            "new intake                 10     1.9900e-02  8.9100e-02     8.9100e-03",
            "third pump                  5     1.1980e-02  7.9200e-03     1.5840e-03",
            "total                      15",
            "left out: tested intake     4     6.9900e-03  4.9900e-03     1.2475e-03",
            "working 0.98802, failing 0.01198; proved to be the best");
    assertEquals(expected, station().bestWithin(15).toString());
  }

  @Test
  void frontier_isEachBestPlan() {
    ImprovementFrontier frontier = station().frontier();
    for (int budget = 0; budget <= 30; budget++) {
      ImprovementFrontier.Point point = frontier.within(budget).orElseThrow();
      ImprovementResult best = station().bestWithin(budget);
      assertEquals(best.reliability(), point.reliability());
      assertEquals(best.options(), point.options());
      assertEquals(best.costs(), point.costs());
    }
    assertEquals(
        List.of(
            "efficient plans by cost",
            "cost     failing  gain per cost  options",
            "   0  1.0900e-01                 nothing",
            "   4  5.9500e-02     1.2375e-02  tested intake"),
        frontier.toString().lines().limit(4).toList());
  }

  @Test
  void cheapest_isOnTheFrontier() {
    for (ImprovementFrontier.Point point : station().frontier().points()) {
      ImprovementResult result = station().cheapestReaching(point.reliability());
      assertEquals(point.options(), result.options());
      assertTrue(result.isProved());
    }
  }

  @Test
  void targetOutOfReach_isRefusedWithTheBest() {
    IllegalArgumentException refused =
        assertThrows(
            IllegalArgumentException.class,
            () -> station().cheapestReaching(Probability.failing(1e-9)));
    assertTrue(refused.getMessage().contains("cannot be reached; the best at any cost is working"));
  }

  @Test
  void limits_areKept() {
    ImprovementPlan plan = station();
    assertEquals(
        List.of("new intake"),
        plan.atMostOneOf("new intake", "tested intake").bestWithin(14).options());
    assertEquals(
        List.of("tested intake", "third pump"),
        plan.exactlyOneOf("third pump", "new intake").bestWithin(9).options());
    assertEquals(
        List.of("tested intake", "third pump"),
        plan.requires("tested intake", "third pump").bestWithin(9).options());
    ImprovementPlan founded =
        plan.with(option("third room").costing(5)).requires("third pump", "third room");
    assertEquals(List.of("tested intake"), founded.bestWithin(9).options());
    assertEquals(
        List.of("new intake", "tested intake", "third pump", "rebuilt pump B", "third room"),
        founded.bestWithin(31).options());
  }

  @Test
  void sharedSpare_isOneUnit() {
    Structure pair = series("a", "b");
    ImprovementPlan plan =
        ImprovementPlan.of(pair)
            .given(Probabilities.all(0.5))
            .with(option("standby").sparing("a", "s", 0.5).sparing("b", "s", 0.5).costing(1));
    assertEquals(0.5 + 0.5 * 0.25, plan.bestWithin(1).reliability().working());
  }

  @Test
  void sparesOfAComponent_standBesideItsUnit() {
    ImprovementPlan plan =
        ImprovementPlan.of(component("a"))
            .given(Probabilities.all(0.5))
            .with(sparesOf("a").unit("x", 0.5).costing(1).unit("y", 0.75).costing(3));
    assertEquals(List.of("a: no spares"), plan.bestWithin(0).options());
    assertEquals(List.of("a: 2 x"), plan.bestWithin(2).options());
    assertEquals(0.875, plan.bestWithin(2).reliability().working());
    assertEquals(List.of("a: 5 x"), plan.cheapestReaching(1 - 1.0 / 64).options());
  }

  @Test
  void neededUnits_areKOutOfN() {
    ImprovementPlan plan =
        ImprovementPlan.of(component("a"))
            .with(allocation("a").unit("x", 0.9).costing(1).needing(2).between(2, 4));
    assertEquals(0.972, plan.bestWithin(3).reliability().working(), 1e-15);
    assertEquals(List.of("a: 2 x"), plan.bestWithin(2.5).options());
    assertThrows(IllegalArgumentException.class, () -> plan.bestWithin(1.5));
  }

  @Test
  void decimals_areAddedExactly() {
    ImprovementPlan plan =
        ImprovementPlan.of(parallel("a", "b"))
            .given(P)
            .with(
                option("x").replacing("a", 0.99).costing(0.1),
                option("y").replacing("b", 0.99).costing(0.2));
    assertEquals(List.of("x", "y"), plan.bestWithin(0.3).options());
    assertEquals(List.of("x"), plan.bestWithin(Math.nextDown(0.3)).options());
  }

  @Test
  void equallyGood_isTheCheapestThenTheFirst() {
    ImprovementPlan plan =
        ImprovementPlan.of(component("a"))
            .given(P)
            .with(
                option("dear").replacing("a", 0.99).costing(3),
                option("first").replacing("a", 0.99).costing(2),
                option("second").replacing("a", 0.99).costing(2));
    assertEquals(List.of("first"), plan.bestWithin(10).options());
    assertEquals(List.of("first"), plan.bestWithin(Map.of("cost", 1e300)).options());
  }

  @Test
  void answers_areTheSameInEveryThread() {
    LargePlan large = new LargePlan(new NestedGates(60, 14, 0.2, 4).structure(), 4);
    ImprovementPlan plan = large.plan().toWithin(0.01);
    ImprovementResult one = plan.bestWithin(large.budget());
    List<ImprovementResult> others =
        IntStream.range(0, 4).parallel().mapToObj(i -> plan.bestWithin(large.budget())).toList();
    others.forEach(other -> assertEquals(one, other));
    assertEquals(one.hashCode(), others.get(0).hashCode());
    assertEquals(one.toString(), others.get(0).toString());
  }

  /** Issue: within 1 % of the proved optimum in 10 s. */
  @ParameterizedTest
  @ValueSource(longs = {1, 2, 3, 4, 5, 6, 7, 8})
  void twoHundredOptions_areSolvedToOnePercent(long seed) {
    checkOnePercent(new NestedGates(60, 14, 0.2, seed).structure(), seed);
  }

  /** Issue: within 1 % of the proved optimum in 10 s. */
  @ParameterizedTest
  @ValueSource(longs = {2, 3, 4, 6})
  void trainsThatShareSupports_areSolvedToOnePercent(long seed) {
    checkOnePercent(LargePlan.plant(seed), seed);
  }

  /** Issue: within 1 % of the proved optimum in 10 s. */
  @ParameterizedTest
  @ValueSource(longs = {1, 2, 3})
  void gridOfSixtyLinks_isSolvedToOnePercent(long seed) {
    checkOnePercent(Families.corners(6), seed);
  }

  private static void checkOnePercent(Structure structure, long seed) {
    LargePlan large = new LargePlan(structure, seed);
    ImprovementResult result =
        large
            .plan()
            .toWithin(0.01)
            .within(Budget.ofTime(Duration.ofSeconds(10)))
            .bestWithin(large.budget());
    assertTrue(result.relativeGap() <= 0.01, result::toString);
    assertTrue(result.cost("cost") <= large.budget());
  }

  @Test
  void searchStoppedByNodes_tellsTheGap() {
    LargePlan large = new LargePlan(LargePlan.plant(1), 1);
    ImprovementResult result =
        large.plan().within(Budget.ofNodes(5_000)).bestWithin(large.budget());
    assertFalse(result.isProved());
    assertTrue(result.relativeGap() > 0 && result.relativeGap() < 2, result::toString);
    assertTrue(result.absoluteGap() < result.reliability().failing());
    assertTrue(result.toString().contains("from the best"));
    assertThrows(
        BudgetExceededException.class,
        () -> large.plan().within(Budget.ofNodes(100)).bestWithin(large.budget()));
  }

  @Test
  void interrupt_endsTheSearch() {
    LargePlan large = new LargePlan(LargePlan.plant(1), 1);
    Thread.currentThread().interrupt();
    try {
      assertThrows(BudgetExceededException.class, () -> large.plan().bestWithin(large.budget()));
    } finally {
      assertTrue(Thread.interrupted());
    }
  }

  @Test
  void values_areEqualWhenTheySayTheSame() {
    assertEquals(option("a").costing(1), option("a").costing(1));
    assertNotEquals(option("a").costing(1), option("a").costing(2));
    assertEquals(option("a").costing(1).hashCode(), option("a").costing(1).hashCode());
    assertEquals(allocation("a").unit("x", 0.5), allocation("a").unit("x", 0.5));
    assertNotEquals(allocation("a").unit("x", 0.5), sparesOf("a").unit("x", 0.5));
    assertEquals(station().frontier(), station().frontier());
    assertEquals(station().bestWithin(9), station().bestWithin(9));
    assertNotEquals(station().bestWithin(9), station().bestWithin(20));
  }
}
