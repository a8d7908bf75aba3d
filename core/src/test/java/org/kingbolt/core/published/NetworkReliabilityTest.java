package org.kingbolt.core.published;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.kingbolt.core.published.Digits.assertPrinted;
import static org.kingbolt.core.published.Exact.integers;

import java.math.BigInteger;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.kingbolt.core.CoherentSystem;
import org.kingbolt.core.Probabilities;
import org.kingbolt.core.Probability;
import org.kingbolt.core.Structure;

/** Reliabilities of networks whose links all work with probability 0.9. */
class NetworkReliabilityTest {

  private static double at90(Structure structure) {
    return structure.compile().reliability(0.9).working();
  }

  private static void assertCounts(CoherentSystem system, long paths, long cuts) {
    assertEquals(BigInteger.valueOf(paths), system.minimalPathSets().count());
    assertEquals(BigInteger.valueOf(cuts), system.minimalCutSets().count());
  }

  /** Colbourn, The Combinatorics of Network Reliability, 1987 (formula from memory). */
  @Test
  void completeGraph_hasThePublishedTwoTerminalReliability() {
    CoherentSystem four = Families.complete(4).connecting("1", "2").compile();
    assertEquals(integers(0, 1, 2, 0, -7, 7, -2), four.polynomial().coefficients());
    assertPrinted("0.997848", four.reliability(0.9).working());
    assertPrinted("0.9997948026", at90(Families.complete(5).connecting("1", "2")));
    assertPrinted("0.99997992341302", at90(Families.complete(6).connecting("1", "2")));
  }

  /** Gilbert's recursion, Ann. Math. Stat. 30 (1959) 1141; Colbourn 1987 (formula from memory). */
  @ParameterizedTest
  @CsvSource({"3, 0.972", "4, 0.995814", "5, 0.9994922424", "6, 0.99993987108648"})
  void completeGraph_hasThePublishedAllTerminalReliability(int n, String printed) {
    assertPrinted(printed, at90(Families.complete(n).connectingAll()));
  }

  /**
   * Abraham, IEEE Trans. Reliab. 28 (1979) 58; reused by Heidtmann 1989 and by Soh and Rai 1991
   * (from memory).
   */
  @Test
  void arpaNetwork_hasThePublishedReliability() {
    CoherentSystem arpa =
        Topology.of("s-a s-b a-b a-c b-d a-d c-d c-t d-t").connecting("s", "t").compile();
    assertEquals(BigInteger.valueOf(13), arpa.minimalPathSets().count());
    assertPrinted("0.977184", arpa.reliability(0.9).working());
    assertPrinted("0.977184405", arpa.reliability(0.9).working());
  }

  /** Our own exact recomputation of a textbook variant. */
  @Test
  void ladderBetweenTwoEnds_hasTheRecomputedReliability() {
    CoherentSystem ladder =
        Topology.of("s-a s-b a-b a-c b-d c-d c-t d-t").connecting("s", "t").compile();
    assertEquals(BigInteger.valueOf(8), ladder.minimalPathSets().count());
    assertPrinted("0.96697476", ladder.reliability(0.9).working());
  }

  /** Our own exact recomputation. */
  @Test
  void petersenPairs_haveTheRecomputedReliability() {
    CoherentSystem adjacent = Families.petersen().connecting("0", "1").compile();
    CoherentSystem apart = Families.petersen().connecting("0", "2").compile();
    assertCounts(adjacent, 29, 74);
    assertCounts(apart, 31, 106);
    assertPrinted("0.99753763541882", adjacent.reliability(0.9).working());
    assertPrinted("0.99727188018091", apart.reliability(0.9).working());
  }

  /**
   * Godsil and Royle, Algebraic Graph Theory, 2001, p. 355 (formula from memory): (1-q)^9 times a
   * polynomial in q, whose coefficients count the working states.
   */
  @Test
  void petersenAllTerminal_hasThePublishedPolynomial() {
    CoherentSystem petersen = Families.petersen().connectingAll().compile();
    long[] inner = {1, 9, 45, 155, 390, 696, 704};
    double q = 0.1;
    double value = 0;
    for (int i = inner.length - 1; i >= 0; i--) {
      value = value * q + inner[i];
    }
    assertEquals(value * Math.pow(0.9, 9), petersen.reliability(0.9).working(), 1e-14);
    assertPrinted("0.98856691464370", petersen.reliability(0.9).working());
    assertEquals(
        BigInteger.valueOf(2000), petersen.polynomial().workingStates().get(9), "spanning trees");
  }

