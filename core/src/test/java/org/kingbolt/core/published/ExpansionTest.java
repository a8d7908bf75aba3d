package org.kingbolt.core.published;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.kingbolt.core.published.Digits.assertPrinted;

import java.math.BigInteger;
import org.junit.jupiter.api.Test;
import org.kingbolt.core.MinimalSets;
import org.kingbolt.core.Probabilities;
import org.kingbolt.core.Probability;

/** Networks worked out from their sets, by disjoint products and by inclusion–exclusion. */
class ExpansionTest {

  /**
   * Abraham, IEEE Trans. Reliab. 28 (1979) 58, the ARPA network of nine links, on which Heidtmann
   * 1989 shows his method too (network and value from memory).
   */
  @Test
  void arpaNetwork_hasThePublishedReliability() {
    Topology arpa = Topology.of("s-a s-b a-b a-c b-d a-d c-d c-t d-t");
    MinimalSets paths = arpa.connecting("s", "t").compile().minimalPathSets();
    Probabilities p = Probabilities.all(0.9);
    assertEquals(BigInteger.valueOf(13), paths.count());
    assertPrinted("0.977184405", paths.disjointProducts(p).working());
    assertPrinted("0.977184405", paths.inclusionExclusion(p).working());
  }

  /** A bridge fails with 2q² + 2q³ - 5q⁴ + 2q⁵: Moore and Shannon 1956 (from memory). */
  @Test
  void bridge_keepsTheSmallerSide() {
    Topology bridge = Topology.of("s-a s-b a-b a-t b-t");
    MinimalSets paths = bridge.connecting("s", "t").compile().minimalPathSets();
    Probabilities p = Probabilities.all(Probability.failing(1e-9));
    assertPrinted("2.000000002e-18", paths.disjointProducts(p).failing());
    assertPrinted("2.000000002e-18", paths.inclusionExclusion(p).failing());
  }
}
