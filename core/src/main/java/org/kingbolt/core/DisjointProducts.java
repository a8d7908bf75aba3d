package org.kingbolt.core;

import java.util.ArrayDeque;
import java.util.ArrayList;
import java.util.BitSet;
import java.util.Deque;
import java.util.List;
import org.kingbolt.core.diagram.SetWalk;
import org.kingbolt.core.diagram.WorkMeter;

/** The probability that some set of a family occurs, by sums of disjoint products. */
final class DisjointProducts {

  private static final int WORDS_A_NODE = 8;

  private final double[] occurs;
  private final double[] fails;
  private final WorkMeter meter;
  private long held;

  /** A product so far, and the sets none of which may occur besides. */
  private record Term(double factor, List<BitSet> sets) {}

  private DisjointProducts(double[] occurs, double[] fails, WorkMeter meter) {
    this.occurs = occurs;
    this.fails = fails;
    this.meter = meter;
  }

  static Probability of(SetWalk walk, List<Probability> p, boolean paths, WorkMeter meter) {
    double[] working = p.stream().mapToDouble(Probability::working).toArray();
    double[] failing = p.stream().mapToDouble(Probability::failing).toArray();
    DisjointProducts products =
        paths
            ? new DisjointProducts(working, failing, meter)
            : new DisjointProducts(failing, working, meter);
    List<BitSet> before = new ArrayList<>();
    double any = 0;
    for (int[] set = walk.next(); set != null; set = walk.next()) {
      BitSet members = new BitSet();
      double product = 1;
      for (int member : set) {
        members.set(member);
        product *= products.occurs[member];
      }
      List<BitSet> rest = new ArrayList<>();
      for (BitSet earlier : before) {
        BitSet more = (BitSet) earlier.clone();
        more.andNot(members);
        rest.add(more);
      }
      any += product == 0 ? 0 : products.none(product, rest);
      before.add(members);
    }
    double none = products.none(1, before);
    return paths ? Probability.computed(any, none) : Probability.computed(none, any);
  }

  /** A factor times the probability that none of some sets occurs. */
  private double none(double factor, List<BitSet> sets) {
    double sum = 0;
    Deque<Term> open = new ArrayDeque<>();
    push(open, factor, sets);
    while (!open.isEmpty()) {
      Term term = open.pop();
      held -= weight(term.sets);
      List<BitSet> rest = minimal(term.sets);
      if (!rest.isEmpty() && rest.get(0).isEmpty()) {
        continue;
      }
      double product = term.factor;
      int[] uses = uses(rest);
      List<BitSet> bound = new ArrayList<>();
      for (BitSet set : rest) {
        if (set.stream().allMatch(member -> uses[member] == 1)) {
          product *= misses(set);
        } else {
          bound.add(set);
        }
      }
      if (bound.isEmpty()) {
        sum += product;
      } else if (product > 0) {
        branch(open, product, bound, uses);
      }
    }
    return sum;
  }

  private void push(Deque<Term> open, double factor, List<BitSet> sets) {
    held += weight(sets);
    meter.at(held);
    open.push(new Term(factor, sets));
  }

  private static long weight(List<BitSet> sets) {
    long words = 0;
    for (BitSet set : sets) {
      words += 4 + set.length() / Long.SIZE;
    }
    return 1 + words / WORDS_A_NODE;
  }

  private static int[] uses(List<BitSet> sets) {
    int[] uses = new int[sets.stream().mapToInt(BitSet::length).max().orElse(0)];
    sets.forEach(set -> set.stream().forEach(member -> uses[member]++));
    return uses;
  }

  /** The probability that some member of a set does not occur. */
  private double misses(BitSet set) {
    double all = 1;
    double some = 0;
    for (int member = set.nextSetBit(0); member >= 0; member = set.nextSetBit(member + 1)) {
      some += all * fails[member];
      all *= occurs[member];
    }
    return some;
  }

  /** Inverts the smallest set: its members in two parts, those that other sets use and the rest. */
  private void branch(Deque<Term> open, double product, List<BitSet> sets, int[] uses) {
    BitSet first = sets.get(0);
    List<BitSet> others = sets.subList(1, sets.size());
    List<Integer> shared =
        new ArrayList<>(first.stream().filter(member -> uses[member] > 1).boxed().toList());
    shared.sort((a, b) -> Integer.compare(uses[b], uses[a]));
    BitSet given = new BitSet();
    double factor = product;
    for (int member : shared) {
      List<BitSet> without = new ArrayList<>();
      for (BitSet set : others) {
        if (!set.get(member)) {
          without.add(less(set, given));
        }
      }
      push(open, factor * fails[member], without);
      factor *= occurs[member];
      given.set(member);
    }
    BitSet own = less(first, given);
    if (!own.isEmpty()) {
      List<BitSet> rest = new ArrayList<>();
      others.forEach(set -> rest.add(less(set, given)));
      push(open, factor * misses(own), rest);
    }
  }

  private static BitSet less(BitSet set, BitSet given) {
    BitSet rest = (BitSet) set.clone();
    rest.andNot(given);
    return rest;
  }

  /** The sets that contain no other one, the smallest first, each once. */
  private List<BitSet> minimal(List<BitSet> sets) {
    List<BitSet> sorted = new ArrayList<>(sets);
    sorted.sort((a, b) -> Integer.compare(a.cardinality(), b.cardinality()));
    List<BitSet> kept = new ArrayList<>();
    for (BitSet set : sorted) {
      meter.at(held);
      if (kept.stream().noneMatch(other -> less(other, set).isEmpty())) {
        kept.add(set);
      }
    }
    return kept;
  }
}
