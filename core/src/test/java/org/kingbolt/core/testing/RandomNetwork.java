package org.kingbolt.core.testing;

import java.util.ArrayList;
import java.util.List;
import java.util.Random;
import org.kingbolt.core.NetworkBuilder;
import org.kingbolt.core.Structure;

/**
 * A random network and a search through it of its own: links, arcs, perfect ones, failing nodes,
 * and one of the questions. Filled with one part a slot; for one thread.
 */
final class RandomNetwork {

  private enum Question {
    CONNECTING,
    ALL,
    ALL_FROM
  }

  private record Edge(int from, int to, boolean arc, boolean perfect) {}

  private final List<Edge> edges = new ArrayList<>();
  private final List<Integer> failingNodes = new ArrayList<>();
  private final List<Integer> terminals = new ArrayList<>();
  private final List<Structure> parts = new ArrayList<>();
  private final Question question;

  RandomNetwork(int nodes, Random random) {
    int mode = random.nextInt(3);
    int links = nodes - 1 + random.nextInt(nodes + 3);
    for (int i = 0; i < links; i++) {
      int from = i + 1 < nodes && random.nextInt(4) > 0 ? i : random.nextInt(nodes);
      int to = i + 1 < nodes && from == i ? i + 1 : random.nextInt(nodes);
      if (from != to) {
        boolean arc = mode == 1 || (mode == 2 && random.nextBoolean());
        edges.add(new Edge(from, to, arc, random.nextInt(10) == 0));
      }
    }
    List<Integer> present = new ArrayList<>();
    for (int node = 0; node < nodes; node++) {
      int here = node;
      if (edges.stream().anyMatch(edge -> edge.from == here || edge.to == here)) {
        present.add(node);
      }
    }
    if (present.isEmpty()) {
      edges.add(new Edge(0, 1, mode == 1, false));
      present.addAll(List.of(0, 1));
    }
    for (int node : present) {
      if (random.nextInt(5) == 0) {
        failingNodes.add(node);
      }
    }
    boolean arcs = edges.stream().anyMatch(Edge::arc);
    question =
        switch (random.nextInt(4)) {
          case 0 -> arcs ? Question.ALL_FROM : Question.ALL;
          case 1 -> Question.ALL_FROM;
          default -> Question.CONNECTING;
        };
    java.util.Collections.shuffle(present, random);
    int named = Math.min(present.size(), random.nextBoolean() ? 2 : 2 + random.nextInt(3));
    terminals.addAll(question == Question.CONNECTING ? present.subList(0, named) : present);
  }

  /** How many parts it takes: one for every imperfect link, then one for every failing node. */
  int slots() {
    return (int) edges.stream().filter(edge -> !edge.perfect).count() + failingNodes.size();
  }

  void part(Structure part) {
    parts.add(part);
  }

  Structure structure() {
    NetworkBuilder network = Structure.network();
    int slot = 0;
    for (Edge edge : edges) {
      String from = "n" + edge.from;
      String to = "n" + edge.to;
      if (edge.perfect) {
        network = edge.arc ? network.perfectArc(from, to) : network.perfectLink(from, to);
      } else {
        Structure part = parts.get(slot++);
        network = edge.arc ? network.arc(part, from, to) : network.link(part, from, to);
      }
    }
    for (int node : failingNodes) {
      network.node("n" + node, parts.get(slot++));
    }
    return switch (question) {
      case ALL -> network.connectingAll();
      case ALL_FROM -> network.reachingAllFrom("n" + terminals.get(0));
      case CONNECTING ->
          network.connecting(terminals.stream().map(node -> "n" + node).toArray(String[]::new));
    };
  }

  /** Spreads from the first terminal over working links and nodes until nothing more is reached. */
  boolean works(boolean[] parts) {
    int most = edges.stream().mapToInt(edge -> Math.max(edge.from, edge.to)).max().orElse(0) + 1;
    boolean[] up = new boolean[most];
    java.util.Arrays.fill(up, true);
    int links = parts.length - failingNodes.size();
    for (int i = 0; i < failingNodes.size(); i++) {
      up[failingNodes.get(i)] = parts[links + i];
    }
    boolean[] reached = new boolean[most];
    reached[terminals.get(0)] = up[terminals.get(0)];
    boolean spreading = true;
    while (spreading) {
      spreading = false;
      int slot = 0;
      for (Edge edge : edges) {
        boolean works = edge.perfect || parts[slot++];
        if (works && up[edge.from] && up[edge.to]) {
          boolean forward = reached[edge.from] && !reached[edge.to];
          boolean back = !edge.arc && reached[edge.to] && !reached[edge.from];
          reached[edge.to] |= forward;
          reached[edge.from] |= back;
          spreading |= forward || back;
        }
      }
    }
    return terminals.stream().allMatch(node -> reached[node]);
  }
}
