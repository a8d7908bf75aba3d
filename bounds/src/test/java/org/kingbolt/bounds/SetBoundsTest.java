package org.kingbolt.bounds;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;
import static org.kingbolt.bounds.Holds.assertHolds;

import java.util.ArrayList;
import java.util.Collection;
import java.util.Collections;
import java.util.List;
import java.util.Random;
import java.util.Set;
import java.util.SplittableRandom;
import net.jqwik.api.Arbitraries;
import net.jqwik.api.Arbitrary;
import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.Provide;
import org.junit.jupiter.api.Test;
import org.kingbolt.core.Budget;
import org.kingbolt.core.Probabilities;
import org.kingbolt.core.Probability;
import org.kingbolt.core.testing.Oracle;
import org.kingbolt.core.testing.RandomStructures;
import org.kingbolt.core.testing.RandomStructures.Sample;

/** Families that are complete, or cut off: what holds then, and what says nothing. */
class SetBoundsTest {

  private static final List<Set<String>> CUTS =
      List.of(Set.of("1", "2"), Set.of("4", "5"), Set.of("1", "3", "5"), Set.of("2", "3", "4"));
  private static final List<Set<String>> PATHS =
      List.of(Set.of("1", "4"), Set.of("2", "5"), Set.of("1", "3", "5"), Set.of("2", "3", "4"));

  @Provide
  Arbitrary<Sample> structures() {
    return RandomStructures.any();
  }

  @Provide
  Arbitrary<Probabilities> probabilities() {
    return RandomStructures.probabilities();
  }

  @Provide
  Arbitrary<Long> seeds() {
    return Arbitraries.longs().map(seed -> new SplittableRandom(seed).nextLong());
  }

  private static List<Interval> all(SetBoundsAtProbabilities bounds) {
    return List.of(
        bounds.minMax(),
        bounds.frechet(),
        bounds.linearProgramming(),
        bounds.esaryProschan(),
        bounds.inclusionExclusion(1),
        bounds.inclusionExclusion(2),
        bounds.secondOrder());
  }

  /** The union of some sets, by all states, is no larger than the sum over them. */
  private static double sum(Collection<Set<String>> sets, Probabilities p, boolean paths) {
    double sum = 0;
    for (Set<String> set : sets) {
      double product = 1;
      for (String name : set) {
        product *= paths ? p.get(name).working() : p.get(name).failing();
      }
      sum += product;
    }
    return Math.min(1, sum * (1 + 1e-12));
  }

  @Property(tries = 500)
  void cutOffFamilies_holdTheExactFigure(
      @ForAll("structures") Sample sample,
      @ForAll("probabilities") Probabilities p,
      @ForAll("seeds") long seed) {
    Oracle oracle = sample.oracle();
    Random random = new Random(seed);
    List<Set<String>> paths = new ArrayList<>(oracle.minimalPaths());
    List<Set<String>> cuts = new ArrayList<>(oracle.minimalCuts());
    Collections.shuffle(paths, random);
    Collections.shuffle(cuts, random);
    int keptPaths = random.nextInt(paths.size() + 1);
    int keptCuts = Math.max(keptPaths == 0 ? 1 : 0, random.nextInt(cuts.size() + 1));
    SetBoundsAtProbabilities unknown =
        Bounds.ofSets(paths.subList(0, keptPaths), cuts.subList(0, keptCuts)).given(p);
    for (Interval interval : all(unknown)) {
      assertHolds(oracle, p, interval);
    }
    assertEquals(Probability.IMPOSSIBLE, unknown.esaryProschan().lower());
    assertEquals(Probability.CERTAIN, unknown.esaryProschan().upper());
    double restOfPaths = sum(paths.subList(keptPaths, paths.size()), p, true);
    double restOfCuts = sum(cuts.subList(keptCuts, cuts.size()), p, false);
    SetBoundsAtProbabilities known =
        unknown.discarding(
            keptPaths == 0 ? Math.max(restOfPaths, 1e-300) : restOfPaths,
            keptCuts == 0 ? Math.max(restOfCuts, 1e-300) : restOfCuts);
    for (Interval interval :
        List.of(
            known.minMax(),
            known.frechet(),
            known.esaryProschan(),
            known.inclusionExclusion(1),
            known.inclusionExclusion(2),
            known.secondOrder())) {
      assertHolds(oracle, p, interval);
    }
  }

