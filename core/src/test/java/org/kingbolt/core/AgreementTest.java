package org.kingbolt.core;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;
import static org.kingbolt.core.testing.Close.assertReliability;

import java.math.BigInteger;
import java.util.ArrayList;
import java.util.Collections;
import java.util.List;
import java.util.Random;
import java.util.Set;
import java.util.stream.Collectors;
import java.util.stream.StreamSupport;
import net.jqwik.api.Arbitrary;
import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.Provide;
import org.apache.commons.math3.fraction.BigFraction;
import org.apache.commons.math3.util.CombinatoricsUtils;
import org.kingbolt.core.testing.Oracle;
import org.kingbolt.core.testing.RandomStructures;
import org.kingbolt.core.testing.RandomStructures.Sample;

/** All ways to an answer agree with each other and with the enumeration of all states. */
class AgreementTest {

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
  void engine_agreesWithEveryState(
      @ForAll("structures") Sample sample, @ForAll("probabilities") Probabilities p) {
    assertEngineAgrees(sample, p);
  }

  @Property(tries = 3000)
  void networkEngine_agreesWithEveryState(
      @ForAll("networks") Sample sample, @ForAll("probabilities") Probabilities p) {
    assertEngineAgrees(sample, p);
  }

  private static void assertEngineAgrees(Sample sample, Probabilities p) {
    CoherentSystem system = sample.structure().compile();
    List<String> names = system.components();
    assertEquals(sample.oracle().names(), names);
    for (int state = 0; state < 1 << names.size(); state++) {
      boolean[] working = new boolean[names.size()];
      for (int i = 0; i < working.length; i++) {
        working[i] = (state >>> i & 1) != 0;
      }
      Set<String> set = sample.oracle().set(state);
      assertEquals(sample.oracle().works(set), sample.structure().works(set), set::toString);
      assertEquals(sample.oracle().works(set), system.diagram().works(working), set::toString);
    }
    assertReliability(sample.oracle(), p, system.reliability(p), "diagram");
    assertReliability(sample.oracle(), p, sample.structure().reliability(p), "no diagram");
    assertEquals(sample.oracle().irrelevant(), system.irrelevantComponents());
  }

  @Property(tries = 500)
  void everyOrder_givesTheSameFunction(
      @ForAll("structures") Sample sample,
      @ForAll("probabilities") Probabilities p,
      @ForAll long seed) {
    List<String> order = new ArrayList<>(sample.structure().components());
    Collections.shuffle(order, new Random(seed));
    CoherentSystem system = sample.structure().compile(order, Budget.ofHeap());
    assertEquals(order, system.order());
    assertReliability(sample.oracle(), p, system.reliability(p), "diagram in the order " + order);
    assertEquals(sample.oracle().minimalPaths(), asSet(system.minimalPathSets()));
  }

  @Property(tries = 500)
  void pivot_onEveryComponent_agrees(
      @ForAll("structures") Sample sample, @ForAll("probabilities") Probabilities p) {
    CoherentSystem system = sample.structure().compile();
    for (String component : system.components()) {
      Pivot pivot = system.pivot(component);
      assertReliability(sample.oracle(), p, pivot.reliability(p), "pivot on " + component);
      for (boolean works : new boolean[] {true, false}) {
        CoherentSystem side = works ? pivot.givenWorking() : pivot.givenFailed();
        Probabilities held =
            p.with(component, works ? Probability.CERTAIN : Probability.IMPOSSIBLE);
        assertReliability(sample.oracle(), held, side.reliability(p), component + " held " + works);
        assertEquals(side.structure().components(), side.components());
        assertEquals(side.structure().compile().polynomial(), side.polynomial());
      }
    }
  }

  @Property(tries = 500)
  void derivation_agrees(
      @ForAll("structures") Sample sample, @ForAll("probabilities") Probabilities p) {
    Derivation derivation = Derivation.of(sample.structure());
    assertReliability(sample.oracle(), p, derivation.reliability(p), "derivation");
  }

  @Property(tries = 500)
  void networkDerivation_agrees(
      @ForAll("networks") Sample sample, @ForAll("probabilities") Probabilities p) {
    Derivation derivation = Derivation.of(sample.structure());
    assertReliability(sample.oracle(), p, derivation.reliability(p), "derivation");
  }

  @Property(tries = 1000)
  void minimalSets_areThoseOfTheTruthTable(@ForAll("structures") Sample sample) {
    assertMinimalSets(sample);
  }

  @Property(tries = 500)
  void networkMinimalSets_areThoseOfTheTruthTable(@ForAll("networks") Sample sample) {
    assertMinimalSets(sample);
  }

  private static void assertMinimalSets(Sample sample) {
    CoherentSystem system = sample.structure().compile();
    assertSets(sample.oracle().minimalPaths(), system.minimalPathSets());
    assertSets(sample.oracle().minimalCuts(), system.minimalCutSets());
  }

  private static void assertSets(Set<Set<String>> expected, MinimalSets sets) {
    assertEquals(expected, asSet(sets));
    List<Integer> sizes = sets.stream().map(Set::size).toList();
    assertEquals(expected.size(), sizes.size(), "each set once");
    assertEquals(sizes.stream().sorted().toList(), sizes, "smallest first");
    assertEquals(BigInteger.valueOf(expected.size()), sets.count());
    List<BigInteger> counts = sets.countBySize();
    for (int size = 0; size < counts.size(); size++) {
      int wanted = size;
      long number = expected.stream().filter(set -> set.size() == wanted).count();
      assertEquals(BigInteger.valueOf(number), counts.get(size), "of size " + size);
    }
  }

