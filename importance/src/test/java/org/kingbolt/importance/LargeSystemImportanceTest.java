package org.kingbolt.importance;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTimeout;
import static org.junit.jupiter.api.Assertions.assertTimeoutPreemptively;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.time.Duration;
import java.util.Arrays;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import org.junit.jupiter.api.Test;
import org.kingbolt.core.BudgetExceededException;
import org.kingbolt.core.CoherentSystem;
import org.kingbolt.core.Probabilities;
import org.kingbolt.core.Probability;
import org.kingbolt.core.Structure;

/**
 * Nothing grows with the square of the system: each of these took from ten seconds to minutes when
 * it did, and takes a fraction of a second.
 */
class LargeSystemImportanceTest {

  private static final Duration SOON = Duration.ofSeconds(8);

  private static final Probabilities P = Probabilities.all(Probability.failing(1e-6));

  private static CoherentSystem series(int size) {
    String[] names = new String[size];
    Arrays.setAll(names, i -> "x" + i);
    return Structure.series(names).compile();
  }

  @Test
  void tornado_isQuick() {
    CoherentSystem system = series(100_000);
    Probabilities low = Probabilities.all(Probability.failing(2e-6));
    Probabilities high = Probabilities.all(Probability.failing(1e-7));
    Tornado tornado =
        assertTimeoutPreemptively(SOON, () -> Sensitivity.of(system).given(P).tornado(low, high));
    double rest = Math.exp(99_999 * Math.log1p(-1e-6));
    assertEquals(1.9e-6 * rest, tornado.bars().get(0).swing(), 1e-16);
  }

  @Test
  void manyGroups_areQuick() {
    CoherentSystem system = series(50_000);
    Map<String, List<String>> groups = new LinkedHashMap<>();
    system.components().forEach(name -> groups.put(name, List.of(name)));
    ImportanceAtProbabilities at = Importance.of(system).given(P);
    Ranking ranking =
        assertTimeoutPreemptively(SOON, () -> at.groups(groups).differentialUniform());
    assertEquals(1 / 50_000.0, ranking.value("x7"), 1e-15);
  }

  @Test
  void changesOfAll_areQuick() {
    CoherentSystem system = series(50_000);
    Map<String, Probability> changes = new LinkedHashMap<>();
    system.components().forEach(name -> changes.put(name, Probability.failing(1e-7)));
    ImportanceAtProbabilities at = Importance.of(system).given(P);
    double total = assertTimeoutPreemptively(SOON, () -> at.change(changes).total());
    double before = Math.exp(50_000 * Math.log1p(-1e-6));
    assertEquals(Math.exp(50_000 * Math.log1p(-1e-7)) - before, total, 1e-12);
  }

  @Test
  void curvesOfLargeGroups_areQuick() {
    CoherentSystem system = series(4000);
    ReliabilityCurve curve =
        assertTimeoutPreemptively(
            SOON, () -> Sensitivity.of(system).given(P).along(system.components()));
    assertEquals(4000, curve.degree());
    assertEquals(Probability.IMPOSSIBLE, curve.givenWorking(3999));
    assertEquals(Probability.CERTAIN, curve.givenWorking(4000));
  }

  @Test
  void manyKnownComponents_areHeldTogether() {
    CoherentSystem system = series(300);
    Diagnosis diagnosis = Diagnosis.of(system).given(P).systemFailed();
    for (String name : system.components().subList(0, 298)) {
      diagnosis = diagnosis.working(name);
    }
    assertEquals(0.5, diagnosis.posterior("x299").failing(), 1e-6);
    assertEquals(Probability.CERTAIN, diagnosis.posterior("x0"));
  }

  @Test
  void interrupts_endTheChoiceOfPoints() {
    Importance importance = Importance.of(series(100_000));
    Thread.currentThread().interrupt();
    try {
      BudgetExceededException stopped =
          assertTimeout(
              SOON, () -> assertThrows(BudgetExceededException.class, importance::barlowProschan));
      assertEquals(BudgetExceededException.Limit.INTERRUPT, stopped.limit());
    } finally {
      assertTrue(Thread.interrupted());
    }
  }
}
