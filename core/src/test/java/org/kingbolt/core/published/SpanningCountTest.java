package org.kingbolt.core.published;

import static org.junit.jupiter.api.Assertions.assertEquals;

import java.math.BigInteger;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

/**
 * Numbers of spanning trees and of connected spanning subgraphs: the minimal path sets and the
 * working states of all-terminal networks.
 */
class SpanningCountTest {

  private static BigInteger trees(Topology network) {
    return network.connectingAll().compile().minimalPathSets().count();
  }

  private static BigInteger connectedSubgraphs(Topology network) {
    return Exact.states(network.connectingAll().compile().polynomial());
  }

  /** OEIS A007341 (seen); Kreweras, J. Combin. Theory B 24 (1978). */
  @ParameterizedTest
  @CsvSource({"2, 4", "3, 192", "4, 100352", "5, 557568000", "6, 32565539635200"})
  void squareGrid_hasThePublishedNumberOfTrees(int size, BigInteger number) {
    assertEquals(number, trees(Families.grid(size, size)));
  }

  /** OEIS A001353 (from memory): 2 x m nodes. */
  @ParameterizedTest
  @CsvSource({"1, 1", "2, 4", "3, 15", "4, 56", "5, 209", "6, 780", "7, 2911"})
  void ladder_hasThePublishedNumberOfTrees(int size, BigInteger number) {
    assertEquals(number, trees(Families.grid(2, size)));
  }

  /** Cayley's formula (from memory): n^(n-2). */
  @ParameterizedTest
  @CsvSource({"2, 1", "3, 3", "4, 16", "5, 125", "6, 1296", "7, 16807"})
  void completeGraph_hasThePublishedNumberOfTrees(int n, BigInteger number) {
    assertEquals(number, trees(Families.complete(n)));
  }

  /** Biggs, Algebraic Graph Theory (from memory). */
  @Test
  void symmetricGraphs_haveThePublishedNumberOfTrees() {
    assertEquals(BigInteger.valueOf(2000), trees(Families.petersen()));
    assertEquals(BigInteger.valueOf(5_184_000), trees(Families.dodecahedron()));
    assertEquals(BigInteger.valueOf(384), trees(Families.cube(3)));
  }

  /** OEIS A359992 (seen). */
  @ParameterizedTest
  @CsvSource({"2, 5", "3, 431", "4, 555195", "5, 10286937043", "6, 2692324030864335"})
  void squareGrid_hasThePublishedNumberOfConnectedSubgraphs(int size, BigInteger number) {
    assertEquals(number, connectedSubgraphs(Families.grid(size, size)));
  }

  /** OEIS A359993 and A158453 (seen). */
  @ParameterizedTest
  @CsvSource({
    "3, 4, 7857",
    "4, 5, 38757695",
    "5, 6, 2711895924889",
    "3, 1, 1",
    "3, 2, 23",
    "3, 3, 431",
    "3, 5, 142625"
  })
  void grid_hasThePublishedNumberOfConnectedSubgraphs(int rows, int columns, BigInteger number) {
    assertEquals(number, connectedSubgraphs(Families.grid(rows, columns)));
  }

  /** OEIS A001187 (seen); Gilbert, Ann. Math. Stat. 30 (1959) 1141. */
  @ParameterizedTest
  @CsvSource({"3, 4", "4, 38", "5, 728", "6, 26704", "7, 1866256"})
  void completeGraph_hasThePublishedNumberOfConnectedSubgraphs(int n, BigInteger number) {
    assertEquals(number, connectedSubgraphs(Families.complete(n)));
  }
}
