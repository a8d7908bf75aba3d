package org.kingbolt.core;

import java.util.ArrayDeque;
import java.util.ArrayList;
import java.util.Collections;
import java.util.Deque;
import java.util.IdentityHashMap;
import java.util.LinkedHashSet;
import java.util.List;
import java.util.Set;

/**
 * Walks over structures with an explicit stack, so that depth costs memory and nothing else. A part
 * that is one object in several places is visited once.
 */
final class Fold {

  private Fold() {}

  /** Computes a value bottom-up. */
  static <T> T over(Structure root, FoldStep<T> step) {
    IdentityHashMap<Structure, T> known = new IdentityHashMap<>();
    for (Structure structure : postOrder(root)) {
      T value;
      if (structure instanceof ComponentStructure component) {
        value = step.component(component.name());
      } else {
        List<T> values = new ArrayList<>(structure.parts().size());
        for (Structure part : structure.parts()) {
          T partValue = known.get(part);
          if (partValue == null) {
            throw new AssertionError("a part is visited after its whole");
          }
          values.add(partValue);
        }
        value = step.operator(structure, values);
      }
      known.put(structure, value);
    }
    T result = known.get(root);
    if (result == null) {
      throw new AssertionError("the root is not visited");
    }
    return result;
  }

  /** All distinct sub-structures, parts before wholes, the root last. */
  static List<Structure> postOrder(Structure root) {
    record Visit(Structure structure, int next) {}
    List<Structure> order = new ArrayList<>();
    Set<Structure> seen = Collections.newSetFromMap(new IdentityHashMap<>());
    Deque<Visit> open = new ArrayDeque<>();
    seen.add(root);
    open.push(new Visit(root, 0));
    while (!open.isEmpty()) {
      Visit visit = open.pop();
      List<Structure> parts = visit.structure.parts();
      int next = visit.next;
      while (next < parts.size() && !seen.add(parts.get(next))) {
        next++;
      }
      if (next == parts.size()) {
        order.add(visit.structure);
      } else {
        open.push(new Visit(visit.structure, next + 1));
        open.push(new Visit(parts.get(next), 0));
      }
    }
    return order;
  }

  /** Names of the components in order of first mention. */
  static Set<String> componentSet(Structure root) {
    Set<String> names = new LinkedHashSet<>();
    for (Structure structure : postOrder(root)) {
      if (structure instanceof ComponentStructure component) {
        names.add(component.name());
      }
    }
    return names;
  }

  /**
   * Equality of text, without making the text; one object is equal to itself at once, and two
   * objects are compared only where it does not follow from earlier comparisons that they must be
   * equal. Cost: linear in the number of distinct sub-structures and their parts.
   */
  @SuppressWarnings("ReferenceEquality")
  static boolean equal(Structure left, Structure right) {
    record Pair(Structure left, Structure right) {}
    if (left == right) {
      return true;
    }
    if (!alike(left, right) || left.parts().isEmpty()) {
      return alike(left, right);
    }
    IdentityHashMap<Structure, Structure> equalTo = new IdentityHashMap<>();
    Deque<Pair> open = new ArrayDeque<>();
    open.push(new Pair(left, right));
    while (!open.isEmpty()) {
      Pair pair = open.pop();
      Structure oneLeft = representative(equalTo, pair.left);
      Structure oneRight = representative(equalTo, pair.right);
      if (oneLeft == oneRight) {
        continue;
      }
      equalTo.put(oneRight, oneLeft);
      for (int i = 0; i < oneLeft.parts().size(); i++) {
        Structure leftPart = oneLeft.parts().get(i);
        Structure rightPart = oneRight.parts().get(i);
        if (leftPart != rightPart) {
          if (!alike(leftPart, rightPart)) {
            return false;
          }
          if (!leftPart.parts().isEmpty()) {
            open.push(new Pair(leftPart, rightPart));
          }
        }
      }
    }
    return true;
  }

  /** Whether two structures are equal if their parts are. */
  private static boolean alike(Structure left, Structure right) {
    return left.hashCode() == right.hashCode()
        && left.parts().size() == right.parts().size()
        && left.sameOperator(right);
  }

  /** The one that stands for all structures that must be equal to a structure. */
  private static Structure representative(
      IdentityHashMap<Structure, Structure> equalTo, Structure structure) {
    Structure at = structure;
    Structure next = equalTo.get(at);
    while (next != null) {
      Structure afterNext = equalTo.get(next);
      if (afterNext != null) {
        equalTo.put(at, afterNext);
      }
      at = next;
      next = afterNext;
    }
    return at;
  }
}
