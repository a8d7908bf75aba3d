package org.kingbolt.core.published;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.kingbolt.core.published.Digits.assertExact;
import static org.kingbolt.core.published.Digits.assertPrinted;
import static org.kingbolt.core.published.Exact.sets;

import java.math.BigDecimal;
import org.junit.jupiter.api.Test;
import org.kingbolt.core.CoherentSystem;
import org.kingbolt.core.Probabilities;
import org.kingbolt.core.Probability;

/**
 * The 20 branches of the IEEE 14-bus test case (published topology, from memory), against all 2^20
 * states in exact arithmetic.
 */
class Ieee14Test {

  private static final Topology NETWORK = Topology.file("ieee14");

  @Test
  void busOneToFourteen_agreesWithEveryState() {
    CoherentSystem system = NETWORK.connecting("1", "14").compile();
    StateTable states = StateTable.of(NETWORK, "1", "14");
    assertAgree(states, system);
    assertEquals(48, states.minimalPaths().size());
    assertEquals(64, states.minimalCuts().size());
    assertPrinted("0.97321044145666", system.reliability(0.9).working());
  }

  @Test
  void allBuses_agreeWithEveryState() {
    CoherentSystem system = NETWORK.connectingAll().compile();
    assertAgree(StateTable.of(NETWORK), system);
    assertPrinted("0.82233955239861", system.reliability(0.9).working());
  }

  private static void assertAgree(StateTable states, CoherentSystem system) {
    assertEquals(states.workingStates(), system.polynomial().workingStates());
    assertEquals(states.minimalPaths(), sets(system.minimalPathSets()));
    assertEquals(states.minimalCuts(), sets(system.minimalCutSets()));
    for (String q : new String[] {"0.1", "0.01", "0.000001"}) {
      BigDecimal down = new BigDecimal(q);
      BigDecimal exact = states.reliability(BigDecimal.ONE.subtract(down).toString());
      Probability computed =
          system.reliability(Probabilities.all(Probability.failing(down.doubleValue())));
      assertExact(exact, computed.working());
      assertExact(BigDecimal.ONE.subtract(exact), computed.failing());
    }
  }
}
