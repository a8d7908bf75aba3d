package org.kingbolt.core;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.math.BigDecimal;
import java.math.BigInteger;
import java.util.ArrayList;
import java.util.HashSet;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Set;
import java.util.function.BinaryOperator;
import java.util.stream.IntStream;
import java.util.stream.Stream;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.MethodSource;

/** Small tails keep twelve digits by every way of asking; exact values in decimal arithmetic. */
class TwoTailsTest {

  private static final BigDecimal RELATIVE = new BigDecimal("1e-12");

  /** A system of components all alike, and the probability that it fails, without rounding. */
  private record Case(String name, Structure structure, Probability each, BigDecimal failing) {
    @Override
    public String toString() {
      return name;
    }
  }

  private static Case byFailing(
      String name, Structure structure, double q, BinaryOperator<BigDecimal> failing) {
    BigDecimal exact = new BigDecimal(q);
    return new Case(
        name,
        structure,
        Probability.failing(q),
        failing.apply(BigDecimal.ONE.subtract(exact), exact));
  }

  private static Case byWorking(
      String name, Structure structure, double p, BinaryOperator<BigDecimal> working) {
    BigDecimal exact = new BigDecimal(p);
    BigDecimal works = working.apply(exact, BigDecimal.ONE.subtract(exact));
    return new Case(name, structure, Probability.working(p), BigDecimal.ONE.subtract(works));
  }

  private static String[] units(int count) {
    return IntStream.range(0, count).mapToObj(i -> "u" + i).toArray(String[]::new);
  }

  private static Structure pairs(int count) {
    return Structure.series(
        IntStream.range(0, count).mapToObj(i -> Structure.parallel("a" + i, "b" + i)).toList());
  }

  private static Structure bridge() {
    return Structure.network()
        .link("1", "s", "u")
        .link("2", "s", "v")
        .link("3", "u", "v")
        .link("4", "u", "t")
        .link("5", "v", "t")
        .connecting("s", "t");
  }

  private static BigDecimal choose(int n, int k) {
    BigInteger count = BigInteger.ONE;
    for (int i = 0; i < k; i++) {
      count = count.multiply(BigInteger.valueOf(n - i)).divide(BigInteger.valueOf(i + 1));
    }
    return new BigDecimal(count);
  }

  /** The binomial tail: at least k of n. */
  private static BigDecimal atLeast(int k, int n, BigDecimal p, BigDecimal q) {
    BigDecimal sum = BigDecimal.ZERO;
    for (int j = k; j <= n; j++) {
      sum = sum.add(choose(n, j).multiply(p.pow(j)).multiply(q.pow(n - j)));
    }
    return sum;
  }

  /** Of n in a line, j can fail without two neighbours among them in C(n - j + 1, j) ways. */
  private static BigDecimal withoutNeighbours(int n, BigDecimal p, BigDecimal q) {
    BigDecimal sum = BigDecimal.ZERO;
    for (int j = 0; 2 * j <= n + 1; j++) {
      sum = sum.add(choose(n - j + 1, j).multiply(q.pow(j)).multiply(p.pow(n - j)));
    }
    return sum;
  }

  /** Barlow and Proschan 1975, ch. 2; the bridge is its own dual (from memory). */
  private static BigDecimal bridgeFails(BigDecimal q) {
    BigDecimal two = BigDecimal.valueOf(2);
    return two.multiply(q.pow(2))
        .add(two.multiply(q.pow(3)))
        .subtract(BigDecimal.valueOf(5).multiply(q.pow(4)))
        .add(two.multiply(q.pow(5)));
  }

  static Stream<Case> cases() {
    BigDecimal one = BigDecimal.ONE;
    Structure twoOfThree = Structure.atLeast(2, "a", "b", "c");
    return Stream.of(
        byFailing(
            "five pairs", pairs(5), 1e-9, (p, q) -> one.subtract(one.subtract(q.pow(2)).pow(5))),
        byFailing("2 out of 3", twoOfThree, 1e-12, (p, q) -> atLeast(2, 3, q, p)),
        byWorking("2 out of 3, hardly", twoOfThree, 1e-12, (p, q) -> atLeast(2, 3, p, q)),
        byFailing("bridge", bridge(), 1e-9, (p, q) -> bridgeFails(q)),
        byWorking("bridge, hardly", bridge(), 1e-9, (p, q) -> bridgeFails(p)),
        byFailing("bridge, dual", bridge().dual(), 1e-9, (p, q) -> bridgeFails(q)),
        byWorking("series, hardly", Structure.series(units(5)), 1e-12, (p, q) -> p.pow(5)),
        byFailing(
            "series of 300",
            Structure.series(units(300)),
            1e-18,
            (p, q) -> one.subtract(p.pow(300))),
        byWorking(
            "parallel of 300, hardly",
            Structure.parallel(units(300)),
            1e-18,
            (p, q) -> one.subtract(q.pow(300))),
        byFailing("parallel of 20", Structure.parallel(units(20)), 1e-15, (p, q) -> q.pow(20)),
        byFailing(
            "5 out of 9", Structure.atLeast(5, units(9)), 1e-6, (p, q) -> atLeast(5, 9, q, p)),
        byWorking(
            "5 out of 9, hardly",
            Structure.atLeast(5, units(9)),
            1e-10,
            (p, q) -> atLeast(5, 9, p, q)),
        byFailing(
            "neighbours in a line",
            Structure.withoutFailureRun(2, units(20)),
            1e-10,
            (p, q) -> one.subtract(withoutNeighbours(20, p, q))));
  }

