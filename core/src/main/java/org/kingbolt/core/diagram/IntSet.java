package org.kingbolt.core.diagram;

import java.util.Arrays;

/** Non-negative integers in order of their first coming; each is kept once. */
final class IntSet {

  private int[] items = new int[16];
  private int size;

  /** Open-addressed: one more than the place of an item. */
  private int[] index = new int[64];

  /** Adds an integer and tells whether it is new. */
  boolean add(int item) {
    int at = slot(item);
    if (index[at] > 0) {
      return false;
    }
    if (size == items.length) {
      items = Arrays.copyOf(items, size << 1);
      index = new int[items.length << 2];
      for (int i = 0; i < size; i++) {
        index[slot(items[i])] = i + 1;
      }
      at = slot(item);
    }
    items[size++] = item;
    index[at] = size;
    return true;
  }

  boolean contains(int item) {
    return index[slot(item)] > 0;
  }

  private int slot(int item) {
    int mask = index.length - 1;
    int at = UniqueTable.hash(item, 0, 0) & mask;
    while (index[at] > 0 && items[index[at] - 1] != item) {
      at = (at + 1) & mask;
    }
    return at;
  }

  int get(int place) {
    return items[place];
  }

  int size() {
    return size;
  }

  int[] toArray() {
    return Arrays.copyOf(items, size);
  }

  int[] sorted() {
    int[] sorted = toArray();
    Arrays.sort(sorted);
    return sorted;
  }
}
