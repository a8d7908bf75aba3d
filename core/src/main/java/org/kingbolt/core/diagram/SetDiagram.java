package org.kingbolt.core.diagram;

import java.math.BigInteger;
import java.util.Arrays;

/**
 * A family of sets of variables as a zero-suppressed decision diagram (Minato, DAC 1993): a set
 * contains the variable of a node when its route follows {@link Diagram#high}, and contains no
 * variable whose level the route skips.
 *
 * <p>The nodes are held as a {@link Diagram}, whose outcome 0 means "no set ends here" and outcome
 * 1 "one set ends here". Immutable; safe to share between threads.
 */
public final class SetDiagram {

  /** The empty family. */
  public static final int NO_SETS = 0;

  /** The family whose only set is the empty one. */
  public static final int ONLY_EMPTY_SET = 1;

  private final Diagram nodes;

  SetDiagram(Diagram nodes) {
    this.nodes = nodes;
  }

  /**
   * Returns the nodes.
   *
   * @return a diagram to be read with the meaning given above
   */
  public Diagram nodes() {
    return nodes;
  }

  /**
   * Counts the sets, exactly, without listing them.
   *
   * @param meter hears of every node, in proportion to the size of its number
   * @return the number. Cost: one addition of big integers a node.
   */
  public BigInteger count(WorkMeter meter) {
    BigInteger[] count = new BigInteger[nodes.size()];
    count[NO_SETS] = BigInteger.ZERO;
    count[ONLY_EMPTY_SET] = BigInteger.ONE;
    long held = 0;
    for (int id = 2; id < nodes.size(); id++) {
      count[id] = count[nodes.low(id)].add(count[nodes.high(id)]);
      held += 1 + (count[id].bitLength() >> 9);
      meter.at(held);
    }
    return count[nodes.root()];
  }

  /**
   * Counts the sets by size, exactly, without listing them.
   *
   * @param meter hears of every node, in proportion to the sizes of its sets
   * @return entry j counts the sets of j variables; the last entry is not zero, unless there are no
   *     sets at all, when the only entry is zero. Cost: nodes × largest size additions of big
   *     integers.
   */
  public BigInteger[] countBySize(WorkMeter meter) {
    BigInteger[][] count = new BigInteger[nodes.size()][];
    count[NO_SETS] = new BigInteger[0];
    count[ONLY_EMPTY_SET] = new BigInteger[] {BigInteger.ONE};
    long held = 0;
    for (int id = 2; id < nodes.size(); id++) {
      BigInteger[] low = count[nodes.low(id)];
      BigInteger[] high = count[nodes.high(id)];
      BigInteger[] sum = Arrays.copyOf(low, Math.max(low.length, high.length + 1));
      Arrays.fill(sum, low.length, sum.length, BigInteger.ZERO);
      for (int size = 0; size < high.length; size++) {
        sum[size + 1] = sum[size + 1].add(high[size]);
      }
      count[id] = sum;
      held += sum.length;
      meter.at(held);
    }
    BigInteger[] all = count[nodes.root()];
    return all.length == 0 ? new BigInteger[] {BigInteger.ZERO} : all;
  }

  /**
   * Tells whether a set belongs to the family.
   *
   * @param members indexed by variable: true for the variables of the set
   * @return whether the family contains exactly this set. Cost: at most one step a level.
   */
  public boolean contains(boolean[] members) {
    int id = nodes.root();
    for (int level = 0; level < nodes.levels(); level++) {
      boolean here = id >= nodes.from(level) && id < nodes.to(level);
      boolean member = members[nodes.variableAt(level)];
      if (here) {
        id = member ? nodes.high(id) : nodes.low(id);
      } else if (member) {
        return false;
      }
    }
    return id == ONLY_EMPTY_SET;
  }

  /**
   * Walks over the family in order of size and, within a size, in order of levels.
   *
   * @param meter hears of every step
   * @return a fresh walk; nothing is listed in advance. Cost: one scan to begin with, then at most
   *     one step a level for each set; 12 bytes a node, and where sizes are missing between others,
   *     up to 8 bytes a node and one more scan for every 64 sizes.
   */
  public SetWalk walk(WorkMeter meter) {
    return new SizeWalk(nodes, meter);
  }

  /**
   * Walks over the family in order of decreasing weight, the product of the weights of a set's
   * variables; the order among equal weights is fixed but of no meaning.
   *
   * @param logWeights indexed by variable: the natural logarithm of each weight, at most 0,
   *     possibly negative infinity
   * @param meter hears of every route held
   * @return a fresh walk; nothing is listed in advance. Cost: one scan to begin with, then at most
   *     one heap operation a level for each set, and as many routes held.
   */
  public SetWalk walkByWeight(double[] logWeights, WorkMeter meter) {
    return new WeightWalk(nodes, logWeights, meter);
  }
}
