package org.kingbolt.core;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTimeoutPreemptively;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.math.BigDecimal;
import java.time.Duration;
import java.util.ArrayList;
import java.util.Collections;
import java.util.LinkedHashSet;
import java.util.List;
import java.util.Random;
import java.util.Set;
import net.jqwik.api.Arbitrary;
import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.Provide;
import net.jqwik.api.constraints.IntRange;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.ValueSource;
import org.kingbolt.core.diagram.WorkMeter;
import org.kingbolt.core.testing.RandomStructures;
import org.kingbolt.core.testing.RandomStructures.Sample;

/** Both ends of a probability, where diagrams may not be as large as they would have to be. */
class BracketTest {

  private record Bracket(
      double worksAtLeast, double failsAtMost, double worksAtMost, double failsAtLeast) {}

  /** What rounding may do, relative to an end. */
  private static final double ROUNDING = 1e-12;

  @Provide
  Arbitrary<Sample> samples() {
    return RandomStructures.any();
  }

  @Provide
  Arbitrary<Probabilities> registers() {
    return RandomStructures.probabilities();
  }

  private static Bracket bracket(Structure structure, Probabilities p, long effort) {
    double[] ends = Compilation.between(structure, p, effort, WorkMeter.UNLIMITED);
    return new Bracket(ends[0], ends[1], ends[2], ends[3]);
  }

  private static void assertHolds(Bracket bracket, BigDecimal works, BigDecimal fails) {
    assertAtMost(bracket.worksAtLeast(), works, bracket);
    assertAtMost(bracket.failsAtLeast(), fails, bracket);
    assertAtLeast(bracket.worksAtMost(), works, bracket);
    assertAtLeast(bracket.failsAtMost(), fails, bracket);
  }

  private static void assertAtMost(double end, BigDecimal value, Bracket bracket) {
    BigDecimal lowered = new BigDecimal(end).multiply(new BigDecimal(1 - ROUNDING));
    assertTrue(lowered.compareTo(value) <= 0, () -> value.doubleValue() + " in " + bracket);
  }

  private static void assertAtLeast(double end, BigDecimal value, Bracket bracket) {
    BigDecimal raised = new BigDecimal(end).multiply(new BigDecimal(1 + ROUNDING));
    assertTrue(raised.compareTo(value) >= 0, () -> value.doubleValue() + " in " + bracket);
  }

  @Property(tries = 3_000)
  void everyStructure_liesBetweenTheEnds(
      @ForAll("samples") Sample sample,
      @ForAll("registers") Probabilities p,
      @ForAll @IntRange(min = 1, max = 30) int effort) {
    assertHolds(
        bracket(sample.structure(), p, effort), sample.oracle().works(p), sample.oracle().fails(p));
  }

  /** Subsystems in the given part of a structure, drawn from components with many uses. */
  private static List<Structure> subsystems(
      int components, double shared, int from, int to, long seed) {
    Random random = new Random(seed);
    List<String> uses = new ArrayList<>();
    for (int i = 0; i < components; i++) {
      int places = i < shared * components ? 2 + random.nextInt(3) : 1;
      uses.addAll(Collections.nCopies(places, "c" + i));
    }
    Collections.shuffle(uses, random);
    List<Structure> subsystems = new ArrayList<>();
    for (int at = 0; at < uses.size(); ) {
      int end = Math.min(uses.size(), at + from + random.nextInt(to - from + 1));
      subsystems.add(subsystem(uses.subList(at, end), random));
      at = end;
    }
    return List.copyOf(new LinkedHashSet<>(subsystems));
  }

