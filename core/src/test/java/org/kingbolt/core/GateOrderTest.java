package org.kingbolt.core;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.ArrayList;
import java.util.Collections;
import java.util.List;
import java.util.Random;
import net.jqwik.api.Arbitraries;
import net.jqwik.api.Arbitrary;
import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.Provide;
import org.junit.jupiter.api.Test;
import org.kingbolt.core.testing.NestedGates;

/** Gates that share components: the order found, the caller's order, and what they cost. */
class GateOrderTest {

  @Provide
  Arbitrary<Long> seeds() {
    return Arbitraries.longs().withoutEdgeCases();
  }

  @Property(tries = 300)
  void everyState_isJudgedAsGateByGate(@ForAll("seeds") long seed) {
    Random random = new Random(seed);
    NestedGates gates =
        new NestedGates(3 + random.nextInt(8), 1 + random.nextInt(12), 0.5, random.nextLong());
    CoherentSystem system = gates.structure().compile();
    List<String> names = system.components();
    boolean[] working = new boolean[10];
    boolean[] byIndex = new boolean[names.size()];
    for (int state = 0; state < 1 << names.size(); state++) {
      for (int i = 0; i < byIndex.length; i++) {
        byIndex[i] = (state >>> i & 1) != 0;
        working[Integer.parseInt(names.get(i).substring(1))] = byIndex[i];
      }
      assertEquals(gates.works(working), system.diagram().works(byIndex));
    }
  }

  /** The same diagram comes from the order alone, without knowing modules: it is reduced. */
  @Property(tries = 200)
  void orderFound_givesTheSameDiagramWhenItIsGiven(@ForAll("seeds") long seed) {
    Random random = new Random(seed);
    Structure structure =
        new NestedGates(20 + random.nextInt(30), 5 + random.nextInt(15), 0.3, seed).structure();
    CoherentSystem found = structure.compile();
    CoherentSystem given = structure.compile(found.order(), Budget.ofHeap());
    assertEquals(found.order(), given.order());
    assertEquals(found.diagram().nodeCount(), given.diagram().nodeCount());
    Probabilities p = Probabilities.all(random.nextDouble());
    assertEquals(found.reliability(p), given.reliability(p), "same bits");
    Probability direct = structure.reliability(p);
    assertEquals(found.reliability(p).working(), direct.working(), 1e-13 * direct.working());
    assertEquals(found.reliability(p).failing(), direct.failing(), 1e-13 * direct.failing());
  }

  @Property(tries = 100)
  void anyOtherOrder_givesTheSameFigures(@ForAll("seeds") long seed) {
    Structure structure = new NestedGates(15, 8, 0.3, seed).structure();
    CoherentSystem found = structure.compile();
    List<String> shuffled = new ArrayList<>(structure.components());
    Collections.shuffle(shuffled, new Random(seed));
    CoherentSystem other = structure.compile(shuffled, Budget.ofHeap());
    assertEquals(shuffled, other.order());
    Probabilities p = Probabilities.all(0.75);
    assertEquals(found.reliability(p).working(), other.reliability(p).working(), 1e-14);
    assertEquals(found.polynomial(), other.polynomial());
  }

  /** 200 components under 40 gates, a fifth of the leaves repeated. */
  @Test
  void orderFound_needsLessThanHalfOfTheNodesOfTheOrderOfDescription() {
    long found = 0;
    long described = 0;
    for (int seed = 1; seed <= 20; seed++) {
      Structure structure = new NestedGates(200, 40, 0.2, seed).structure();
      CoherentSystem system = structure.compile(Budget.ofNodes(100_000));
      assertEquals(system.order(), structure.compile().order(), "the same order every time");
      found += system.diagram().nodeCount();
      described += structure.compile(structure.components(), Budget.ofHeap()).diagram().nodeCount();
    }
    long nodes = found;
    assertTrue(2 * found < described, "found " + nodes + ", described " + described);
  }

  /** Pairs of which one must work; 2^40 nodes where the partners are read far apart. */
  @Test
  void givenOrder_isReadByFamiliesToo() {
    int pairs = 40;
    List<String> order = new ArrayList<>();
    List<String> described = new ArrayList<>();
    List<List<String>> sets = new ArrayList<>();
    for (int i = 0; i < pairs; i++) {
      sets.add(List.of("a" + i, "b" + i));
      order.add("a" + i);
      order.add("b" + i);
      described.add("a" + i);
    }
    for (int i = 0; i < pairs; i++) {
      described.add("b" + i);
    }
    sets.add(described);
    CoherentSystem system = Structure.ofPathSets(sets).compile(order, Budget.ofNodes(1_000));
    assertEquals(2 * pairs, system.diagram().nodeCount());
  }
}
