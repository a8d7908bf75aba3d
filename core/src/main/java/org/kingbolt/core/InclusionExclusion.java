package org.kingbolt.core;

import java.math.BigDecimal;
import java.math.BigInteger;
import java.util.BitSet;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import org.kingbolt.core.diagram.SetWalk;
import org.kingbolt.core.diagram.WorkMeter;

/** The probability that some set of a family occurs, by inclusion–exclusion in exact arithmetic. */
final class InclusionExclusion {

  private InclusionExclusion() {}

  static Probability of(SetWalk sets, List<Probability> p, boolean paths, WorkMeter meter) {
    // by union: how often it is added, less how often it is taken away
    Map<BitSet, BigInteger> terms = new LinkedHashMap<>();
    for (int[] set = sets.next(); set != null; set = sets.next()) {
      BitSet members = new BitSet();
      for (int member : set) {
        members.set(member);
      }
      Map<BitSet, BigInteger> more = new LinkedHashMap<>();
      more.put(members, BigInteger.ONE);
      for (Map.Entry<BitSet, BigInteger> term : terms.entrySet()) {
        BitSet union = (BitSet) term.getKey().clone();
        union.or(members);
        more.merge(union, term.getValue().negate(), BigInteger::add);
        meter.at(held(terms.size() + (long) more.size(), union));
      }
      more.forEach((union, times) -> terms.merge(union, times, BigInteger::add));
      terms.values().removeIf(times -> times.signum() == 0);
    }
    return sum(terms, p, paths, meter);
  }

  private static long held(long terms, BitSet union) {
    return terms * (1 + union.size() / Byte.SIZE / WorkMeter.BYTES_PER_NODE);
  }

  private static Probability sum(
      Map<BitSet, BigInteger> terms, List<Probability> p, boolean paths, WorkMeter meter) {
    BigDecimal[] occurs = new BigDecimal[p.size()];
    for (int i = 0; i < occurs.length; i++) {
      occurs[i] = exactly(p.get(i), paths);
    }
    BigDecimal some = BigDecimal.ZERO;
    for (Map.Entry<BitSet, BigInteger> term : terms.entrySet()) {
      BigDecimal product = new BigDecimal(term.getValue());
      BitSet members = term.getKey();
      for (int i = members.nextSetBit(0); i >= 0; i = members.nextSetBit(i + 1)) {
        product = product.multiply(occurs[i]);
        meter.at(held(terms.size(), members));
      }
      some = some.add(product);
    }
    double any = some.doubleValue();
    double none = BigDecimal.ONE.subtract(some).doubleValue();
    return paths ? Probability.computed(any, none) : Probability.computed(none, any);
  }

  /** One side, from the smaller of the two. */
  private static BigDecimal exactly(Probability value, boolean working) {
    double wanted = working ? value.working() : value.failing();
    double other = working ? value.failing() : value.working();
    return wanted <= other
        ? new BigDecimal(wanted)
        : BigDecimal.ONE.subtract(new BigDecimal(other));
  }
}
