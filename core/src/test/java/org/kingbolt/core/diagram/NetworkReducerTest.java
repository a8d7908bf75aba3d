package org.kingbolt.core.diagram;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.ArrayList;
import java.util.List;
import java.util.Random;
import net.jqwik.api.Arbitraries;
import net.jqwik.api.Arbitrary;
import net.jqwik.api.Combinators;
import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.Provide;
import org.junit.jupiter.api.Test;

/** Networks of middle size, swept whole and taken apart first. */
class NetworkReducerTest {

  /** A network made of small ones: links of an outer network are networks between two nodes. */
  private static final class Nested {
    private final Random random;
    private final boolean arcs;
    private final List<int[]> links = new ArrayList<>();
    private final List<Boolean> directed = new ArrayList<>();
    private int nodes;

    Nested(long seed, boolean arcs) {
      this.random = new Random(seed);
      this.arcs = arcs;
    }

    NetworkProblem problem(int outer, int inner, int targets) {
      nodes = 2;
      between(0, 1, outer, true);
      List<int[]> frame = List.copyOf(links);
      links.clear();
      directed.clear();
      for (int[] link : frame) {
        between(link[0], link[1], 1 + random.nextInt(inner), false);
      }
      int[] from = links.stream().mapToInt(link -> link[0]).toArray();
      int[] to = links.stream().mapToInt(link -> link[1]).toArray();
      boolean[] arc = new boolean[from.length];
      int[] linkSlot = new int[from.length];
      int slots = 0;
      for (int i = 0; i < from.length; i++) {
        arc[i] = directed.get(i);
        linkSlot[i] = random.nextInt(12) == 0 ? NetworkProblem.PERFECT : slots++;
      }
      int[] nodeSlot = new int[nodes];
      for (int i = 0; i < nodes; i++) {
        nodeSlot[i] = random.nextInt(6) == 0 ? slots++ : NetworkProblem.PERFECT;
      }
      boolean[] target = new boolean[nodes];
      target[1] = true;
      for (int i = 1; i < targets; i++) {
        target[1 + random.nextInt(nodes - 1)] = true;
      }
      return new NetworkProblem(from, to, arc, linkSlot, nodeSlot, 0, target);
    }

    /** A chain from one node to the other, and some more links among its nodes. */
    private void between(int a, int b, int size, boolean dense) {
      List<Integer> chain = new ArrayList<>();
      chain.add(a);
      for (int i = 1; i < size; i++) {
        chain.add(nodes++);
      }
      chain.add(b);
      for (int i = 0; i < size; i++) {
        add(chain.get(i), chain.get(i + 1));
      }
      int more = dense ? size + 2 : size / 2;
      for (int i = 0; i < more; i++) {
        int from = chain.get(random.nextInt(chain.size()));
        int to = chain.get(random.nextInt(chain.size()));
        if (from != to) {
          add(from, to);
        }
      }
    }

    private void add(int from, int to) {
      links.add(new int[] {from, to});
      directed.add(arcs && random.nextInt(3) == 0);
    }
  }

  @Provide
  Arbitrary<NetworkProblem> networks() {
    return Combinators.combine(
            Arbitraries.integers().between(2, 6),
            Arbitraries.integers().between(1, 5),
            Arbitraries.integers().between(1, 4),
            Arbitraries.longs(),
            Arbitraries.of(true, false))
        .as(
            (outer, inner, targets, seed, arcs) ->
                new Nested(seed * 0x9E3779B97F4A7C15L, arcs).problem(outer, inner, targets))
        .withoutEdgeCases();
  }

  @Property(tries = 400)
  void reducedNetwork_hasTheSameProbability(
      @ForAll("networks") NetworkProblem network, @ForAll long seed) {
    int slots = slots(network);
    Random random = new Random(seed);
    double[] works = new double[slots];
    double[] fails = new double[slots];
    boolean rare = random.nextBoolean();
    for (int i = 0; i < slots; i++) {
      fails[i] = rare ? 1e-7 * random.nextDouble() : random.nextDouble();
      works[i] = 1 - fails[i];
    }
    Evaluation whole =
        Evaluation.of(FrontierSweep.template(network, WorkMeter.UNLIMITED), works, fails);
    Composer composer = new Composer(slots);
    int root = composer.network(network, false, leaves(composer, slots), WorkMeter.UNLIMITED);
    double[] direct = composer.expect(root, works, fails, WorkMeter.UNLIMITED);
    assertClose(whole.works(), direct[0]);
    assertClose(whole.fails(), direct[1]);
    Diagram diagram = composer.compose(root, WorkMeter.UNLIMITED);
    Evaluation composed = Evaluation.of(diagram, works, fails);
    assertClose(whole.works(), composed.works());
    assertClose(whole.fails(), composed.fails());
    Composer dualComposer = new Composer(slots);
    int dual = dualComposer.network(network, true, leaves(dualComposer, slots), held -> {});
    double[] mirrored = dualComposer.expect(dual, fails, works, WorkMeter.UNLIMITED);
    assertClose(whole.works(), mirrored[1]);
    assertClose(whole.fails(), mirrored[0]);
  }

