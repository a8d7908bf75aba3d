package org.kingbolt.core.published;

import java.math.BigInteger;
import java.util.ArrayList;
import java.util.List;
import java.util.Set;
import java.util.stream.Collectors;
import java.util.stream.StreamSupport;
import org.apache.commons.math3.fraction.BigFraction;
import org.kingbolt.core.ReliabilityPolynomial;
import org.kingbolt.core.Signature;

/** Exact figures that follow from a system's answers, and lists of them for comparison. */
final class Exact {

  private Exact() {}

  /**
   * The mean time to failure with independent exponential lives of rate 1: the i-th failure of n is
   * expected at the sum of 1/j for j from n - i + 1 to n. Source: Samaniego, System Signatures and
   * their Applications in Engineering Reliability, 2007 (from memory).
   */
  static BigFraction meanLife(Signature signature) {
    int n = signature.fractions().size();
    BigFraction mean = BigFraction.ZERO;
    BigFraction time = BigFraction.ZERO;
    for (int i = 0; i < n; i++) {
      time = time.add(new BigFraction(1, n - i));
      mean = mean.add(signature.fractions().get(i).multiply(time));
    }
    return mean;
  }

  /** The number of working states: 2^n r(1/2). */
  static BigInteger states(ReliabilityPolynomial polynomial) {
    return polynomial.workingStates().stream().reduce(BigInteger.ZERO, BigInteger::add);
  }

  static List<BigInteger> integers(long... values) {
    List<BigInteger> list = new ArrayList<>();
    for (long value : values) {
      list.add(BigInteger.valueOf(value));
    }
    return list;
  }

  static Set<Set<String>> sets(Iterable<Set<String>> sets) {
    return StreamSupport.stream(sets.spliterator(), false).collect(Collectors.toSet());
  }

  /** Sets of components of one character each, such as {@code "14,25,135"}. */
  static Set<Set<String>> sets(String text) {
    return List.of(text.split(",", -1)).stream()
        .map(word -> Set.of(word.split("")))
        .collect(Collectors.toSet());
  }
}