  /** Two-out-of-three or parallel, over parts of a few components each. */
  private static Structure subsystem(List<String> uses, Random random) {
    int branches = Math.min(3, uses.size());
    Set<Structure> parts = new LinkedHashSet<>();
    for (int i = 0; i < branches; i++) {
      List<String> some =
          uses.subList(i * uses.size() / branches, (i + 1) * uses.size() / branches);
      String[] names = new LinkedHashSet<>(some).toArray(new String[0]);
      boolean series = random.nextInt(3) > 0;
      parts.add(series ? Structure.series(names) : Structure.atLeast(1 + names.length / 2, names));
    }
    List<Structure> distinct = List.copyOf(parts);
    int k = random.nextInt(3) == 0 ? 1 : Math.min(2, distinct.size());
    return Structure.atLeast(k, distinct);
  }

  private static Probabilities between(double least, double most, Structure structure, long seed) {
    Random random = new Random(seed);
    Probabilities p = Probabilities.all(0.5);
    for (String name : structure.components()) {
      double fails = least * Math.pow(most / least, random.nextDouble());
      p = p.with(name, Probability.failing(fails));
    }
    return p;
  }

  private static double gap(Bracket bracket) {
    return bracket.failsAtMost() / bracket.failsAtLeast() - 1;
  }

  /** With a few shared components in each, so that all can be compiled and compared. */
  @ParameterizedTest
  @CsvSource({"1e-3, 1e-2", "1e-2, 0.3", "1e-9, 1e-7", "0.3, 0.9"})
  void moderateSystems_lieBetweenTheEnds(double least, double most) {
    for (int seed = 0; seed < 40; seed++) {
      List<Structure> parts = subsystems(24, 0.4, 4, 9, seed);
      Structure series = Structure.series(parts);
      int half = parts.size() / 2;
      Structure trains =
          Structure.parallel(
              Structure.series(parts.subList(0, half)),
              Structure.series(parts.subList(half, parts.size())));
      for (Structure structure :
          List.of(series, trains, series.dual(), Structure.atLeast(2, parts))) {
        Probabilities p = between(least, most, structure, seed);
        Probability exact = structure.compile().reliability(p);
        for (long effort : new long[] {6, 40, 200}) {
          assertHolds(
              bracket(structure, p, effort),
              new BigDecimal(exact.working()),
              new BigDecimal(exact.failing()));
        }
      }
    }
  }

  @Test
  void enoughEffort_isExact() {
    Structure structure = Structure.series(subsystems(24, 0.4, 4, 9, 5));
    Probabilities p = between(1e-3, 1e-2, structure, 5);
    Bracket bracket = bracket(structure, p, 1_000_000);
    Probability exact = structure.reliability(p);
    assertEquals(exact.failing(), bracket.failsAtLeast());
    assertEquals(exact.failing(), bracket.failsAtMost());
    assertEquals(exact.working(), bracket.worksAtLeast());
    assertEquals(exact.working(), bracket.worksAtMost());
  }

  /** Blocks that share nothing with each other, mixed together in one series: a product. */
  @Test
  void mixedBlocks_lieBetweenTheEnds() {
    List<Structure> mixed = new ArrayList<>();
    double works = 1;
    double fails = 0;
    Probabilities p = Probabilities.all(0.5);
    for (int block = 0; block < 60; block++) {
      String[] n = new String[7];
      for (int i = 0; i < n.length; i++) {
        n[i] = "b" + block + "." + i;
        p = p.with(n[i], Probability.failing(1e-3 * (1 + (block + 3 * i) % 10)));
      }
      List<Structure> parts =
          List.of(
              Structure.atLeast(2, n[0], n[1], n[2]),
              Structure.parallel(n[0], n[3]),
              Structure.atLeast(2, n[3], n[4], n[5], n[6]),
              Structure.parallel(n[2], n[6]));
      mixed.addAll(parts);
      Probability one = Structure.series(parts).compile().reliability(p);
      fails += works * one.failing();
      works *= one.working();
    }
    Collections.shuffle(mixed, new Random(1));
    Structure structure = Structure.series(mixed);
    for (long effort : new long[] {20, 100, 300}) {
      Bracket bracket = bracket(structure, p, effort);
      assertHolds(bracket, new BigDecimal(works), new BigDecimal(fails));
      assertTrue(gap(bracket) < 0.02, bracket::toString);
    }
    assertTrue(gap(bracket(structure, p, 300)) < 1e-5);
  }

