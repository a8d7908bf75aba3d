package org.kingbolt.core.diagram;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.Comparator;
import java.util.HashSet;
import java.util.List;
import java.util.Set;

/**
 * A search for a narrow sweep that follows many partial orders at once (beam search): at every step
 * each of them is continued by every neighbour of its frontier, and the cheapest so far are kept,
 * one for each set of nodes swept.
 *
 * <p>Deterministic. Cost: nodes × beam × frontier width × degree, and one bit a node for each
 * partial order.
 */
final class FrontierBeam {

  /** The set of nodes that a partial order has swept, and those of them with unswept neighbours. */
  private static final class Partial {
    final long[] swept;
    final int[] frontier;
    final long hash;
    final double cost;
    final int met;

    Partial(long[] swept, int[] frontier, long hash, double cost, int met) {
      this.swept = swept;
      this.frontier = frontier;
      this.hash = hash;
      this.cost = cost;
      this.met = met;
    }

    boolean has(int node) {
      return (swept[node >> 6] >>> node & 1) != 0;
    }
  }

  /** A partial order and one more node. */
  private record Step(int from, int node, double cost, long hash) {}

  private static final Comparator<Step> CHEAPEST =
      Comparator.comparingDouble(Step::cost)
          .thenComparingInt(Step::from)
          .thenComparingInt(Step::node);

  private final int[][] neighbours;
  private final int[] nodes;
  private final boolean[] pair;
  private final int beam;
  private final long[] label;
  private final WorkMeter meter;

  /** By step and place in the beam: the node swept, and the place of the partial order before. */
  private final List<int[]> swept = new ArrayList<>();

  private final List<int[]> origin = new ArrayList<>();
  private List<Partial> partials = new ArrayList<>();

  private FrontierBeam(int[][] neighbours, int[] nodes, boolean[] pair, int beam, WorkMeter meter) {
    this.pair = pair;
    this.meter = meter;
    this.neighbours = neighbours;
    this.nodes = nodes;
    this.beam = beam;
    this.label = new long[neighbours.length];
    long mixed = 1;
    for (int node = 0; node < label.length; node++) {
      mixed = (mixed + 0x9E3779B97F4A7C15L) * 0xBF58476D1CE4E5B9L;
      label[node] = mixed ^ mixed >>> 31;
    }
  }

  /**
   * Searches.
   *
   * @param neighbours of each node, each once
   * @param nodes a connected set of nodes
   * @param pair true for the two terminals between which a connection is asked; all false where
   *     there are more
   * @param beam how many partial orders to follow
   * @param meter hears of every continuation
   * @return the nodes in the order of the cheapest sweep found
   */
  static int[] order(int[][] neighbours, int[] nodes, boolean[] pair, int beam, WorkMeter meter) {
    return new FrontierBeam(neighbours, nodes, pair, beam, meter).search();
  }

  private int[] search() {
    Partial nothing = new Partial(new long[(neighbours.length + 63) >> 6], new int[0], 0, 0, 0);
    partials.add(nothing);
    List<Step> steps = new ArrayList<>();
    for (int node : nodes) {
      steps.add(new Step(0, node, FrontierOrder.cost(1, pair[node] ? 1 : 0), label[node]));
    }
    for (int swept = 0; swept < nodes.length; swept++) {
      take(steps);
      steps = steps();
    }
    int[] order = new int[nodes.length];
    int place = 0;
    for (int step = nodes.length - 1; step >= 0; step--) {
      order[step] = swept.get(step)[place];
      place = origin.get(step)[place];
    }
    return order;
  }

  /** Every way to go on. */
  private List<Step> steps() {
    List<Step> steps = new ArrayList<>();
    int[] seenBy = new int[neighbours.length];
    for (int i = 0; i < partials.size(); i++) {
      Partial partial = partials.get(i);
      for (int edge : partial.frontier) {
        for (int node : neighbours[edge]) {
          if (!partial.has(node) && seenBy[node] != i + 1) {
            seenBy[node] = i + 1;
            meter.at(steps.size());
            double cost =
                partial.cost
                    + FrontierOrder.cost(
                        widthAfter(partial, node), partial.met + (pair[node] ? 1 : 0));
            steps.add(new Step(i, node, cost, partial.hash ^ label[node]));
          }
        }
      }
    }
    return steps;
  }

  private int widthAfter(Partial partial, int node) {
    int width = partial.frontier.length;
    boolean open = false;
    for (int other : neighbours[node]) {
      if (!partial.has(other)) {
        open = true;
        continue;
      }
      boolean leaves = true;
      for (int beyond : neighbours[other]) {
        leaves &= beyond == node || partial.has(beyond);
      }
      width -= leaves ? 1 : 0;
    }
    return width + (open ? 1 : 0);
  }

  /** Goes the cheapest ways, each to a set of its own. */
  private void take(List<Step> steps) {
    steps.sort(CHEAPEST);
    Set<Long> sets = new HashSet<>();
    List<Partial> next = new ArrayList<>();
    int[] node = new int[beam];
    int[] from = new int[beam];
    for (Step step : steps) {
      if (next.size() < beam && sets.add(step.hash)) {
        node[next.size()] = step.node;
        from[next.size()] = step.from;
        next.add(after(partials.get(step.from), step));
      }
    }
    swept.add(node);
    origin.add(from);
    partials = next;
  }

  private Partial after(Partial before, Step step) {
    long[] set = before.swept.clone();
    set[step.node >> 6] |= 1L << step.node;
    int[] frontier = new int[before.frontier.length + 1];
    int count = 0;
    for (int i = 0; i <= before.frontier.length; i++) {
      int node = i < before.frontier.length ? before.frontier[i] : step.node;
      boolean open = false;
      for (int other : neighbours[node]) {
        open |= (set[other >> 6] >>> other & 1) == 0;
      }
      if (open) {
        frontier[count++] = node;
      }
    }
    return new Partial(
        set,
        Arrays.copyOf(frontier, count),
        step.hash,
        step.cost,
        before.met + (pair[step.node] ? 1 : 0));
  }
}
