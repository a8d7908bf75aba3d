package org.kingbolt.bounds;

import java.util.Arrays;
import java.util.Comparator;
import java.util.HashSet;
import java.util.Optional;
import java.util.Set;
import java.util.function.Consumer;
import org.kingbolt.core.BudgetExceededException;
import org.kingbolt.core.Structure;
import org.kingbolt.core.diagram.WorkMeter;

/**
 * Of a structure too large to compile: one minimal path set and one minimal cut set, found by
 * removing components from a set, the heaviest first, as long as it stays one. Not the lightest,
 * but what bounds from single sets need.
 */
final class FoundFamilies extends Families {

  private final Structure structure;
  private final BudgetExceededException why;

  FoundFamilies(Structure structure, ComponentValues values, BudgetExceededException why) {
    super(values);
    this.structure = structure;
    this.why = why;
  }

  @Override
  void forEach(boolean paths, WorkMeter meter, Consumer<int[]> action) {
    throw why;
  }

  @Override
  void requireLightest() {
    throw why;
  }

  /** By halving: how many of the heaviest left can go at once; the next one must stay. */
  @Override
  Optional<int[]> lightest(boolean paths, double[] weights, WorkMeter meter) {
    Integer[] order = new Integer[weights.length];
    Arrays.setAll(order, i -> i);
    Arrays.sort(order, Comparator.comparingDouble((Integer i) -> -weights[i]));
    int[] kept = new int[order.length];
    int count = 0;
    int gone = 0;
    while (gone < order.length) {
      int most = order.length + 1;
      int sure = gone;
      while (most - sure > 1) {
        int next = (sure + most) >>> 1;
        meter.now(structure.components().size() / 8);
        if (next <= order.length && isOne(paths, order, next, kept, count)) {
          sure = next;
        } else {
          most = next;
        }
      }
      gone = sure;
      if (gone < order.length) {
        kept[count++] = order[gone++];
      }
    }
    return Optional.of(Arrays.copyOf(kept, count));
  }

  /** Whether what is kept, and what comes later in the order, is a path set or a cut set. */
  private boolean isOne(boolean paths, Integer[] order, int from, int[] kept, int count) {
    Set<String> members = new HashSet<>();
    for (int i = 0; i < count; i++) {
      members.add(values.names.get(kept[i]));
    }
    for (int i = from; i < order.length; i++) {
      members.add(values.names.get(order[i]));
    }
    if (paths) {
      return structure.works(members);
    }
    Set<String> working = new HashSet<>(values.names);
    working.removeAll(members);
    return !structure.works(working);
  }

  @Override
  double discarded(boolean paths) {
    return 1;
  }
}
