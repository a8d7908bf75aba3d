package org.kingbolt.importance;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;
import static org.kingbolt.importance.AllStates.assertNear;
import static org.kingbolt.importance.AllStates.share;

import java.math.BigDecimal;
import java.util.HashMap;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.Random;
import net.jqwik.api.Arbitrary;
import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.Provide;
import org.junit.jupiter.api.Test;
import org.kingbolt.core.Probabilities;
import org.kingbolt.core.Probability;
import org.kingbolt.core.Structure;
import org.kingbolt.core.testing.RandomStructures;
import org.kingbolt.core.testing.RandomStructures.Sample;

/** Posteriors and next inspections against all states. */
class DiagnosisTest {

  @Provide
  Arbitrary<Sample> structures() {
    return RandomStructures.any();
  }

  @Provide
  Arbitrary<Probabilities> probabilities() {
    return RandomStructures.probabilities();
  }

  @Property(tries = 600)
  void posteriors_areConditionalProbabilities(
      @ForAll("structures") Sample sample,
      @ForAll("probabilities") Probabilities p,
      @ForAll Random random) {
    AllStates all = new AllStates(sample.oracle(), p);
    Diagnosis diagnosis = Diagnosis.of(sample.structure()).given(p);
    int system = random.nextInt(3);
    diagnosis =
        system == 0
            ? diagnosis
            : system == 1 ? diagnosis.systemFailed() : diagnosis.systemWorking();
    int working = 0;
    int failed = 0;
    for (int i = 0; i < all.size(); i++) {
      String name = all.names().get(i);
      if (random.nextInt(4) == 0 && p.get(name).working() > 0) {
        diagnosis = diagnosis.working(name);
        working |= 1 << i;
      } else if (random.nextInt(4) == 0 && p.get(name).failing() > 0) {
        diagnosis = diagnosis.failed(name);
        failed |= 1 << i;
      }
    }
    int up = working;
    int down = failed;
    BigDecimal evidence = all.probability(s -> told(all, s, system, up, down));
    Diagnosis told = diagnosis;
    if (evidence.signum() == 0) {
      assertThrows(IllegalStateException.class, told::posterior);
      return;
    }
    Ranking posterior = told.posterior();
    for (int i = 0; i < all.size(); i++) {
      int bit = 1 << i;
      String name = all.names().get(i);
      BigDecimal fails =
          share(all.probability(s -> told(all, s, system, up, down) && (s & bit) == 0), evidence);
      BigDecimal works =
          share(all.probability(s -> told(all, s, system, up, down) && (s & bit) != 0), evidence);
      assertNear(fails, told.posterior(name).failing(), name + " failed");
      assertNear(works, told.posterior(name).working(), name + " works");
      boolean known = ((up | down) & bit) != 0;
      assertEquals(!known, posterior.asMap().containsKey(name));
      if (!known) {
        assertNear(fails, posterior.value(name), name);
        double f = fails.doubleValue();
        double w = works.doubleValue();
        double bits = -(f == 0 ? 0 : f * Math.log(f)) - (w == 0 ? 0 : w * Math.log(w));
        assertEquals(bits / Math.log(2), told.information().value(name), 1e-12);
      }
    }
  }

  private static boolean told(AllStates all, int state, int system, int up, int down) {
    boolean fits = system == 0 || all.table().works(state) == (system == 2);
    return fits && (state & up) == up && (state & down) == 0;
  }

  /** All courses of inspection, by plain recursion over what is found. */
  @Property(tries = 150)
  void cheapestInspection_isTheBestOfAllCourses(
      @ForAll("structures") Sample sample, @ForAll Random random) {
    int n = sample.structure().components().size();
    if (n > 5) {
      return;
    }
    Probabilities p = Probabilities.all(0.5);
    Map<String, Double> costs = new LinkedHashMap<>();
    for (String name : sample.structure().components()) {
      p = p.with(name, 0.02 + 0.96 * random.nextDouble());
      if (random.nextInt(5) > 0) {
        costs.put(name, 0.5 + random.nextInt(8));
      }
    }
    AllStates all = new AllStates(sample.oracle(), p);
    CheapestInspection cheapest =
        Diagnosis.of(sample.structure()).given(p).systemFailed().cheapestInspection(costs);
    Plain plain = new Plain(all, costs);
    assertEquals(plain.cost(0, 0), cheapest.expectedCost(), 1e-11);
    assertEquals(cheapest.expectedCost() == 0, cheapest.next().isEmpty());
    cheapest
        .next()
        .ifPresent(
            name ->
                assertEquals(
                    plain.costFrom(0, 0, all.names().indexOf(name)),
                    cheapest.expectedCost(),
                    1e-11));
  }

  /** Depth is the number of components, a handful. */
  private record Plain(AllStates all, Map<String, Double> costs) {

    double cost(int up, int down) {
      int every = (1 << all.size()) - 1;
      if (!all.table().works(every & ~down)) {
        return 0;
      }
      double best = Double.POSITIVE_INFINITY;
      for (int i = 0; i < all.size(); i++) {
        if (((up | down) >>> i & 1) == 0 && costs.containsKey(all.names().get(i))) {
          best = Math.min(best, costFrom(up, down, i));
        }
      }
      return Double.isInfinite(best) ? 0 : best;
    }

