package org.kingbolt.importance;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.ArrayList;
import java.util.List;
import java.util.concurrent.ExecutionException;
import java.util.concurrent.ExecutorService;
import java.util.concurrent.Executors;
import java.util.concurrent.Future;
import org.junit.jupiter.api.Tag;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;
import org.kingbolt.core.CoherentSystem;
import org.kingbolt.core.Probabilities;
import org.kingbolt.core.Probability;
import org.kingbolt.core.published.Families;

/** Grids, where plain differences lose most digits. */
class GridImportanceTest {

  /** Against pairs of nodes followed down, which take no differences that cancel. */
  @ParameterizedTest
  @ValueSource(doubles = {0.4, 0.6, 0.1, 1e-2, 1e-4, 1e-7})
  void birnbaum_hasEveryDigit(double failing) {
    CoherentSystem grid = Families.corners(6).compile();
    Probabilities p = Probabilities.all(Probability.failing(failing));
    double[] exact = grid.evaluation(p).derivatives();
    Ranking ranking = Importance.of(grid).given(p).birnbaum();
    for (int i = 0; i < exact.length; i++) {
      String name = grid.components().get(i);
      assertEquals(exact[i], ranking.value(name), exact[i] * 1e-12, name);
    }
  }

  /** J_ij = B_i(1_j) - B_i(0_j), where the two are not nearly equal. */
  @Test
  void jointImportance_isWhatTheOtherChanges() {
    CoherentSystem grid = Families.corners(5).compile();
    Probabilities p = Probabilities.all(0.8).with("r2c2-r2c3", 0.3);
    JointImportance joint = Importance.of(grid).given(p).jointImportance();
    for (String given : List.of("r0c0-r0c1", "r2c2-r2c3", "r3c4-r4c4")) {
      Ranking up = Importance.of(grid).given(p.with(given, Probability.CERTAIN)).birnbaum();
      Ranking down = Importance.of(grid).given(p.with(given, Probability.IMPOSSIBLE)).birnbaum();
      for (String name : grid.components()) {
        if (!name.equals(given)) {
          double change = up.value(name) - down.value(name);
          assertEquals(change, joint.value(name, given), 1e-14, name);
        }
      }
    }
  }

  /** Sum over pairs of J_ij is half the second derivative of the polynomial in a common p. */
  @Test
  void jointImportance_addsUpToTheCurvature() {
    CoherentSystem grid = Families.corners(4).compile();
    double p = 0.7;
    double sum = 0;
    for (double[] row :
        Importance.of(grid).given(Probabilities.all(p)).jointImportance().matrix()) {
      for (double value : row) {
        sum += value;
      }
    }
    double curvature = 0;
    var coefficients = grid.polynomial().coefficients();
    for (int j = coefficients.size() - 1; j >= 2; j--) {
      curvature = curvature * p + j * (j - 1) * coefficients.get(j).doubleValue();
    }
    assertEquals(curvature, sum, 1e-7);
  }

  @Test
  void barlowProschan_addsUpToOne() {
    Ranking ranking = Importance.of(Families.corners(6)).barlowProschan();
    assertEquals(1, ranking.total().orElseThrow(), 1e-13);
  }

  /** Same bits and order, whatever the thread; both measures from one object. */
  @Test
  void rankings_areTheSameInAllThreads() throws InterruptedException, ExecutionException {
    CoherentSystem grid = Families.corners(5).compile();
    ImportanceAtProbabilities shared = Importance.of(grid).given(Probabilities.all(0.9));
    String expected = all(Importance.of(Families.corners(5)).given(Probabilities.all(0.9)));
    ExecutorService threads = Executors.newFixedThreadPool(4);
    try {
      List<Future<String>> results = new ArrayList<>();
      for (int i = 0; i < 8; i++) {
        results.add(threads.submit(() -> all(shared)));
      }
      for (Future<String> result : results) {
        assertEquals(expected, result.get());
      }
    } finally {
      threads.shutdownNow();
    }
  }

  private static String all(ImportanceAtProbabilities at) {
    return at.birnbaum().entries()
        + "\n"
        + at.riskReductionWorth().entries()
        + "\n"
        + at.fussellVeselyRareEvent().entries()
        + "\n"
        + at.jointImportance().top(100);
  }

  /** All 16,110 pairs of 180 links, within a minute. */
  @Test
  @Tag("slow")
  void pairsOfAGridOfTen_takeLessThanAMinute() {
    CoherentSystem grid = Families.corners(10).compile();
    long start = System.nanoTime();
    JointImportance joint = Importance.of(grid).given(Probabilities.all(0.97)).jointImportance();
    double seconds = (System.nanoTime() - start) / 1e9;
    assertTrue(seconds < 60, () -> seconds + " s");
    assertEquals(180, joint.components().size());
    assertTrue(joint.value("r0c0-r0c1", "r0c0-r1c0") < -0.99);
  }
}
