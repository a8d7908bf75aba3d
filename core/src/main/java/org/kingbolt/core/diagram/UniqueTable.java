package org.kingbolt.core.diagram;

import java.util.Arrays;

/**
 * Nodes under construction: parallel arrays in order of creation, and a hash index that finds the
 * node of a given level, low and high child.
 *
 * <p>Ids 0 and 1 are reserved for terminals. Children are made before parents, so ids are a
 * topological order. For one thread.
 */
final class UniqueTable {

  private static final int FIRST_CAPACITY = 1 << 8;
  static final int LARGEST_SIZE = 1 << 29;

  private final int terminalLevel;
  private final WorkMeter meter;
  private int[] level = new int[FIRST_CAPACITY];
  private int[] low = new int[FIRST_CAPACITY];
  private int[] high = new int[FIRST_CAPACITY];
  private int[] index = new int[FIRST_CAPACITY << 1];
  private int size = 2;

  UniqueTable(int levels, WorkMeter meter) {
    this.terminalLevel = levels;
    this.meter = meter;
    level[0] = terminalLevel;
    level[1] = terminalLevel;
    high[1] = 1;
    low[1] = 1;
  }

  int size() {
    return size;
  }

  int terminalLevel() {
    return terminalLevel;
  }

  int level(int id) {
    return level[id];
  }

  int low(int id) {
    return low[id];
  }

  int high(int id) {
    return high[id];
  }

  /** Finds or makes the node. */
  int node(int nodeLevel, int nodeLow, int nodeHigh) {
    int mask = index.length - 1;
    int at = hash(nodeLevel, nodeLow, nodeHigh) & mask;
    for (int id = index[at]; id != 0; id = index[at]) {
      if (low[id] == nodeLow && high[id] == nodeHigh && level[id] == nodeLevel) {
        return id;
      }
      at = (at + 1) & mask;
    }
    meter.at(size);
    if (size == low.length) {
      grow();
      return node(nodeLevel, nodeLow, nodeHigh);
    }
    int id = size++;
    level[id] = nodeLevel;
    low[id] = nodeLow;
    high[id] = nodeHigh;
    index[at] = id;
    return id;
  }

  private void grow() {
    if (size >= LARGEST_SIZE) {
      throw new IllegalStateException("more than " + LARGEST_SIZE + " nodes in one table");
    }
    int capacity = Math.min(LARGEST_SIZE, size << 1);
    level = Arrays.copyOf(level, capacity);
    low = Arrays.copyOf(low, capacity);
    high = Arrays.copyOf(high, capacity);
    int[] larger = new int[capacity << 1];
    int mask = larger.length - 1;
    for (int id = 2; id < size; id++) {
      int at = hash(level[id], low[id], high[id]) & mask;
      while (larger[at] != 0) {
        at = (at + 1) & mask;
      }
      larger[at] = id;
    }
    index = larger;
  }

  /** Mixes three numbers into a well-spread hash. */
  static int hash(int a, int b, int c) {
    int h = a * 0x9E3779B1 + b;
    h = (h ^ (h >>> 15)) * 0x85EBCA6B + c;
    h = (h ^ (h >>> 13)) * 0xC2B2AE35;
    return h ^ (h >>> 16);
  }

  /**
   * Sorts what the root reaches bottom-up by level.
   *
   * @param root any id
   * @param variableAtLevel the order, one variable a level
   */
  Diagram sorted(int root, int[] variableAtLevel) {
    boolean[] reached = new boolean[root + 1];
    int[] bound = new int[terminalLevel + 1];
    int count = 2;
    if (root >= 2) {
      reached[root] = true;
    }
    for (int id = root; id >= 2; id--) {
      if (reached[id]) {
        reached[low[id]] = true;
        reached[high[id]] = true;
        bound[level[id]]++;
        count++;
      }
    }
    // counts per level become ends per level, deepest level first
    int end = 2;
    for (int l = terminalLevel - 1; l >= 0; l--) {
      end += bound[l];
      bound[l] = end;
    }
    bound[terminalLevel] = 2;
    int[] next = new int[terminalLevel];
    for (int l = 0; l < terminalLevel; l++) {
      next[l] = bound[l + 1];
    }
    int[] newId = new int[root + 1];
    if (root >= 1) {
      newId[1] = 1;
    }
    int[] newLow = new int[count];
    int[] newHigh = new int[count];
    for (int id = 2; id <= root; id++) {
      if (reached[id]) {
        newId[id] = next[level[id]]++;
      }
    }
    for (int id = 2; id <= root; id++) {
      if (reached[id]) {
        newLow[newId[id]] = newId[low[id]];
        newHigh[newId[id]] = newId[high[id]];
      }
    }
    return new Diagram(newId[root], newLow, newHigh, variableAtLevel.clone(), bound);
  }
}
