package org.kingbolt.core.diagram;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.HashSet;
import java.util.List;
import java.util.PriorityQueue;
import java.util.Set;

/**
 * The minimal path sets of a network with one target, up to a cost: a search for simple paths that
 * goes only where the target can still be reached at what is left, by the least costs worked out
 * beforehand. Explicit stack.
 */
public final class NetworkPaths {

  private final NetworkProblem problem;
  private final double[] cost;
  private final double limit;
  private final WorkMeter meter;
  private final int[][] at;
  private final int target;

  /** From each node to the target; infinite also where some slot must not be used. */
  private final double[] onwards;

  private final boolean[] leads;
  private final boolean perfectLinks;
  private final List<int[]> found = new ArrayList<>();
  private final Set<List<Integer>> known = new HashSet<>();
  private boolean complete = true;

  /**
   * Searches.
   *
   * @param problem a network with one target
   * @param cost of each slot, at least 0, possibly infinite
   * @param limit the largest cost of a set that is wanted
   * @param meter hears of every step
   */
  public NetworkPaths(NetworkProblem problem, double[] cost, double limit, WorkMeter meter) {
    this.problem = problem;
    this.cost = cost.clone();
    this.limit = limit;
    this.meter = meter;
    this.at = problem.linksAt();
    int last = 0;
    while (!problem.target[last] || last == problem.source) {
      last++;
    }
    this.target = last;
    this.onwards = new double[problem.nodes()];
    this.leads = new boolean[problem.nodes()];
    this.perfectLinks = Arrays.stream(problem.linkSlot).anyMatch(s -> s == NetworkProblem.PERFECT);
    measure();
    search();
  }

  /**
   * Tells whether a network can be searched so.
   *
   * @param problem a network
   * @return whether there is one target besides the source
   */
  public static boolean applyTo(NetworkProblem problem) {
    int targets = 0;
    for (int node = 0; node < problem.nodes(); node++) {
      targets += problem.target[node] && node != problem.source ? 1 : 0;
    }
    return targets == 1;
  }

  /**
   * Returns what was found.
   *
   * @return the minimal path sets, each in increasing order of slots
   */
  public List<int[]> sets() {
    return found;
  }

  /**
   * Tells whether nothing was left out for its cost.
   *
   * @return true when these are all minimal path sets
   */
  public boolean isComplete() {
    return complete;
  }

  private double costOf(int slot) {
    return slot == NetworkProblem.PERFECT ? 0 : cost[slot];
  }

  private boolean isPassable(int link, int from) {
    return !problem.arc[link] || problem.from[link] == from;
  }

  /** The least costs to the target, by Dijkstra's method. */
  private void measure() {
    record Reached(double cost, int node) {}
    Arrays.fill(onwards, Double.POSITIVE_INFINITY);
    PriorityQueue<Reached> queue = new PriorityQueue<>((a, b) -> Double.compare(a.cost, b.cost));
    onwards[target] = 0;
    leads[target] = true;
    queue.add(new Reached(0, target));
    boolean[] done = new boolean[onwards.length];
    while (!queue.isEmpty()) {
      int node = queue.remove().node;
      if (done[node]) {
        continue;
      }
      done[node] = true;
      double entered = onwards[node] + costOf(problem.nodeSlot[node]);
      for (int link : at[node]) {
        int before = problem.otherEnd(link, node);
        if (isPassable(link, before) && !done[before]) {
          double sum = entered + costOf(problem.linkSlot[link]);
          boolean first = !leads[before];
          leads[before] = true;
          if (first || sum < onwards[before]) {
            onwards[before] = sum;
            queue.add(new Reached(sum, before));
          }
        }
      }
    }
  }

  private void search() {
    double[] spent = new double[problem.nodes() + 1];
    int[] node = new int[problem.nodes() + 1];
    int[] next = new int[problem.nodes() + 1];
    int[] route = new int[problem.nodes() + 1];
    boolean[] visited = new boolean[problem.nodes()];
    node[0] = problem.source;
    spent[0] = costOf(problem.nodeSlot[problem.source]);
    if (spent[0] + onwards[problem.source] > limit) {
      complete = !leads[problem.source];
      return;
    }
    visited[problem.source] = true;
    int depth = 0;
    while (depth >= 0) {
      int here = node[depth];
      if (next[depth] == at[here].length) {
        visited[here] = false;
        depth--;
        continue;
      }
      meter.at(found.size() * (1L + depth / 8));
      int link = at[here][next[depth]++];
      int there = problem.otherEnd(link, here);
      if (visited[there] || !isPassable(link, here) || !leads[there]) {
        continue;
      }
      double sum = spent[depth] + costOf(problem.linkSlot[link]) + costOf(problem.nodeSlot[there]);
      route[depth] = link;
      if (sum + onwards[there] > limit) {
        complete = false;
      } else if (there == target) {
        report(route, node, depth + 1);
      } else {
        depth++;
        node[depth] = there;
        spent[depth] = sum;
        next[depth] = 0;
        visited[there] = true;
      }
    }
  }

  private void report(int[] route, int[] node, int links) {
    int[] slots = new int[2 * links + 1];
    int count = 0;
    for (int i = 0; i < links; i++) {
      count = add(slots, count, problem.linkSlot[route[i]]);
      count = add(slots, count, problem.nodeSlot[node[i]]);
    }
    count = add(slots, count, problem.nodeSlot[target]);
    int[] set = Arrays.copyOf(slots, count);
    Arrays.sort(set);
    // with links that cannot fail, two paths may need the same slots, or one fewer than the other
    if (!perfectLinks || (isMinimal(set) && known.add(Arrays.stream(set).boxed().toList()))) {
      found.add(set);
    }
  }

  private static int add(int[] slots, int count, int slot) {
    if (slot == NetworkProblem.PERFECT) {
      return count;
    }
    slots[count] = slot;
    return count + 1;
  }

  private boolean isMinimal(int[] set) {
    boolean[] works = new boolean[cost.length];
    for (int slot : set) {
      works[slot] = true;
    }
    for (int slot : set) {
      meter.at(found.size());
      works[slot] = false;
      boolean spared = problem.works(works);
      works[slot] = true;
      if (spared) {
        return false;
      }
    }
    return true;
  }
}
