package org.kingbolt.importance;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.BitSet;
import java.util.Comparator;
import java.util.List;
import java.util.stream.IntStream;

/**
 * At which step each item is decided, and how long its decision must be remembered: until the last
 * variable that it changes has been read and all items that share a limit with it are decided.
 */
final class PlanOrder {

  private final int[][] decided;
  private final BitSet[] open;
  private final BitSet limited = new BitSet();
  private final List<List<PlanLimit>> ending = new ArrayList<>();
  private final List<List<PlanLimit>> limitsOf = new ArrayList<>();
  private final int[] step;

  PlanOrder(PlanModel model, PlanSteps steps) {
    int items = model.items().size();
    int count = steps.count();
    int[] stepOf = new int[model.working().length];
    Arrays.fill(stepOf, -1);
    for (int at = 0; at < count; at++) {
      stepOf[steps.variable(at)] = at;
    }
    this.step = new int[items];
    int[] needed = new int[items];
    Arrays.fill(step, count);
    for (int i = 0; i < items; i++) {
      limitsOf.add(new ArrayList<>());
      for (PlanEffect effect : model.items().get(i).effects()) {
        int at = stepOf[effect.variable()];
        if (at >= 0) {
          step[i] = Math.min(step[i], at);
          needed[i] = Math.max(needed[i], at);
        }
      }
    }
    for (int at = 0; at < count; at++) {
      ending.add(new ArrayList<>());
    }
    settleTheFree(model, count);
    BitSet never = new BitSet();
    for (int i = 0; i < items; i++) {
      never.set(i, step[i] == count);
    }
    for (PlanLimit limit : model.limits()) {
      int last = 0;
      for (int member : limit.members()) {
        last = never.get(member) ? last : Math.max(last, step[member]);
        limited.set(member);
        limitsOf.get(member).add(limit);
      }
      for (int member : limit.members()) {
        needed[member] = Math.max(needed[member], last);
      }
      ending.get(last).add(limit);
    }
    this.open = new BitSet[count];
    this.decided = new int[count][];
    for (int at = 0; at < count; at++) {
      int now = at;
      open[at] = new BitSet(items);
      for (int i = 0; i < items; i++) {
        open[at].set(i, step[i] <= at && needed[i] > at);
      }
      int variable = steps.variable(at);
      decided[at] =
          IntStream.range(0, items)
              .filter(i -> step[i] == now)
              .boxed()
              .sorted(Comparator.comparing(i -> !sets(model, i, variable)))
              .mapToInt(Integer::intValue)
              .toArray();
    }
  }

  /**
   * Items that change nothing that matters are decided with the first that they share a limit with.
   * They are never chosen, and keep the step after the last, unless a limit may ask for them.
   */
  private void settleTheFree(PlanModel model, int count) {
    boolean changed = true;
    while (changed) {
      changed = false;
      for (PlanLimit limit : model.limits()) {
        int first = limit.kind() == PlanLimit.Kind.EXACTLY_ONE ? count - 1 : count;
        for (int member : limit.members()) {
          first = Math.min(first, step[member]);
        }
        boolean asks =
            switch (limit.kind()) {
              case AT_MOST_ONE -> false;
              case EXACTLY_ONE -> true;
              case REQUIRES -> step[limit.members().get(0)] < count;
            };
        for (int member : limit.members()) {
          if (asks && step[member] == count) {
            step[member] = first;
            changed = true;
          }
        }
      }
    }
  }

  static boolean sets(PlanModel model, int item, int variable) {
    return model.items().get(item).effects().stream()
        .anyMatch(effect -> effect.variable() == variable && effect.sets());
  }

  /** The items decided at a step, those that set its variable first. */
  int[] decided(int at) {
    return decided[at];
  }

  /** The items decided at a step or before whose decision matters after it. */
  BitSet open(int at) {
    return at < 0 ? new BitSet() : open[at];
  }

  /** The step at which an item is decided. */
  int step(int item) {
    return step[item];
  }

  /** The limits whose last item is decided at a step. */
  List<PlanLimit> ending(int at) {
    return ending.get(at);
  }

  List<PlanLimit> limitsOf(int item) {
    return limitsOf.get(item);
  }

  /** The items under any limit. */
  BitSet limited() {
    return limited;
  }
}
