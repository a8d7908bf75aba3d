package org.kingbolt.bounds;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;
import static org.kingbolt.bounds.Holds.assertHolds;
import static org.kingbolt.bounds.Holds.assertWithin;

import java.util.ArrayList;
import java.util.List;
import net.jqwik.api.Arbitrary;
import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.Provide;
import org.junit.jupiter.api.Test;
import org.kingbolt.core.Budget;
import org.kingbolt.core.ModularDecomposition;
import org.kingbolt.core.ModularDecomposition.Module;
import org.kingbolt.core.Probabilities;
import org.kingbolt.core.Probability;
import org.kingbolt.core.Structure;
import org.kingbolt.core.testing.RandomStructures;
import org.kingbolt.core.testing.RandomStructures.Sample;

/** Bounds of modules put together: never wider, and within reach where the flat ones are not. */
class ModularTest {

  @Provide
  Arbitrary<Sample> structures() {
    return RandomStructures.any();
  }

  @Provide
  Arbitrary<Probabilities> probabilities() {
    return RandomStructures.probabilities();
  }

  /** Two out of three systems of two structures and a component, with components of their own. */
  private static Structure composed(Structure one, Structure other) {
    Structure renamed = other;
    for (String name : other.components()) {
      // replacing one may simplify others away
      if (renamed.components().contains(name)) {
        renamed = renamed.replace(name, Structure.component(name + "'"));
      }
    }
    return Structure.atLeast(2, one, renamed, Structure.component("z"));
  }

  /** Bodin 1970 (from memory). */
  @Property(tries = 150)
  void modularInterval_isWithinTheFlatOne(
      @ForAll("structures") Sample one,
      @ForAll("structures") Sample other,
      @ForAll("probabilities") Probabilities p) {
    Structure whole = composed(one.structure(), other.structure());
    for (String name : RandomStructures.NAMES) {
      p = p.with(name + "'", p.get(name));
    }
    Interval modular = Bounds.of(whole).given(p).modular();
    assertTrue(modular.contains(whole.reliability(p)));
    if (whole.compile().minimalPathSets().count().bitLength() < 14
        && whole.compile().minimalCutSets().count().bitLength() < 14) {
      assertWithin(modular, Bounds.of(whole).given(p).esaryProschan());
    }
  }

  /** The best path of the whole is made of best paths of modules, the worst cut of worst cuts. */
  @Property(tries = 300)
  void minMax_byModules_isTheFlatOne(
      @ForAll("structures") Sample sample, @ForAll("probabilities") Probabilities p) {
    Probabilities least = p;
    Probabilities most = p;
    for (Module module : ModularDecomposition.of(sample.structure(), Budget.ofHeap()).modules()) {
      least =
          least.with(module.name(), Bounds.of(module.structure()).given(least).minMax().lower());
      most = most.with(module.name(), Bounds.of(module.structure()).given(most).minMax().upper());
      if (module.structure().equals(sample.structure())) {
        return;
      }
    }
    String whole =
        "module " + ModularDecomposition.of(sample.structure(), Budget.ofHeap()).modules().size();
    Interval flat = Bounds.of(sample.structure()).given(p).minMax();
    assertNear(flat.lower(), least.get(whole));
    assertNear(flat.upper(), most.get(whole));
  }

  private static void assertNear(Probability flat, Probability modular) {
    assertEquals(flat.working(), modular.working(), 1e-12 * flat.working() + 1e-15);
    assertEquals(flat.failing(), modular.failing(), 1e-12 * flat.failing() + 1e-15);
  }

  /** A tree of 2-out-of-3 gates, eight deep: 6,561 components and far more sets than atoms. */
  @Test
  void deepTree_isWithinReach() {
    List<Structure> level = new ArrayList<>();
    for (int i = 0; i < 6561; i++) {
      level.add(Structure.component("c" + i));
    }
    while (level.size() > 1) {
      List<Structure> next = new ArrayList<>();
      for (int i = 0; i < level.size(); i += 3) {
        next.add(Structure.atLeast(2, level.subList(i, i + 3)));
      }
      level = next;
    }
    Probabilities p = Probabilities.all(Probability.failing(0.1));
    Interval interval = Bounds.of(level.get(0)).given(p).modular();
    double q = 0.1;
    for (int i = 0; i < 8; i++) {
      q = q * q * (3 - 2 * q);
    }
    assertTrue(interval.contains(Probability.failing(q)), () -> interval + " without failing");
    assertTrue(interval.lower().failing() < 1e-30, interval::toString);
  }

  /** Gates of gates without sharing: series and parallel modules alone make it exact. */
  @Test
  void seriesAndParallelModules_areExact() {
    Structure structure =
        Structure.parse("series(a, parallel(series(b, c), series(d, parallel(e, f))), g)");
    Probabilities p = Probabilities.all(Probability.failing(1e-7));
    Interval interval = Bounds.of(structure).given(p).modular();
    assertTrue(interval.relativeWidthFailing() < 1e-12, interval::toString);
    assertTrue(interval.contains(structure.reliability(p)));
    assertTrue(Bounds.of(structure).given(p).esaryProschan().relativeWidthFailing() > 1);
  }

  @Property(tries = 300)
  void networks_areReducedFirst(
      @ForAll("networks") Sample sample, @ForAll("probabilities") Probabilities p) {
    Interval interval = Bounds.of(sample.structure()).given(p).modular();
    assertHolds(sample.oracle(), p, interval);
    assertWithin(interval, Bounds.of(sample.structure()).given(p).esaryProschan());
  }

  @Provide
  Arbitrary<Sample> networks() {
    return RandomStructures.networks();
  }
}
