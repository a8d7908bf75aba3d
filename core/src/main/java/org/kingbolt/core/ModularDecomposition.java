package org.kingbolt.core;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.HashSet;
import java.util.List;
import java.util.Set;
import org.kingbolt.core.diagram.WorkMeter;

/**
 * A structure taken apart into its modules: parts whose components stand nowhere else, so that the
 * rest of the system knows them by their own state alone.
 *
 * <p>Every operator of the description that is a module becomes an entry of its own, in which the
 * modules inside it stand as components with names of their own. Smaller networks are taken apart
 * by series, parallel and cutting nodes first.
 *
 * <p>Immutable; safe to share between threads.
 *
 * <p>Sources: Birnbaum &amp; Esary, Modules of coherent binary systems, SIAM J. Appl. Math. 13
 * (1965) 444; the modules are found as in Dutuit &amp; Rauzy, IEEE Trans. Reliab. 45 (1996) 422
 * (both from memory).
 *
 * <p>Example: {@code ModularDecomposition.of(structure, Budget.ofHeap()).modules()}.
 */
public final class ModularDecomposition {

  /** Larger networks stand as they are: the reductions take links × links. */
  private static final int MOST_LINKS = 2_000;

  /**
   * One module, or the whole.
   *
   * @param name what it is called in the structures of later modules
   * @param structure over components and the names of earlier modules
   */
  public record Module(String name, Structure structure) {}

  private final List<Module> modules;

  private ModularDecomposition(List<Module> modules) {
    this.modules = List.copyOf(modules);
  }

  /**
   * Finds the modules.
   *
   * @param structure the structure
   * @param budget how much work it may cost
   * @return the decomposition. Cost: linear in the distinct sub-structures; for networks of up to
   *     2,000 links their reduction besides.
   * @throws BudgetExceededException if the budget is used up
   */
  public static ModularDecomposition of(Structure structure, Budget budget) {
    Check.notNull(structure, "structure");
    WorkMeter meter = Check.notNull(budget, "budget").start("finding modules");
    Numbering numbering = new Numbering(reduced(structure, meter), meter);
    boolean[] module = found(numbering);
    Set<String> names = new HashSet<>(numbering.components());
    List<Module> modules = new ArrayList<>();
    List<Structure> standsFor = new ArrayList<>();
    for (int number = 0; number < numbering.size(); number++) {
      Structure here = numbering.structure(number);
      int size = here.parts().size();
      if (size > 0) {
        List<Structure> parts = new ArrayList<>(size);
        for (int slot = 0; slot < size; slot++) {
          parts.add(standsFor.get(numbering.part(number, slot)));
        }
        here = here.rebuild(parts);
      }
      if (number == numbering.size() - 1 || (module[number] && size > 0)) {
        String name = freshName(names, modules.size() + 1);
        modules.add(new Module(name, here));
        here = new ComponentStructure(name);
        meter.at(number);
      }
      standsFor.add(here);
    }
    return new ModularDecomposition(modules);
  }

  private static String freshName(Set<String> taken, int number) {
    String name = "module " + number;
    while (!taken.add(name)) {
      name += "'";
    }
    return name;
  }

  private static Structure reduced(Structure structure, WorkMeter meter) {
    return Fold.over(
        structure,
        new FoldStep<Structure>() {
          @Override
          public Structure component(String name) {
            return new ComponentStructure(name);
          }

          @Override
          public Structure operator(Structure operator, List<Structure> parts) {
            Structure rebuilt = operator.rebuild(parts);
            return rebuilt instanceof NetworkStructure network
                    && network.links().size() <= MOST_LINKS
                ? NetworkReduction.of(network, () -> meter.now(0))
                : rebuilt;
          }
        });
  }

  /** Times of the first and last visit, in one walk that opens everything once. */
  private static boolean[] found(Numbering numbering) {
    int size = numbering.size();
    int[] first = new int[size];
    int[] last = new int[size];
    int[] closing = new int[size];
    int[] next = new int[size];
    int[] open = new int[size];
    int root = size - 1;
    int clock = 1;
    int depth = 0;
    first[root] = clock;
    last[root] = clock;
    open[depth++] = root;
    while (depth > 0) {
      int here = open[depth - 1];
      if (next[here] == numbering.structure(here).parts().size()) {
        closing[here] = ++clock;
        depth--;
        continue;
      }
      int part = numbering.part(here, next[here]++);
      last[part] = ++clock;
      if (first[part] == 0) {
        first[part] = clock;
        open[depth++] = part;
      }
    }
    boolean[] module = new boolean[size];
    int[] earliest = new int[size];
    Arrays.fill(earliest, Integer.MAX_VALUE);
    int[] latest = new int[size];
    for (int number = 0; number < size; number++) {
      for (int slot = numbering.structure(number).parts().size() - 1; slot >= 0; slot--) {
        int part = numbering.part(number, slot);
        earliest[number] = Math.min(earliest[number], Math.min(first[part], earliest[part]));
        latest[number] = Math.max(latest[number], Math.max(last[part], latest[part]));
      }
      module[number] = first[number] < earliest[number] && latest[number] < closing[number];
    }
    return module;
  }

  /**
   * Returns the modules, each after those that stand in it.
   *
   * @return the modules; the last one is the whole system
   */
  public List<Module> modules() {
    return modules;
  }

  /**
   * Lists the modules.
   *
   * @return one line for each
   */
  @Override
  public String toString() {
    StringBuilder text = new StringBuilder();
    for (Module module : modules) {
      text.append(module.name()).append(" = ").append(module.structure()).append('\n');
    }
    return text.toString();
  }
}
