package org.kingbolt.core.diagram;

import java.util.ArrayList;
import java.util.BitSet;
import java.util.Comparator;
import java.util.List;

/**
 * A family of sets: of path sets, works when all slots of some set work; of cut sets, works when
 * some slot of every set works. Slots may be read in any order.
 *
 * <p>Cost: the sets are joined pairwise, so that no set is touched more than a logarithmic number
 * of times; sizes depend on the family.
 */
final class Family extends Operator {

  private final List<BitSet> sets;
  private final boolean paths;
  private final int[] order;

  /** Slots of common sets close together. */
  Family(int slots, List<BitSet> sets, boolean paths) {
    this(FamilyOrder.of(slots, sets), sets, paths);
  }

  private Family(int[] order, List<BitSet> sets, boolean paths) {
    this.order = order;
    this.sets = sets;
    this.paths = paths;
  }

  /** The same family, its slots read in another order. */
  Family inOrder(int[] slots) {
    return new Family(slots, sets, paths);
  }

  @Override
  int levels() {
    return order.length;
  }

  @Override
  int slotAt(int level) {
    return order[level];
  }

  @Override
  Diagram make(WorkMeter meter) {
    NodeTable table = new NodeTable(order.length, meter);
    List<BitSet> placed = placed();
    int[] made = new int[placed.size()];
    for (int i = 0; i < made.length; i++) {
      int id = paths ? Diagram.WORKS : Diagram.FAILS;
      BitSet set = placed.get(i);
      for (int level = set.length() - 1;
          level >= 0;
          level = level > 0 ? set.previousSetBit(level - 1) : -1) {
        id = paths ? table.node(level, Diagram.FAILS, id) : table.node(level, id, Diagram.WORKS);
      }
      made[i] = id;
    }
    for (int count = made.length; count > 1; count = (count + 1) >> 1) {
      for (int i = 0; i < count >> 1; i++) {
        made[i] =
            paths
                ? table.or(made[2 * i], made[2 * i + 1])
                : table.and(made[2 * i], made[2 * i + 1]);
      }
      if ((count & 1) == 1) {
        made[count >> 1] = made[count - 1];
      }
    }
    return table.diagram(made[0], order);
  }

  /** The sets in terms of levels, those that begin first in front. */
  private List<BitSet> placed() {
    int[] place = new int[order.length];
    for (int i = 0; i < order.length; i++) {
      place[order[i]] = i;
    }
    List<BitSet> placed = new ArrayList<>();
    for (BitSet set : sets) {
      BitSet moved = new BitSet();
      set.stream().forEach(slot -> moved.set(place[slot]));
      placed.add(moved);
    }
    placed.sort(Comparator.comparingInt((BitSet set) -> set.nextSetBit(0)));
    return placed;
  }
}
