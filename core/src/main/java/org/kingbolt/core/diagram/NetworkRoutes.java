package org.kingbolt.core.diagram;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import org.jspecify.annotations.Nullable;

/**
 * Routes through a network from nodes known to be connected to one target more, with the fewest
 * slots that are not free: a search over distances 0, 1, 2 in three turning queues. For one thread.
 */
final class NetworkRoutes implements RouteFinder {

  private static final int QUEUES = 3;

  private final NetworkProblem problem;
  private final int[][] at;
  private final boolean[] joined;
  private final int target;
  private final int[] distance;
  private final int[] cameFrom;
  private final int[][] queue;
  private final int[] filled = new int[QUEUES];

  private NetworkRoutes(NetworkProblem problem, int[][] at, boolean[] joined, int target) {
    this.problem = problem;
    this.at = at;
    this.joined = joined;
    this.target = target;
    this.distance = new int[problem.nodes()];
    this.cameFrom = new int[problem.nodes()];
    this.queue = new int[QUEUES][8];
  }

  /**
   * The failures of a network, split by the first target that is not reached.
   *
   * @param problem the network
   * @return one finder a target: it takes the source and all targets of the finders before it as
   *     connected, with nodes that work, and looks for routes from any of these to its own target.
   *     The network fails in a state exactly when the function of some finder does. Targets close
   *     to the source come first.
   */
  public static List<RouteFinder> of(NetworkProblem problem) {
    int[][] at = problem.linksAt();
    List<RouteFinder> stages = new ArrayList<>();
    boolean[] joined = new boolean[problem.nodes()];
    for (int target : targetsByDistance(problem, at)) {
      stages.add(new NetworkRoutes(problem, at, joined.clone(), target));
      joined[problem.source] = true;
      joined[target] = true;
    }
    return stages;
  }

  private static List<Integer> targetsByDistance(NetworkProblem problem, int[][] at) {
    List<Integer> targets = new ArrayList<>();
    boolean[] seen = new boolean[problem.nodes()];
    int[] reached = new int[problem.nodes()];
    int count = 0;
    reached[count++] = problem.source;
    seen[problem.source] = true;
    for (int done = 0; done < count; done++) {
      int node = reached[done];
      if (problem.target[node] && node != problem.source) {
        targets.add(node);
      }
      for (int link : at[node]) {
        int other = problem.otherEnd(link, node);
        if (!seen[other] && (!problem.arc[link] || problem.from[link] == node)) {
          seen[other] = true;
          reached[count++] = other;
        }
      }
    }
    return targets;
  }

  @Override
  public int @Nullable [] find(boolean[] barred, boolean[] free) {
    Arrays.fill(distance, Integer.MAX_VALUE);
    Arrays.fill(filled, 0);
    boolean first = true;
    for (int node = 0; node < joined.length; node++) {
      if (joined[node]) {
        first = false;
        distance[node] = 0;
        cameFrom[node] = -1;
        push(0, node);
      }
    }
    int source = problem.nodeSlot[problem.source];
    if (first && !isBarred(source, barred)) {
      distance[problem.source] = 0;
      cameFrom[problem.source] = -1;
      push(0, problem.source);
    }
    int empty = 0;
    for (int now = 0; empty < QUEUES; now++) {
      int turn = now % QUEUES;
      empty = filled[turn] == 0 ? empty + 1 : 0;
      while (filled[turn] > 0) {
        int node = queue[turn][--filled[turn]];
        if (distance[node] == now) {
          if (node == target) {
            return slots(free, first);
          }
          leave(node, now, barred, free);
        }
      }
    }
    return null;
  }

  @Override
  public boolean works(boolean[] barred) {
    boolean[] up = new boolean[barred.length];
    for (int slot = 0; slot < up.length; slot++) {
      up[slot] = !barred[slot];
    }
    return problem.works(up);
  }

  private void leave(int node, int now, boolean[] barred, boolean[] free) {
    for (int link : at[node]) {
      int other = problem.otherEnd(link, node);
      int linkSlot = problem.linkSlot[link];
      int nodeSlot = problem.nodeSlot[other];
      if ((problem.arc[link] && problem.from[link] != node)
          || isBarred(linkSlot, barred)
          || isBarred(nodeSlot, barred)) {
        continue;
      }
      int then = now + (isOpen(linkSlot, free) ? 1 : 0) + (isOpen(nodeSlot, free) ? 1 : 0);
      if (then < distance[other]) {
        distance[other] = then;
        cameFrom[other] = link;
        push(then % QUEUES, other);
      }
    }
  }

  private void push(int turn, int node) {
    if (filled[turn] == queue[turn].length) {
      queue[turn] = Arrays.copyOf(queue[turn], filled[turn] << 1);
    }
    queue[turn][filled[turn]++] = node;
  }

  private static boolean isBarred(int slot, boolean[] barred) {
    return slot != NetworkProblem.PERFECT && barred[slot];
  }

  private static boolean isOpen(int slot, boolean[] free) {
    return slot != NetworkProblem.PERFECT && !free[slot];
  }

  /** The slots along the route found; the source's own when it was not known to work. */
  private int[] slots(boolean[] free, boolean withSource) {
    int[] slots = new int[distance[target] + 1];
    int count = 0;
    int node = target;
    while (cameFrom[node] >= 0) {
      int link = cameFrom[node];
      if (isOpen(problem.nodeSlot[node], free)) {
        slots[count++] = problem.nodeSlot[node];
      }
      if (isOpen(problem.linkSlot[link], free)) {
        slots[count++] = problem.linkSlot[link];
      }
      node = problem.otherEnd(link, node);
    }
    if (withSource && isOpen(problem.nodeSlot[node], free)) {
      slots[count++] = problem.nodeSlot[node];
    }
    return Arrays.copyOf(slots, count);
  }
}
