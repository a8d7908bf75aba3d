package org.kingbolt.core.diagram;

import org.jspecify.annotations.Nullable;

/**
 * Finds path sets of a monotone function of slots, one at a time: what a {@link CutTree} asks again
 * and again. For one thread.
 */
public interface RouteFinder {

  /**
   * Finds a path set among the slots that are not barred, with few slots that are not free.
   *
   * @param barred indexed by slot: true where the slot has failed
   * @param free indexed by slot: true where the slot is known to work; never also barred
   * @return the slots that are not free of some path set, in a fresh array, none where the free
   *     slots suffice; null when the function fails with all barred slots failed
   */
  int @Nullable [] find(boolean[] barred, boolean[] free);

  /**
   * Tells whether the function works; where this finder is one of several that make up a function,
   * the function as a whole.
   *
   * @param barred indexed by slot: true where the slot has failed
   * @return whether it works with all other slots working
   */
  default boolean works(boolean[] barred) {
    return find(barred, new boolean[barred.length]) != null;
  }
}
