package org.kingbolt.core.diagram;

import java.util.Arrays;
import java.util.List;

/** Families made of lists, or of other families: bottom-up scans with a table of nodes. */
final class SetSelection {

  private SetSelection() {}

  /** A family of listed sets, none a part of another one, in lexicographic order. */
  static Diagram listed(int variables, List<int[]> sets, WorkMeter meter) {
    UniqueTable table = new UniqueTable(variables, meter);
    // by length of a beginning of the set at hand: the family of what follows it
    int[] rest = new int[variables + 1];
    int[] last = new int[0];
    for (int i = sets.size() - 1; i >= 0; i--) {
      int[] set = sets.get(i);
      int common = Math.max(0, Arrays.mismatch(set, last));
      close(table, last, common, rest);
      Arrays.fill(rest, common + 1, Math.max(common + 1, set.length), SetDiagram.NO_SETS);
      rest[set.length] = SetDiagram.ONLY_EMPTY_SET;
      last = set;
    }
    close(table, last, 0, rest);
    int[] order = new int[variables];
    Arrays.setAll(order, level -> level);
    return table.sorted(rest[0], order);
  }

  /** Puts what follows each longer beginning into the family of the next shorter one. */
  private static void close(UniqueTable table, int[] set, int length, int[] rest) {
    for (int i = set.length - 1; i >= length; i--) {
      rest[i] = table.node(set[i], rest[i], rest[i + 1]);
    }
  }

  /** The sets that contain a variable, or those that do not. */
  static Diagram with(Diagram nodes, int variable, boolean contained, WorkMeter meter) {
    int chosen = 0;
    while (chosen < nodes.levels() && nodes.variableAt(chosen) != variable) {
      chosen++;
    }
    if (chosen == nodes.levels()) {
      return contained ? Diagram.constant(false) : nodes;
    }
    UniqueTable table = new UniqueTable(nodes.levels(), meter);
    int[] image = new int[nodes.size()];
    image[SetDiagram.ONLY_EMPTY_SET] = SetDiagram.ONLY_EMPTY_SET;
    for (int level = nodes.levels() - 1; level > chosen; level--) {
      for (int id = nodes.from(level); id < nodes.to(level); id++) {
        image[id] = table.node(level, image[nodes.low(id)], image[nodes.high(id)]);
      }
    }
    int below = nodes.from(chosen);
    if (contained) {
      int[] none = new int[nodes.size()];
      for (int id = below; id < nodes.to(chosen); id++) {
        none[id] = table.node(chosen, SetDiagram.NO_SETS, image[nodes.high(id)]);
      }
      image = none;
    } else {
      for (int id = below; id < nodes.to(chosen); id++) {
        image[id] = image[nodes.low(id)];
      }
    }
    for (int level = chosen - 1; level >= 0; level--) {
      for (int id = nodes.from(level); id < nodes.to(level); id++) {
        image[id] = node(table, level, image[nodes.low(id)], image[nodes.high(id)]);
      }
    }
    return table.sorted(image[nodes.root()], nodes.order());
  }

  private static int node(UniqueTable table, int level, int low, int high) {
    return high == SetDiagram.NO_SETS ? low : table.node(level, low, high);
  }

  /** The sets of at most so many variables: every node with the number that it may still hold. */
  static Diagram atMost(Diagram nodes, int size, WorkMeter meter) {
    int[] smallest = new int[nodes.size()];
    int[] largest = new int[nodes.size()];
    smallest[SetDiagram.NO_SETS] = Integer.MAX_VALUE - 1;
    largest[SetDiagram.NO_SETS] = -1;
    for (int id = 2; id < nodes.size(); id++) {
      meter.at(id);
      smallest[id] = Math.min(smallest[nodes.low(id)], smallest[nodes.high(id)] + 1);
      largest[id] = Math.max(largest[nodes.low(id)], largest[nodes.high(id)] + 1);
    }
    if (largest[nodes.root()] <= size) {
      return nodes;
    }
    SizedImage.Room room =
        (id, left) -> smallest[id] <= left ? Math.min(left, largest[id]) : SizedImage.NO_ROOM;
    return new SizedImage(nodes, room, meter).of(size);
  }
}
