package org.kingbolt.importance;

/**
 * The worst and the best that a variable can be, limits aside.
 *
 * @param leastWorking of everything that can be in place, the least probability of working
 * @param mostFailing the failing side that belongs to it
 * @param mostWorking of everything that can be in place, the most
 * @param leastFailing the failing side that belongs to it
 */
record PlanRange(double leastWorking, double mostFailing, double mostWorking, double leastFailing) {

  /** Those of the variables that are read, by step. */
  static PlanRange[] all(PlanModel model, PlanSteps steps) {
    PlanRange[] ranges = new PlanRange[steps.count()];
    for (int at = 0; at < ranges.length; at++) {
      ranges[at] = of(model, steps.variable(at));
    }
    return ranges;
  }

  private static PlanRange of(PlanModel model, int variable) {
    boolean present = !isAlwaysSet(model, variable);
    double worstWorks = present ? model.working()[variable] : 1;
    double worstFails = present ? model.failing()[variable] : 0;
    double bestWorks = present ? model.working()[variable] : 0;
    double bestFails = present ? model.failing()[variable] : 1;
    double less = 0;
    double factor = 1;
    for (PlanItem item : model.items()) {
      for (PlanEffect effect : item.effects()) {
        if (effect.variable() == variable && effect.sets()) {
          worstWorks = Math.min(worstWorks, effect.working());
          worstFails = Math.max(worstFails, effect.failing());
          bestWorks = Math.max(bestWorks, effect.working());
          bestFails = Math.min(bestFails, effect.failing());
        } else if (effect.variable() == variable) {
          less = Math.min(1, less + factor * effect.working());
          factor *= effect.failing();
        }
      }
    }
    return new PlanRange(
        worstWorks, worstFails, Math.min(1, bestWorks + bestFails * less), bestFails * factor);
  }

  /** Whether the unit in place is one that some allocation chooses. */
  private static boolean isAlwaysSet(PlanModel model, int variable) {
    return model.limits().stream()
        .anyMatch(
            limit ->
                limit.kind() == PlanLimit.Kind.EXACTLY_ONE
                    && limit.members().stream()
                        .allMatch(member -> PlanOrder.sets(model, member, variable)));
  }
}
