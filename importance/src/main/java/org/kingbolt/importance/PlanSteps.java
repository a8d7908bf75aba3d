package org.kingbolt.importance;

import java.util.Arrays;
import org.kingbolt.core.diagram.Diagram;
import org.kingbolt.core.diagram.WorkMeter;

/**
 * The levels of a diagram from the bottom up, one step each. After a step the values of a few nodes
 * are all that matters of the variables read so far: those that are referred to from above. A step
 * makes them from those of the step before.
 */
final class PlanSteps {

  /** In place of a node: the outcomes. */
  static final int FAILS = -1;

  static final int WORKS = -2;

  private final int[] variables;
  private final int[][] nodes;
  private final int[][] low;
  private final int[][] high;

  PlanSteps(Diagram diagram, WorkMeter meter) {
    int[] levels = filledLevels(diagram);
    int count = levels.length;
    variables = new int[count];
    nodes = new int[count][];
    low = new int[count][];
    high = new int[count][];
    int[] topParent = topParents(diagram);
    int[] previous = {};
    int[] placeOf = new int[diagram.size()];
    long held = 0;
    for (int step = 0; step < count; step++) {
      int level = levels[step];
      variables[step] = diagram.variableAt(level);
      int[] now = new int[previous.length + diagram.to(level) - diagram.from(level)];
      int size = 0;
      for (int id : previous) {
        if (topParent[id] < level) {
          now[size++] = id;
        }
      }
      int carried = size;
      for (int id = diagram.from(level); id < diagram.to(level); id++) {
        now[size++] = id;
      }
      for (int place = 0; place < previous.length; place++) {
        placeOf[previous[place]] = place;
      }
      nodes[step] = Arrays.copyOf(now, size);
      low[step] = new int[size];
      high[step] = new int[size];
      for (int place = 0; place < size; place++) {
        int id = now[place];
        low[step][place] = place < carried ? placeOf[id] : place(diagram.low(id), placeOf);
        high[step][place] = place < carried ? placeOf[id] : place(diagram.high(id), placeOf);
        held++;
        meter.at(held / 4);
      }
      previous = nodes[step];
    }
  }

  private static int[] filledLevels(Diagram diagram) {
    int[] levels = new int[diagram.levels()];
    int count = 0;
    for (int level = diagram.levels() - 1; level >= 0; level--) {
      if (diagram.from(level) < diagram.to(level)) {
        levels[count++] = level;
      }
    }
    return Arrays.copyOf(levels, count);
  }

  /** By node: the topmost level that refers to it; -1 for the root. */
  private static int[] topParents(Diagram diagram) {
    int[] top = new int[diagram.size()];
    Arrays.fill(top, Integer.MAX_VALUE);
    for (int level = diagram.levels() - 1; level >= 0; level--) {
      for (int id = diagram.from(level); id < diagram.to(level); id++) {
        top[diagram.low(id)] = level;
        top[diagram.high(id)] = level;
      }
    }
    top[diagram.root()] = -1;
    return top;
  }

  private static int place(int id, int[] placeOf) {
    return id == Diagram.FAILS ? FAILS : id == Diagram.WORKS ? WORKS : placeOf[id];
  }

  int count() {
    return variables.length;
  }

  /** The variable that a step reads. */
  int variable(int step) {
    return variables[step];
  }

  /** How many values matter after a step. */
  int width(int step) {
    return step < 0 ? 0 : nodes[step].length;
  }

  /** Where a value of a step comes from when the variable has failed: a place before the step. */
  int low(int step, int place) {
    return low[step][place];
  }

  /** The same when the variable works; equal places mean that the value is carried over. */
  int high(int step, int place) {
    return high[step][place];
  }

  boolean isCarried(int step, int place) {
    return low[step][place] == high[step][place];
  }

  /** One side of the values after a step from those before, which begin at an offset. */
  void advance(
      int step, double p, double q, boolean works, double[] from, int fromAt, double[] to, int at) {
    double ifFails = works ? 0 : 1;
    double ifWorks = works ? 1 : 0;
    int[] lows = low[step];
    int[] highs = high[step];
    for (int place = 0; place < lows.length; place++) {
      int l = lows[place];
      int h = highs[place];
      double onLow = l >= 0 ? from[fromAt + l] : l == FAILS ? ifFails : ifWorks;
      double onHigh = h >= 0 ? from[fromAt + h] : h == FAILS ? ifFails : ifWorks;
      to[at + place] = l == h ? onLow : q * onLow + p * onHigh;
    }
  }
}
