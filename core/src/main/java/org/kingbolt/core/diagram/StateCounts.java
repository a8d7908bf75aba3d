package org.kingbolt.core.diagram;

import java.math.BigInteger;

/**
 * Exact counts over the states of a function: how many working states have exactly j variables
 * working.
 *
 * <p>Method: every node carries the generating function of its working states, as one big integer
 * whose blocks of bits are the coefficients, so that adding and shifting do the arithmetic. Cost:
 * one scan; an operation on {@code levels^2} bits a node.
 */
public final class StateCounts {

  private StateCounts() {}

  /**
   * Counts working states by number of working variables.
   *
   * @param diagram any diagram
   * @param meter hears of every node, in proportion to the size of its number
   * @return entry j, from 0 to the number of levels, counts the working states with j variables
   *     working
   */
  public static BigInteger[] workingBySize(Diagram diagram, WorkMeter meter) {
    int levels = diagram.levels();
    int block = levels + 1;
    long nodesPerNumber = 1 + (long) block * block / 8 / WorkMeter.BYTES_PER_NODE;
    BigInteger[] count = new BigInteger[diagram.size()];
    count[Diagram.FAILS] = BigInteger.ZERO;
    count[Diagram.WORKS] = BigInteger.ONE;
    int[] levelOf = levels(diagram);
    for (int level = levels - 1; level >= 0; level--) {
      for (int id = diagram.from(level); id < diagram.to(level); id++) {
        meter.at(id * nodesPerNumber);
        BigInteger low = free(count[diagram.low(id)], levelOf[diagram.low(id)] - level - 1, block);
        BigInteger high =
            free(count[diagram.high(id)], levelOf[diagram.high(id)] - level - 1, block);
        count[id] = low.add(high.shiftLeft(block));
      }
    }
    BigInteger all = free(count[diagram.root()], levelOf[diagram.root()], block);
    BigInteger[] bySize = new BigInteger[levels + 1];
    BigInteger mask = BigInteger.ONE.shiftLeft(block).subtract(BigInteger.ONE);
    for (int size = 0; size <= levels; size++) {
      bySize[size] = all.shiftRight(size * block).and(mask);
    }
    return bySize;
  }

  /** Lets a number of variables vary freely: times (1 + x) for each. */
  private static BigInteger free(BigInteger counts, int variables, int block) {
    if (counts.signum() == 0) {
      return counts;
    }
    BigInteger result = counts;
    for (int i = 0; i < variables; i++) {
      result = result.add(result.shiftLeft(block));
    }
    return result;
  }

  private static int[] levels(Diagram diagram) {
    int[] levelOf = new int[diagram.size()];
    levelOf[Diagram.FAILS] = diagram.levels();
    levelOf[Diagram.WORKS] = diagram.levels();
    for (int level = 0; level < diagram.levels(); level++) {
      for (int id = diagram.from(level); id < diagram.to(level); id++) {
        levelOf[id] = level;
      }
    }
    return levelOf;
  }
}
