package org.kingbolt.core.diagram;

/**
 * Frontier states of a network with links only: which frontier nodes are connected with each other
 * by what has been met so far (a partition into blocks), and which blocks hold a terminal.
 *
 * <p>Blocks are numbered from 1 in order of their first node, 0 stands for a failed node. The
 * number at position i is at most i + 1, and takes no more bits than that; one bit a block follows
 * for the terminals. Up to 15 nodes take one word.
 *
 * <p>Source: Hardy, Lucet &amp; Limnios, K-terminal network reliability measures with binary
 * decision diagrams, IEEE Trans. Reliab. 56 (2007) 506.
 */
final class UndirectedRule extends FrontierRule {

  private static final int WIDEST = Long.SIZE - 1;

  /** Where the number at each position is packed: word, shift and mask. */
  private static final int[] WORD = new int[WIDEST + 1];

  private static final int[] SHIFT = new int[WIDEST + 1];
  private static final int[] MASK = new int[WIDEST + 1];

  static {
    int word = 0;
    int shift = 0;
    for (int i = 0; i <= WIDEST; i++) {
      int bits = Integer.SIZE - Integer.numberOfLeadingZeros(i + 1);
      if (shift + bits > Long.SIZE) {
        word++;
        shift = 0;
      }
      WORD[i] = word;
      SHIFT[i] = shift;
      MASK[i] = (1 << bits) - 1;
      shift += bits;
    }
  }

  /** Block of the node at each position, 0 for a failed one; further fields are scratch. */
  private final int[] block = new int[WIDEST + 2];

  private final int[] renamed = new int[WIDEST + 2];

  /** Bit b: block b holds a terminal. */
  private long marked;

  private int lastBlock;

  UndirectedRule(FrontierPlan plan) {
    super(plan);
  }

  @Override
  void unpackEmpty() {
    lastBlock = 0;
    marked = 0;
  }

  @Override
  void unpack(long[] pool, int at, int length) {
    int count = activeCount;
    int last = 0;
    long word = 0;
    for (int i = 0; i < count; i++) {
      if (SHIFT[i] == 0) {
        word = pool[at + WORD[i]];
      }
      int number = (int) (word >>> SHIFT[i]) & MASK[i];
      block[i] = number;
      last = Math.max(last, number);
    }
    lastBlock = last;
    marked = count == 0 ? 0 : marks(pool, at, count) << 1;
  }

  private static long marks(long[] pool, int at, int count) {
    int end = endOf(count);
    long bits =
        end + count <= Long.SIZE
            ? pool[at + WORD[count - 1]] >>> end
            : pool[at + WORD[count - 1] + 1];
    return bits & ((1L << count) - 1);
  }

  /** The first free bit after the numbers of so many nodes. */
  private static int endOf(int count) {
    return SHIFT[count - 1] + Integer.bitCount(MASK[count - 1]);
  }

  @Override
  void pack(StateWords out) {
    int count = activeCount;
    if (count == 0) {
      out.add(0);
      return;
    }
    long marks = renumber();
    long word = 0;
    for (int i = 0; i < count; i++) {
      if (SHIFT[i] == 0 && i > 0) {
        out.add(word);
        word = 0;
      }
      word |= (long) block[i] << SHIFT[i];
    }
    int end = endOf(count);
    if (end + count <= Long.SIZE) {
      out.add(word | marks << end);
    } else {
      out.add(word);
      out.add(marks);
    }
  }

  /** Numbers blocks from 1 in order of position; returns bit b - 1 for a terminal in block b. */
  private long renumber() {
    for (int b = 1; b <= lastBlock; b++) {
      renamed[b] = 0;
    }
    int last = 0;
    long marks = 0;
    for (int i = 0; i < activeCount; i++) {
      int number = block[i];
      if (number != 0) {
        int name = renamed[number];
        if (name == 0) {
          name = ++last;
          renamed[number] = name;
          marks |= (marked >>> number & 1) << (name - 1);
        }
        block[i] = name;
      }
    }
    lastBlock = last;
    marked = marks << 1;
    return marks;
  }

  @Override
  int enter(int node, boolean works) {
    int at = activeCount - 1;
    if (at >= WIDEST) {
      throw new FrontierTooWideException(activeCount, WIDEST);
    }
    boolean terminal = plan.problem.terminal(node);
    block[at] = 0;
    if (!works) {
      return terminal ? SETTLED_FAILS : CONTINUES;
    }
    if (lastBlock == WIDEST) {
      renumber();
    }
    block[at] = ++lastBlock;
    marked |= terminal ? 1L << lastBlock : 0;
    return CONTINUES;
  }

  @Override
  void join(int from, int to, boolean arc) {
    int keep = block[from];
    int gone = block[to];
    if (keep == 0 || gone == 0 || keep == gone) {
      return;
    }
    for (int i = 0; i < activeCount; i++) {
      if (block[i] == gone) {
        block[i] = keep;
      }
    }
    if ((marked >>> gone & 1) != 0) {
      marked = (marked & ~(1L << gone)) | (1L << keep);
    }
  }

  @Override
  int leave(int node, int at) {
    int number = block[at];
    int count = activeCount;
    boolean alone = true;
    for (int i = 0; i < count; i++) {
      alone &= i == at || block[i] != number;
    }
    for (int i = at + 1; i < count; i++) {
      block[i - 1] = block[i];
    }
    boolean lost = alone && number != 0 && (marked >>> number & 1) != 0;
    return lost ? SETTLED_FAILS : CONTINUES;
  }

  @Override
  boolean answered() {
    return (marked & (marked - 1)) == 0;
  }
}
