package org.kingbolt.bounds;

import java.util.ArrayList;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.Objects;
import java.util.function.Supplier;
import org.kingbolt.core.Budget;
import org.kingbolt.core.BudgetExceededException;
import org.kingbolt.core.CoherentSystem;
import org.kingbolt.core.ModularDecomposition;
import org.kingbolt.core.ModularDecomposition.Module;
import org.kingbolt.core.Probability;
import org.kingbolt.core.Structure;

/** Esary-Proschan bounds of every module, put in the place of the modules in the whole. */
final class Modular {

  static final String NAME = "Esary-Proschan by modules";

  private Modular() {}

  /**
   * The bounds of the whole where it has no modules.
   *
   * @param whole its families, for that case
   */
  static Interval of(
      Structure structure,
      ComponentValues values,
      Supplier<Families> whole,
      Budget budget,
      Effort effort) {
    List<Module> modules = ModularDecomposition.of(structure, budget).modules();
    if (modules.size() == 1) {
      Interval flat = EsaryProschan.of(whole.get(), budget, effort);
      return new Interval(
          flat.lower(),
          flat.upper(),
          flat.assumption(),
          NAME,
          "no modules were found in the whole; " + flat.reason());
    }
    Map<String, Probability> least = new HashMap<>();
    Map<String, Probability> most = new HashMap<>();
    for (int i = 0; i < values.size(); i++) {
      Probability value = Probability.of(values.working[i], values.failing[i]);
      least.put(values.names.get(i), value);
      most.put(values.names.get(i), value);
    }
    List<BudgetExceededException> failures = new ArrayList<>();
    Probability lower = Probability.IMPOSSIBLE;
    Probability upper = Probability.CERTAIN;
    for (Module module : modules) {
      CoherentSystem system = module.structure().compile(budget);
      Families worst = families(system, least, budget);
      Families best = families(system, most, budget);
      lower =
          attempt(
              () -> EsaryProschan.lower(worst, budget, effort), Probability.IMPOSSIBLE, failures);
      upper =
          attempt(() -> EsaryProschan.upper(best, budget, effort), Probability.CERTAIN, failures);
      least.put(module.name(), lower);
      most.put(module.name(), upper);
    }
    if (!failures.isEmpty()
        && lower.equals(Probability.IMPOSSIBLE)
        && upper.equals(Probability.CERTAIN)) {
      throw failures.get(0);
    }
    return new Interval(
        lower,
        upper,
        Assumption.INDEPENDENT,
        NAME,
        "the bounds of "
            + (modules.size() - 1)
            + " modules and of the whole put together: a coherent system works more often with better modules"
            + (failures.isEmpty()
                ? ""
                : "; ends of modules with too many sets for the budget are trivial"));
  }

  private static Probability attempt(
      Supplier<Probability> end, Probability otherwise, List<BudgetExceededException> failures) {
    try {
      return end.get();
    } catch (BudgetExceededException over) {
      if (over.limit() == BudgetExceededException.Limit.INTERRUPT) {
        throw over;
      }
      failures.add(over);
      return otherwise;
    }
  }

  private static Families families(
      CoherentSystem system, Map<String, Probability> byName, Budget budget) {
    List<Probability> found = new ArrayList<>();
    for (String name : system.components()) {
      found.add(Objects.requireNonNull(byName.get(name)));
    }
    return new CompiledFamilies(system, new ComponentValues(system.components(), found), budget);
  }
}
