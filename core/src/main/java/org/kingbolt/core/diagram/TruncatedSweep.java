package org.kingbolt.core.diagram;

import java.util.Arrays;
import org.jspecify.annotations.Nullable;

/**
 * A sweep that follows only the likeliest states of each layer: the others are taken to settle, all
 * as failing or all as working. What comes out works less often, or more often, than the rule says.
 */
final class TruncatedSweep {

  private final StateRule rule;
  private final double[] works;
  private final double[] fails;
  private final int most;
  private final int otherwise;
  private final WorkMeter meter;
  private StateLayer present = new StateLayer();
  private StateLayer following = new StateLayer();
  private double[] mass = {1};
  private double[] nextMass = new double[16];
  private final StateWords next = new StateWords();
  private final double[] result = new double[2];
  private final @Nullable Layers layers;

  /**
   * Prepares.
   *
   * @param works indexed by slot, to tell which states are likely
   * @param most how many states of a layer are followed
   * @param otherwise where the others settle
   */
  private TruncatedSweep(
      StateRule rule,
      double[] works,
      double[] fails,
      int most,
      int otherwise,
      @Nullable Layers layers,
      WorkMeter meter) {
    this.rule = rule;
    this.works = works;
    this.fails = fails;
    this.most = most;
    this.otherwise = otherwise;
    this.layers = layers;
    this.meter = meter;
  }

  /** Sums up both probabilities on the way; the states not followed add to one of them. */
  static double[] expect(
      StateRule rule, double[] works, double[] fails, int most, int otherwise, WorkMeter meter) {
    TruncatedSweep sweep = new TruncatedSweep(rule, works, fails, most, otherwise, null, meter);
    sweep.run();
    return sweep.result;
  }

  /** Makes a template on the way. */
  static Diagram template(
      StateRule rule, double[] works, double[] fails, int most, int otherwise, WorkMeter meter) {
    Layers layers = new Layers();
    TruncatedSweep sweep = new TruncatedSweep(rule, works, fails, most, otherwise, layers, meter);
    int settled = sweep.run();
    return settled == StateRule.CONTINUES
        ? layers.diagram()
        : Diagram.constant(settled == StateRule.SETTLED_WORKS);
  }

  private int run() {
    int settled = rule.start(next);
    if (settled != StateRule.CONTINUES) {
      result[settled == StateRule.SETTLED_WORKS ? 0 : 1] = 1;
      return settled;
    }
    present.add(next);
    long held = 0;
    for (int step = 0; present.count() > 0; step++) {
      int count = present.count();
      int[] low = new int[count];
      int[] high = new int[count];
      double up = works[rule.slot(step)];
      double down = fails[rule.slot(step)];
      for (int state = 0; state < count; state++) {
        meter.at(held + (present.bytes() + following.bytes()) / WorkMeter.BYTES_PER_NODE);
        low[state] = follow(step, false, state, down * mass[state]);
        high[state] = follow(step, true, state, up * mass[state]);
      }
      if (following.count() > most) {
        int[] renamed = cut();
        rename(low, renamed);
        rename(high, renamed);
      }
      if (layers != null) {
        layers.add(rule.slot(step), low, high);
        held += count;
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
    return StateRule.CONTINUES;
  }

  private int follow(int step, boolean up, int state, double share) {
    next.clear();
    int settled =
        rule.next(step, up, present.pool(), present.start(state), present.length(state), next);
    if (settled != StateRule.CONTINUES) {
      result[settled == StateRule.SETTLED_WORKS ? 0 : 1] += share;
      return settled;
    }
    if (nextMass.length < following.count() + 1) {
      nextMass = Arrays.copyOf(nextMass, nextMass.length << 1);
    }
    int at = following.add(next);
    nextMass[at] += share;
    return at;
  }

  /** Keeps the likeliest states of the following layer; returns where each has gone. */
  private int[] cut() {
    int count = following.count();
    double[] sorted = Arrays.copyOf(nextMass, count);
    Arrays.sort(sorted);
    double least = sorted[count - most];
    int ties = 0;
    for (int i = count - most; i < count && sorted[i] == least; i++) {
      ties++;
    }
    StateLayer kept = new StateLayer();
    double[] keptMass = new double[most + 1];
    int[] renamed = new int[count];
    for (int state = 0; state < count; state++) {
      boolean stays = nextMass[state] > least || (nextMass[state] == least && ties-- > 0);
      if (stays) {
        next.clear();
        for (int word = 0; word < following.length(state); word++) {
          next.add(following.pool()[following.start(state) + word]);
        }
        renamed[state] = kept.add(next);
        keptMass[renamed[state]] = nextMass[state];
      } else {
        renamed[state] = otherwise;
        result[otherwise == StateRule.SETTLED_WORKS ? 0 : 1] += nextMass[state];
      }
    }
    following = kept;
    nextMass = keptMass;
    return renamed;
  }

  private static void rename(int[] children, int[] renamed) {
    for (int i = 0; i < children.length; i++) {
      if (children[i] >= 0) {
        children[i] = renamed[children[i]];
      }
    }
  }
}
