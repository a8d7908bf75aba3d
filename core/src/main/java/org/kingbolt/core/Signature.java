package org.kingbolt.core;

import java.math.BigInteger;
import java.util.ArrayList;
import java.util.List;
import java.util.stream.Collectors;
import org.apache.commons.math3.fraction.BigFraction;

/**
 * The signature of a system: entry i is the probability that the i-th component failure, of
 * exchangeable components failing one after another, is the one that makes the system fail. Exact
 * fractions that add up to 1.
 *
 * <p>Immutable; safe to share between threads. Equal when the fractions are equal.
 *
 * <p>Source: Samaniego, On closure of the IFR class under formation of coherent systems, IEEE
 * Trans. Reliab. 34 (1985) 69; by counts of states as in Boland, Signatures of indirect majority
 * systems, J. Appl. Probab. 38 (2001) 597.
 */
public final class Signature {

  private final List<BigFraction> fractions;

  private Signature(List<BigFraction> fractions) {
    this.fractions = List.copyOf(fractions);
  }

  /** From the numbers of working states by number of working components. */
  static Signature of(List<BigInteger> workingStates) {
    int n = workingStates.size() - 1;
    List<BigFraction> survives = new ArrayList<>();
    BigInteger all = BigInteger.ONE;
    for (int failed = 0; failed <= n; failed++) {
      survives.add(new BigFraction(workingStates.get(n - failed), all));
      all = all.multiply(BigInteger.valueOf(n - failed)).divide(BigInteger.valueOf(failed + 1));
    }
    List<BigFraction> fractions = new ArrayList<>();
    for (int i = 1; i <= n; i++) {
      fractions.add(survives.get(i - 1).subtract(survives.get(i)));
    }
    return new Signature(fractions);
  }

  /**
   * Returns the fractions.
   *
   * @return entry i - 1 belongs to the i-th failure; as many entries as components
   */
  public List<BigFraction> fractions() {
    return fractions;
  }

  /**
   * Returns the fractions rounded to doubles.
   *
   * @return a fresh array in the order of {@link #fractions()}
   */
  public double[] toArray() {
    return fractions.stream().mapToDouble(BigFraction::doubleValue).toArray();
  }

  @Override
  public boolean equals(Object other) {
    return other instanceof Signature that && fractions.equals(that.fractions);
  }

  @Override
  public int hashCode() {
    return fractions.hashCode();
  }

  /**
   * The fractions in a row, such as {@code (0, 1/5, 3/5, 1/5, 0)}.
   *
   * @return one line
   */
  @Override
  public String toString() {
    return fractions.stream()
        .map(
            fraction ->
                fraction.getDenominator().equals(BigInteger.ONE)
                    ? fraction.getNumerator().toString()
                    : fraction.getNumerator() + "/" + fraction.getDenominator())
        .collect(Collectors.joining(", ", "(", ")"));
  }
}
