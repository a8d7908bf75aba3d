package org.kingbolt.core.diagram;

import java.util.Arrays;

/**
 * A guess at the nodes of a knot's diagram for one arrangement of its parts, without building it.
 * While one part of a gate is read, the diagram has to remember, for every gate around it, how many
 * parts have worked so far, and the state of every unit that will be read again, unless the units'
 * state is plain from the fact that a series or parallel gate around is not settled yet.
 */
final class OrderCost {

  private static final int MOST_OPEN = 500;

  private final Composer composer;
  private final int root;
  private final double[] sizes;

  /** How often each expression is used. */
  private final int[] uses;

  private final int[] usesLeft;

  /** How many gates around tell the state of a leaf. */
  private final int[] plain;

  /** Leaves whose state is plain; each gate's own begin at its mark. */
  private int[] plainLeaves = new int[64];

  private int plainCount;

  private final int[] open;
  private final int[] nextLevel;
  private final int[] mark;
  private final double[] width;
  private int remembered;
  private double cost;

  OrderCost(Composer composer, int root, double[] sizes) {
    this.composer = composer;
    this.root = root;
    this.sizes = sizes;
    int expressions = composer.count();
    this.uses = composer.uses();
    this.usesLeft = new int[expressions];
    this.plain = new int[expressions];
    int most = expressions - composer.variables() + 1;
    this.open = new int[most];
    this.nextLevel = new int[most];
    this.mark = new int[most];
    this.width = new double[most];
  }

  /** Runs through the units in the order of the present arrangement. */
  double ofPresent() {
    System.arraycopy(uses, 0, usesLeft, 0, uses.length);
    Arrays.fill(plain, 0);
    plainCount = 0;
    remembered = 0;
    cost = 0;
    open[0] = root;
    nextLevel[0] = 0;
    mark[0] = 0;
    width[0] = 1;
    int depth = 1;
    while (depth > 0) {
      int gate = open[depth - 1];
      int level = nextLevel[depth - 1]++;
      if (level == composer.levels(gate)) {
        depth--;
        if (depth == 0 || !isChain(gate) || !isSame(gate, open[depth - 1])) {
          forget(mark[depth]);
        }
        continue;
      }
      int part = composer.partAt(gate, level);
      double here = width[depth - 1];
      if (composer.operatorOf(gate) instanceof Threshold threshold) {
        here *= threshold.width(level);
      }
      if (composer.isLeaf(part)) {
        read(part, here, isChain(gate));
      } else if (usesLeft[part]-- == uses[part]) {
        open[depth] = part;
        nextLevel[depth] = 0;
        mark[depth] = plainCount;
        width[depth++] = here;
      }
    }
    return cost;
  }

  private boolean isChain(int gate) {
    return composer.operatorOf(gate) instanceof Threshold threshold && threshold.isChain();
  }

  private boolean isSame(int gate, int outer) {
    return isChain(outer)
        && ((Threshold) composer.operatorOf(gate)).isSeries()
            == ((Threshold) composer.operatorOf(outer)).isSeries();
  }

  private void read(int leaf, double here, boolean chain) {
    if (usesLeft[leaf] == uses[leaf]) {
      cost += Math.scalb(here * sizes[composer.variableOf(leaf)], Math.min(remembered, MOST_OPEN));
    }
    remembered -= isRemembered(leaf) ? 1 : 0;
    usesLeft[leaf]--;
    if (chain && uses[leaf] > 1) {
      plain[leaf]++;
      if (plainCount == plainLeaves.length) {
        plainLeaves = Arrays.copyOf(plainLeaves, plainCount << 1);
      }
      plainLeaves[plainCount++] = leaf;
    }
    remembered += isRemembered(leaf) ? 1 : 0;
  }

  private boolean isRemembered(int leaf) {
    return usesLeft[leaf] > 0 && usesLeft[leaf] < uses[leaf] && plain[leaf] == 0;
  }

  /** The states of leaves that were plain within a gate are not so outside. */
  private void forget(int from) {
    while (plainCount > from) {
      int leaf = plainLeaves[--plainCount];
      remembered -= isRemembered(leaf) ? 1 : 0;
      plain[leaf]--;
      remembered += isRemembered(leaf) ? 1 : 0;
    }
  }
}
