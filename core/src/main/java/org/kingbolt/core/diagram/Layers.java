package org.kingbolt.core.diagram;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;

/**
 * A template under construction, layer by layer from the first decision to the last; what is made
 * is turned upside down at the end, into a bottom-up {@link Diagram}.
 */
final class Layers {

  /** Marks a child that is the outcome "fails". */
  static final int TO_FAILS = -1;

  /** Marks a child that is the outcome "works". */
  static final int TO_WORKS = -2;

  private final List<int[]> lows = new ArrayList<>();
  private final List<int[]> highs = new ArrayList<>();
  private final List<Integer> slots = new ArrayList<>();
  private int nodes;

  /**
   * Adds the next layer.
   *
   * @param slot the slot that all its nodes test
   * @param low one child a node: an index into the next layer, or one of the two marks
   * @param high likewise
   */
  void add(int slot, int[] low, int[] high) {
    slots.add(slot);
    lows.add(low);
    highs.add(high);
    nodes = Math.addExact(nodes, low.length);
  }

  /** Closes the work; the root is node 0 of the first layer. */
  Diagram diagram() {
    int levels = slots.size();
    int[] low = new int[nodes + 2];
    int[] high = new int[nodes + 2];
    int[] order = new int[levels];
    int[] bound = new int[levels + 1];
    bound[levels] = 2;
    int next = 2;
    for (int level = levels - 1; level >= 0; level--) {
      int[] layerLow = lows.get(level);
      int[] layerHigh = highs.get(level);
      int deeper = level + 1 < levels ? bound[level + 2] : 0;
      for (int i = 0; i < layerLow.length; i++) {
        low[next] = child(layerLow[i], deeper);
        high[next] = child(layerHigh[i], deeper);
        next++;
      }
      bound[level] = next;
      order[level] = slots.get(level);
    }
    return new Diagram(bound[1], low, high, order, bound);
  }

  private static int child(int mark, int deeper) {
    return switch (mark) {
      case TO_FAILS -> Diagram.FAILS;
      case TO_WORKS -> Diagram.WORKS;
      default -> deeper + mark;
    };
  }

  /** A template with one node a level: works when every slot works, or when any does. */
  static Diagram chain(int slots, boolean series) {
    int[] low = new int[slots + 2];
    int[] high = new int[slots + 2];
    int[] order = new int[slots];
    int[] bound = new int[slots + 1];
    Arrays.setAll(order, i -> i);
    Arrays.setAll(bound, i -> slots + 2 - i);
    for (int id = 2; id < slots + 2; id++) {
      int deeper = id > 2 ? id - 1 : series ? Diagram.WORKS : Diagram.FAILS;
      low[id] = series ? Diagram.FAILS : deeper;
      high[id] = series ? deeper : Diagram.WORKS;
    }
    return new Diagram(slots + 1, low, high, order, bound);
  }
}
