package org.kingbolt.core.diagram;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.Comparator;
import java.util.List;

/**
 * Finds parts of a network of links that hang on two nodes and hold no terminal: all that matters
 * of such a part is whether it joins the two, so that a single link can stand for it, with the
 * two-terminal network of the part as its structure.
 *
 * <p>Smallest parts first, so that no part holds another. Cost of a round: nodes × links.
 */
final class NetworkModules {

  /** Larger networks are not searched: nodes × links. */
  private static final long MOST_WORK = 20_000_000;

  /** The part that holds a node and hangs on two others. */
  private record Found(int size, int a, int b, int inside) {}

  private final NetworkGraph graph;
  private final int[][] edgesAt;
  private final List<Found> found = new ArrayList<>();

  private final int[] order;
  private final int[] low;
  private final int[] terminals;
  private final int[] nodesBelow;
  private final int[] next;
  private final int[] path;

  private NetworkModules(NetworkGraph graph) {
    this.graph = graph;
    int nodes = graph.nodes();
    this.edgesAt = new int[nodes][];
    for (int node = 0; node < nodes; node++) {
      edgesAt[node] = graph.at(node);
    }
    this.order = new int[nodes];
    this.low = new int[nodes];
    this.terminals = new int[nodes];
    this.nodesBelow = new int[nodes];
    this.next = new int[nodes];
    this.path = new int[nodes];
  }

  /**
   * Puts a link in the place of every part found that does not overlap with a smaller one.
   *
   * @param graph a biconnected network of links
   * @param reducer makes the expression of a part
   * @return whether any was found
   */
  static boolean replace(NetworkGraph graph, NetworkReducer reducer) {
    int nodes = 0;
    int edges = 0;
    for (int node = 0; node < graph.nodes(); node++) {
      nodes += graph.degree(node) > 0 ? 1 : 0;
      edges += graph.degree(node);
    }
    if (nodes < 4 || (long) nodes * edges / 2 > MOST_WORK) {
      return false;
    }
    NetworkModules modules = new NetworkModules(graph);
    for (int node = 0; node < graph.nodes(); node++) {
      if (graph.degree(node) > 2) {
        modules.searchWithout(node);
      }
    }
    return modules.takeAll(reducer, edges / 2);
  }

  /** Depth-first search without one node; every part that a further node cuts off is noted. */
  private void searchWithout(int left) {
    Arrays.fill(order, 0);
    Arrays.fill(next, 0);
    Arrays.fill(terminals, 0);
    int root = graph.source;
    for (int node = 0; root == left && node < graph.nodes(); node++) {
      root = graph.target[node] && node != left ? node : root;
    }
    int clock = 0;
    int depth = 0;
    order[root] = ++clock;
    low[root] = clock;
    path[depth++] = root;
    while (depth > 0) {
      int node = path[depth - 1];
      if (next[node] < edgesAt[node].length) {
        int other = graph.other(edgesAt[node][next[node]++], node);
        if (other == left) {
          continue;
        }
        if (order[other] == 0) {
          order[other] = ++clock;
          low[other] = clock;
          terminals[other] = graph.terminal(other) ? 1 : 0;
          nodesBelow[other] = 1;
          path[depth++] = other;
        } else {
          low[node] = Math.min(low[node], order[other]);
        }
      } else if (--depth > 0) {
        int above = path[depth - 1];
        low[above] = Math.min(low[above], low[node]);
        terminals[above] += terminals[node];
        nodesBelow[above] += nodesBelow[node];
        if (low[node] >= order[above] && terminals[node] == 0) {
          found.add(new Found(nodesBelow[node], left, above, node));
        }
      }
    }
  }

  private boolean takeAll(NetworkReducer reducer, int edges) {
    found.sort(
        Comparator.comparingInt(Found::size)
            .thenComparingInt(Found::a)
            .thenComparingInt(Found::b)
            .thenComparingInt(Found::inside));
    boolean[] touched = new boolean[graph.nodes()];
    boolean any = false;
    for (Found part : found) {
      if (!touched[part.a] && !touched[part.b] && !touched[part.inside]) {
        any |= take(part, touched, reducer, edges);
      }
    }
    return any;
  }

  private boolean take(Found part, boolean[] touched, NetworkReducer reducer, int edges) {
    int[] queue = new int[part.size];
    boolean[] inside = new boolean[graph.nodes()];
    List<Integer> links = new ArrayList<>();
    queue[0] = part.inside;
    inside[part.inside] = true;
    int filled = 1;
    for (int done = 0; done < filled; done++) {
      int node = queue[done];
      if (touched[node]) {
        return false;
      }
      for (int edge : graph.at(node)) {
        int other = graph.other(edge, node);
        boolean border = other == part.a || other == part.b;
        if (border || !inside[other] || node < other) {
          links.add(edge);
        }
        if (!border && !inside[other]) {
          inside[other] = true;
          queue[filled++] = other;
        }
      }
    }
    int[] taken = links.stream().mapToInt(Integer::intValue).sorted().distinct().toArray();
    if (taken.length == edges) {
      return false;
    }
    for (int node : queue) {
      touched[node] = true;
    }
    touched[part.a] = true;
    touched[part.b] = true;
    int expression = reducer.module(subgraph(part, queue, taken, reducer));
    for (int edge : taken) {
      graph.remove(edge);
    }
    graph.add(part.a, part.b, false, expression);
    return true;
  }

  private NetworkGraph subgraph(Found part, int[] nodes, int[] edges, NetworkReducer reducer) {
    int[] number = new int[graph.nodes()];
    number[part.a] = 0;
    number[part.b] = 1;
    for (int i = 0; i < nodes.length; i++) {
      number[nodes[i]] = i + 2;
    }
    NetworkGraph result = new NetworkGraph(reducer, nodes.length + 2, 0);
    result.addTarget(1);
    for (int i = 0; i < nodes.length; i++) {
      result.nodePart[i + 2] = graph.nodePart[nodes[i]];
      result.wake(i + 2);
    }
    for (int edge : edges) {
      result.add(number[graph.from(edge)], number[graph.to(edge)], false, graph.part(edge));
    }
    return result;
  }
}
