package org.kingbolt.core;

import com.google.common.base.Suppliers;
import java.math.BigInteger;
import java.util.ArrayList;
import java.util.List;
import java.util.function.Supplier;
import java.util.stream.Collectors;
import org.apache.commons.math3.fraction.BigFraction;
import org.kingbolt.core.diagram.WorkMeter;

/**
 * The signature of a system: entry i is the probability that the i-th component failure, of
 * exchangeable components failing one after another, is the one that makes the system fail. Exact
 * fractions that add up to 1.
 *
 * <p>It depends on the structure alone. With lives that are independent and alike, or exchangeable,
 * the system's life is the i-th component failure with the probability of entry i, so that mean
 * lives and comparisons of systems follow from it.
 *
 * <p>Immutable; safe to share between threads. Equal when the fractions are equal.
 *
 * <p>Example: {@code Structure.atLeast(2, "a", "b", "c").compile().signature().toString()} is
 * {@code (0, 1, 0)}.
 *
 * <p>Source: Samaniego, On closure of the IFR class under formation of coherent systems, IEEE
 * Trans. Reliab. 34 (1985) 69; by counts of states as in Boland, Signatures of indirect majority
 * systems, J. Appl. Probab. 38 (2001) 597.
 */
public final class Signature {

  private final List<BigInteger> workingStates;
  private final Supplier<List<BigFraction>> fractions;

  /** From the numbers of working states by number of working components. */
  Signature(List<BigInteger> workingStates) {
    List<BigInteger> counts = List.copyOf(workingStates);
    this.workingStates = counts;
    this.fractions = Suppliers.memoize(() -> fractions(counts));
  }

  private static List<BigFraction> fractions(List<BigInteger> counts) {
    int n = counts.size() - 1;
    List<BigInteger> critical = StateTotals.derived(counts);
    List<BigFraction> fractions = new ArrayList<>(n);
    BigInteger all = BigInteger.valueOf(n);
    for (int i = 1; i <= n; i++) {
      // i - 1 have failed already; n C(n-1, i-1) pairs of such a state and the next to fail
      fractions.add(new BigFraction(critical.get(n - i), all));
      all = all.multiply(BigInteger.valueOf(n - i)).divide(BigInteger.valueOf(i));
    }
    return List.copyOf(fractions);
  }

  /**
   * Returns the fractions.
   *
   * @return entry i - 1 belongs to the i-th failure; as many entries as components
   */
  public List<BigFraction> fractions() {
    return fractions.get();
  }

  /**
   * Returns the fractions rounded to doubles.
   *
   * @return a fresh array in the order of {@link #fractions()}
   */
  public double[] toArray() {
    return rounded(fractions());
  }

  /**
   * Returns the tail: the probabilities that the system survives so many failures.
   *
   * @return entry i, from 0 to the number of components, is the probability that the system still
   *     works when i components have failed: the sum of all fractions after the i-th; falling from
   *     1 to 0
   */
  public List<BigFraction> tail() {
    int n = order();
    List<BigInteger> all = StateTotals.binomials(n);
    List<BigFraction> tail = new ArrayList<>(n + 1);
    for (int failed = 0; failed <= n; failed++) {
      tail.add(new BigFraction(workingStates.get(n - failed), all.get(failed)));
    }
    return List.copyOf(tail);
  }

  /**
   * Returns the tail rounded to doubles.
   *
   * @return a fresh array in the order of {@link #tail()}
   */
  public double[] tailToArray() {
    return rounded(tail());
  }

  private static double[] rounded(List<BigFraction> fractions) {
    return fractions.stream()
        .mapToDouble(f -> Ratios.toDouble(f.getNumerator(), f.getDenominator()))
        .toArray();
  }

  /**
   * Returns the number of components.
   *
   * @return the number of fractions
   */
  public int order() {
    return workingStates.size() - 1;
  }

  /**
   * Returns the mean number of failures that it takes to make the system fail.
   *
   * @return the mean of the signature, from 1 to the number of components
   */
  public BigFraction meanFailures() {
    List<BigFraction> tail = tail();
    return tail.subList(0, order()).stream().reduce(BigFraction.ZERO, BigFraction::add);
  }

  /**
   * Returns the mean life of the system when the components' lives are independent and exponential
   * with rate 1: the i-th failure of n is expected at 1/n + 1/(n-1) + ... + 1/(n-i+1). With rate
   * {@code a} it is this divided by {@code a}.
   *
   * @return exactly; 49/60 for the bridge of five components
   * @throws IllegalStateException if the system never fails: it is the side of a {@link Pivot} that
   *     works without further components
   */
  public BigFraction meanLifetime() {
    checkFails();
    int n = order();
    // each term 1/(n C(n-1, i)) divides the least common multiple of 1 to n
    BigInteger common = BigInteger.ONE;
    for (int i = 2; i <= n; i++) {
      BigInteger next = BigInteger.valueOf(i);
      common = common.divide(common.gcd(next)).multiply(next);
    }
    BigInteger sum = BigInteger.ZERO;
    BigInteger orders = BigInteger.valueOf(n);
    for (int failed = 0; failed < n; failed++) {
      sum = sum.add(common.divide(orders).multiply(workingStates.get(n - failed)));
      orders =
          orders
              .multiply(BigInteger.valueOf(n - 1L - failed))
              .divide(BigInteger.valueOf(failed + 1L));
    }
    return new BigFraction(sum, common);
  }

