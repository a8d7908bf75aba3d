package org.kingbolt.importance;

/**
 * What is asked.
 *
 * @param kind the question
 * @param limits by resource: the most that may be spent; not changed
 * @param resource what is saved, when cheapest plans or all efficient ones are asked for
 * @param targetRank the rank that a plan must reach, when the cheapest is asked for
 * @param logTarget the log of the failing probability that belongs to it
 */
@SuppressWarnings("ArrayRecordComponent")
record PlanGoal(Kind kind, long[] limits, int resource, double targetRank, double logTarget) {

  enum Kind {
    BEST,
    CHEAPEST,
    FRONTIER
  }

  static PlanGoal best(long[] limits) {
    return new PlanGoal(Kind.BEST, limits, 0, 0, 0);
  }

  static PlanGoal cheapest(long[] limits, int resource, double targetRank, double logTarget) {
    return new PlanGoal(Kind.CHEAPEST, limits, resource, targetRank, logTarget);
  }

  static PlanGoal frontier(long[] limits, int resource) {
    return new PlanGoal(Kind.FRONTIER, limits, resource, 0, 0);
  }
}
