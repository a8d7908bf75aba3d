package org.kingbolt.core.diagram;

import java.util.Arrays;

/**
 * The distinct states before one decision of a sweep, numbered in order of discovery, in one pool
 * of words with an open-addressed index. While all states have the same length nothing else is
 * held. For one thread.
 */
final class StateLayer {

  private long[] pool = new long[64];

  /** Where each state starts, once lengths differ; empty before. */
  private int[] starts = NONE;

  private static final int[] NONE = {};

  /** Words a state while all have the same number. */
  private int stride;

  private int[] index = new int[64];
  private int count;
  private int words;

  int count() {
    return count;
  }

  long[] pool() {
    return pool;
  }

  int start(int state) {
    return starts.length == 0 ? state * stride : starts[state];
  }

  int length(int state) {
    return starts.length == 0 ? stride : starts[state + 1] - starts[state];
  }

  /** Memory held, and as much again where the next growth will need it. */
  long bytes() {
    return 12L * pool.length + 6L * index.length + 6L * starts.length;
  }

  /** Forgets all states. */
  void clear() {
    count = 0;
    words = 0;
    starts = NONE;
    Arrays.fill(index, 0);
  }

  /** Finds or adds a state and returns its number. */
  int add(StateWords state) {
    int length = state.length;
    if (count == 0) {
      stride = length;
    } else if (length != stride && starts.length == 0) {
      noteStarts();
    }
    return starts.length == 0 && length == 1 ? addWord(state.words[0]) : addWords(state);
  }

  private int addWord(long word) {
    int mask = index.length - 1;
    int at = mix(word) & mask;
    for (int entry = index[at]; entry != 0; entry = index[at]) {
      if (pool[entry - 1] == word) {
        return entry - 1;
      }
      at = (at + 1) & mask;
    }
    if (count << 1 >= mask) {
      growIndex();
      return addWord(word);
    }
    reserve(1);
    pool[words++] = word;
    index[at] = ++count;
    return count - 1;
  }

  private int addWords(StateWords state) {
    int mask = index.length - 1;
    int at = hash(state.words, 0, state.length) & mask;
    for (int entry = index[at]; entry != 0; entry = index[at]) {
      int from = start(entry - 1);
      if (length(entry - 1) == state.length
          && Arrays.equals(pool, from, from + state.length, state.words, 0, state.length)) {
        return entry - 1;
      }
      at = (at + 1) & mask;
    }
    if (count << 1 >= mask) {
      growIndex();
      return addWords(state);
    }
    reserve(state.length);
    System.arraycopy(state.words, 0, pool, words, state.length);
    words += state.length;
    index[at] = ++count;
    if (starts.length > 0) {
      if (count + 1 >= starts.length) {
        starts = Arrays.copyOf(starts, starts.length << 1);
      }
      starts[count] = words;
    }
    return count - 1;
  }

  private void reserve(int more) {
    if (words + more > pool.length) {
      pool = Arrays.copyOf(pool, Math.max(pool.length << 1, words + more));
    }
  }

  private void noteStarts() {
    starts = new int[Math.max(16, count << 1)];
    for (int state = 0; state <= count; state++) {
      starts[state] = state * stride;
    }
    if (stride == 1) {
      // single words have been found by another hash
      fillIndex();
    }
  }

  private void growIndex() {
    index = new int[index.length << 1];
    fillIndex();
  }

  private void fillIndex() {
    Arrays.fill(index, 0);
    int mask = index.length - 1;
    boolean single = starts.length == 0 && stride == 1;
    for (int state = 0; state < count; state++) {
      int from = start(state);
      int at = (single ? mix(pool[from]) : hash(pool, from, from + length(state))) & mask;
      while (index[at] != 0) {
        at = (at + 1) & mask;
      }
      index[at] = state + 1;
    }
  }

  private static int mix(long word) {
    long h = (word ^ word >>> 32) * 0x9E3779B97F4A7C15L;
    h ^= h >>> 29;
    return (int) ((h * 0xBF58476D1CE4E5B9L) >>> 32);
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