    double costFrom(int up, int down, int i) {
      int bit = 1 << i;
      double whole = weight(up, down);
      double works = weight(up | bit, down) / whole;
      double fails = weight(up, down | bit) / whole;
      return costs.getOrDefault(all.names().get(i), 0.0)
          + (works == 0 ? 0 : works * cost(up | bit, down))
          + (fails == 0 ? 0 : fails * cost(up, down | bit));
    }

    private double weight(int up, int down) {
      return all.probability(s -> told(all, s, 1, up, down)).doubleValue();
    }
  }

  /** Exactly one of a series has failed, or so it almost is where failures are rare. */
  @Test
  void seriesOfRareFailures_isInspectedByProbabilityPerCost() {
    Probabilities p = Probabilities.failing(Map.of("a", 1e-9, "b", 3e-9, "c", 2e-9));
    Map<String, Double> costs = new HashMap<>(Map.of("a", 1.0, "b", 2.0, "c", 4.0));
    Diagnosis diagnosis = Diagnosis.of(Structure.series("a", "b", "c")).given(p).systemFailed();
    Ranking order = diagnosis.failedPerCost(costs);
    assertEquals(List.of("b", "a", "c"), order.entries().stream().map(e -> e.component()).toList());
    assertEquals(0.25, order.value("b"), 1e-8);
    CheapestInspection cheapest = diagnosis.cheapestInspection(costs);
    assertEquals(Optional.of("b"), cheapest.next());
    assertEquals(2 + 0.5 * (1 + 4 * 2 / 3.0), cheapest.expectedCost(), 1e-7);
    CheapestInspection explained = diagnosis.failed("b").cheapestInspection(costs);
    assertEquals(Optional.empty(), explained.next());
    assertEquals(0, explained.expectedCost());
  }

  @Test
  void smallPosteriors_keepTheirDigits() {
    Probabilities p = Probabilities.failing(Map.of("a", 1e-9, "b", 1e-9, "c", 1e-3));
    Diagnosis diagnosis =
        Diagnosis.of(Structure.parse("series(parallel(a, b), c)")).given(p).systemFailed();
    double fails = 1e-3 + (1 - 1e-3) * 1e-18;
    assertNear((1e-18 + 1e-9 * 1e-3 - 1e-21) / fails, diagnosis.posterior("a").failing(), "a");
    assertNear((1 - 1e-3) * 1e-18 / fails, diagnosis.posterior("c").working(), "c");
  }

  @Test
  void badEvidence_isNamed() {
    Diagnosis diagnosis =
        Diagnosis.of(Structure.series("a", "b"))
            .given(Probabilities.all(0.9).with("b", Probability.CERTAIN));
    assertMessage(
        "component \"b\" is said to have failed, which has probability 0; give it a probability"
            + " between 0 and 1",
        () -> diagnosis.failed("b"));
    assertMessage(
        "component \"a\" is said both to work and to have failed; say one of them",
        () -> diagnosis.failed("a").working("a"));
    assertMessage(
        "unknown component \"x\"; the components are \"a\", \"b\"; name one of these",
        () -> diagnosis.working("x"));
    assertMessage(
        "component \"a\": the cost of its inspection is 0.0; it must be a number above 0",
        () -> diagnosis.systemFailed().cheapestInspection(Map.of("a", 0.0)));
    assertThrows(IllegalStateException.class, () -> diagnosis.systemFailed().systemWorking());
    assertThrows(IllegalStateException.class, () -> diagnosis.cheapestInspection(Map.of()));
    IllegalStateException impossible =
        assertThrows(
            IllegalStateException.class, () -> diagnosis.systemFailed().working("a").posterior());
    assertTrue(impossible.getMessage().startsWith("the system cannot have failed"));
    assertEquals(List.of("b"), diagnosis.working("a").remaining());
    assertEquals("failed, given the system works", diagnosis.systemWorking().posterior().measure());
  }

  @Test
  void manyComponents_areRefusedByName() {
    String[] names = new String[13];
    Map<String, Double> costs = new HashMap<>();
    for (int i = 0; i < names.length; i++) {
      names[i] = "x" + i;
      costs.put(names[i], 1.0);
    }
    Diagnosis diagnosis =
        Diagnosis.of(Structure.series(names)).given(Probabilities.all(0.9)).systemFailed();
    IllegalArgumentException many =
        assertThrows(IllegalArgumentException.class, () -> diagnosis.cheapestInspection(costs));
    assertTrue(many.getMessage().startsWith("13 components may be inspected; at most 12"));
    costs.remove("x4");
    assertEquals(Optional.of("x0"), diagnosis.cheapestInspection(costs).next());
  }

  private static void assertMessage(
      String message, org.junit.jupiter.api.function.Executable call) {
    assertEquals(message, assertThrows(IllegalArgumentException.class, call).getMessage());
  }
}
