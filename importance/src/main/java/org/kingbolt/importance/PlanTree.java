package org.kingbolt.importance;

import java.util.Arrays;
import java.util.BitSet;
import java.util.Comparator;
import java.util.PriorityQueue;
import java.util.function.ToDoubleFunction;
import org.kingbolt.core.diagram.WorkMeter;

/**
 * Branch and bound with the convex relaxation: the most promising set of plans is divided where its
 * mixture of one part's alternatives misleads most, until no set can hold a plan that is better by
 * more than the allowed gap.
 */
final class PlanTree {

  /** Some plans: the alternatives of each part that are left, and where their relaxation ended. */
  private static final class Node {
    private final int[] first;
    private final int[] last;
    private final float[][] mix;
    private final double[] price;
    private final double bound;
    private final long number;

    Node(PlanRelaxation relaxation, double bound, long number) {
      this.first = relaxation.first.clone();
      this.last = relaxation.last.clone();
      this.mix = new float[first.length][];
      for (int at = 0; at < first.length; at++) {
        mix[at] = new float[last[at] - first[at] + 1];
        for (int i = first[at]; i <= last[at]; i++) {
          mix[at][i - first[at]] = (float) relaxation.mix[at][i];
        }
      }
      this.price = relaxation.price.clone();
      this.bound = bound;
      this.number = number;
    }

    double bound() {
      return bound;
    }

    long number() {
      return number;
    }

    /** What it takes, in nodes of a diagram. */
    long held() {
      long bytes = 100;
      for (float[] shares : mix) {
        bytes += 40 + 4L * shares.length;
      }
      return bytes / WorkMeter.BYTES_PER_NODE + 1;
    }
  }

  private static final int ROUNDS_AT_ROOT = 40;
  private static final int ROUNDS = 6;

  /** Rounds end when so many more of what the last one gained would not close a set. */
  private static final double STALL = 10;

  private static final double SAME = 1e-12;
  private static final double ROUNDING = 1e-6;

  private final PlanWeb web;
  private final long[] limits;
  private final ToDoubleFunction<BitSet> offer;
  private final double gap;
  private final WorkMeter meter;
  private final PlanRelaxation relaxation;
  private final PlanRounding rounding;
  private final PriorityQueue<Node> open =
      new PriorityQueue<>(
          Comparator.comparingDouble(Node::bound).thenComparingLong(node -> -node.number()));
  private double current = Double.NEGATIVE_INFINITY;
  private double best;
  private long made;
  private long held;

  /** Takes the log of the best failing probability so far, and who takes better plans. */
  PlanTree(
      PlanWeb web,
      long[] limits,
      double best,
      ToDoubleFunction<BitSet> offer,
      double gap,
      WorkMeter meter) {
    this.web = web;
    this.limits = limits;
    this.best = best;
    this.offer = offer;
    this.gap = Math.max(Math.log1p(gap) * (1 - ROUNDING), SAME);
    this.meter = meter;
    double floor = Math.exp(best) * 1e-13 / web.levels();
    this.relaxation = new PlanRelaxation(web, limits, Math.max(floor, Double.MIN_NORMAL));
    this.rounding = new PlanRounding(web, limits, meter);
  }

  /** What no plan can beat, at any time: a log of a failing probability. */
  double proved() {
    double least = Math.min(cutoff(), current);
    return open.isEmpty() ? least : Math.min(least, open.element().bound);
  }

  private double cutoff() {
    return best - gap;
  }

  /** Searches until nothing better by more than the gap can be left; takes what is proved. */
  void run(double known) {
    for (int at = 0; at < web.levels(); at++) {
      relaxation.first[at] = 0;
      relaxation.last[at] = web.part(at).size() - 1;
      relaxation.mix[at][0] = 1;
    }
    explore(known, ROUNDS_AT_ROOT);
    while (!open.isEmpty() && open.element().bound < cutoff()) {
      Node node = open.remove();
      held -= node.held();
      divide(node);
    }
    open.clear();
    current = Double.POSITIVE_INFINITY;
  }

  private void divide(Node node) {
    current = node.bound;
    int at = load(node);
    int middle = relaxation.middle(at);
    int last = node.last[at];
    relaxation.narrow(at, node.first[at], middle);
    explore(node.bound, ROUNDS);
    load(node);
    relaxation.narrow(at, middle + 1, last);
    explore(node.bound, ROUNDS);
    current = Double.POSITIVE_INFINITY;
  }

