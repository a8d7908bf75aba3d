package org.kingbolt.core.diagram;

import java.util.Arrays;

/**
 * Evaluates a diagram for a run of vectors at once, node after node, in rows of its own that are
 * made once. Gives the same bits as {@link Kernels#up}. For one thread.
 */
final class RowPass implements VectorPass {

  /**
   * With these numbers after the values, and the header before them, a row takes up a multiple of
   * 64 bytes: so all rows lie alike to the vector instructions.
   */
  private static final int PADDING = 6;

  /** Nodes between two reports. */
  private static final int RUN = 1 << 6;

  /** Levels whose probabilities are read together, vector by vector: two lines of cache each. */
  private static final int TILE = 16;

  private final Diagram diagram;
  private final RowPlan plan;
  private final double[][] rows;
  private double[][] p = new double[TILE][0];
  private double[][] q = new double[TILE][0];

  RowPass(Diagram diagram, RowPlan plan, int mostVectors) {
    this.diagram = diagram;
    this.plan = plan;
    this.rows = new double[plan.rows()][2 * mostVectors + PADDING];
  }

  /** The memory of one pass. */
  static long bytes(RowPlan plan, int mostVectors) {
    return plan.rows() * (2L * mostVectors + PADDING + 3) * Double.BYTES;
  }

  @Override
  public void run(VectorBatch batch, int first, int count, WorkMeter meter) {
    start(count);
    for (int end = diagram.levels(); end > 0; end -= TILE) {
      int begin = Math.max(0, end - TILE);
      gather(batch.working(), begin, end, first, count, p);
      gather(batch.failing(), begin, end, first, count, q);
      for (int level = end - 1; level >= begin; level--) {
        up(level, p[level - begin], q[level - begin], batch.held(), meter);
      }
    }
    double[] root = rows[plan.row()[diagram.root()]];
    System.arraycopy(root, 0, batch.works(), first, count);
    System.arraycopy(root, count, batch.fails(), first, count);
  }

  private void start(int count) {
    if (p[0].length != 2 * count) {
      p = new double[TILE][2 * count];
      q = new double[TILE][2 * count];
    }
    Arrays.fill(rows[Diagram.FAILS], 0, count, 0);
    Arrays.fill(rows[Diagram.FAILS], count, 2 * count, 1);
    Arrays.fill(rows[Diagram.WORKS], 0, count, 1);
    Arrays.fill(rows[Diagram.WORKS], count, 2 * count, 0);
  }

  /** The values of some levels' variables, twice: for both halves of a row. */
  private void gather(
      double[][] vectors, int begin, int end, int first, int count, double[][] into) {
    for (int i = 0; i < count; i++) {
      double[] vector = vectors[first + i];
      for (int level = begin; level < end; level++) {
        // a negative zero becomes zero
        double value = vector[diagram.variableAt(level)] + 0.0;
        double[] values = into[level - begin];
        values[i] = value;
        values[count + i] = value;
      }
    }
  }

  private void up(int level, double[] working, double[] failing, long held, WorkMeter meter) {
    int end = diagram.to(level);
    for (int from = diagram.from(level); from < end; from += RUN) {
      meter.at(held);
      int to = Math.min(end - from, RUN) + from;
      Kernels.rows(rows, plan.row(), diagram.lows(), diagram.highs(), from, to, working, failing);
    }
  }
}