  /**
   * Returns the mean life of the system for components of any exchangeable lives, from the mean
   * times of the first, second, ... failure among them (order statistics).
   *
   * @param meanFailureTimes entry i - 1 is the mean time of the i-th failure; as many as
   *     components, none negative, none smaller than the one before
   * @return the mean of these times, weighted by the signature
   * @throws IllegalArgumentException if there are too few or too many times, or one is NaN,
   *     infinite, negative, or smaller than the one before
   */
  public double meanLifetime(double... meanFailureTimes) {
    Check.notNull(meanFailureTimes, "array of mean failure times");
    checkFails();
    if (meanFailureTimes.length != order()) {
      throw new IllegalArgumentException(
          meanFailureTimes.length
              + " mean failure times are given for a system of "
              + order()
              + " components; give one for each failure, the first one first");
    }
    double[] weights = toArray();
    double sum = 0;
    double before = 0;
    for (int i = 0; i < weights.length; i++) {
      double time = meanFailureTimes[i];
      if (!(time >= before && time < Double.POSITIVE_INFINITY)) {
        throw new IllegalArgumentException(
            "mean time of failure "
                + (i + 1)
                + " is "
                + time
                + "; it must be a finite number of at least "
                + (i == 0 ? "0" : before + ", the time of the failure before it"));
      }
      sum += weights[i] * time;
      before = time;
    }
    return sum;
  }

  private void checkFails() {
    if (workingStates.get(0).signum() > 0) {
      throw new IllegalStateException("the system never fails, and so has no mean life");
    }
  }

  /**
   * Returns the minimal signature: with which weights, which may be negative, the system's life is
   * distributed like a mixture of the lives of series systems of its components. They are the
   * coefficients of the powers of p in {@link ReliabilityPolynomial}.
   *
   * <p>Source: Navarro, Ruiz &amp; Sandoval, Properties of coherent systems with dependent
   * components, Commun. Statist. Theory Methods 36 (2007) 175.
   *
   * @return entry i - 1 is the weight of i components in series; as many entries as components,
   *     which add up to 1
   * @throws BudgetExceededException if they do not fit into the heap, or at an interrupt
   */
  public List<BigInteger> minimalSignature() {
    return weights(workingStates);
  }

  /**
   * Returns the maximal signature: with which weights, which may be negative, the system's life is
   * distributed like a mixture of the lives of parallel systems of its components.
   *
   * <p>Source: as for {@link #minimalSignature()}.
   *
   * @return entry i - 1 is the weight of i components in parallel; as many entries as components,
   *     which add up to 1
   * @throws BudgetExceededException if they do not fit into the heap, or at an interrupt
   */
  public List<BigInteger> maximalSignature() {
    return weights(StateTotals.dual(workingStates));
  }

  private static List<BigInteger> weights(List<BigInteger> counts) {
    List<BigInteger> powers = PowerForm.of(counts);
    List<BigInteger> weights = new ArrayList<>(powers.subList(1, powers.size()));
    while (weights.size() < counts.size() - 1) {
      weights.add(BigInteger.ZERO);
    }
    return List.copyOf(weights);
  }

  /**
   * Returns the signature of the same system with further components that do not matter: the one of
   * larger order whose life has the same distribution. Systems of different orders are compared
   * through it.
   *
   * <p>Source: Samaniego, System Signatures and their Applications in Engineering Reliability,
   * 2007, ch. 3.
   *
   * @param order the number of components, at least that of this system
   * @return the longer signature
   * @throws IllegalArgumentException if the order is less than that of this system
   * @throws BudgetExceededException if it does not fit into the heap, or at an interrupt
   */
  public Signature ofOrder(int order) {
    if (order < order()) {
      throw new IllegalArgumentException(
          "order "
              + order
              + " is less than the "
              + order()
              + " components of the system; a signature can be made longer only");
    }
    WorkMeter meter = Budget.ofHeap().start("making a signature longer");
    List<BigInteger> counts = new ArrayList<>(workingStates);
    for (int n = order() + 1; n <= order; n++) {
      meter.now(1 + (long) order * n / Byte.SIZE / WorkMeter.BYTES_PER_NODE);
      counts.add(BigInteger.ZERO);
      for (int j = n; j > 0; j--) {
        counts.set(j, counts.get(j).add(counts.get(j - 1)));
      }
    }
    return new Signature(counts);
  }

  /**
   * Compares this system's life with that of another one whose components are of the same kind. Of
   * systems of different orders the smaller one is taken with further components that do not
   * matter.
   *
   * @param other the signature of the other system
   * @return the outcome in the stochastic, the hazard rate and the likelihood ratio order, exactly
   * @throws BudgetExceededException if the longer signature does not fit into the heap, or at an
   *     interrupt
   */
  public SignatureComparison compare(Signature other) {
    int order = Math.max(order(), Check.notNull(other, "other signature").order());
    return SignatureComparison.of(ofOrder(order).workingStates, other.ofOrder(order).workingStates);
  }

  @Override
  public boolean equals(Object other) {
    return other instanceof Signature that && workingStates.equals(that.workingStates);
  }

  @Override
  public int hashCode() {
    return workingStates.hashCode();
  }

  /**
   * The fractions in a row, such as {@code (0, 1/5, 3/5, 1/5, 0)}.
   *
   * @return one line
   */
  @Override
  public String toString() {
    return fractions().stream()
        .map(
            fraction ->
                fraction.getDenominator().equals(BigInteger.ONE)
                    ? fraction.getNumerator().toString()
                    : fraction.getNumerator() + "/" + fraction.getDenominator())
        .collect(Collectors.joining(", ", "(", ")"));
  }
}
