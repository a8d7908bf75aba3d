package org.kingbolt.docs.bench;

import java.util.Arrays;
import org.kingbolt.core.diagram.Diagram;

/** What anyone would write: one tail of one vector, level by level, in arrays made once. */
final class PlainLoop {

  private final int root;
  private final int[] low;
  private final int[] high;
  private final int[] ends;
  private final double[] fails;
  private final double[] reach;

  PlainLoop(Diagram diagram) {
    root = diagram.root();
    low = new int[diagram.size()];
    high = new int[diagram.size()];
    ends = new int[diagram.levels()];
    fails = new double[diagram.size()];
    fails[Diagram.FAILS] = 1;
    reach = new double[diagram.size()];
    for (int id = 2; id < low.length; id++) {
      low[id] = diagram.low(id);
      high[id] = diagram.high(id);
    }
    for (int level = 0; level < ends.length; level++) {
      ends[level] = diagram.to(level);
    }
  }

  double fails(double[] failingByLevel) {
    int id = 2;
    for (int level = ends.length - 1; level >= 0; level--) {
      double q = failingByLevel[level];
      double p = 1 - q;
      for (; id < ends[level]; id++) {
        fails[id] = p * fails[high[id]] + q * fails[low[id]];
      }
    }
    return fails[root];
  }

  /** The sum of all derivatives, each as a plain difference. */
  double derivatives(double[] failingByLevel) {
    fails(failingByLevel);
    Arrays.fill(reach, 0);
    double sum = 0;
    reach[root] = 1;
    int id = root;
    for (int level = 0; level < ends.length; level++) {
      double q = failingByLevel[level];
      double p = 1 - q;
      int from = level + 1 < ends.length ? ends[level + 1] : 2;
      for (; id >= from; id--) {
        reach[low[id]] += q * reach[id];
        reach[high[id]] += p * reach[id];
        sum += reach[id] * (fails[low[id]] - fails[high[id]]);
      }
    }
    return sum;
  }
}
