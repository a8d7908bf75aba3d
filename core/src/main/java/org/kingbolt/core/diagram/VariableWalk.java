package org.kingbolt.core.diagram;

import java.util.ArrayDeque;
import java.util.Arrays;
import java.util.Deque;
import org.jspecify.annotations.Nullable;

/**
 * Sets in order of size and, within a size, in lexicographic order of variables, whatever the order
 * of levels: the sets of a size are selected, and split again and again into those that contain the
 * smallest variable that is left and those that do not.
 */
final class VariableWalk implements SetWalk {

  private static final int NODES_A_COUNT = 8;

  private final Diagram nodes;
  private final SizeWalk sizes;
  private final WorkMeter meter;
  private final Deque<Part> waiting = new ArrayDeque<>();
  private long held;

  /** Some sets of one size, and the variables that all of them have in common. */
  private static final class Part {
    final int[] taken;
    final int[] level;
    final int[] low;
    final int[] high;
    final int root;

    Part(int[] taken, int[] level, int[] low, int[] high, int root) {
      this.taken = taken;
      this.level = level;
      this.low = low;
      this.high = high;
      this.root = root;
    }

    int size() {
      return level.length;
    }

    boolean isOneSet() {
      for (int id = 2; id < level.length; id++) {
        if (low[id] != SetDiagram.NO_SETS) {
          return false;
        }
      }
      return true;
    }
  }

  VariableWalk(Diagram nodes, WorkMeter meter) {
    this.nodes = nodes;
    this.sizes = new SizeWalk(nodes, meter);
    this.meter = meter;
  }

  @Override
  public int @Nullable [] next() {
    if (waiting.isEmpty()) {
      if (!sizes.nextSize()) {
        return null;
      }
      SizedImage.Room exactly = (id, left) -> sizes.has(id, left) ? left : SizedImage.NO_ROOM;
      push(whole(new SizedImage(nodes, exactly, meter).of(sizes.size())));
    }
    Part part = waiting.pop();
    held -= part.size();
    while (!part.isOneSet()) {
      int chosen = smallest(part);
      Part without = split(part, chosen, false);
      if (without.root != SetDiagram.NO_SETS) {
        push(without);
      }
      part = split(part, chosen, true);
    }
    return only(part);
  }

  private void push(Part part) {
    held += part.size();
    meter.at(held / NODES_A_COUNT);
    waiting.push(part);
  }

  private static Part whole(Diagram family) {
    int size = family.size();
    int[] level = new int[size];
    Arrays.fill(level, 0, 2, family.levels());
    for (int l = 0; l < family.levels(); l++) {
      Arrays.fill(level, family.from(l), family.to(l), l);
    }
    int[] low = new int[size];
    int[] high = new int[size];
    for (int id = 2; id < size; id++) {
      low[id] = family.low(id);
      high[id] = family.high(id);
    }
    return new Part(new int[0], level, low, high, family.root());
  }

  /** The level of the smallest variable; nodes of a part are all in use. */
  private int smallest(Part part) {
    int best = part.level[2];
    for (int id = 3; id < part.size(); id++) {
      if (nodes.variableAt(part.level[id]) < nodes.variableAt(best)) {
        best = part.level[id];
      }
    }
    return best;
  }

  /** The sets with the variable of a level, which is taken out of them, or those without it. */
  private Part split(Part part, int chosen, boolean with) {
    int[] image = new int[part.size()];
    image[SetDiagram.ONLY_EMPTY_SET] = SetDiagram.ONLY_EMPTY_SET;
    int[] low = part.low.clone();
    int[] high = part.high.clone();
    for (int id = 2; id < part.size(); id++) {
      meter.at(held / NODES_A_COUNT);
      if (part.level[id] > chosen) {
        image[id] = id;
      } else if (part.level[id] == chosen) {
        image[id] = with ? part.high[id] : part.low[id];
      } else {
        low[id] = image(part, part.low[id], chosen, with, image);
        high[id] = image(part, part.high[id], chosen, with, image);
        image[id] = high[id] == SetDiagram.NO_SETS ? low[id] : id;
      }
    }
    int[] taken = part.taken;
    if (with) {
      taken = Arrays.copyOf(taken, taken.length + 1);
      taken[taken.length - 1] = nodes.variableAt(chosen);
    }
    int root = image(part, part.root, chosen, with, image);
    return inUse(new Part(taken, part.level, low, high, root));
  }

  /** What a node above becomes; one below was reached without passing the level. */
  private static int image(Part part, int id, int chosen, boolean with, int[] image) {
    return with && part.level[id] > chosen ? SetDiagram.NO_SETS : image[id];
  }

  /** The same sets without nodes that nothing leads to. */
  private static Part inUse(Part part) {
    boolean[] used = new boolean[part.size()];
    used[part.root] = true;
    int count = 2;
    for (int id = part.root; id >= 2; id--) {
      if (used[id]) {
        used[part.low[id]] = true;
        used[part.high[id]] = true;
        count++;
      }
    }
    int[] image = new int[part.size()];
    image[SetDiagram.ONLY_EMPTY_SET] = SetDiagram.ONLY_EMPTY_SET;
    int[] level = new int[count];
    int[] low = new int[count];
    int[] high = new int[count];
    level[SetDiagram.NO_SETS] = part.level[SetDiagram.NO_SETS];
    level[SetDiagram.ONLY_EMPTY_SET] = part.level[SetDiagram.ONLY_EMPTY_SET];
    int next = 2;
    for (int id = 2; id <= part.root; id++) {
      if (used[id]) {
        level[next] = part.level[id];
        low[next] = image[part.low[id]];
        high[next] = image[part.high[id]];
        image[id] = next++;
      }
    }
    return new Part(part.taken, level, low, high, image[part.root]);
  }

  private int[] only(Part part) {
    int[] set = Arrays.copyOf(part.taken, part.taken.length + part.size() - 2);
    for (int id = 2; id < part.size(); id++) {
      set[part.taken.length + id - 2] = nodes.variableAt(part.level[id]);
    }
    Arrays.sort(set);
    return set;
  }
}
