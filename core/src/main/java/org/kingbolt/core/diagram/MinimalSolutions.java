package org.kingbolt.core.diagram;

import java.util.Arrays;

/**
 * Finds all minimal path sets or minimal cut sets of a monotone function, as a {@link SetDiagram},
 * without listing them.
 *
 * <p>Source: Rauzy, New algorithms for fault trees analysis, Reliab. Eng. Syst. Saf. 40 (1993) 203
 * (from memory). Bottom-up over the diagram; the one operation needed takes out of a family the
 * sets that already suffice for a smaller function. Explicit stack. Routes that leave out many
 * variables in a row are followed by jump pointers (Myers, Inf. Process. Lett. 17 (1983) 241, from
 * memory), so that long chains cost a logarithm a step.
 */
public final class MinimalSolutions {

  private static final int FIRST_CACHE = 1 << 10;
  private static final int LARGEST_CACHE = 1 << 24;
  private static final int FRAME = 4;

  private final Diagram diagram;

  /** The child that adding a variable to a set leads to, and the child that leaving it out does. */
  private final boolean paths;

  private final int[] levelOf;

  /** For each node, how many variables can be left out below it, and a node further down there. */
  private final int[] depth;

  private final int[] jump;

  private final UniqueTable table;
  private int[] cache = new int[FIRST_CACHE * 3];
  private int[] stack = new int[FRAME << 6];

  private MinimalSolutions(Diagram diagram, boolean paths, WorkMeter meter) {
    this.diagram = diagram;
    this.paths = paths;
    this.table = new UniqueTable(diagram.levels(), meter);
    this.levelOf = new int[diagram.size()];
    Arrays.fill(levelOf, 0, 2, diagram.levels());
    for (int level = 0; level < diagram.levels(); level++) {
      Arrays.fill(levelOf, diagram.from(level), diagram.to(level), level);
    }
    this.depth = new int[diagram.size()];
    this.jump = new int[diagram.size()];
    jump[1] = 1;
    for (int id = 2; id < jump.length; id++) {
      int next = leavingOut(id);
      int far = jump[next];
      boolean asFar = depth[next] - depth[far] == depth[far] - depth[jump[far]];
      depth[id] = depth[next] + 1;
      jump[id] = asFar ? jump[far] : next;
    }
  }

  /**
   * Finds the minimal path sets.
   *
   * @param diagram the diagram of a monotone function
   * @param meter hears of every node
   * @return the family of minimal sets of variables that make the function work
   */
  public static SetDiagram paths(Diagram diagram, WorkMeter meter) {
    return new MinimalSolutions(diagram, true, meter).solve();
  }

  /**
   * Finds the minimal cut sets.
   *
   * @param diagram the diagram of a monotone function
   * @param meter hears of every node
   * @return the family of minimal sets of variables that, all failed, make the function fail
   */
  public static SetDiagram cuts(Diagram diagram, WorkMeter meter) {
    return new MinimalSolutions(diagram, false, meter).solve();
  }

  private SetDiagram solve() {
    int[] solution = new int[diagram.size()];
    solution[paths ? Diagram.WORKS : Diagram.FAILS] = SetDiagram.ONLY_EMPTY_SET;
    for (int level = diagram.levels() - 1; level >= 0; level--) {
      for (int id = diagram.from(level); id < diagram.to(level); id++) {
        int leaves = leavingOut(id);
        int larger = suffices(leaves) ? SetDiagram.NO_SETS : solution[adding(id)];
        int needed = larger == solution[leaves] ? SetDiagram.NO_SETS : without(larger, leaves);
        solution[id] = node(level, solution[leaves], needed);
      }
    }
    return new SetDiagram(table.sorted(solution[diagram.root()], diagram.order()));
  }

  private int adding(int id) {
    return paths ? diagram.high(id) : diagram.low(id);
  }

  private int leavingOut(int id) {
    return paths ? diagram.low(id) : diagram.high(id);
  }

  private boolean suffices(int function) {
    return function == (paths ? Diagram.WORKS : Diagram.FAILS);
  }

  private boolean neverSuffices(int function) {
    return function == (paths ? Diagram.FAILS : Diagram.WORKS);
  }

  private int node(int level, int low, int high) {
    return high == SetDiagram.NO_SETS ? low : table.node(level, low, high);
  }

  /** The sets of the family that do not suffice for the function. */
  private int without(int family, int function) {
    int sp = 0;
    int curFamily = family;
    int curFunction = function;
    while (true) {
      int result = settled(curFamily, curFunction);
      if (result < 0) {
        curFunction = downTo(table.level(curFamily), curFunction);
        result = known(curFamily, curFunction);
      }
      if (result < 0) {
        if (sp + FRAME > stack.length) {
          stack = Arrays.copyOf(stack, stack.length << 1);
        }
        stack[sp] = curFamily;
        stack[sp + 1] = curFunction;
        stack[sp + 2] = -1;
        sp += FRAME;
        curFunction = follow(curFamily, curFunction, false);
        curFamily = table.low(curFamily);
        continue;
      }
      while (sp > 0) {
        int frame = sp - FRAME;
        int doneFamily = stack[frame];
        int doneFunction = stack[frame + 1];
        if (stack[frame + 2] < 0) {
          stack[frame + 2] = result;
          curFunction = follow(doneFamily, doneFunction, true);
          curFamily = table.high(doneFamily);
          break;
        }
        result = node(table.level(doneFamily), stack[frame + 2], result);
        remember(doneFamily, doneFunction, result);
        sp = frame;
      }
      if (sp == 0) {
        return result;
      }
    }
  }

  /** The function after a decision on the family's top variable. */
  private int follow(int family, int function, boolean add) {
    if (levelOf[function] > table.level(family)) {
      return function;
    }
    return add ? adding(function) : leavingOut(function);
  }

  /** The function after all variables above a level are left out. */
  private int downTo(int level, int function) {
    int at = function;
    while (levelOf[at] < level) {
      at = levelOf[jump[at]] <= level ? jump[at] : leavingOut(at);
    }
    return at;
  }

  /** What needs no search; the empty set suffices for no function but a constant. */
  private int settled(int family, int function) {
    if (suffices(function)) {
      return SetDiagram.NO_SETS;
    }
    boolean all = family <= SetDiagram.ONLY_EMPTY_SET || neverSuffices(function);
    return all ? family : -1;
  }

  private int known(int family, int function) {
    int result = settled(family, function);
    if (result >= 0) {
      return result;
    }
    int at = slot(family, function);
    return cache[at] == family && cache[at + 1] == function ? cache[at + 2] : -1;
  }

  private void remember(int family, int function, int result) {
    if (table.size() > cache.length / 3 && cache.length < LARGEST_CACHE * 3) {
      int[] old = cache;
      cache = new int[old.length << 1];
      for (int i = 0; i < old.length; i += 3) {
        if (old[i] != 0) {
          System.arraycopy(old, i, cache, slot(old[i], old[i + 1]), 3);
        }
      }
    }
    int at = slot(family, function);
    cache[at] = family;
    cache[at + 1] = function;
    cache[at + 2] = result;
  }

  private int slot(int family, int function) {
    return (UniqueTable.hash(family, function, 0) & (cache.length / 3 - 1)) * 3;
  }
}
