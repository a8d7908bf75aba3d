package org.kingbolt.core;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.Comparator;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import org.kingbolt.core.TruncatedFamily.CutSet;
import org.kingbolt.core.diagram.WorkMeter;

/** What is done with truncated families: joined, multiplied, made minimal. */
final class TruncatedAlgebra {

  private static final int MEMBERS_PER_NODE = 16;

  private final double[] cost;
  private final double[] failing;
  private final WorkMeter meter;
  private long held;

  /** Costs and probabilities of failing by component. */
  TruncatedAlgebra(double[] cost, double[] failing, WorkMeter meter) {
    this.cost = cost;
    this.failing = failing;
    this.meter = meter;
  }

  /** Tells the meter of a set that is held from now on. */
  void hold(int members) {
    held += 1 + members / MEMBERS_PER_NODE;
    meter.at(held);
  }

  void release(TruncatedFamily family) {
    held = Math.max(0, held - family.sets.size());
  }

  /** The set of some components, in increasing order. */
  CutSet set(int[] members) {
    double sum = 0;
    double all = 1;
    for (int member : members) {
      sum += cost[member];
      all *= failing[member];
    }
    hold(members.length);
    return new CutSet(members, sum, all);
  }

  /** The sets whose components are those of one set of each family, up to a cost. */
  TruncatedFamily product(
      TruncatedFamily left, TruncatedFamily right, boolean sharing, double limit) {
    TruncatedFamily product = sharing ? overlapping(left, right, limit) : apart(left, right, limit);
    double leftOut = left.discarded;
    double rightOut = right.discarded;
    if (leftOut > 0 || rightOut > 0) {
      double leftFails = left.failing();
      double rightFails = right.failing();
      double both =
          sharing
              ? Math.min(leftOut, rightFails) + Math.min(rightOut, leftFails)
              : leftOut * rightFails + rightOut * leftFails;
      product.discarded = Math.min(1, product.discarded + both);
    }
    product.complete &= left.complete && right.complete;
    return product;
  }

  private TruncatedFamily apart(TruncatedFamily left, TruncatedFamily right, double limit) {
    TruncatedFamily product = new TruncatedFamily();
    List<CutSet> inner = new ArrayList<>(right.sets);
    inner.sort(TruncatedFamily.BY_COST);
    double[] rest = new double[inner.size() + 1];
    for (int i = inner.size() - 1; i >= 0; i--) {
      rest[i] = rest[i + 1] + inner.get(i).failing();
    }
    for (CutSet a : left.sets) {
      meter.at(held);
      int i = 0;
      while (i < inner.size() && a.cost() + inner.get(i).cost() <= limit) {
        CutSet b = inner.get(i++);
        hold(a.members().length + b.members().length);
        product.sets.add(
            new CutSet(
                merged(a.members(), b.members()), a.cost() + b.cost(), a.failing() * b.failing()));
      }
      if (i < inner.size()) {
        product.giveUp(a.failing() * rest[i]);
      }
    }
    return product;
  }

  private TruncatedFamily overlapping(TruncatedFamily left, TruncatedFamily right, double limit) {
    TruncatedFamily product = new TruncatedFamily();
    for (CutSet a : left.sets) {
      for (CutSet b : right.sets) {
        meter.at(held);
        CutSet both = set(merged(a.members(), b.members()));
        if (both.cost() <= limit) {
          product.sets.add(both);
        } else {
          held--;
          product.giveUp(both.failing());
        }
      }
    }
    minimize(product);
    return product;
  }

  /** The union of two sets of components in increasing order. */
  private static int[] merged(int[] a, int[] b) {
    int[] both = new int[a.length + b.length];
    int count = 0;
    int i = 0;
    int j = 0;
    while (i < a.length || j < b.length) {
      boolean fromA = j == b.length || (i < a.length && a[i] <= b[j]);
      int next = fromA ? a[i] : b[j];
      i += i < a.length && a[i] == next ? 1 : 0;
      j += j < b.length && b[j] == next ? 1 : 0;
      both[count++] = next;
    }
    return count == both.length ? both : Arrays.copyOf(both, count);
  }

  /** Drops sets that contain others, and copies. */
  void minimize(TruncatedFamily family) {
    List<CutSet> sorted = new ArrayList<>(family.sets);
    sorted.sort(Comparator.comparingInt(set -> set.members().length));
    SetIndex kept = new SetIndex();
    List<CutSet> minimal = new ArrayList<>();
    for (CutSet set : sorted) {
      meter.at(held);
      if (!kept.hasSubset(set.members(), meter, held)) {
        kept.add(set.members());
        minimal.add(set);
      }
    }
    held = Math.max(0, held - (sorted.size() - minimal.size()));
    family.sets = minimal;
  }

  /** Sets as a tree of their members in increasing order. */
  private static final class SetIndex {
    private static final class Node {
      final Map<Integer, Node> next = new HashMap<>();
      boolean ends;
    }

    private final Node root = new Node();

    void add(int[] members) {
      Node node = root;
      for (int member : members) {
        node = node.next.computeIfAbsent(member, key -> new Node());
      }
      node.ends = true;
    }

    boolean hasSubset(int[] members, WorkMeter meter, long held) {
      List<Node> nodes = new ArrayList<>(List.of(root));
      List<Integer> from = new ArrayList<>(List.of(0));
      while (!nodes.isEmpty()) {
        meter.at(held);
        Node node = nodes.remove(nodes.size() - 1);
        int start = from.remove(from.size() - 1);
        if (node.ends) {
          return true;
        }
        for (int i = start; !node.next.isEmpty() && i < members.length; i++) {
          Node next = node.next.get(members[i]);
          if (next != null) {
            nodes.add(next);
            from.add(i + 1);
          }
        }
      }
      return false;
    }
  }
}
