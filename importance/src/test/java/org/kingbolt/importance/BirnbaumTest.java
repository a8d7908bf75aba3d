package org.kingbolt.importance;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.math.BigDecimal;
import java.util.Arrays;
import java.util.List;
import java.util.Map;
import net.jqwik.api.Arbitrary;
import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.Provide;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.function.Executable;
import org.kingbolt.core.CoherentSystem;
import org.kingbolt.core.Probabilities;
import org.kingbolt.core.Probability;
import org.kingbolt.core.Structure;
import org.kingbolt.core.testing.Close;
import org.kingbolt.core.testing.RandomStructures;
import org.kingbolt.core.testing.RandomStructures.Sample;

/** Birnbaum importance against all states, and the ranking that it comes as. */
class BirnbaumTest {

  @Provide
  Arbitrary<Sample> structures() {
    return RandomStructures.any();
  }

  @Provide
  Arbitrary<Probabilities> probabilities() {
    return RandomStructures.probabilities();
  }

  @Property(tries = 1000)
  void birnbaum_isTheProbabilityOfDeciding(
      @ForAll("structures") Sample sample, @ForAll("probabilities") Probabilities p) {
    Ranking ranking = Importance.of(sample.structure()).given(p).birnbaum();
    for (String name : sample.structure().components()) {
      BigDecimal exact = sample.oracle().decides(name, p);
      assertTrue(
          Close.isClose(exact, ranking.value(name)),
          () -> name + ": exactly " + exact.doubleValue() + ", computed " + ranking.value(name));
    }
  }

  @Property(tries = 300)
  void structural_isTheShareOfStatesDecided(@ForAll("structures") Sample sample) {
    Ranking ranking = Importance.of(sample.structure()).structural();
    for (String name : sample.structure().components()) {
      BigDecimal exact = sample.oracle().decides(name, Probabilities.all(0.5));
      assertEquals(exact.doubleValue(), ranking.value(name), name);
    }
  }

  @Property(tries = 300)
  void entries_areRankedByValue(
      @ForAll("structures") Sample sample, @ForAll("probabilities") Probabilities p) {
    List<Ranking.Entry> entries = Importance.of(sample.structure()).given(p).birnbaum().entries();
    assertEquals(sample.structure().components().size(), entries.size());
    for (int i = 1; i < entries.size(); i++) {
      Ranking.Entry before = entries.get(i - 1);
      Ranking.Entry entry = entries.get(i);
      assertTrue(before.value() >= entry.value() * (1 - 1e-11));
      assertTrue(entry.rank() == before.rank() || entry.rank() == i + 1, entry::toString);
    }
  }

  /** In a series the other members must work, in a parallel all others must have failed. */
  @Test
  void smallValues_keepTheirDigits() {
    Probabilities p = Probabilities.all(Probability.failing(1e-9));
    Ranking parallel = Importance.of(Structure.parallel("a", "b", "c")).given(p).birnbaum();
    assertEquals(1e-18, parallel.value("a"), 1e-31);
    Ranking nested =
        Importance.of(Structure.series(Structure.parallel("b", "c"), Structure.component("a")))
            .given(
                Probabilities.all(Probability.failing(1e-9)).with("a", Probability.failing(1e-3)))
            .birnbaum();
    assertEquals(0.999 * 1e-9, nested.value("b"), 1e-22);
    assertEquals(1 - 1e-18, nested.value("a"), 1e-16);
  }

  @Test
  void irrelevantComponents_haveNone() {
    Structure structure = Structure.ofPathSets(List.of(List.of("a"), List.of("a", "b")));
    Ranking ranking = Importance.of(structure).given(Probabilities.all(0.9)).birnbaum();
    assertEquals(0.0, ranking.value("b"));
    assertEquals(1.0, ranking.value("a"));
  }

  @Test
  void ranking_listsTies_andTheTop() {
    Ranking ranking =
        Importance.of(Structure.atLeast(2, "a", "b", "c")).given(Probabilities.all(0.9)).birnbaum();
    assertEquals(List.of(1, 1, 1), ranking.entries().stream().map(Ranking.Entry::rank).toList());
    assertEquals(2, ranking.top(2).size());
    assertEquals(3, ranking.top(10).size());
    assertEquals(3, ranking.asMap().size());
    assertTrue(ranking.toString().contains("1.800000e-01"), ranking::toString);
    assertFalse(ranking.measure().isBlank());
  }

  @Test
  void badInput_isNamed() {
    Structure pair = Structure.parallel("pumpA", "pumpB");
    IllegalArgumentException missing =
        assertThrows(
            IllegalArgumentException.class,
            () -> Importance.of(pair).given(Probabilities.working(Map.of("pumpA", 0.5))));
    assertTrue(missing.getMessage().contains("\"pumpB\""), missing.getMessage());
    Ranking ranking = Importance.of(pair).structural();
    IllegalArgumentException unknown =
        assertThrows(IllegalArgumentException.class, () -> ranking.value("pumpC"));
    assertEquals(
        "unknown component \"pumpC\"; the ranking holds \"pumpA\", \"pumpB\"; name one of these",
        unknown.getMessage());
    assertThrows(IllegalArgumentException.class, () -> ranking.top(-1));
  }

  @Test
  void unknownComponent_amongMany() {
    String[] names = new String[1000];
    Arrays.setAll(names, i -> "u" + i);
    Ranking ranking = Importance.of(Structure.series(names)).structural();
    String message =
        assertThrows(IllegalArgumentException.class, () -> ranking.value("x")).getMessage();
    assertTrue(message.contains("\"u0\", \"u1\""), message);
    assertTrue(message.contains("\"u11\" and 988 more; name one of these"), message);
  }

  private static void assertNullRefused(String message, Executable call) {
    assertEquals(message, assertThrows(NullPointerException.class, call).getMessage());
  }

  @Test
  void nullArguments_areNamed() {
    Structure pair = Structure.series("a", "b");
    assertNullRefused(
        "structure is null; give a structure, or a system compiled from one",
        () -> Importance.of((Structure) null));
    assertNullRefused(
        "system is null; give a compiled system, or a structure to compile",
        () -> Importance.of((CoherentSystem) null));
    assertNullRefused(
        "probabilities are null; give those of all components, such as Probabilities.all(0.9)",
        () -> Importance.of(pair).given(null));
    assertNullRefused(
        "component is null; give the name of one ranked",
        () -> Importance.of(pair).structural().value(null));
    assertNullRefused("component is null; give its name", () -> new Ranking.Entry(1, null, 0.5));
  }
}
