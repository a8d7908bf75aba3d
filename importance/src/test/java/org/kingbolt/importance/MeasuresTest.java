package org.kingbolt.importance;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;
import static org.kingbolt.importance.AllStates.assertNear;
import static org.kingbolt.importance.AllStates.ratio;
import static org.kingbolt.importance.AllStates.share;

import java.math.BigDecimal;
import java.util.List;
import java.util.Map;
import java.util.stream.IntStream;
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

/** The measures of one pass, each against its definition over all states. */
class MeasuresTest {

  @Provide
  Arbitrary<Sample> structures() {
    return RandomStructures.any();
  }

  @Provide
  Arbitrary<Probabilities> probabilities() {
    return RandomStructures.probabilities();
  }

  @Property(tries = 1000)
  void firstOrder_isAsDefined(
      @ForAll("structures") Sample sample, @ForAll("probabilities") Probabilities p) {
    AllStates all = new AllStates(sample.oracle(), p);
    ImportanceAtProbabilities at = Importance.of(sample.structure()).given(p);
    BigDecimal fails = all.fails();
    BigDecimal works = all.works();
    BigDecimal[] gains = new BigDecimal[all.size()];
    BigDecimal[] births = new BigDecimal[all.size()];
    for (int i = 0; i < all.size(); i++) {
      String name = all.names().get(i);
      int bit = 1 << i;
      BigDecimal q = new BigDecimal(p.get(name).failing());
      BigDecimal u = new BigDecimal(p.get(name).working());
      BigDecimal given1 = all.failsWith(bit);
      BigDecimal given0 = all.failsWithout(bit);
      BigDecimal decides =
          all.probability(s -> all.table().works(s | bit) && !all.table().works(s & ~bit));
      BigDecimal works1 = all.probability(s -> all.table().works(s | bit));
      births[i] = decides;
      gains[i] = q.multiply(decides);
      assertNear(decides, at.birnbaum().value(name), "Birnbaum of " + name);
      assertNear(
          share(gains[i], fails), at.criticalityFailing().value(name), "criticality of " + name);
      assertNear(
          share(u.multiply(decides), works),
          at.criticalityWorking().value(name),
          "criticality working of " + name);
      assertNear(gains[i], at.improvementPotential().value(name), "potential of " + name);
      assertNear(
          share(q.multiply(given0), fails),
          at.diagnosticFailing().value(name),
          "diagnostic of " + name);
      assertNear(
          share(u.multiply(works1), works),
          at.diagnosticWorking().value(name),
          "diagnostic working of " + name);
      assertNear(ratio(given0, fails), at.riskAchievementWorth().value(name), "RAW of " + name);
      assertNear(ratio(fails, given1), at.riskReductionWorth().value(name), "RRW of " + name);
    }
    BigDecimal slope = sum(births);
    BigDecimal gain = sum(gains);
    for (int i = 0; i < all.size(); i++) {
      String name = all.names().get(i);
      assertNear(share(births[i], slope), at.differentialUniform().value(name), "DIM " + name);
      assertNear(
          share(gains[i], gain), at.differentialProportional().value(name), "DIM of q " + name);
    }
  }

  private static BigDecimal sum(BigDecimal[] terms) {
    return java.util.Arrays.stream(terms).reduce(BigDecimal.ZERO, BigDecimal::add);
  }

  /** Birnbaum = r(1_i) - r(0_i), and (r(1_i) - r) / q_i; the two worths and criticality agree. */
  @Property(tries = 300)
  void identities_hold(
      @ForAll("structures") Sample sample, @ForAll("probabilities") Probabilities p) {
    ImportanceAtProbabilities at = Importance.of(sample.structure()).given(p);
    var system = sample.structure().compile();
    double total = at.differentialUniform().total().orElseThrow();
    double slope = at.birnbaum().asMap().values().stream().mapToDouble(b -> b).sum();
    assertEquals(slope == 0 ? 0 : 1, total, 1e-14);
    for (String name : system.components()) {
      double up = system.reliability(p.with(name, Probability.CERTAIN)).working();
      double down = system.reliability(p.with(name, Probability.IMPOSSIBLE)).working();
      assertEquals(up - down, at.birnbaum().value(name), 1e-14);
      double criticality = at.criticalityFailing().value(name);
      assertEquals(1 - 1 / at.riskReductionWorth().value(name), criticality, 1e-13);
      double share = slope == 0 ? 0 : at.birnbaum().value(name) / slope;
      assertEquals(share, at.differentialUniform().value(name), 1e-14);
      assertEquals(share, at.differentialUniform().share(name).orElseThrow(), 1e-14);
    }
  }

  /** Critical and failed implies a failed minimal cut set, which implies failed. */
  @Property(tries = 500)
  void measures_areOrderedAsTheoryGuarantees(
      @ForAll("structures") Sample sample, @ForAll("probabilities") Probabilities p) {
    ImportanceAtProbabilities at = Importance.of(sample.structure()).given(p);
    Ranking vesely = at.fussellVesely();
    for (String name : sample.structure().components()) {
      double value = vesely.value(name);
      assertTrue(at.criticalityFailing().value(name) <= value * (1 + 1e-13), name);
      assertTrue(value <= at.diagnosticFailing().value(name) * (1 + 1e-13), name);
      assertTrue(at.riskAchievementWorth().value(name) >= 1);
      assertTrue(at.riskReductionWorth().value(name) >= 1);
    }
  }

