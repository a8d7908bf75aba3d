package org.kingbolt.core.diagram;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;

/**
 * The biconnected pieces of a network of links through which terminals are connected, and the nodes
 * that cut it between terminals. Pieces that lead to no terminal are left out.
 *
 * <p>Method: Hopcroft &amp; Tarjan, Efficient algorithms for graph manipulation, Comm. ACM 16
 * (1973) 372, with an explicit stack.
 */
final class NetworkPieces {

  private final NetworkGraph graph;

  /** Edges of each piece. */
  private final List<int[]> pieces = new ArrayList<>();

  /** Nodes of each piece between which it must connect. */
  private final List<int[]> terminals = new ArrayList<>();

  private int kept;
  private final int[] found;
  private final int[] low;

  /** Terminals in the subtree of each node, the node included. */
  private final int[] inside;

  /** Terminals that lie beyond each node, seen from the source. */
  private final int[] beyond;

  NetworkPieces(NetworkGraph graph) {
    this.graph = graph;
    this.found = new int[graph.nodes()];
    this.low = new int[graph.nodes()];
    this.inside = new int[graph.nodes()];
    this.beyond = new int[graph.nodes()];
    search();
  }

  private void search() {
    int[] path = new int[graph.nodes()];
    int[][] edgesAt = new int[graph.nodes()][];
    int[] next = new int[graph.nodes()];
    int[] enteredBy = new int[graph.nodes()];
    int[] edgeStack = new int[graph.edges()];
    int stacked = 0;
    int clock = 0;
    int depth = 0;
    path[depth++] = graph.source;
    enteredBy[graph.source] = -1;
    found[graph.source] = ++clock;
    low[graph.source] = clock;
    edgesAt[graph.source] = graph.at(graph.source);
    while (depth > 0) {
      int node = path[depth - 1];
      if (next[node] < edgesAt[node].length) {
        int edge = edgesAt[node][next[node]++];
        int other = graph.other(edge, node);
        if (edge == enteredBy[node]) {
          continue;
        }
        if (found[other] == 0) {
          edgeStack[stacked++] = edge;
          enteredBy[other] = edge;
          found[other] = ++clock;
          low[other] = clock;
          inside[other] = graph.terminal(other) ? 1 : 0;
          edgesAt[other] = graph.at(other);
          path[depth++] = other;
        } else if (found[other] < found[node]) {
          edgeStack[stacked++] = edge;
          low[node] = Math.min(low[node], found[other]);
        }
      } else {
        depth--;
        if (depth > 0) {
          int above = path[depth - 1];
          low[above] = Math.min(low[above], low[node]);
          inside[above] += inside[node];
          if (low[node] >= found[above]) {
            int start = stacked - 1;
            while (edgeStack[start] != enteredBy[node]) {
              start--;
            }
            close(Arrays.copyOfRange(edgeStack, start, stacked), above, inside[node]);
            stacked = start;
          }
        }
      }
    }
  }

  /** A piece hangs on a node nearer to the source; whatever it leads to is known by now. */
  private void close(int[] edges, int top, int terminalsInside) {
    beyond[top] += terminalsInside;
    if (terminalsInside == 0) {
      return;
    }
    Arrays.sort(edges);
    List<Integer> needed = new ArrayList<>();
    needed.add(top);
    int[] ends = new int[2 * edges.length];
    for (int i = 0; i < edges.length; i++) {
      ends[2 * i] = graph.from(edges[i]);
      ends[2 * i + 1] = graph.to(edges[i]);
    }
    Arrays.sort(ends);
    int before = -1;
    for (int node : ends) {
      if (node != before && node != top && (graph.terminal(node) || beyond[node] > 0)) {
        needed.add(node);
      }
      before = node;
    }
    kept += edges.length;
    pieces.add(edges);
    terminals.add(needed.stream().mapToInt(Integer::intValue).toArray());
  }

  int count() {
    return pieces.size();
  }

  /** Whether no edge has been left out. */
  boolean isWhole() {
    int present = 0;
    for (int edge = 0; edge < graph.edges(); edge++) {
      present += graph.isGone(edge) ? 0 : 1;
    }
    return kept == present;
  }

  /** The nodes without which terminals are apart: terminals, and nodes that cut between them. */
  List<Integer> mustWork() {
    return terminals.stream().flatMap(nodes -> Arrays.stream(nodes).boxed()).distinct().toList();
  }

  /** One piece as a network of its own. */
  NetworkGraph graph(int piece, NetworkReducer reducer) {
    int[] edges = pieces.get(piece);
    int[] nodes = new int[2 * edges.length];
    for (int i = 0; i < edges.length; i++) {
      nodes[2 * i] = graph.from(edges[i]);
      nodes[2 * i + 1] = graph.to(edges[i]);
    }
    nodes = Arrays.stream(nodes).sorted().distinct().toArray();
    int[] ends = terminals.get(piece);
    NetworkGraph result =
        new NetworkGraph(reducer, nodes.length, Arrays.binarySearch(nodes, ends[0]));
    for (int edge : edges) {
      result.add(
          Arrays.binarySearch(nodes, graph.from(edge)),
          Arrays.binarySearch(nodes, graph.to(edge)),
          false,
          graph.part(edge));
    }
    for (int i = 0; i < nodes.length; i++) {
      result.nodePart[i] = graph.nodePart[nodes[i]];
      result.wake(i);
    }
    for (int end : ends) {
      result.addTarget(Arrays.binarySearch(nodes, end));
    }
    return result;
  }
}
