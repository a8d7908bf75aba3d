package org.kingbolt.core;

import java.math.BigInteger;
import java.util.ArrayList;
import java.util.Collections;
import java.util.List;

/**
 * The reliability of a system whose components all have the same probability p of working, as a
 * polynomial in p with exact integer coefficients.
 *
 * <p>Two forms are held: by powers of p, {@code r(p) = sum of a_j p^j}, and by counts, {@code r(p)
 * = sum of n_j p^j (1-p)^(n-j)}, where n_j is the number of working states with exactly j working
 * components. Values are computed from the counts, whose terms do not cancel.
 *
 * <p>Immutable; safe to share between threads. Equal when the counts are equal.
 *
 * <p>Source: Moore &amp; Shannon, Reliable circuits using less reliable relays, J. Franklin Inst.
 * 262 (1956) 191; Barlow &amp; Proschan 1975, ch. 2.
 */
public final class ReliabilityPolynomial {

  private final List<BigInteger> workingStates;
  private final List<BigInteger> coefficients;

  ReliabilityPolynomial(List<BigInteger> workingStates) {
    this.workingStates = List.copyOf(workingStates);
    this.coefficients = powers(this.workingStates);
  }

  private static List<BigInteger> powers(List<BigInteger> counts) {
    int n = counts.size() - 1;
    List<BigInteger> powers = new ArrayList<>(Collections.nCopies(n + 1, BigInteger.ZERO));
    for (int j = 0; j <= n; j++) {
      // n_j p^j (1-p)^(n-j), term by term
      BigInteger term = counts.get(j);
      for (int i = 0; i <= n - j && term.signum() != 0; i++) {
        powers.set(j + i, powers.get(j + i).add(term));
        term =
            term.multiply(BigInteger.valueOf(n - j - i)).divide(BigInteger.valueOf(i + 1)).negate();
      }
    }
    int degree = n;
    while (degree > 0 && powers.get(degree).signum() == 0) {
      degree--;
    }
    return List.copyOf(powers.subList(0, degree + 1));
  }

  /**
   * Returns the coefficients of the powers of p.
   *
   * @return entry j is the coefficient of p^j, from 0 up to the degree
   */
  public List<BigInteger> coefficients() {
    return coefficients;
  }

  /**
   * Returns the number of working states by number of working components.
   *
   * @return entry j, from 0 to the number of components, counts the working states with exactly j
   *     working components
   */
  public List<BigInteger> workingStates() {
    return workingStates;
  }

  /**
   * Returns the reliability at one p.
   *
   * @param p the probability of working of every component, from 0 to 1
   * @return both sides, by sums of non-negative terms
   * @throws IllegalArgumentException if p is NaN or outside [0, 1]
   */
  public Probability at(double p) {
    return at(Probability.working(p));
  }

  /**
   * Returns the reliability at one probability, whose small side keeps its digits.
   *
   * @param p the probability of every component
   * @return both sides, by sums of non-negative terms
   */
  public Probability at(Probability p) {
    Check.notNull(p, "probability");
    int n = workingStates.size() - 1;
    double works = 0;
    double fails = 0;
    BigInteger all = BigInteger.ONE;
    for (int j = 0; j <= n; j++) {
      BigInteger working = workingStates.get(j);
      works += term(working, p, j, n);
      fails += term(all.subtract(working), p, j, n);
      all = all.multiply(BigInteger.valueOf(n - j)).divide(BigInteger.valueOf(j + 1));
    }
    return Probability.computed(works, fails);
  }

  /** count p^j q^(n-j), by logarithms where the count is too large for a double. */
  private static double term(BigInteger count, Probability p, int j, int n) {
    if (count.signum() == 0) {
      return 0;
    }
    double value = count.doubleValue();
    double product = Math.pow(p.working(), j) * Math.pow(p.failing(), n - j);
    if (value < 1e300 && product > 1e-290) {
      return value * product;
    }
    if ((j > 0 && p.working() == 0) || (j < n && p.failing() == 0)) {
      return 0;
    }
    int shift = Math.max(0, count.bitLength() - 900);
    double log =
        Math.log(count.shiftRight(shift).doubleValue())
            + shift * Math.log(2)
            + (j == 0 ? 0 : j * Math.log(p.working()))
            + (j == n ? 0 : (n - j) * Math.log(p.failing()));
    return Math.exp(log);
  }

  @Override
  public boolean equals(Object other) {
    return other instanceof ReliabilityPolynomial that && workingStates.equals(that.workingStates);
  }

  @Override
  public int hashCode() {
    return workingStates.hashCode();
  }

  /**
   * The polynomial by powers, such as {@code 2p^2 + 2p^3 - 5p^4 + 2p^5}.
   *
   * @return one line
   */
  @Override
  public String toString() {
    StringBuilder text = new StringBuilder();
    for (int j = 0; j < coefficients.size(); j++) {
      BigInteger a = coefficients.get(j);
      if (a.signum() == 0) {
        continue;
      }
      text.append(text.isEmpty() ? (a.signum() < 0 ? "-" : "") : a.signum() < 0 ? " - " : " + ");
      boolean one = a.abs().equals(BigInteger.ONE);
      text.append(one && j > 0 ? "" : a.abs().toString());
      text.append(j == 0 ? "" : j == 1 ? "p" : "p^" + j);
    }
    return text.isEmpty() ? "0" : text.toString();
  }
}
