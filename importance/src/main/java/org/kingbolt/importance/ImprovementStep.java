package org.kingbolt.importance;

import com.google.common.collect.ImmutableMap;
import java.util.Map;
import org.kingbolt.core.Probability;

/**
 * One step of an improvement plan: an option is chosen in addition to those before, or takes the
 * place of another that excludes it.
 *
 * @param option the option's name, or a content of an allocation
 * @param costs what the step costs more, by resource; negative where it takes something dearer away
 * @param before the system's probability before the step
 * @param after the system's probability after it
 */
public record ImprovementStep(
    String option, Map<String, Double> costs, Probability before, Probability after) {

  /**
   * Makes a step.
   *
   * @param option the option's name
   * @param costs by resource
   * @param before the system's probability before the step
   * @param after the system's probability after it
   */
  public ImprovementStep {
    PlanCheck.name(option, "the option's name");
    costs = ImmutableMap.copyOf(PlanCheck.notNull(costs, "the costs"));
    PlanCheck.notNull(before, "the probability before the step");
    PlanCheck.notNull(after, "the probability after the step");
  }

  /**
   * How much less likely the system is to fail after the step.
   *
   * @return from -1 to 1, taken on the side that keeps more digits
   */
  public double gain() {
    return before.failing() <= 0.5
        ? before.failing() - after.failing()
        : after.working() - before.working();
  }

  /**
   * The gain for each unit of a resource.
   *
   * @param resource one of those in {@link #costs()}
   * @return the gain divided by the cost; infinite for a gain that costs nothing or less
   * @throws IllegalArgumentException if there is no such resource
   */
  public double gainPer(String resource) {
    Double cost = costs.get(PlanCheck.notNull(resource, "the resource"));
    if (cost == null) {
      throw new IllegalArgumentException(
          "unknown resource "
              + PlanCheck.quoted(resource)
              + "; the resources are "
              + PlanCheck.listed(costs.keySet())
              + "; name one of these");
    }
    double gain = gain();
    return cost > 0 ? gain / cost : gain > 0 ? Double.POSITIVE_INFINITY : 0;
  }
}
