package org.kingbolt.core.published;

import static org.junit.jupiter.api.Assertions.assertEquals;

import java.math.BigInteger;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

/** Numbers of simple paths, which are the minimal path sets of two-terminal networks. */
class PathCountTest {

  /** OEIS A007764 (seen): paths from corner to corner. */
  @ParameterizedTest
  @CsvSource({
    "2, 2",
    "3, 12",
    "4, 184",
    "5, 8512",
    "6, 1262816",
    "7, 575780564",
    "8, 789360053252"
  })
  void squareGrid_hasThePublishedNumberOfPaths(int size, BigInteger paths) {
    assertEquals(paths, cornerToCorner(size, size));
  }

  /** OEIS A007787 (seen): paths from corner to corner of 5 x c nodes. */
  @ParameterizedTest
  @CsvSource({"1, 1", "2, 16", "3, 125", "4, 976", "5, 8512", "6, 79384", "7, 752061"})
  void gridOfFiveRows_hasThePublishedNumberOfPaths(int columns, BigInteger paths) {
    assertEquals(paths, cornerToCorner(5, columns));
  }

  private static BigInteger cornerToCorner(int rows, int columns) {
    return Families.grid(rows, columns)
        .connecting(Families.cell(0, 0), Families.cell(rows - 1, columns - 1))
        .compile()
        .minimalPathSets()
        .count();
  }

  /** OEIS A000522 (terms from memory): paths between two nodes of a complete graph. */
  @ParameterizedTest
  @CsvSource({"2, 1", "3, 2", "4, 5", "5, 16", "6, 65", "7, 326"})
  void completeGraph_hasThePublishedNumberOfPaths(int n, BigInteger paths) {
    assertEquals(
        paths, Families.complete(n).connecting("1", "2").compile().minimalPathSets().count());
  }

  /** Textbook fact (from memory): a cut parts the other n - 2 nodes in any way. */
  @ParameterizedTest
  @CsvSource({"2", "3", "4", "5", "6", "7"})
  void completeGraph_hasThePublishedNumberOfCuts(int n) {
    assertEquals(
        BigInteger.TWO.pow(n - 2),
        Families.complete(n).connecting("1", "2").compile().minimalCutSets().count());
  }

  /** OEIS A059783 (from memory): paths between opposite corners of the n-cube. */
  @ParameterizedTest
  @CsvSource({"2, 2", "3, 18", "4, 6432"})
  void cube_hasThePublishedNumberOfPaths(int n, BigInteger paths) {
    String opposite = String.valueOf((1 << n) - 1);
    assertEquals(
        paths, Families.cube(n).connecting("0", opposite).compile().minimalPathSets().count());
  }
}