  @Property(tries = 300)
  void completeFamilies_giveTheIntervalsOfTheSystem(
      @ForAll("structures") Sample sample, @ForAll("probabilities") Probabilities p) {
    SetBoundsAtProbabilities sets =
        Bounds.ofSets(sample.oracle().minimalPaths(), sample.oracle().minimalCuts())
            .given(p)
            .complete();
    BoundsAtProbabilities system = Bounds.of(sample.structure()).given(p);
    assertNear(system.minMax(), sets.minMax());
    assertNear(system.frechet(), sets.frechet());
    assertNear(system.esaryProschan(), sets.esaryProschan());
    assertNear(system.inclusionExclusion(2), sets.inclusionExclusion(2));
    assertNear(system.linearProgramming(), sets.linearProgramming());
  }

  private static void assertNear(Interval one, Interval other) {
    assertEquals(one.lower().working(), other.lower().working(), 1e-9);
    assertEquals(one.upper().working(), other.upper().working(), 1e-9);
    double most = one.lower().failing();
    assertEquals(most, other.lower().failing(), 1e-7 * most);
  }

  /** Of the cut sets alone, the two of two links: what is left out adds 2 q^3 at most. */
  @Test
  void bridge_cutOff_statesTheValidSide() {
    Probabilities p = Probabilities.all(Probability.failing(1e-6));
    SetBoundsAtProbabilities some = Bounds.ofSets(List.of(), CUTS.subList(0, 2)).given(p);
    Interval cutOff = some.secondOrder();
    assertEquals(2e-12, cutOff.upper().failing(), 1e-23);
    assertEquals(Probability.IMPOSSIBLE, cutOff.lower());
    assertTrue(cutOff.reason().contains("the family is cut off"), cutOff::reason);
    Interval bounded = some.discarding(1, 2e-18).secondOrder();
    assertEquals(2e-12 + 2e-18, bounded.lower().failing(), 2e-23);
    assertTrue(bounded.reason().contains("probability discarded"), bounded::reason);
    Interval product = some.discarding(1, 2e-18).esaryProschan();
    assertEquals(2e-12 + 2e-18, product.lower().failing(), 2e-23);
    assertEquals(Probability.CERTAIN, product.upper());
  }

  @Test
  void table_listsTheMethodsForSets() {
    SetBounds bridge = Bounds.ofSets(PATHS, CUTS);
    BoundsTable table = bridge.given(Probabilities.all(0.9)).complete().all(Budget.ofNodes(10_000));
    assertEquals(6, table.rows().size(), table::toString);
    assertEquals(List.of(), table.leftOut());
    assertEquals(
        "SetBounds[4 path sets, 4 cut sets]; call given(probabilities)", bridge.toString());
  }

  @Test
  void badSets_areNamed() {
    assertRefused("no path sets and no cut sets", List.of(), List.of());
    assertRefused("path set 2 is empty", List.of(List.of("a"), List.of()), List.of());
    assertRefused("cut set 1 names component \"a\" twice", List.of(), List.of(List.of("a", "a")));
    assertRefused("a name is blank", List.of(List.of(" ")), List.of());
    assertRefused(
        "path set 1 and cut set 2 have no component in common",
        List.of(List.of("a", "b")),
        List.of(List.of("b"), List.of("c")));
    SetBoundsAtProbabilities onlyCuts =
        Bounds.ofSets(List.of(), CUTS).given(Probabilities.all(0.9));
    assertTrue(
        assertThrows(IllegalArgumentException.class, onlyCuts::complete)
            .getMessage()
            .startsWith("there are no path sets, so they are not complete"));
    for (double discarded : new double[] {-1, 2, Double.NaN}) {
      assertThrows(IllegalArgumentException.class, () -> onlyCuts.discarding(1, discarded));
    }
    assertThrows(
        IllegalArgumentException.class,
        () -> Bounds.ofSets(PATHS, CUTS).given(Probabilities.working(java.util.Map.of("1", 0.5))));
  }

  private static void assertRefused(
      String message, List<List<String>> paths, List<List<String>> cuts) {
    String found =
        assertThrows(IllegalArgumentException.class, () -> Bounds.ofSets(paths, cuts)).getMessage();
    assertTrue(found.contains(message), found);
  }
}
