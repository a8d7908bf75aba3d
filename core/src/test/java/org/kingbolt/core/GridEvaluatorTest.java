package org.kingbolt.core;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.math.BigDecimal;
import java.math.BigInteger;
import java.time.Duration;
import java.util.Arrays;
import java.util.List;
import java.util.SplittableRandom;
import java.util.concurrent.atomic.AtomicReference;
import org.junit.jupiter.api.Test;
import org.kingbolt.core.BudgetExceededException.Limit;
import org.kingbolt.core.testing.Close;

/** An evaluator on a grid of six by six nodes, corner to corner, and on larger systems. */
class GridEvaluatorTest {

  private static final CoherentSystem GRID = grid(6);
  private static final int LINKS = GRID.components().size();

  private static CoherentSystem grid(int side) {
    NetworkBuilder network = Structure.network();
    for (int row = 0; row < side; row++) {
      for (int column = 0; column < side; column++) {
        String here = row + "-" + column;
        if (column + 1 < side) {
          network = network.link("h" + here, here, row + "-" + (column + 1));
        }
        if (row + 1 < side) {
          network = network.link("v" + here, here, (row + 1) + "-" + column);
        }
      }
    }
    return network.connecting("0-0", (side - 1) + "-" + (side - 1)).compile();
  }

  @Test
  void commonProbability_agreesWithThePolynomial() {
    Evaluator evaluator = GRID.evaluator();
    List<BigInteger> powers = GRID.polynomial().coefficients();
    for (double p : new double[] {0.0625, 0.5, 0.9375, 1 - 0x1p-20}) {
      BigDecimal exact = BigDecimal.ZERO;
      BigDecimal slope = BigDecimal.ZERO;
      for (int j = powers.size() - 1; j >= 0; j--) {
        slope = slope.multiply(new BigDecimal(p)).add(exact);
        exact = exact.multiply(new BigDecimal(p)).add(new BigDecimal(powers.get(j)));
      }
      double[] working = new double[LINKS];
      Arrays.fill(working, p);
      evaluator.evaluate(working);
      assertTrue(Close.isClose(exact, evaluator.working()), "working at " + p);
      BigDecimal fails = BigDecimal.ONE.subtract(exact);
      assertTrue(Close.isClose(fails, evaluator.failing()), "failing at " + p);
      double[] derivatives = new double[LINKS];
      evaluator.derivatives(derivatives);
      // the chain rule: all derivatives together are that of the polynomial
      assertTrue(Close.isClose(slope, Arrays.stream(derivatives).sum()), "slope at " + p);
    }
  }

  @Test
  void mirroredLinks_matterAlike() {
    Evaluator evaluator = GRID.evaluator();
    double[] working = new double[LINKS];
    Arrays.fill(working, 0.875);
    evaluator.evaluate(working);
    double[] derivatives = new double[LINKS];
    evaluator.derivatives(derivatives);
    for (String name : GRID.components()) {
      if (name.startsWith("h")) {
        String mirrored = "v" + name.charAt(3) + "-" + name.charAt(1);
        int i = GRID.components().indexOf(name);
        int j = GRID.components().indexOf(mirrored);
        assertEquals(derivatives[i], derivatives[j], 1e-13 * derivatives[i], name);
        double failing = evaluator.failingWith(i, 0.25, 0.75);
        assertEquals(failing, evaluator.failingWith(j, 0.25, 0.75), 1e-13 * failing, name);
      }
    }
  }

  @Test
  void derivativesAndChanges_agreeWithOtherWays() {
    double[] working = random(1, LINKS, 0.5)[0];
    double[] failing = complement(working);
    Evaluator evaluator = GRID.evaluator();
    Evaluator again = GRID.evaluator();
    evaluator.evaluate(working, failing);
    double[] derivatives = new double[LINKS];
    evaluator.derivatives(derivatives);
    double[] refined =
        org.kingbolt.core.diagram.Evaluation.of(GRID.diagram(), working, failing).derivatives();
    double smallerSide = Math.min(evaluator.working(), evaluator.failing());
    for (int i = 0; i < LINKS; i++) {
      double allowed = 16 * LINKS * 0x1p-53 * (refined[i] + smallerSide);
      assertEquals(refined[i], derivatives[i], allowed, GRID.components().get(i));
      for (double p : new double[] {0, 0x1p-40, 0.5, 1 - 0x1p-40, 1}) {
        double[] changed = working.clone();
        changed[i] = p;
        again.evaluate(changed, complement(changed));
        double up = evaluator.workingWith(i, p, 1 - p);
        double down = evaluator.failingWith(i, p, 1 - p);
        assertEquals(again.working(), up, 1e-13 * again.working(), GRID.components().get(i));
        assertEquals(again.failing(), down, 1e-13 * again.failing(), GRID.components().get(i));
      }
    }
  }

