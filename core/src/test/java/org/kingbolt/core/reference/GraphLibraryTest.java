package org.kingbolt.core.reference;

import static org.junit.jupiter.api.Assertions.assertEquals;

import java.math.BigInteger;
import java.util.ArrayList;
import java.util.HashSet;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Set;
import java.util.stream.Collectors;
import java.util.stream.Stream;
import net.jqwik.api.Arbitraries;
import net.jqwik.api.Arbitrary;
import net.jqwik.api.Combinators;
import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.Provide;
import org.jgrapht.Graph;
import org.jgrapht.GraphPath;
import org.jgrapht.alg.connectivity.ConnectivityInspector;
import org.jgrapht.alg.shortestpath.AllDirectedPaths;
import org.jgrapht.generate.GnmRandomGraphGenerator;
import org.jgrapht.generate.NamedGraphGenerator;
import org.jgrapht.graph.DefaultEdge;
import org.jgrapht.graph.SimpleDirectedGraph;
import org.jgrapht.graph.SimpleGraph;
import org.jgrapht.util.SupplierUtil;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.kingbolt.core.CoherentSystem;
import org.kingbolt.core.MinimalSets;
import org.kingbolt.core.NetworkBuilder;
import org.kingbolt.core.Structure;

/**
 * Minimal path sets of networks against JGraphT's enumeration of simple paths, on its own named
 * graphs and on random ones; the named graphs are also an independent source of topologies.
 */
class GraphLibraryTest {

  /** One component for every edge, named by its number. */
  private static NetworkBuilder network(Graph<Integer, DefaultEdge> graph) {
    NetworkBuilder network = Structure.network();
    names(graph)
        .forEach(
            (edge, name) -> {
              String from = "n" + graph.getEdgeSource(edge);
              String to = "n" + graph.getEdgeTarget(edge);
              if (graph.getType().isDirected()) {
                network.arc(name, from, to);
              } else {
                network.link(name, from, to);
              }
            });
    return network;
  }

  private static Map<DefaultEdge, String> names(Graph<Integer, DefaultEdge> graph) {
    Map<DefaultEdge, String> names = new LinkedHashMap<>();
    graph.edgeSet().forEach(edge -> names.put(edge, "e" + names.size()));
    return names;
  }

  private static Set<Set<String>> simplePaths(
      Graph<Integer, DefaultEdge> graph, int source, int target, int longest) {
    Graph<Integer, DefaultEdge> directed = graph;
    Map<DefaultEdge, String> names = names(graph);
    if (!graph.getType().isDirected()) {
      Graph<Integer, DefaultEdge> both = empty(true);
      Map<DefaultEdge, String> arcs = new LinkedHashMap<>();
      graph.vertexSet().forEach(both::addVertex);
      names.forEach(
          (edge, name) -> {
            int a = graph.getEdgeSource(edge);
            int b = graph.getEdgeTarget(edge);
            arcs.put(both.addEdge(a, b), name);
            arcs.put(both.addEdge(b, a), name);
          });
      directed = both;
      names = arcs;
    }
    Map<DefaultEdge, String> found = names;
    List<GraphPath<Integer, DefaultEdge>> paths =
        new AllDirectedPaths<>(directed).getAllPaths(source, target, true, longest);
    return paths.stream()
        .map(path -> path.getEdgeList().stream().map(found::get).collect(Collectors.toSet()))
        .collect(Collectors.toSet());
  }

  private static Set<Set<String>> sets(MinimalSets sets) {
    return sets.stream().collect(Collectors.toSet());
  }

  @ParameterizedTest
  @CsvSource({"petersen, 0, 1", "petersen, 0, 7", "dodecahedron, 0, 19", "cube, 0, 6"})
  void pathsOfNamedGraphs_areThoseOfJGraphT(String name, int source, int target) {
    Graph<Integer, DefaultEdge> graph =
        switch (name) {
          case "petersen" -> NamedGraphGenerator.petersenGraph();
          case "dodecahedron" -> NamedGraphGenerator.dodecahedronGraph();
          default -> cube();
        };
    CoherentSystem system = network(graph).connecting("n" + source, "n" + target).compile();
    Set<Set<String>> expected = simplePaths(graph, source, target, graph.vertexSet().size());
    assertEquals(BigInteger.valueOf(expected.size()), system.minimalPathSets().count());
    assertEquals(expected, sets(system.minimalPathSets()));
  }

  private static Graph<Integer, DefaultEdge> cube() {
    return NamedGraphGenerator.generalizedPetersenGraph(4, 1);
  }

