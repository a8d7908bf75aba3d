package org.kingbolt.core.diagram;

import java.util.Arrays;

/**
 * The distinct states before one decision of a sweep, numbered in order of discovery, in one pool
 * of words with an open-addressed index. For one thread.
 */
final class StateLayer {

  private long[] pool = new long[64];
  private int[] start = new int[17];
  private int[] index = new int[32];
  private int count;

  int count() {
    return count;
  }

  long[] pool() {
    return pool;
  }

  int start(int state) {
    return start[state];
  }

  int length(int state) {
    return start[state + 1] - start[state];
  }

  /** Words held, for the meter. */
  long words() {
    return start[count];
  }

  void clear() {
    count = 0;
    Arrays.fill(index, 0);
  }

  /** Finds or adds a state and returns its number. */
  int add(StateWords state) {
    int mask = index.length - 1;
    int at = hash(state.words, 0, state.length) & mask;
    for (int entry = index[at]; entry != 0; entry = index[at]) {
      int from = start[entry - 1];
      if (start[entry] - from == state.length
          && Arrays.equals(pool, from, from + state.length, state.words, 0, state.length)) {
        return entry - 1;
      }
      at = (at + 1) & mask;
    }
    if ((count + 1) << 1 > index.length) {
      growIndex();
      return add(state);
    }
    int from = start[count];
    if (from + state.length > pool.length) {
      pool = Arrays.copyOf(pool, Math.max(pool.length << 1, from + state.length));
    }
    System.arraycopy(state.words, 0, pool, from, state.length);
    count++;
    if (count >= start.length) {
      start = Arrays.copyOf(start, start.length << 1);
    }
    start[count] = from + state.length;
    index[at] = count;
    return count - 1;
  }

  private void growIndex() {
    int[] larger = new int[index.length << 1];
    int mask = larger.length - 1;
    for (int state = 0; state < count; state++) {
      int at = hash(pool, start[state], start[state + 1]) & mask;
      while (larger[at] != 0) {
        at = (at + 1) & mask;
      }
      larger[at] = state + 1;
    }
    index = larger;
  }

  private static int hash(long[] words, int from, int to) {
    long h = 0x9E3779B97F4A7C15L;
    for (int i = from; i < to; i++) {
      h = (h ^ words[i]) * 0xBF58476D1CE4E5B9L;
      h ^= h >>> 29;
    }
    return (int) (h ^ (h >>> 32));
  }
}
