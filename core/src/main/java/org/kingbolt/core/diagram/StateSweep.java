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
        meter.at(held + state + nodes(present, following, 0));
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

  /**
   * Sums up both probabilities on the way, without making a template: two layers of states are all
   * that is held.
   *
   * @param works indexed by slot
   * @param fails indexed by slot
   * @param result receives the probability of working and of failing, each a sum of non-negative
   *     terms
   */
  static void expect(
      StateRule rule, double[] works, double[] fails, double[] result, WorkMeter meter) {
    result[0] = 0;
    result[1] = 0;
    StateWords next = new StateWords();
    int settled = rule.start(next);
    if (settled != StateRule.CONTINUES) {
      result[settled == StateRule.SETTLED_WORKS ? 0 : 1] = 1;
      return;
    }
    StateLayer present = new StateLayer();
    StateLayer following = new StateLayer();
    present.add(next);
    double[] mass = {1};
    double[] nextMass = new double[16];
    for (int step = 0; present.count() > 0; step++) {
      double up = works[rule.slot(step)];
      double down = fails[rule.slot(step)];
      int count = present.count();
      for (int state = 0; state < count; state++) {
        meter.at(nodes(present, following, mass.length + nextMass.length));
        if (nextMass.length < following.count() + 2) {
          nextMass = Arrays.copyOf(nextMass, nextMass.length << 1);
        }
        int low = follow(rule, step, false, present, state, next, following);
        add(low, down * mass[state], nextMass, result);
        int high = follow(rule, step, true, present, state, next, following);
        add(high, up * mass[state], nextMass, result);
      }
      StateLayer spare = present;
      present = following;
      following = spare;
      following.clear();
      double[] spareMass = mass;
      mass = nextMass;
      nextMass = spareMass;
      Arrays.fill(nextMass, 0);
    }
  }

  /** The memory of two layers and their masses, in nodes. */
  private static long nodes(StateLayer present, StateLayer following, long masses) {
    return (present.bytes() + following.bytes() + 12 * masses) / WorkMeter.BYTES_PER_NODE;
  }

  private static void add(int to, double mass, double[] nextMass, double[] result) {
    if (to >= 0) {
      nextMass[to] += mass;
    } else {
      result[to == StateRule.SETTLED_WORKS ? 0 : 1] += mass;
    }
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
