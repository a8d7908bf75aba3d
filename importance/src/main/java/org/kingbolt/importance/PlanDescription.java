package org.kingbolt.importance;

import com.google.common.collect.ImmutableList;
import java.util.Map;
import org.jspecify.annotations.Nullable;
import org.kingbolt.core.Probabilities;
import org.kingbolt.core.Structure;

/**
 * What a plan has to choose from, as the caller described it.
 *
 * @param structure the present system
 * @param p the present probabilities, if given
 * @param options all of different names
 * @param allocations all of different components
 * @param limits rules that name options
 */
record PlanDescription(
    Structure structure,
    @Nullable Probabilities p,
    ImmutableList<ImprovementOption> options,
    ImmutableList<ImprovementAllocation> allocations,
    ImmutableList<Named> limits) {

  /**
   * A rule over options by name.
   *
   * @param kind what it says
   * @param names the options
   */
  record Named(PlanLimit.Kind kind, ImmutableList<String> names) {

    PlanLimit numbered(Map<String, Integer> numbers) {
      ImmutableList.Builder<Integer> members = ImmutableList.builder();
      for (String name : names) {
        Integer number = numbers.get(name);
        if (number == null) {
          throw new IllegalArgumentException(
              "a limit names the unknown option "
                  + PlanCheck.quoted(name)
                  + "; the options are "
                  + PlanCheck.listed(numbers.keySet().stream().sorted().toList())
                  + "; add it with ImprovementPlan.with, or name one of these");
        }
        members.add(number);
      }
      return new PlanLimit(kind, members.build());
    }
  }
}
