package org.kingbolt.core;

import java.util.Arrays;
import java.util.Objects;
import org.kingbolt.core.diagram.BatchScan;
import org.kingbolt.core.diagram.WorkMeter;

/**
 * Both sides of a system's probability for each vector of a batch.
 *
 * <p>Immutable; safe to share between threads. Equal when all values are equal.
 *
 * <p>Example: {@code evaluator.evaluateBatch(working, failing, 2).failing(17)}.
 */
public final class BatchResult {

  private final double[] working;
  private final double[] failing;

  private BatchResult(double[] working, double[] failing) {
    this.working = working;
    this.failing = failing;
  }

  static BatchResult of(
      BatchScan scan, double[][] working, double[][] failing, int threads, WorkMeter meter) {
    double[] works = new double[working.length];
    double[] fails = new double[working.length];
    scan.run(working, failing, works, fails, threads, meter);
    Arrays.setAll(works, i -> Math.min(1, works[i]));
    Arrays.setAll(fails, i -> Math.min(1, fails[i]));
    return new BatchResult(works, fails);
  }

  /**
   * Returns the number of vectors.
   *
   * @return at least 0
   */
  public int size() {
    return working.length;
  }

  /**
   * The probability that the system works.
   *
   * @param vector from 0 to {@code size() - 1}
   * @return from 0 to 1
   * @throws IndexOutOfBoundsException if there is no such vector
   */
  public double working(int vector) {
    return working[Objects.checkIndex(vector, working.length)];
  }

  /**
   * The probability that the system has failed.
   *
   * @param vector from 0 to {@code size() - 1}
   * @return from 0 to 1
   * @throws IndexOutOfBoundsException if there is no such vector
   */
  public double failing(int vector) {
    return failing[Objects.checkIndex(vector, failing.length)];
  }

  @Override
  public boolean equals(Object other) {
    return other instanceof BatchResult that
        && Arrays.equals(working, that.working)
        && Arrays.equals(failing, that.failing);
  }

  @Override
  public int hashCode() {
    return 31 * Arrays.hashCode(working) + Arrays.hashCode(failing);
  }

  /**
   * A one-line summary.
   *
   * @return the number of vectors
   */
  @Override
  public String toString() {
    return "BatchResult[" + working.length + " vectors]";
  }
}
