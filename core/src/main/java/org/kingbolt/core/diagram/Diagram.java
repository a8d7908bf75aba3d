package org.kingbolt.core.diagram;

import java.util.Arrays;

/**
 * An ordered decision diagram over variables (components, or slots of an operator), in parallel
 * primitive arrays, bottom-up by level.
 *
 * <ul>
 *   <li>Node {@link #FAILS} (0) and node {@link #WORKS} (1) are the two outcomes; inner nodes are
 *       {@code 2 .. size()-1}.
 *   <li>Level 0 is read first. The nodes of level L have the ids {@code from(L) .. to(L)-1}; deeper
 *       levels have smaller ids, so a scan in increasing id always meets children before parents.
 *   <li>At an inner node, {@link #low(int)} is followed when the variable of its level has failed
 *       and {@link #high(int)} when it works. Both lie on deeper levels.
 * </ul>
 *
 * <p>A diagram made by {@link NodeTable#diagram} is reduced: no two nodes stand for the same
 * function and every level tests something. Templates made by {@link Layers} need not be.
 *
 * <p>Immutable and safe to share between threads. Memory: 8 bytes a node.
 *
 * <p>Example: {@code for (int id = 2; id < d.size(); id++) works[id] = p * works[d.high(id)] + q *
 * works[d.low(id)];}
 */
public final class Diagram {

  /** The id of the outcome "the system fails". */
  public static final int FAILS = 0;

  /** The id of the outcome "the system works". */
  public static final int WORKS = 1;

  private final int root;
  private final int[] low;
  private final int[] high;
  private final int[] variableAtLevel;

  /** {@code bound[L]} is the end (exclusive) of level L; {@code bound[L + 1]} its start. */
  private final int[] bound;

  /** Takes ownership of the arrays. */
  Diagram(int root, int[] low, int[] high, int[] variableAtLevel, int[] bound) {
    this.root = root;
    this.low = low;
    this.high = high;
    this.variableAtLevel = variableAtLevel;
    this.bound = bound;
  }

  /** Makes the diagram of a function that does not depend on anything. */
  static Diagram constant(boolean works) {
    return new Diagram(works ? WORKS : FAILS, new int[2], new int[2], new int[0], new int[] {2});
  }

  /**
   * Returns the id of the root.
   *
   * @return a node id; {@link #FAILS} or {@link #WORKS} when the function is constant
   */
  public int root() {
    return root;
  }

  /**
   * Returns the number of ids, the two outcomes included.
   *
   * @return at least 2
   */
  public int size() {
    return low.length;
  }

  /**
   * Returns the number of inner nodes.
   *
   * @return {@code size() - 2}
   */
  public int nodeCount() {
    return low.length - 2;
  }

  /**
   * Returns the number of levels, which is the number of variables in the order.
   *
   * @return at least 0
   */
  public int levels() {
    return variableAtLevel.length;
  }

  /**
   * Returns the variable tested on a level.
   *
   * @param level from 0 to {@code levels() - 1}
   * @return the variable's number
   */
  public int variableAt(int level) {
    return variableAtLevel[level];
  }

  /**
   * Returns the order of the variables.
   *
   * @return a fresh array; entry L is the variable of level L
   */
  public int[] order() {
    return variableAtLevel.clone();
  }

  /**
   * Returns the first id of a level.
   *
   * @param level from 0 to {@code levels() - 1}
   * @return the id; equal to {@link #to(int)} when the level is empty
   */
  public int from(int level) {
    return bound[level + 1];
  }

  /**
   * Returns the id after the last one of a level.
   *
   * @param level from 0 to {@code levels() - 1}
   * @return the id
   */
  public int to(int level) {
    return bound[level];
  }

  /**
   * Returns the node reached when the variable of this node has failed.
   *
   * @param id an inner node
   * @return a smaller id on a deeper level
   */
  public int low(int id) {
    return low[id];
  }

  /**
   * Returns the node reached when the variable of this node works.
   *
   * @param id an inner node
   * @return a smaller id on a deeper level
   */
  public int high(int id) {
    return high[id];
  }

  /** The array behind {@link #low(int)}, for the innermost loops; not to be written to. */
  int[] lows() {
    return low;
  }

