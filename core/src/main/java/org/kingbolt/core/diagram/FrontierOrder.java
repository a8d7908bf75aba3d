package org.kingbolt.core.diagram;

import java.util.Arrays;

/**
 * Chooses the order in which the frontier method meets the nodes of a network: a greedy sweep that
 * keeps the frontier narrow, tried from several starts; the cheapest by estimate is kept.
 *
 * <p>Deterministic. Cost: starts × nodes × frontier width × degree.
 */
final class FrontierOrder {

  private static final int STARTS = 32;

  /** Assumed growth of the number of states with one more frontier node. */
  private static final double GROWTH = 2.2;

  private final NetworkProblem problem;
  private final int[][] linksAt;
  private double cost;

  private FrontierOrder(NetworkProblem problem) {
    this.problem = problem;
    this.linksAt = problem.linksAt();
  }

  /** The nodes connected with the source, in sweeping order. */
  static int[] best(NetworkProblem problem) {
    FrontierOrder search = new FrontierOrder(problem);
    int[] best = search.sweepFrom(problem.source);
    double bestCost = search.cost;
    int[] reached = best.clone();
    Arrays.sort(reached);
    int stride = Math.max(1, reached.length / STARTS);
    for (int i = 0; i < reached.length; i += stride) {
      int[] order = search.sweepFrom(reached[i]);
      if (search.cost < bestCost) {
        bestCost = search.cost;
        best = order;
      }
    }
    return best;
  }

  /** Greedy sweep; leaves its estimated cost in {@link #cost}. */
  private int[] sweepFrom(int start) {
    int nodes = problem.nodes();
    int[] order = new int[nodes];
    int[] position = new int[nodes];
    Arrays.fill(position, -1);
    int[] unplaced = new int[nodes];
    for (int node = 0; node < nodes; node++) {
      unplaced[node] = linksAt[node].length;
    }
    cost = 0;
    int placed = 0;
    int width = 0;
    int next = start;
    int oldest = 0;
    while (next >= 0) {
      position[next] = placed;
      order[placed++] = next;
      for (int link : linksAt[next]) {
        int other = problem.otherEnd(link, next);
        unplaced[other]--;
        if (position[other] >= 0 && unplaced[other] == 0) {
          width--;
        }
      }
      if (unplaced[next] > 0) {
        width++;
      }
      cost += Math.pow(GROWTH, width) * linksAt[next].length;
      while (oldest < placed && unplaced[order[oldest]] == 0) {
        oldest++;
      }
      next = cheapestNeighbour(order, oldest, placed, position, unplaced);
    }
    return Arrays.copyOf(order, placed);
  }

  /** The unplaced neighbour that widens the frontier least; among equals, of the oldest node. */
  private int cheapestNeighbour(
      int[] order, int oldest, int placed, int[] position, int[] unplaced) {
    int best = -1;
    int bestGrowth = Integer.MAX_VALUE;
    for (int i = oldest; i < placed; i++) {
      int node = order[i];
      if (unplaced[node] == 0) {
        continue;
      }
      for (int link : linksAt[node]) {
        int other = problem.otherEnd(link, node);
        if (position[other] < 0) {
          int growth = growth(other, position, unplaced);
          if (growth < bestGrowth) {
            bestGrowth = growth;
            best = other;
          }
        }
      }
    }
    return best;
  }

  private int growth(int node, int[] position, int[] unplaced) {
    int growth = unplaced[node] > 0 ? 1 : 0;
    for (int link : linksAt[node]) {
      int other = problem.otherEnd(link, node);
      if (position[other] >= 0 && unplaced[other] == 1) {
        growth--;
      }
    }
    return growth;
  }
}
