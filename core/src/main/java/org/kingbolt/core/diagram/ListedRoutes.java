package org.kingbolt.core.diagram;

import java.util.List;
import org.jspecify.annotations.Nullable;

/** Path sets that are listed beforehand: the one with the fewest slots that are not free. */
final class ListedRoutes implements RouteFinder {

  private final int[][] sets;

  /**
   * Makes a finder.
   *
   * @param sets path sets, among them all minimal ones
   */
  ListedRoutes(List<int[]> sets) {
    this.sets = sets.toArray(new int[0][]);
  }

  @Override
  public int @Nullable [] find(boolean[] barred, boolean[] free) {
    int best = -1;
    int fewest = Integer.MAX_VALUE;
    for (int i = 0; i < sets.length && fewest > 0; i++) {
      int open = 0;
      for (int slot : sets[i]) {
        if (barred[slot]) {
          open = Integer.MAX_VALUE;
          break;
        }
        open += free[slot] ? 0 : 1;
      }
      if (open < fewest) {
        best = i;
        fewest = open;
      }
    }
    if (best < 0) {
      return null;
    }
    int[] found = new int[fewest];
    int count = 0;
    for (int slot : sets[best]) {
      if (!free[slot]) {
        found[count++] = slot;
      }
    }
    return found;
  }
}
