package org.kingbolt.core.diagram;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.Arrays;
import java.util.List;
import net.jqwik.api.Arbitrary;
import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.Provide;
import org.kingbolt.core.CoherentSystem;
import org.kingbolt.core.Probabilities;
import org.kingbolt.core.Probability;
import org.kingbolt.core.testing.Close;
import org.kingbolt.core.testing.RandomStructures;
import org.kingbolt.core.testing.RandomStructures.Sample;

/** Unions of the cut sets that contain marked variables. */
class SetUnionTest {

  @Provide
  Arbitrary<Sample> structures() {
    return RandomStructures.any();
  }

  @Provide
  Arbitrary<Probabilities> probabilities() {
    return RandomStructures.probabilities();
  }

  /** All cut sets together are failure; none are never; questions do not disturb each other. */
  @Property(tries = 300)
  void unionOfAllCutSets_isFailure(
      @ForAll("structures") Sample sample, @ForAll("probabilities") Probabilities p) {
    CoherentSystem system = sample.structure().compile();
    List<Probability> values = p.forComponents(system.components());
    SetUnion union =
        new SetUnion(
            MinimalSolutions.cuts(system.diagram(), WorkMeter.UNLIMITED),
            values.stream().mapToDouble(Probability::working).toArray(),
            values.stream().mapToDouble(Probability::failing).toArray(),
            WorkMeter.UNLIMITED);
    boolean[] marked = new boolean[values.size()];
    assertEquals(0, union.probability(marked));
    double before = 0;
    for (int i = 0; i < marked.length; i++) {
      marked[i] = true;
      double more = union.probability(marked);
      assertTrue(more >= before * (1 - 1e-13), "fewer sets are likelier");
      before = more;
    }
    assertTrue(Close.isClose(sample.oracle().fails(p), before));
    double[] alone = new double[marked.length];
    for (int i = marked.length - 1; i >= 0; i--) {
      Arrays.fill(marked, false);
      marked[i] = true;
      alone[i] = union.probability(marked);
    }
    for (int i = 0; i < marked.length; i++) {
      Arrays.fill(marked, false);
      marked[i] = true;
      assertEquals(alone[i], union.probability(marked));
    }
  }
}
