package org.kingbolt.importance;

import com.google.common.collect.ImmutableList;

/**
 * A rule about which items go together.
 *
 * @param kind what the rule says
 * @param members the items; for {@code REQUIRES} the one that needs, and the one needed
 */
record PlanLimit(Kind kind, ImmutableList<Integer> members) {

  enum Kind {
    AT_MOST_ONE,
    EXACTLY_ONE,
    REQUIRES
  }
}
