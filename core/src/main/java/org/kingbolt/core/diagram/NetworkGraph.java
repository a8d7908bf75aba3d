package org.kingbolt.core.diagram;

import java.util.ArrayDeque;
import java.util.Arrays;
import java.util.Deque;
import java.util.HashMap;
import java.util.Map;

/**
 * A network that is being reduced: edges and nodes whose parts are expressions, by number. Edges
 * that join the same two nodes in the same way become one as they are added. For one thread.
 */
final class NetworkGraph {

  /** The part of an edge or a node that cannot fail. */
  static final int PERFECT = NetworkProblem.PERFECT;

  private final NetworkReducer reducer;
  private int[] from = new int[16];
  private int[] to = new int[16];
  private int[] part = new int[16];
  private boolean[] arc = new boolean[16];
  private boolean[] gone = new boolean[16];
  private int edges;

  /** Edges at each node, with some that are gone among them. */
  private final int[][] at;

  private final int[] atCount;

  /** Number of edges at each node that are not gone. */
  private final int[] degree;

  /** Edges by their two nodes and direction. */
  private final Map<Long, Integer> byEnds = new HashMap<>();

  final int[] nodePart;
  final boolean[] target;
  int source;
  int targets;

  /** Nodes to look at again. */
  private final Deque<Integer> waiting = new ArrayDeque<>();

  private final boolean[] isWaiting;
  private int arcs;

  NetworkGraph(NetworkReducer reducer, int nodes, int source) {
    this.reducer = reducer;
    this.at = new int[nodes][];
    Arrays.fill(at, new int[0]);
    this.atCount = new int[nodes];
    this.degree = new int[nodes];
    this.nodePart = new int[nodes];
    Arrays.fill(nodePart, PERFECT);
    this.target = new boolean[nodes];
    this.isWaiting = new boolean[nodes];
    this.source = source;
  }

  int nodes() {
    return nodePart.length;
  }

  int edges() {
    return edges;
  }

  boolean isGone(int edge) {
    return gone[edge];
  }

  int from(int edge) {
    return from[edge];
  }

  int to(int edge) {
    return to[edge];
  }

  boolean isArc(int edge) {
    return arc[edge];
  }

  int part(int edge) {
    return part[edge];
  }

  int degree(int node) {
    return degree[node];
  }

  boolean hasArcs() {
    return arcs > 0;
  }

  boolean terminal(int node) {
    return node == source || target[node];
  }

  int other(int edge, int node) {
    return from[edge] == node ? to[edge] : from[edge];
  }

  /** Whether the edge can be passed away from a node. */
  boolean leads(int edge, int node) {
    return !arc[edge] || from[edge] == node;
  }

  void addTarget(int node) {
    if (node != source && !target[node]) {
      target[node] = true;
      targets++;
    }
  }

  void dropTarget(int node) {
    if (target[node]) {
      target[node] = false;
      targets--;
    }
  }

  /** Adds an edge, or widens the one that is there already; a loop is nothing. */
  void add(int a, int b, boolean isArc, int expression) {
    if (a == b) {
      wake(a);
      return;
    }
    int first = isArc || a < b ? a : b;
    int second = first == a ? b : a;
    long key = ((long) first << 32 | second) << 1 | (isArc ? 1 : 0);
    Integer present = byEnds.get(key);
    if (present != null) {
      boolean perfect = part[present] == PERFECT || expression == PERFECT;
      part[present] = perfect ? PERFECT : reducer.any(part[present], expression);
    } else {
      byEnds.put(key, append(first, second, isArc, expression));
    }
    wake(a);
    wake(b);
  }

  private int append(int a, int b, boolean isArc, int expression) {
    if (edges == from.length) {
      from = Arrays.copyOf(from, edges << 1);
      to = Arrays.copyOf(to, edges << 1);
      part = Arrays.copyOf(part, edges << 1);
      arc = Arrays.copyOf(arc, edges << 1);
      gone = Arrays.copyOf(gone, edges << 1);
    }
    from[edges] = a;
    to[edges] = b;
    arc[edges] = isArc;
    part[edges] = expression;
    arcs += isArc ? 1 : 0;
    attach(a, edges);
    attach(b, edges);
    return edges++;
  }

  private void attach(int node, int edge) {
    if (atCount[node] == at[node].length) {
      at[node] = Arrays.copyOf(at[node], Math.max(4, atCount[node] << 1));
    }
    at[node][atCount[node]++] = edge;
    degree[node]++;
  }

  void remove(int edge) {
    gone[edge] = true;
    arcs -= arc[edge] ? 1 : 0;
    byEnds.remove(((long) from[edge] << 32 | to[edge]) << 1 | (arc[edge] ? 1 : 0));
    degree[from[edge]]--;
    degree[to[edge]]--;
    wake(from[edge]);
    wake(to[edge]);
  }

  /** The edges at a node that are not gone, in order of their numbers; a fresh array. */
  int[] at(int node) {
    int kept = 0;
    for (int i = 0; i < atCount[node]; i++) {
      if (!gone[at[node][i]]) {
        at[node][kept++] = at[node][i];
      }
    }
    atCount[node] = kept;
    return Arrays.copyOf(at[node], kept);
  }

  /** Takes a node away and joins its edges to another one. */
  void merge(int node, int into) {
    for (int edge : at(node)) {
      int other = other(edge, node);
      boolean forth = leads(edge, node);
      int expression = part[edge];
      boolean isArc = arc[edge];
      remove(edge);
      add(forth ? into : other, forth ? other : into, isArc, expression);
    }
    if (target[node]) {
      dropTarget(node);
      addTarget(into);
    }
    if (source == node) {
      source = into;
      dropTarget(into);
    }
    wake(into);
  }

  void wake(int node) {
    if (!isWaiting[node]) {
      isWaiting[node] = true;
      waiting.add(node);
    }
  }

  /** The next node to look at, or -1. */
  int nextWaiting() {
    Integer node = waiting.poll();
    if (node == null) {
      return -1;
    }
    isWaiting[node] = false;
    return node;
  }
}