  /** In a parallel system of two, each with 1e-9: F = 1e-18. */
  @Test
  void tails_keepTheirDigits() {
    Probabilities p =
        Probabilities.failing(Map.of("a", 1e-9, "b", 2e-9, "c", 1e-3, "d", 1e-10, "e", 3e-10));
    Structure structure = Structure.parse("series(parallel(a, b), parallel(c, series(d, e)))");
    AllStates all =
        new AllStates(
            new org.kingbolt.core.testing.Oracle(
                List.of("a", "b", "c", "d", "e"),
                org.kingbolt.core.testing.TruthTable.of(
                    5, s -> (s & 3) != 0 && ((s & 4) != 0 || (s & 24) == 24))),
            p);
    ImportanceAtProbabilities at = Importance.of(structure).given(p);
    assertEquals(4.00002e-13, all.fails().doubleValue(), 1e-18);
    for (int i = 0; i < 5; i++) {
      String name = all.names().get(i);
      int bit = 1 << i;
      assertNear(
          ratio(all.fails(), all.failsWith(bit)),
          at.riskReductionWorth().value(name),
          "RRW of " + name);
      assertNear(
          ratio(all.failsWithout(bit), all.fails()),
          at.riskAchievementWorth().value(name),
          "RAW of " + name);
    }
  }

  @Test
  void degenerateCases_areNumbers() {
    Structure pair = Structure.parallel("a", "b");
    ImportanceAtProbabilities sure = Importance.of(pair).given(Probabilities.all(1.0));
    assertEquals(0, sure.criticalityFailing().value("a"));
    assertEquals(0, sure.fussellVesely().value("a"));
    assertEquals(0, sure.fussellVeselyRareEvent().value("a"));
    assertEquals(0, sure.diagnosticFailing().value("a"));
    assertEquals(1, sure.riskAchievementWorth().value("a"));
    assertEquals(1, sure.riskReductionWorth().value("a"));
    assertEquals(0, sure.differentialProportional().value("a"));
    ImportanceAtProbabilities oneSure =
        Importance.of(Structure.series("a", "b")).given(Probabilities.all(1.0));
    assertEquals(Double.POSITIVE_INFINITY, oneSure.riskAchievementWorth().value("a"));
    ImportanceAtProbabilities never = Importance.of(pair).given(Probabilities.all(0.0));
    assertEquals(0, never.criticalityWorking().value("a"));
    assertEquals(0, never.diagnosticWorking().value("a"));
    assertEquals(Double.POSITIVE_INFINITY, never.riskReductionWorth().value("a"));
    assertEquals(1, never.riskAchievementWorth().value("a"));
  }

  /** An infinite value stands alone at the top, and is tied to others like it only. */
  @Test
  void infiniteValues_areRankedFirst() {
    Structure structure = Structure.parse("parallel(a, b, series(c, d))");
    Ranking worth =
        Importance.of(structure).given(Probabilities.all(0.5).with("c", 1.0)).riskReductionWorth();
    assertEquals(List.of("a", "b", "d", "c"), names(worth));
    assertEquals(List.of(1, 1, 1, 4), worth.entries().stream().map(e -> e.rank()).toList());
    assertTrue(worth.toString().contains("Infinity"), worth::toString);
  }

  /** A Birnbaum importance below 1e-16 of the system's smaller side. */
  @Test
  void tinyDerivatives_keepTheirDigits() {
    String[] names = IntStream.range(0, 6).mapToObj(i -> "x" + i).toArray(String[]::new);
    Structure structure = Structure.series(Structure.component("w"), Structure.parallel(names));
    Probabilities p =
        Probabilities.all(Probability.failing(1e-6)).with("w", Probability.failing(0.25));
    Ranking ranking = Importance.of(structure).given(p).birnbaum();
    assertNear(0.75 * 1e-30, ranking.value("x3"), "x3");
  }

  @Test
  void tables_showSharesWhereTheyMeanSomething() {
    ImportanceAtProbabilities at =
        Importance.of(Structure.parse("series(pump, parallel(a, b))"))
            .given(Probabilities.all(0.9));
    assertEquals(
        List.of(
            "rank  component  differential importance, uniform   share",
            "   1  pump       8.461538e-01                       84.6%",
            "   2  a          7.692308e-02                        7.7%",
            "   2  b          7.692308e-02                        7.7%"),
        at.differentialUniform().toString().lines().toList());
    assertTrue(at.riskAchievementWorth().share("a").isEmpty());
    assertTrue(at.riskAchievementWorth().total().isEmpty());
    assertTrue(!at.riskAchievementWorth().toString().contains("%"));
  }

  private static List<String> names(Ranking ranking) {
    return ranking.entries().stream().map(Ranking.Entry::component).toList();
  }
}