  /** The karate club has too many simple paths to list; those of up to six links are compared. */
  @Test
  void shortPathsOfTheKarateClub_areThoseOfJGraphT() {
    Graph<Integer, DefaultEdge> graph = empty(false);
    new NamedGraphGenerator<Integer, DefaultEdge>().generateZacharyKarateClubGraph(graph);
    assertEquals(78, graph.edgeSet().size());
    Integer first = graph.vertexSet().stream().min(Integer::compare).orElseThrow();
    Integer last = graph.vertexSet().stream().max(Integer::compare).orElseThrow();
    CoherentSystem system = network(graph).connecting("n" + first, "n" + last).compile();
    Set<Set<String>> expected = simplePaths(graph, first, last, 6);
    List<BigInteger> counts = system.minimalPathSets().countBySize();
    for (int size = 0; size <= 6; size++) {
      int wanted = size;
      long number = expected.stream().filter(set -> set.size() == wanted).count();
      assertEquals(BigInteger.valueOf(number), counts.get(size), "paths of " + size);
    }
    Set<Set<String>> shortOnes =
        system.minimalPathSets().stream()
            .takeWhile(set -> set.size() <= 6)
            .collect(Collectors.toSet());
    assertEquals(expected, shortOnes);
  }

  private static Graph<Integer, DefaultEdge> empty(boolean directed) {
    return directed
        ? new SimpleDirectedGraph<>(
            SupplierUtil.createIntegerSupplier(), SupplierUtil.DEFAULT_EDGE_SUPPLIER, false)
        : new SimpleGraph<>(
            SupplierUtil.createIntegerSupplier(), SupplierUtil.DEFAULT_EDGE_SUPPLIER, false);
  }

  @Provide
  Arbitrary<Graph<Integer, DefaultEdge>> graphs() {
    return Combinators.combine(
            Arbitraries.integers().between(2, 8),
            Arbitraries.integers().between(1, 16),
            Arbitraries.longs(),
            Arbitraries.of(true, false))
        .as(GraphLibraryTest::random)
        .withoutEdgeCases();
  }

  private static Graph<Integer, DefaultEdge> random(
      int nodes, int links, long seed, boolean directed) {
    Graph<Integer, DefaultEdge> graph = empty(directed);
    int most = nodes * (nodes - 1) / (directed ? 1 : 2);
    new GnmRandomGraphGenerator<Integer, DefaultEdge>(nodes, Math.min(links, most), seed)
        .generateGraph(graph);
    return graph;
  }

  @Property(tries = 300)
  void pathsOfRandomGraphs_areThoseOfJGraphT(@ForAll("graphs") Graph<Integer, DefaultEdge> graph) {
    Set<Set<String>> expected = simplePaths(graph, 0, 1, graph.vertexSet().size());
    if (!expected.isEmpty()) {
      CoherentSystem system = network(graph).connecting("n0", "n1").compile();
      assertEquals(expected, sets(system.minimalPathSets()));
    }
  }

  /** Cuts: what JGraphT finds no longer connected, and connected with any link put back. */
  @Property(tries = 200)
  void cutsOfRandomGraphs_disconnectInJGraphT(@ForAll("graphs") Graph<Integer, DefaultEdge> graph) {
    if (graph.getType().isDirected() || !connected(graph, Set.of())) {
      return;
    }
    CoherentSystem system = network(graph).connecting("n0", "n1").compile();
    Map<String, DefaultEdge> edges = new LinkedHashMap<>();
    names(graph).forEach((edge, name) -> edges.put(name, edge));
    for (Set<String> cut : system.minimalCutSets()) {
      Set<DefaultEdge> removed = cut.stream().map(edges::get).collect(Collectors.toSet());
      assertEquals(false, connected(graph, removed), cut::toString);
      for (DefaultEdge edge : removed) {
        Set<DefaultEdge> fewer = new HashSet<>(removed);
        fewer.remove(edge);
        assertEquals(true, connected(graph, fewer), cut::toString);
      }
    }
  }

  private static boolean connected(Graph<Integer, DefaultEdge> graph, Set<DefaultEdge> removed) {
    Graph<Integer, DefaultEdge> rest = empty(false);
    graph.vertexSet().forEach(rest::addVertex);
    Stream<DefaultEdge> left = graph.edgeSet().stream().filter(edge -> !removed.contains(edge));
    for (DefaultEdge edge : new ArrayList<>(left.toList())) {
      rest.addEdge(graph.getEdgeSource(edge), graph.getEdgeTarget(edge));
    }
    return new ConnectivityInspector<>(rest).pathExists(0, 1);
  }
}
