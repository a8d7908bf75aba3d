package org.kingbolt.core.diagram;

import java.util.ArrayDeque;
import java.util.Arrays;
import java.util.Deque;

/**
 * Takes a network apart before it is swept: links in parallel and in series become one, dead ends
 * go, terminals that hang on one link pass their question on, links that cannot fail are
 * contracted, where single nodes cut the network each biconnected piece becomes a question of its
 * own, and a part that hangs on two nodes becomes one link. Every step keeps the structure
 * function, in terms of the original parts.
 *
 * <p>Source: Moore &amp; Shannon 1956 for series and parallel; Satyanarayana &amp; Chang, Network
 * reliability and the factoring theorem, Networks 13 (1983) 107 for the others. Cost: nearly linear
 * in nodes and links.
 */
final class NetworkReducer {

  private final Composer composer;
  private final boolean dual;
  private final WorkMeter meter;

  /** What must work besides the networks that are left. */
  private int[] factors = new int[8];

  private int factorCount;
  private final Deque<NetworkGraph> open = new ArrayDeque<>();

  /**
   * Reduces a network.
   *
   * @param parts the expression in each slot of the network
   */
  NetworkReducer(
      Composer composer, NetworkProblem network, boolean dual, int[] parts, WorkMeter meter) {
    this.composer = composer;
    this.dual = dual;
    this.meter = meter;
    NetworkGraph graph = new NetworkGraph(this, network.nodes(), network.source);
    for (int link = 0; link < network.links(); link++) {
      int slot = network.linkSlot[link];
      int part = slot == NetworkProblem.PERFECT ? slot : parts[slot];
      graph.add(network.from[link], network.to[link], network.arc[link], part);
    }
    for (int node = 0; node < network.nodes(); node++) {
      int slot = network.nodeSlot[node];
      graph.nodePart[node] = slot == NetworkProblem.PERFECT ? slot : parts[slot];
      if (network.target[node]) {
        graph.addTarget(node);
      }
      graph.wake(node);
    }
    run(graph);
  }

  private NetworkReducer(Composer composer, boolean dual, NetworkGraph graph, WorkMeter meter) {
    this.composer = composer;
    this.dual = dual;
    this.meter = meter;
    run(graph);
  }

  private void run(NetworkGraph graph) {
    open.push(graph);
    while (!open.isEmpty()) {
      reduce(open.pop());
    }
  }

  /** The expression of the whole network. */
  int expression() {
    return series(Arrays.copyOf(factors, factorCount));
  }

  int series(int... parts) {
    return dual ? composer.any(parts) : composer.all(parts);
  }

  int any(int... parts) {
    return dual ? composer.all(parts) : composer.any(parts);
  }

  private void factor(int part) {
    if (part == NetworkGraph.PERFECT) {
      return;
    }
    if (factorCount == factors.length) {
      factors = Arrays.copyOf(factors, factorCount << 1);
    }
    factors[factorCount++] = part;
  }

  private void reduce(NetworkGraph graph) {
    if (graph.hasArcs()) {
      dropUseless(graph);
    }
    for (int node = graph.nextWaiting(); node >= 0; node = graph.nextWaiting()) {
      while (step(graph, node)) {
        graph.wake(node);
      }
    }
    if (graph.targets == 0) {
      factor(graph.nodePart[graph.source]);
      return;
    }
    if (!graph.hasArcs()) {
      NetworkPieces pieces = new NetworkPieces(graph);
      if (pieces.count() != 1 || !pieces.isWhole()) {
        pieces.mustWork().forEach(node -> takeNode(graph, node));
        for (int piece = 0; piece < pieces.count(); piece++) {
          open.push(pieces.graph(piece, this));
        }
        return;
      }
      if (NetworkModules.replace(graph, this)) {
        open.push(graph);
        return;
      }
    }
    close(graph);
  }

  /** The expression of a part that stands between two nodes and holds no such part itself. */
  int module(NetworkGraph part) {
    return new NetworkReducer(composer, dual, part, meter).expression();
  }

  private void takeNode(NetworkGraph graph, int node) {
    factor(graph.nodePart[node]);
    graph.nodePart[node] = NetworkGraph.PERFECT;
  }

  /** Drops what no route along the directions can use. */
  private static void dropUseless(NetworkGraph graph) {
    boolean[] reached = spread(graph, true);
    boolean[] reaching = spread(graph, false);
    for (int edge = 0; edge < graph.edges(); edge++) {
      if (!graph.isGone(edge)) {
        boolean forth = reached[graph.from(edge)] && reaching[graph.to(edge)];
        boolean back = !graph.isArc(edge) && reached[graph.to(edge)] && reaching[graph.from(edge)];
        if (!forth && !back) {
          graph.remove(edge);
        }
      }
    }
  }

  /** Nodes that the source reaches, or nodes that reach a target. */
  private static boolean[] spread(NetworkGraph graph, boolean forward) {
    boolean[] seen = new boolean[graph.nodes()];
    int[] queue = new int[graph.nodes()];
    int filled = 0;
    for (int node = 0; node < graph.nodes(); node++) {
      if (forward ? node == graph.source : graph.target[node]) {
        seen[node] = true;
        queue[filled++] = node;
      }
    }
    for (int done = 0; done < filled; done++) {
      for (int edge : graph.at(queue[done])) {
        int other = graph.other(edge, queue[done]);
        boolean passable = graph.leads(edge, forward ? queue[done] : other);
        if (passable && !seen[other]) {
          seen[other] = true;
          queue[filled++] = other;
        }
      }
    }
    return seen;
  }

