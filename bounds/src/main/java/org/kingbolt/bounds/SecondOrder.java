package org.kingbolt.bounds;

import java.util.Arrays;
import java.util.BitSet;
import java.util.List;
import org.kingbolt.core.Budget;
import org.kingbolt.core.diagram.WorkMeter;

/**
 * Bounds from the probabilities of single sets and of pairs of them: from above the sum less the
 * pairs of the best tree (Hunter 1976, Worsley 1982), from below the best combination of both sums
 * (Dawson and Sankoff 1967).
 */
final class SecondOrder {

  private final List<int[]> sets;
  private final BitSet[] members;
  private final double[] occurs;
  private final double[] fails;
  private final double[] single;
  private final PreciseSum singles = new PreciseSum();
  private final PreciseSum pairs = new PreciseSum();

  /** What the sets add one after the other: that they occur and those they hang on do not. */
  private final PreciseSum tree = new PreciseSum();

  private SecondOrder(List<int[]> sets, double[] occurs, double[] fails) {
    this.sets = sets;
    this.occurs = occurs;
    this.fails = fails;
    this.members = new BitSet[sets.size()];
    this.single = new double[sets.size()];
    for (int i = 0; i < single.length; i++) {
      members[i] = new BitSet();
      single[i] = 1;
      for (int member : sets.get(i)) {
        members[i].set(member);
        single[i] *= occurs[member];
      }
      singles.add(single[i]);
    }
  }

  static UnionBounds of(Families families, boolean paths, Budget budget, Effort effort) {
    List<int[]> sets = families.possible(paths, budget, effort);
    double discarded = families.discarded(paths);
    if (sets.isEmpty()) {
      return UnionBounds.ofNothing(discarded);
    }
    ComponentValues values = families.values;
    SecondOrder bounds = new SecondOrder(sets, values.occurs(paths), values.fails(paths));
    bounds.grow(budget.start("going through pairs of sets"), effort);
    return bounds.bounds(discarded);
  }

  /** Prim's algorithm: every pair is met once, when the first of the two joins the tree. */
  private void grow(WorkMeter meter, Effort effort) {
    int count = sets.size();
    double[] best = new double[count];
    int[] parent = new int[count];
    Arrays.fill(parent, -1);
    boolean[] joined = new boolean[count];
    long met = 0;
    int next = 0;
    for (int i = 1; i < count; i++) {
      next = single[i] > single[next] ? i : next;
    }
    for (int size = 0; size < count; size++) {
      joined[next] = true;
      tree.add(parent[next] < 0 ? single[next] : single[next] * notAllOutside(parent[next], next));
      int following = -1;
      for (int other = 0; other < count; other++) {
        if (joined[other]) {
          continue;
        }
        meter.at(++met);
        double pair = single[other] * allOutside(next, other);
        pairs.add(pair);
        if (parent[other] < 0 || pair > best[other]) {
          best[other] = pair;
          parent[other] = next;
        }
        following = following < 0 || best[other] > best[following] ? other : following;
      }
      next = following;
    }
    effort.add(met);
  }

  /** That all members of one set that are not members of another occur. */
  private double allOutside(int set, int other) {
    double all = 1;
    for (int member : sets.get(set)) {
      if (!members[other].get(member)) {
        all *= occurs[member];
      }
    }
    return all;
  }

  private double notAllOutside(int set, int other) {
    double all = 1;
    double notAll = 0;
    for (int member : sets.get(set)) {
      if (!members[other].get(member)) {
        notAll += all * fails[member];
        all *= occurs[member];
      }
    }
    return notAll;
  }

  private UnionBounds bounds(double discarded) {
    double s1 = singles.value();
    double s2 = pairs.value();
    // any whole k gives a bound; this one gives the best
    double k = s1 > 0 ? 1 + Math.floor(2 * s2 / s1) : 1;
    double share = Rounding.share(2L * occurs.length + 16);
    return UnionBounds.ofSums(
        2 / (k + 1) * (s1 - s2 / k),
        2 / (k + 1) * (s1 + s2 / k) * share,
        "Dawson and Sankoff",
        tree.value(),
        tree.value() * share,
        "Hunter and Worsley",
        discarded);
  }
}
