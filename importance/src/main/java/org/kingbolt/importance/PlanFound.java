package org.kingbolt.importance;

import java.util.BitSet;

/**
 * A whole plan that was found.
 *
 * @param chosen the items; not changed
 * @param cost by resource; not changed
 * @param works the system's probability of working
 * @param fails the other side
 */
@SuppressWarnings("ArrayRecordComponent")
record PlanFound(BitSet chosen, long[] cost, double works, double fails) {

  double rank() {
    return PlanLabels.rank(works, fails);
  }
}
