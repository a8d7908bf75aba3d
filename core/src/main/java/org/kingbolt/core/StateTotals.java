package org.kingbolt.core;

import java.math.BigInteger;
import java.util.ArrayList;
import java.util.Collections;
import java.util.List;

/** Lists of integers that follow from the numbers of working states by size. */
final class StateTotals {

  private StateTotals() {}

  /** The binomial coefficients of n, from 0 to n. */
  static List<BigInteger> binomials(int n) {
    List<BigInteger> row = new ArrayList<>(n + 1);
    BigInteger value = BigInteger.ONE;
    for (int j = 0; j <= n; j++) {
      row.add(value);
      value = value.multiply(BigInteger.valueOf(n - j)).divide(BigInteger.valueOf(j + 1));
    }
    return row;
  }

  /** What is missing from all states: the failed ones, by number of working components. */
  static List<BigInteger> failed(List<BigInteger> working) {
    List<BigInteger> failed = binomials(working.size() - 1);
    for (int j = 0; j < failed.size(); j++) {
      failed.set(j, failed.get(j).subtract(working.get(j)));
    }
    return failed;
  }

  /** The working states of the dual: a set works there when its complement fails here. */
  static List<BigInteger> dual(List<BigInteger> working) {
    List<BigInteger> dual = failed(working);
    Collections.reverse(dual);
    return List.copyOf(dual);
  }

  /**
   * From the coefficients c_j of p^j (1-p)^(m-j), j from 0 to m, those of the derivative: (j+1)
   * c_(j+1) - (m-j) c_j, j from 0 to m-1.
   */
  static List<BigInteger> derived(List<BigInteger> counts) {
    int m = counts.size() - 1;
    List<BigInteger> derived = new ArrayList<>(Math.max(0, m));
    for (int j = 0; j < m; j++) {
      BigInteger gained = counts.get(j + 1).multiply(BigInteger.valueOf(j + 1L));
      derived.add(gained.subtract(counts.get(j).multiply(BigInteger.valueOf(m - (long) j))));
    }
    return derived;
  }

  static BigInteger sum(List<BigInteger> values) {
    return values.stream().reduce(BigInteger.ZERO, BigInteger::add);
  }
}
