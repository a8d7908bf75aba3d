package org.kingbolt.core.diagram;

import java.util.Arrays;

/**
 * A reduced ordered decision diagram under construction: finds or makes nodes, and combines whole
 * functions by if-then-else.
 *
 * <p>Method: Bryant, Graph-based algorithms for Boolean function manipulation, IEEE Trans. Comput.
 * 35 (1986) 677; if-then-else as in Brace, Rudell &amp; Bryant, DAC 1990. Explicit stack, so depth
 * is bounded by memory only. For one thread.
 */
final class NodeTable {

  private static final int FIRST_CACHE = 1 << 8;
  private static final int LARGEST_CACHE = 1 << 24;
  private static final int FRAME = 5;

  private final UniqueTable table;

  /** Results of earlier if-then-else steps, four ints an entry: f, g, h, result. f = 0: empty. */
  private int[] cache = new int[FIRST_CACHE << 2];

  private int[] stack = new int[FRAME << 6];

  NodeTable(int levels, WorkMeter meter) {
    this.table = new UniqueTable(levels, meter);
  }

  /** Level of a node; the number of levels for the two outcomes. */
  int level(int id) {
    return table.level(id);
  }

  int low(int id) {
    return table.low(id);
  }

  int high(int id) {
    return table.high(id);
  }

  int size() {
    return table.size();
  }

  /** Finds or makes the node of a level whose children lie deeper. */
  int node(int level, int low, int high) {
    return low == high ? low : table.node(level, low, high);
  }

  /** The function "if f works then g, else h". Cost: at most the product of the three sizes. */
  int ifThenElse(int f, int g, int h) {
    int sp = 0;
    int curF = f;
    int curG = g;
    int curH = h;
    while (true) {
      int result = known(curF, curG, curH);
      if (result < 0) {
        int top = Math.min(level(curF), Math.min(level(curG), level(curH)));
        if (sp + FRAME > stack.length) {
          stack = Arrays.copyOf(stack, stack.length << 1);
        }
        stack[sp] = curF;
        stack[sp + 1] = curG;
        stack[sp + 2] = curH;
        stack[sp + 3] = top;
        stack[sp + 4] = -1;
        sp += FRAME;
        curF = lowAt(curF, top);
        curG = lowAt(curG, top);
        curH = lowAt(curH, top);
        continue;
      }
      while (sp > 0) {
        int frame = sp - FRAME;
        int top = stack[frame + 3];
        if (stack[frame + 4] < 0) {
          stack[frame + 4] = result;
          curF = highAt(stack[frame], top);
          curG = highAt(stack[frame + 1], top);
          curH = highAt(stack[frame + 2], top);
          break;
        }
        result = node(top, stack[frame + 4], result);
        remember(stack[frame], stack[frame + 1], stack[frame + 2], result);
        sp = frame;
      }
      if (sp == 0) {
        return result;
      }
    }
  }

  int and(int f, int g) {
    return ifThenElse(f, g, Diagram.FAILS);
  }

  int or(int f, int g) {
    return ifThenElse(f, Diagram.WORKS, g);
  }

  private int known(int f, int g, int h) {
    if (f == Diagram.WORKS || g == h) {
      return g;
    }
    if (f == Diagram.FAILS) {
      return h;
    }
    if (g == Diagram.WORKS && h == Diagram.FAILS) {
      return f;
    }
    int at = slot(f, g, h);
    return cache[at] == f && cache[at + 1] == g && cache[at + 2] == h ? cache[at + 3] : -1;
  }

  private void remember(int f, int g, int h, int result) {
    if (table.size() > cache.length >> 2 && cache.length < LARGEST_CACHE << 2) {
      growCache();
    }
    int at = slot(f, g, h);
    cache[at] = f;
    cache[at + 1] = g;
    cache[at + 2] = h;
    cache[at + 3] = result;
  }

  private void growCache() {
    int[] old = cache;
    cache = new int[old.length << 1];
    for (int i = 0; i < old.length; i += 4) {
      if (old[i] != 0) {
        System.arraycopy(old, i, cache, slot(old[i], old[i + 1], old[i + 2]), 4);
      }
    }
  }

  private int slot(int f, int g, int h) {
    return (UniqueTable.hash(f, g, h) & ((cache.length >> 2) - 1)) << 2;
  }

  private int lowAt(int id, int level) {
    return table.level(id) == level ? table.low(id) : id;
  }

  private int highAt(int id, int level) {
    return table.level(id) == level ? table.high(id) : id;
  }

  /**
   * Closes the work.
   *
   * @param root the function asked for
   * @param variableAtLevel the order, one variable a level
   * @return the reduced diagram of the root; equal functions in equal orders give equal diagrams up
   *     to the numbering inside a level
   */
  Diagram diagram(int root, int[] variableAtLevel) {
    return table.sorted(root, variableAtLevel);
  }
}
