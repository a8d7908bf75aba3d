package org.kingbolt.core;

import java.math.BigInteger;
import java.util.ArrayList;
import java.util.List;

/**
 * How the life of one system compares with that of another one made of components of the same kind,
 * as far as their signatures tell: in three orders, each of which implies those before it.
 *
 * <p>If two signatures are ordered then so are the lives of the systems: stochastically for all
 * exchangeable lives; in the hazard rate order for all independent lives with one continuous
 * distribution, and in the likelihood ratio order for those that have a density. Signatures that
 * are not ordered say nothing about the lives.
 *
 * <p>Source: Kochar, Mukerjee &amp; Samaniego, The signature of a coherent system and its
 * application to comparisons among systems, Naval Res. Logist. 46 (1999) 507.
 *
 * <p>Example: {@code three.signature().compare(two.signature()).stochastic()} is {@code LONGER}
 * where three components in parallel stand against two.
 *
 * @param stochastic the chance of surviving any number of failures
 * @param hazardRate the ratio of these chances, which must be monotone
 * @param likelihoodRatio the ratio of the signatures' entries, which must be monotone
 */
public record SignatureComparison(Outcome stochastic, Outcome hazardRate, Outcome likelihoodRatio) {

  /** The outcome in one order. */
  public enum Outcome {
    /** The first system lives shorter. */
    SHORTER,
    /** Both have the same signature. */
    EQUAL,
    /** The first system lives longer. */
    LONGER,
    /** Neither is shorter than the other in this order. */
    INCOMPARABLE;

    private static Outcome of(boolean atMost, boolean atLeast) {
      return atMost ? (atLeast ? EQUAL : SHORTER) : atLeast ? LONGER : INCOMPARABLE;
    }
  }

  /**
   * Makes a comparison from its outcomes.
   *
   * @param stochastic in the stochastic order
   * @param hazardRate in the hazard rate order
   * @param likelihoodRatio in the likelihood ratio order
   */
  public SignatureComparison {
    Check.notNull(stochastic, "stochastic outcome");
    Check.notNull(hazardRate, "hazard rate outcome");
    Check.notNull(likelihoodRatio, "likelihood ratio outcome");
  }

  /**
   * From the working states by size of two systems of one order, whose entries are the tails and
   * whose critical states are the signatures, up to factors that both share.
   */
  static SignatureComparison of(List<BigInteger> first, List<BigInteger> second) {
    boolean atMost = true;
    boolean atLeast = true;
    for (int j = 0; j < first.size(); j++) {
      int sign = first.get(j).compareTo(second.get(j));
      atMost &= sign <= 0;
      atLeast &= sign >= 0;
    }
    return new SignatureComparison(
        Outcome.of(atMost, atLeast),
        byRatio(first, second),
        byRatio(StateTotals.derived(first), StateTotals.derived(second)));
  }

  /**
   * Whether the ratio of the second to the first is monotone in the number of failures, which is
   * opposite to the number of working components. Where both are zero there is no ratio; between
   * the others it is enough to compare neighbours.
   */
  private static Outcome byRatio(List<BigInteger> first, List<BigInteger> second) {
    List<Integer> places = new ArrayList<>();
    for (int j = 0; j < first.size(); j++) {
      if (first.get(j).signum() != 0 || second.get(j).signum() != 0) {
        places.add(j);
      }
    }
    boolean atMost = true;
    boolean atLeast = true;
    for (int i = 1; i < places.size(); i++) {
      int fewer = places.get(i - 1);
      int more = places.get(i);
      BigInteger left = first.get(more).multiply(second.get(fewer));
      int sign = left.compareTo(first.get(fewer).multiply(second.get(more)));
      atMost &= sign >= 0;
      atLeast &= sign <= 0;
    }
    return Outcome.of(atMost, atLeast);
  }
}
