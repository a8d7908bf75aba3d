package org.kingbolt.core.testing;

import java.util.ArrayList;
import java.util.LinkedHashSet;
import java.util.List;
import java.util.Random;
import java.util.Set;
import org.kingbolt.core.NetworkBuilder;
import org.kingbolt.core.Probabilities;
import org.kingbolt.core.Probability;
import org.kingbolt.core.Structure;

/**
 * Random grids of links and arcs, some of whose parts are gates or grids again; a few components
 * stand in many places. Too large for truth tables, small enough to be compiled. For one thread.
 */
public final class NestedNetworks {

  private final Random random;
  private final int shared;
  private final double share;
  private int made;

  /**
   * Starts.
   *
   * @param seed decides all choices
   */
  public NestedNetworks(long seed) {
    this.random = new Random(seed);
    this.shared = 1 + random.nextInt(12);
    this.share = 0.6 * random.nextDouble();
  }

  /**
   * Makes a structure.
   *
   * @param depth how deep it is nested at most, small
   * @return the structure
   */
  public Structure structure(int depth) {
    if (depth == 0) {
      return leaf();
    }
    int choice = random.nextInt(9);
    if (choice < 4) {
      return grid(depth - 1);
    }
    if (choice == 4) {
      return structure(depth - 1).dual();
    }
    Set<Structure> parts = new LinkedHashSet<>();
    int count = 2 + random.nextInt(3);
    for (int i = 0; i < count; i++) {
      parts.add(structure(depth - 1));
    }
    return Structure.atLeast(1 + random.nextInt(parts.size()), List.copyOf(parts));
  }

  private Structure leaf() {
    boolean common = random.nextDouble() < share;
    return Structure.component(common ? "s" + random.nextInt(shared) : "x" + made++);
  }

  private Structure part(int depth) {
    return depth > 0 && random.nextInt(8) == 0 ? structure(depth) : leaf();
  }

  private Structure grid(int depth) {
    int rows = 2 + random.nextInt(3);
    int columns = 2 + random.nextInt(4);
    boolean arcs = random.nextInt(3) == 0;
    NetworkBuilder network = Structure.network();
    List<String> nodes = new ArrayList<>();
    for (int row = 0; row < rows; row++) {
      for (int column = 0; column < columns; column++) {
        String here = row + "," + column;
        nodes.add(here);
        if (row + 1 < rows) {
          network = joined(network, arcs, part(depth), here, (row + 1) + "," + column);
        }
        if (column + 1 < columns) {
          network = joined(network, arcs, part(depth), here, row + "," + (column + 1));
        }
      }
    }
    boolean failing = random.nextInt(3) == 0;
    for (String node : nodes) {
      network = failing && random.nextInt(3) == 0 ? network.node(node, part(depth)) : network;
    }
    String last = (rows - 1) + "," + (columns - 1);
    return switch (random.nextInt(4)) {
      case 0 -> network.reachingAllFrom("0,0");
      case 1 -> network.connecting("0,0", last, "0," + (columns - 1));
      default -> network.connecting("0,0", last);
    };
  }

  private NetworkBuilder joined(
      NetworkBuilder network, boolean arcs, Structure part, String from, String to) {
    if (!arcs) {
      return network.link(part, from, to);
    }
    NetworkBuilder joined = network.arc(part, from, to);
    return random.nextInt(3) == 0 ? joined.arc(leaf(), to, from) : joined;
  }

  /**
   * Draws probabilities.
   *
   * @param structure whose components they are for
   * @return sure, impossible, rare and other ones
   */
  public Probabilities probabilities(Structure structure) {
    Probabilities p = Probabilities.all(0.5);
    for (String name : structure.components()) {
      p =
          p.with(
              name,
              switch (random.nextInt(8)) {
                case 0 -> random.nextBoolean() ? Probability.CERTAIN : Probability.IMPOSSIBLE;
                case 1 -> Probability.failing(1e-9 * random.nextDouble());
                case 2 -> Probability.failing(0.01 * random.nextDouble());
                default -> Probability.working(random.nextDouble());
              });
    }
    return p;
  }
}
