package org.kingbolt.importance;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.kingbolt.core.published.Digits.assertPrinted;

import java.util.List;
import java.util.Map;
import org.apache.commons.math3.distribution.ExponentialDistribution;
import org.apache.commons.math3.fraction.BigFraction;
import org.junit.jupiter.api.Test;
import org.kingbolt.core.Probabilities;
import org.kingbolt.core.Structure;
import org.kingbolt.core.published.Topology;

/** Published importances, by source; all from memory. */
class MeasuresPublishedTest {

  private static final List<String> OUTER = List.of("s-u", "s-v", "u-t", "v-t");
  private static final String CROSSING = "u-v";

  private final Structure bridge = Topology.of("s-u s-v u-v u-t v-t").connecting("s", "t");
  private final ImportanceAtProbabilities bridgeAt =
      Importance.of(bridge).given(Probabilities.all(0.9));

  /**
   * NUREG-0492, Fault Tree Handbook, 1981, chapter VIII: the pressure tank, with minimal cut sets
   * T; K2; S and S1; S and K1; S and R.
   */
  private final ImportanceAtProbabilities tank =
      Importance.of(
              Structure.ofCutSets(
                  List.of(
                      List.of("T"),
                      List.of("K2"),
                      List.of("S", "S1"),
                      List.of("S", "K1"),
                      List.of("S", "R"))))
          .given(
              Probabilities.failing(
                  Map.of("T", 5e-6, "K2", 3e-5, "S", 1e-4, "S1", 3e-5, "K1", 3e-5, "R", 1e-4)));

  private static void assertBridge(double outer, double crossing, Ranking ranking) {
    OUTER.forEach(link -> assertEquals(outer, ranking.value(link), outer * 1e-14));
    assertEquals(crossing, ranking.value(CROSSING), crossing * 1e-14);
  }

  /** Barlow and Proschan, Stochastic Processes Appl. 3 (1975) 153: 7/30 and 1/15. */
  @Test
  void bridge_hasThePublishedBarlowProschanImportance() {
    assertBridge(7 / 30.0, 1 / 15.0, Importance.of(bridge).barlowProschan());
    Map<String, BigFraction> exact = Importance.of(bridge).barlowProschanFractions();
    OUTER.forEach(link -> assertEquals(new BigFraction(7, 30), exact.get(link)));
    assertEquals(new BigFraction(1, 15), exact.get(CROSSING));
  }

  /** By the definition of Fussell 1975, after Vesely: the union of the cut sets with i. */
  @Test
  void bridge_hasTheDefinedFussellVeselyImportance() {
    assertBridge(545 / 1076.0, 199 / 2152.0, bridgeAt.fussellVesely());
  }

  /** By the definitions of NUREG/CR-3385, 1983. */
  @Test
  void bridge_hasTheDefinedCriticalityAndWorths() {
    assertBridge(531 / 1076.0, 81 / 1076.0, bridgeAt.criticalityFailing());
    assertBridge(5855 / 1076.0, 1805 / 1076.0, bridgeAt.riskAchievementWorth());
    assertBridge(1076 / 545.0, 1076 / 995.0, bridgeAt.riskReductionWorth());
  }

  /** The share of the tank is 14 %, that of relay K2 86 %. */
  @Test
  void pressureTank_hasThePublishedShares() {
    for (Ranking ranking : List.of(tank.fussellVesely(), tank.fussellVeselyRareEvent())) {
      assertPrinted("0.14", ranking.value("T"));
      assertPrinted("0.86", ranking.value("K2"));
    }
    assertPrinted("0.14", tank.cutSets(2).entries().get(1).givenFailure());
  }

  /** Our own recomputation, for these data. */
  @Test
  void pressureTank_hasTheRecomputedWorths() {
    Ranking achievement = tank.riskAchievementWorth();
    assertPrinted("28558.4967", achievement.value("T"));
    assertPrinted("28558.4967", achievement.value("K2"));
    assertPrinted("5.568546", achievement.value("S"));
    List.of("R", "K1", "S1").forEach(x -> assertPrinted("3.855293", achievement.value(x)));
    assertPrinted("0.142788", tank.criticalityFailing().value("T"));
    assertPrinted("0.856751", tank.criticalityFailing().value("K2"));
    Ranking reduction = tank.riskReductionWorth();
    assertPrinted("1.16657283", reduction.value("T"));
    assertPrinted("6.98083216", reduction.value("K2"));
    assertPrinted("1.00045711", reduction.value("S"));
    assertPrinted("1.00028564", reduction.value("R"));
    List.of("K1", "S1").forEach(x -> assertPrinted("1.00008567", reduction.value(x)));
  }

  /** Barlow and Proschan 1975: in series the shares are as the rates; in parallel the other's. */
  @Test
  void exponentialPairs_haveThePublishedBarlowProschanImportance() {
    Map<String, ExponentialDistribution> lifetimes =
        Map.of("a", new ExponentialDistribution(0.25), "b", new ExponentialDistribution(1));
    Ranking series = Importance.of(Structure.series("a", "b")).barlowProschan(lifetimes);
    assertEquals(0.8, series.value("a"), 1e-10);
    assertEquals(0.2, series.value("b"), 1e-10);
    Ranking parallel = Importance.of(Structure.parallel("a", "b")).barlowProschan(lifetimes);
    assertEquals(0.2, parallel.value("a"), 1e-10);
    assertEquals(0.8, parallel.value("b"), 1e-10);
  }
}
