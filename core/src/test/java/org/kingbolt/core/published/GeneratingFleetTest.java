package org.kingbolt.core.published;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.kingbolt.core.published.Digits.assertExact;

import java.math.BigDecimal;
import java.util.LinkedHashMap;
import java.util.Map;
import java.util.TreeMap;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.kingbolt.core.Probabilities;
import org.kingbolt.core.Probability;
import org.kingbolt.core.Structure;

/**
 * The generating fleet of the IEEE Reliability Test System 1979: 32 units, 3405 MW. Units and their
 * forced outage rates: IEEE Committee Report, IEEE Trans. PAS-98 (1979) 2047 (from memory).
 */
class GeneratingFleetTest {

  private static final long FLEET = 3405;

  /** Megawatts, number of units, forced outage rate in percent. */
  private static final int[][] UNITS = {
    {12, 5, 2},
    {20, 4, 10},
    {50, 6, 1},
    {76, 4, 2},
    {100, 3, 4},
    {155, 4, 4},
    {197, 3, 5},
    {350, 1, 8},
    {400, 2, 12}
  };

  private final Map<String, Long> capacities = new LinkedHashMap<>();
  private final Map<String, Double> outages = new LinkedHashMap<>();

  GeneratingFleetTest() {
    for (int[] unit : UNITS) {
      for (int i = 1; i <= unit[1]; i++) {
        capacities.put(unit[0] + "MW-" + i, (long) unit[0]);
        outages.put(unit[0] + "MW-" + i, unit[2] / 100.0);
      }
    }
  }

  /** The probability that at least so many megawatts are out. */
  private Probability enough(long out) {
    return Structure.capacityAtLeast(FLEET - out + 1, capacities)
        .compile()
        .reliability(Probabilities.failing(outages));
  }

  /**
   * Allan, Billinton and Abdel-Gawad, IEEE Trans. PWRS-1 (1986) no. 4, 1; Billinton and Allan,
   * Reliability Evaluation of Power Systems (from memory). The table as printed is not rounded the
   * same way in every row, so a unit in its sixth decimal is allowed; the convolution below holds
   * the other digits.
   */
  @ParameterizedTest
  @CsvSource({
    "12, 0.763604",
    "20, 0.739482",
    "100, 0.547601",
    "200, 0.381328",
    "300, 0.320654",
    "400, 0.261873",
    "500, 0.122516",
    "800, 0.024720",
    "1500, 0.000040"
  })
  void outage_hasThePublishedProbability(long megawatts, double printed) {
    assertEquals(printed, enough(megawatts).failing(), 1e-6);
  }

  /** Every step of the outage table, against a convolution of the units in exact decimals. */
  @Test
  void outageTable_equalsTheConvolution() {
    TreeMap<Long, BigDecimal> table = new TreeMap<>(Map.of(0L, BigDecimal.ONE));
    for (int[] unit : UNITS) {
      BigDecimal rate = BigDecimal.valueOf(unit[2], 2);
      for (int i = 0; i < unit[1]; i++) {
        TreeMap<Long, BigDecimal> next = new TreeMap<>();
        table.forEach(
            (out, p) -> {
              next.merge(out, p.multiply(BigDecimal.ONE.subtract(rate)), BigDecimal::add);
              next.merge(out + unit[0], p.multiply(rate), BigDecimal::add);
            });
        table = next;
      }
    }
    assertEquals(FLEET, table.lastKey());
    for (long out = 50; out <= 2000; out += 50) {
      BigDecimal tail =
          table.tailMap(out, true).values().stream().reduce(BigDecimal.ZERO, BigDecimal::add);
      assertExact(tail, enough(out).failing());
      assertExact(BigDecimal.ONE.subtract(tail), enough(out).working());
    }
  }
}
