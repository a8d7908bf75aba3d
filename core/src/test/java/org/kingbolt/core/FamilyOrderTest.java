package org.kingbolt.core;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.ArrayList;
import java.util.Collections;
import java.util.List;
import java.util.Random;
import java.util.Set;
import org.junit.jupiter.api.Test;

/** Set families whose sets come in no helpful order. */
class FamilyOrderTest {

  /** A ladder of 24 rungs, described anew by its 576 minimal cut sets, shuffled. */
  @Test
  void cutsOfALadder_compileToASmallDiagram() {
    NetworkBuilder network = Structure.network();
    int rungs = 24;
    for (int i = 0; i < rungs; i++) {
      network.link("rung" + i, "a" + i, "b" + i);
      if (i + 1 < rungs) {
        network.link("upper" + i, "a" + i, "a" + (i + 1)).link("lower" + i, "b" + i, "b" + (i + 1));
      }
    }
    CoherentSystem ladder = network.connecting("a0", "b" + (rungs - 1)).compile();
    List<Set<String>> cuts = new ArrayList<>(ladder.minimalCutSets().stream().toList());
    Collections.shuffle(cuts, new Random(1));
    CoherentSystem again = Structure.ofCutSets(cuts).compile(Budget.ofNodes(100_000));
    assertTrue(again.diagram().nodeCount() < 1_000, again::toString);
    Probabilities p = Probabilities.all(Probability.failing(0.01));
    double fails = ladder.reliability(p).failing();
    assertEquals(fails, again.reliability(p).failing(), 1e-12 * fails);
  }
}
