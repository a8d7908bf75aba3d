package org.kingbolt.importance;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;
import static org.kingbolt.importance.AllStates.assertNear;
import static org.kingbolt.importance.AllStates.share;

import java.math.BigDecimal;
import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Set;
import net.jqwik.api.Arbitrary;
import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.Provide;
import org.junit.jupiter.api.Test;
import org.kingbolt.core.Budget;
import org.kingbolt.core.BudgetExceededException;
import org.kingbolt.core.MinimalSets;
import org.kingbolt.core.Probabilities;
import org.kingbolt.core.Structure;
import org.kingbolt.core.published.Families;
import org.kingbolt.core.testing.RandomStructures;
import org.kingbolt.core.testing.RandomStructures.Sample;

/** Fussell-Vesely and cut-set importance against all states and all minimal cut sets. */
class FussellVeselyTest {

  @Provide
  Arbitrary<Sample> structures() {
    return RandomStructures.any();
  }

  @Provide
  Arbitrary<Probabilities> probabilities() {
    return RandomStructures.probabilities();
  }

  @Property(tries = 700)
  void exact_isTheUnionOfTheCutSets(
      @ForAll("structures") Sample sample, @ForAll("probabilities") Probabilities p) {
    AllStates all = new AllStates(sample.oracle(), p);
    List<Integer> cuts = masks(all);
    Ranking ranking = Importance.of(sample.structure()).given(p).fussellVesely();
    BigDecimal fails = all.fails();
    for (int i = 0; i < all.size(); i++) {
      int bit = 1 << i;
      BigDecimal union =
          all.probability(s -> cuts.stream().anyMatch(cut -> (cut & bit) != 0 && (cut & s) == 0));
      String name = all.names().get(i);
      assertNear(share(union, fails), ranking.value(name), name);
    }
  }

  @Property(tries = 300)
  void exactOfGroups_isTheUnionOfTheCutSets(
      @ForAll("structures") Sample sample, @ForAll("probabilities") Probabilities p) {
    AllStates all = new AllStates(sample.oracle(), p);
    List<Integer> cuts = masks(all);
    Map<String, Set<String>> groups = new LinkedHashMap<>();
    for (int mask = 1; mask < 1 << all.size(); mask += 3) {
      groups.put("" + mask, all.oracle().set(mask));
    }
    GroupImportance at = Importance.of(sample.structure()).given(p).groups(groups);
    Ranking exact = at.fussellVesely();
    Ranking rare = at.fussellVeselyRareEvent();
    BigDecimal fails = all.fails();
    for (String group : groups.keySet()) {
      int mask = Integer.parseInt(group);
      BigDecimal union =
          all.probability(s -> cuts.stream().anyMatch(cut -> (cut & mask) != 0 && (cut & s) == 0));
      assertNear(share(union, fails), exact.value(group), group);
      assertNear(share(sum(all, cuts, mask), sum(all, cuts, -1)), rare.value(group), group);
    }
  }

  @Property(tries = 300)
  void rareEvent_isTheRatioOfSums(
      @ForAll("structures") Sample sample, @ForAll("probabilities") Probabilities p) {
    AllStates all = new AllStates(sample.oracle(), p);
    List<Integer> cuts = masks(all);
    Ranking ranking = Importance.of(sample.structure()).given(p).fussellVeselyRareEvent();
    for (int i = 0; i < all.size(); i++) {
      String name = all.names().get(i);
      BigDecimal exact = share(sum(all, cuts, 1 << i), sum(all, cuts, -1));
      assertNear(exact, ranking.value(name), name);
    }
  }

  @Property(tries = 300)
  void cutSets_areGivenFailure(
      @ForAll("structures") Sample sample, @ForAll("probabilities") Probabilities p) {
    AllStates all = new AllStates(sample.oracle(), p);
    CutSetImportance ranking = Importance.of(sample.structure()).given(p).cutSets(1000);
    assertEquals(masks(all).size(), ranking.entries().size());
    double before = 2;
    for (CutSetImportance.Entry entry : ranking.entries()) {
      int mask = mask(all, entry.members());
      BigDecimal failed = all.probability(s -> (s & mask) == 0);
      assertNear(failed, entry.probability(), entry.toString());
      assertNear(share(failed, all.fails()), entry.givenFailure(), entry.toString());
      assertTrue(entry.probability() <= before * (1 + 1e-11), entry::toString);
      before = entry.probability();
    }
  }

  private static BigDecimal sum(AllStates all, List<Integer> cuts, int members) {
    return cuts.stream()
        .filter(cut -> (cut & members) != 0)
        .map(cut -> all.probability(s -> (s & cut) == 0))
        .reduce(BigDecimal.ZERO, BigDecimal::add);
  }

  private static List<Integer> masks(AllStates all) {
    List<Integer> masks = new ArrayList<>();
    all.oracle().minimalCuts().forEach(cut -> masks.add(mask(all, cut)));
    return masks;
  }

  private static int mask(AllStates all, Set<String> set) {
    return set.stream().mapToInt(name -> 1 << all.names().indexOf(name)).sum();
  }

  /** A grid of five by five, whose cut sets are summed one by one. */
  @Test
  void rareEvent_ofAGridIsThatOfItsListedCutSets() {
    Structure grid = Families.corners(5);
    Probabilities p = Probabilities.all(0.97).with("r0c0-r0c1", 0.9);
    MinimalSets cuts = grid.compile().minimalCutSets();
    double all = 0;
    double with = 0;
    for (Set<String> cut : cuts) {
      double probability = cuts.probability(cut, p);
      all += probability;
      with += cut.contains("r0c0-r0c1") ? probability : 0;
    }
    Ranking ranking = Importance.of(grid).given(p).fussellVeselyRareEvent();
    assertEquals(with / all, ranking.value("r0c0-r0c1"), 1e-12);
  }

  @Test
  void tooLargeUnions_pointToTheRareEventForm() {
    ImportanceAtProbabilities at = Importance.of(Families.corners(6)).given(Probabilities.all(0.9));
    BudgetExceededException stopped =
        assertThrows(BudgetExceededException.class, () -> at.fussellVesely(Budget.ofNodes(20_000)));
    assertEquals(BudgetExceededException.Limit.NODES, stopped.limit());
    assertTrue(
        stopped.getMessage().contains("fussellVeselyRareEvent() is far cheaper"),
        stopped.getMessage());
  }

  @Test
  void interrupts_endTheWork() {
    ImportanceAtProbabilities at = Importance.of(Families.corners(6)).given(Probabilities.all(0.9));
    Thread.currentThread().interrupt();
    try {
      BudgetExceededException stopped =
          assertThrows(BudgetExceededException.class, () -> at.fussellVesely());
      assertEquals(BudgetExceededException.Limit.INTERRUPT, stopped.limit());
    } finally {
      assertTrue(Thread.interrupted());
    }
  }
}
