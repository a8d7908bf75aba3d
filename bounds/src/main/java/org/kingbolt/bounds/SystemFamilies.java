package org.kingbolt.bounds;

import java.util.ArrayList;
import java.util.List;
import java.util.function.BiFunction;
import org.jspecify.annotations.Nullable;
import org.kingbolt.core.Budget;
import org.kingbolt.core.BudgetExceededException;
import org.kingbolt.core.CoherentSystem;
import org.kingbolt.core.Structure;

/** The path and cut sets of one system at given probabilities, compiled when first needed. */
final class SystemFamilies {

  private final Structure structure;
  private final ComponentValues values;

  /** Two threads may both compile. */
  private volatile @Nullable CoherentSystem system;

  SystemFamilies(Structure structure, @Nullable CoherentSystem system, ComponentValues values) {
    this.structure = structure;
    this.system = system;
    this.values = values;
  }

  /** All minimal sets. */
  Families all(Budget budget) {
    return new CompiledFamilies(compiled(budget), values, budget);
  }

  CoherentSystem compiled(Budget budget) {
    BoundsAtProbabilities.requireBudget(budget);
    CoherentSystem known = system;
    if (known == null) {
      known = structure.compile(budget);
      system = known;
    }
    return known;
  }

  /**
   * For bounds from single sets, which need no diagram: what is too large has sets all the same.
   */
  Families some(Budget budget) {
    try {
      return all(budget);
    } catch (BudgetExceededException over) {
      if (over.limit() == BudgetExceededException.Limit.INTERRUPT) {
        throw over;
      }
      return new FoundFamilies(structure, values, over);
    }
  }

  /**
   * All intervals.
   *
   * @param certified gives the certified one
   */
  BoundsTable table(Budget budget, BiFunction<Budget, Effort, Interval> certified) {
    // what cannot be compiled is not tried again by every method
    Families some = some(budget);
    List<BoundsTable.Method> methods = new ArrayList<>();
    methods.add(new BoundsTable.Method("certified", certified));
    methods.add(
        new BoundsTable.Method(
            Modular.NAME,
            (given, effort) -> Modular.of(structure, values, () -> some, given, effort)));
    methods.addAll(Closed.methods(some));
    return BoundsTable.of(methods, budget);
  }
}
