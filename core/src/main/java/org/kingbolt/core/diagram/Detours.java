package org.kingbolt.core.diagram;

import java.util.Arrays;
import java.util.PriorityQueue;

/**
 * Short ways around single links and nodes of the kept part of a network: each uses at least one
 * link that is not kept yet, few of those, and few links that are as critical as what it goes
 * around. For one thread.
 */
final class Detours {

  private static final double NEW_LINK = 1;
  private static final double KEPT_LINK = 0.4;
  private static final double CRITICAL_LINK = 3;

  /** A node reached, with or without a new link on the way. */
  private record Reached(double cost, int state) implements Comparable<Reached> {
    @Override
    public int compareTo(Reached other) {
      int byCost = Double.compare(cost, other.cost);
      return byCost != 0 ? byCost : Integer.compare(state, other.state);
    }
  }

  private final NetworkProblem network;
  private final int[][] linksAt;
  private final double[] works;

  /** Two states a node: without and with a new link behind it. */
  private final double[] cost;

  private final int[] linkInto;
  private final int[] stateBefore;
  private int[] touched = new int[64];
  private int touchedCount;

  /**
   * Prepares.
   *
   * @param works indexed by slot; what never works is not used
   */
  Detours(NetworkProblem network, int[][] linksAt, double[] works) {
    this.network = network;
    this.linksAt = linksAt;
    this.works = works;
    this.cost = new double[2 * network.nodes()];
    this.linkInto = new int[cost.length];
    this.stateBefore = new int[cost.length];
    Arrays.fill(cost, Double.POSITIVE_INFINITY);
  }

  /** Adds the new links of a way around a link. */
  void aroundLink(int link, boolean[] kept, double[] critical, boolean[] added, WorkMeter meter) {
    add(network.from[link], network.to[link], link, -1, kept, critical, added, meter);
  }

  /** Adds the new links of ways around a node, from one kept neighbour to each other one. */
  void aroundNode(int node, boolean[] kept, double[] critical, boolean[] added, WorkMeter meter) {
    int first = -1;
    for (int link : linksAt[node]) {
      int other = network.otherEnd(link, node);
      if (kept[link] && first < 0) {
        first = other;
      } else if (kept[link] && other != first) {
        add(first, other, -1, node, kept, critical, added, meter);
        if (network.directed) {
          add(other, first, -1, node, kept, critical, added, meter);
        }
      }
    }
  }

  private void add(
      int start,
      int end,
      int avoidedLink,
      int avoidedNode,
      boolean[] kept,
      double[] critical,
      boolean[] added,
      WorkMeter meter) {
    double most =
        critical[avoidedLink >= 0 ? avoidedLink : network.links() + avoidedNode]
            + Double.MIN_NORMAL;
    PriorityQueue<Reached> open = new PriorityQueue<>();
    reach(start << 1, 0, -1, -1, open);
    int goal = (end << 1) | 1;
    while (!open.isEmpty()) {
      Reached next = open.poll();
      int node = next.state >> 1;
      if (next.state == goal) {
        addWay(goal, kept, added);
        break;
      }
      if (next.cost > cost[next.state]) {
        continue;
      }
      meter.at(touchedCount >> 3);
      for (int link : linksAt[node]) {
        int other = network.otherEnd(link, node);
        if (link != avoidedLink && other != avoidedNode && isPassable(link, node, other)) {
          double step =
              kept[link]
                  ? KEPT_LINK + CRITICAL_LINK * Math.min(1, critical[link] / most)
                  : NEW_LINK;
          int state = (other << 1) | (kept[link] ? next.state & 1 : 1);
          reach(state, next.cost + step, link, next.state, open);
        }
      }
    }
    forget();
  }

  private boolean isPassable(int link, int node, int other) {
    return (!network.arc[link] || network.from[link] == node)
        && canWork(network.linkSlot[link])
        && canWork(network.nodeSlot[other]);
  }

  private boolean canWork(int slot) {
    return slot == NetworkProblem.PERFECT || works[slot] > 0;
  }

  private void reach(int state, double newCost, int link, int before, PriorityQueue<Reached> open) {
    if (newCost < cost[state]) {
      if (cost[state] == Double.POSITIVE_INFINITY) {
        if (touchedCount == touched.length) {
          touched = Arrays.copyOf(touched, touchedCount << 1);
        }
        touched[touchedCount++] = state;
      }
      cost[state] = newCost;
      linkInto[state] = link;
      stateBefore[state] = before;
      open.add(new Reached(newCost, state));
    }
  }

  private void addWay(int goal, boolean[] kept, boolean[] added) {
    for (int state = goal; linkInto[state] >= 0; state = stateBefore[state]) {
      if (!kept[linkInto[state]]) {
        added[linkInto[state]] = true;
      }
    }
  }

  private void forget() {
    for (int i = 0; i < touchedCount; i++) {
      cost[touched[i]] = Double.POSITIVE_INFINITY;
    }
    touchedCount = 0;
  }

  /** The most reliable way from the source to every target, or nothing where there is none. */
  boolean[] tree() {
    double[] length = new double[network.nodes()];
    int[] into = new int[network.nodes()];
    Arrays.fill(length, Double.POSITIVE_INFINITY);
    Arrays.fill(into, -1);
    PriorityQueue<Reached> open = new PriorityQueue<>();
    length[network.source] = 0;
    open.add(new Reached(0, network.source));
    while (!open.isEmpty()) {
      Reached next = open.poll();
      int node = next.state;
      if (next.cost > length[node]) {
        continue;
      }
      for (int link : linksAt[node]) {
        int other = network.otherEnd(link, node);
        double step = length(network.linkSlot[link]) + length(network.nodeSlot[other]);
        if (isPassable(link, node, other) && next.cost + step < length[other]) {
          length[other] = next.cost + step;
          into[other] = link;
          open.add(new Reached(length[other], other));
        }
      }
    }
    boolean[] kept = new boolean[network.links()];
    for (int node = 0; node < network.nodes(); node++) {
      int at = node;
      while (network.target[node] && into[at] >= 0 && !kept[into[at]]) {
        kept[into[at]] = true;
        at = network.otherEnd(into[at], at);
      }
    }
    return kept;
  }

  private double length(int slot) {
    return slot == NetworkProblem.PERFECT ? 1e-9 : 1e-6 - Math.log(works[slot]);
  }
}
