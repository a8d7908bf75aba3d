package org.kingbolt.core.diagram;

import java.util.Arrays;
import org.jspecify.annotations.Nullable;

/**
 * Two excerpts of a network that is too wide, which grow towards each other: in one, the links that
 * are not kept have failed; in the other one, those that are not kept work. Both are evaluated by
 * diagrams, whose partial derivatives tell where the two differ most; there the first one gets ways
 * around, and the second one gets the links themselves and their neighbours.
 *
 * <p>Holding a component failed lowers a monotone function, holding it working raises it; so each
 * excerpt is a bound whatever is kept, and the choice matters for its closeness alone. For one
 * thread.
 */
final class NetworkGrowth {

  /** With more links than these at its terminals a network has many of them. */
  private static final int FEW = 128;

  private static final int FIRST_OPEN = 64;

  /** Shares of the total difference that are looked at. */
  private static final double NEARLY_ALL = 0.95;

  private static final double NEGLIGIBLE = 1e-7;

  /** A step that closes less of the difference than this is in vain. */
  private static final double IN_VAIN = 1e-3;

  private final NetworkProblem network;
  private final double[] works;
  private final double[] fails;
  private final int[][] linksAt;
  private final Detours detours;

  /** Links in front, nodes behind: ways around these have not helped. */
  private final boolean[] barren;

  private boolean[] kept;
  private boolean[] open;
  private @Nullable ExcerptValue less;
  private @Nullable ExcerptValue more;

  NetworkGrowth(NetworkProblem network, double[] works, double[] fails) {
    this.network = network;
    this.works = works;
    this.fails = fails;
    this.linksAt = network.linksAt();
    this.detours = new Detours(network, linksAt, works);
    this.barren = new boolean[network.links() + network.nodes()];
    this.kept = new boolean[network.links()];
    this.open = new boolean[network.links()];
  }

  /**
   * How often the excerpt fails that fails at least as often as the network; 1 before the start.
   */
  double mostFails() {
    return less == null ? 1 : less.fails;
  }

  /** How often the excerpt fails that fails at most as often; 0 before the start. */
  double leastFails() {
    return more == null ? 0 : more.fails;
  }

  /** The excerpt that works at most as often as the network; only after a first step. */
  NetworkProblem lessWorking() {
    return NetworkExcerpt.withoutOthers(network, kept);
  }

  /** The excerpt that works at least as often. */
  NetworkProblem moreWorking() {
    return NetworkExcerpt.withOthersWorking(network, open);
  }

  /**
   * Grows both excerpts once.
   *
   * @param most how many nodes a diagram may have
   * @return whether that has narrowed anything, or another step may
   */
  boolean step(long most, WorkMeter meter) {
    if (less == null || more == null) {
      return start(most, meter);
    }
    double before = less.fails - more.fails;
    boolean tried = grow(less, more, most, meter);
    open(more, less, most, meter);
    return tried || less.fails - more.fails < before * (1 - IN_VAIN);
  }

  /** Gives what has been in vain another chance, with larger diagrams. */
  void retry() {
    Arrays.fill(barren, false);
  }

  double gap() {
    return mostFails() - leastFails();
  }

  boolean hasManyTerminals() {
    return stars() > FEW;
  }

  private int stars() {
    int stars = 0;
    for (int node = 0; node < network.nodes(); node++) {
      stars += network.terminal(node) ? linksAt[node].length : 0;
    }
    return stars;
  }

  private boolean start(long most, WorkMeter meter) {
    kept = detours.tree();
    less = less(kept, most, meter);
    if (less == null) {
      return false;
    }
    for (int node = 0; node < network.nodes(); node++) {
      if (network.terminal(node)) {
        for (int link : linksAt[node]) {
          open[link] = true;
        }
      }
    }
    more = hasManyTerminals() ? null : more(open, most, meter);
    if (more == null) {
      Arrays.fill(open, false);
      int[] top = top(gains(less, kept), 1);
      for (int i = 0; i < Math.min(top.length, FIRST_OPEN); i++) {
        if (top[i] < open.length) {
          open[top[i]] = true;
        }
      }
      more = more(open, most, meter);
    }
    return more != null;
  }

  private @Nullable ExcerptValue less(boolean[] links, long most, WorkMeter meter) {
    NetworkProblem excerpt = NetworkExcerpt.withoutOthers(network, links);
    boolean[] all = new boolean[works.length];
    Arrays.fill(all, true);
    return excerpt.works(all) ? ExcerptValue.of(excerpt, works, fails, most, meter) : null;
  }

  private @Nullable ExcerptValue more(boolean[] links, long most, WorkMeter meter) {
    NetworkProblem excerpt = NetworkExcerpt.withOthersWorking(network, links);
    return ExcerptValue.of(excerpt, works, fails, most, meter);
  }

