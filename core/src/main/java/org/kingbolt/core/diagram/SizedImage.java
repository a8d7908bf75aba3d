package org.kingbolt.core.diagram;

import java.util.Arrays;

/**
 * The sets of a family whose size is right: copies of its nodes for different numbers of variables
 * that may still follow, made from the top as far as any set fits, and put together from the
 * bottom.
 */
final class SizedImage {

  /** What {@link Room} says where no set fits. */
  static final int NO_ROOM = -1;

  /** Says for how many variables a node is copied, given how many may or must still follow. */
  interface Room {
    int of(int id, int left);
  }

  private final Diagram nodes;
  private final Room fits;
  private final WorkMeter meter;

  /** Copies in order of discovery, which is by level: node, room, and images of both children. */
  private int[] node = new int[64];

  private int[] room = new int[64];
  private int count;
  private int[] index = new int[128];

  SizedImage(Diagram nodes, Room fits, WorkMeter meter) {
    this.nodes = nodes;
    this.fits = fits;
    this.meter = meter;
  }

  Diagram of(int size) {
    int root = copy(nodes.root(), size);
    for (int i = 0; i < count; i++) {
      copy(nodes.low(node[i]), room[i]);
      copy(nodes.high(node[i]), room[i] - 1);
    }
    long[] order = new long[count];
    Arrays.setAll(order, i -> (long) node[i] << 32 | i);
    Arrays.sort(order);
    UniqueTable table = new UniqueTable(nodes.levels(), meter);
    int[] image = new int[count];
    for (long entry : order) {
      int i = (int) entry;
      int low = image(nodes.low(node[i]), room[i], image);
      int high = image(nodes.high(node[i]), room[i] - 1, image);
      image[i] = high == SetDiagram.NO_SETS ? low : table.node(nodes.levelOf(node[i]), low, high);
    }
    return table.sorted(root < 0 ? root + 2 : image[root], nodes.order());
  }

  private int image(int id, int left, int[] image) {
    int at = copy(id, left);
    return at < 0 ? at + 2 : image[at];
  }

  /** The number of a copy, made if it is new; -2 for no sets and -1 for the empty one only. */
  private int copy(int id, int left) {
    int wanted = left < 0 ? NO_ROOM : fits.of(id, left);
    if (wanted == NO_ROOM || id < 2) {
      return wanted == NO_ROOM ? -2 : id - 2;
    }
    int mask = index.length - 1;
    int at = UniqueTable.hash(id, wanted, 0) & mask;
    for (; index[at] != 0; at = (at + 1) & mask) {
      int known = index[at] - 1;
      if (node[known] == id && room[known] == wanted) {
        return known;
      }
    }
    meter.at(count);
    if (count == node.length) {
      node = Arrays.copyOf(node, count << 1);
      room = Arrays.copyOf(room, count << 1);
    }
    node[count] = id;
    room[count] = wanted;
    index[at] = ++count;
    if (count << 1 > index.length) {
      grow();
    }
    return count - 1;
  }

  private void grow() {
    index = new int[index.length << 1];
    int mask = index.length - 1;
    for (int i = 0; i < count; i++) {
      int at = UniqueTable.hash(node[i], room[i], 0) & mask;
      while (index[at] != 0) {
        at = (at + 1) & mask;
      }
      index[at] = i + 1;
    }
  }
}