  /**
   * A standard example of rare events: Cancela and El Khadiri 2003; L'Ecuyer, Rubino, Saggadi and
   * Tuffin, IEEE Trans. Reliab. 60 (2011) 590, which print the first five digits (from memory); the
   * others from our own exact recomputation.
   */
  @ParameterizedTest
  @CsvSource({
    "1e-1, 2.8796e-3, 2.87960125339e-3",
    "1e-2, 2.0619e-6, 2.06189109833e-6",
    "1e-3, 2.006e-9, 2.00601808922e-9",
    "1e-6, 2.000006e-18, 2.00000600002e-18"
  })
  void dodecahedron_hasThePublishedUnreliability(double q, String printed, String exact) {
    Probabilities links = Probabilities.all(Probability.failing(q));
    CoherentSystem pair = Families.dodecahedron().connecting("0", "5").compile();
    assertPrinted(printed, pair.reliability(links).failing());
    assertPrinted(exact, pair.reliability(links).failing());
  }

  /** Our own exact recomputation. */
  @Test
  void solids_haveTheRecomputedReliability() {
    assertPrinted("0.97713083593860", at90(Families.dodecahedron().connectingAll()));
    assertPrinted("0.997045321824", at90(Families.cube(3).connecting("0", "7")));
    assertPrinted("0.990662888187", at90(Families.cube(3).connectingAll()));
  }

  /**
   * Our own exact recomputation of the grids treated by Hardy, Lucet and Limnios, IEEE Trans.
   * Reliab. 56 (2007) 506, and of the ladders treated by Tanguy 2006 (hal-00121520).
   */
  @ParameterizedTest
  @CsvSource({
    "2, 2, 0.9639, 0.9477",
    "3, 3, 0.972502171407, 0.946984815279",
    "4, 4, 0.97504634957707, 0.94408504443565",
    "5, 5, 0.97555658950537, 0.93981313211520",
    "2, 3, 0.9587808, 0.9388791",
    "2, 4, 0.9480225096, 0.9264610953",
    "2, 5, 0.93691068977520, 0.91396367559990",
    "2, 10, 0.88306867132214, 0.85387922168514",
    "2, 20, 0.78448223856915, 0.74529851464872"
  })
  void grid_hasTheRecomputedReliability(int rows, int columns, String corners, String all) {
    Topology grid = Families.grid(rows, columns);
    String opposite = Families.cell(rows - 1, columns - 1);
    assertPrinted(corners, at90(grid.connecting(Families.cell(0, 0), opposite)));
    assertPrinted(all, at90(grid.connectingAll()));
  }

  /** Our own exact recomputation. */
  @Test
  void gridOfSix_hasTheRecomputedReliability() {
    assertPrinted(
        "0.97564499528516",
        at90(Families.grid(6, 6).connecting(Families.cell(0, 0), Families.cell(5, 5))));
  }

  /** Topology of the IEEE 30-bus test case (from memory); our own exact recomputation. */
  @Test
  void thirtyBusNetwork_hasTheRecomputedReliability() {
    CoherentSystem system = Topology.file("ieee30").connecting("1", "30").compile();
    assertEquals(BigInteger.valueOf(328), system.minimalPathSets().count());
    assertPrinted("0.93773183248032", system.reliability(0.9).working());
  }

  /** Topology of the NSFNET T1 backbone (from memory); our own exact recomputation. */
  @Test
  void nsfnet_hasTheRecomputedReliability() {
    CoherentSystem coasts = Topology.file("nsfnet").connecting("WA", "MD").compile();
    assertCounts(coasts, 99, 445);
    assertPrinted("0.99559286464755", coasts.reliability(0.9).working());
    assertPrinted("0.96546246994376", at90(Topology.file("nsfnet").connectingAll()));
  }
}
