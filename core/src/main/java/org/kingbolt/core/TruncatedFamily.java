package org.kingbolt.core;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;

/**
 * The minimal cut sets of a part up to a cost, and a bound on what was left out: the probability
 * that the part has failed and none of these sets has failed altogether. Not immutable; each family
 * belongs to one part, and is given up to the whole that needs it last.
 */
final class TruncatedFamily {

  /** A cut set: components in increasing order, the sum of their costs, the probability of all. */
  static final class CutSet {
    private final int[] members;
    private final double cost;
    private final double failing;

    CutSet(int[] members, double cost, double failing) {
      this.members = members;
      this.cost = cost;
      this.failing = failing;
    }

    /** Not to be written to. */
    int[] members() {
      return members;
    }

    double cost() {
      return cost;
    }

    double failing() {
      return failing;
    }
  }

  static final Comparator<CutSet> BY_COST = Comparator.comparingDouble(CutSet::cost);

  List<CutSet> sets = new ArrayList<>();
  double discarded;
  boolean complete = true;

  /** The family of something that has failed from the beginning. */
  static TruncatedFamily failed() {
    TruncatedFamily family = new TruncatedFamily();
    family.sets.add(new CutSet(new int[0], 0, 1));
    return family;
  }

  void giveUp(double mass) {
    discarded = Math.min(1, discarded + mass);
    complete = false;
  }

  /** Takes over how much another family of the same whole leaves out. */
  void leaveOutWith(TruncatedFamily other) {
    discarded = Math.min(1, discarded + other.discarded);
    complete &= other.complete;
  }

  /** An upper bound on the probability that the part has failed. */
  double failing() {
    double sum = discarded;
    for (CutSet set : sets) {
      sum += set.failing;
    }
    return Math.min(1, sum);
  }

  /** The least cost of a set; infinite where there is none. */
  double cheapest() {
    double least = Double.POSITIVE_INFINITY;
    for (CutSet set : sets) {
      least = Math.min(least, set.cost);
    }
    return least;
  }
}