  private static int slots(NetworkProblem network) {
    int slots = 0;
    for (int slot : network.linkSlot) {
      slots = Math.max(slots, slot + 1);
    }
    for (int slot : network.nodeSlot) {
      slots = Math.max(slots, slot + 1);
    }
    return slots;
  }

  private static int[] leaves(Composer composer, int slots) {
    int[] leaves = new int[slots];
    for (int i = 0; i < slots; i++) {
      leaves[i] = composer.variable(i);
    }
    return leaves;
  }

  private static void assertClose(double expected, double value) {
    assertEquals(expected, value, 1e-12 * expected);
  }

  /** A complete network of five between the ends of each link of a square with a diagonal. */
  @Test
  void partsThatHangOnTwoNodes_leaveANarrowFrontier() {
    List<int[]> links = new ArrayList<>();
    int nodes = 4;
    for (int[] outer : new int[][] {{0, 1}, {1, 3}, {0, 2}, {2, 3}, {1, 2}}) {
      int[] clique = {outer[0], outer[1], nodes, nodes + 1, nodes + 2};
      nodes += 3;
      for (int i = 0; i < 5; i++) {
        for (int j = i + 1; j < 5; j++) {
          links.add(new int[] {clique[i], clique[j]});
        }
      }
    }
    int count = links.size();
    int[] linkSlot = new int[count];
    int[] nodeSlot = new int[nodes];
    java.util.Arrays.setAll(linkSlot, i -> i);
    java.util.Arrays.fill(nodeSlot, NetworkProblem.PERFECT);
    boolean[] target = new boolean[nodes];
    target[3] = true;
    NetworkProblem network =
        new NetworkProblem(
            links.stream().mapToInt(link -> link[0]).toArray(),
            links.stream().mapToInt(link -> link[1]).toArray(),
            new boolean[count],
            linkSlot,
            nodeSlot,
            0,
            target);
    Composer composer = new Composer(count);
    int root = composer.network(network, false, leaves(composer, count), WorkMeter.UNLIMITED);
    assertTrue(composer.widestFrontier() <= 5, () -> "width " + composer.widestFrontier());
    double[] works = new double[count];
    double[] fails = new double[count];
    java.util.Arrays.fill(works, 0.9);
    java.util.Arrays.fill(fails, 0.1);
    // K5 between two of its nodes, then the bridge of five such links: Colbourn 1987 and Barlow and
    // Proschan 1975 (formulas from memory)
    Composer small = new Composer(10);
    double p = small.expect(clique(small), works, fails, WorkMeter.UNLIMITED)[0];
    double bridge = 2 * p * p + 2 * p * p * p - 5 * Math.pow(p, 4) + 2 * Math.pow(p, 5);
    double[] direct = composer.expect(root, works, fails, WorkMeter.UNLIMITED);
    assertEquals(0.9997948026, p, 1e-10);
    assertEquals(bridge, direct[0], 1e-13);
  }

  private static int clique(Composer composer) {
    int[] from = {0, 0, 0, 0, 1, 1, 1, 2, 2, 3};
    int[] to = {1, 2, 3, 4, 2, 3, 4, 3, 4, 4};
    int[] slot = {0, 1, 2, 3, 4, 5, 6, 7, 8, 9};
    int[] perfect = {-1, -1, -1, -1, -1};
    boolean[] target = {false, true, false, false, false};
    NetworkProblem five = new NetworkProblem(from, to, new boolean[10], slot, perfect, 0, target);
    return composer.network(five, false, leaves(composer, 10), WorkMeter.UNLIMITED);
  }
}
