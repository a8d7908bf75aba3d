package org.kingbolt.bounds;

import java.util.ArrayList;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.Objects;
import org.kingbolt.core.Budget;
import org.kingbolt.core.CoherentSystem;
import org.kingbolt.core.ModularDecomposition;
import org.kingbolt.core.ModularDecomposition.Module;
import org.kingbolt.core.Probability;
import org.kingbolt.core.Structure;

/** Esary-Proschan bounds of every module, put in the place of the modules in the whole. */
final class Modular {

  private Modular() {}

  static Interval of(Structure structure, ComponentValues values, Budget budget, Effort effort) {
    Map<String, Probability> least = new HashMap<>();
    Map<String, Probability> most = new HashMap<>();
    for (int i = 0; i < values.size(); i++) {
      Probability value = Probability.of(values.working[i], values.failing[i]);
      least.put(values.names.get(i), value);
      most.put(values.names.get(i), value);
    }
    List<Module> modules = ModularDecomposition.of(structure, budget).modules();
    Probability lower = Probability.IMPOSSIBLE;
    Probability upper = Probability.CERTAIN;
    for (Module module : modules) {
      CoherentSystem system = module.structure().compile(budget);
      lower = EsaryProschan.lower(families(system, least, budget), budget, effort);
      upper = EsaryProschan.upper(families(system, most, budget), budget, effort);
      least.put(module.name(), lower);
      most.put(module.name(), upper);
    }
    return new Interval(
        lower,
        upper,
        Assumption.INDEPENDENT,
        "Esary-Proschan by modules",
        "the bounds of "
            + (modules.size() == 1 ? "the whole" : modules.size() - 1 + " modules and of the whole")
            + " put together: a coherent system works more often with better modules");
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
