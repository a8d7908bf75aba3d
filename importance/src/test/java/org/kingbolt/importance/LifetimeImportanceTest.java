package org.kingbolt.importance;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Random;
import net.jqwik.api.Arbitrary;
import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.Provide;
import org.apache.commons.math3.distribution.ExponentialDistribution;
import org.apache.commons.math3.distribution.NormalDistribution;
import org.apache.commons.math3.distribution.RealDistribution;
import org.apache.commons.math3.distribution.UniformRealDistribution;
import org.apache.commons.math3.distribution.WeibullDistribution;
import org.apache.commons.math3.fraction.BigFraction;
import org.junit.jupiter.api.Test;
import org.kingbolt.core.Structure;
import org.kingbolt.core.testing.Oracle;
import org.kingbolt.core.testing.RandomStructures;
import org.kingbolt.core.testing.RandomStructures.Sample;

/** Barlow-Proschan and Natvig importance. */
class LifetimeImportanceTest {

  @Provide
  Arbitrary<Sample> structures() {
    return RandomStructures.any();
  }

  /** The signature's form: the orders of failure in which each component is decisive. */
  @Property(tries = 300)
  void alikeLifetimes_countTheOrdersOfFailure(@ForAll("structures") Sample sample) {
    Oracle oracle = sample.oracle();
    int n = oracle.names().size();
    if (n > 6) {
      return;
    }
    long[] decisive = new long[n];
    permute(oracle, (1 << n) - 1, decisive, 1);
    long orders = 0;
    for (long count : decisive) {
      orders += count;
    }
    Map<String, BigFraction> exact = Importance.of(sample.structure()).barlowProschanFractions();
    Ranking rounded = Importance.of(sample.structure()).barlowProschan();
    BigFraction sum = BigFraction.ZERO;
    for (int i = 0; i < n; i++) {
      String name = oracle.names().get(i);
      assertEquals(new BigFraction(decisive[i]).divide(new BigFraction(orders)), exact.get(name));
      assertEquals(exact.get(name).doubleValue(), rounded.value(name), 1e-14);
      sum = sum.add(exact.get(name));
    }
    assertEquals(BigFraction.ONE, sum);
  }

  /** Depth is the number of components; counts the orders of what is left in one step. */
  private static void permute(Oracle oracle, int working, long[] decisive, long ways) {
    for (int i = 0; i < decisive.length; i++) {
      int rest = working & ~(1 << i);
      if (rest == working) {
        continue;
      }
      if (oracle.table().works(rest)) {
        permute(oracle, rest, decisive, ways);
      } else {
        long orders = ways;
        for (int k = 2; k <= Integer.bitCount(rest); k++) {
          orders *= k;
        }
        decisive[i] += orders;
      }
    }
  }

  /** Any lifetimes, as long as they are the same ones. */
  @Property(tries = 30)
  void equalLifetimes_areAlike(@ForAll("structures") Sample sample) {
    Ranking alike = Importance.of(sample.structure()).barlowProschan();
    for (RealDistribution lifetime :
        List.of(
            new ExponentialDistribution(1e6),
            new WeibullDistribution(0.5, 3),
            new UniformRealDistribution(2, 5))) {
      Map<String, RealDistribution> lifetimes = new LinkedHashMap<>();
      sample.structure().components().forEach(name -> lifetimes.put(name, lifetime));
      Ranking ranking = Importance.of(sample.structure()).barlowProschan(lifetimes);
      alike.asMap().forEach((name, value) -> assertEquals(value, ranking.value(name), 1e-10));
      assertEquals(1, ranking.total().orElseThrow(), 1e-10);
    }
  }

  /**
   * Exponential lifetimes: the course of failures is a chain, whose jumps are in proportion to the
   * rates of what still works.
   */
  @Property(tries = 200)
  void exponentialLifetimes_followTheChainOfFailures(
      @ForAll("structures") Sample sample, @ForAll Random random) {
    Oracle oracle = sample.oracle();
    int n = oracle.names().size();
    double[] rate = new double[n];
    Map<String, RealDistribution> lifetimes = new LinkedHashMap<>();
    for (int i = 0; i < n; i++) {
      rate[i] = Math.pow(10, 6 * random.nextDouble() - 3);
      lifetimes.put(oracle.names().get(i), new ExponentialDistribution(1 / rate[i]));
    }
    double[] here = new double[1 << n];
    double[] decisive = new double[n];
    here[here.length - 1] = 1;
    for (int state = here.length - 1; state > 0; state--) {
      double sum = 0;
      for (int i = 0; i < n; i++) {
        sum += (state >>> i & 1) != 0 ? rate[i] : 0;
      }
      for (int i = 0; i < n && oracle.table().works(state); i++) {
        int next = state & ~(1 << i);
        if (next != state) {
          here[next] += here[state] * rate[i] / sum;
          decisive[i] += oracle.table().works(next) ? 0 : here[state] * rate[i] / sum;
        }
      }
    }
    Ranking ranking = Importance.of(sample.structure()).barlowProschan(lifetimes);
    for (int i = 0; i < n; i++) {
      assertEquals(decisive[i], ranking.value(oracle.names().get(i)), 1e-9);
    }
  }

