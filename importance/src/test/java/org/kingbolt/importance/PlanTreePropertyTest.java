package org.kingbolt.importance;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.Arrays;
import java.util.BitSet;
import java.util.List;
import java.util.Optional;
import java.util.Random;
import net.jqwik.api.Arbitraries;
import net.jqwik.api.Arbitrary;
import net.jqwik.api.Combinators;
import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.Provide;
import net.jqwik.api.ShrinkingMode;
import org.kingbolt.core.diagram.WorkMeter;
import org.kingbolt.core.testing.RandomStructures;

/** The convex relaxation, and the branch and bound with it, against every choice there is. */
class PlanTreePropertyTest {

  private static final double SAME = 1e-11;

  @Provide
  Arbitrary<RandomPlan> plans() {
    return Combinators.combine(
            RandomStructures.any(),
            RandomStructures.probabilities(),
            Arbitraries.integers().between(1, 8),
            Arbitraries.integers().between(1, 2),
            Arbitraries.longs().withoutEdgeCases())
        .as(
            (sample, p, options, resources, seed) ->
                new RandomPlan(sample.structure(), p, options, resources, seed));
  }

  /** The failing probabilities of all choices within limits, the least first. */
  private static double[] failing(RandomPlan random, PlanModel model, long[] limits) {
    return random.choices().stream()
        .filter(choice -> isWithin(choice, model, limits))
        .mapToDouble(choice -> choice.reliability().failing())
        .sorted()
        .toArray();
  }

  private static boolean isWithin(RandomPlan.Choice choice, PlanModel model, long[] limits) {
    for (int r = 0; r < limits.length; r++) {
      double cost = choice.cost(model.resources().get(r));
      if (model.costs().get(r).units(cost) > limits[r]) {
        return false;
      }
    }
    return true;
  }

  private static long[] limits(PlanModel model, double budget) {
    return model.costs().stream().mapToLong(costs -> costs.limit(budget)).toArray();
  }

  private static Optional<PlanWeb> web(PlanModel model, long[] limits) {
    WorkMeter meter = WorkMeter.UNLIMITED;
    PlanSteps steps = new PlanSteps(model.system().diagram(), meter);
    PlanOrder order = new PlanOrder(model, steps);
    PlanMenus menus = new PlanMenus(model, steps, order, meter);
    return PlanWeb.of(model, steps, order, menus, limits, meter);
  }

  @Property(tries = 1000, shrinking = ShrinkingMode.OFF)
  void relaxation_isNoWorseThanTheBest(
      @ForAll("plans") RandomPlan random, @ForAll("tenths") double budget, @ForAll long seed) {
    PlanModel model = random.plan().model();
    long[] limits = limits(model, budget);
    Optional<PlanWeb> web = web(model, limits);
    double[] failing = web.isEmpty() ? new double[0] : failing(random, model, limits);
    if (failing.length == 0 || failing[0] == 0) {
      return;
    }
    double best = Math.log(failing[0]);
    PlanRelaxation relaxation = new PlanRelaxation(web.get(), limits, failing[0] * 1e-14);
    mix(relaxation, web.get(), new Random(seed));
    assertTrue(relaxation.ceiling() <= best + SAME);
    relaxation.start();
    for (int round = 0; round < 8; round++) {
      double bound = relaxation.bound();
      assertTrue(!(bound > best + SAME), () -> bound + " above " + best);
      relaxation.improve();
      relaxation.reprice(1);
    }
  }

  private static void mix(PlanRelaxation relaxation, PlanWeb web, Random random) {
    for (int at = 0; at < web.levels(); at++) {
      double[] mix = relaxation.mix[at];
      relaxation.last[at] = mix.length - 1;
      Arrays.setAll(mix, i -> random.nextDouble());
      double sum = Arrays.stream(mix).sum();
      Arrays.setAll(mix, i -> mix[i] / sum);
    }
  }

  @Property(tries = 1000, shrinking = ShrinkingMode.OFF)
  void tree_findsTheBestOfAll(
      @ForAll("plans") RandomPlan random,
      @ForAll("tenths") double budget,
      @ForAll("gaps") double gap) {
    PlanModel model = random.plan().model();
    long[] limits = limits(model, budget);
    Optional<PlanWeb> web = web(model, limits);
    double[] failing = web.isEmpty() ? new double[0] : failing(random, model, limits);
    if (failing.length == 0) {
      return;
    }
    double[] best = {Math.log(failing[failing.length - 1])};
    PlanTree tree =
        new PlanTree(
            web.get(),
            limits,
            best[0],
            chosen -> offer(model, limits, best, chosen),
            gap,
            WorkMeter.UNLIMITED);
    tree.run(Double.NEGATIVE_INFINITY);
    double exact = Math.log(failing[0]);
    if (exact > Double.NEGATIVE_INFINITY) {
      assertEquals(exact, best[0], Math.log1p(gap) + SAME);
      assertTrue(tree.proved() <= exact + SAME);
      assertTrue(best[0] - tree.proved() <= Math.log1p(gap) + SAME);
    } else {
      assertEquals(exact, best[0]);
    }
  }

  private static double offer(PlanModel model, long[] limits, double[] best, BitSet chosen) {
    assertTrue(model.allows(chosen));
    long[] cost = model.cost(chosen);
    for (int r = 0; r < limits.length; r++) {
      assertTrue(cost[r] <= limits[r]);
    }
    double fails = model.reliability(model.system().evaluator(), chosen).failing();
    best[0] = Math.min(best[0], Math.log(fails));
    return best[0];
  }

  @Provide
  Arbitrary<Double> tenths() {
    return Arbitraries.integers().between(0, 25).map(i -> i / 10.0);
  }

  @Provide
  Arbitrary<Double> gaps() {
    return Arbitraries.of(List.of(0.0, 0.01, 0.2));
  }
}
