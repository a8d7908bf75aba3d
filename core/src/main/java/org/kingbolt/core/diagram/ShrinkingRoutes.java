package org.kingbolt.core.diagram;

import java.util.Arrays;
import java.util.function.Predicate;
import org.jspecify.annotations.Nullable;

/**
 * Path sets of any monotone function that can only be asked: what is not needed is taken away, in
 * halves. Cost: a number of questions of the order of the path set's size times the logarithm of
 * the number of slots. For one thread.
 *
 * <p>Method: Junker, QuickXplain, AAAI 2004 (from memory), with bisection for the next needed slot.
 */
final class ShrinkingRoutes implements RouteFinder {

  private final int slots;
  private final Predicate<boolean[]> works;

  /**
   * Makes a finder.
   *
   * @param slots the number of slots
   * @param works the function, given which slots work; it must not keep or change the array
   */
  public ShrinkingRoutes(int slots, Predicate<boolean[]> works) {
    this.slots = slots;
    this.works = works;
  }

  @Override
  public int @Nullable [] find(boolean[] barred, boolean[] free) {
    int[] usable = new int[slots];
    int count = 0;
    for (int slot = 0; slot < slots; slot++) {
      if (!barred[slot] && !free[slot]) {
        usable[count++] = slot;
      }
    }
    boolean[] state = free.clone();
    if (!worksWith(state, usable, 0, count)) {
      return null;
    }
    int[] needed = new int[count];
    int found = 0;
    int end = count;
    while (!works.test(state)) {
      // the shortest beginning that suffices ends with a slot that is needed
      int low = 0;
      int high = end;
      while (high - low > 1) {
        int middle = (low + high) >>> 1;
        if (worksWith(state, usable, 0, middle)) {
          high = middle;
        } else {
          low = middle;
        }
      }
      end = high - 1;
      needed[found++] = usable[end];
      state[usable[end]] = true;
    }
    return Arrays.copyOf(needed, found);
  }

  private boolean worksWith(boolean[] state, int[] usable, int from, int to) {
    for (int i = from; i < to; i++) {
      state[usable[i]] = true;
    }
    boolean answer = works.test(state);
    for (int i = from; i < to; i++) {
      state[usable[i]] = false;
    }
    return answer;
  }
}