  /** Ways around what makes the first excerpt fail more often than the second one. */
  private boolean grow(ExcerptValue now, ExcerptValue other, long most, WorkMeter meter) {
    double[] gap = gap(now, other);
    for (int at = 0; at < gap.length; at++) {
      gap[at] = barren[at] ? 0 : gap[at];
    }
    int[] wanted = top(gap, NEARLY_ALL);
    for (int take = wanted.length; take > 0; take /= 4) {
      boolean[] next = kept.clone();
      for (int i = 0; i < take; i++) {
        if (wanted[i] < kept.length) {
          detours.aroundLink(wanted[i], kept, gap, next, meter);
        } else {
          detours.aroundNode(wanted[i] - kept.length, kept, gap, next, meter);
        }
      }
      ExcerptValue value = Arrays.equals(next, kept) ? now : less(next, most, meter);
      if (value != null && value.fails < now.fails) {
        boolean vain = now.fails - value.fails < IN_VAIN * (now.fails - other.fails);
        kept = next;
        less = value;
        mark(wanted, vain ? take : 0);
        return true;
      }
      if (value != null || take == 1) {
        mark(wanted, take);
        return true;
      }
    }
    return false;
  }

  private void mark(int[] wanted, int take) {
    for (int i = 0; i < take; i++) {
      barren[wanted[i]] = true;
    }
  }

  /** Opens neighbours of what matters, and what makes the other excerpt fail. */
  private void open(ExcerptValue now, ExcerptValue other, long most, WorkMeter meter) {
    boolean[] base = new boolean[network.links()];
    boolean[] near = new boolean[network.links()];
    for (int at : top(gains(now, open), 1 - NEGLIGIBLE)) {
      for (int link : at < open.length ? new int[] {at} : linksAt[at - open.length]) {
        base[link] |= open[link];
        for (int node : new int[] {network.from[link], network.to[link]}) {
          for (int neighbour : linksAt[node]) {
            near[neighbour] = true;
          }
        }
      }
    }
    int[] wanted = top(gap(other, now), NEARLY_ALL);
    int take = wanted.length;
    for (boolean withNear = true; withNear || take > 0; withNear = false) {
      boolean[] next = withNear ? union(base, near) : base.clone();
      for (int i = 0; i < take; i++) {
        if (wanted[i] < next.length) {
          next[wanted[i]] = true;
        } else {
          for (int link : linksAt[wanted[i] - next.length]) {
            next[link] = true;
          }
        }
      }
      ExcerptValue value = more(next, most, meter);
      if (value != null) {
        if (value.fails > now.fails) {
          open = next;
          more = value;
        }
        return;
      }
      take = withNear ? take : take / 2;
    }
  }

  private static boolean[] union(boolean[] a, boolean[] b) {
    boolean[] union = a.clone();
    for (int i = 0; i < union.length; i++) {
      union[i] |= b[i];
    }
    return union;
  }

  /** How much more each link and each node adds to the failures of one excerpt. */
  private double[] gap(ExcerptValue larger, ExcerptValue smaller) {
    double[] gap = new double[network.links() + network.nodes()];
    for (int at = 0; at < gap.length; at++) {
      int slot = slot(at);
      boolean held = at < kept.length && !kept[at];
      if (slot != NetworkProblem.PERFECT && !held) {
        gap[at] = Math.max(0, larger.gains[slot] - smaller.gains[slot]);
      }
    }
    return gap;
  }

  private double[] gains(ExcerptValue value, boolean[] links) {
    double[] gains = new double[network.links() + network.nodes()];
    for (int at = 0; at < gains.length; at++) {
      int slot = slot(at);
      boolean held = at < links.length && !links[at];
      gains[at] = slot == NetworkProblem.PERFECT || held ? 0 : value.gains[slot];
    }
    return gains;
  }

  private int slot(int at) {
    int links = network.links();
    return at < links ? network.linkSlot[at] : network.nodeSlot[at - links];
  }

  /** In order of decreasing score, those that make up a share of the total. */
  private static int[] top(double[] score, double share) {
    int[] order = new int[score.length];
    double total = 0;
    int count = 0;
    for (int at = 0; at < score.length; at++) {
      total += score[at];
      if (score[at] > 0) {
        order[count++] = at;
      }
    }
    Integer[] sorted = new Integer[count];
    Arrays.setAll(sorted, i -> order[i]);
    Arrays.sort(
        sorted,
        (a, b) ->
            score[a] == score[b] ? Integer.compare(a, b) : Double.compare(score[b], score[a]));
    double sum = 0;
    int taken = 0;
    while (taken < count && sum < share * total) {
      sum += score[sorted[taken]];
      order[taken] = sorted[taken++];
    }
    return Arrays.copyOf(order, taken);
  }
}
