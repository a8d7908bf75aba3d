package org.kingbolt.core;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.Arrays;
import java.util.HashSet;
import java.util.List;
import java.util.Set;
import net.jqwik.api.Arbitrary;
import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.Provide;
import net.jqwik.api.constraints.IntRange;
import org.junit.jupiter.api.Test;
import org.kingbolt.core.diagram.Diagram;
import org.kingbolt.core.testing.RandomStructures;
import org.kingbolt.core.testing.RandomStructures.Sample;

/** The structure function in arrays, and the diagrams on both sides of it, in every state. */
class StateEvaluatorTest {

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

  @Property(tries = 500)
  void structures_areEvaluated(@ForAll("structures") Sample sample) {
    assertRight(sample.structure(), sample, false);
    assertRight(sample.structure().dual(), sample, true);
  }

  @Property(tries = 1000)
  void networks_areEvaluated(@ForAll("networks") Sample sample) {
    assertRight(sample.structure(), sample, false);
    assertRight(sample.structure().dual(), sample, true);
  }

  private static void assertRight(Structure structure, Sample sample, boolean dual) {
    StateEvaluator evaluator = StateEvaluator.of(structure);
    assertEquals(structure.components(), evaluator.components());
    int n = evaluator.components().size();
    for (int state = 0; state < 1 << n; state++) {
      boolean[] working = working(state, n);
      boolean expected = sample.oracle().works(set(evaluator.components(), working, dual)) != dual;
      assertEquals(expected, evaluator.works(working), () -> structure.toString());
    }
  }

  /** After any number of steps the one diagram is below the structure and the other one above. */
  @Property(tries = 1000)
  void sides_areBelowAndAbove(
      @ForAll("networks") Sample sample,
      @ForAll("probabilities") Probabilities p,
      @ForAll @IntRange(min = 1, max = 60) int effort,
      @ForAll @IntRange(min = 0, max = 4) int steps) {
    for (Structure structure : List.of(sample.structure(), sample.structure().dual())) {
      Enclosure enclosure = Enclosure.of(structure, p, Budget.ofNodes(1_000_000), effort);
      for (int step = 0; step < steps; step++) {
        enclosure.narrow();
      }
      Diagram less = enclosure.lessWorking(Budget.ofHeap());
      Diagram more = enclosure.moreWorking(Budget.ofHeap());
      StateEvaluator evaluator = StateEvaluator.of(structure);
      int n = structure.components().size();
      for (int state = 0; state < 1 << n; state++) {
        boolean[] working = working(state, n);
        boolean works = evaluator.works(working);
        assertTrue(works || !less.works(working), "works where the structure fails");
        assertTrue(!works || more.works(working), "fails where the structure works");
        if (enclosure.isExact()) {
          assertEquals(works, less.works(working));
          assertEquals(works, more.works(working));
        }
      }
    }
  }

  private static boolean[] working(int state, int n) {
    boolean[] working = new boolean[n];
    for (int i = 0; i < n; i++) {
      working[i] = (state >>> i & 1) != 0;
    }
    return working;
  }

  private static Set<String> set(List<String> names, boolean[] working, boolean opposite) {
    Set<String> set = new HashSet<>();
    for (int i = 0; i < working.length; i++) {
      if (working[i] != opposite) {
        set.add(names.get(i));
      }
    }
    return set;
  }

  @Test
  void deepStructure_isEvaluated() {
    Structure deep = Structure.component("c0");
    for (int i = 1; i <= 20_000; i++) {
      Structure next = Structure.component("c" + i);
      deep = i % 2 == 0 ? Structure.series(deep, next) : Structure.parallel(deep, next);
    }
    StateEvaluator evaluator = StateEvaluator.of(deep);
    boolean[] working = new boolean[20_001];
    assertFalse(evaluator.works(working));
    working[19_999] = true;
    working[20_000] = true;
    assertTrue(evaluator.works(working));
  }

  @Test
  void badArguments_areRefused() {
    StateEvaluator evaluator = StateEvaluator.of(Structure.series("a", "b"));
    IllegalArgumentException refused =
        assertThrows(IllegalArgumentException.class, () -> evaluator.works(new boolean[3]));
    assertTrue(refused.getMessage().contains("length 3"), refused::getMessage);
    assertTrue(refused.getMessage().contains("2 components"), refused::getMessage);
    assertThrows(NullPointerException.class, () -> evaluator.works(null));
    assertThrows(NullPointerException.class, () -> StateEvaluator.of(null));
  }

  @Test
  void side_isHeldToItsBudget() {
    Enclosure enclosure = Enclosure.of(wide(), Probabilities.all(0.9), Budget.ofHeap());
    assertThrows(BudgetExceededException.class, () -> enclosure.lessWorking(Budget.ofNodes(50)));
  }

  private static Structure wide() {
    String[] names = new String[40];
    Arrays.setAll(names, i -> "c" + i);
    return Structure.atLeast(20, names);
  }
}
