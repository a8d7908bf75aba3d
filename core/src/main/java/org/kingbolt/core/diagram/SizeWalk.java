package org.kingbolt.core.diagram;

import java.util.Arrays;
import org.jspecify.annotations.Nullable;

/**
 * Sets in order of size: for each size, a depth-first walk that enters a node only when some set of
 * just the size still wanted ends below it.
 */
final class SizeWalk implements SetWalk {

  private final Diagram nodes;

  /** For each node, one bit a size: whether a set of that size ends below it. */
  private final long[][] sizes;

  private final int largest;

  /** The route so far: nodes, and whether their variable was taken. */
  private int[] route = new int[16];

  private boolean[] taken = new boolean[16];
  private int depth;
  private int size = -1;

  SizeWalk(Diagram nodes) {
    this.nodes = nodes;
    this.sizes = new long[nodes.size()][];
    sizes[SetDiagram.NO_SETS] = new long[0];
    sizes[SetDiagram.ONLY_EMPTY_SET] = new long[] {1};
    for (int id = 2; id < nodes.size(); id++) {
      sizes[id] = union(sizes[nodes.low(id)], sizes[nodes.high(id)]);
    }
    this.largest = sizes[nodes.root()].length * Long.SIZE - 1;
  }

  private static long[] union(long[] low, long[] high) {
    boolean carries = high.length > 0 && high[high.length - 1] < 0;
    long[] result = Arrays.copyOf(low, Math.max(low.length, high.length + (carries ? 1 : 0)));
    long carry = 0;
    for (int i = 0; i < high.length; i++) {
      result[i] |= high[i] << 1 | carry;
      carry = high[i] >>> (Long.SIZE - 1);
    }
    if (carry != 0) {
      result[high.length] |= carry;
    }
    return result;
  }

  private boolean has(int id, int wanted) {
    int word = wanted >> 6;
    return wanted >= 0 && word < sizes[id].length && (sizes[id][word] >>> wanted & 1) == 1;
  }

  @Override
  public int @Nullable [] next() {
    if (size >= 0 && retreat()) {
      return set();
    }
    while (size < largest) {
      size++;
      if (has(nodes.root(), size)) {
        depth = 0;
        descend(nodes.root(), size);
        return set();
      }
    }
    return null;
  }

  /** Goes down, taking a variable wherever a set of the wanted size allows it. */
  private void descend(int from, int wanted) {
    int id = from;
    int left = wanted;
    while (id >= 2) {
      if (depth == route.length) {
        route = Arrays.copyOf(route, depth << 1);
        taken = Arrays.copyOf(taken, depth << 1);
      }
      boolean take = has(nodes.high(id), left - 1);
      route[depth] = id;
      taken[depth] = take;
      depth++;
      id = take ? nodes.high(id) : nodes.low(id);
      left -= take ? 1 : 0;
    }
  }

  /** Goes back to the last variable that can be left out, and down from there; false when none. */
  private boolean retreat() {
    int left = 0;
    while (depth > 0) {
      depth--;
      int id = route[depth];
      if (taken[depth]) {
        left++;
        if (has(nodes.low(id), left)) {
          taken[depth] = false;
          depth++;
          descend(nodes.low(id), left);
          return true;
        }
      }
    }
    return false;
  }

  private int[] set() {
    int[] set = new int[size];
    int count = 0;
    for (int i = 0; i < depth; i++) {
      if (taken[i]) {
        set[count++] = nodes.variableAt(nodes.levelOf(route[i]));
      }
    }
    return set;
  }
}
