package org.kingbolt.core.testing;

import java.math.BigInteger;
import java.util.ArrayList;
import java.util.Collections;
import java.util.List;
import java.util.Random;
import org.kingbolt.core.Structure;

/**
 * A random tree of k-out-of-n gates, no component in two places, and beside it the numbers of its
 * working states, by multiplying polynomials gate by gate.
 *
 * @param structure as described to the library
 * @param working entry j: the working states with j working components
 * @param failed entry j: the failed states with j working components
 */
public record CountedGates(Structure structure, List<BigInteger> working, List<BigInteger> failed) {

  private static final List<BigInteger> NOTHING = List.of(BigInteger.ZERO);
  private static final List<BigInteger> ONE = List.of(BigInteger.ONE);
  private static final List<BigInteger> X = List.of(BigInteger.ZERO, BigInteger.ONE);

  /**
   * Makes a tree.
   *
   * @param components how many, named c0, c1, ...
   * @param random of the choices
   * @return a tree with gates of two to eight parts
   */
  public static CountedGates random(int components, Random random) {
    List<CountedGates> open = new ArrayList<>();
    for (int i = 0; i < components; i++) {
      open.add(new CountedGates(Structure.component("c" + i), X, ONE));
    }
    while (open.size() > 1) {
      Collections.shuffle(open, random);
      int parts = Math.min(open.size(), 2 + random.nextInt(7));
      List<CountedGates> under = open.subList(open.size() - parts, open.size());
      CountedGates gate = gate(1 + random.nextInt(parts), List.copyOf(under));
      under.clear();
      open.add(gate);
    }
    return open.get(0);
  }

  private static CountedGates gate(int k, List<CountedGates> parts) {
    List<List<BigInteger>> byWorkingParts = new ArrayList<>(List.of(ONE));
    for (CountedGates part : parts) {
      byWorkingParts.add(NOTHING);
      for (int i = byWorkingParts.size() - 1; i >= 0; i--) {
        List<BigInteger> same = times(byWorkingParts.get(i), part.failed);
        List<BigInteger> more = i == 0 ? NOTHING : times(byWorkingParts.get(i - 1), part.working);
        byWorkingParts.set(i, plus(same, more));
      }
    }
    List<BigInteger> working = NOTHING;
    List<BigInteger> failed = NOTHING;
    for (int i = 0; i < byWorkingParts.size(); i++) {
      if (i < k) {
        failed = plus(failed, byWorkingParts.get(i));
      } else {
        working = plus(working, byWorkingParts.get(i));
      }
    }
    List<Structure> inner = parts.stream().map(CountedGates::structure).toList();
    return new CountedGates(Structure.atLeast(k, inner), working, failed);
  }

  private static List<BigInteger> plus(List<BigInteger> a, List<BigInteger> b) {
    List<BigInteger> sum = new ArrayList<>();
    for (int j = 0; j < Math.max(a.size(), b.size()); j++) {
      sum.add(entry(a, j).add(entry(b, j)));
    }
    return sum;
  }

  private static BigInteger entry(List<BigInteger> list, int j) {
    return j < list.size() ? list.get(j) : BigInteger.ZERO;
  }

  private static List<BigInteger> times(List<BigInteger> a, List<BigInteger> b) {
    List<BigInteger> product =
        new ArrayList<>(Collections.nCopies(a.size() + b.size() - 1, BigInteger.ZERO));
    for (int i = 0; i < a.size(); i++) {
      for (int j = 0; j < b.size(); j++) {
        product.set(i + j, product.get(i + j).add(a.get(i).multiply(b.get(j))));
      }
    }
    return product;
  }
}
