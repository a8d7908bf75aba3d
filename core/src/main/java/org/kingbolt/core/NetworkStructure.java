package org.kingbolt.core;

import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.LinkedHashSet;
import java.util.List;
import java.util.Map;
import java.util.Objects;
import java.util.Optional;
import java.util.Set;
import java.util.function.Predicate;
import org.kingbolt.core.diagram.Composer;
import org.kingbolt.core.diagram.NetworkPaths;
import org.kingbolt.core.diagram.NetworkProblem;
import org.kingbolt.core.diagram.RouteFinder;
import org.kingbolt.core.diagram.Routes;
import org.kingbolt.core.diagram.WorkMeter;

/**
 * A network of links, arcs and nodes, or the dual of one. Slots are the links that can fail, in
 * order, and then the nodes that can fail.
 */
final class NetworkStructure extends Structure {

  static final String KIND = "network";

  private static final long serialVersionUID = 1L;

  /** What must be connected. */
  enum Question {
    CONNECTING,
    ALL,
    ALL_FROM
  }

  /** A link or an arc between two nodes. */
  record Link(String from, String to, boolean arc, boolean perfect) {}

  private final transient List<Link> links;
  private final transient List<String> failingNodes;
  private final Question question;

  /** The source first. For the questions about all nodes, all nodes. */
  private final transient List<String> terminals;

  private final boolean dual;
  private final transient NetworkProblem problem;

  NetworkStructure(
      List<Link> links,
      List<String> failingNodes,
      Question question,
      List<String> terminals,
      boolean dual,
      List<Structure> parts) {
    super(parts, Objects.hash(links, failingNodes, question.name(), terminals, dual));
    this.links = links;
    this.failingNodes = failingNodes;
    this.question = question;
    this.terminals = terminals;
    this.dual = dual;
    this.problem = problem();
  }

  List<Link> links() {
    return links;
  }

  List<String> failingNodes() {
    return failingNodes;
  }

  Question question() {
    return question;
  }

  List<String> terminals() {
    return terminals;
  }

  boolean isDual() {
    return dual;
  }

  private Map<String, Integer> nodeNumbers() {
    Map<String, Integer> numbers = new LinkedHashMap<>();
    for (Link link : links) {
      numbers.putIfAbsent(link.from, numbers.size());
      numbers.putIfAbsent(link.to, numbers.size());
    }
    for (String node : failingNodes) {
      numbers.putIfAbsent(node, numbers.size());
    }
    for (String node : terminals) {
      numbers.putIfAbsent(node, numbers.size());
    }
    return numbers;
  }

  private NetworkProblem problem() {
    Map<String, Integer> numbers = nodeNumbers();
    int[] from = new int[links.size()];
    int[] to = new int[links.size()];
    boolean[] arc = new boolean[links.size()];
    int[] linkSlot = new int[links.size()];
    int slot = 0;
    for (int i = 0; i < links.size(); i++) {
      Link link = links.get(i);
      from[i] = numbers.getOrDefault(link.from, -1);
      to[i] = numbers.getOrDefault(link.to, -1);
      arc[i] = link.arc;
      linkSlot[i] = link.perfect ? NetworkProblem.PERFECT : slot++;
    }
    int[] nodeSlot = new int[numbers.size()];
    java.util.Arrays.fill(nodeSlot, NetworkProblem.PERFECT);
    for (String node : failingNodes) {
      nodeSlot[numbers.getOrDefault(node, -1)] = slot++;
    }
    boolean[] target = new boolean[numbers.size()];
    for (String node : terminals.subList(1, terminals.size())) {
      target[numbers.getOrDefault(node, -1)] = true;
    }
    return new NetworkProblem(
        from, to, arc, linkSlot, nodeSlot, numbers.getOrDefault(terminals.get(0), -1), target);
  }

  /** A terminal that no route leads to, quoted, for a message. */
  String firstUnreached() {
    Set<String> reached = new LinkedHashSet<>();
    reached.add(terminals.get(0));
    int before;
    do {
      before = reached.size();
      for (Link link : links) {
        if (reached.contains(link.from)) {
          reached.add(link.to);
        } else if (!link.arc && reached.contains(link.to)) {
          reached.add(link.from);
        }
      }
    } while (reached.size() > before);
    return terminals.stream()
        .filter(terminal -> !reached.contains(terminal))
        .findFirst()
        .map(Check::quoted)
        .orElse("the others");
  }

  @Override
  boolean evaluate(boolean[] partWorks) {
    if (!dual) {
      return problem.works(partWorks);
    }
    boolean[] opposite = partWorks.clone();
    for (int i = 0; i < opposite.length; i++) {
      opposite[i] = !opposite[i];
    }
    return !problem.works(opposite);
  }

  @Override
  Predicate<boolean[]> evaluation() {
    Predicate<boolean[]> search = problem.search();
    if (!dual) {
      return search;
    }
    boolean[] opposite = new boolean[parts().size()];
    return partWorks -> {
      for (int i = 0; i < opposite.length; i++) {
        opposite[i] = !partWorks[i];
      }
      return !search.test(opposite);
    };
  }

  @Override
  Structure rebuild(List<Structure> newParts) {
    if (dual) {
      List<Structure> duals = new ArrayList<>();
      newParts.forEach(part -> duals.add(part.dual()));
      return withDual(false, duals).rebuild(duals).dual();
    }
    return new NetworkSketch(this, newParts).structure();
  }

  private NetworkStructure withDual(boolean newDual, List<Structure> parts) {
    return new NetworkStructure(links, failingNodes, question, terminals, newDual, parts);
  }

  @Override
  Structure dualOver(List<Structure> dualParts) {
    return withDual(!dual, dualParts);
  }

  @Override
  List<RouteFinder> routes() {
    return dual ? List.of(Routes.barriers(problem)) : Routes.network(problem);
  }

  @Override
  Optional<NetworkPaths> slotPaths(double[] cost, double limit, WorkMeter meter) {
    return dual && NetworkPaths.applyTo(problem)
        ? Optional.of(new NetworkPaths(problem, cost, limit, meter))
        : Optional.empty();
  }

  @Override
  int express(Composer composer, int[] partExpressions, WorkMeter meter) {
    return composer.network(problem, dual, partExpressions, meter);
  }

  @Override
  void write(TextWriter out) {
    if (dual) {
      out.dualOf(this);
      return;
    }
    out.token(KIND).token("(");
    int slot = 0;
    for (Link link : links) {
      out.token(
          link.perfect ? (link.arc ? "perfectArc(" : "perfectLink(") : link.arc ? "arc(" : "link(");
      if (!link.perfect) {
        out.part(parts().get(slot++)).token(", ");
      }
      out.name(link.from).token(", ").name(link.to).token("), ");
    }
    for (String node : failingNodes) {
      out.token("node(").name(node).token(", ").part(parts().get(slot++)).token("), ");
    }
    switch (question) {
      case ALL -> out.token("connectingAll()");
      case ALL_FROM -> out.token("reachingAllFrom(").name(terminals.get(0)).token(")");
      case CONNECTING -> {
        String separator = "connecting(";
        for (String terminal : terminals) {
          out.token(separator).name(terminal);
          separator = ", ";
        }
        out.token(")");
      }
    }
    out.token(")");
  }

  @Override
  boolean sameOperator(Structure other) {
    return other instanceof NetworkStructure that
        && dual == that.dual
        && question == that.question
        && links.equals(that.links)
        && failingNodes.equals(that.failingNodes)
        && terminals.equals(that.terminals);
  }
}
