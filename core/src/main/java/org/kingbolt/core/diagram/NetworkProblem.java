package org.kingbolt.core.diagram;

import java.util.function.Predicate;

/**
 * A network reduced to numbers, as the frontier method reads it: the structure works while every
 * target can be reached from the source over working links and nodes, the source and the targets
 * themselves included.
 *
 * <p>Immutable; safe to share. The arrays passed in must not be changed afterwards.
 */
public final class NetworkProblem {

  /** A link or node slot that cannot fail. */
  public static final int PERFECT = -1;

  final int[] from;
  final int[] to;
  final boolean[] arc;
  final int[] linkSlot;
  final int[] nodeSlot;
  final int source;
  final boolean[] target;
  final boolean directed;
  private final int[][] linksAt;

  /**
   * Describes a network.
   *
   * @param from one node a link
   * @param to the other node of each link, different from {@code from}
   * @param arc true where a link is passable only from {@code from} to {@code to}
   * @param linkSlot the slot of each link, or {@link #PERFECT}
   * @param nodeSlot the slot of each node, or {@link #PERFECT}; its length is the number of nodes
   * @param source the node where all routes start
   * @param target true for each node to be reached; at least one besides the source; with links
   *     only, source and targets are one set of nodes to be connected
   */
  public NetworkProblem(
      int[] from,
      int[] to,
      boolean[] arc,
      int[] linkSlot,
      int[] nodeSlot,
      int source,
      boolean[] target) {
    this.from = from;
    this.to = to;
    this.arc = arc;
    this.linkSlot = linkSlot;
    this.nodeSlot = nodeSlot;
    this.source = source;
    this.target = target;
    boolean anyArc = false;
    for (boolean isArc : arc) {
      anyArc |= isArc;
    }
    this.directed = anyArc;
    this.linksAt = incidence();
  }

  /**
   * The structure function.
   *
   * @param slotWorks indexed by slot: whether it works
   * @return whether every target can be reached. Cost: linear in nodes and links.
   */
  public boolean works(boolean[] slotWorks) {
    if (!isUp(nodeSlot[source], slotWorks)) {
      return false;
    }
    boolean[] reached = new boolean[nodes()];
    int[] queue = new int[nodes()];
    int[][] at = linksAt;
    reached[source] = true;
    queue[0] = source;
    int filled = 1;
    for (int done = 0; done < filled; done++) {
      int node = queue[done];
      for (int link : at[node]) {
        int other = otherEnd(link, node);
        if (isPassable(link, node)
            && !reached[other]
            && isUp(linkSlot[link], slotWorks)
            && isUp(nodeSlot[other], slotWorks)) {
          reached[other] = true;
          queue[filled++] = other;
        }
      }
    }
    for (int node = 0; node < nodes(); node++) {
      if (target[node] && !reached[node]) {
        return false;
      }
    }
    return true;
  }

  /**
   * The structure function once more, for very many states.
   *
   * @return gives what {@link #works(boolean[])} gives, without allocating anything; for one thread
   */
  public Predicate<boolean[]> search() {
    return new NetworkSearch(this);
  }

  private static boolean isUp(int slot, boolean[] slotWorks) {
    return slot == PERFECT || slotWorks[slot];
  }

  int nodes() {
    return nodeSlot.length;
  }

  int links() {
    return linkSlot.length;
  }

  boolean terminal(int node) {
    return node == source || target[node];
  }

  /** Links at each node, in order of their numbers. */
  int[][] linksAt() {
    return linksAt;
  }

  private int[][] incidence() {
    int[] degree = new int[nodes()];
    for (int link = 0; link < links(); link++) {
      degree[from[link]]++;
      degree[to[link]]++;
    }
    int[][] at = new int[nodes()][];
    for (int node = 0; node < nodes(); node++) {
      at[node] = new int[degree[node]];
    }
    int[] filled = new int[nodes()];
    for (int link = 0; link < links(); link++) {
      at[from[link]][filled[from[link]]++] = link;
      at[to[link]][filled[to[link]]++] = link;
    }
    return at;
  }

  /** Whether a link at a node can be passed from there. */
  boolean isPassable(int link, int node) {
    return !arc[link] || from[link] == node;
  }

  int otherEnd(int link, int node) {
    return from[link] == node ? to[link] : from[link];
  }
}
