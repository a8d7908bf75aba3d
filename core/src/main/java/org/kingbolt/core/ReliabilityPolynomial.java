package org.kingbolt.core;

import com.google.common.base.Suppliers;
import java.math.BigInteger;
import java.util.List;
import java.util.Optional;
import java.util.function.Supplier;
import org.apache.commons.math3.fraction.BigFraction;

/**
 * The reliability of a system whose components all have the same probability p of working, as a
 * polynomial in p with exact integer coefficients.
 *
 * <p>Two forms are known: by powers of p, {@code r(p) = sum of a_j p^j}, and by counts, {@code r(p)
 * = sum of n_j p^j (1-p)^(n-j)}, where n_j is the number of working states with exactly j working
 * components. Values and slopes are computed from the counts, whose terms do not cancel; the powers
 * are worked out when they are first asked for.
 *
 * <p>Assumed: components fail independently, all with the same probability.
 *
 * <p>Immutable; safe to share between threads. Equal when the counts are equal.
 *
 * <p>Example: {@code Structure.atLeast(2, "a", "b", "c").compile().polynomial().toString()} is
 * {@code 3p^2 - 2p^3}.
 *
 * <p>Source: Moore &amp; Shannon, Reliable circuits using less reliable relays, J. Franklin Inst.
 * 262 (1956) 191; Barlow &amp; Proschan 1975, ch. 2.
 */
public final class ReliabilityPolynomial {

  private final List<BigInteger> workingStates;
  private final Supplier<List<BigInteger>> coefficients;
  private final Supplier<List<BigInteger>> criticalStates;
  private final Supplier<CountForm> works;
  private final Supplier<CountForm> fails;
  private final Supplier<CountForm> slope;

  ReliabilityPolynomial(List<BigInteger> workingStates) {
    List<BigInteger> counts = List.copyOf(workingStates);
    this.workingStates = counts;
    coefficients = Suppliers.memoize(() -> PowerForm.of(counts));
    criticalStates = Suppliers.memoize(() -> List.copyOf(StateTotals.derived(counts)));
    works = Suppliers.memoize(() -> new CountForm(counts));
    fails = Suppliers.memoize(() -> new CountForm(StateTotals.failed(counts)));
    slope = Suppliers.memoize(() -> new CountForm(criticalStates.get()));
  }

  /**
   * Returns the coefficients of the powers of p.
   *
   * @return entry j is the coefficient of p^j, from 0 up to the degree. They alternate in sign and
   *     can be very large: for values use {@link #at(double)}. Cost, the first time: about n^2/2
   *     additions of integers of n bits.
   * @throws BudgetExceededException if they do not fit into the heap, or at an interrupt
   */
  public List<BigInteger> coefficients() {
    return coefficients.get();
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
   * Returns the number of critical states by number of working components: pairs of a component and
   * a state of all others in which the component decides.
   *
   * @return entry j, from 0 to the number of components less 1, counts the pairs in which exactly j
   *     of the others work; the coefficients of {@code p^j (1-p)^(n-1-j)} in the derivative
   */
  public List<BigInteger> criticalStates() {
    return criticalStates.get();
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
   * @return both sides, by sums of non-negative terms: each to a relative error of a few units in
   *     the last place for every thousand components, as long as it is not below the range of a
   *     double, about 1e-308; what is smaller comes out as 0. Cost: linear.
   */
  public Probability at(Probability p) {
    Check.notNull(p, "probability");
    return Probability.computed(works.get().at(p), fails.get().at(p));
  }

  /**
   * Returns the reliability at a fraction, exactly.
   *
   * @param p the probability of working of every component, from 0 to 1
   * @return the exact value; at 1/2 it is the number of working states divided by that of all
   *     states
   * @throws IllegalArgumentException if p is outside [0, 1]
   */
  public BigFraction at(BigFraction p) {
    Check.notNull(p, "probability");
    BigInteger up = p.getNumerator();
    BigInteger all = p.getDenominator();
    BigInteger down = all.subtract(up);
    if (up.signum() < 0 || down.signum() < 0) {
      throw new IllegalArgumentException(
          "probability of working is " + p + "; it must be a fraction from 0 to 1");
    }
    BigInteger sum = BigInteger.ZERO;
    BigInteger power = BigInteger.ONE;
    for (int j = workingStates.size() - 1; j >= 0; j--) {
      // Horner in up, with the powers of down that are still to come
      sum = sum.multiply(up).add(workingStates.get(j).multiply(power));
      power = power.multiply(down);
    }
    return new BigFraction(sum, all.pow(workingStates.size() - 1));
  }

  /**
   * Returns the slope at one p: how much reliability the system gains for a small gain of all
   * components, which is the sum of their Birnbaum importances.
   *
   * @param p the probability of working of every component, from 0 to 1
   * @return the derivative, at least 0, by a sum of non-negative terms
   * @throws IllegalArgumentException if p is NaN or outside [0, 1]
   */
  public double derivative(double p) {
    return derivative(Probability.working(p));
  }

  /**
   * Returns the slope at one probability, whose small side keeps its digits.
   *
   * @param p the probability of every component
   * @return the derivative by the probability of working, at least 0, as precise as {@link
   *     #at(Probability)}
   */
  public double derivative(Probability p) {
    Check.notNull(p, "probability");
    return workingStates.size() == 1 ? 0 : slope.get().at(p);
  }

  /**
   * Finds where the system is exactly as reliable as one of its components: the crossing of the
   * S-shaped curve with the diagonal.
   *
   * <p>The curve crosses the diagonal at most once, and from below (Moore &amp; Shannon 1956). It
   * does so when no component alone makes the system work and none alone makes it fail; otherwise
   * the system is on one side of a single component throughout, or equivalent to it.
   *
   * @return the p strictly between 0 and 1 with r(p) = p, its smaller side to the precision of a
   *     double; empty when there is no crossing. Cost: some sixty values.
   */
  public Optional<Probability> crossing() {
    return Crossing.of(workingStates);
  }

  /**
   * Finds from which probability on the system is more reliable than one of its components.
   *
   * @return the smallest p such that r > p everywhere between p and 1: {@link
   *     Probability#IMPOSSIBLE}, which is p = 0, where that is always so, as for parallel
   *     components; the {@link #crossing()} where there is one; empty where the system is never
   *     more reliable, as for components in series and for a single one
   */
  public Optional<Probability> betterThanComponentFrom() {
    return Crossing.betterFrom(workingStates);
  }

  /**
   * Finds where the curve is steepest: where an improvement of all components tells most.
   *
   * @return the p from 0 to 1 with the largest {@link #derivative(double)}, the smallest one if
   *     there are several, and 0 for a single component. A lesser turning point whose slope differs
   *     by less than 1e-13 of it may be given instead. Cost: some hundred values, and more for
   *     curves that turn several times.
   */
  public Probability steepest() {
    return SlopeSearch.steepest(criticalStates());
  }

  /**
   * Returns the polynomial of the dual system, which works where the complement of its working
   * components fails this one: {@code 1 - r(1-p)}.
   *
   * @return the dual's polynomial
   */
  public ReliabilityPolynomial dual() {
    return new ReliabilityPolynomial(StateTotals.dual(workingStates));
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
    List<BigInteger> powers = coefficients();
    StringBuilder text = new StringBuilder();
    for (int j = 0; j < powers.size(); j++) {
      BigInteger a = powers.get(j);
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
