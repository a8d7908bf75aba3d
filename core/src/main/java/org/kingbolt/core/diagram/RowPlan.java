package org.kingbolt.core.diagram;

/**
 * Gives every node of a diagram a row to keep its values in, while a scan from the deepest level up
 * needs them: a row is free again after the last parent of its node. The row freed last is given
 * first, since it is most likely still in cache.
 *
 * <p>Rows 0 and 1 stay with the two outcomes. Immutable; safe to share between threads.
 */
final class RowPlan {

  private final int[] row;
  private final int rows;

  private RowPlan(int[] row, int rows) {
    this.row = row;
    this.rows = rows;
  }

  /** Plans. Cost: two scans, and 8 bytes a node that are given back at the end. */
  static RowPlan of(Diagram diagram) {
    int size = diagram.size();
    int[] low = diagram.lows();
    int[] high = diagram.highs();
    int[] lastParent = new int[size];
    for (int id = 2; id < size; id++) {
      lastParent[low[id]] = id;
      lastParent[high[id]] = id;
    }
    lastParent[Diagram.FAILS] = size;
    lastParent[Diagram.WORKS] = size;
    lastParent[diagram.root()] = size;
    int[] row = new int[size];
    row[Diagram.WORKS] = 1;
    int[] free = new int[size];
    int freed = 0;
    int rows = 2;
    for (int id = 2; id < size; id++) {
      row[id] = freed > 0 ? free[--freed] : rows++;
      int l = low[id];
      int h = high[id];
      if (lastParent[h] == id) {
        free[freed++] = row[h];
      }
      if (lastParent[l] == id && l != h) {
        free[freed++] = row[l];
      }
    }
    return new RowPlan(row, rows);
  }

  /** Indexed by node; not to be written to. */
  int[] row() {
    return row;
  }

  /** How many rows are in use at once, those of the outcomes included. */
  int rows() {
    return rows;
  }
}