  private static void assertClose(BigDecimal failing, Probability actual) {
    BigDecimal working = BigDecimal.ONE.subtract(failing);
    assertDigits(failing, actual.failing());
    assertDigits(working, actual.working());
  }

  private static void assertDigits(BigDecimal exact, double actual) {
    BigDecimal off = new BigDecimal(actual).subtract(exact).abs();
    assertTrue(
        off.compareTo(exact.multiply(RELATIVE)) <= 0,
        () -> "exactly " + exact.doubleValue() + ", computed " + actual);
  }

  @ParameterizedTest
  @MethodSource("cases")
  void reliability(Case one) {
    CoherentSystem system = one.structure.compile();
    assertClose(one.failing, system.reliability(Probabilities.all(one.each)));
  }

  @ParameterizedTest
  @MethodSource("cases")
  void reliabilityOfTheDual(Case one) {
    Probabilities swapped = Probabilities.all(one.each.complement());
    Probability dual = one.structure.dual().compile().reliability(swapped);
    assertClose(one.failing, dual.complement());
  }

  @ParameterizedTest
  @MethodSource("cases")
  void polynomial(Case one) {
    assertClose(one.failing, one.structure.compile().polynomial().at(one.each));
  }

  @ParameterizedTest
  @MethodSource("cases")
  void derivation(Case one) {
    Derivation derivation = Derivation.of(one.structure);
    assertClose(one.failing, derivation.reliability(Probabilities.all(one.each)));
  }

  @ParameterizedTest
  @MethodSource("cases")
  void pivotOnEachComponent(Case one) {
    CoherentSystem system = one.structure.compile();
    Probabilities p = Probabilities.all(one.each);
    for (String component : system.components()) {
      assertClose(one.failing, system.pivot(component).reliability(p));
    }
  }

  @Test
  void leadingTerms() {
    Map<String, Double> leading =
        Map.of("five pairs", 5e-18, "2 out of 3", 3e-24, "bridge", 2e-18, "series of 300", 3e-16);
    for (Case one : cases().filter(each -> leading.containsKey(each.name)).toList()) {
      double first = leading.getOrDefault(one.name, 0.0);
      Probability computed = one.structure.compile().reliability(Probabilities.all(one.each));
      assertEquals(first, computed.failing(), 1e-8 * first, one.name);
      assertEquals(1, computed.working(), 1e-15, one.name);
    }
  }

  /** The sum over all states, which is the definition. */
  private static BigDecimal failingByStates(Structure structure, Map<String, BigDecimal> q) {
    List<String> names = new ArrayList<>(q.keySet());
    BigDecimal sum = BigDecimal.ZERO;
    for (int state = 0; state < 1 << names.size(); state++) {
      Set<String> working = new HashSet<>();
      BigDecimal weight = BigDecimal.ONE;
      for (int i = 0; i < names.size(); i++) {
        BigDecimal failing = q.getOrDefault(names.get(i), BigDecimal.ZERO);
        boolean works = (state >> i & 1) == 1;
        weight = weight.multiply(works ? BigDecimal.ONE.subtract(failing) : failing);
        if (works) {
          working.add(names.get(i));
        }
      }
      sum = structure.works(working) ? sum : sum.add(weight);
    }
    return sum;
  }

  /** Shared components, and failing probabilities from 1e-3 down to 1e-14. */
  @Test
  void unequalComponents() {
    Structure structure =
        Structure.parse(
            "series(parallel(a, series(b, c)), atLeast(2, a, d, e), parallel(series(d, f), b),"
                + " network(link(g, s, u), link(h, s, v), link(i, u, v), link(a, u, t),"
                + " link(j, v, t), node(v, k), connecting(s, t)))");
    Map<String, BigDecimal> exact = new LinkedHashMap<>();
    Map<String, Double> failing = new LinkedHashMap<>();
    for (int i = 0; i < structure.components().size(); i++) {
      double q = Math.pow(10, -3 - i) * (1 + i / 7.0);
      exact.put(structure.components().get(i), new BigDecimal(q));
      failing.put(structure.components().get(i), q);
    }
    BigDecimal fails = failingByStates(structure, exact);
    Probabilities p = Probabilities.failing(failing);
    CoherentSystem system = structure.compile();
    assertClose(fails, system.reliability(p));
    assertClose(fails, Derivation.of(structure).reliability(p));
    for (String component : system.components()) {
      assertClose(fails, system.pivot(component).reliability(p));
    }
  }
}
