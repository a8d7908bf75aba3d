package org.kingbolt.core.diagram;

import java.util.PriorityQueue;
import org.jspecify.annotations.Nullable;

/**
 * Sets in order of decreasing weight: a best-first search in which the bound on what is still to
 * come is exact, so that every step of it belongs to a set that will be delivered.
 */
final class WeightWalk implements SetWalk {

  /** A partial set: where it has come to, and the variables taken, newest first. */
  private record Partial(
      double bound, double taken, int id, int count, @Nullable Taken last, long number)
      implements Comparable<Partial> {

    @Override
    public int compareTo(Partial other) {
      int byBound = Double.compare(other.bound, bound);
      return byBound != 0 ? byBound : Long.compare(number, other.number);
    }
  }

  private record Taken(int variable, @Nullable Taken before) {}

  private final Diagram nodes;
  private final double[] logWeight;
  private final double[] best;
  private final WorkMeter meter;
  private final PriorityQueue<Partial> queue = new PriorityQueue<>();
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
      queue.add(new Partial(taken + best[id], taken, id, count, last, made++));
    }
  }

  @Override
  public int @Nullable [] next() {
    for (Partial partial = queue.poll(); partial != null; partial = queue.poll()) {
      int id = partial.id;
      if (id == SetDiagram.ONLY_EMPTY_SET) {
        return set(partial);
      }
      int variable = nodes.variableAt(nodes.levelOf(id));
      offer(
          partial.taken + logWeight[variable],
          nodes.high(id),
          partial.count + 1,
          new Taken(variable, partial.last));
      offer(partial.taken, nodes.low(id), partial.count, partial.last);
    }
    return null;
  }

  private static int[] set(Partial partial) {
    int[] set = new int[partial.count];
    Taken taken = partial.last;
    for (int i = partial.count - 1; taken != null; i--) {
      set[i] = taken.variable;
      taken = taken.before;
    }
    return set;
  }
}
