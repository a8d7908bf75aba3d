package org.kingbolt.core.published;

import java.math.BigDecimal;
import java.math.BigInteger;
import java.util.ArrayList;
import java.util.BitSet;
import java.util.LinkedHashSet;
import java.util.List;
import java.util.Set;
import org.kingbolt.core.published.Topology.Link;

/**
 * All states of a network of up to 22 links, one by one: a way to its figures that shares nothing
 * with the library. States are bit masks of working links.
 */
public final class StateTable {

  private final Topology topology;
  private final int[] from;
  private final int[] to;
  private final int nodes;
  private final BitSet working = new BitSet();

  private StateTable(Topology topology, List<String> terminals) {
    this.topology = topology;
    List<String> names = topology.nodes();
    this.nodes = names.size();
    this.from = topology.links().stream().mapToInt(link -> names.indexOf(link.a())).toArray();
    this.to = topology.links().stream().mapToInt(link -> names.indexOf(link.b())).toArray();
    int first = names.indexOf(terminals.get(0));
    long targets = 0;
    for (String terminal : terminals) {
      targets |= 1L << names.indexOf(terminal);
    }
    for (int state = 0; state < 1 << from.length; state++) {
      if ((joined(state, first) & targets) == targets) {
        working.set(state);
      }
    }
  }

  /**
   * Goes through the states.
   *
   * @param topology at most 22 links and 64 nodes
   * @param terminals what must be connected; none for all nodes
   * @return the table
   */
  public static StateTable of(Topology topology, String... terminals) {
    return new StateTable(topology, terminals.length == 0 ? topology.nodes() : List.of(terminals));
  }

  /** The nodes in one piece with a node, by merging the two labels of every working link. */
  private long joined(int state, int node) {
    int[] label = new int[nodes];
    for (int i = 0; i < nodes; i++) {
      label[i] = i;
    }
    for (int rest = state; rest != 0; rest &= rest - 1) {
      int link = Integer.numberOfTrailingZeros(rest);
      int a = root(label, from[link]);
      int b = root(label, to[link]);
      label[a] = b;
    }
    int root = root(label, node);
    long found = 0;
    for (int i = 0; i < nodes; i++) {
      found |= root(label, i) == root ? 1L << i : 0;
    }
    return found;
  }

  private static int root(int[] label, int node) {
    int at = node;
    while (label[at] != at) {
      at = label[at];
    }
    return at;
  }

  /**
   * Counts the working states.
   *
   * @return entry j: those with exactly j working links
   */
  public List<BigInteger> workingStates() {
    long[] counts = new long[from.length + 1];
    working.stream().forEach(state -> counts[Integer.bitCount(state)]++);
    List<BigInteger> result = new ArrayList<>();
    for (long count : counts) {
      result.add(BigInteger.valueOf(count));
    }
    return result;
  }

  /**
   * The exact reliability when all links are alike.
   *
   * @param p the probability of working of every link
   * @return without rounding
   */
  public BigDecimal reliability(String p) {
    BigDecimal up = new BigDecimal(p);
    BigDecimal down = BigDecimal.ONE.subtract(up);
    List<BigInteger> counts = workingStates();
    BigDecimal sum = BigDecimal.ZERO;
    for (int j = 0; j < counts.size(); j++) {
      sum =
          sum.add(
              new BigDecimal(counts.get(j))
                  .multiply(up.pow(j))
                  .multiply(down.pow(from.length - j)));
    }
    return sum;
  }

  /**
   * Working states that no longer work when any one link fails.
   *
   * @return the links of each
   */
  public Set<Set<String>> minimalPaths() {
    Set<Set<String>> sets = new LinkedHashSet<>();
    for (int state = working.nextSetBit(0); state >= 0; state = working.nextSetBit(state + 1)) {
      if (noneWorks(state, state)) {
        sets.add(names(state));
      }
    }
    return sets;
  }

  /**
   * Failed states that work when any one link is repaired.
   *
   * @return the failed links of each
   */
  public Set<Set<String>> minimalCuts() {
    int all = (1 << from.length) - 1;
    Set<Set<String>> sets = new LinkedHashSet<>();
    for (int state = working.nextClearBit(0);
        state <= all;
        state = working.nextClearBit(state + 1)) {
      if (allWork(state, all & ~state)) {
        sets.add(names(all & ~state));
      }
    }
    return sets;
  }

  private boolean noneWorks(int state, int links) {
    for (int rest = links; rest != 0; rest &= rest - 1) {
      if (working.get(state ^ Integer.lowestOneBit(rest))) {
        return false;
      }
    }
    return true;
  }

  private boolean allWork(int state, int links) {
    for (int rest = links; rest != 0; rest &= rest - 1) {
      if (!working.get(state ^ Integer.lowestOneBit(rest))) {
        return false;
      }
    }
    return true;
  }

  private Set<String> names(int mask) {
    Set<String> names = new LinkedHashSet<>();
    List<Link> links = topology.links();
    for (int rest = mask; rest != 0; rest &= rest - 1) {
      names.add(links.get(Integer.numberOfTrailingZeros(rest)).name());
    }
    return names;
  }
}
