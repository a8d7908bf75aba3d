package org.kingbolt.core;

import java.util.ArrayDeque;
import java.util.ArrayList;
import java.util.Deque;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Objects;
import java.util.Set;
import org.kingbolt.core.NetworkSketch.Edge;

/**
 * Takes a network apart as far as series, parallel and cutting nodes go: links in parallel and in
 * series become one link with a structure of its own, dead ends go, terminals with one link pass
 * their question on, and a node that every route must pass splits the network in two.
 *
 * <p>The reductions of Moore &amp; Shannon 1956 and of Barlow &amp; Proschan 1975, ch. 1; each
 * keeps the structure function.
 */
final class NetworkReduction {

  /** What must work besides the networks that are left. */
  private final List<Structure> factors = new ArrayList<>();

  private final Deque<NetworkSketch> open = new ArrayDeque<>();

  private final Runnable pause;

  private NetworkReduction(Runnable pause) {
    this.pause = pause;
  }

  /**
   * An equal structure, in which networks are left only where no reduction applies.
   *
   * @param pause called before every pass over the links; may end the work by throwing
   */
  static Structure of(NetworkStructure network, Runnable pause) {
    if (network.isDual()) {
      NetworkStructure primal = (NetworkStructure) network.dual();
      return of(primal, pause).dual();
    }
    NetworkReduction reduction = new NetworkReduction(pause);
    reduction.open.push(new NetworkSketch(network, network.parts()));
    while (!reduction.open.isEmpty()) {
      reduction.reduce(reduction.open.pop());
    }
    return GateStructure.allOf(reduction.factors);
  }

  private void reduce(NetworkSketch sketch) {
    boolean changed;
    do {
      pause.run();
      changed =
          joinParallel(sketch)
              || takeTerminalParts(sketch)
              || passOnTerminal(sketch)
              || joinSeries(sketch);
    } while (changed && !sketch.targets.isEmpty());
    if (sketch.targets.isEmpty()) {
      takeTerminalParts(sketch);
    } else if (!split(sketch)) {
      factors.add(sketch.structure());
    }
  }

  /** Links between the same two nodes become one. */
  private static boolean joinParallel(NetworkSketch sketch) {
    Map<List<Object>, List<Structure>> groups = new LinkedHashMap<>();
    Map<List<Object>, Edge> first = new LinkedHashMap<>();
    for (Edge edge : sketch.edges) {
      boolean swap = !edge.arc() && edge.from().compareTo(edge.to()) > 0;
      List<Object> key =
          List.of(swap ? edge.to() : edge.from(), swap ? edge.from() : edge.to(), edge.arc());
      groups.computeIfAbsent(key, k -> new ArrayList<>()).add(edge.part());
      first.putIfAbsent(key, edge);
    }
    if (groups.size() == sketch.edges.size()) {
      return false;
    }
    sketch.edges.clear();
    first.forEach(
        (key, edge) ->
            sketch.edges.add(
                new Edge(
                    edge.from(),
                    edge.to(),
                    edge.arc(),
                    GateStructure.anyOf(Objects.requireNonNull(groups.get(key))))));
    return true;
  }

  /** A terminal that can fail must work in any case. */
  private boolean takeTerminalParts(NetworkSketch sketch) {
    List<String> failing = sketch.nodeParts.keySet().stream().filter(sketch::isTerminal).toList();
    for (String node : failing) {
      factors.add(Objects.requireNonNull(sketch.nodeParts.remove(node)));
    }
    return !failing.isEmpty();
  }

  /** A terminal with one link needs that link and hands its place to the node at the other end. */
  private boolean passOnTerminal(NetworkSketch sketch) {
    for (Map.Entry<String, List<Edge>> entry : sketch.edgesByNode().entrySet()) {
      String node = entry.getKey();
      if (sketch.isTerminal(node) && entry.getValue().size() == 1) {
        Edge edge = entry.getValue().get(0);
        if (!edge.perfect()) {
          factors.add(edge.part());
        }
        sketch.edges.remove(edge);
        String other = edge.other(node);
        sketch.merge(node, other);
        return true;
      }
    }
    return false;
  }

  /** A node between two links, or at the end of one, goes. */
  private static boolean joinSeries(NetworkSketch sketch) {
    for (Map.Entry<String, List<Edge>> entry : sketch.edgesByNode().entrySet()) {
      String node = entry.getKey();
      List<Edge> at = entry.getValue();
      boolean enters = at.stream().anyMatch(edge -> edge.leadsTo(node));
      boolean leaves = at.stream().anyMatch(edge -> edge.leads(node));
      if (sketch.isTerminal(node) || (at.size() > 2 && enters && leaves)) {
        continue;
      }
      int place = sketch.edges.indexOf(at.get(0));
      sketch.edges.removeAll(at);
      Structure nodePart = sketch.nodeParts.remove(node);
      if (at.size() == 2 && !at.get(0).other(node).equals(at.get(1).other(node))) {
        join(sketch, place, node, nodePart, at.get(0), at.get(1));
      }
      return true;
    }
    return false;
  }

  private static void join(
      NetworkSketch sketch,
      int place,
      String node,
      @org.jspecify.annotations.Nullable Structure nodePart,
      Edge first,
      Edge second) {
    boolean forth = first.leadsTo(node) && second.leads(node);
    boolean back = second.leadsTo(node) && first.leads(node);
    if (!forth && !back) {
      return;
    }
    List<Structure> parts = new ArrayList<>();
    parts.add(first.part());
    if (nodePart != null) {
      parts.add(nodePart);
    }
    parts.add(second.part());
    String from = first.other(node);
    String to = second.other(node);
    sketch.edges.add(
        Math.min(place, sketch.edges.size()),
        new Edge(forth ? from : to, forth ? to : from, forth != back, GateStructure.allOf(parts)));
  }

  /** Splits a two-terminal network of links at a node that every route passes. */
  private boolean split(NetworkSketch sketch) {
    if (sketch.targets.size() != 1 || sketch.edges.stream().anyMatch(Edge::arc)) {
      return false;
    }
    String target = sketch.targets.iterator().next();
    for (String node : sketch.nodes()) {
      if (sketch.isTerminal(node)) {
        continue;
      }
      Set<String> near = sketch.reachedFrom(sketch.source, node, false);
      if (!near.contains(target)) {
        List<Edge> here = new ArrayList<>();
        List<Edge> there = new ArrayList<>();
        for (Edge edge : sketch.edges) {
          boolean isNear = near.contains(edge.from()) || near.contains(edge.to());
          (isNear ? here : there).add(edge);
        }
        NetworkSketch beyond = new NetworkSketch(sketch, there, node, target);
        beyond.nodeParts.remove(node);
        open.push(beyond);
        open.push(new NetworkSketch(sketch, here, sketch.source, node));
        return true;
      }
    }
    return false;
  }
}
