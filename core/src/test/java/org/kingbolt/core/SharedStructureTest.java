package org.kingbolt.core;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertNotEquals;
import static org.junit.jupiter.api.Assertions.assertTimeoutPreemptively;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.time.Duration;
import java.util.ArrayList;
import java.util.List;
import java.util.Random;
import java.util.function.Supplier;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

/** Parts that stand in many places: as one object, and as equal copies. */
class SharedStructureTest {

  private static <T> T soon(Supplier<T> work) {
    return assertTimeoutPreemptively(Duration.ofSeconds(20), work::get);
  }

  /** Each level uses the one below twice. */
  private static Structure tower(String bottom, int levels) {
    Structure whole = Structure.component(bottom);
    for (int i = 0; i < levels; i++) {
      whole = level(whole, "a" + i, "b" + i);
    }
    return whole;
  }

  private static Structure level(Structure below, String a, String b) {
    return Structure.series(
        Structure.parallel(below, Structure.component(a)),
        Structure.parallel(below, Structure.component(b)));
  }

  @ParameterizedTest
  @ValueSource(ints = {40, 50_000})
  void equality_ofSharedParts(int levels) {
    Structure one = tower("x", levels);
    Structure other = tower("x", levels);
    assertTrue(soon(() -> one.equals(other)));
    assertFalse(soon(() -> one.equals(tower("y", levels))));
  }

  /** The names have the same hash code. */
  @Test
  void equality_seesThroughHashes() {
    Structure one = tower("Aa", 5_000);
    Structure other = tower("BB", 5_000);
    assertEquals(one.hashCode(), other.hashCode());
    assertFalse(soon(() -> one.equals(other)));
  }

  /** So few names that equal parts arise by chance. */
  private static Structure random(long seed, String... names) {
    Random random = new Random(seed);
    List<Structure> parts = new ArrayList<>();
    for (String name : names) {
      parts.add(Structure.component(name));
    }
    while (parts.size() < 16) {
      Structure left = parts.get(random.nextInt(parts.size()));
      Structure right = parts.get(random.nextInt(parts.size()));
      if (!left.toString().equals(right.toString())) {
        parts.add(Structure.series(left, right));
      }
    }
    return parts.get(parts.size() - 1);
  }

  @Test
  void equality_isThatOfText() {
    int equal = 0;
    int sameHash = 0;
    for (long seed = 0; seed < 20_000; seed++) {
      Structure one = random(seed, "Aa", "Aa", "BB", "BB", "c", "c");
      for (Structure other :
          List.of(
              random(seed, "Aa", "Aa", "BB", "BB", "c", "c"),
              random(seed, "BB", "BB", "Aa", "Aa", "c", "c"),
              random(seed, "Aa", "BB", "BB", "BB", "c", "c"),
              random(seed + 1, "Aa", "Aa", "BB", "BB", "c", "c"),
              Structure.parse(one.toString()))) {
        boolean sameText = one.toString().equals(other.toString());
        assertEquals(sameText, one.equals(other), () -> one + " and " + other);
        equal += sameText ? 1 : 0;
        sameHash += one.hashCode() == other.hashCode() ? 1 : 0;
      }
    }
    assertTrue(equal > 40_000, "equal " + equal);
    assertTrue(sameHash > equal + 20_000, "same hash code " + sameHash);
  }

  private static Structure ladder(int depth) {
    Structure whole = Structure.component("x0");
    for (int i = 1; i <= depth; i++) {
      Structure next = Structure.component("x" + i);
      whole = i % 2 == 0 ? Structure.series(whole, next) : Structure.parallel(whole, next);
    }
    return whole;
  }

  private static Structure twoUses(Structure one, Structure other) {
    return Structure.parallel(
        Structure.series(one, Structure.component("p")),
        Structure.series(other, Structure.component("q")));
  }

  @Test
  void copiesOfADeepPart_compileAsOne() {
    Structure module = ladder(60_000);
    CoherentSystem shared = twoUses(module, module).compile();
    Structure copied = Structure.parse(twoUses(module, module).toString());
    assertEquals(shared.diagram(), soon(() -> copied.compile()).diagram());
    assertEquals(shared, soon(() -> copied.compile()));
  }

  @Test
  void partsAlikeButForTheirParts_areKeptApart() {
    Structure one = twoUses(Structure.parallel("Aa", "c"), Structure.parallel("BB", "c"));
    Structure other = twoUses(Structure.parallel("Aa", "c"), Structure.parallel("Aa", "c"));
    assertEquals(one.hashCode(), other.hashCode());
    Probabilities p = Probabilities.all(0.5).with("BB", 0).with("c", 0);
    assertEquals(0.25, one.compile().reliability(p).working());
    assertEquals(0.375, other.compile().reliability(p).working());
    assertNotEquals(one.compile(), other.compile());
  }

  @Test
  void derivation_ofSharedParts() {
    Structure whole = Structure.component("x");
    for (int i = 0; i < 40; i++) {
      whole = level(whole, "a" + i % 10, "b" + i % 10);
    }
    Structure structure = whole;
    Derivation derivation = soon(() -> Derivation.of(structure));
    Probability engine = structure.compile().reliability(0.3);
    Probability formula = derivation.reliability(Probabilities.all(0.3));
    assertEquals(engine.working(), formula.working(), 1e-13 * engine.working());
  }

  @Test
  void derivation_opensSharedGatesOnce() {
    Structure whole = Structure.component("x");
    for (int i = 0; i < 60; i++) {
      whole =
          Structure.series(
              Structure.series(whole, Structure.component("a" + i)),
              Structure.series(whole, Structure.component("b" + i)));
    }
    Structure structure = whole;
    Derivation derivation = soon(() -> Derivation.of(structure));
    assertEquals(121, derivation.formula().split("·", -1).length);
  }
}
