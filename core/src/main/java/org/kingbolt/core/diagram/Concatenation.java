package org.kingbolt.core.diagram;

import java.util.Arrays;

/**
 * Builds the diagram of an expression whose operators are all reduced and use nothing twice. Every
 * part is built straight towards the nodes where its operator goes on. The result is reduced by
 * itself, and the number of its nodes on each level is known beforehand, so that every node is
 * written where it stays. Linear in the result.
 */
final class Concatenation {

  private static final int FRAME = 4;

  private final Composer composer;
  private final WorkMeter meter;
  private final int[] level;
  private final int[] variableAtLevel;
  private final int[] bound;

  /** The id that the next node of each level gets. */
  private final int[] next;

  private int[] low = {};
  private int[] high = {};

  /** Expression, next template node, its level and first place among the made, of each frame. */
  private int[] frames = new int[FRAME << 6];

  private Diagram[] templates = new Diagram[64];
  private int depth;

  /** The nodes made for the template nodes of all frames. */
  private int[] made = new int[256];

  private int madeCount;

  Concatenation(Composer composer, WorkMeter meter) {
    this.composer = composer;
    this.meter = meter;
    int variables = composer.variables();
    this.level = new int[variables];
    this.variableAtLevel = new int[variables];
    this.bound = new int[variables + 1];
    this.next = new int[variables];
  }

  Diagram diagram(int root) {
    order(root);
    int end = 2;
    bound[level.length] = end;
    for (int l = level.length - 1; l >= 0; l--) {
      int nodes = bound[l];
      next[l] = end;
      end += nodes;
      bound[l] = end;
    }
    low = new int[end];
    high = new int[end];
    int id = build(root);
    return new Diagram(id, low, high, variableAtLevel, bound);
  }

  /** Gives the variables their levels, depth-first, and each level its number of nodes. */
  private void order(int root) {
    Arrays.fill(level, -1);
    int levels = 0;
    int[] open = new int[64];
    int[] times = new int[64];
    int count = 1;
    open[0] = root;
    times[0] = 1;
    while (count > 0) {
      int expression = open[--count];
      int multiple = times[count];
      if (composer.isLeaf(expression)) {
        int variable = composer.variableOf(expression);
        level[variable] = levels;
        bound[levels] = multiple;
        variableAtLevel[levels++] = variable;
        continue;
      }
      Diagram template = composer.operatorOf(expression).template(meter);
      if (count + template.levels() > open.length) {
        open = Arrays.copyOf(open, Math.max(count << 1, count + template.levels()));
        times = Arrays.copyOf(times, open.length);
      }
      for (int l = template.levels() - 1; l >= 0; l--) {
        open[count] = composer.partAt(expression, l);
        times[count++] = multiple * (template.to(l) - template.from(l));
      }
    }
    for (int variable = 0; variable < level.length; variable++) {
      if (level[variable] < 0) {
        variableAtLevel[levels++] = variable;
      }
    }
  }

  private int build(int root) {
    if (composer.isLeaf(root)) {
      return leaf(root, Diagram.FAILS, Diagram.WORKS);
    }
    open(root, Diagram.FAILS, Diagram.WORKS);
    while (true) {
      int frame = (depth - 1) * FRAME;
      int base = frames[frame + 3];
      Diagram template = templates[depth - 1];
      if (!advance(frame, template, base)) {
        continue;
      }
      int result = made[base + template.root()];
      madeCount = base;
      if (--depth == 0) {
        return result;
      }
      int outer = frame - FRAME;
      made[frames[outer + 3] + frames[outer + 1]++] = result;
    }
  }

  /** Builds template nodes until one needs an operator built first; true when none is left. */
  private boolean advance(int frame, Diagram template, int base) {
    int expression = frames[frame];
    int node = frames[frame + 1];
    int templateLevel = frames[frame + 2];
    while (node < template.size()) {
      while (node >= template.to(templateLevel)) {
        templateLevel--;
      }
      int part = composer.partAt(expression, templateLevel);
      int fails = made[base + template.low(node)];
      int works = made[base + template.high(node)];
      if (!composer.isLeaf(part)) {
        frames[frame + 1] = node;
        frames[frame + 2] = templateLevel;
        open(part, fails, works);
        return false;
      }
      made[base + node++] = leaf(part, fails, works);
    }
    return true;
  }

  private int leaf(int leaf, int fails, int works) {
    int id = next[level[composer.variableOf(leaf)]]++;
    low[id] = fails;
    high[id] = works;
    return id;
  }

  private void open(int expression, int fails, int works) {
    meter.at(low.length);
    Diagram template = composer.operatorOf(expression).template(meter);
    if (depth == templates.length) {
      templates = Arrays.copyOf(templates, depth << 1);
      frames = Arrays.copyOf(frames, frames.length << 1);
    }
    if (madeCount + template.size() > made.length) {
      made = Arrays.copyOf(made, Math.max(made.length << 1, madeCount + template.size()));
    }
    int frame = depth * FRAME;
    frames[frame] = expression;
    frames[frame + 1] = 2;
    frames[frame + 2] = template.levels() - 1;
    frames[frame + 3] = madeCount;
    made[madeCount + Diagram.FAILS] = fails;
    made[madeCount + Diagram.WORKS] = works;
    madeCount += template.size();
    templates[depth++] = template;
  }
}
