package org.kingbolt.core;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import java.util.Set;
import org.jspecify.annotations.Nullable;

/**
 * The key on which to condition a structure that does not fall apart by itself, and what is left on
 * either side. Every candidate is tried; the one is kept whose two sides come apart best: fewest
 * components left undecided, then the shortest and then the flattest formula.
 */
final class KeyChoice {

  /** More candidates than this are thinned out evenly. */
  private static final int MOST_TRIED = 48;

  private static final Comparator<KeyChoice> ORDER =
      Comparator.comparingInt((KeyChoice choice) -> choice.sum(Decomposition.Measure::unresolved))
          .thenComparingInt(choice -> choice.sum(Decomposition.Measure::symbols))
          .thenComparingInt(choice -> choice.sum(Decomposition.Measure::depth));

  /** The key: a component, or a part that shares nothing with the other parts. */
  final Structure key;

  final Structure working;
  final Structure failed;
  private final List<Decomposition.Measure> sides;

  private KeyChoice(Structure key, Structure working, Structure failed, Runnable pause) {
    this.key = key;
    this.working = working;
    this.failed = failed;
    this.sides =
        List.of(
            Decomposition.of(working, pause).measure(), Decomposition.of(failed, pause).measure());
  }

  private int sum(java.util.function.ToIntFunction<Decomposition.Measure> field) {
    return sides.stream().mapToInt(field).sum();
  }

  /**
   * The best key of a structure that is neither a component nor independent series or parallel.
   *
   * @param pause called at least once a candidate; may end the work by throwing
   */
  static KeyChoice best(Structure structure, Runnable pause) {
    Set<String> repeated = Decomposition.repeated(structure);
    KeyChoice best = null;
    if (repeated.isEmpty()) {
      List<Structure> parts = structure.parts();
      boolean alike = structure instanceof GateStructure;
      int most = alike ? 1 : MOST_TRIED;
      int stride = (parts.size() + most - 1) / most;
      for (int i = 0; i < parts.size(); i += stride) {
        pause.run();
        best = better(best, onPart(structure, i, pause));
      }
    } else {
      List<String> names = List.copyOf(repeated);
      int stride = (names.size() + MOST_TRIED - 1) / MOST_TRIED;
      for (int i = 0; i < names.size(); i += stride) {
        String name = names.get(i);
        pause.run();
        best =
            better(
                best,
                new KeyChoice(
                    Structure.component(name),
                    structure.givenWorking(name),
                    structure.givenFailed(name),
                    pause));
      }
    }
    if (best == null) {
      throw new AssertionError("no key for " + structure);
    }
    return best;
  }

  /** The first of the best. */
  private static KeyChoice better(@Nullable KeyChoice best, KeyChoice next) {
    return best == null || ORDER.compare(next, best) < 0 ? next : best;
  }

  private static KeyChoice onPart(Structure structure, int part, Runnable pause) {
    return new KeyChoice(
        structure.parts().get(part),
        holding(structure, part, ConstantStructure.ALWAYS),
        holding(structure, part, ConstantStructure.NEVER),
        pause);
  }

  private static Structure holding(Structure structure, int part, Structure constant) {
    List<Structure> parts = new ArrayList<>(structure.parts());
    parts.set(part, constant);
    return structure.rebuild(parts);
  }
}
