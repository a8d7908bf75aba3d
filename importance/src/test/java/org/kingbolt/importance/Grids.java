package org.kingbolt.importance;

import java.util.ArrayList;
import java.util.List;
import org.kingbolt.core.Structure;
import org.kingbolt.core.published.Topology;

/** Square grids of links between nodes named by column and row. */
final class Grids {

  private Grids() {}

  /** Connecting two opposite corners. */
  static Structure corners(int side) {
    List<String> pairs = new ArrayList<>();
    for (int column = 0; column < side; column++) {
      for (int row = 0; row < side; row++) {
        String here = column + "." + row + " ";
        if (row + 1 < side) {
          pairs.add(here + column + "." + (row + 1));
        }
        if (column + 1 < side) {
          pairs.add(here + (column + 1) + "." + row);
        }
      }
    }
    return Topology.ofPairs(pairs).connecting("0.0", (side - 1) + "." + (side - 1));
  }
}
