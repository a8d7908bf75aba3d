package org.kingbolt.core;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.LinkedHashMap;
import java.util.LinkedHashSet;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.Set;
import java.util.function.Supplier;
import org.jspecify.annotations.Nullable;
import org.kingbolt.core.NetworkStructure.Link;
import org.kingbolt.core.NetworkStructure.Question;

/**
 * Describes a network link by link, and ends with the question what it must connect.
 *
 * <p>Nodes come into being by being named; they work unless {@link #node(String, String)} says what
 * their working depends on. A link joins two nodes both ways, an arc leads one way. One component
 * may stand on several links and nodes: when it fails, all of them fail together.
 *
 * <p>Not safe for use by several threads; the structures made are. A builder may go on after a
 * question has been asked of it.
 *
 * <p>Example: {@code network().link("L1", "a", "b").link("L2", "b", "c").connecting("a", "c")}.
 */
public final class NetworkBuilder {

  private final List<Link> links = new ArrayList<>();
  private final List<Structure> linkParts = new ArrayList<>();
  private final Map<String, Structure> nodeParts = new LinkedHashMap<>();
  private final Set<String> nodes = new LinkedHashSet<>();

  NetworkBuilder() {}

  /**
   * Adds a link that can be passed both ways.
   *
   * @param component the component it depends on
   * @param a one node
   * @param b the other node
   * @return this builder
   * @throws IllegalArgumentException if a name is blank or both nodes are the same
   */
  public NetworkBuilder link(String component, String a, String b) {
    return link(component(component, () -> between("link", a, b)), a, b);
  }

  /**
   * Adds a link that can be passed both ways and works while a structure works.
   *
   * @param part what it depends on
   * @param a one node
   * @param b the other node
   * @return this builder
   * @throws IllegalArgumentException if a name is blank, both nodes are the same, or the structure
   *     has no components
   */
  public NetworkBuilder link(Structure part, String a, String b) {
    return add(requirePart("link", part, a, b), new Link(a, b, false, false));
  }

  /**
   * Adds an arc, which can be passed one way.
   *
   * @param component the component it depends on
   * @param from the node where it starts
   * @param to the node where it ends
   * @return this builder
   * @throws IllegalArgumentException if a name is blank or both nodes are the same
   */
  public NetworkBuilder arc(String component, String from, String to) {
    return arc(component(component, () -> between("arc", from, to)), from, to);
  }

  /**
   * Adds an arc, which can be passed one way and works while a structure works.
   *
   * @param part what it depends on
   * @param from the node where it starts
   * @param to the node where it ends
   * @return this builder
   * @throws IllegalArgumentException if a name is blank, both nodes are the same, or the structure
   *     has no components
   */
  public NetworkBuilder arc(Structure part, String from, String to) {
    return add(requirePart("arc", part, from, to), new Link(from, to, true, false));
  }

  /**
   * Adds a link that cannot fail.
   *
   * @param a one node
   * @param b the other node
   * @return this builder
   * @throws IllegalArgumentException if a name is blank or both nodes are the same
   */
  public NetworkBuilder perfectLink(String a, String b) {
    return add(ConstantStructure.ALWAYS, new Link(a, b, false, true));
  }

  /**
   * Adds an arc that cannot fail.
   *
   * @param from the node where it starts
   * @param to the node where it ends
   * @return this builder
   * @throws IllegalArgumentException if a name is blank or both nodes are the same
   */
  public NetworkBuilder perfectArc(String from, String to) {
    return add(ConstantStructure.ALWAYS, new Link(from, to, true, true));
  }

  /**
   * Says that a node works while a component works.
   *
   * @param node the node
   * @param component the component it depends on
   * @return this builder
   * @throws IllegalArgumentException if a name is blank
   * @throws IllegalStateException if this was already said of the node
   */
  public NetworkBuilder node(String node, String component) {
    Check.name(node, "network node");
    return node(node, component(component, () -> "node " + Check.quoted(node)));
  }

  /**
   * Says that a node works while a structure works.
   *
   * @param node the node
   * @param part what it depends on
   * @return this builder
   * @throws IllegalArgumentException if the name is blank or the structure has no components
   * @throws IllegalStateException if this was already said of the node
   */
  public NetworkBuilder node(String node, Structure part) {
    Check.name(node, "network node");
    String where = "node " + Check.quoted(node);
    GateStructure.requireComponents(where, Check.notNull(part, where + ": the part"));
    Structure before = nodeParts.get(node);
    if (before != null) {
      throw new IllegalStateException(
          "node "
              + Check.quoted(node)
              + " already depends on "
              + TextWriter.excerpt(before)
              + "; a node that needs both takes Structure.series of the two");
    }
    nodes.add(node);
    nodeParts.put(node, part);
    return this;
  }

  /**
   * Asks for a connection: two names make a two-terminal question, more a k-terminal one. With
   * arcs, routes lead from the first name to each of the others.
   *
   * @param terminals at least two different nodes of this network
   * @return the structure that works while they are connected, the terminals themselves working
   * @throws IllegalArgumentException if there are fewer than two names, or one is unknown or
   *     repeated, or no link touches a node that can fail
   * @throws NotCoherentException if they are not connected even when everything works, or always
   *     are
   */
  public Structure connecting(String... terminals) {
    Check.notNull(terminals, "connecting: the list of nodes");
    return structure(Question.CONNECTING, requireTerminals("connecting", 2, terminals));
  }