  /** Reduces at one node; true when something has changed and the node is still there. */
  private boolean step(NetworkGraph graph, int node) {
    if (graph.degree(node) == 0 || graph.targets == 0) {
      return false;
    }
    if (graph.terminal(node)) {
      takeNode(graph, node);
      dropUselessArcs(graph, node);
      if (graph.degree(node) == 1) {
        passOn(graph, node);
        return false;
      }
    } else if (graph.degree(node) <= 2 || graph.hasArcs()) {
      if (joinSeries(graph, node)) {
        return false;
      }
    }
    return contract(graph, node);
  }

  /** Arcs into the source and out of the only target lie on no route that is needed. */
  private static void dropUselessArcs(NetworkGraph graph, int node) {
    if (!graph.hasArcs()) {
      return;
    }
    for (int edge : graph.at(node)) {
      boolean intoSource = node == graph.source && !graph.leads(edge, node);
      boolean outOfTarget =
          graph.targets == 1 && graph.target[node] && !graph.leads(edge, graph.other(edge, node));
      if (intoSource || outOfTarget) {
        graph.remove(edge);
      }
    }
  }

  /** A terminal with one link needs that link and hands its place to the node at the other end. */
  private void passOn(NetworkGraph graph, int node) {
    int edge = graph.at(node)[0];
    int other = graph.other(edge, node);
    factor(graph.part(edge));
    graph.remove(edge);
    if (node == graph.source) {
      graph.source = other;
      graph.dropTarget(other);
    } else {
      graph.dropTarget(node);
      graph.addTarget(other);
    }
    graph.wake(other);
  }

  /** A node that is no terminal goes when at most two links meet there or no route passes it. */
  private boolean joinSeries(NetworkGraph graph, int node) {
    int[] edges = graph.at(node);
    boolean enters = false;
    boolean leaves = false;
    for (int edge : edges) {
      enters |= graph.leads(edge, graph.other(edge, node));
      leaves |= graph.leads(edge, node);
    }
    if (edges.length > 2 && enters && leaves) {
      return false;
    }
    for (int edge : edges) {
      graph.remove(edge);
    }
    if (edges.length == 2 && enters && leaves) {
      int a = graph.other(edges[0], node);
      int b = graph.other(edges[1], node);
      boolean forth = graph.leads(edges[0], a) && graph.leads(edges[1], node);
      boolean back = graph.leads(edges[1], b) && graph.leads(edges[0], node);
      if (a != b && (forth || back)) {
        int part = joined(graph.part(edges[0]), graph.nodePart[node], graph.part(edges[1]));
        graph.add(forth ? a : b, forth ? b : a, forth != back, part);
      }
    }
    return true;
  }

  private int joined(int... parts) {
    int[] kept = Arrays.stream(parts).filter(part -> part != NetworkGraph.PERFECT).toArray();
    return kept.length == 0 ? NetworkGraph.PERFECT : series(kept);
  }

  /** Contracts one link that cannot fail between nodes that cannot fail. */
  private static boolean contract(NetworkGraph graph, int node) {
    if (graph.nodePart[node] != NetworkGraph.PERFECT) {
      return false;
    }
    for (int edge : graph.at(node)) {
      int other = graph.other(edge, node);
      boolean alike = !graph.isArc(edge) || (node == graph.source && graph.from(edge) == node);
      if (graph.part(edge) == NetworkGraph.PERFECT
          && graph.nodePart[other] == NetworkGraph.PERFECT
          && alike) {
        graph.remove(edge);
        graph.merge(other, node);
        return true;
      }
    }
    return false;
  }

  /** Makes what is left an operator over its links and nodes. */
  private void close(NetworkGraph graph) {
    int[] number = new int[graph.nodes()];
    Arrays.fill(number, -1);
    int nodes = 0;
    int links = 0;
    int slots = 0;
    for (int edge = 0; edge < graph.edges(); edge++) {
      if (!graph.isGone(edge)) {
        for (int node : new int[] {graph.from(edge), graph.to(edge)}) {
          if (number[node] < 0) {
            number[node] = nodes++;
            slots += graph.nodePart[node] == NetworkGraph.PERFECT ? 0 : 1;
          }
        }
        slots += graph.part(edge) == NetworkGraph.PERFECT ? 0 : 1;
        links++;
      }
    }
    int[] parts = new int[slots];
    int[] from = new int[links];
    int[] to = new int[links];
    boolean[] arc = new boolean[links];
    int[] linkSlot = new int[links];
    int[] nodeSlot = new int[nodes];
    boolean[] target = new boolean[nodes];
    links = 0;
    slots = 0;
    for (int edge = 0; edge < graph.edges(); edge++) {
      if (!graph.isGone(edge)) {
        from[links] = number[graph.from(edge)];
        to[links] = number[graph.to(edge)];
        arc[links] = graph.isArc(edge);
        boolean perfect = graph.part(edge) == NetworkGraph.PERFECT;
        linkSlot[links] = perfect ? NetworkProblem.PERFECT : slots;
        if (!perfect) {
          parts[slots++] = graph.part(edge);
        }
        links++;
      }
    }
    for (int node = 0; node < graph.nodes(); node++) {
      if (number[node] >= 0) {
        boolean perfect = graph.nodePart[node] == NetworkGraph.PERFECT;
        nodeSlot[number[node]] = perfect ? NetworkProblem.PERFECT : slots;
        if (!perfect) {
          parts[slots++] = graph.nodePart[node];
        }
        target[number[node]] = graph.target[node];
      }
    }
    NetworkProblem problem =
        new NetworkProblem(from, to, arc, linkSlot, nodeSlot, number[graph.source], target);
    factor(composer.sweep(problem, dual, parts, meter));
  }
}
