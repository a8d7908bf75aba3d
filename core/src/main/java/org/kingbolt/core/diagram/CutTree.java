package org.kingbolt.core.diagram;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.HashSet;
import java.util.List;
import java.util.Set;
import org.jspecify.annotations.Nullable;

/**
 * All minimal cut sets of a monotone function up to a cost, found without a diagram.
 *
 * <p>Method: a tree over partial failures. Where the function still works, some path set is found;
 * every cut set must hold one of its slots, so the tree branches over them, and in each branch the
 * slots of the branches before are known to work (a hitting set tree: Reiter, Artif. Intell. 32
 * (1987) 57, from memory; here with disjoint branches). Path sets that share no slot tell how much
 * more must fail at least, and end branches early. Explicit stack.
 *
 * <p>What lies beyond the cost: every failed state belongs to one branch. The branches given up are
 * disjoint events; {@link #discarded()} adds up bounds on their probabilities.
 */
public final class CutTree {

  /** Costs are added up in floating point; what exceeds the limit by less is not cut off. */
  public static final double SLACK = 1e-9;

  private static final int FURTHER_ROUTES = 8;

  private final double[] cost;
  private final double limit;
  private final double cheapest;
  private final double[] failing;
  private final double[] working;
  private final boolean weighs;
  private final WorkMeter meter;

  private final boolean[] barred;
  private final boolean[] free;
  private final int[] failed;
  private int failedCount;
  private final List<int[]> found = new ArrayList<>();
  private final Set<List<Integer>> known = new HashSet<>();
  private double discarded;
  private boolean complete = true;
  private List<RouteFinder> stages = List.of();
  private RouteFinder finder = (bars, frees) -> null;

  /** A branching in the tree: a path set, and how far it has been gone through. */
  private static final class Branching {
    final int[] slots;
    final double cost;
    double mass;
    int next;

    Branching(int[] slots, double cost, double mass) {
      this.slots = slots;
      this.cost = cost;
      this.mass = mass;
    }
  }

  /**
   * Prepares a search.
   *
   * @param cost of each slot's failure, at least 0, possibly infinite
   * @param limit the largest cost of a set that is wanted
   * @param failing an upper bound on the probability of each slot's failure
   * @param working an upper bound on the probability of each slot's working
   * @param weighs whether the probabilities are given and {@link #discarded()} will be asked
   * @param meter hears of every path set found
   */
  public CutTree(
      double[] cost,
      double limit,
      double[] failing,
      double[] working,
      boolean weighs,
      WorkMeter meter) {
    this.cost = cost.clone();
    this.limit = limit + SLACK;
    this.cheapest = Arrays.stream(cost).min().orElse(0);
    this.failing = failing.clone();
    this.working = working.clone();
    this.weighs = weighs;
    this.meter = meter;
    this.barred = new boolean[cost.length];
    this.free = new boolean[cost.length];
    this.failed = new int[cost.length];
  }

  /**
   * Searches.
   *
   * @param functions finders whose functions fail in fewer or as many states as the one in
   *     question, and in all of its failed states together
   * @return the minimal cut sets, each in increasing order of slots
   */
  public List<int[]> search(List<RouteFinder> functions) {
    stages = functions;
    for (RouteFinder function : functions) {
      finder = function;
      grow();
    }
    return found;
  }

  /**
   * Tells what was given up.
   *
   * @return an upper bound on the probability that the function fails and no set found has failed
   *     altogether; without regard to rounding
   */
  public double discarded() {
    return discarded;
  }

  /**
   * Tells whether no branch was given up.
   *
   * @return true when all minimal cut sets have been found, whatever they cost
   */
  public boolean isComplete() {
    return complete;
  }

  private void grow() {
    List<Branching> open = new ArrayList<>();
    Branching root = visit(0, 1);
    if (root != null) {
      open.add(root);
    }
    while (!open.isEmpty()) {
      Branching top = open.get(open.size() - 1);
      if (top.next > 0) {
        int before = top.slots[top.next - 1];
        unbar(before);
        free[before] = true;
        top.mass *= working[before];
      }
      if (top.next == top.slots.length) {
        for (int slot : top.slots) {
          free[slot] = false;
        }
        open.remove(open.size() - 1);
        continue;
      }
      int slot = top.slots[top.next++];
      bar(slot);
      double sum = top.cost + cost[slot];
      double mass = top.mass * failing[slot];
      if (sum > limit) {
        giveUp(mass);
      } else {
        Branching next = visit(sum, mass);
        if (next != null) {
          open.add(next);
        }
      }
    }
  }

  private void bar(int slot) {
    barred[slot] = true;
    failed[failedCount++] = slot;
  }

  /** Takes back the last slot barred, unless it is an other one. */
  private void unbar(int slot) {
    barred[slot] = false;
    failedCount--;
  }

  private void giveUp(double mass) {
    discarded += mass;
    complete = false;
  }

  private int @Nullable [] route() {
    meter.now(found.size() * (2L + failedCount / 8));
    return finder.find(barred, free);
  }

