package org.kingbolt.core.diagram;

import java.math.BigInteger;
import java.util.Arrays;

/**
 * Exact counts over the states of a function: how many working states have exactly j variables
 * working.
 *
 * <p>Method: level by level from below, every node carries the generating function of its working
 * states by number of working variables, in plain words. What no node further up asks for is let
 * go, so that only the layers in use are held. Cost: one scan; an operation on {@code levels^2}
 * bits for every node and every level that an edge skips, where edges to one node share the work.
 */
public final class StateCounts {

  private static final long[] NONE = {};

  private final Diagram diagram;
  private final WorkMeter meter;

  /** The length of one count. */
  private final int words;

  /** By id: the counts in a row, fewest working variables first; none when let go or all zero. */
  private final long[][] counts;

  /** By id: over how many of the last variables the counts are. */
  private final int[] variables;

  private long heldWords;

  private StateCounts(Diagram diagram, WorkMeter meter) {
    this.diagram = diagram;
    this.meter = meter;
    this.words = diagram.levels() / Long.SIZE + 1;
    this.counts = new long[diagram.size()][];
    this.variables = new int[diagram.size()];
    Arrays.fill(counts, NONE);
  }

  /**
   * Counts working states by number of working variables.
   *
   * @param diagram any diagram
   * @param meter hears of every node, in proportion to the counts that are held
   * @return entry j, from 0 to the number of levels, counts the working states with j variables
   *     working
   */
  public static BigInteger[] workingBySize(Diagram diagram, WorkMeter meter) {
    return new StateCounts(diagram, meter).bySize();
  }

  private BigInteger[] bySize() {
    int levels = diagram.levels();
    int[] last = lastParents();
    long[] one = new long[words];
    one[0] = 1;
    hold(Diagram.WORKS, one, 0);
    for (int level = levels - 1; level >= 0; level--) {
      int below = levels - level - 1;
      for (int id = diagram.from(level); id < diagram.to(level); id++) {
        if (last[id] == 0) {
          continue;
        }
        int low = diagram.low(id);
        int high = diagram.high(id);
        lift(low, below);
        lift(high, below);
        long[] sum = Arrays.copyOf(counts[low], (below + 2) * words);
        add(counts[high], sum, words);
        hold(id, sum, below + 1);
        letGo(low, last[low] == id);
        letGo(high, last[high] == id);
      }
    }
    lift(diagram.root(), levels);
    long[] all = Arrays.copyOf(counts[diagram.root()], (levels + 1) * words);
    BigInteger[] bySize = new BigInteger[levels + 1];
    Arrays.setAll(bySize, size -> integer(all, size * words, words));
    return bySize;
  }

  /** By id: the parent met last on the way up; 0 for what the root does not lead to. */
  private int[] lastParents() {
    int[] last = new int[diagram.size()];
    last[diagram.root()] = diagram.size();
    for (int id = diagram.root(); id >= 2; id--) {
      if (last[id] > 0) {
        last[diagram.low(id)] = Math.max(last[diagram.low(id)], id);
        last[diagram.high(id)] = Math.max(last[diagram.high(id)], id);
      }
    }
    return last;
  }

  private void hold(int id, long[] count, int over) {
    heldWords += count.length - counts[id].length;
    counts[id] = count;
    variables[id] = over;
    long fixed = (long) counts.length * 16;
    meter.now((fixed + heldWords * Long.BYTES) / WorkMeter.BYTES_PER_NODE);
  }

  private void letGo(int id, boolean unused) {
    if (unused) {
      heldWords -= counts[id].length;
      counts[id] = NONE;
    }
  }

  /** Lets further variables vary freely: times 1 + x for each. */
  private void lift(int id, int over) {
    if (counts[id].length == 0) {
      return;
    }
    int first = variables[id];
    if (first < over) {
      hold(id, Arrays.copyOf(counts[id], (over + 1) * words), first);
    }
    for (int number = first + 1; number <= over; number++) {
      timesFree(counts[id], number);
      hold(id, counts[id], number);
    }
  }

  private void timesFree(long[] count, int top) {
    for (int to = top * words; to > 0; to -= words) {
      long carry = 0;
      for (int i = to; i < to + words; i++) {
        long sum = count[i] + count[i - words] + carry;
        carry = carry(count[i], count[i - words], sum);
        count[i] = sum;
      }
    }
  }

  /** Adds from some word on. */
  private static void add(long[] summand, long[] to, int offset) {
    long carry = 0;
    for (int i = 0; i < summand.length; i++) {
      long a = to[offset + i];
      long sum = a + summand[i] + carry;
      carry = carry(a, summand[i], sum);
      to[offset + i] = sum;
    }
  }

  private static long carry(long a, long b, long sum) {
    return ((a & b) | ((a | b) & ~sum)) >>> 63;
  }

  private static BigInteger integer(long[] from, int start, int words) {
    byte[] bytes = new byte[words * Long.BYTES];
    for (int i = 0; i < bytes.length; i++) {
      long word = from[start + i / Long.BYTES];
      bytes[bytes.length - 1 - i] = (byte) (word >>> (Byte.SIZE * (i % Long.BYTES)));
    }
    return new BigInteger(1, bytes);
  }
}
