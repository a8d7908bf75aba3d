package org.kingbolt.core.diagram;

import java.util.Arrays;

/**
 * One side of a network that is too wide: some of its links are kept, and all others are held
 * failed, which makes a network that works less often, or held working, which makes one that works
 * more often.
 */
final class NetworkExcerpt {

  private NetworkExcerpt() {}

  /** The network with all other links failed. */
  static NetworkProblem withoutOthers(NetworkProblem network, boolean[] kept) {
    int count = 0;
    int[] links = new int[network.links()];
    for (int link = 0; link < kept.length; link++) {
      if (kept[link]) {
        links[count++] = link;
      }
    }
    int[] from = new int[count];
    int[] to = new int[count];
    boolean[] arc = new boolean[count];
    int[] linkSlot = new int[count];
    for (int i = 0; i < count; i++) {
      from[i] = network.from[links[i]];
      to[i] = network.to[links[i]];
      arc[i] = network.arc[links[i]];
      linkSlot[i] = network.linkSlot[links[i]];
    }
    return new NetworkProblem(
        from, to, arc, linkSlot, network.nodeSlot, network.source, network.target);
  }

  /**
   * The network with all other links working in both directions, and with all nodes working at
   * which no link is kept. What is so joined becomes one node.
   */
  static NetworkProblem withOthersWorking(NetworkProblem network, boolean[] kept) {
    int nodes = network.nodes();
    boolean[] touched = new boolean[nodes];
    for (int link = 0; link < kept.length; link++) {
      if (kept[link]) {
        touched[network.from[link]] = true;
        touched[network.to[link]] = true;
      }
    }
    boolean[] fails = new boolean[nodes];
    for (int node = 0; node < nodes; node++) {
      fails[node] = touched[node] && network.nodeSlot[node] != NetworkProblem.PERFECT;
    }
    int[] into = new int[nodes];
    Arrays.setAll(into, node -> node);
    for (int link = 0; link < kept.length; link++) {
      int a = network.from[link];
      int b = network.to[link];
      if (!kept[link] && !fails[a] && !fails[b]) {
        into[find(into, a)] = find(into, b);
      }
    }
    return merged(network, kept, fails, into);
  }

  private static NetworkProblem merged(
      NetworkProblem network, boolean[] kept, boolean[] fails, int[] into) {
    int[] number = new int[network.nodes()];
    Arrays.fill(number, -1);
    int count = 0;
    for (int node = 0; node < number.length; node++) {
      int root = find(into, node);
      if (number[root] < 0) {
        number[root] = count++;
      }
      number[node] = number[root];
    }
    int[] nodeSlot = new int[count];
    boolean[] target = new boolean[count];
    Arrays.fill(nodeSlot, NetworkProblem.PERFECT);
    for (int node = 0; node < number.length; node++) {
      target[number[node]] |= network.target[node];
      if (fails[node]) {
        nodeSlot[number[node]] = network.nodeSlot[node];
      }
    }
    int source = number[network.source];
    target[source] = false;
    int[] from = new int[network.links()];
    int[] to = new int[from.length];
    boolean[] arc = new boolean[from.length];
    int[] linkSlot = new int[from.length];
    int links = 0;
    for (int link = 0; link < from.length; link++) {
      int a = number[network.from[link]];
      int b = number[network.to[link]];
      if (a != b) {
        from[links] = a;
        to[links] = b;
        arc[links] = kept[link] && network.arc[link];
        linkSlot[links++] = kept[link] ? network.linkSlot[link] : NetworkProblem.PERFECT;
      }
    }
    return new NetworkProblem(
        Arrays.copyOf(from, links),
        Arrays.copyOf(to, links),
        Arrays.copyOf(arc, links),
        Arrays.copyOf(linkSlot, links),
        nodeSlot,
        source,
        target);
  }

  private static int find(int[] into, int node) {
    int at = node;
    while (into[at] != at) {
      into[at] = into[into[at]];
      at = into[at];
    }
    return at;
  }
}
