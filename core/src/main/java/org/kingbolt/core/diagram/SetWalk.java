package org.kingbolt.core.diagram;

import org.jspecify.annotations.Nullable;

/** A walk over the sets of a family, made one at a time. For one thread. */
public interface SetWalk {

  /**
   * Moves to the next set.
   *
   * @return its variables in order of levels, in a fresh array; null when there is none left
   */
  int @Nullable [] next();
}
