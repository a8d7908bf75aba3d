package org.kingbolt.bounds;

import java.util.ArrayList;
import java.util.HashMap;
import java.util.List;
import java.util.Map;

/**
 * A network of links that is being reduced between its two terminals, nodes 0 and 1. Between two
 * nodes there is at most one link. For one thread.
 */
final class LinkGraph {

  /** Both sides of a link's probability. */
  record Link(double works, double fails) {

    Link inSeriesWith(Link other) {
      return new Link(works * other.works, fails + works * other.fails);
    }

    Link inParallelWith(Link other) {
      return new Link(works + fails * other.works, fails * other.fails);
    }
  }

  private static final Link NONE = new Link(0, 1);

  /** The links at each node, by the node at their other end. Kept in order of insertion. */
  private final List<Map<Integer, Link>> at = new ArrayList<>();

  private int source;
  private int target = 1;

  /** What works or fails besides the links that are left. */
  private Link factor = new Link(1, 0);

  int newNode() {
    at.add(new java.util.LinkedHashMap<>());
    return at.size() - 1;
  }

  int nodes() {
    return at.size();
  }

  int degree(int node) {
    return at.get(node).size();
  }

  List<Integer> neighbours(int node) {
    return List.copyOf(at.get(node).keySet());
  }

  boolean isTerminal(int node) {
    return node == source || node == target;
  }

  boolean joined(int a, int b) {
    return at.get(a).containsKey(b);
  }

  void add(int a, int b, Link link) {
    if (a != b && link.works() > 0) {
      Link before = at.get(a).getOrDefault(b, NONE);
      Link both = before.inParallelWith(link);
      at.get(a).put(b, both);
      at.get(b).put(a, both);
    }
  }

  Link remove(int a, int b) {
    at.get(b).remove(a);
    Link gone = at.get(a).remove(b);
    return gone == null ? NONE : gone;
  }

  /** Makes one node of two that are always joined. */
  void merge(int gone, int into) {
    if (gone == into) {
      return;
    }
    for (Map.Entry<Integer, Link> entry : new HashMap<>(at.get(gone)).entrySet()) {
      remove(gone, entry.getKey());
      add(into, entry.getKey(), entry.getValue());
    }
    source = source == gone ? into : source;
    target = target == gone ? into : target;
  }

  /** Series links, dead ends and terminals with one link go, until none is left. */
  void reduce() {
    List<Integer> open = new ArrayList<>();
    for (int node = 0; node < at.size(); node++) {
      open.add(node);
    }
    while (!open.isEmpty() && !isSolved()) {
      int node = open.remove(open.size() - 1);
      List<Integer> ends = neighbours(node);
      if (ends.isEmpty() || ends.size() > 2 || (isTerminal(node) && ends.size() == 2)) {
        continue;
      }
      int first = ends.get(0);
      Link link = remove(node, first);
      if (isTerminal(node)) {
        factor = factor.inSeriesWith(link);
        source = source == node ? first : source;
        target = target == node ? first : target;
      } else if (ends.size() == 2) {
        int second = ends.get(1);
        add(first, second, link.inSeriesWith(remove(node, second)));
        open.add(second);
      }
      open.add(first);
    }
  }

  /** Whether the terminals have met or have come apart. */
  boolean isSolved() {
    return source == target || degree(source) == 0 || degree(target) == 0;
  }

  /** What is left when {@link #isSolved()}. */
  Link result() {
    return source == target ? factor : NONE;
  }
}
