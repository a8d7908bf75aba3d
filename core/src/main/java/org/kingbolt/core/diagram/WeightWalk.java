package org.kingbolt.core.diagram;

import java.util.PriorityQueue;
import org.jspecify.annotations.Nullable;

/**
 * Sets in order of decreasing weight. Every waiting route stands for its best completion, which is
 * known from the scan at the beginning; delivering it leaves one new route for each node at which
 * another set can branch off.
 *
 * <p>Method: Lawler, A procedure for computing the K best solutions to discrete optimization
 * problems, Management Sci. 18 (1972) 401.
 */
final class WeightWalk implements SetWalk {

  /** The beginning of a set: where it has come to, and the variables taken, newest first. */
  private record Route(
      double bound, double taken, int id, int count, @Nullable Taken last, long number)
      implements Comparable<Route> {

    @Override
    public int compareTo(Route other) {
      int byBound = Double.compare(other.bound, bound);
      return byBound != 0 ? byBound : Long.compare(number, other.number);
    }
  }

  private record Taken(int variable, @Nullable Taken before) {}

  private final Diagram nodes;
  private final double[] logWeight;
  private final double[] best;
  private final WorkMeter meter;
  private final PriorityQueue<Route> queue = new PriorityQueue<>();
  private long made;

  WeightWalk(Diagram nodes, double[] logWeights, WorkMeter meter) {
    this.nodes = nodes;
    this.meter = meter;
    this.logWeight = logWeights.clone();
    this.best = new double[nodes.size()];
    best[SetDiagram.NO_SETS] = Double.NaN;
    for (int level = nodes.levels() - 1; level >= 0; level--) {
      double weight = logWeight[nodes.variableAt(level)];
      for (int id = nodes.from(level); id < nodes.to(level); id++) {
        double without = best[nodes.low(id)];
        double with = best[nodes.high(id)] + weight;
        best[id] = nodes.low(id) == SetDiagram.NO_SETS ? with : Math.max(with, without);
      }
    }
    offer(0, nodes.root(), 0, null);
  }

  private void offer(double taken, int id, int count, @Nullable Taken last) {
    if (id != SetDiagram.NO_SETS) {
      meter.at(queue.size());
      queue.add(new Route(taken + best[id], taken, id, count, last, made++));
    }
  }

  @Override
  public int @Nullable [] next() {
    Route route = queue.poll();
    if (route == null) {
      return null;
    }
    double taken = route.taken;
    int id = route.id;
    int count = route.count;
    Taken last = route.last;
    while (id != SetDiagram.ONLY_EMPTY_SET) {
      int low = nodes.low(id);
      int high = nodes.high(id);
      int variable = nodes.variableAt(nodes.levelOf(id));
      double weight = logWeight[variable];
      Taken with = new Taken(variable, last);
      if (low == SetDiagram.NO_SETS || weight + best[high] >= best[low]) {
        offer(taken, low, count, last);
        taken += weight;
        last = with;
        count++;
        id = high;
      } else {
        offer(taken + weight, high, count + 1, with);
        id = low;
      }
    }
    return set(last, count);
  }

  private static int[] set(@Nullable Taken last, int count) {
    int[] set = new int[count];
    Taken taken = last;
    for (int i = count - 1; taken != null; i--) {
      set[i] = taken.variable;
      taken = taken.before;
    }
    return set;
  }
}
