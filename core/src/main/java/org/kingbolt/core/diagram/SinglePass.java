package org.kingbolt.core.diagram;

/** Evaluates one vector after the other. For one thread. */
final class SinglePass implements VectorPass {

  /** Nodes between two reports. */
  private static final int RUN = 1 << 10;

  private final Diagram diagram;
  private final double[] works;
  private final double[] fails;

  SinglePass(Diagram diagram) {
    this.diagram = diagram;
    this.works = new double[diagram.size()];
    this.fails = new double[diagram.size()];
    works[Diagram.WORKS] = 1;
    fails[Diagram.FAILS] = 1;
  }

  /** The memory of one pass. */
  static long bytes(Diagram diagram) {
    return 2L * Double.BYTES * diagram.size();
  }

  @Override
  public void run(VectorBatch batch, int first, int count, WorkMeter meter) {
    for (int vector = first; vector < first + count; vector++) {
      up(batch.working()[vector], batch.failing()[vector], batch.held(), meter);
      batch.works()[vector] = works[diagram.root()];
      batch.fails()[vector] = fails[diagram.root()];
    }
  }

  private void up(double[] working, double[] failing, long held, WorkMeter meter) {
    int[] low = diagram.lows();
    int[] high = diagram.highs();
    for (int level = diagram.levels() - 1; level >= 0; level--) {
      int variable = diagram.variableAt(level);
      // a negative zero becomes zero
      double p = working[variable] + 0.0;
      double q = failing[variable] + 0.0;
      int end = diagram.to(level);
      for (int from = diagram.from(level); from < end; from += RUN) {
        meter.at(held);
        int to = Math.min(end - from, RUN) + from;
        Kernels.up(low, high, works, fails, from, to, p, q);
      }
    }
  }
}
