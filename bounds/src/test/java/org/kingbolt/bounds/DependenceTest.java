package org.kingbolt.bounds;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;
import static org.kingbolt.bounds.Holds.assertHolds;

import java.math.BigDecimal;
import java.util.ArrayList;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.Random;
import java.util.SplittableRandom;
import net.jqwik.api.Arbitraries;
import net.jqwik.api.Arbitrary;
import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.Provide;
import org.apache.commons.math3.optim.MaxIter;
import org.apache.commons.math3.optim.linear.LinearConstraint;
import org.apache.commons.math3.optim.linear.LinearConstraintSet;
import org.apache.commons.math3.optim.linear.LinearObjectiveFunction;
import org.apache.commons.math3.optim.linear.NonNegativeConstraint;
import org.apache.commons.math3.optim.linear.Relationship;
import org.apache.commons.math3.optim.linear.SimplexSolver;
import org.apache.commons.math3.optim.nonlinear.scalar.GoalType;
import org.junit.jupiter.api.Test;
import org.kingbolt.core.Budget;
import org.kingbolt.core.BudgetExceededException;
import org.kingbolt.core.Probabilities;
import org.kingbolt.core.Probability;
import org.kingbolt.core.Structure;
import org.kingbolt.core.testing.Oracle;
import org.kingbolt.core.testing.RandomStructures;
import org.kingbolt.core.testing.RandomStructures.Sample;

/** Components that depend on each other, the truth found by going through all states. */
class DependenceTest {

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

  /** How often each state occurs, in whole numbers, and what follows. */
  private static final class Joint {
    private final Oracle oracle;
    private final long[] weights;

    Joint(Oracle oracle, long[] weights) {
      this.oracle = oracle;
      this.weights = weights;
    }

    BigDecimal chance(java.util.function.IntPredicate event) {
      long sum = 0;
      long total = 0;
      for (int state = 0; state < weights.length; state++) {
        total += weights[state];
        sum += event.test(state) ? weights[state] : 0;
      }
      return new BigDecimal(sum).divide(new BigDecimal(total), new java.math.MathContext(60));
    }

    Probabilities marginals() {
      Map<String, Probability> p = new HashMap<>();
      for (int i = 0; i < oracle.names().size(); i++) {
        int bit = 1 << i;
        p.put(
            oracle.names().get(i),
            Probability.of(
                chance(state -> (state & bit) != 0).doubleValue(),
                chance(state -> (state & bit) == 0).doubleValue()));
      }
      return Probabilities.of(p);
    }

    void assertHeldBy(Interval interval) {
      // marginals are rounded to doubles, so that the ends may be off by as much
      BigDecimal works = chance(oracle.table()::works);
      BigDecimal off = new BigDecimal("1e-14");
      assertTrue(works.add(off).compareTo(new BigDecimal(interval.lower().working())) >= 0);
      assertTrue(works.subtract(off).compareTo(new BigDecimal(interval.upper().working())) <= 0);
    }
  }

  @Property(tries = 500)
  void anyDependence_isHeldByIntervalsWithoutAssumption(
      @ForAll("structures") Sample sample, @ForAll("seeds") long seed) {
    Random random = new Random(seed);
    long[] weights = new long[1 << sample.oracle().names().size()];
    int few = 1 + random.nextInt(weights.length);
    for (int i = 0; i < few; i++) {
      weights[random.nextInt(weights.length)] += 1 + random.nextInt(1000);
    }
    Joint joint = new Joint(sample.oracle(), weights);
    BoundsAtProbabilities bounds = Bounds.of(sample.structure()).given(joint.marginals());
    for (Interval interval : List.of(bounds.frechet(), bounds.linearProgramming())) {
      assertEquals(Assumption.NONE, interval.assumption());
      joint.assertHeldBy(interval);
    }
  }

