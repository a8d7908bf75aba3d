package org.kingbolt.importance;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.Optional;
import org.kingbolt.core.diagram.Diagram;
import org.kingbolt.core.diagram.WorkMeter;

/**
 * A diagram of which neighbouring variables that stand in series or in parallel, and only there,
 * are joined into parts, again and again. Nodes are numbered from the bottom up, level by level,
 * after the outcomes 0, failing, and 1, working.
 */
final class PlanWeb {

  private final List<PlanPart> parts = new ArrayList<>();

  /** By level from the bottom: the ids of its nodes. */
  private final List<int[]> nodes = new ArrayList<>();

  private final int[] levelOf;
  private final int[] references;

  /** By node: where the reading goes on when the part has failed. */
  final int[] low;

  /** By node: where the reading goes on when the part works. */
  final int[] high;

  /** By level: its first node. */
  final int[] from;

  final int root;

  private PlanWeb(int[] low, int[] high, int[] from, int root, List<PlanPart> parts) {
    this.low = low;
    this.high = high;
    this.from = from;
    this.root = root;
    this.parts.addAll(parts);
    this.levelOf = new int[0];
    this.references = new int[0];
  }

  private PlanWeb(Diagram diagram) {
    int size = diagram.size();
    low = new int[size];
    high = new int[size];
    from = new int[0];
    root = diagram.root();
    levelOf = new int[size];
    references = new int[size];
    references[root]++;
    for (int id = 2; id < size; id++) {
      low[id] = diagram.low(id);
      high[id] = diagram.high(id);
      references[low[id]]++;
      references[high[id]]++;
    }
  }

  /**
   * That of a plan in which no decision matters for more than one variable; empty for others.
   *
   * @param limits which some plan keeps
   */
  static Optional<PlanWeb> of(
      PlanModel model,
      PlanSteps steps,
      PlanOrder order,
      PlanMenus menus,
      long[] limits,
      WorkMeter meter) {
    for (int step = 0; step < steps.count(); step++) {
      if (!order.open(step).isEmpty()) {
        return Optional.empty();
      }
    }
    Diagram diagram = model.system().diagram();
    PlanWeb web = new PlanWeb(diagram);
    int step = 0;
    for (int level = diagram.levels() - 1; level >= 0; level--) {
      int first = diagram.from(level);
      int end = diagram.to(level);
      if (first < end) {
        int[] ids = new int[end - first];
        Arrays.setAll(ids, i -> first + i);
        web.push(ids, PlanPart.of(menus.menu(step++, 0), limits), limits, meter);
      }
    }
    return Optional.of(web.compact());
  }

  int levels() {
    return parts.size();
  }

  PlanPart part(int level) {
    return parts.get(level);
  }

  private void push(int[] ids, PlanPart part, long[] limits, WorkMeter meter) {
    PlanPart now = part;
    while (!nodes.isEmpty()) {
      meter.now(low.length / 8);
      int below = nodes.size() - 1;
      boolean series = isJoin(ids, nodes.get(below), high, low);
      boolean parallel = !series && isJoin(ids, nodes.get(below), low, high);
      PlanPart other = parts.get(below);
      if ((!series && !parallel) || !PlanPart.mayJoin(now, other)) {
        break;
      }
      PlanPart joined = PlanPart.joined(now, other, series, limits);
      if (joined.size() == 0) {
        break;
      }
      join(ids, nodes.get(below), series ? high : low);
      now = joined;
      nodes.remove(below);
      parts.remove(below);
    }
    for (int id : ids) {
      levelOf[id] = nodes.size() + 1;
    }
    nodes.add(ids);
    parts.add(now);
  }

  /**
   * Whether the level below is read only after one side of this one, and its other side leads where
   * that of this one leads.
   */
  private boolean isJoin(int[] upper, int[] lower, int[] inner, int[] outer) {
    int level = nodes.size();
    int count = 0;
    for (int id : lower) {
      count += references[id];
    }
    if (count != upper.length) {
      return false;
    }
    for (int id : upper) {
      int next = inner[id];
      if (levelOf[next] != level || outer[next] != outer[id]) {
        return false;
      }
    }
    return true;
  }

  private void join(int[] upper, int[] lower, int[] inner) {
    for (int id : lower) {
      references[low[id]]--;
      references[high[id]]--;
    }
    for (int id : upper) {
      inner[id] = inner[inner[id]];
      references[inner[id]]++;
    }
  }

  private PlanWeb compact() {
    int[] number = new int[low.length];
    number[1] = 1;
    int size = 2;
    int[] starts = new int[nodes.size() + 1];
    int[] lows = new int[low.length];
    int[] highs = new int[low.length];
    for (int level = 0; level < nodes.size(); level++) {
      starts[level] = size;
      for (int id : nodes.get(level)) {
        lows[size] = number[low[id]];
        highs[size] = number[high[id]];
        number[id] = size++;
      }
    }
    starts[nodes.size()] = size;
    return new PlanWeb(
        Arrays.copyOf(lows, size), Arrays.copyOf(highs, size), starts, number[root], parts);
  }
}
