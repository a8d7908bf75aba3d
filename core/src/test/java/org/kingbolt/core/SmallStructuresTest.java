package org.kingbolt.core;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.kingbolt.core.testing.Close.assertReliability;

import java.util.HashSet;
import java.util.List;
import org.apache.commons.math3.fraction.BigFraction;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;
import org.kingbolt.core.testing.Oracle;
import org.kingbolt.core.testing.RandomStructures;
import org.kingbolt.core.testing.TruthTable;

/** Every coherent structure of up to five components: all methods agree with its truth table. */
class SmallStructuresTest {

  private static final Probabilities EXACT =
      Probabilities.all(0.5).with("a", 0.25).with("b", 0.75).with("c", 0.5).with("d", 0.125);

  @ParameterizedTest
  @ValueSource(ints = {1, 2, 3, 4, 5})
  void allMethods_agree(int order) {
    List<String> names = RandomStructures.NAMES.subList(0, order);
    int seen = 0;
    for (int table : TruthTable.monotone(order)) {
      Oracle oracle = new Oracle(names, TruthTable.of(order, state -> (table >>> state & 1) != 0));
      boolean constant = table == 0 || (table & 1) != 0;
      if (!constant && oracle.irrelevant().isEmpty()) {
        assertAgree(oracle, Structure.ofPathSets(oracle.minimalPaths()));
        assertAgree(oracle, Structure.ofCutSets(oracle.minimalCuts()));
        assertAgree(oracle, Structure.ofRule(names, oracle::works));
        seen++;
      }
    }
    // coherent structures with named components: OEIS A006126 (from memory)
    assertEquals(List.of(1, 2, 9, 114, 6894).get(order - 1), seen);
  }

  private static void assertAgree(Oracle oracle, Structure structure) {
    CoherentSystem system = structure.compile();
    assertEquals(oracle.minimalPaths(), new HashSet<>(system.minimalPathSets().stream().toList()));
    assertEquals(oracle.minimalCuts(), new HashSet<>(system.minimalCutSets().stream().toList()));
    assertEquals(oracle.workingStates(), system.polynomial().workingStates());
    BigFraction sum =
        system.signature().fractions().stream().reduce(BigFraction.ZERO, BigFraction::add);
    assertEquals(BigFraction.ONE, sum);
    // all products of these probabilities are dyadic, so that not even the last bit may differ
    double exact = oracle.works(EXACT).doubleValue();
    assertEquals(exact, system.reliability(EXACT).working());
    assertEquals(exact, Derivation.of(structure).reliability(EXACT).working());
    for (String name : structure.components()) {
      assertEquals(exact, system.pivot(name).reliability(EXACT).working(), name);
    }
    Probabilities rare = Probabilities.all(Probability.failing(1e-9));
    assertReliability(oracle, rare, system.reliability(rare), "diagram");
    assertReliability(oracle, rare, Derivation.of(structure).reliability(rare), "derivation");
  }
}
