package org.kingbolt.importance;

/** Sorts numbers of rows by a comparison of rows, keeping the order of equal ones. */
final class PlanSort {

  /** Compares two rows. */
  interface Order {
    int compare(int left, int right);
  }

  private PlanSort() {}

  static int[] sorted(int size, Order order) {
    int[] from = new int[size];
    for (int i = 0; i < size; i++) {
      from[i] = i;
    }
    int[] to = new int[size];
    for (int run = 1; run < size && run > 0; run *= 2) {
      for (int start = 0; start < size; start += 2 * run) {
        int middle = Math.min(size, start + run);
        int end = Math.min(size, middle + run);
        int left = start;
        int right = middle;
        for (int at = start; at < end; at++) {
          boolean takeLeft =
              right == end || (left < middle && order.compare(from[left], from[right]) <= 0);
          to[at] = takeLeft ? from[left++] : from[right++];
        }
      }
      int[] swap = from;
      from = to;
      to = swap;
    }
    return from;
  }
}