  /**
   * Natvig's for exponential lifetimes with rates L1, L2: in series the gain of component i is the
   * integral of L_i t exp(-(L1+L2)t), so that the shares are as the rates; in parallel it is 1/L_i
   * - L_i/(L1+L2)^2. By hand.
   */
  @Test
  void natvig_ofTwoComponentsIsThatByHand() {
    Map<String, RealDistribution> lifetimes =
        Map.of("a", new ExponentialDistribution(1 / 3.0), "b", new ExponentialDistribution(1));
    Ranking series = Importance.of(Structure.series("a", "b")).natvig(lifetimes);
    assertEquals(0.75, series.value("a"), 1e-10);
    Ranking parallel = Importance.of(Structure.parallel("a", "b")).natvig(lifetimes);
    double a = 1 / 3.0 - 3 / 16.0;
    double b = 1 - 1 / 16.0;
    assertEquals(a / (a + b), parallel.value("a"), 1e-10);
    assertEquals(1, parallel.total().orElseThrow(), 1e-14);
  }

  /**
   * Exponential lifetimes: over the states of the others in which a component decides, the integral
   * of L_i t exp(-L_i t) times the state's probability, multiplied out, is a sum of terms L_i / a^2
   * with rates a.
   */
  @Property(tries = 200)
  void natvig_isTheSumOverDecidingStates(
      @ForAll("structures") Sample sample, @ForAll Random random) {
    Oracle oracle = sample.oracle();
    int n = oracle.names().size();
    if (n > 6) {
      return;
    }
    double[] rate = new double[n];
    Map<String, RealDistribution> lifetimes = new LinkedHashMap<>();
    for (int i = 0; i < n; i++) {
      rate[i] = Math.pow(10, 2 * random.nextDouble() - 1);
      lifetimes.put(oracle.names().get(i), new ExponentialDistribution(1 / rate[i]));
    }
    double[] gain = new double[n];
    double all = 0;
    for (int i = 0; i < n; i++) {
      int bit = 1 << i;
      for (int state = 0; state < 1 << n; state++) {
        if ((state & bit) != 0
            && oracle.table().works(state)
            && !oracle.table().works(state & ~bit)) {
          gain[i] += rate[i] * ofState(rate, state);
        }
      }
      all += gain[i];
    }
    Ranking ranking = Importance.of(sample.structure()).natvig(lifetimes);
    for (int i = 0; i < n; i++) {
      assertEquals(gain[i] / all, ranking.value(oracle.names().get(i)), 1e-9);
    }
  }

  /** The integral of t times the probability of a state at t, by inclusion and exclusion. */
  private static double ofState(double[] rate, int working) {
    int others = ((1 << rate.length) - 1) & ~working;
    double sum = 0;
    for (int part = others; ; part = (part - 1) & others) {
      double a = 0;
      for (int i = 0; i < rate.length; i++) {
        a += ((working | part) >>> i & 1) != 0 ? rate[i] : 0;
      }
      sum += (Integer.bitCount(part) % 2 == 0 ? 1 : -1) / (a * a);
      if (part == 0) {
        return sum;
      }
    }
  }

  /**
   * By hand: once a has failed, at some time in the first second, b decides alone, and S (-ln S) of
   * a uniform lifetime gives a quarter of its width; a decides only after b has begun to fail,
   * which is never. In series it is the other way round.
   */
  @Test
  void natvig_seesNarrowLifetimesFarApart() {
    Structure parallel = Structure.parallel("a", "b");
    Structure series = Structure.series("a", "b");
    for (double width : new double[] {1, 1e-2, 1e-4}) {
      Map<String, RealDistribution> lifetimes =
          Map.of(
              "a", new UniformRealDistribution(1, 1 + width),
              "b", new UniformRealDistribution(100, 100 + width));
      assertEquals(1, Importance.of(parallel).natvig(lifetimes).value("b"), 1e-9);
      assertEquals(1, Importance.of(series).natvig(lifetimes).value("a"), 1e-9);
      Structure both = Structure.parse("series(a, parallel(b, c))");
      Map<String, RealDistribution> three =
          Map.of(
              "a", new UniformRealDistribution(100, 100 + 3 * width),
              "b", new UniformRealDistribution(10, 10 + width),
              "c", new UniformRealDistribution(50, 50 + width));
      assertEquals(1, Importance.of(both).natvig(three).value("c"), 1e-9);
    }
  }

  /** All alike: by symmetry each has the same share, however steep the wear. */
  @Test
  void natvig_takesLifetimesThatEndSteeply() {
    for (RealDistribution steep :
        List.of(new UniformRealDistribution(2, 5), new WeibullDistribution(20, 3))) {
      Map<String, RealDistribution> lifetimes = Map.of("a", steep, "b", steep, "c", steep);
      Ranking ranking = Importance.of(Structure.atLeast(2, "a", "b", "c")).natvig(lifetimes);
      ranking.asMap().values().forEach(value -> assertEquals(1 / 3.0, value, 1e-10));
    }
  }

  @Test
  void badLifetimes_areNamed() {
    Importance pair = Importance.of(Structure.parallel("a", "b"));
    RealDistribution usual = new ExponentialDistribution(2);
    assertMessage(
        "no lifetime for \"b\"; give a distribution for each component",
        () -> pair.barlowProschan(Map.of("a", usual)));
    assertMessage(
        "component \"b\" has failed by time 0 with probability 0.5; a lifetime must be above 0",
        () -> pair.natvig(Map.of("a", usual, "b", new NormalDistribution(0, 1))));
    RealDistribution endless = new org.apache.commons.math3.distribution.ParetoDistribution(1, 0.2);
    IllegalArgumentException bad =
        assertThrows(
            IllegalArgumentException.class, () -> pair.natvig(Map.of("a", endless, "b", endless)));
    assertTrue(bad.getMessage().contains("finite"), bad.getMessage());
  }

  private static void assertMessage(
      String message, org.junit.jupiter.api.function.Executable call) {
    assertEquals(message, assertThrows(IllegalArgumentException.class, call).getMessage());
  }
}
