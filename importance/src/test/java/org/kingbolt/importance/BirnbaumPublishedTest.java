package org.kingbolt.importance;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.kingbolt.core.published.Digits.assertExact;

import java.math.BigDecimal;
import java.util.List;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;
import org.kingbolt.core.Probabilities;
import org.kingbolt.core.Structure;
import org.kingbolt.core.published.Topology;

/**
 * Published Birnbaum importances of the bridge: Birnbaum, in Multivariate Analysis II, 1969, 581;
 * Barlow and Proschan, Statistical Theory of Reliability, 1975 (from memory).
 */
class BirnbaumPublishedTest {

  private static final List<String> OUTER = List.of("s-u", "s-v", "u-t", "v-t");
  private static final String CROSSING = "u-v";

  private final Structure bridge = Topology.of("s-u s-v u-v u-t v-t").connecting("s", "t");

  @Test
  void bridge_hasThePublishedImportance() {
    assertBridge(
        new BigDecimal("0.1062"),
        new BigDecimal("0.0162"),
        Importance.of(bridge).given(Probabilities.all(0.9)).birnbaum());
  }

  /** Outer ones p + p^2 - 4p^3 + 2p^4, the crossing one 2 p^2 (1-p)^2. */
  @ParameterizedTest
  @ValueSource(strings = {"0.1", "0.5", "0.7", "0.9"})
  void bridge_hasTheImportanceOfThePublishedPolynomials(BigDecimal p) {
    BigDecimal two = new BigDecimal(2);
    BigDecimal outer =
        p.add(p.pow(2)).subtract(p.pow(3).multiply(new BigDecimal(4))).add(two.multiply(p.pow(4)));
    BigDecimal crossing = two.multiply(p.pow(2)).multiply(BigDecimal.ONE.subtract(p).pow(2));
    Probabilities links = Probabilities.all(p.doubleValue());
    assertBridge(outer, crossing, Importance.of(bridge).given(links).birnbaum());
  }

  /** Birnbaum's structural importance: 3/8 and 1/8. */
  @Test
  void bridge_hasThePublishedStructuralImportance() {
    assertBridge(
        new BigDecimal("0.375"), new BigDecimal("0.125"), Importance.of(bridge).structural());
  }

  private static void assertBridge(BigDecimal outer, BigDecimal crossing, Ranking ranking) {
    OUTER.forEach(link -> assertExact(outer, ranking.value(link)));
    assertExact(crossing, ranking.value(CROSSING));
    assertEquals(OUTER, ranking.top(4).stream().map(Ranking.Entry::component).toList());
    assertEquals(List.of(1, 1, 1, 1, 5), ranking.entries().stream().map(e -> e.rank()).toList());
  }
}
