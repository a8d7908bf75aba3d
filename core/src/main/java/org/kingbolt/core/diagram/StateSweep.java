package org.kingbolt.core.diagram;

import java.util.Arrays;

/**
 * Turns a {@link StateRule} into a template: one layer of distinct states a decision, merged as
 * they are made. Cost: one hash look-up a state and outcome; memory: all layers' nodes and two
 * layers of states.
 */
final class StateSweep {

  private StateSweep() {}

  static Diagram template(StateRule rule, WorkMeter meter) {
    StateWords next = new StateWords();
    int settled = rule.start(next);
    if (settled != StateRule.CONTINUES) {
      return Diagram.constant(settled == StateRule.SETTLED_WORKS);
    }
    Layers layers = new Layers();
    StateLayer present = new StateLayer();
    StateLayer following = new StateLayer();
    present.add(next);
    long held = 0;
    for (int step = 0; present.count() > 0; step++) {
      int count = present.count();
      int[] low = new int[count];
      int[] high = new int[count];
      for (int state = 0; state < count; state++) {
        meter.at(held + state + ((following.words() + present.words()) >> 2));
        low[state] = follow(rule, step, false, present, state, next, following);
        high[state] = follow(rule, step, true, present, state, next, following);
      }
      layers.add(rule.slot(step), low, high);
      held += count;
      StateLayer spare = present;
      present = following;
      following = spare;
      following.clear();
    }
    return layers.diagram();
  }

  private static int follow(
      StateRule rule,
      int step,
      boolean works,
      StateLayer present,
      int state,
      StateWords next,
      StateLayer following) {
    next.clear();
    int settled =
        rule.next(step, works, present.pool(), present.start(state), present.length(state), next);
    return settled == StateRule.CONTINUES ? following.add(next) : settled;
  }

  /** The identity order of a rule without one of its own. */
  static int[] identity(int length) {
    int[] order = new int[length];
    Arrays.setAll(order, i -> i);
    return order;
  }
}
