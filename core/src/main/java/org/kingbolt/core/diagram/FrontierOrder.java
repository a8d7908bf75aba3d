package org.kingbolt.core.diagram;

import java.util.Arrays;

/**
 * Chooses the order in which the frontier method meets the nodes of a network: a greedy sweep that
 * keeps the frontier narrow, tried from several starts, and where the sweep promises to be costly a
 * beam search; the cheapest by estimate is kept.
 *
 * <p>Deterministic. Cost: starts × nodes × frontier width × degree, and that of {@link
 * FrontierBeam}.
 */
final class FrontierOrder {

  private static final int STARTS = 32;

  /** The beam is as wide as the likely cost of the sweep is worth. */
  private static final int NARROWEST_BEAM = 12;

  private static final int WIDEST_BEAM = 512;

  /** No search is made for sweeps that promise to cost less. */
  private static final double CHEAP = 1_000;

  /** Nor for those that no search can mend. */
  private static final double HOPELESS = 1e18;

  private static final double STATES_A_STEP = 20;

  /** Assumed growth of the number of states with one more frontier node. */
  private static final double GROWTH = 2.2;

  /** Orders that differ by less count as equally narrow. */
  private static final double AS_NARROW = 1.1;

  /** Growth with one terminal met, for every frontier node: as counted on square grids. */
  private static final double ONE_MET = 0.25;

  /** With both met many histories are settled: as counted on square grids. */
  private static final double BOTH_MET = 0.65;

  private final NetworkProblem problem;
  private final int[][] linksAt;
  private final WorkMeter meter;

  /** Whether there is one target only; the block of either terminal is then one of many. */
  private final boolean isPair;

  private FrontierOrder(NetworkProblem problem, WorkMeter meter) {
    this.problem = problem;
    this.meter = meter;
    this.linksAt = problem.linksAt();
    int targets = 0;
    for (boolean isTarget : problem.target) {
      targets += isTarget ? 1 : 0;
    }
    this.isPair = targets == 1;
  }

  /** The width of the frontier in a first greedy order. */
  static int firstWidth(NetworkProblem problem, WorkMeter meter) {
    FrontierOrder search = new FrontierOrder(problem, meter);
    int[] order = search.sweepFrom(problem.source);
    int[] last = new int[problem.nodes()];
    for (int at = 0; at < order.length; at++) {
      last[order[at]] = at;
    }
    int[] change = new int[order.length + 1];
    for (int at = 0; at < order.length; at++) {
      int end = at;
      for (int link : search.linksAt[order[at]]) {
        end = Math.max(end, last[problem.otherEnd(link, order[at])]);
      }
      change[at]++;
      change[end]--;
    }
    int width = 0;
    int now = 0;
    for (int step : change) {
      now += step;
      width = Math.max(width, now);
    }
    return width;
  }

  /** The nodes connected with the source, in sweeping order. */
  static int[] best(NetworkProblem problem, WorkMeter meter) {
    FrontierOrder search = new FrontierOrder(problem, meter);
    int[] best = search.sweepFrom(problem.source);
    double bestCost = search.costOf(best, false);
    int[] reached = best.clone();
    Arrays.sort(reached);
    int stride = Math.max(1, reached.length / STARTS);
    for (int i = 0; i < reached.length; i += stride) {
      int[] order = search.sweepFrom(reached[i]);
      double cost = search.costOf(order, false);
      if (cost < bestCost) {
        bestCost = cost;
        best = order;
      }
    }
    if (bestCost > CHEAP && bestCost < HOPELESS) {
      double worth = bestCost / (STATES_A_STEP * reached.length);
      int beam = (int) Math.max(NARROWEST_BEAM, Math.min(WIDEST_BEAM, worth));
      best = search.searched(best, reached, beam);
    }
    return best;
  }

  /**
   * Beam search that does not mind when terminals are met; among orders that are as narrow, the one
   * in which one terminal alone is met for the shortest time.
   */
  private int[] searched(int[] greedy, int[] reached, int beam) {
    int[][] neighbours = neighbours();
    boolean[] pair = pair();
    int[] blind = FrontierBeam.order(neighbours, reached, new boolean[pair.length], beam, meter);
    int[] best = costOf(blind, false) < costOf(greedy, false) ? blind : greedy;
    if (isPair) {
      int[] aware = FrontierBeam.order(neighbours, reached, pair, beam, meter);
      boolean narrow = costOf(aware, false) <= AS_NARROW * costOf(best, false);
      return narrow && costOf(aware, true) < costOf(best, true) ? aware : best;
    }
    return best;
  }

  /**
   * The number of states that a step is likely to cost, in units of a step without links.
   *
   * @param width nodes on the frontier
   * @param met how many of two terminals have been met, or -1 if there are more than two: one
   *     alone, whose block is one of many, is what costs most
   */
  static double cost(int width, int met) {
    double states = Math.pow(GROWTH, width);
    return met == 1 ? states * (ONE_MET * width + 1) : met == 2 ? states * BOTH_MET : states;
  }

  /** How many of two terminals have been met with one more node, as {@link #cost} counts them. */
  private int met(int node, int before) {
    return before < 0 || !problem.terminal(node) ? before : before + 1;
  }

  private int[][] neighbours() {
    int[][] neighbours = new int[problem.nodes()][];
    for (int node = 0; node < neighbours.length; node++) {
      int here = node;
      neighbours[node] =
          Arrays.stream(linksAt[node])
              .map(link -> problem.otherEnd(link, here))
              .sorted()
              .distinct()
              .toArray();
    }
    return neighbours;
  }

  /** The estimated cost of a sweep in a given order, with or without minding the terminals. */
  private double costOf(int[] order, boolean minding) {
    boolean[] swept = new boolean[problem.nodes()];
    int[] unswept = new int[problem.nodes()];
    for (int node = 0; node < unswept.length; node++) {
      unswept[node] = linksAt[node].length;
    }
    double sum = 0;
    int width = 0;
    int met = minding && isPair ? 0 : -1;
    for (int node : order) {
      swept[node] = true;
      int links = 0;
      int leaving = 0;
      for (int link : linksAt[node]) {
        int other = problem.otherEnd(link, node);
        unswept[other]--;
        links += swept[other] ? 1 : 0;
        leaving += swept[other] && unswept[other] == 0 ? 1 : 0;
      }
      met = met(node, met);
      sum += cost(width + 1, met) * links;
      width += (unswept[node] > 0 ? 1 : 0) - leaving;
    }
    return sum;
  }

  /** The two terminals of a pair as a set of nodes, or nothing. */
  private boolean[] pair() {
    boolean[] pair = new boolean[problem.nodes()];
    for (int node = 0; node < pair.length; node++) {
      pair[node] = isPair && problem.terminal(node);
    }
    return pair;
  }

  /** Greedy sweep. */
  private int[] sweepFrom(int start) {
    int nodes = problem.nodes();
    int[] order = new int[nodes];
    int[] position = new int[nodes];
    Arrays.fill(position, -1);
    int[] unplaced = new int[nodes];
    for (int node = 0; node < nodes; node++) {
      unplaced[node] = linksAt[node].length;
    }
    int placed = 0;
    int next = start;
    int oldest = 0;
    while (next >= 0) {
      meter.at(nodes >> 3);
      position[next] = placed;
      order[placed++] = next;
      for (int link : linksAt[next]) {
        int other = problem.otherEnd(link, next);
        unplaced[other]--;
      }
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
