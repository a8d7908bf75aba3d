package org.kingbolt.importance;

import com.google.common.collect.ImmutableList;
import java.util.List;
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

  static PlanDescription of(Structure structure) {
    return new PlanDescription(
        structure, null, ImmutableList.of(), ImmutableList.of(), ImmutableList.of());
  }

  PlanDescription given(Probabilities present) {
    return new PlanDescription(structure, present, options, allocations, limits);
  }

  PlanDescription choosingFrom(
      List<ImprovementOption> all, List<ImprovementAllocation> allAllocations) {
    return new PlanDescription(
        structure, p, ImmutableList.copyOf(all), ImmutableList.copyOf(allAllocations), limits);
  }

  PlanDescription limited(Named limit) {
    ImmutableList<Named> all = ImmutableList.<Named>builder().addAll(limits).add(limit).build();
    return new PlanDescription(structure, p, options, allocations, all);
  }

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
