package org.kingbolt.docs;

import java.math.BigDecimal;
import java.util.List;
import org.kingbolt.core.published.Topology;

/**
 * Working states of a network whose links are all alike, counted by enumeration: all of them, and
 * those in which a given link works. From these counts everything follows exactly.
 */
final class LinkCounts {

  private final int links;
  private final int[][] ends;
  private final int nodes;
  private final long[] all;
  private final long[][] with;

  private LinkCounts(Topology network, List<String> terminals) {
    List<String> names = network.nodes();
    this.links = network.links().size();
    this.nodes = names.size();
    this.ends =
        network.links().stream()
            .map(link -> new int[] {names.indexOf(link.a()), names.indexOf(link.b())})
            .toArray(int[][]::new);
    this.all = new long[links + 1];
    this.with = new long[links][links + 1];
    int targets = 0;
    for (String terminal : terminals) {
      targets |= 1 << names.indexOf(terminal);
    }
    for (int state = 0; state < 1 << links; state++) {
      if (connected(state, targets)) {
        count(state);
      }
    }
  }

  /** Goes through the states of a network of up to 25 links and 32 nodes. */
  static LinkCounts of(Topology network, List<String> terminals) {
    return new LinkCounts(network, terminals);
  }

  /** Every node keeps the mask of the piece it is in; a working link unites two pieces. */
  private boolean connected(int state, int targets) {
    int[] piece = new int[nodes];
    for (int node = 0; node < nodes; node++) {
      piece[node] = 1 << node;
    }
    for (int rest = state; rest != 0; rest &= rest - 1) {
      int[] link = ends[Integer.numberOfTrailingZeros(rest)];
      int united = piece[link[0]] | piece[link[1]];
      if (united != piece[link[0]]) {
        for (int members = united; members != 0; members &= members - 1) {
          piece[Integer.numberOfTrailingZeros(members)] = united;
        }
      }
    }
    return (piece[Integer.numberOfTrailingZeros(targets)] & targets) == targets;
  }

  private void count(int state) {
    int working = Integer.bitCount(state);
    all[working]++;
    for (int rest = state; rest != 0; rest &= rest - 1) {
      with[Integer.numberOfTrailingZeros(rest)][working]++;
    }
  }

  /** The exact probability of working. */
  BigDecimal reliability(BigDecimal p) {
    BigDecimal sum = BigDecimal.ZERO;
    for (int j = 0; j <= links; j++) {
      sum = sum.add(weight(all[j], j, links - j, p));
    }
    return sum;
  }

  /** The exact probability of working given that a link works, less that given it has failed. */
  BigDecimal birnbaum(int link, BigDecimal p) {
    BigDecimal difference = BigDecimal.ZERO;
    for (int j = 0; j <= links; j++) {
      long up = with[link][j];
      long down = all[j] - up;
      if (up > 0) {
        difference = difference.add(weight(up, j - 1, links - j, p));
      }
      if (down > 0) {
        difference = difference.subtract(weight(down, j, links - j - 1, p));
      }
    }
    return difference;
  }

  private static BigDecimal weight(long states, int up, int down, BigDecimal p) {
    return BigDecimal.valueOf(states)
        .multiply(p.pow(up))
        .multiply(BigDecimal.ONE.subtract(p).pow(down));
  }
}
