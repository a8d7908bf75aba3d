package org.kingbolt.importance;

import java.util.Arrays;
import java.util.BitSet;

/**
 * A component, or a module of several, with all that can be chosen for it: from the worst to the
 * best, without those that others beat.
 *
 * @param failing by alternative; not changed
 * @param working by alternative; not changed
 * @param cost by alternative, by resource; not changed
 * @param chosen by alternative: the items; not changed
 */
@SuppressWarnings("ArrayRecordComponent")
record PlanPart(double[] failing, double[] working, long[][] cost, BitSet[] chosen) {

  private static final int MOST_PAIRS = 1 << 14;
  private static final int MOST = 512;

  int size() {
    return failing.length;
  }

  static PlanPart of(PlanAlternative[] menu, long[] limits) {
    int size = menu.length;
    double[] failing = new double[size];
    double[] working = new double[size];
    long[][] cost = new long[size][];
    BitSet[] chosen = new BitSet[size];
    for (int i = 0; i < size; i++) {
      failing[i] = menu[i].failing();
      working[i] = menu[i].working();
      cost[i] = menu[i].cost();
      chosen[i] = new BitSet();
      for (int item : menu[i].chosen()) {
        chosen[i].set(item);
      }
    }
    PlanPart all = new PlanPart(failing, working, cost, chosen);
    return all.take(all.unbeaten(limits, Integer.MAX_VALUE));
  }

  /** Whether two parts may become one without getting too large. */
  static boolean mayJoin(PlanPart a, PlanPart b) {
    return (long) a.size() * b.size() <= MOST_PAIRS;
  }

  /** Both in series or in parallel; a part without alternatives if there would be too many. */
  static PlanPart joined(PlanPart a, PlanPart b, boolean series, long[] limits) {
    int size = a.size() * b.size();
    double[] failing = new double[size];
    double[] working = new double[size];
    long[][] cost = new long[size][limits.length];
    for (int i = 0; i < size; i++) {
      int x = i / b.size();
      int y = i % b.size();
      if (series) {
        working[i] = a.working[x] * b.working[y];
        failing[i] = Math.min(1, a.failing[x] + a.working[x] * b.failing[y]);
      } else {
        failing[i] = a.failing[x] * b.failing[y];
        working[i] = Math.min(1, a.working[x] + a.failing[x] * b.working[y]);
      }
      for (int r = 0; r < limits.length; r++) {
        cost[i][r] = a.cost[x][r] + b.cost[y][r];
      }
    }
    PlanPart all = new PlanPart(failing, working, cost, new BitSet[size]);
    int[] rows = all.unbeaten(limits, MOST);
    if (rows.length > MOST) {
      return all.take(new int[0]);
    }
    for (int i : rows) {
      all.chosen[i] = (BitSet) a.chosen[i / b.size()].clone();
      all.chosen[i].or(b.chosen[i % b.size()]);
    }
    return all.take(rows);
  }

  private PlanPart take(int[] rows) {
    return new PlanPart(
        Arrays.stream(rows).mapToDouble(i -> failing[i]).toArray(),
        Arrays.stream(rows).mapToDouble(i -> working[i]).toArray(),
        Arrays.stream(rows).mapToObj(i -> cost[i]).toArray(long[][]::new),
        Arrays.stream(rows).mapToObj(i -> chosen[i]).toArray(BitSet[]::new));
  }

  /**
   * Those within the limits that no other beats, the worst first; of equal ones the first. One more
   * than the most wanted is enough.
   */
  private int[] unbeaten(long[] limits, int most) {
    int[] order = PlanSort.sorted(size(), this::compare);
    int[] kept = new int[order.length];
    int from = order.length;
    for (int row : order) {
      boolean beaten = !noDearer(cost[row], limits);
      int last = limits.length == 1 ? Math.min(order.length, from + 1) : order.length;
      for (int i = from; i < last && !beaten; i++) {
        beaten = noDearer(cost[kept[i]], cost[row]);
      }
      if (!beaten) {
        kept[--from] = row;
      }
      if (order.length - from > most) {
        break;
      }
    }
    return Arrays.copyOfRange(kept, from, order.length);
  }

  private int compare(int a, int b) {
    int result =
        Double.compare(
            PlanLabels.rank(working[a], failing[a]), PlanLabels.rank(working[b], failing[b]));
    return result == 0 ? Arrays.compare(cost[a], cost[b]) : result;
  }

  private static boolean noDearer(long[] costs, long[] others) {
    for (int r = 0; r < costs.length; r++) {
      if (costs[r] > others[r]) {
        return false;
      }
    }
    return true;
  }
}
