package org.kingbolt.bounds;

import java.util.ArrayList;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.function.Supplier;
import org.kingbolt.bounds.LinkGraph.Link;
import org.kingbolt.core.Budget;
import org.kingbolt.core.NetworkLinks;
import org.kingbolt.core.Probabilities;
import org.kingbolt.core.Probability;
import org.kingbolt.core.Structure;
import org.kingbolt.core.diagram.WorkMeter;

/**
 * Reduces a network by series, parallel, delta-star and star-delta replacement. Every replacement
 * leaves fewer links, or as many links and fewer nodes, so that the work comes to an end.
 */
final class DeltaStar {

  private static final int MOST_ROUNDS = 100_000;

  private final LinkGraph graph = new LinkGraph();
  private final WorkMeter meter;
  private int replacements;

  private DeltaStar(NetworkLinks network, Probabilities p, Budget budget) {
    this.meter = budget.start("replacing deltas and stars");
    Map<String, Integer> numbers = new HashMap<>();
    numbers.put(network.source(), graph.newNode());
    numbers.put(network.target(), graph.newNode());
    List<NetworkLinks.Link> perfect = new ArrayList<>();
    for (NetworkLinks.Link link : network.links()) {
      int from = numbers.computeIfAbsent(link.from(), node -> graph.newNode());
      int to = numbers.computeIfAbsent(link.to(), node -> graph.newNode());
      Probability works =
          link.part().isAlwaysWorking() ? Probability.CERTAIN : link.part().reliability(p, budget);
      if (works.failing() == 0) {
        perfect.add(link);
      } else {
        graph.add(from, to, new Link(works.working(), works.failing()));
      }
    }
    Map<Integer, Integer> into = new HashMap<>();
    for (NetworkLinks.Link link : perfect) {
      int from = now(into, numbers.getOrDefault(link.from(), 0));
      int to = now(into, numbers.getOrDefault(link.to(), 0));
      if (from != to) {
        graph.merge(from, to);
        into.put(from, to);
      }
    }
  }

  private static int now(Map<Integer, Integer> into, int node) {
    int at = node;
    while (into.containsKey(at)) {
      at = into.getOrDefault(at, at);
    }
    return at;
  }

  static Approximation of(
      Structure structure, Probabilities p, Budget budget, Supplier<Interval> certified) {
    DeltaStar work = new DeltaStar(NetworkLinks.of(structure), p, budget);
    work.graph.reduce();
    while (!work.graph.isSolved()) {
      work.meter.now(work.graph.nodes());
      if (!work.replaceBest()) {
        throw new IllegalArgumentException(
            "the network does not come apart: after "
                + work.replacements
                + " replacements no delta or star is left whose replacement would take away links"
                + " or nodes; use within(budget), which holds for every network");
      }
      work.replacements++;
      work.graph.reduce();
    }
    Link result = work.graph.result();
    return new Approximation(
        Probability.of(result.works(), Math.min(1, result.fails())),
        "delta-star",
        work.replacements,
        certified.get());
  }

  /** Deltas first, then stars; those that take away the most links first. */
  private boolean replaceBest() {
    int most = 0;
    int[] best = {};
    for (int a = 0; a < graph.nodes(); a++) {
      List<Integer> ends = graph.neighbours(a);
      for (int i = 0; i < ends.size(); i++) {
        for (int j = i + 1; j < ends.size(); j++) {
          int b = ends.get(i);
          int c = ends.get(j);
          if (a < b && a < c && graph.joined(b, c)) {
            int gain = gain(a) + gain(b) + gain(c);
            if (gain > most) {
              most = gain;
              best = new int[] {a, b, c};
            }
          }
        }
      }
    }
    if (best.length > 0) {
      toStar(best[0], best[1], best[2]);
      return true;
    }
    return replaceStar();
  }

  /** Whether a corner of a delta loses one more link once the delta is a star. */
  private int gain(int corner) {
    return graph.degree(corner) == (graph.isTerminal(corner) ? 2 : 3) ? 1 : 0;
  }

