package org.kingbolt.docs;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.math.BigDecimal;
import java.math.MathContext;
import java.util.HashSet;
import java.util.List;
import java.util.Set;
import org.junit.jupiter.api.Test;
import org.kingbolt.bounds.Bounds;
import org.kingbolt.core.Derivation;
import org.kingbolt.core.Probabilities;
import org.kingbolt.core.Probability;
import org.kingbolt.core.Structure;

class StationReviewTest {

  private static final Structure STATION = StationReview.station();
  private static final Probabilities FAILING = StationReview.failing();

  @Test
  void page_holdsTheFailingProbabilityFoundByEnumeration() {
    BigDecimal exact = failingByEnumeration();
    Probability diagram = STATION.compile().reliability(FAILING);
    assertEquals(exact.doubleValue(), diagram.failing(), 1e-13 * diagram.failing());
    String printed = String.format(java.util.Locale.ROOT, "%.6e", exact);
    assertTrue(StationReview.page().contains(printed), () -> printed + "\n" + StationReview.page());
  }

  @Test
  void derivation_bounds_andPivots_agree() {
    Probability diagram = STATION.compile().reliability(FAILING);
    Probability formula = Derivation.of(STATION).reliability(FAILING);
    assertEquals(diagram.failing(), formula.failing(), 1e-13 * diagram.failing());
    assertTrue(Bounds.of(STATION).given(FAILING).esaryProschan().contains(diagram));
    assertTrue(Bounds.of(STATION).given(FAILING).minMax().contains(diagram));
    for (String component : STATION.components()) {
      Probability pivot = STATION.compile().pivot(component).reliability(FAILING);
      assertEquals(diagram.failing(), pivot.failing(), 1e-13 * diagram.failing(), component);
    }
  }

  @Test
  void page_hasLinesThatFitAReport() {
    assertTrue(StationReview.page().lines().allMatch(line -> line.length() <= 104));
    assertTrue(StationReview.page().contains("Single points of failure: intakeScreen, wetWell"));
  }

  /** All 2^19 states, each judged by the structure function itself. */
  private static BigDecimal failingByEnumeration() {
    List<String> names = STATION.components();
    List<Probability> p = FAILING.forComponents(names);
    BigDecimal sum = BigDecimal.ZERO;
    for (int state = 0; state < 1 << names.size(); state++) {
      Set<String> working = new HashSet<>(names);
      BigDecimal weight = BigDecimal.ONE;
      for (int i = 0; i < names.size(); i++) {
        boolean fails = (state >>> i & 1) == 1;
        if (fails) {
          working.remove(names.get(i));
        }
        double side = fails ? p.get(i).failing() : p.get(i).working();
        weight = weight.multiply(new BigDecimal(side), MathContext.DECIMAL128);
      }
      if (!STATION.works(working)) {
        sum = sum.add(weight);
      }
    }
    return sum;
  }
}
