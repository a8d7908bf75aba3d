package org.kingbolt.core.published;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.math.BigInteger;
import java.util.Arrays;
import java.util.List;
import java.util.Map;
import java.util.TreeMap;
import org.apache.commons.math3.fraction.BigFraction;
import org.apache.commons.math3.util.CombinatoricsUtils;
import org.junit.jupiter.api.Test;
import org.kingbolt.core.CoherentSystem;
import org.kingbolt.core.Probabilities;
import org.kingbolt.core.Probability;
import org.kingbolt.core.ReliabilityPolynomial;

/** The polynomials of the grid of 12 x 6 nodes, exactly. */
class GridPolynomialTest {

  private static final int LINKS = 12 * 5 + 11 * 6;

  private static final Topology GRID = Families.grid(12, 6);

  /**
   * The shortest ways between opposite corners are the lattice paths, C(16, 5) of them (textbook
   * fact); a corner is cut off by its two links.
   */
  @Test
  void corners_areCountedExactly() {
    CoherentSystem system = GRID.connecting(Families.cell(0, 0), Families.cell(11, 5)).compile();
    List<BigInteger> states = system.polynomial().workingStates();
    int length = 11 + 5;
    for (int j = 0; j < length; j++) {
      assertEquals(BigInteger.ZERO, states.get(j));
    }
    BigInteger ways = BigInteger.valueOf(CombinatoricsUtils.binomialCoefficient(length, 5));
    assertEquals(ways, states.get(length));
    assertEquals(BigInteger.valueOf(LINKS), states.get(LINKS - 1));
    BigInteger pairs = BigInteger.valueOf(LINKS * (LINKS - 1) / 2);
    assertEquals(pairs.subtract(BigInteger.TWO), states.get(LINKS - 2));
    assertTotals(system);
  }

  /** The matrix tree theorem of Kirchhoff counts the smallest working states (from memory). */
  @Test
  void allNodes_areCountedExactly() {
    CoherentSystem system = GRID.connectingAll().compile();
    List<BigInteger> states = system.polynomial().workingStates();
    int nodes = GRID.nodes().size();
    assertEquals(72, nodes);
    assertEquals(BigInteger.ZERO, states.get(nodes - 2));
    assertEquals(trees(GRID), states.get(nodes - 1));
    BigInteger pairs = BigInteger.valueOf(LINKS * (LINKS - 1) / 2);
    assertEquals(pairs.subtract(BigInteger.valueOf(4)), states.get(LINKS - 2), "four corners");
    assertTotals(system);
  }

  private static void assertTotals(CoherentSystem system) {
    ReliabilityPolynomial polynomial = system.polynomial();
    assertEquals(LINKS + 1, polynomial.workingStates().size());
    assertEquals(BigFraction.ONE, polynomial.at(BigFraction.ONE));
    BigFraction half = polynomial.at(BigFraction.ONE_HALF);
    assertEquals(
        new BigFraction(Exact.states(polynomial)), half.multiply(BigInteger.TWO.pow(LINKS)));
    BigInteger byPowers = BigInteger.ZERO;
    for (int j = polynomial.coefficients().size() - 1; j >= 0; j--) {
      // 2^m r(1/2)
      byPowers =
          byPowers.add(polynomial.coefficients().get(j).multiply(BigInteger.TWO.pow(LINKS - j)));
    }
    assertEquals(Exact.states(polynomial), byPowers);
    assertEquals(
        BigInteger.ONE,
        polynomial.coefficients().stream().reduce(BigInteger.ZERO, BigInteger::add));
    for (Probability p :
        List.of(
            Probability.failing(1e-9),
            Probability.failing(0.1),
            Probability.working(0.5),
            Probability.working(1e-3))) {
      Probability byDiagram = system.reliability(Probabilities.all(p));
      assertClose(byDiagram.working(), polynomial.at(p).working());
      assertClose(byDiagram.failing(), polynomial.at(p).failing());
    }
  }

  private static void assertClose(double expected, double value) {
    assertTrue(expected > 0, "nothing to compare");
    assertEquals(expected, value, 1e-12 * expected);
  }

  /** A principal minor of the Laplacian, by elimination without fractions. */
  private static BigInteger trees(Topology network) {
    Map<String, Integer> numbers = new TreeMap<>();
    network.nodes().forEach(node -> numbers.put(node, numbers.size()));
    int n = numbers.size();
    BigInteger[][] matrix = new BigInteger[n][n];
    for (BigInteger[] row : matrix) {
      Arrays.fill(row, BigInteger.ZERO);
    }
    for (Topology.Link link : network.links()) {
      int a = numbers.get(link.a());
      int b = numbers.get(link.b());
      matrix[a][a] = matrix[a][a].add(BigInteger.ONE);
      matrix[b][b] = matrix[b][b].add(BigInteger.ONE);
      matrix[a][b] = matrix[a][b].subtract(BigInteger.ONE);
      matrix[b][a] = matrix[b][a].subtract(BigInteger.ONE);
    }
    BigInteger last = BigInteger.ONE;
    for (int k = 0; k < n - 2; k++) {
      for (int i = k + 1; i < n - 1; i++) {
        for (int j = k + 1; j < n - 1; j++) {
          BigInteger cross = matrix[i][j].multiply(matrix[k][k]);
          matrix[i][j] = cross.subtract(matrix[i][k].multiply(matrix[k][j])).divide(last);
        }
      }
      last = matrix[k][k];
    }
    return matrix[n - 2][n - 2];
  }
}
