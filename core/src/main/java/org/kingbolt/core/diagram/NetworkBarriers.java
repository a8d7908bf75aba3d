package org.kingbolt.core.diagram;

import java.util.Arrays;
import org.jspecify.annotations.Nullable;

/**
 * Barriers in a network, which are the path sets of its dual: what keeps one target from being
 * reached over the barred slots alone. A barrier lies where the nodes that are reached end, and
 * holds only what can lead on to the target. For one thread.
 */
final class NetworkBarriers implements RouteFinder {

  private final NetworkProblem problem;
  private final int[][] at;
  private final boolean[] reached;
  private final boolean[] leads;
  private final int[] queue;

  /**
   * Prepares the search.
   *
   * @param problem the network, not its dual
   */
  public NetworkBarriers(NetworkProblem problem) {
    this.problem = problem;
    this.at = problem.linksAt();
    this.reached = new boolean[problem.nodes()];
    this.leads = new boolean[problem.nodes()];
    this.queue = new int[problem.nodes()];
  }

  @Override
  public int @Nullable [] find(boolean[] barred, boolean[] free) {
    int sourceSlot = problem.nodeSlot[problem.source];
    if (!isCrossed(sourceSlot, barred)) {
      return free[sourceSlot] ? new int[0] : new int[] {sourceSlot};
    }
    reach(barred);
    int target = -1;
    for (int node = 0; node < reached.length && target < 0; node++) {
      target = problem.target[node] && !reached[node] ? node : -1;
    }
    if (target < 0) {
      return null;
    }
    lead(target, free);
    boolean[] taken = new boolean[barred.length];
    int[] barrier = new int[barred.length];
    int count = 0;
    for (int link = 0; link < problem.links(); link++) {
      for (int end = 0; end < (problem.arc[link] ? 1 : 2); end++) {
        int node = end == 0 ? problem.from[link] : problem.to[link];
        int other = problem.otherEnd(link, node);
        if (reached[node] && leads[other]) {
          int linkSlot = problem.linkSlot[link];
          int slot = isCrossed(linkSlot, barred) ? problem.nodeSlot[other] : linkSlot;
          boolean shut = isFree(linkSlot, free) || isFree(problem.nodeSlot[other], free);
          if (!shut && !taken[slot]) {
            taken[slot] = true;
            barrier[count++] = slot;
          }
        }
      }
    }
    return Arrays.copyOf(barrier, count);
  }

  /** The nodes that the source reaches over barred slots and over what cannot fail. */
  private void reach(boolean[] barred) {
    Arrays.fill(reached, false);
    reached[problem.source] = true;
    queue[0] = problem.source;
    int filled = 1;
    for (int done = 0; done < filled; done++) {
      int node = queue[done];
      for (int link : at[node]) {
        int other = problem.otherEnd(link, node);
        if (!reached[other]
            && (!problem.arc[link] || problem.from[link] == node)
            && isCrossed(problem.linkSlot[link], barred)
            && isCrossed(problem.nodeSlot[other], barred)) {
          reached[other] = true;
          queue[filled++] = other;
        }
      }
    }
  }

  /** The nodes beyond from which the target can still be reached. */
  private void lead(int target, boolean[] free) {
    Arrays.fill(leads, false);
    if (isFree(problem.nodeSlot[target], free)) {
      return;
    }
    leads[target] = true;
    queue[0] = target;
    int filled = 1;
    for (int done = 0; done < filled; done++) {
      int node = queue[done];
      for (int link : at[node]) {
        int other = problem.otherEnd(link, node);
        if (!leads[other]
            && !reached[other]
            && (!problem.arc[link] || problem.to[link] == node)
            && !isFree(problem.linkSlot[link], free)
            && !isFree(problem.nodeSlot[other], free)) {
          leads[other] = true;
          queue[filled++] = other;
        }
      }
    }
  }

  private static boolean isCrossed(int slot, boolean[] barred) {
    return slot == NetworkProblem.PERFECT || barred[slot];
  }

  private static boolean isFree(int slot, boolean[] free) {
    return slot != NetworkProblem.PERFECT && free[slot];
  }
}
