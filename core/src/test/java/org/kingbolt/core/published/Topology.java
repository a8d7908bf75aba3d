package org.kingbolt.core.published;

import java.io.BufferedReader;
import java.io.IOException;
import java.io.InputStream;
import java.io.InputStreamReader;
import java.io.UncheckedIOException;
import java.nio.charset.StandardCharsets;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.HashMap;
import java.util.LinkedHashSet;
import java.util.List;
import java.util.Map;
import java.util.Set;
import org.kingbolt.core.NetworkBuilder;
import org.kingbolt.core.Structure;

/**
 * An undirected network as a list of links, from which the tests make structures and, on their own
 * way, the numbers to compare with.
 *
 * @param links in order of their components
 */
public record Topology(List<Link> links) {

  /**
   * A link between two nodes.
   *
   * @param name of its component: both nodes, and a number where it is parallel to an earlier one
   * @param a one node
   * @param b the other
   */
  public record Link(String name, String a, String b) {}

  /**
   * Reads a file of {@code networks/}: one link a line as two nodes, # for remarks.
   *
   * @param name the file's name without its ending
   * @return the network
   */
  public static Topology file(String name) {
    String path = "/networks/" + name + ".txt";
    List<String> pairs = new ArrayList<>();
    try (InputStream in = Topology.class.getResourceAsStream(path);
        BufferedReader lines =
            new BufferedReader(new InputStreamReader(in, StandardCharsets.UTF_8))) {
      for (String line = lines.readLine(); line != null; line = lines.readLine()) {
        if (!line.startsWith("#")) {
          pairs.add(line);
        }
      }
    } catch (IOException e) {
      throw new UncheckedIOException(e);
    }
    return ofPairs(pairs);
  }

  /**
   * A network written in one line.
   *
   * @param pairs such as {@code "a-b b-c"}
   * @return the network
   */
  public static Topology of(String pairs) {
    return ofPairs(
        Arrays.stream(pairs.split(" ", -1)).map(pair -> pair.replace('-', ' ')).toList());
  }

  /**
   * A network from pairs of nodes.
   *
   * @param pairs two nodes each, with a blank between
   * @return the network
   */
  public static Topology ofPairs(List<String> pairs) {
    List<Link> links = new ArrayList<>();
    Map<String, Integer> seen = new HashMap<>();
    for (String pair : pairs) {
      String[] ends = pair.split(" ", -1);
      if (ends.length != 2) {
        throw new IllegalArgumentException("\"" + pair + "\" are not two nodes");
      }
      boolean inOrder = ends[0].compareTo(ends[1]) <= 0;
      int copies = seen.merge(inOrder ? pair : ends[1] + " " + ends[0], 1, Integer::sum);
      String name = ends[0] + "-" + ends[1] + (copies == 1 ? "" : "." + copies);
      links.add(new Link(name, ends[0], ends[1]));
    }
    return new Topology(List.copyOf(links));
  }

  /**
   * The nodes.
   *
   * @return in order of their first mention
   */
  public List<String> nodes() {
    Set<String> nodes = new LinkedHashSet<>();
    for (Link link : links) {
      nodes.add(link.a());
      nodes.add(link.b());
    }
    return List.copyOf(nodes);
  }

  private NetworkBuilder network() {
    NetworkBuilder network = Structure.network();
    links.forEach(link -> network.link(link.name(), link.a(), link.b()));
    return network;
  }

  /**
   * Asks for a connection.
   *
   * @param terminals the nodes
   * @return the structure
   */
  public Structure connecting(String... terminals) {
    return network().connecting(terminals);
  }

  /**
   * Asks for the connection of all nodes.
   *
   * @return the structure
   */
  public Structure connectingAll() {
    return network().connectingAll();
  }
}
