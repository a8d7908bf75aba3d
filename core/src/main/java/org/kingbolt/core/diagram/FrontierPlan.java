package org.kingbolt.core.diagram;

import java.util.Arrays;

/**
 * The sweep over a network as a list of operations on the frontier: a node enters, a link is met, a
 * node leaves because its last link has been met. Entering nodes and links that have a slot are the
 * decisions; the rest happens by itself.
 */
final class FrontierPlan {

  static final int ENTER = 0;
  static final int LINK = 1;
  static final int LEAVE = 2;

  final NetworkProblem problem;

  /** Kind and argument (node or link) of each operation. */
  private final int[] kind;

  private final int[] argument;

  /** Operation with which each node enters and leaves. */
  private final int[] entering;

  private final int[] leaving;

  /** Terminals that enter at or after each operation. */
  private final int[] terminalsLeft;

  /** Operation of each decision. */
  private final int[] decision;

  /** The frontier's nodes before each operation, in order of entry. */
  private final int[][] frontier;

  /** Where on the frontier a link's two ends are, or the node that leaves. */
  private final int[] firstPlace;

  private final int[] secondPlace;

  private final int operations;

  FrontierPlan(NetworkProblem problem, WorkMeter meter) {
    this.problem = problem;
    int[] links = linksInOrder(problem, FrontierOrder.best(problem, meter));
    int capacity = links.length + 2 * problem.nodes();
    this.kind = new int[capacity];
    this.argument = new int[capacity];
    this.entering = new int[problem.nodes()];
    this.leaving = new int[problem.nodes()];
    this.operations = listOperations(links);
    this.terminalsLeft = new int[operations + 1];
    for (int op = operations - 1; op >= 0; op--) {
      boolean enters = kind[op] == ENTER && problem.terminal(argument[op]);
      terminalsLeft[op] = terminalsLeft[op + 1] + (enters ? 1 : 0);
    }
    int[] found = new int[operations];
    int count = 0;
    for (int op = 0; op < operations; op++) {
      if (slotOf(op) != NetworkProblem.PERFECT) {
        found[count++] = op;
      }
    }
    this.decision = Arrays.copyOf(found, count);
    this.frontier = new int[operations + 1][];
    this.firstPlace = new int[operations];
    this.secondPlace = new int[operations];
    followFrontier();
  }

  /** The rule that follows this plan. */
  StateRule rule() {
    return problem.directed ? new DirectedRule(this) : new UndirectedRule(this);
  }

  /** Each link when the later of its two nodes is met, links to earlier nodes first. */
  private static int[] linksInOrder(NetworkProblem problem, int[] nodeOrder) {
    int[] position = new int[problem.nodes()];
    Arrays.fill(position, -1);
    for (int i = 0; i < nodeOrder.length; i++) {
      position[nodeOrder[i]] = i;
    }
    long[] keys = new long[problem.links()];
    int count = 0;
    for (int link = 0; link < problem.links(); link++) {
      int a = position[problem.from[link]];
      int b = position[problem.to[link]];
      if (a >= 0) {
        // later end, then earlier end, then number: 21 bits each
        keys[count++] = ((long) Math.max(a, b) << 42) | ((long) Math.min(a, b) << 21) | link;
      }
    }
    Arrays.sort(keys, 0, count);
    int[] links = new int[count];
    for (int i = 0; i < count; i++) {
      links[i] = (int) (keys[i] & ((1 << 21) - 1));
    }
    return links;
  }

  private int listOperations(int[] links) {
    int[] left = new int[problem.nodes()];
    for (int link : links) {
      left[problem.from[link]]++;
      left[problem.to[link]]++;
    }
    boolean[] entered = new boolean[problem.nodes()];
    int op = 0;
    for (int link : links) {
      int[] ends = {problem.from[link], problem.to[link]};
      for (int node : ends) {
        if (!entered[node]) {
          entered[node] = true;
          kind[op] = ENTER;
          entering[node] = op;
          argument[op++] = node;
        }
      }
      kind[op] = LINK;
      argument[op++] = link;
      for (int node : ends) {
        if (--left[node] == 0) {
          kind[op] = LEAVE;
          leaving[node] = op;
          argument[op++] = node;
        }
      }
    }
    return op;
  }

  private void followFrontier() {
    int[] place = new int[problem.nodes()];
    int[] active = {};
    for (int op = 0; op < operations; op++) {
      frontier[op] = active;
      int node = argument[op];
      if (kind[op] == ENTER) {
        place[node] = active.length;
        active = Arrays.copyOf(active, active.length + 1);
        active[active.length - 1] = node;
      } else if (kind[op] == LINK) {
        firstPlace[op] = place[problem.from[node]];
        secondPlace[op] = place[problem.to[node]];
      } else {
        int at = place[node];
        firstPlace[op] = at;
        int[] rest = Arrays.copyOf(active, active.length - 1);
        for (int i = at; i < rest.length; i++) {
          rest[i] = active[i + 1];
          place[rest[i]] = i;
        }
        active = rest;
      }
    }
    frontier[operations] = active;
  }

  /** The most nodes on the frontier at any moment of the sweep. */
  int width() {
    int width = 0;
    for (int[] nodes : frontier) {
      width = Math.max(width, nodes.length);
    }
    return width;
  }

  int operations() {
    return operations;
  }

  int kind(int op) {
    return kind[op];
  }

  int argument(int op) {
    return argument[op];
  }

  int enteringOf(int node) {
    return entering[node];
  }

  int leavingOf(int node) {
    return leaving[node];
  }

  boolean allTerminalsMetBefore(int op) {
    return terminalsLeft[op] == 0;
  }

  int decisions() {
    return decision.length;
  }

  int operationOf(int step) {
    return decision[step];
  }

  /** The frontier's nodes before an operation, in order of entry; not to be changed. */
  int[] frontierBefore(int op) {
    return frontier[op];
  }

  int firstPlace(int op) {
    return firstPlace[op];
  }

  int secondPlace(int op) {
    return secondPlace[op];
  }

  int slot(int step) {
    return slotOf(decision[step]);
  }

  private int slotOf(int op) {
    return switch (kind[op]) {
      case ENTER -> problem.nodeSlot[argument[op]];
      case LINK -> problem.linkSlot[argument[op]];
      default -> NetworkProblem.PERFECT;
    };
  }
}