  private boolean replaceStar() {
    for (int wanted = 3; wanted >= 0; wanted--) {
      for (int node = 0; node < graph.nodes(); node++) {
        if (graph.degree(node) == 3 && !graph.isTerminal(node)) {
          List<Integer> ends = graph.neighbours(node);
          int a = ends.get(0);
          int b = ends.get(1);
          int c = ends.get(2);
          int gain =
              (graph.joined(a, b) ? 1 : 0)
                  + (graph.joined(b, c) ? 1 : 0)
                  + (graph.joined(a, c) ? 1 : 0);
          if (gain == wanted && toDelta(node, a, b, c)) {
            return true;
          }
        }
      }
    }
    return false;
  }

  private void toStar(int a, int b, int c) {
    Link[] star = star(graph.remove(a, b), graph.remove(b, c), graph.remove(a, c));
    int centre = graph.newNode();
    graph.add(centre, a, star[0]);
    graph.add(centre, b, star[1]);
    graph.add(centre, c, star[2]);
  }

  private boolean toDelta(int centre, int a, int b, int c) {
    Link toA = graph.remove(centre, a);
    Link toB = graph.remove(centre, b);
    Link toC = graph.remove(centre, c);
    Link[] delta = delta(toA, toB, toC);
    if (delta.length == 0) {
      graph.add(centre, a, toA);
      graph.add(centre, b, toB);
      graph.add(centre, c, toC);
      return false;
    }
    graph.add(a, b, delta[0]);
    graph.add(b, c, delta[1]);
    graph.add(a, c, delta[2]);
    return true;
  }

  /**
   * The star that joins every pair of corners as often as a delta does; that all three corners are
   * joined comes out somewhat wrong.
   *
   * @return the links to a, b and c
   */
  static Link[] star(Link ab, Link bc, Link ac) {
    double joinedAb = ab.works() + ab.fails() * bc.works() * ac.works();
    double joinedBc = bc.works() + bc.fails() * ab.works() * ac.works();
    double joinedAc = ac.works() + ac.fails() * ab.works() * bc.works();
    return new Link[] {
      leg(joinedAb, joinedAc, joinedBc, ab, ac, bc),
      leg(joinedAb, joinedBc, joinedAc, ab, bc, ac),
      leg(joinedAc, joinedBc, joinedAb, ac, bc, ab)
    };
  }

  /** The square root of the two pairs at a corner over the pair beyond, its tail on its own. */
  private static Link leg(
      double near, double next, double beyond, Link one, Link two, Link opposite) {
    double works = Math.min(1, Math.sqrt(near * next / beyond));
    // beyond - near * next, with what cancels left out
    double f = opposite.fails();
    double others = (f + two.fails() * opposite.works()) * (f + one.fails() * opposite.works());
    double fails = one.fails() * two.fails() * (2 - f - others) / beyond / (1 + works);
    return fails < 0.5 ? new Link(1 - fails, fails) : new Link(works, 1 - works);
  }

  /**
   * The delta that joins every pair of corners as often as a star does.
   *
   * @return the links ab, bc and ac; empty if there is none
   */
  static Link[] delta(Link toA, Link toB, Link toC) {
    // u, v, w: that two links of the delta fail; t: that all three do
    double u0 = half(toA, toC, toB);
    double v0 = half(toA, toB, toC);
    double w0 = half(toB, toC, toA);
    double t = 0;
    double next = Math.sqrt(u0 * v0 * w0);
    for (int round = 0; round < MOST_ROUNDS && next - t > 1e-16 * next; round++) {
      t = next;
      next = Math.sqrt((u0 + t / 2) * (v0 + t / 2) * (w0 + t / 2));
    }
    double u = u0 + t / 2;
    double v = v0 + t / 2;
    double w = w0 + t / 2;
    if (!(t <= Math.min(u, Math.min(v, w)))) {
      return new Link[0];
    }
    return new Link[] {failing(t, v), failing(t, w), failing(t, u)};
  }

  private static double half(Link one, Link two, Link middle) {
    return (one.fails() * two.fails() + middle.fails() * (one.works() + two.works())) / 2;
  }

  private static Link failing(double all, double others) {
    double fails = others == 0 ? 0 : all / others;
    return new Link(1 - fails, fails);
  }
}
