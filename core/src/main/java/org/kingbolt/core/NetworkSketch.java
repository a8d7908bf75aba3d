package org.kingbolt.core;

import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.LinkedHashSet;
import java.util.List;
import java.util.Map;
import java.util.Set;
import org.kingbolt.core.NetworkStructure.Link;
import org.kingbolt.core.NetworkStructure.Question;

/**
 * A network that can still be changed: links that always work are contracted, links that have
 * failed are gone, and what no longer matters is dropped. Closing it gives a structure again.
 */
final class NetworkSketch {

  /** A link or arc; its part is {@link ConstantStructure#ALWAYS} when it cannot fail. */
  record Edge(String from, String to, boolean arc, Structure part) {

    boolean perfect() {
      return part.isAlwaysWorking();
    }

    boolean touches(String node) {
      return from.equals(node) || to.equals(node);
    }

    String other(String node) {
      return from.equals(node) ? to : from;
    }

    boolean leads(String start) {
      return !arc || from.equals(start);
    }

    boolean leadsTo(String end) {
      return !arc || to.equals(end);
    }

    Edge moved(String gone, String into) {
      return new Edge(from.equals(gone) ? into : from, to.equals(gone) ? into : to, arc, part);
    }
  }

  final List<Edge> edges = new ArrayList<>();

  /** Structures of the nodes that can fail. */
  final Map<String, Structure> nodeParts = new LinkedHashMap<>();

  private final Question question;
  String source;
  final Set<String> targets;
  private boolean terminalFailed;

  NetworkSketch(NetworkStructure network, List<Structure> parts) {
    this.question = network.question();
    this.source = network.terminals().get(0);
    this.targets = new LinkedHashSet<>(network.terminals().subList(1, network.terminals().size()));
    int slot = 0;
    for (Link link : network.links()) {
      Structure part = link.perfect() ? ConstantStructure.ALWAYS : parts.get(slot++);
      if (!part.isNeverWorking()) {
        edges.add(new Edge(link.from(), link.to(), link.arc(), part));
      }
    }
    for (String node : network.failingNodes()) {
      Structure part = parts.get(slot++);
      if (part.isNeverWorking()) {
        edges.removeIf(edge -> edge.touches(node));
        terminalFailed |= isTerminal(node);
      } else if (!part.isAlwaysWorking()) {
        nodeParts.put(node, part);
      }
    }
  }

  /** A part of another sketch, with a question of its own. */
  NetworkSketch(NetworkSketch whole, List<Edge> edges, String source, String target) {
    this.question = Question.CONNECTING;
    this.source = source;
    this.targets = new LinkedHashSet<>(List.of(target));
    this.edges.addAll(edges);
    for (Edge edge : edges) {
      for (String node : List.of(edge.from, edge.to)) {
        Structure part = whole.nodeParts.get(node);
        if (part != null) {
          nodeParts.put(node, part);
        }
      }
    }
  }

  boolean isTerminal(String node) {
    return node.equals(source) || targets.contains(node);
  }

  Set<String> nodes() {
    Set<String> nodes = new LinkedHashSet<>();
    for (Edge edge : edges) {
      nodes.add(edge.from);
      nodes.add(edge.to);
    }
    nodes.addAll(nodeParts.keySet());
    nodes.add(source);
    nodes.addAll(targets);
    return nodes;
  }

  /** The network as a structure, simplified. */
  Structure structure() {
    if (terminalFailed || !servesTargets(false)) {
      return ConstantStructure.NEVER;
    }
    if (servesTargets(true)) {
      return ConstantStructure.ALWAYS;
    }
    contractPerfect();
    dropUnusable();
    if (edges.size() == 1 && nodeParts.isEmpty()) {
      return edges.get(0).part;
    }
    return closed();
  }

