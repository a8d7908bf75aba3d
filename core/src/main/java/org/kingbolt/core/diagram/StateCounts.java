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

  /** From so many free variables on, a power is multiplied. */
  private static final int FEW = 8;

  private final int block;

  /** 1 + x. */
  private final BigInteger factor;

  private int lastExponent;
  private BigInteger lastPower = BigInteger.ONE;

  private StateCounts(int block) {
    this.block = block;
    this.factor = BigInteger.ONE.add(BigInteger.ONE.shiftLeft(block));
  }

  /**
   * Counts working states by number of working variables.
   *
   * @param diagram any diagram
   * @param meter hears of every node, in proportion to the size of its number
   * @return entry j, from 0 to the number of levels, counts the working states with j variables
   *     working
   */
  public static BigInteger[] workingBySize(Diagram diagram, WorkMeter meter) {
    return new StateCounts(diagram.levels() + 1).bySize(diagram, meter);
  }

  private BigInteger[] bySize(Diagram diagram, WorkMeter meter) {
    int levels = diagram.levels();
    long nodesPerNumber = 1 + (long) block * block / 8 / WorkMeter.BYTES_PER_NODE;
    BigInteger[] count = new BigInteger[diagram.size()];
    count[Diagram.FAILS] = BigInteger.ZERO;
    count[Diagram.WORKS] = BigInteger.ONE;
    int[] levelOf = levels(diagram);
    for (int level = levels - 1; level >= 0; level--) {
      for (int id = diagram.from(level); id < diagram.to(level); id++) {
        meter.now(id * nodesPerNumber);
        BigInteger low = free(count[diagram.low(id)], levelOf[diagram.low(id)] - level - 1);
        BigInteger high = free(count[diagram.high(id)], levelOf[diagram.high(id)] - level - 1);
        count[id] = low.add(high.shiftLeft(block));
      }
    }
    BigInteger all = free(count[diagram.root()], levelOf[diagram.root()]);
    BigInteger[] bySize = new BigInteger[levels + 1];
    BigInteger mask = BigInteger.ONE.shiftLeft(block).subtract(BigInteger.ONE);
    for (int size = 0; size <= levels; size++) {
      bySize[size] = all.shiftRight(size * block).and(mask);
    }
    return bySize;
  }

  /** Lets a number of variables vary freely: times (1 + x) for each. */
  private BigInteger free(BigInteger counts, int variables) {
    if (counts.signum() == 0 || variables == 0) {
      return counts;
    }
    if (counts.equals(BigInteger.ONE)) {
      return powers(variables);
    }
    if (variables > FEW) {
      return counts.multiply(factor.pow(variables));
    }
    BigInteger result = counts;
    for (int i = 0; i < variables; i++) {
      result = result.add(result.shiftLeft(block));
    }
    return result;
  }

  /** (1 + x) to some power. Going up the levels asks for ever higher powers, one by one. */
  private BigInteger powers(int exponent) {
    if (exponent < lastExponent) {
      return factor.pow(exponent);
    }
    for (; lastExponent < exponent; lastExponent++) {
      lastPower = lastPower.add(lastPower.shiftLeft(block));
    }
    return lastPower;
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
