package org.kingbolt.importance;

import com.google.common.collect.ImmutableList;

/**
 * Something that is chosen or not: an option, or one content of an allocation.
 *
 * @param name for people
 * @param cost by resource, in the units of {@link PlanCosts}; not changed
 * @param effects at most one setting and one multiplying for each variable
 */
@SuppressWarnings("ArrayRecordComponent")
record PlanItem(String name, long[] cost, ImmutableList<PlanEffect> effects) {}