  private Structure closed() {
    List<Link> links = new ArrayList<>();
    List<Structure> parts = new ArrayList<>();
    for (Edge edge : edges) {
      links.add(new Link(edge.from, edge.to, edge.arc, edge.perfect()));
      if (!edge.perfect()) {
        parts.add(edge.part);
      }
    }
    parts.addAll(nodeParts.values());
    Set<String> terminals = new LinkedHashSet<>();
    if (question != Question.ALL) {
      terminals.add(source);
    }
    terminals.addAll(question == Question.CONNECTING ? targets : nodes());
    return new NetworkStructure(
        List.copyOf(links),
        List.copyOf(nodeParts.keySet()),
        question,
        List.copyOf(terminals),
        false,
        parts);
  }

  /** Whether all targets are reached over everything, or over what cannot fail. */
  private boolean servesTargets(boolean perfectOnly) {
    if (perfectOnly && nodeParts.containsKey(source)) {
      return false;
    }
    return reachedFrom(source, "", perfectOnly).containsAll(targets);
  }

  /** Nodes reached along the links' directions, never entering one node. */
  Set<String> reachedFrom(String start, String avoided, boolean perfectOnly) {
    Map<String, List<Edge>> at = edgesByNode();
    Set<String> reached = new LinkedHashSet<>();
    List<String> queue = new ArrayList<>();
    reached.add(start);
    queue.add(start);
    for (int i = 0; i < queue.size(); i++) {
      String node = queue.get(i);
      for (Edge edge : at.getOrDefault(node, List.of())) {
        String other = edge.other(node);
        boolean open = !perfectOnly || (edge.perfect() && !nodeParts.containsKey(other));
        if (open && edge.leads(node) && !other.equals(avoided) && reached.add(other)) {
          queue.add(other);
        }
      }
    }
    return reached;
  }

  Map<String, List<Edge>> edgesByNode() {
    Map<String, List<Edge>> at = new LinkedHashMap<>();
    for (Edge edge : edges) {
      at.computeIfAbsent(edge.from, node -> new ArrayList<>()).add(edge);
      at.computeIfAbsent(edge.to, node -> new ArrayList<>()).add(edge);
    }
    return at;
  }

  private void contractPerfect() {
    for (int i = 0; i < edges.size(); i++) {
      Edge edge = edges.get(i);
      if (edge.perfect() && isContractible(edge)) {
        edges.remove(i);
        boolean keepFrom = isTerminal(edge.from) && !edge.to.equals(source);
        String keep = keepFrom ? edge.from : edge.to;
        merge(edge.other(keep), keep);
        i = -1;
      }
    }
  }

  private boolean isContractible(Edge edge) {
    if (nodeParts.containsKey(edge.from) || nodeParts.containsKey(edge.to)) {
      return false;
    }
    boolean onlyTarget = targets.size() == 1 && targets.contains(edge.to);
    return !edge.arc || edge.from.equals(source) || onlyTarget;
  }

  /** Moves everything at one node to another and drops what has become a loop. */
  void merge(String gone, String into) {
    edges.replaceAll(edge -> edge.moved(gone, into));
    edges.removeIf(edge -> edge.from.equals(edge.to));
    if (targets.remove(gone)) {
      targets.add(into);
    }
    if (source.equals(gone)) {
      source = into;
    }
    targets.remove(source);
  }

  /** Drops arcs into the source or out of the only target, dead ends, and parts out of reach. */
  private void dropUnusable() {
    Set<String> reached = reachedFrom(source, "", false);
    edges.removeIf(
        edge ->
            !(reached.contains(edge.from) && edge.leads(edge.from))
                && !(reached.contains(edge.to) && edge.leads(edge.to)));
    edges.removeIf(edge -> edge.arc && edge.to.equals(source));
    edges.removeIf(edge -> edge.arc && targets.size() == 1 && targets.contains(edge.from));
    boolean changed;
    do {
      changed = false;
      for (Map.Entry<String, List<Edge>> entry : edgesByNode().entrySet()) {
        String node = entry.getKey();
        if (!isTerminal(node) && entry.getValue().size() == 1) {
          edges.removeAll(entry.getValue());
          changed = true;
        }
      }
    } while (changed);
    Set<String> used = edgesByNode().keySet();
    nodeParts.keySet().removeIf(node -> !used.contains(node) && !isTerminal(node));
  }
}