  /** The array behind {@link #high(int)}, for the innermost loops; not to be written to. */
  int[] highs() {
    return high;
  }

  /**
   * Returns the level of a node.
   *
   * @param id any node id
   * @return the level; {@link #levels()} for the two outcomes. Cost: logarithmic in the levels.
   */
  public int levelOf(int id) {
    if (id < 2) {
      return levels();
    }
    int lo = 0;
    int hi = levels() - 1;
    while (lo < hi) {
      int mid = (lo + hi) >>> 1;
      if (id >= bound[mid + 1]) {
        hi = mid;
      } else {
        lo = mid + 1;
      }
    }
    return lo;
  }

  /**
   * Tells whether the function works in one state.
   *
   * @param working indexed by variable: true where the variable works
   * @return the value of the function. Cost: at most one step a level.
   */
  public boolean works(boolean[] working) {
    int id = root;
    while (id >= 2) {
      id = working[variableAt(levelOf(id))] ? high[id] : low[id];
    }
    return id == WORKS;
  }

  /**
   * Holds one variable at a value.
   *
   * @param variable a variable of this diagram
   * @param works whether it is held working
   * @param meter hears of every node
   * @return the reduced diagram of the function so conditioned; the variable stays in the order, on
   *     a level without nodes. Cost: linear in {@link #size()}.
   */
  public Diagram holding(int variable, boolean works, WorkMeter meter) {
    NodeTable table = new NodeTable(levels(), meter);
    int[] image = new int[size()];
    image[WORKS] = WORKS;
    for (int level = levels() - 1; level >= 0; level--) {
      boolean held = variableAtLevel[level] == variable;
      for (int id = from(level); id < to(level); id++) {
        if (held) {
          image[id] = image[works ? high[id] : low[id]];
        } else {
          image[id] = table.node(level, image[low[id]], image[high[id]]);
        }
      }
    }
    return table.diagram(image[root], variableAtLevel);
  }

  /**
   * Numbers the variables anew and leaves out levels without nodes.
   *
   * @param numbers indexed by present variable: its new number, or -1 to take it out of the order;
   *     only variables that nothing depends on may go
   * @return the same nodes under the new numbers
   * @throws IllegalArgumentException if a variable to be taken out is tested by some node
   */
  public Diagram renumbered(int[] numbers) {
    int[] order = new int[levels()];
    int[] ends = new int[levels() + 1];
    int kept = 0;
    for (int level = 0; level < levels(); level++) {
      int number = numbers[variableAtLevel[level]];
      if (number >= 0) {
        order[kept] = number;
        ends[kept++] = to(level);
      } else if (to(level) > from(level)) {
        throw new IllegalArgumentException(
            "variable " + variableAtLevel[level] + " matters and cannot be taken out");
      }
    }
    ends[kept] = 2;
    return new Diagram(root, low, high, Arrays.copyOf(order, kept), Arrays.copyOf(ends, kept + 1));
  }

  /**
   * Marks the variables that the function depends on.
   *
   * @param variables the number of variables; every variable of the order is below it
   * @return indexed by variable: true where some node tests it, which in a reduced diagram means
   *     that the variable matters
   */
  public boolean[] tested(int variables) {
    boolean[] tested = new boolean[variables];
    for (int level = 0; level < levels(); level++) {
      tested[variableAtLevel[level]] = to(level) > from(level);
    }
    return tested;
  }

  /** Two diagrams are equal when root, order and all nodes are the same. */
  @Override
  public boolean equals(Object other) {
    return other instanceof Diagram that
        && root == that.root
        && Arrays.equals(low, that.low)
        && Arrays.equals(high, that.high)
        && Arrays.equals(variableAtLevel, that.variableAtLevel)
        && Arrays.equals(bound, that.bound);
  }

  @Override
  public int hashCode() {
    return 31 * (31 * Arrays.hashCode(low) + Arrays.hashCode(high)) + root;
  }

  /** A one-line summary for logs. */
  @Override
  public String toString() {
    return "Diagram[" + levels() + " levels, " + nodeCount() + " nodes]";
  }
}
