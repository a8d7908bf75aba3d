package org.kingbolt.core.diagram;

import java.util.ArrayList;
import java.util.BitSet;
import java.util.List;

/**
 * The diagrams of the plain operators over numbered slots: gates, weighted and consecutive forms,
 * set families and truth tables. A {@link Composer} puts parts into the slots.
 *
 * <p>Stateless. The results need not be reduced; the composer reduces.
 */
public final class Templates {

  /** Gates of up to so many slots are made once. */
  private static final int MOST_SHARED = 12;

  private static final List<List<Operator>> SHARED = shared();

  private Templates() {}

  /**
   * A function of nothing.
   *
   * @param works its value
   * @return a diagram without levels
   */
  public static Operator constant(boolean works) {
    return Operator.of(Diagram.constant(works));
  }

  /**
   * k-out-of-n:G. Series is {@code atLeast(n, n)}, parallel is {@code atLeast(1, n)}.
   *
   * @param k from 1 to n
   * @param n the number of slots
   * @return an operator whose template has {@code k (n - k + 1)} nodes; time is linear in that
   */
  public static Operator atLeast(int k, int n) {
    return n >= 1 && n <= MOST_SHARED ? SHARED.get(n - 1).get(k - 1) : new Threshold(k, n);
  }

  private static List<List<Operator>> shared() {
    List<List<Operator>> all = new ArrayList<>();
    for (int n = 1; n <= MOST_SHARED; n++) {
      List<Operator> gates = new ArrayList<>();
      for (int k = 1; k <= n; k++) {
        Operator gate = new Threshold(k, n);
        gate.template(WorkMeter.UNLIMITED);
        gates.add(gate);
      }
      all.add(gates);
    }
    return all;
  }

  /**
   * Weighted-k-out-of-n:G: works while the weights of the working slots reach the demand.
   *
   * @param demand from 1 to the sum of the weights
   * @param weights one a slot, none negative, with a sum that fits a long
   * @return an operator whose template has at most min(demand, 2^i) nodes on level i
   */
  public static Operator capacity(long demand, long[] weights) {
    return Operator.swept(new CapacityRule(demand, weights));
  }

  /**
   * Consecutive-k-out-of-n:F: fails when k neighbouring slots have failed.
   *
   * @param k from 1 to n
   * @param n the number of slots
   * @param around whether the last slot is a neighbour of the first
   * @return an operator whose template has at most {@code n k} nodes, or {@code n k^2} around a
   *     circle
   */
  public static Operator withoutFailureRun(int k, int n, boolean around) {
    return Operator.swept(new RunRule(k, n, around));
  }

  /**
   * A family of sets: of path sets, works when all slots of some set work; of cut sets, works when
   * some slot of every set works.
   *
   * @param n the number of slots
   * @param sets none empty, at least one; sorted or not, minimal or not
   * @param paths whether the sets are path sets, or else cut sets
   * @return an operator whose template is the reduced diagram, slots of common sets close together
   */
  public static Operator family(int n, List<BitSet> sets, boolean paths) {
    return new Family(n, sets, paths);
  }

  /**
   * A function given by all its values.
   *
   * @param n the number of slots, from 0 to 24
   * @param table bit x is the value in state x; slot i is bit {@code n - 1 - i} of x, so that slot
   *     0 is the most significant
   * @param meter hears of every node
   * @return the reduced diagram, slots in increasing order; linear in 2^n
   */
  public static Diagram truthTable(int n, BitSet table, WorkMeter meter) {
    NodeTable nodes = new NodeTable(n, meter);
    int[] ids = new int[1 << n];
    for (int x = table.nextSetBit(0); x >= 0; x = table.nextSetBit(x + 1)) {
      ids[x] = Diagram.WORKS;
    }
    for (int slot = n - 1; slot >= 0; slot--) {
      for (int x = 0; x < 1 << slot; x++) {
        ids[x] = nodes.node(slot, ids[2 * x], ids[2 * x + 1]);
      }
    }
    return nodes.diagram(ids[0], StateSweep.identity(n));
  }

  /**
   * The dual of an operator: works exactly where it fails with every slot inverted.
   *
   * @param operator any operator
   * @return an operator of the same size and order
   */
  public static Operator dual(Operator operator) {
    return Operator.dual(operator);
  }

  static Diagram dual(Diagram template) {
    int size = template.size();
    int[] low = new int[size];
    int[] high = new int[size];
    for (int id = 2; id < size; id++) {
      low[id] = swapped(template.high(id));
      high[id] = swapped(template.low(id));
    }
    int[] bound = new int[template.levels() + 1];
    bound[template.levels()] = 2;
    for (int level = 0; level < template.levels(); level++) {
      bound[level] = template.to(level);
    }
    return new Diagram(swapped(template.root()), low, high, template.order(), bound);
  }

  private static int swapped(int id) {
    return id < 2 ? 1 - id : id;
  }
}
