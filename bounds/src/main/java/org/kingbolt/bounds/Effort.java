package org.kingbolt.bounds;

/** Counts the sets, terms, pairs or steps that one method has gone through. For one thread. */
final class Effort {

  private long steps;

  void add(long more) {
    steps += more;
  }

  long steps() {
    return steps;
  }
}