  @Test
  void batch_givesTheSameBitsForAnyThreadsAndSizes() {
    Evaluator evaluator = GRID.evaluator();
    for (int vectors : new int[] {1, 2, 13, 64, 65, 131, 500}) {
      double[][] working = random(vectors, LINKS, 1e-3);
      double[][] failing = complements(working);
      assertSameBits(evaluator, working, failing, 1, 2, 3, 64);
    }
    assertFalse(
        Thread.getAllStackTraces().keySet().stream()
            .anyMatch(thread -> thread.getName().startsWith("kingbolt")),
        "all threads have ended");
  }

  @Test
  void batch_ofLongSystems_givesTheSameBits() {
    for (int n : new int[] {4000, 5000}) {
      String[] names = new String[n];
      Arrays.setAll(names, i -> "c" + i);
      double[][] working = random(20, n, 1e-4);
      double[][] failing = complements(working);
      Evaluator evaluator = Structure.series(names).compile().evaluator();
      assertSameBits(evaluator, working, failing, 1, 2);
    }
  }

  /** More vectors times blocks than an int holds. */
  @Test
  void batch_ofManyVectors_isDoneToTheEnd() {
    Evaluator evaluator = Structure.parallel("a", "b").compile().evaluator();
    double[][] working = new double[2_000_003][];
    double[][] failing = new double[2_000_003][];
    Arrays.fill(working, new double[] {0.5, 0.5});
    Arrays.fill(failing, new double[] {0.5, 0.5});
    working[2_000_002] = new double[] {0.25, 0};
    failing[2_000_002] = new double[] {0.75, 1};
    BatchResult result = evaluator.evaluateBatch(working, failing, 2);
    assertEquals(2_000_003, result.size());
    for (int v = 0; v < 2_000_002; v++) {
      assertEquals(0.75, result.working(v));
    }
    assertEquals(0.25, result.working(2_000_002));
    assertEquals(0.75, result.failing(2_000_002));
    assertThrows(IndexOutOfBoundsException.class, () -> result.working(2_000_003));
    assertThrows(IndexOutOfBoundsException.class, () -> result.failing(-1));
  }

  static void assertSameBits(
      Evaluator evaluator, double[][] working, double[][] failing, int... threadCounts) {
    for (int threads : threadCounts) {
      BatchResult result = evaluator.evaluateBatch(working, failing, threads);
      assertEquals(result, evaluator.evaluateBatch(working, failing, threads), "once more");
      assertEquals(working.length, result.size());
      for (int v = 0; v < working.length; v++) {
        evaluator.evaluate(working[v], failing[v]);
        assertEquals(evaluator.working(), result.working(v), "vector " + v);
        assertEquals(evaluator.failing(), result.failing(v), "vector " + v);
      }
    }
  }

  @Test
  void batch_heedsLimitsAndInterrupts() {
    Evaluator evaluator = GRID.evaluator();
    double[][] working = random(100, LINKS, 1e-3);
    double[][] failing = complements(working);
    Budget brief = Budget.ofTime(Duration.ofNanos(1));
    Budget tight = Budget.ofNodes(100);
    for (int threads = 1; threads <= 3; threads++) {
      int n = threads;
      assertEquals(Limit.TIME, limit(() -> evaluator.evaluateBatch(working, failing, n, brief)));
      assertEquals(Limit.NODES, limit(() -> evaluator.evaluateBatch(working, failing, n, tight)));
      Thread.currentThread().interrupt();
      assertEquals(Limit.INTERRUPT, limit(() -> evaluator.evaluateBatch(working, failing, n)));
      assertTrue(Thread.interrupted(), "the flag stays set");
      assertSameBits(evaluator, working, failing, n);
    }
  }

  @Test
  void batch_endsWhenInterruptedMidway() throws InterruptedException {
    double[][] working = new double[1_000_000][];
    double[][] failing = new double[1_000_000][];
    Arrays.fill(working, random(1, LINKS, 0.1)[0]);
    Arrays.fill(failing, complement(working[0]));
    Evaluator evaluator = GRID.evaluator();
    AtomicReference<Limit> met = new AtomicReference<>();
    Thread caller =
        new Thread(() -> met.set(limit(() -> evaluator.evaluateBatch(working, failing, 2))));
    caller.start();
    Thread.sleep(100);
    caller.interrupt();
    caller.join();
    assertEquals(Limit.INTERRUPT, met.get(), "the whole batch would take a second and more");
  }

  private static Limit limit(org.junit.jupiter.api.function.Executable call) {
    return assertThrows(BudgetExceededException.class, call).limit();
  }

  private static double[][] random(int vectors, int components, double mostFailing) {
    SplittableRandom random = new SplittableRandom(20260101L + vectors);
    double[][] values = new double[vectors][components];
    for (double[] row : values) {
      Arrays.setAll(row, i -> 1 - mostFailing * random.nextDouble());
    }
    return values;
  }

  private static double[] complement(double[] values) {
    return Arrays.stream(values).map(value -> 1 - value).toArray();
  }

  private static double[][] complements(double[][] rows) {
    return Arrays.stream(rows).map(row -> complement(row)).toArray(double[][]::new);
  }
}