  /**
   * Asks for all-terminal connection: every node reaches every other.
   *
   * @return the structure that works while all nodes work and are connected
   * @throws IllegalArgumentException if there are arcs, with which the question has two meanings,
   *     or fewer than two nodes
   * @throws NotCoherentException if they are not connected even when everything works, or always
   *     are
   */
  public Structure connectingAll() {
    if (links.stream().anyMatch(Link::arc)) {
      throw new IllegalArgumentException(
          "connectingAll: the network has arcs; say where routes start with"
              + " reachingAllFrom(source)");
    }
    if (nodes.size() < 2) {
      throw new IllegalArgumentException(
          "connectingAll: the network has " + nodes.size() + " nodes; at least two are needed");
    }
    return structure(Question.ALL, List.copyOf(nodesInText()));
  }

  /**
   * Asks that every node can be reached from one of them.
   *
   * @param source the node where all routes start
   * @return the structure that works while all nodes work and are reached
   * @throws IllegalArgumentException if the source is unknown or the only node
   * @throws NotCoherentException if they are not reached even when everything works, or always are
   */
  public Structure reachingAllFrom(String source) {
    requireTerminals("reachingAllFrom", 1, source);
    if (nodes.size() < 2) {
      throw new IllegalArgumentException(
          "reachingAllFrom: the network has no node besides "
              + Check.quoted(source)
              + "; add a link or an arc to another");
    }
    Set<String> order = new LinkedHashSet<>();
    order.add(source);
    order.addAll(nodesInText());
    return structure(Question.ALL_FROM, List.copyOf(order));
  }

  /** What a node depends on by now, shortened for a message; nothing while it always works. */
  Optional<String> dependence(String node) {
    return Optional.ofNullable(nodeParts.get(node)).map(TextWriter::excerpt);
  }

  /** The nodes in order of their first mention in the text form: links, then failing nodes. */
  private Set<String> nodesInText() {
    Set<String> order = new LinkedHashSet<>();
    for (Link link : links) {
      order.add(link.from());
      order.add(link.to());
    }
    order.addAll(nodeParts.keySet());
    return order;
  }

  private NetworkBuilder add(Structure part, Link link) {
    String kind = link.arc() ? "arc" : "link";
    requireNode(link.from(), kind, link);
    requireNode(link.to(), kind, link);
    if (link.from().equals(link.to())) {
      throw new IllegalArgumentException(
          kind
              + " from "
              + Check.quoted(link.from())
              + " to itself; it connects nothing, so leave it out");
    }
    nodes.add(link.from());
    nodes.add(link.to());
    links.add(link);
    if (!link.perfect()) {
      linkParts.add(part);
    }
    return this;
  }

  private static void requireNode(String node, String kind, Link link) {
    Check.name(node, () -> between(kind, link.from(), link.to()) + ": a network node's name");
  }

  private static Structure component(String name, Supplier<String> user) {
    return new ComponentStructure(Check.name(name, () -> user.get() + ": the component's name"));
  }

  /** A link for a message; its nodes' names may be null. */
  private static String between(String kind, @Nullable String from, @Nullable String to) {
    return kind + " from " + Check.quoted(from) + " to " + Check.quoted(to);
  }

  private static Structure requirePart(String kind, Structure part, String from, String to) {
    String where = between(kind, from, to);
    GateStructure.requireComponents(where, Check.notNull(part, where + ": the part"));
    return part;
  }

  private List<String> requireTerminals(String question, int fewest, String... terminals) {
    Set<String> distinct = new LinkedHashSet<>();
    for (String terminal : terminals) {
      Check.name(terminal, question, distinct.size() + 1);
      if (!nodes.contains(terminal)) {
        throw new IllegalArgumentException(
            question
                + ": "
                + Check.quoted(terminal)
                + " is not a node of the network"
                + Spelling.guess(terminal, nodes)
                + "; the nodes are "
                + Check.listed(nodes)
                + (nodes.isEmpty() ? "; add a link first" : "; name one of these"));
      }
      if (!distinct.add(terminal)) {
        throw new IllegalArgumentException(
            question + ": " + Check.quoted(terminal) + " is listed twice; list every node once");
      }
    }
    if (distinct.size() < fewest) {
      throw new IllegalArgumentException(
          question
              + ": "
              + distinct.size()
              + " nodes are named in "
              + Arrays.toString(terminals)
              + "; at least "
              + fewest
              + " are needed");
    }
    return List.copyOf(distinct);
  }

  /** A node that can fail but that no link touches is a slip of the pen. */
  private void requireLinksAtFailingNodes() {
    Set<String> linked = new LinkedHashSet<>();
    for (Link link : links) {
      linked.add(link.from());
      linked.add(link.to());
    }
    for (String node : nodeParts.keySet()) {
      if (!linked.contains(node)) {
        throw new IllegalArgumentException(
            "node "
                + Check.quoted(node)
                + " can fail but no link touches it; give it a link, or check its name: the linked"
                + " nodes are "
                + Check.listed(linked));
      }
    }
  }

  private Structure structure(Question question, List<String> terminals) {
    if (question == Question.CONNECTING) {
      requireLinksAtFailingNodes();
    }
    List<Structure> parts = new ArrayList<>(linkParts);
    parts.addAll(nodeParts.values());
    NetworkStructure network =
        new NetworkStructure(
            List.copyOf(links), List.copyOf(nodeParts.keySet()), question, terminals, false, parts);
    boolean[] states = new boolean[parts.size()];
    if (network.evaluate(states)) {
      throw new NotCoherentException(
          "network: "
              + Check.listed(terminals)
              + " are connected by links that cannot fail, so the structure always works; let some of"
              + " them depend on a component");
    }
    Arrays.fill(states, true);
    if (!network.evaluate(states)) {
      throw new NotCoherentException(
          "network: there is no route from "
              + Check.quoted(terminals.get(0))
              + " to "
              + network.firstUnreached()
              + ", even when everything works; add the missing link");
    }
    return network;
  }
}
