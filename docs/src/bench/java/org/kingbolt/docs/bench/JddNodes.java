package org.kingbolt.docs.bench;

import java.util.BitSet;
import jdd.bdd.BDD;
import org.kingbolt.core.diagram.Diagram;

/**
 * A function in JDD's node table, made bottom-up with one call for each node or state of a diagram,
 * in the diagram's order. The table has room for all from the start, so that nothing is collected.
 */
final class JddNodes {

  private final BDD bdd;

  /** JDD's node for each node or state of the diagram; several may have become one. */
  private final int[] made;

  private final int root;
  private final int highest;

  JddNodes(Diagram diagram) {
    bdd = new BDD(diagram.size() + diagram.size() / 4 + 1000, 1000);
    for (int level = 0; level < diagram.levels(); level++) {
      bdd.createVar();
    }
    made = new int[diagram.size()];
    made[Diagram.FAILS] = bdd.getZero();
    made[Diagram.WORKS] = bdd.getOne();
    int most = 0;
    for (int level = diagram.levels() - 1; level >= 0; level--) {
      for (int id = diagram.from(level); id < diagram.to(level); id++) {
        made[id] = bdd.mk(level, made[diagram.low(id)], made[diagram.high(id)]);
        most = Math.max(most, made[id]);
      }
    }
    root = made[diagram.root()];
    highest = most;
  }

  /** JDD's own count is recursive, which deep diagrams do not allow. */
  int size() {
    BitSet nodes = new BitSet();
    for (int node : made) {
      nodes.set(node);
    }
    nodes.clear(bdd.getZero());
    nodes.clear(bdd.getOne());
    return nodes.cardinality();
  }

  /** The probability of failing, in one scan over one tail. */
  double fails(double[] failingByLevel) {
    return values(failingByLevel)[root];
  }

  private double[] values(double[] failingByLevel) {
    double[] fails = new double[highest + 1];
    fails[bdd.getZero()] = 1;
    for (int node : made) {
      if (node > bdd.getOne()) {
        double q = failingByLevel[bdd.getVar(node)];
        fails[node] = (1 - q) * fails[bdd.getHigh(node)] + q * fails[bdd.getLow(node)];
      }
    }
    return fails;
  }

  /** The sum of all derivatives, in one scan up and one scan down over one tail. */
  double derivatives(double[] failingByLevel) {
    double[] fails = values(failingByLevel);
    double[] reach = new double[fails.length];
    double sum = 0;
    reach[root] = 1;
    for (int i = made.length - 1; i >= 2; i--) {
      int node = made[i];
      if (node > bdd.getOne()) {
        double q = failingByLevel[bdd.getVar(node)];
        int low = bdd.getLow(node);
        int high = bdd.getHigh(node);
        double here = reach[node];
        reach[node] = 0;
        reach[low] += q * here;
        reach[high] += (1 - q) * here;
        sum += here * (fails[low] - fails[high]);
      }
    }
    return sum;
  }
}
