package org.kingbolt.importance;

/**
 * One way to decide the items of a step.
 *
 * @param chosen the items newly chosen, in no particular order
 * @param cost theirs, by resource
 * @param working the step's variable with them
 * @param failing the other side
 * @param key which remembered decisions there are after the step
 */
@SuppressWarnings("ArrayRecordComponent")
record PlanAlternative(int[] chosen, long[] cost, double working, double failing, int key) {}
