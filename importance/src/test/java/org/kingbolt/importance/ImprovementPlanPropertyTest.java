package org.kingbolt.importance;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.Comparator;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.Set;
import net.jqwik.api.Arbitraries;
import net.jqwik.api.Arbitrary;
import net.jqwik.api.Combinators;
import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.Provide;
import net.jqwik.api.ShrinkingMode;
import org.kingbolt.core.Probability;
import org.kingbolt.core.testing.RandomStructures;

/** Plans against every choice there is. */
class ImprovementPlanPropertyTest {

  private static final double SAME = 1e-11;

  private static Arbitrary<RandomPlan> plans(int resources) {
    return Combinators.combine(
            RandomStructures.any(),
            RandomStructures.probabilities(),
            Arbitraries.integers().between(1, 8),
            Arbitraries.longs().withoutEdgeCases())
        .as(
            (sample, p, options, seed) ->
                new RandomPlan(sample.structure(), p, options, resources, seed));
  }

  @Provide
  Arbitrary<RandomPlan> ofMoney() {
    return plans(1);
  }

  @Provide
  Arbitrary<RandomPlan> ofTwo() {
    return plans(2);
  }

  @Property(tries = 400, shrinking = ShrinkingMode.OFF)
  void bestWithin_isTheBestOfAll(
      @ForAll("ofMoney") RandomPlan random, @ForAll("tenths") double budget) {
    checkBest(random, Map.of("money", budget));
  }

  @Property(tries = 300, shrinking = ShrinkingMode.OFF)
  void bestWithinTwo_isTheBestOfAll(
      @ForAll("ofTwo") RandomPlan random,
      @ForAll("tenths") double money,
      @ForAll("tenths") double days) {
    checkBest(random, Map.of("money", money, "days", days));
  }

  @Provide
  Arbitrary<Double> tenths() {
    return Arbitraries.integers().between(0, 25).map(i -> i / 10.0);
  }

  private static void checkBest(RandomPlan random, Map<String, Double> amounts) {
    Optional<RandomPlan.Choice> best =
        random.choices().stream()
            .filter(choice -> isWithin(choice.costs(), amounts))
            .max(Comparator.comparing(RandomPlan.Choice::reliability));
    if (best.isEmpty()) {
      assertThrows(
          IllegalArgumentException.class, () -> random.plan().bestWithin(amounts), "all excluded");
      return;
    }
    ImprovementResult result = random.plan().bestWithin(amounts);
    assertTrue(result.isProved());
    assertTrue(isWithin(result.costs(), amounts), result::toString);
    checkExplained(random, result);
    assertSame(best.get().reliability(), result.reliability());
    ImprovementResult near = random.plan().toWithin(0.2).bestWithin(amounts);
    double off = near.reliability().failing() / best.get().reliability().failing() - 1;
    assertTrue(!(off > near.relativeGap() + SAME), () -> off + " in " + near);
    assertTrue(near.relativeGap() <= 0.2 + SAME, near::toString);
  }

  /** What is said of a choice is so, and the steps lead to it. */
  private static void checkExplained(RandomPlan random, ImprovementResult result) {
    Map<Set<String>, RandomPlan.Choice> all = new HashMap<>();
    random.choices().forEach(choice -> all.put(choice.options(), choice));
    RandomPlan.Choice same = all.get(Set.copyOf(result.options()));
    assertSame(same.reliability(), result.reliability());
    assertEquals(same.costs(), result.costs());
    List<ImprovementStep> steps = result.steps();
    for (int i = 0; i < steps.size(); i++) {
      Probability after = i + 1 < steps.size() ? steps.get(i + 1).before() : result.reliability();
      assertEquals(after, steps.get(i).after());
    }
    assertTrue(
        result.nextBest().map(next -> next.gain() > 0).orElse(true), "a step that helps is next");
  }

  @Property(tries = 300, shrinking = ShrinkingMode.OFF)
  void cheapestReaching_isTheCheapestOfAll(
      @ForAll("ofTwo") RandomPlan random, @ForAll("tenths") double days, @ForAll int pick) {
    List<RandomPlan.Choice> within =
        random.choices().stream().filter(choice -> choice.cost("days") <= days).toList();
    ImprovementPlan plan = random.plan().limiting("days", days);
    if (within.isEmpty()) {
      assertThrows(
          IllegalArgumentException.class,
          () -> plan.cheapestReaching(Probability.working(0.1), "money"));
      return;
    }
    Probability target = within.get(Math.floorMod(pick, within.size())).reliability();
    double cheapest =
        within.stream()
            .filter(choice -> isAsGood(choice.reliability(), target))
            .mapToDouble(choice -> choice.cost("money"))
            .min()
            .orElseThrow();
    ImprovementResult result = plan.cheapestReaching(target, "money");
    assertTrue(result.isProved());
    assertEquals(cheapest, result.cost("money"));
    assertTrue(result.cost("days") <= days);
    assertTrue(isAsGood(result.reliability(), target));
    checkExplained(random, result);
  }

  @Property(tries = 300, shrinking = ShrinkingMode.OFF)
  void frontier_isThatOfAll(@ForAll("ofTwo") RandomPlan random, @ForAll("tenths") double days) {
    List<RandomPlan.Choice> within =
        random.choices().stream().filter(choice -> choice.cost("days") <= days).toList();
    ImprovementPlan plan = random.plan().limiting("days", days);
    if (within.isEmpty()) {
      assertThrows(IllegalArgumentException.class, () -> plan.frontier("money"));
      return;
    }
    ImprovementFrontier frontier = plan.frontier("money");
    for (int tenth = 0; tenth <= 60; tenth++) {
      double budget = tenth / 10.0;
      Optional<Probability> best =
          within.stream()
              .filter(choice -> choice.cost("money") <= budget)
              .map(RandomPlan.Choice::reliability)
              .max(Comparator.naturalOrder());
      Optional<ImprovementFrontier.Point> point = frontier.within(budget);
      assertEquals(best.isPresent(), point.isPresent());
      point.ifPresent(found -> assertSame(best.orElseThrow(), found.reliability()));
    }
  }

  private static boolean isWithin(Map<String, Double> costs, Map<String, Double> amounts) {
    return amounts.entrySet().stream().allMatch(e -> costs.get(e.getKey()) <= e.getValue());
  }

  private static boolean isAsGood(Probability p, Probability target) {
    return target.failing() <= 0.5
        ? p.failing() <= target.failing() * (1 + SAME)
        : p.working() >= target.working() * (1 - SAME);
  }

  private static void assertSame(Probability exact, Probability found) {
    assertEquals(exact.failing(), found.failing(), SAME * exact.failing());
    assertEquals(exact.working(), found.working(), SAME * exact.working());
  }
}
