package org.kingbolt.core;

import java.util.ArrayList;
import java.util.HashSet;
import java.util.List;
import java.util.Set;

/**
 * The links of a two-terminal network, for algorithms that work on the graph itself.
 *
 * <p>Immutable; safe to share between threads.
 *
 * <p>Example: {@code NetworkLinks.of(yard).links()}.
 */
public final class NetworkLinks {

  /**
   * A link between two nodes.
   *
   * @param from one node
   * @param to the other node
   * @param part what must work for the link to work; always working where the link cannot fail
   */
  public record Link(String from, String to, Structure part) {}

  private final String source;
  private final String target;
  private final List<Link> links;

  private NetworkLinks(String source, String target, List<Link> links) {
    this.source = source;
    this.target = target;
    this.links = List.copyOf(links);
  }

  /**
   * Reads the links of a network.
   *
   * @param structure a network of links that connects two nodes
   * @return its links in order
   * @throws IllegalArgumentException if the structure is no network, or connects more than two
   *     nodes, or has arcs or failing nodes, or a component stands in more than one link
   */
  public static NetworkLinks of(Structure structure) {
    Check.notNull(structure, "structure");
    if (!(structure instanceof NetworkStructure network) || network.isDual()) {
      throw refused("it is not a network", "describe it with Structure.network()");
    }
    if (network.question() != NetworkStructure.Question.CONNECTING
        || network.terminals().size() != 2) {
      throw refused("it connects other than two nodes", "close it with connecting(from, to)");
    }
    if (!network.failingNodes().isEmpty()) {
      throw refused(
          "node " + Check.quoted(network.failingNodes().get(0)) + " can fail",
          "let only links fail");
    }
    List<Link> links = new ArrayList<>();
    Set<String> seen = new HashSet<>();
    int slot = 0;
    for (NetworkStructure.Link link : network.links()) {
      if (link.arc()) {
        throw refused(
            "it has an arc from " + Check.quoted(link.from()) + " to " + Check.quoted(link.to()),
            "give links, which lead both ways");
      }
      Structure part = link.perfect() ? ConstantStructure.ALWAYS : network.parts().get(slot++);
      for (String name : part.components()) {
        if (!seen.add(name)) {
          throw refused(
              "component " + Check.quoted(name) + " stands in more than one link",
              "give every link its own component");
        }
      }
      links.add(new Link(link.from(), link.to(), part));
    }
    return new NetworkLinks(network.terminals().get(0), network.terminals().get(1), links);
  }

  private static IllegalArgumentException refused(String why, String mend) {
    return new IllegalArgumentException(
        "a network of links between two terminals is needed, but " + why + "; " + mend);
  }

  /**
   * Returns one of the nodes to be connected.
   *
   * @return its name
   */
  public String source() {
    return source;
  }

  /**
   * Returns the other node to be connected.
   *
   * @return its name
   */
  public String target() {
    return target;
  }

  /**
   * Returns the links.
   *
   * @return in the order in which they were described
   */
  public List<Link> links() {
    return links;
  }

  /**
   * Says what this is.
   *
   * @return one line
   */
  @Override
  public String toString() {
    return "NetworkLinks[" + links.size() + " links from " + source + " to " + target + "]";
  }
}