  private static Structure trains(int needed, int trains, List<Structure> parts) {
    List<Structure> all = new ArrayList<>();
    for (int i = 0; i < trains; i++) {
      all.add(
          Structure.series(
              parts.subList(i * parts.size() / trains, (i + 1) * parts.size() / trains)));
    }
    return Structure.atLeast(needed, all);
  }

  /** 2,000 components, 400 of them in two to four places anywhere. */
  @ParameterizedTest
  @ValueSource(ints = {1, 2, 3})
  void largeSystems_areWithinOnePercent(int kind) {
    List<Structure> parts = subsystems(2_000, 0.2, 10, 20, kind);
    Structure structure =
        switch (kind) {
          case 1 -> Structure.series(parts);
          case 2 -> trains(1, 2, parts);
          default -> trains(2, 3, parts);
        };
    Probabilities p = between(1e-3, 1e-2, structure, kind);
    Bracket fine = bracket(structure, p, 10_000);
    assertTrue(gap(fine) >= 0 && gap(fine) < 0.01, fine::toString);
    Bracket coarse = bracket(structure, p, 500);
    assertTrue(coarse.failsAtLeast() <= fine.failsAtMost(), coarse + " and " + fine);
    assertTrue(coarse.failsAtMost() >= fine.failsAtLeast(), coarse + " and " + fine);
    assertEquals(coarse, bracket(structure, p, 500), "the same every time");
  }

  /** A redundant system of very good parts keeps its digits on both ends. */
  @Test
  void smallTails_keepTheirDigits() {
    List<Structure> parts = subsystems(600, 0.2, 10, 20, 9);
    Structure structure = trains(1, 2, parts);
    Probabilities p = between(1e-6, 1e-5, structure, 9);
    Bracket bracket = bracket(structure, p, 5_000);
    assertTrue(bracket.failsAtMost() < 1e-9 && bracket.failsAtLeast() > 0, bracket::toString);
    assertTrue(gap(bracket) >= 0 && gap(bracket) < 0.001, bracket::toString);
  }

  @Test
  void deepNesting_takesNoStack() {
    List<String> names = new ArrayList<>();
    for (int i = 0; i < 20_000; i++) {
      names.add("c" + i % 9_000);
    }
    Collections.shuffle(names, new Random(3));
    Structure deep = Structure.component("last");
    for (int i = 0; i < names.size(); i++) {
      Structure one = Structure.component(names.get(i));
      deep = i % 2 == 0 ? Structure.series(one, deep) : Structure.parallel(one, deep);
    }
    Structure structure = deep;
    Probabilities p = Probabilities.all(0.9);
    Bracket bracket =
        assertTimeoutPreemptively(Duration.ofSeconds(60), () -> bracket(structure, p, 300));
    assertTrue(bracket.worksAtLeast() <= bracket.worksAtMost(), bracket::toString);
  }

  private static final class Stopped extends RuntimeException {
    private static final long serialVersionUID = 1L;
  }

  /** Whenever the meter ends the work, it ends. */
  @Test
  void meter_endsTheWork() {
    Structure structure = trains(1, 2, subsystems(200, 0.2, 10, 20, 4));
    Probabilities p = between(1e-3, 1e-2, structure, 4);
    long[] calls = {0};
    Compilation.between(structure, p, 300, held -> calls[0]++);
    long all = calls[0];
    assertTrue(all > 10_000);
    for (int part = 1; part < 10; part++) {
      long last = all * part / 10;
      calls[0] = 0;
      assertThrows(
          Stopped.class,
          () ->
              Compilation.between(
                  structure,
                  p,
                  300,
                  held -> {
                    if (++calls[0] > last) {
                      throw new Stopped();
                    }
                  }));
      assertArrayEquals(new long[] {last + 1}, calls);
    }
  }
}
