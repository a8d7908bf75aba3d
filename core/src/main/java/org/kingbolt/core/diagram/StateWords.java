package org.kingbolt.core.diagram;

import java.util.Arrays;

/** A growable run of words: one state of a sweep, as it is being written. For one thread. */
final class StateWords {

  long[] words = new long[8];
  int length;

  void clear() {
    length = 0;
  }

  void add(long word) {
    if (length == words.length) {
      words = Arrays.copyOf(words, length << 1);
    }
    words[length++] = word;
  }
}
