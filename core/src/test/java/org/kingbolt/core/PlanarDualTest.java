package org.kingbolt.core;

import static org.junit.jupiter.api.Assertions.assertEquals;

import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

/**
 * A grid fails between its corners exactly where, in the planar dual, failed links join the two
 * outer faces (Moore and Shannon 1956, from memory): two networks, one answer, in both tails.
 */
class PlanarDualTest {

  private static final String LOWER = "lower";
  private static final String UPPER = "upper";

  private static Structure grid(int n) {
    NetworkBuilder network = Structure.network();
    for (int r = 0; r < n; r++) {
      for (int c = 0; c < n; c++) {
        if (c + 1 < n) {
          network.link("h" + r + "." + c, r + "." + c, r + "." + (c + 1));
        }
        if (r + 1 < n) {
          network.link("v" + r + "." + c, r + "." + c, (r + 1) + "." + c);
        }
      }
    }
    return network.connecting("0.0", (n - 1) + "." + (n - 1));
  }

  /** Face r.c lies below and to the right of node r.c; every link parts two faces. */
  private static Structure dual(int n) {
    NetworkBuilder network = Structure.network();
    for (int r = 0; r < n; r++) {
      for (int c = 0; c < n; c++) {
        if (c + 1 < n) {
          network.link("h" + r + "." + c, face(r - 1, c, n), face(r, c, n));
        }
        if (r + 1 < n) {
          network.link("v" + r + "." + c, face(r, c - 1, n), face(r, c, n));
        }
      }
    }
    return network.connecting(UPPER, LOWER);
  }

  private static String face(int row, int column, int n) {
    if (row < 0 || column == n - 1) {
      return UPPER;
    }
    return row == n - 1 || column < 0 ? LOWER : row + "." + column;
  }

  @ParameterizedTest
  @CsvSource({"4, 0.1", "6, 1e-6", "8, 0.3", "10, 1e-6"})
  void failures_joinTheOuterFaces(int n, double q) {
    Probability link = Probability.failing(q);
    Probability grid = grid(n).reliability(Probabilities.all(link));
    Probability dual = dual(n).reliability(Probabilities.all(link.complement()));
    assertEquals(dual.working(), grid.failing(), 1e-12 * grid.failing());
    assertEquals(dual.failing(), grid.working(), 1e-12 * grid.working());
    Probability compiled = grid(n).compile().reliability(Probabilities.all(link));
    assertEquals(grid.failing(), compiled.failing(), 1e-12 * grid.failing());
  }
}
