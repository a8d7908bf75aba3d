package org.kingbolt.core.diagram;

import java.math.BigInteger;
import java.util.Arrays;
import java.util.List;

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
   * Makes a family of listed sets.
   *
   * @param variables the number of variables
   * @param sets sets of variables in increasing order, none of them a part of another one, in
   *     lexicographic order
   * @param meter hears of every node
   * @return the family, its variables in order of their numbers. Cost: linear in the sets' members.
   */
  public static SetDiagram of(int variables, List<int[]> sets, WorkMeter meter) {
    return new SetDiagram(SetSelection.listed(variables, sets, meter));
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
   * Tells whether a set contains some set of the family.
   *
   * @param members indexed by variable: true for the variables of the set
   * @return whether all variables of some set of the family are among them. Cost: one scan.
   */
  public boolean hasSubset(boolean[] members) {
    boolean[] has = new boolean[nodes.size()];
    has[ONLY_EMPTY_SET] = true;
    for (int level = nodes.levels() - 1; level >= 0; level--) {
      boolean member = members[nodes.variableAt(level)];
      for (int id = nodes.from(level); id < nodes.to(level); id++) {
        has[id] = has[nodes.low(id)] || (member && has[nodes.high(id)]);
      }
    }
    return has[nodes.root()];
  }

  /**
   * Adds up the weights of all sets, the products of their variables' weights.
   *
   * @param weights indexed by variable, at least 0
   * @return the sum. Cost: one scan.
   */
  public double sumOfWeights(double[] weights) {
    double[] sum = new double[nodes.size()];
    sum[ONLY_EMPTY_SET] = 1;
    for (int level = nodes.levels() - 1; level >= 0; level--) {
      double weight = weights[nodes.variableAt(level)];
      for (int id = nodes.from(level); id < nodes.to(level); id++) {
        sum[id] = sum[nodes.low(id)] + weight * sum[nodes.high(id)];
      }
    }
    return sum[nodes.root()];
  }

  /**
   * Selects the sets that contain a variable.
   *
   * @param variable of the order
   * @param meter hears of every node
   * @return the smaller family. Cost: one scan.
   */
  public SetDiagram containing(int variable, WorkMeter meter) {
    return new SetDiagram(SetSelection.with(nodes, variable, true, meter));
  }

  /**
   * Selects the sets that do not contain a variable.
   *
   * @param variable of the order
   * @param meter hears of every node
   * @return the smaller family. Cost: one scan.
   */
  public SetDiagram without(int variable, WorkMeter meter) {
    return new SetDiagram(SetSelection.with(nodes, variable, false, meter));
  }

  /**
   * Selects the sets of at most so many variables.
   *
   * @param size at least 0
   * @param meter hears of every node
   * @return the smaller family, this one if it has no larger sets. Cost: at most the nodes times
   *     the size.
   */
  public SetDiagram ofSizeAtMost(int size, WorkMeter meter) {
    return new SetDiagram(SetSelection.atMost(nodes, size, meter));
  }

  /**
   * Walks over the family in order of size and, within a size, in lexicographic order of variables:
   * sets are compared by their smallest variables, then by the next.
   *
   * @param meter hears of every step
   * @return a fresh walk; nothing is listed in advance. Cost: where levels are in order of
   *     variables, as for {@link #walk}; otherwise the sets of one size at a time are selected, a
   *     scan over the nodes for every size still open, and split by one variable after the other.
   */
  public SetWalk walkByVariables(WorkMeter meter) {
    boolean inOrder = true;
    for (int level = 1; level < nodes.levels(); level++) {
      inOrder &= nodes.variableAt(level - 1) < nodes.variableAt(level);
    }
    return inOrder ? walk(meter) : new VariableWalk(nodes, meter);
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
