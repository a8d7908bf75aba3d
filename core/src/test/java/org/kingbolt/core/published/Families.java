package org.kingbolt.core.published;

import java.util.ArrayList;
import java.util.List;
import java.util.stream.IntStream;
import org.kingbolt.core.Structure;

/** Networks that come in families, and the well-known single graphs, from their definitions. */
public final class Families {

  private Families() {}

  /** Component names 1 to n. */
  static String[] components(int n) {
    return IntStream.rangeClosed(1, n).mapToObj(String::valueOf).toArray(String[]::new);
  }

  /** Nodes r0c0 and on, each linked to its neighbours to the right and below. */
  static Topology grid(int rows, int columns) {
    List<String> pairs = new ArrayList<>();
    for (int r = 0; r < rows; r++) {
      for (int c = 0; c < columns; c++) {
        if (c + 1 < columns) {
          pairs.add(cell(r, c) + " " + cell(r, c + 1));
        }
        if (r + 1 < rows) {
          pairs.add(cell(r, c) + " " + cell(r + 1, c));
        }
      }
    }
    return Topology.ofPairs(pairs);
  }

  /** A square grid of so many nodes a side, connecting two opposite corners. */
  public static Structure corners(int side) {
    return grid(side, side).connecting(cell(0, 0), cell(side - 1, side - 1));
  }

  static String cell(int row, int column) {
    return "r" + row + "c" + column;
  }

  /** The complete graph over nodes 1 to n. */
  static Topology complete(int n) {
    List<String> pairs = new ArrayList<>();
    for (int a = 1; a <= n; a++) {
      for (int b = a + 1; b <= n; b++) {
        pairs.add(a + " " + b);
      }
    }
    return Topology.ofPairs(pairs);
  }

  /** Nodes 0 to 2^n - 1, linked where they differ in one binary digit. */
  static Topology cube(int n) {
    List<String> pairs = new ArrayList<>();
    for (int a = 0; a < 1 << n; a++) {
      for (int bit = 0; bit < n; bit++) {
        int b = a ^ 1 << bit;
        if (a < b) {
          pairs.add(a + " " + b);
        }
      }
    }
    return Topology.ofPairs(pairs);
  }

  /** Outer ring 0 to 4, inner star 5 to 9; nodes 0 and 1 are adjacent, 0 and 2 are not. */
  static Topology petersen() {
    return generalizedPetersen(5, 2);
  }

  /**
   * The dodecahedron: outer ring 0 to 9, inner ring 10 to 19 in steps of 2. Opposite to node 0 is
   * node 5, the only one at distance 5.
   */
  static Topology dodecahedron() {
    return generalizedPetersen(10, 2);
  }

  private static Topology generalizedPetersen(int n, int step) {
    List<String> pairs = new ArrayList<>();
    for (int i = 0; i < n; i++) {
      pairs.add(i + " " + (i + 1) % n);
      pairs.add(i + " " + (i + n));
      pairs.add((i + n) + " " + ((i + step) % n + n));
    }
    return Topology.ofPairs(pairs);
  }

  /** The bridge: 1 and 4 in a row, 2 and 5 in a row, 3 across. */
  static Topology bridge() {
    return new Topology(
        List.of(
            new Topology.Link("1", "s", "u"),
            new Topology.Link("2", "s", "v"),
            new Topology.Link("3", "u", "v"),
            new Topology.Link("4", "u", "t"),
            new Topology.Link("5", "v", "t")));
  }
}