  /** Looks at the function with the present slots barred; null where there is nothing to branch. */
  private @Nullable Branching visit(double sum, double mass) {
    int[] shortest = null;
    double least = sum;
    double share = 1;
    int further = weighs ? FURTHER_ROUTES : 0;
    List<int[]> routes = new ArrayList<>();
    int[] route = route();
    if (route == null) {
      report();
      return null;
    }
    while (route != null && route.length > 0) {
      routes.add(route);
      shortest = shortest == null || route.length < shortest.length ? route : shortest;
      double cheap = Double.POSITIVE_INFINITY;
      for (int slot : route) {
        barred[slot] = true;
        cheap = Math.min(cheap, cost[slot]);
      }
      least += cheap;
      share *= anyFails(route);
      if (least > limit && further-- <= 0) {
        break;
      }
      route = route();
    }
    for (int[] done : routes) {
      for (int slot : done) {
        barred[slot] = false;
      }
    }
    if (shortest == null || (route != null && route.length == 0)) {
      return null;
    }
    if (least > limit && (routes.size() > 1 || !weighs)) {
      giveUp(mass * share);
      return null;
    }
    if (sum + 2 * cheapest > limit) {
      finish(shortest, sum, mass);
      return null;
    }
    return new Branching(shortest, sum, mass);
  }

  /** Only one more failure is affordable: it must be on every route. */
  private void finish(int[] route, double sum, double mass) {
    double[] beyond = new double[route.length];
    Arrays.fill(beyond, -1);
    double rest = mass;
    for (int i = 0; i < route.length; i++) {
      int slot = route[i];
      bar(slot);
      if (beyond[i] < 0) {
        List<int[]> around = disjointRoutes();
        if (!around.isEmpty()) {
          passedBy(route, i, around, beyond);
        } else if (sum + cost[slot] > limit) {
          if (!weighs || !containsCheaper(sum + cost[slot])) {
            giveUp(rest * failing[slot]);
          }
        } else {
          report();
        }
      }
      if (beyond[i] > 0) {
        giveUp(rest * failing[slot] * beyond[i]);
      }
      unbar(slot);
      free[slot] = true;
      rest *= working[slot];
    }
    for (int slot : route) {
      free[slot] = false;
    }
  }

  /** Routes without common slots: one, or several where it is weighed how likely all fail. */
  private List<int[]> disjointRoutes() {
    List<int[]> routes = new ArrayList<>();
    for (int[] route = route(); route != null; route = route()) {
      routes.add(route);
      if (!weighs || route.length == 0 || routes.size() > FURTHER_ROUTES) {
        break;
      }
      for (int slot : route) {
        barred[slot] = true;
      }
    }
    for (int[] route : routes) {
      if (weighs) {
        for (int slot : route) {
          barred[slot] = false;
        }
      }
    }
    return routes;
  }

  /** Whether the barred slots, a cut set, contain one within the limit: then that one is found. */
  private boolean containsCheaper(double sum) {
    for (int i = 0; i < failedCount; i++) {
      if (sum - cost[failed[i]] <= limit - SLACK / 2) {
        barred[failed[i]] = false;
        boolean cut = !works();
        barred[failed[i]] = true;
        if (cut) {
          return true;
        }
      }
    }
    return false;
  }

  /** Slots that routes go around do not suffice; notes how likely all of those routes fail. */
  private void passedBy(int[] route, int from, List<int[]> around, double[] beyond) {
    for (int i = from; i < route.length; i++) {
      double fails = 1;
      boolean passed = false;
      boolean surely = false;
      for (int[] other : around) {
        if (!contains(other, route[i])) {
          passed = true;
          surely |= other.length == 0;
          fails *= anyFails(other);
        }
      }
      if (passed) {
        double least = surely ? 0 : Math.max(fails, Double.MIN_VALUE);
        beyond[i] = beyond[i] < 0 ? least : Math.min(beyond[i], least);
      }
    }
  }

  private static boolean contains(int[] slots, int wanted) {
    for (int slot : slots) {
      if (slot == wanted) {
        return true;
      }
    }
    return false;
  }

  private double anyFails(int[] slots) {
    double all = 1;
    double any = 0;
    for (int slot : slots) {
      any += all * failing[slot];
      all *= working[slot];
    }
    return Math.min(any, 1);
  }

  /** The barred slots are a cut set; takes it if it is a minimal one. */
  private void report() {
    for (int i = 0; i < failedCount; i++) {
      barred[failed[i]] = false;
      boolean needed = works();
      barred[failed[i]] = true;
      if (!needed) {
        return;
      }
    }
    int[] set = Arrays.copyOf(failed, failedCount);
    Arrays.sort(set);
    if (stages.size() == 1 || known.add(Arrays.stream(set).boxed().toList())) {
      found.add(set);
    }
  }

  private boolean works() {
    meter.at(found.size());
    return stages.get(0).works(barred);
  }
}