  /** Puts a node's plans in place; returns the part to divide. */
  private int load(Node node) {
    for (int at = 0; at < node.first.length; at++) {
      Arrays.fill(relaxation.mix[at], 0);
      relaxation.first[at] = node.first[at];
      relaxation.last[at] = node.last[at];
      double sum = 0;
      for (float share : node.mix[at]) {
        sum += share;
      }
      for (int i = 0; i < node.mix[at].length; i++) {
        relaxation.mix[at][node.first[at] + i] = node.mix[at][i] / sum;
      }
    }
    System.arraycopy(node.price, 0, relaxation.price, 0, node.price.length);
    relaxation.start();
    int chosen = -1;
    double most = 0;
    for (int at = 0; at < node.first.length; at++) {
      double promise = relaxation.promise(at);
      if (promise > most) {
        chosen = at;
        most = promise;
      }
    }
    int widest = 0;
    for (int at = 0; at < node.first.length && chosen < 0; at++) {
      int width = node.last[at] - node.first[at];
      widest = width > node.last[widest] - node.first[widest] ? at : widest;
    }
    return chosen < 0 ? widest : chosen;
  }

  /** Bounds the plans in place; keeps them open if they may hold a better one. */
  private void explore(double known, int rounds) {
    meter.now(held);
    if (!trim()) {
      return;
    }
    double bound = Math.max(known, relaxation.ceiling());
    if (bound > cutoff()) {
      return;
    }
    relaxation.start();
    for (int round = 0; round < rounds; round++) {
      if (rounds == ROUNDS_AT_ROOT || round > 1) {
        relaxation.improve();
      }
      relaxation.reprice(round < 10 ? 1 : 0.5);
      double now = relaxation.bound();
      double gained = now - bound;
      bound = now > bound ? now : bound;
      if (bound > cutoff()) {
        return;
      }
      if (relaxation.fix(now, cutoff()) && !trim()) {
        return;
      }
      if (round > 0 && rounds < ROUNDS_AT_ROOT && cutoff() - bound > STALL * gained) {
        break;
      }
    }
    round(rounds == ROUNDS_AT_ROOT);
    if (isSingle()) {
      return;
    }
    Node node = new Node(relaxation, bound, made++);
    held += node.held();
    open.add(node);
  }

  private boolean isSingle() {
    for (int at = 0; at < relaxation.first.length; at++) {
      if (relaxation.first[at] < relaxation.last[at]) {
        return false;
      }
    }
    return true;
  }

  private void round(boolean thorough) {
    int[] choice = relaxation.choices();
    for (int at = 0; at < choice.length; at++) {
      choice[at] = Math.max(relaxation.first[at], Math.min(relaxation.last[at], choice[at]));
    }
    if (!rounding.fits(choice)) {
      return;
    }
    rounding.fill(choice);
    if (Math.log(rounding.fails()) < best + 0.1 * gap || thorough) {
      rounding.exchange(choice);
      if (Math.log(rounding.fails()) < best) {
        best = Math.min(best, offer.applyAsDouble(rounding.chosen(choice)));
      }
    }
  }

  /** Takes away what no limit allows; false if nothing is left. */
  private boolean trim() {
    for (int r = 0; r < limits.length; r++) {
      long least = 0;
      for (int at = 0; at < web.levels(); at++) {
        least += least(at, r);
      }
      if (least > limits[r]) {
        return false;
      }
      for (int at = 0; at < web.levels(); at++) {
        long most = limits[r] - least + least(at, r);
        int from = relaxation.first[at];
        int to = relaxation.last[at];
        while (web.part(at).cost()[from][r] > most) {
          from++;
        }
        while (web.part(at).cost()[to][r] > most) {
          to--;
        }
        relaxation.narrow(at, from, to);
      }
    }
    return true;
  }

  private long least(int at, int r) {
    long least = Long.MAX_VALUE;
    for (int i = relaxation.first[at]; i <= relaxation.last[at]; i++) {
      least = Math.min(least, web.part(at).cost()[i][r]);
    }
    return least;
  }
}