  @Property(tries = 500)
  void mostProbableSets_areTheBestOfAll(
      @ForAll("structures") Sample sample, @ForAll("probabilities") Probabilities p) {
    CoherentSystem system = sample.structure().compile();
    for (MinimalSets sets : List.of(system.minimalPathSets(), system.minimalCutSets())) {
      List<Double> all =
          sets.stream()
              .map(set -> sets.probability(set, p))
              .sorted(Collections.reverseOrder())
              .toList();
      for (int n : new int[] {0, 1, 3, all.size() + 1}) {
        List<Set<String>> best = sets.mostProbable(n, p);
        assertEquals(Math.min(n, all.size()), best.size());
        for (int i = 0; i < best.size(); i++) {
          double value = sets.probability(best.get(i), p);
          assertEquals(all.get(i), value, 1e-12 * all.get(i), "place " + i);
        }
        assertEquals(best.size(), Set.copyOf(best).size());
      }
    }
  }

  @Property(tries = 300)
  void inclusionAndExclusion_agrees(
      @ForAll("structures") Sample sample, @ForAll("probabilities") Probabilities p) {
    CoherentSystem system = sample.structure().compile();
    List<Set<String>> paths = system.minimalPathSets().stream().toList();
    List<Set<String>> cuts = system.minimalCutSets().stream().toList();
    List<BigInteger> counts = sample.oracle().workingStates();
    BigInteger working = counts.stream().reduce(BigInteger.ZERO, BigInteger::add);
    int n = system.components().size();
    if (paths.size() <= 12) {
      assertEquals(working, statesThatContainAny(paths, n));
    }
    if (cuts.size() <= 12) {
      assertEquals(BigInteger.TWO.pow(n).subtract(working), statesThatContainAny(cuts, n));
    }
  }

  /** Inclusion and exclusion over all selections of sets, by number of states. */
  private static BigInteger statesThatContainAny(List<Set<String>> sets, int components) {
    BigInteger sum = BigInteger.ZERO;
    for (int chosen = 1; chosen < 1 << sets.size(); chosen++) {
      Set<String> union = new java.util.HashSet<>();
      for (int i = 0; i < sets.size(); i++) {
        if ((chosen >>> i & 1) != 0) {
          union.addAll(sets.get(i));
        }
      }
      BigInteger states = BigInteger.TWO.pow(components - union.size());
      sum = sum.add(Integer.bitCount(chosen) % 2 == 1 ? states : states.negate());
    }
    return sum;
  }

  @Property(tries = 500)
  void polynomial_countsTheStates(@ForAll("structures") Sample sample, @ForAll long seed) {
    ReliabilityPolynomial polynomial = sample.structure().compile().polynomial();
    assertEquals(sample.oracle().workingStates(), polynomial.workingStates());
    BigFraction p = new BigFraction(new Random(seed).nextInt(101), 100);
    int n = sample.oracle().names().size();
    BigFraction byCounts = BigFraction.ZERO;
    for (int j = 0; j <= n; j++) {
      byCounts =
          byCounts.add(
              p.pow(j)
                  .multiply(BigFraction.ONE.subtract(p).pow(n - j))
                  .multiply(polynomial.workingStates().get(j)));
    }
    BigFraction byPowers = BigFraction.ZERO;
    for (int j = polynomial.coefficients().size() - 1; j >= 0; j--) {
      byPowers = byPowers.multiply(p).add(polynomial.coefficients().get(j));
    }
    assertEquals(byCounts, byPowers);
    Probability one = Probability.working(p.doubleValue());
    assertReliability(
        sample.oracle(), Probabilities.all(one), polynomial.at(one), "polynomial at " + p);
  }

  @Property(tries = 200)
  void signature_isTheShareOfFailureOrders(@ForAll("structures") Sample sample) {
    Oracle oracle = sample.oracle();
    if (oracle.names().size() > 7) {
      return;
    }
    List<BigFraction> fractions = sample.structure().compile().signature().fractions();
    long[] orders = oracle.orders();
    assertEquals(orders.length, fractions.size());
    long all = CombinatoricsUtils.factorial(orders.length);
    for (int i = 0; i < orders.length; i++) {
      assertEquals(new BigFraction(orders[i]).divide(new BigFraction(all)), fractions.get(i));
    }
    assertEquals(BigFraction.ONE, fractions.stream().reduce(BigFraction.ZERO, BigFraction::add));
  }

  @Property(tries = 300)
  void minimalSets_describeTheSameSystem(@ForAll("structures") Sample sample) {
    CoherentSystem system = sample.structure().compile();
    Set<String> relevant = new java.util.HashSet<>(system.components());
    relevant.removeAll(Set.copyOf(system.irrelevantComponents()));
    List<String> order = system.order().stream().filter(relevant::contains).toList();
    for (Structure again :
        List.of(
            Structure.ofPathSets(system.minimalPathSets().stream().toList()),
            Structure.ofCutSets(system.minimalCutSets().stream().toList()))) {
      CoherentSystem same = again.compile(order, Budget.ofHeap());
      assertEquals(system.diagram().nodeCount(), same.diagram().nodeCount(), "canonical");
      assertTrue(same.irrelevantComponents().isEmpty());
      Probabilities p = Probabilities.all(0.25);
      assertEquals(system.reliability(p).working(), same.reliability(p).working(), 1e-14);
    }
  }

  private static Set<Set<String>> asSet(MinimalSets sets) {
    return StreamSupport.stream(sets.spliterator(), false).collect(Collectors.toSet());
  }
}
