package org.kingbolt.core.diagram;

import java.util.ArrayList;
import java.util.BitSet;
import java.util.Comparator;
import java.util.List;

/**
 * The diagrams of the plain operators over numbered slots: gates, weighted and consecutive forms,
 * set families and truth tables. A {@link Composer} puts parts into the slots.
 *
 * <p>Stateless. The results need not be reduced; the composer reduces.
 */
public final class Templates {

  /** Series and parallel operators of up to so many slots are made once. */
  private static final int MOST_CHAINS = 64;

  private static final List<Operator> ALL = chains(true);
  private static final List<Operator> ANY = chains(false);

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
    if (n <= MOST_CHAINS && (k == 1 || k == n)) {
      return (k == n ? ALL : ANY).get(n);
    }
    return k == 1 || k == n ? Operator.of(Layers.chain(n, k == n)) : Operator.threshold(k, n);
  }

  private static List<Operator> chains(boolean series) {
    List<Operator> chains = new ArrayList<>();
    for (int n = 0; n <= MOST_CHAINS; n++) {
      chains.add(Operator.of(n == 0 ? Diagram.constant(series) : Layers.chain(n, series)));
    }
    return List.copyOf(chains);
  }

  static Diagram threshold(int k, int n, WorkMeter meter) {
    Layers layers = new Layers();
    long held = 0;
    for (int i = 0; i < n; i++) {
      int least = Math.max(0, k - (n - i));
      int most = Math.min(i, k - 1);
      int nextLeast = Math.max(0, k - (n - i - 1));
      int[] low = new int[most - least + 1];
      int[] high = new int[most - least + 1];
      for (int c = least; c <= most; c++) {
        low[c - least] = c < nextLeast ? Layers.TO_FAILS : c - nextLeast;
        high[c - least] = c + 1 == k ? Layers.TO_WORKS : c + 1 - nextLeast;
      }
      held += low.length;
      meter.at(held);
      layers.add(i, low, high);
    }
    return layers.diagram();
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
   * @param meter hears of every node
   * @return an operator whose template is the reduced diagram, slots of common sets close together.
   *     Cost: the sets are joined pairwise, so that no set is touched more than a logarithmic
   *     number of times; sizes depend on the family.
   */
  public static Operator family(int n, List<BitSet> sets, boolean paths, WorkMeter meter) {
    int[] order = FamilyOrder.of(n, sets);
    List<BitSet> placed = placed(sets, order);
    NodeTable table = new NodeTable(n, meter);
    int[] made = new int[placed.size()];
    for (int i = 0; i < made.length; i++) {
      int id = paths ? Diagram.WORKS : Diagram.FAILS;
      BitSet set = placed.get(i);
      for (int slot = set.length() - 1;
          slot >= 0;
          slot = slot > 0 ? set.previousSetBit(slot - 1) : -1) {
        id = paths ? table.node(slot, Diagram.FAILS, id) : table.node(slot, id, Diagram.WORKS);
      }
      made[i] = id;
    }
    for (int count = made.length; count > 1; count = (count + 1) >> 1) {
      for (int i = 0; i < count >> 1; i++) {
        made[i] =
            paths
                ? table.or(made[2 * i], made[2 * i + 1])
                : table.and(made[2 * i], made[2 * i + 1]);
      }
      if ((count & 1) == 1) {
        made[count >> 1] = made[count - 1];
      }
    }
    return Operator.of(table.diagram(made[0], order));
  }

  /** The sets in terms of places in an order, those that begin first in front. */
  private static List<BitSet> placed(List<BitSet> sets, int[] order) {
    int[] place = new int[order.length];
    for (int i = 0; i < order.length; i++) {
      place[order[i]] = i;
    }
    List<BitSet> placed = new ArrayList<>();
    for (BitSet set : sets) {
      BitSet moved = new BitSet();
      set.stream().forEach(slot -> moved.set(place[slot]));
      placed.add(moved);
    }
    placed.sort(Comparator.comparingInt((BitSet set) -> set.nextSetBit(0)));
    return placed;
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