  /** Each component works while one of a few independent sources does, or while all of them do. */
  @Property(tries = 500)
  void associatedComponents_areHeldByMinMax(
      @ForAll("structures") Sample sample, @ForAll("seeds") long seed) {
    Random random = new Random(seed);
    int sources = 1 + random.nextInt(8);
    int components = sample.oracle().names().size();
    int[] needs = new int[components];
    boolean[] any = new boolean[components];
    for (int i = 0; i < components; i++) {
      needs[i] = 1 + random.nextInt((1 << sources) - 1);
      any[i] = random.nextBoolean();
    }
    int[] sixteenths = new int[sources];
    for (int s = 0; s < sources; s++) {
      sixteenths[s] = 1 + random.nextInt(15);
    }
    long[] weights = new long[1 << components];
    for (int up = 0; up < 1 << sources; up++) {
      long weight = 1;
      for (int s = 0; s < sources; s++) {
        weight *= (up >>> s & 1) != 0 ? sixteenths[s] : 16 - sixteenths[s];
      }
      int state = 0;
      for (int i = 0; i < components; i++) {
        int found = up & needs[i];
        state |= (any[i] ? found != 0 : found == needs[i]) ? 1 << i : 0;
      }
      weights[state] += weight;
    }
    Joint joint = new Joint(sample.oracle(), weights);
    BoundsAtProbabilities bounds = Bounds.of(sample.structure()).given(joint.marginals());
    assertEquals(Assumption.ASSOCIATED, bounds.minMax().assumption());
    for (Interval interval :
        List.of(bounds.minMax(), bounds.frechet(), bounds.linearProgramming())) {
      joint.assertHeldBy(interval);
    }
  }

  /** Two of three that never fail two at a time: the figure is outside, and the label says why. */
  @Test
  void intervalsForIndependence_areLabelled_andMayMissDependentComponents() {
    Structure structure = Structure.atLeast(2, "a", "b", "c");
    BoundsAtProbabilities bounds = Bounds.of(structure).given(Probabilities.all(0.9));
    for (Interval interval :
        List.of(
            bounds.esaryProschan(),
            bounds.modular(),
            bounds.secondOrder(),
            bounds.inclusionExclusion(3))) {
      assertEquals(Assumption.INDEPENDENT, interval.assumption());
      assertTrue(interval.toString().contains("independent components"));
      assertTrue(interval.upper().working() < 1);
    }
    assertEquals(1, bounds.linearProgramming().upper().working());
    assertTrue(bounds.minMax().upper().working() < 1, "such components are not associated");
  }

  /** The linear program in full: a variable for every state, a constraint for every component. */
  @Property(tries = 300)
  void linearProgramming_isThatOverAllStates(
      @ForAll("structures") Sample sample, @ForAll("seeds") long seed) {
    Random random = new Random(seed);
    Probabilities p = Probabilities.all(0.5);
    List<String> names = sample.oracle().names();
    for (String name : names) {
      p = p.with(name, Math.round(1000 * random.nextDouble()) / 1000.0);
    }
    Interval interval = Bounds.of(sample.structure()).given(p).linearProgramming();
    assertEquals(extreme(sample.oracle(), p, GoalType.MINIMIZE), interval.lower().working(), 1e-7);
    assertEquals(extreme(sample.oracle(), p, GoalType.MAXIMIZE), interval.upper().working(), 1e-7);
    assertTrue(!interval.reason().contains("not proven"), interval::reason);
  }

  private static double extreme(Oracle oracle, Probabilities p, GoalType goal) {
    int n = oracle.names().size();
    double[] works = new double[1 << n];
    double[] ones = new double[1 << n];
    List<LinearConstraint> constraints = new ArrayList<>();
    for (int state = 0; state < 1 << n; state++) {
      works[state] = oracle.table().works(state) ? 1 : 0;
      ones[state] = 1;
    }
    constraints.add(new LinearConstraint(ones, Relationship.EQ, 1));
    for (int i = 0; i < n; i++) {
      double[] up = new double[1 << n];
      for (int state = 0; state < 1 << n; state++) {
        up[state] = state >>> i & 1;
      }
      constraints.add(
          new LinearConstraint(up, Relationship.EQ, p.get(oracle.names().get(i)).working()));
    }
    return new SimplexSolver()
        .optimize(
            new MaxIter(100_000),
            new LinearObjectiveFunction(works, 0),
            new LinearConstraintSet(constraints),
            goal,
            new NonNegativeConstraint(true))
        .getValue();
  }

