package org.kingbolt.core.diagram;

/**
 * Frontier states of a network with links only: which frontier nodes are connected with each other
 * by what has been met so far (a partition into blocks), and which blocks hold a terminal.
 *
 * <p>Source: Hardy, Lucet &amp; Limnios, K-terminal network reliability measures with binary
 * decision diagrams, IEEE Trans. Reliab. 56 (2007) 506. One byte a node: block number, top bit for
 * a block with a terminal, 0 for a failed node.
 */
final class UndirectedRule extends FrontierRule {

  private static final int MARK = 0x80;
  private static final int MOST_BLOCKS = MARK - 1;

  /** Block of each node, 0 for a failed one; marks by block. */
  private final int[] block;

  private boolean[] marked = new boolean[MOST_BLOCKS + 1];
  private final int[] renamed = new int[MOST_BLOCKS + 1];
  private int lastBlock;
  private int markedBlocks;

  UndirectedRule(FrontierPlan plan) {
    super(plan);
    this.block = new int[plan.problem.nodes()];
  }

  @Override
  void unpackEmpty() {
    lastBlock = 0;
    markedBlocks = 0;
  }

  @Override
  void unpack(long[] pool, int at, int length) {
    lastBlock = 0;
    markedBlocks = 0;
    for (int i = 0; i < activeCount; i++) {
      int code = (int) (pool[at + (i >> 3)] >>> ((i & 7) << 3)) & 0xFF;
      int number = code & MOST_BLOCKS;
      block[active[i]] = number;
      if (number > lastBlock) {
        lastBlock = number;
        marked[number] = (code & MARK) != 0;
        markedBlocks += marked[number] ? 1 : 0;
      }
    }
  }

  @Override
  void pack(StateWords out) {
    for (int i = 1; i <= lastBlock; i++) {
      renamed[i] = 0;
    }
    int count = 0;
    long word = 0;
    for (int i = 0; i < activeCount; i++) {
      int number = block[active[i]];
      int code = 0;
      if (number != 0) {
        if (renamed[number] == 0) {
          renamed[number] = ++count;
        }
        code = renamed[number] | (marked[number] ? MARK : 0);
      }
      word |= (long) code << ((i & 7) << 3);
      if ((i & 7) == 7) {
        out.add(word);
        word = 0;
      }
    }
    if ((activeCount & 7) != 0) {
      out.add(word);
    }
  }

  @Override
  int enter(int node, boolean works) {
    boolean terminal = plan.problem.terminal(node);
    if (!works) {
      block[node] = 0;
      return terminal ? SETTLED_FAILS : CONTINUES;
    }
    lastBlock++;
    if (lastBlock > MOST_BLOCKS) {
      throw new FrontierTooWideException(activeCount, MOST_BLOCKS);
    }
    block[node] = lastBlock;
    marked[lastBlock] = terminal;
    markedBlocks += terminal ? 1 : 0;
    return CONTINUES;
  }

  @Override
  int join(int link) {
    int keep = block[plan.problem.from[link]];
    int gone = block[plan.problem.to[link]];
    if (keep == 0 || gone == 0 || keep == gone) {
      return CONTINUES;
    }
    for (int i = 0; i < activeCount; i++) {
      if (block[active[i]] == gone) {
        block[active[i]] = keep;
      }
    }
    if (marked[keep] && marked[gone]) {
      markedBlocks--;
    }
    marked[keep] |= marked[gone];
    marked[gone] = false;
    return CONTINUES;
  }

  @Override
  int leave(int node) {
    int number = block[node];
    if (number == 0 || !marked[number]) {
      return CONTINUES;
    }
    for (int i = 0; i < activeCount; i++) {
      if (active[i] != node && block[active[i]] == number) {
        return CONTINUES;
      }
    }
    return SETTLED_FAILS;
  }

  @Override
  boolean answered() {
    return markedBlocks == 1;
  }
}
