package org.kingbolt.importance;

import java.util.Collection;
import org.kingbolt.core.Budget;
import org.kingbolt.core.CoherentSystem;
import org.kingbolt.core.diagram.Diagram;
import org.kingbolt.core.diagram.MinimalSolutions;
import org.kingbolt.core.diagram.SetDiagram;
import org.kingbolt.core.diagram.SetUnion;
import org.kingbolt.core.diagram.WorkMeter;

/**
 * The share of failure that a component's minimal cut sets account for, exactly and as a ratio of
 * sums.
 */
final class FussellVesely {

  private static final String EXACT =
      "finding exact Fussell-Vesely importances (fussellVeselyRareEvent() is far cheaper)";

  private FussellVesely() {}

  /** For each component: some minimal cut set that contains it has all failed, given failure. */
  static double[] exact(CoherentSystem system, FirstOrder f, Budget budget) {
    SetUnion union = union(system, f, budget.start(EXACT));
    double[] values = new double[f.size()];
    boolean[] marked = new boolean[f.size()];
    for (int i = 0; i < values.length; i++) {
      marked[i] = true;
      values[i] = Measures.share(union.probability(marked), f.fails());
      marked[i] = false;
    }
    return values;
  }

  /** For each group: some minimal cut set that contains a member has all failed, given failure. */
  static double[] exactOfGroups(
      CoherentSystem system, FirstOrder f, Collection<int[]> groups, Budget budget) {
    SetUnion union = union(system, f, budget.start(EXACT));
    return groups.stream()
        .mapToDouble(group -> Measures.share(union.probability(marks(group, f.size())), f.fails()))
        .toArray();
  }

  private static SetUnion union(CoherentSystem system, FirstOrder f, WorkMeter meter) {
    SetDiagram cuts = MinimalSolutions.cuts(system.diagram(), meter);
    return new SetUnion(cuts, f.workings(), f.failings(), meter);
  }

  private static boolean[] marks(int[] group, int size) {
    boolean[] marked = new boolean[size];
    for (int member : group) {
      marked[member] = true;
    }
    return marked;
  }

  /**
   * For each component: the sum of the probabilities of the minimal cut sets that contain it, over
   * that of all.
   */
  static double[] rareEvent(CoherentSystem system, FirstOrder f, Budget budget) {
    WorkMeter meter = budget.start("summing up the minimal cut sets");
    Diagram cuts = MinimalSolutions.cuts(system.diagram(), meter).nodes();
    double[] sum = sums(cuts, f);
    double[] reach = new double[cuts.size()];
    reach[cuts.root()] = 1;
    double[] values = new double[f.size()];
    for (int level = 0; level < cuts.levels(); level++) {
      int variable = cuts.variableAt(level);
      double q = f.failing(variable);
      double with = 0;
      for (int id = cuts.from(level); id < cuts.to(level); id++) {
        reach[cuts.low(id)] += reach[id];
        reach[cuts.high(id)] += q * reach[id];
        with += q * reach[id] * sum[cuts.high(id)];
      }
      values[variable] = Measures.share(with, sum[cuts.root()]);
    }
    return values;
  }

  /** For each group: the sum over the minimal cut sets that contain a member, over that of all. */
  static double[] rareEventOfGroups(
      CoherentSystem system, FirstOrder f, Collection<int[]> groups, Budget budget) {
    WorkMeter meter = budget.start("summing up the minimal cut sets");
    Diagram cuts = MinimalSolutions.cuts(system.diagram(), meter).nodes();
    double[] all = sums(cuts, f);
    return groups.stream()
        .mapToDouble(group -> sum(cuts, f, all, marks(group, f.size())))
        .map(sum -> Measures.share(sum, all[cuts.root()]))
        .toArray();
  }

  /** By node: the sum of products over all its sets. */
  private static double[] sums(Diagram cuts, FirstOrder f) {
    double[] sum = new double[cuts.size()];
    sum[SetDiagram.ONLY_EMPTY_SET] = 1;
    for (int level = cuts.levels() - 1; level >= 0; level--) {
      double q = f.failing(cuts.variableAt(level));
      for (int id = cuts.from(level); id < cuts.to(level); id++) {
        sum[id] = sum[cuts.low(id)] + q * sum[cuts.high(id)];
      }
    }
    return sum;
  }

  /** The sum of products over the sets that contain a marked variable. */
  private static double sum(Diagram cuts, FirstOrder f, double[] all, boolean[] marked) {
    double[] sum = new double[cuts.size()];
    for (int level = cuts.levels() - 1; level >= 0; level--) {
      int variable = cuts.variableAt(level);
      double q = f.failing(variable);
      double[] with = marked[variable] ? all : sum;
      for (int id = cuts.from(level); id < cuts.to(level); id++) {
        sum[id] = sum[cuts.low(id)] + q * with[cuts.high(id)];
      }
    }
    return sum[cuts.root()];
  }
}