  /**
   * Ford and Fulkerson, Canad. J. Math. 8 (1956) 399 (from memory): as many paths as the smallest
   * cut has links, so that between two terminals no bound is better than Fréchet's.
   */
  @Property(tries = 200)
  void twoTerminalNetworks_attainTheBoundsOfFrechet(@ForAll("seeds") long seed) {
    Random random = new Random(seed);
    org.kingbolt.core.NetworkBuilder network = Structure.network();
    Probabilities p = Probabilities.all(0.5);
    int nodes = 3 + random.nextInt(4);
    for (int node = 1; node < nodes; node++) {
      network = network.link("tree" + node, "" + node, "" + random.nextInt(node));
      p = p.with("tree" + node, random.nextDouble());
    }
    for (int i = 0; i < 6; i++) {
      int from = random.nextInt(nodes);
      int to = (from + 1 + random.nextInt(nodes - 1)) % nodes;
      network = network.link("link" + i, "" + from, "" + to);
      p = p.with("link" + i, random.nextDouble());
    }
    BoundsAtProbabilities bounds = Bounds.of(network.connecting("0", "" + (nodes - 1))).given(p);
    Interval frechet = bounds.frechet();
    Interval best = bounds.linearProgramming();
    assertEquals(frechet.lower().working(), best.lower().working(), 1e-12);
    assertEquals(frechet.upper().working(), best.upper().working(), 1e-12);
    assertTrue(!best.reason().contains("not proven"), best::reason);
  }

  /** As for structures that cannot be compiled: any minimal path and cut do, if not as well. */
  @Property(tries = 500)
  void setsFoundWithoutADiagram_areMinimal_andGiveWiderIntervals(
      @ForAll("structures") Sample sample, @ForAll("probabilities") Probabilities p) {
    BudgetExceededException over =
        assertThrows(BudgetExceededException.class, () -> Budget.ofNodes(1).start("testing").at(2));
    List<String> names = sample.structure().components();
    Families found =
        new FoundFamilies(
            sample.structure(), new ComponentValues(names, p.forComponents(names)), over);
    for (boolean paths : new boolean[] {true, false}) {
      java.util.Set<String> set = new java.util.HashSet<>();
      for (int i : found.mostProbable(paths, Budget.ofHeap().start("searching")).orElseThrow()) {
        set.add(names.get(i));
      }
      Oracle oracle = sample.oracle();
      assertTrue((paths ? oracle.minimalPaths() : oracle.minimalCuts()).contains(set));
    }
    BoundsAtProbabilities bounds = Bounds.of(sample.structure()).given(p);
    Interval minMax = MinMax.of(found, Budget.ofHeap(), new Effort());
    Interval frechet = Frechet.of(found, Budget.ofHeap(), new Effort());
    assertHolds(sample.oracle(), p, minMax);
    assertHolds(sample.oracle(), p, frechet);
    Holds.assertWithin(bounds.minMax(), minMax);
    Holds.assertWithin(bounds.frechet(), frechet);
  }

  /** Independent components are associated, and depend in one way of all. */
  @Property(tries = 500)
  void independentComponents_areHeldByAll(
      @ForAll("structures") Sample sample, @ForAll("probabilities") Probabilities p) {
    BoundsAtProbabilities bounds = Bounds.of(sample.structure()).given(p);
    for (Interval interval :
        List.of(bounds.minMax(), bounds.frechet(), bounds.linearProgramming())) {
      assertHolds(sample.oracle(), p, interval);
    }
  }
}
