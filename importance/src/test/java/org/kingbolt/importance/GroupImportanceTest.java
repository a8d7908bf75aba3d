package org.kingbolt.importance;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;
import static org.kingbolt.importance.AllStates.assertNear;
import static org.kingbolt.importance.AllStates.ratio;
import static org.kingbolt.importance.AllStates.share;

import java.math.BigDecimal;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Set;
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

/** Groups moved together, against all states. */
class GroupImportanceTest {

  @Provide
  Arbitrary<Sample> structures() {
    return RandomStructures.any();
  }

  @Provide
  Arbitrary<Probabilities> probabilities() {
    return RandomStructures.probabilities();
  }

  @Property(tries = 400)
  void groups_areAsDefined(
      @ForAll("structures") Sample sample, @ForAll("probabilities") Probabilities p) {
    AllStates all = new AllStates(sample.oracle(), p);
    Map<String, Set<String>> groups = new LinkedHashMap<>();
    for (int mask = 1; mask < 1 << all.size(); mask += 1 + mask / 3) {
      groups.put("" + mask, all.oracle().set(mask));
    }
    GroupImportance at = Importance.of(sample.structure()).given(p).groups(groups);
    BigDecimal fails = all.fails();
    for (String group : groups.keySet()) {
      int mask = Integer.parseInt(group);
      BigDecimal decides =
          all.probability(s -> all.table().works(s | mask) && !all.table().works(s & ~mask));
      BigDecimal repaired =
          all.probability(s -> !all.table().works(s) && all.table().works(s | mask));
      BigDecimal stopped =
          all.probability(s -> all.table().works(s) && !all.table().works(s & ~mask));
      BigDecimal allFailed = all.probability(s -> (s & mask) == 0 && !all.table().works(s));
      BigDecimal allWork = all.probability(s -> (s & mask) == mask && all.table().works(s));
      assertNear(decides, at.birnbaum().value(group), "Birnbaum of " + group);
      assertNear(repaired, at.improvementPotential().value(group), "potential of " + group);
      assertNear(
          share(repaired, fails), at.criticalityFailing().value(group), "criticality of " + group);
      assertNear(
          share(stopped, all.works()),
          at.criticalityWorking().value(group),
          "criticality working of " + group);
      assertNear(
          ratio(all.failsWithout(mask), fails), at.riskAchievementWorth().value(group), "RAW");
      assertNear(ratio(fails, all.failsWith(mask)), at.riskReductionWorth().value(group), "RRW");
      assertNear(share(allFailed, fails), at.diagnosticFailing().value(group), "diagnostic");
      assertNear(share(allWork, all.works()), at.diagnosticWorking().value(group), "its twin");
    }
  }

  /** A group of one is a component, in every measure. */
  @Property(tries = 200)
  void groupOfOne_isItsComponent(
      @ForAll("structures") Sample sample, @ForAll("probabilities") Probabilities p) {
    ImportanceAtProbabilities at = Importance.of(sample.structure()).given(p);
    Map<String, List<String>> groups = new LinkedHashMap<>();
    sample.structure().components().forEach(name -> groups.put(name, List.of(name)));
    GroupImportance grouped = at.groups(groups);
    assertSame(at.birnbaum(), grouped.birnbaum());
    assertSame(at.criticalityFailing(), grouped.criticalityFailing());
    assertSame(at.fussellVesely(), grouped.fussellVesely());
    assertSame(at.fussellVeselyRareEvent(), grouped.fussellVeselyRareEvent());
    assertSame(at.riskAchievementWorth(), grouped.riskAchievementWorth());
    assertSame(at.differentialUniform(), grouped.differentialUniform());
    assertSame(at.differentialProportional(), grouped.differentialProportional());
    assertSame(at.diagnosticFailing(), grouped.diagnosticFailing());
  }

  private static void assertSame(Ranking components, Ranking groups) {
    components.asMap().forEach((name, value) -> assertNear(value, groups.value(name), name));
  }

  @Property(tries = 100)
  void jointImportance_isTheAlternatingSum(
      @ForAll("structures") Sample sample, @ForAll("probabilities") Probabilities p) {
    AllStates all = new AllStates(sample.oracle(), p);
    if (all.size() < 3) {
      return;
    }
    int first = 0b101;
    int second = ((1 << all.size()) - 1) & ~first;
    GroupImportance at =
        Importance.of(sample.structure())
            .given(p)
            .groups(Map.of("G", all.oracle().set(first), "H", all.oracle().set(second)));
    double both = all.probability(s -> all.table().works(first | second)).doubleValue();
    double one = all.probability(s -> all.table().works(first)).doubleValue();
    double other = all.probability(s -> all.table().works(second)).doubleValue();
    double none = all.probability(s -> all.table().works(0)).doubleValue();
    assertEquals(both - one - other + none, at.jointImportance("G", "H"), 1e-12);
  }

  /** Losing digits by differences would leave nothing of 1e-24. */
  @Test
  void smallDifferences_keepTheirDigits() {
    Structure structure = Structure.parse("series(w, parallel(a, b, c))");
    Probabilities p =
        Probabilities.all(Probability.failing(1e-8)).with("w", Probability.failing(0.25));
    GroupImportance at = Importance.of(structure).given(p).groups(Map.of("G", Set.of("a", "b")));
    assertNear(0.75e-8, at.birnbaum().value("G"), "Birnbaum");
    assertNear(0.75e-24, at.improvementPotential().value("G"), "potential");
  }

  @Test
  void badInput_isNamed() {
    ImportanceAtProbabilities at =
        Importance.of(Structure.parallel("a", "b")).given(Probabilities.all(0.9));
    assertMessage("there are no groups; give at least one", () -> at.groups(Map.of()));
    assertMessage(
        "group \"bus\" is empty; name at least one component",
        () -> at.groups(Map.of("bus", List.of())));
    assertMessage(
        "group \"bus\" names \"a\" twice; name it once",
        () -> at.groups(Map.of("bus", List.of("a", "a"))));
    assertMessage(
        "unknown component \"c\"; the components are \"a\", \"b\"; name one of these",
        () -> at.groups(Map.of("bus", List.of("c"))));
    GroupImportance overlapping =
        at.groups(new java.util.TreeMap<>(Map.of("one", Set.of("a"), "two", Set.of("a", "b"))));
    assertMessage(
        "groups \"one\" and \"two\" share component \"a\"; name groups that share none",
        () -> overlapping.jointImportance("one", "two"));
    assertMessage(
        "unknown group \"three\"; the groups are \"one\", \"two\"; name one of these",
        () -> overlapping.jointImportance("one", "three"));
    assertTrue(overlapping.toString().contains("\"one\", \"two\""));
  }

  private static void assertMessage(
      String message, org.junit.jupiter.api.function.Executable call) {
    assertEquals(message, assertThrows(IllegalArgumentException.class, call).getMessage());
  }
}
