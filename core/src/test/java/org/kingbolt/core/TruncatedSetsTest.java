package org.kingbolt.core;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.math.BigDecimal;
import java.math.MathContext;
import java.util.HashSet;
import java.util.List;
import java.util.Set;
import java.util.stream.Collectors;
import net.jqwik.api.Arbitrary;
import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.Provide;
import net.jqwik.api.constraints.DoubleRange;
import net.jqwik.api.constraints.IntRange;
import org.kingbolt.core.testing.Oracle;
import org.kingbolt.core.testing.RandomStructures;
import org.kingbolt.core.testing.RandomStructures.Sample;

/** Truncated families against all states of random structures. */
class TruncatedSetsTest {

  private static final MathContext PRECISION = new MathContext(60);

  @Provide
  Arbitrary<Sample> structures() {
    return RandomStructures.any();
  }

  @Provide
  Arbitrary<Sample> networks() {
    return RandomStructures.networks();
  }

  @Provide
  Arbitrary<Probabilities> probabilities() {
    return RandomStructures.probabilities();
  }

  @Property(tries = 2000)
  void structures_agreeBySize(
      @ForAll("structures") Sample sample,
      @ForAll @IntRange(min = 1, max = 5) int size,
      @ForAll("probabilities") Probabilities p) {
    assertBySize(sample, size, p);
  }

  @Property(tries = 1500)
  void networks_agreeBySize(
      @ForAll("networks") Sample sample,
      @ForAll @IntRange(min = 1, max = 5) int size,
      @ForAll("probabilities") Probabilities p) {
    assertBySize(sample, size, p);
  }

  private static void assertBySize(Sample sample, int size, Probabilities p) {
    for (boolean paths : List.of(true, false)) {
      TruncatedSets sets = truncated(sample, paths, CutOff.size(size));
      Set<Set<String>> expected =
          minimal(sample, paths).stream()
              .filter(set -> set.size() <= size)
              .collect(Collectors.toSet());
      assertEquals(expected, listed(sets));
      assertBounds(sample, paths, sets, expected, p, sets.discarded(p));
    }
  }

  @Property(tries = 1000)
  void structures_agreeByProbability(
      @ForAll("structures") Sample sample,
      @ForAll @DoubleRange(min = 0, max = 12) double decades,
      @ForAll("probabilities") Probabilities p,
      @ForAll("probabilities") Probabilities other) {
    assertByProbability(sample, Math.pow(10, -decades), p, other);
  }

  @Property(tries = 1000)
  void networks_agreeByProbability(
      @ForAll("networks") Sample sample,
      @ForAll @DoubleRange(min = 0, max = 12) double decades,
      @ForAll("probabilities") Probabilities p,
      @ForAll("probabilities") Probabilities other) {
    assertByProbability(sample, Math.pow(10, -decades), p, other);
  }

  private static void assertByProbability(
      Sample sample, double threshold, Probabilities p, Probabilities other) {
    for (boolean paths : List.of(true, false)) {
      TruncatedSets sets = truncated(sample, paths, CutOff.probability(threshold, p));
      Set<Set<String>> expected =
          minimal(sample, paths).stream()
              .filter(set -> all(set, p, paths).compareTo(new BigDecimal(threshold)) >= 0)
              .collect(Collectors.toSet());
      assertEquals(expected, listed(sets));
      assertBounds(sample, paths, sets, expected, p, sets.discarded());
      assertBounds(sample, paths, sets, expected, other, sets.discarded(other));
    }
  }

  private static TruncatedSets truncated(Sample sample, boolean paths, CutOff cutOff) {
    Structure structure = sample.structure();
    return paths ? structure.minimalPathSets(cutOff) : structure.minimalCutSets(cutOff);
  }

  private static Set<Set<String>> minimal(Sample sample, boolean paths) {
    return paths ? sample.oracle().minimalPaths() : sample.oracle().minimalCuts();
  }

  private static Set<Set<String>> listed(TruncatedSets sets) {
    List<Set<String>> list = sets.stream().toList();
    Set<Set<String>> found = new HashSet<>(list);
    assertEquals(list.size(), found.size(), "a set is listed twice");
    return found;
  }

  private static BigDecimal all(Set<String> set, Probabilities p, boolean working) {
    BigDecimal product = BigDecimal.ONE;
    for (String name : set) {
      Probability value = p.get(name);
      product = product.multiply(new BigDecimal(working ? value.working() : value.failing()));
    }
    return product;
  }

  /** Against the sum over all states in question. */
  private static void assertBounds(
      Sample sample,
      boolean paths,
      TruncatedSets sets,
      Set<Set<String>> listed,
      Probabilities p,
      double bound) {
    Oracle oracle = sample.oracle();
    Set<String> all = new HashSet<>(oracle.names());
    BigDecimal missed = BigDecimal.ZERO;
    for (int state = 0; state < 1 << all.size(); state++) {
      Set<String> working = oracle.set(state);
      Set<String> failed = new HashSet<>(all);
      failed.removeAll(working);
      Set<String> decides = paths ? working : failed;
      if (oracle.works(working) == paths && listed.stream().noneMatch(decides::containsAll)) {
        BigDecimal mass = all(working, p, true).multiply(all(failed, p, false));
        missed = missed.add(mass, PRECISION);
      }
    }
    BigDecimal exact = missed;
    assertTrue(
        bound == 1 || (bound < 1 && exact.compareTo(new BigDecimal(bound)) <= 0),
        () -> "left out " + exact.doubleValue() + ", bound " + bound + ", " + oracle.shown(p));
    boolean isAll = listed.equals(minimal(sample, paths));
    assertTrue(isAll || !sets.isComplete(), "something was left out");
    if (sets.isComplete()) {
      assertEquals(0, bound, "nothing was left out");
    }
  }
}
