package org.kingbolt.core.diagram;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import org.jspecify.annotations.Nullable;

/**
 * Sets in order of size: for each size, a depth-first walk that enters a node only when some set of
 * just the size still wanted ends below it.
 *
 * <p>Where the sizes that end below a node have no gap, the smallest and the largest tell all of
 * them. For the other nodes there is one bit a size, made in planes of 64 sizes as the walk comes
 * to them.
 */
final class SizeWalk implements SetWalk {

  private final Diagram nodes;

  private final WorkMeter meter;

  /** For each node, the smallest and the largest size of the sets that end below it. */
  private final int[] smallest;

  private final int[] largest;

  /** For each node that may have gaps between its sizes, its place in the planes, from 1 up. */
  private final int[] place;

  private int places;

  /** Plane i, by place: whether a set of the smallest size + 64 i + bit ends below the node. */
  private final List<long[]> planes = new ArrayList<>();

  private long bytes;

  /** The route so far: nodes, and whether their variable was taken. */
  private int[] route = new int[16];

  private boolean[] taken = new boolean[16];
  private int depth;
  private int size;

  SizeWalk(Diagram nodes, WorkMeter meter) {
    this.nodes = nodes;
    this.meter = meter;
    grow(3L * Integer.BYTES * nodes.size());
    this.smallest = new int[nodes.size()];
    this.largest = new int[nodes.size()];
    this.place = new int[nodes.size()];
    largest[SetDiagram.NO_SETS] = -1;
    for (int id = 2; id < nodes.size(); id++) {
      grow(0);
      int low = nodes.low(id);
      int high = nodes.high(id);
      smallest[id] = smallest[high] + 1;
      largest[id] = largest[high] + 1;
      boolean gaps = place[high] > 0;
      if (low != SetDiagram.NO_SETS) {
        boolean apart = smallest[low] > largest[id] + 1 || largest[low] < smallest[id] - 1;
        gaps |= place[low] > 0 || apart;
        smallest[id] = Math.min(smallest[id], smallest[low]);
        largest[id] = Math.max(largest[id], largest[low]);
      }
      place[id] = gaps ? ++places : 0;
    }
    size = smallest[nodes.root()] - 1;
  }

  /** Tells the meter how much is held, and is about to be. */
  private void grow(long more) {
    bytes += more;
    meter.at(bytes / WorkMeter.BYTES_PER_NODE);
  }

  /** Makes the planes that a walk over the sets of a size looks at. */
  private void makePlanes(int wanted) {
    while (places > 0 && planes.size() <= (wanted - smallest[nodes.root()]) >> 6) {
      grow((long) Long.BYTES * places);
      long[] plane = new long[places];
      for (int id = 2; id < nodes.size(); id++) {
        if (place[id] > 0) {
          grow(0);
          int low = nodes.low(id);
          int high = nodes.high(id);
          plane[place[id] - 1] =
              shifted(low, smallest[low] - smallest[id], plane)
                  | shifted(high, smallest[high] + 1 - smallest[id], plane);
        }
      }
      planes.add(plane);
    }
  }

  /** The word of a node for the plane being made, its sizes counted from a smaller one. */
  private long shifted(int id, int by, long[] made) {
    int plane = planes.size() - (by >> 6);
    long word = word(id, plane, made) << by;
    return (by & 63) == 0 ? word : word | word(id, plane - 1, made) >>> -by;
  }

  private long word(int id, int plane, long[] made) {
    if (plane < 0) {
      return 0;
    }
    if (place[id] > 0) {
      return (plane == planes.size() ? made : planes.get(plane))[place[id] - 1];
    }
    int last = largest[id] - smallest[id] - (plane << 6);
    return last < 0 ? 0 : last < 63 ? (2L << last) - 1 : -1;
  }

  /** Whether a set of a size ends below a node; known up to the size moved on to. */
  boolean has(int id, int wanted) {
    if (wanted < smallest[id] || wanted > largest[id]) {
      return false;
    }
    int above = wanted - smallest[id];
    return place[id] == 0 || (planes.get(above >> 6)[place[id] - 1] >>> above & 1) != 0;
  }

  @Override
  public int @Nullable [] next() {
    if (retreat()) {
      return set();
    }
    if (!nextSize()) {
      return null;
    }
    depth = 0;
    descend(nodes.root(), size);
    return set();
  }

  /** Moves on to the next size of which there are sets; false when there is none. */
  boolean nextSize() {
    while (size < largest[nodes.root()]) {
      makePlanes(size + 1);
      size++;
      if (has(nodes.root(), size)) {
        return true;
      }
    }
    return false;
  }

  int size() {
    return size;
  }

  /** Goes down, taking a variable wherever a set of the wanted size allows it. */
  private void descend(int from, int wanted) {
    int id = from;
    int left = wanted;
    while (id >= 2) {
      grow(0);
      if (depth == route.length) {
        grow((long) (Integer.BYTES + 1) * depth);
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
      grow(0);
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
