package org.kingbolt.importance;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;
import static org.kingbolt.importance.ImprovementAllocation.allocation;

import java.util.List;
import java.util.Map;
import org.junit.jupiter.api.Tag;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.kingbolt.core.Probability;
import org.kingbolt.core.Structure;

/** Published problems of redundancy allocation, and all their choices. */
class RedundancyAllocationTest {

  private static final double SAME = 1e-12;

  /** Coit and Smith 1996; Liang and Smith, IEEE Trans. Reliab. 53 (2004) 417 (from memory). */
  @ParameterizedTest
  @CsvSource({"159, 0.95456", "170, 0.97076", "191, 0.98681"})
  void fyffeHinesLee_hasThePublishedOptimum(int weight, double published) {
    ImprovementResult result = FyffeProblem.plan().bestWithin(FyffeProblem.within(weight));
    assertTrue(result.isProved());
    assertEquals(published, result.reliability().working(), 5e-6);
    assertTrue(result.cost("cost") <= FyffeProblem.COST && result.cost("weight") <= weight);
  }

  @Tag("slow")
  @Test
  void fyffeHinesLee_isThatOfTheDynamicProgramme() {
    double[] best = FyffeProblem.best(191);
    long started = System.nanoTime();
    for (int weight = 159; weight <= 191; weight++) {
      ImprovementResult result = FyffeProblem.plan().bestWithin(FyffeProblem.within(weight));
      assertTrue(result.isProved());
      assertEquals(best[weight], result.reliability().working(), SAME);
    }
    assertTrue(System.nanoTime() - started < 60e9, "all 33 take more than a minute");
  }

  /** Tillman, Hwang and Kuo 1977 and 1980; Kuo and Zuo 2003: 3, 2, 2, 3, 3 (from memory). */
  @Test
  void tillmanHwangKuo_hasThePublishedOptimum() {
    double[] r = {.80, .85, .90, .65, .75};
    double[] p = {1, 2, 3, 4, 2};
    double[] c = {7, 7, 5, 9, 4};
    double[] w = {7, 8, 8, 6, 9};
    ImprovementPlan plan = ImprovementPlan.of(Structure.series("s1", "s2", "s3", "s4", "s5"));
    for (int i = 0; i < 5; i++) {
      int stage = i;
      plan =
          plan.with(
              allocation("s" + (i + 1))
                  .between(1, 10)
                  .unit("unit", r[i])
                  .costing("volume", x -> p[stage] * x * x)
                  .costing("money", x -> c[stage] * (x + Math.exp(x / 4.0)))
                  .costing("weight", x -> w[stage] * x * Math.exp(x / 4.0)));
    }
    ImprovementResult result =
        plan.bestWithin(Map.of("volume", 110.0, "money", 175.0, "weight", 200.0));
    assertTrue(result.isProved());
    assertEquals(
        List.of("s1: 3 unit", "s2: 2 unit", "s3: 2 unit", "s4: 3 unit", "s5: 3 unit"),
        result.options());
    assertEquals(.9045, result.reliability().working(), 5e-5);
    assertEquals(exhaustive(r, p, c, w), result.reliability().working(), SAME);
  }

  private static double exhaustive(double[] r, double[] p, double[] c, double[] w) {
    double best = 0;
    for (int code = 0; code < 100_000; code++) {
      double volume = 0;
      double money = 0;
      double weight = 0;
      double works = 1;
      int rest = code;
      for (int i = 0; i < 5; i++) {
        int x = rest % 10 + 1;
        rest /= 10;
        volume += p[i] * x * x;
        money += c[i] * (x + Math.exp(x / 4.0));
        weight += w[i] * x * Math.exp(x / 4.0);
        works *= 1 - Math.pow(1 - r[i], x);
      }
      if (volume <= 110 && money <= 175 && weight <= 200) {
        best = Math.max(best, works);
      }
    }
    return best;
  }

  private static ImprovementPlan kettelle() {
    return ImprovementPlan.of(Structure.series("s1", "s2", "s3", "s4"))
        .with(
            allocation("s1").unit("unit", .80).costing(1.2),
            allocation("s2").unit("unit", .70).costing(2.3),
            allocation("s3").unit("unit", .75).costing(3.4),
            allocation("s4").unit("unit", .85).costing(4.5));
  }

  /**
   * The data of Kettelle, Oper. Res. 10 (1962) 249, and of Barlow and Proschan 1965, ch. 6 (from
   * memory). Recalled for a budget of 56 is 5, 6, 5, 4, which costs 54.8; 6, 6, 5, 4 costs 56.0 and
   * is better, and is the best of all, by our own recomputation.
   */
  @Test
  void kettelle_isTheBestOfAllWithin56() {
    ImprovementResult result = kettelle().bestWithin(56);
    assertEquals(List.of("s1: 6 unit", "s2: 6 unit", "s3: 5 unit", "s4: 4 unit"), result.options());
    assertEquals(56.0, result.cost("cost"));
    assertEquals(.9977259039, result.reliability().working(), 5e-11);
    assertEquals(bestOfKettelle(56), result.reliability().working(), SAME);
    ImprovementFrontier.Point recalled = kettelle().frontier().within(54.8).orElseThrow();
    assertEquals(
        List.of("s1: 5 unit", "s2: 6 unit", "s3: 5 unit", "s4: 4 unit"), recalled.options());
  }

  /** Our own recomputation: 5, 5, 4, 3 at 44.6. */
  @Test
  void kettelle_isTheCheapestOfAllThatReachesTheTarget() {
    ImprovementResult result = kettelle().cheapestReaching(.99);
    assertEquals(List.of("s1: 5 unit", "s2: 5 unit", "s3: 4 unit", "s4: 3 unit"), result.options());
    assertEquals(44.6, result.cost("cost"));
    assertEquals(.9900026927, result.reliability().working(), 5e-11);
    assertTrue(bestOfKettelle(44.5) < .99);
  }

  /** Costs in tenths, so that sums are exact. */
  private static double bestOfKettelle(double budget) {
    int[] cost = {12, 23, 34, 45};
    double[] fails = {.20, .30, .25, .15};
    double best = 0;
    for (int code = 0; code < 8 * 8 * 8 * 8; code++) {
      int rest = code;
      int sum = 0;
      double works = 1;
      for (int i = 0; i < 4; i++) {
        int x = rest % 8 + 1;
        rest /= 8;
        sum += cost[i] * x;
        works *= 1 - Math.pow(fails[i], x);
      }
      best = sum <= Math.round(budget * 10) ? Math.max(best, works) : best;
    }
    return best;
  }

  /** Both tails: a system of failing probability 1e-18 is planned as well as any. */
  @Test
  void smallFailing_keepsItsDigits() {
    ImprovementPlan plan =
        ImprovementPlan.of(Structure.component("a"))
            .with(
                allocation("a")
                    .unit("good", Probability.failing(1e-9))
                    .costing(2)
                    .unit("fair", Probability.failing(1e-6))
                    .costing(1));
    ImprovementResult best = plan.bestWithin(4);
    assertEquals(List.of("a: 4 fair"), best.options());
    assertEquals(1e-24, best.reliability().failing(), 1e-36);
    Probability target = Probability.failing(1e-18);
    assertEquals(List.of("a: 3 fair"), plan.cheapestReaching(target).options());
  }
}
