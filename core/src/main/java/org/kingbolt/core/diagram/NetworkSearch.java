package org.kingbolt.core.diagram;

import java.util.function.Predicate;

/**
 * The structure function of a network for very many states: nothing is allocated for a state, and
 * the search ends with the last target. For one thread.
 */
final class NetworkSearch implements Predicate<boolean[]> {

  private final NetworkProblem network;
  private final int targets;

  /** Where the passages out of each node begin; they end where those of the next one begin. */
  private final int[] first;

  private final int[] leadsTo;
  private final int[] linkSlot;

  /** The search that last came to each node. */
  private final long[] reached;

  private final int[] queue;
  private long search;

  NetworkSearch(NetworkProblem network) {
    this.network = network;
    int nodes = network.nodes();
    this.first = new int[nodes + 1];
    int[][] at = network.linksAt();
    int passages = 0;
    int wanted = 0;
    for (int node = 0; node < nodes; node++) {
      wanted += network.target[node] && node != network.source ? 1 : 0;
      for (int link : at[node]) {
        passages += network.isPassable(link, node) ? 1 : 0;
      }
      first[node + 1] = passages;
    }
    this.targets = wanted;
    this.leadsTo = new int[passages];
    this.linkSlot = new int[passages];
    int next = 0;
    for (int node = 0; node < nodes; node++) {
      for (int link : at[node]) {
        if (network.isPassable(link, node)) {
          leadsTo[next] = network.otherEnd(link, node);
          linkSlot[next++] = network.linkSlot[link];
        }
      }
    }
    this.reached = new long[nodes];
    this.queue = new int[nodes];
  }

  @Override
  public boolean test(boolean[] slotWorks) {
    if (!isUp(network.nodeSlot[network.source], slotWorks)) {
      return false;
    }
    search++;
    reached[network.source] = search;
    queue[0] = network.source;
    int filled = 1;
    int missing = targets;
    for (int done = 0; done < filled && missing > 0; done++) {
      int node = queue[done];
      for (int passage = first[node]; passage < first[node + 1]; passage++) {
        int other = leadsTo[passage];
        if (reached[other] != search
            && isUp(linkSlot[passage], slotWorks)
            && isUp(network.nodeSlot[other], slotWorks)) {
          reached[other] = search;
          queue[filled++] = other;
          missing -= network.target[other] ? 1 : 0;
        }
      }
    }
    return missing == 0;
  }

  private static boolean isUp(int slot, boolean[] slotWorks) {
    return slot == NetworkProblem.PERFECT || slotWorks[slot];
  }
}
