package org.kingbolt.core;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;
import java.util.Set;
import org.junit.jupiter.api.Test;

/** Cut-offs at the edges of what a double can hold. */
class CutOffTest {

  private static final Structure PAIRS =
      Structure.ofCutSets(List.of(List.of("a", "b", "c"), List.of("c", "d", "b", "e")));

  @Test
  void setAtTheThreshold_isKept() {
    Probabilities p = Probabilities.all(Probability.failing(0.7));
    TruncatedSets sets = Structure.parallel("a", "b").minimalCutSets(CutOff.probability(0.49, p));
    assertEquals(List.of(Set.of("a", "b")), sets.stream().toList());
    assertTrue(sets.isComplete());
  }

  @Test
  void equallyProbableSets_areKeptTogether() {
    List<Structure> parts =
        List.of(
            Structure.parallel("a", "b", "c"),
            Structure.parallel("d", "e", "f"),
            Structure.parallel("g", "h", "i"));
    String[] names = {"a", "b", "c", "d", "e", "f", "g", "h", "i"};
    double[] fails = {0.1, 0.2, 0.3, 0.3, 0.2, 0.1, 0.3, 0.1, 0.2};
    Probabilities p = Probabilities.all(0.5);
    for (int i = 0; i < names.length; i++) {
      p = p.with(names[i], Probability.failing(fails[i]));
    }
    Structure series = Structure.series(parts);
    for (double threshold : new double[] {0.006, Math.nextUp(0.006), Math.nextDown(0.006)}) {
      assertEquals(3, series.minimalCutSets(CutOff.probability(threshold, p)).stream().count());
    }
    assertEquals(0, series.minimalCutSets(CutOff.probability(0.00600001, p)).stream().count());
  }

  @Test
  void massBelowTheRangeOfADouble_isNotCalledNothing() {
    Probabilities p = Probabilities.all(Probability.failing(1e-200));
    TruncatedSets sets = PAIRS.minimalCutSets(CutOff.size(3));
    assertFalse(sets.isComplete());
    assertTrue(sets.discarded(p) > 0 && sets.discarded(p) < 1e-300);
    TruncatedSets none = PAIRS.minimalCutSets(CutOff.probability(1e-9, p));
    assertTrue(none.discarded() > 0 && none.discarded() < 1e-300);
  }

  @Test
  void whatCannotFail_leavesNothingOut() {
    Probabilities p = Probabilities.all(Probability.failing(0.1)).with("d", Probability.CERTAIN);
    assertEquals(0, PAIRS.minimalCutSets(CutOff.size(3)).discarded(p));
  }
}
