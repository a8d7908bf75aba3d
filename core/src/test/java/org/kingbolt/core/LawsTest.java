package org.kingbolt.core;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.ByteArrayInputStream;
import java.io.ByteArrayOutputStream;
import java.io.IOException;
import java.io.ObjectInputStream;
import java.io.ObjectOutputStream;
import java.math.BigDecimal;
import java.math.BigInteger;
import java.util.List;
import java.util.Set;
import java.util.stream.Collectors;
import net.jqwik.api.Arbitrary;
import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.Provide;
import org.apache.commons.math3.fraction.BigFraction;
import org.kingbolt.core.testing.Close;
import org.kingbolt.core.testing.Oracle;
import org.kingbolt.core.testing.RandomStructures;
import org.kingbolt.core.testing.RandomStructures.Sample;

/** Laws that every coherent structure obeys. */
class LawsTest {

  @Provide
  Arbitrary<Sample> structures() {
    return RandomStructures.any();
  }

  @Provide
  Arbitrary<Probabilities> probabilities() {
    return RandomStructures.probabilities();
  }

  @Property(tries = 1000)
  void text_readsBackAsAnEqualStructure(@ForAll("structures") Sample sample) {
    Structure structure = sample.structure();
    Structure again = Structure.parse(structure.toString());
    assertEquals(structure, again);
    assertEquals(structure.hashCode(), again.hashCode());
    assertEquals(structure.toString(), again.toString());
    assertEquals(structure.components(), again.components());
  }

  @Property(tries = 200)
  void serialization_readsBackAsAnEqualValue(
      @ForAll("structures") Sample sample, @ForAll("probabilities") Probabilities p)
      throws IOException, ClassNotFoundException {
    assertEquals(sample.structure(), copy(sample.structure()));
    assertEquals(p, copy(p));
    CoherentSystem system = sample.structure().compile();
    CoherentSystem again = copy(system);
    assertEquals(system, again);
    assertEquals(system.reliability(p), again.reliability(p), "same bits");
  }

  @SuppressWarnings("unchecked")
  private static <T> T copy(T value) throws IOException, ClassNotFoundException {
    ByteArrayOutputStream bytes = new ByteArrayOutputStream();
    try (ObjectOutputStream out = new ObjectOutputStream(bytes)) {
      out.writeObject(value);
    }
    try (ObjectInputStream in =
        new ObjectInputStream(new ByteArrayInputStream(bytes.toByteArray()))) {
      return (T) in.readObject();
    }
  }

  @Property(tries = 500)
  void dualOfTheDual_isTheStructure(@ForAll("structures") Sample sample) {
    assertEquals(sample.structure(), sample.structure().dual().dual());
  }

  @Property(tries = 500)
  void pathsOfTheDual_areCuts(
      @ForAll("structures") Sample sample, @ForAll("probabilities") Probabilities p) {
    CoherentSystem system = sample.structure().compile();
    CoherentSystem dual = sample.structure().dual().compile();
    assertEquals(sets(system.minimalPathSets()), sets(dual.minimalCutSets()));
    assertEquals(sets(system.minimalCutSets()), sets(dual.minimalPathSets()));
    Probabilities swapped = p;
    for (String name : system.components()) {
      swapped = swapped.with(name, p.get(name).complement());
    }
    Probability mirrored = dual.reliability(swapped).complement();
    Close.assertReliability(sample.oracle(), p, mirrored, "dual");
  }

  private static Set<Set<String>> sets(MinimalSets sets) {
    return sets.stream().collect(Collectors.toSet());
  }

  /** Multi-affine: the reliability is a straight line in every single probability. */
  @Property(tries = 300)
  void reliability_isAStraightLineInEveryProbability(
      @ForAll("structures") Sample sample, @ForAll("probabilities") Probabilities p) {
    Oracle oracle = sample.oracle();
    CoherentSystem system = sample.structure().compile();
    for (String name : system.components()) {
      BigDecimal low = oracle.works(p.with(name, Probability.IMPOSSIBLE));
      BigDecimal slope = oracle.decides(name, p);
      for (double x : new double[] {0, 1e-9, 0.3, 1}) {
        double value = system.reliability(p.with(name, x)).working();
        BigDecimal exact = low.add(slope.multiply(new BigDecimal(x)));
        assertTrue(Close.isClose(exact, value), () -> name + " at " + x);
      }
    }
  }

  @Property(tries = 300)
  void reliability_growsWithEveryProbability(
      @ForAll("structures") Sample sample, @ForAll("probabilities") Probabilities p) {
    CoherentSystem system = sample.structure().compile();
    for (String name : system.components()) {
      Probability before = system.reliability(p.with(name, Probability.IMPOSSIBLE));
      for (double x : new double[] {1e-12, 0.2, 0.5, 0.9, 1}) {
        Probability now = system.reliability(p.with(name, x));
        assertTrue(now.working() >= before.working() * (1 - 1e-14), () -> name + " at " + x);
        assertTrue(now.failing() <= before.failing() * (1 + 1e-14), () -> name + " at " + x);
        before = now;
      }
    }
  }

  @Property(tries = 300)
  void derivatives_areTheProbabilitiesOfDeciding(
      @ForAll("structures") Sample sample, @ForAll("probabilities") Probabilities p) {
    CoherentSystem system = sample.structure().compile();
    double[] derivatives = system.evaluation(p).derivatives();
    for (int i = 0; i < derivatives.length; i++) {
      String name = system.components().get(i);
      BigDecimal exact = sample.oracle().decides(name, p);
      assertTrue(
          Close.isClose(exact, derivatives[i]),
          () -> name + ": exactly " + exact.doubleValue() + " at " + sample.oracle().shown(p));
    }
  }

  /**
   * p(1-p)h'(p) is at least h(p)(1-h(p)) for every coherent structure, with equality only for a
   * single component: Moore and Shannon, J. Franklin Inst. 262 (1956) 191 (from memory).
   */
  @Property(tries = 200)
  void commonProbability_givesAnSShape(@ForAll("structures") Sample sample) {
    List<BigInteger> powers = sample.structure().compile().polynomial().coefficients();
    for (int percent = 0; percent <= 100; percent += 10) {
      BigFraction p = new BigFraction(percent, 100);
      BigFraction h = BigFraction.ZERO;
      BigFraction slope = BigFraction.ZERO;
      for (int j = powers.size() - 1; j >= 0; j--) {
        slope = slope.multiply(p).add(h);
        h = h.multiply(p).add(powers.get(j));
      }
      BigFraction steep = p.multiply(BigFraction.ONE.subtract(p)).multiply(slope);
      BigFraction needed = h.multiply(BigFraction.ONE.subtract(h));
      assertTrue(steep.compareTo(needed) >= 0, () -> "at p = " + p);
    }
  }

  /** One crossing of the diagonal where no single component is a path or a cut. */
  @Property(tries = 200)
  void commonProbability_crossesTheDiagonalOnce(@ForAll("structures") Sample sample) {
    CoherentSystem system = sample.structure().compile();
    boolean single =
        system.minimalPathSets().stream().anyMatch(set -> set.size() == 1)
            || system.minimalCutSets().stream().anyMatch(set -> set.size() == 1);
    int crossings = 0;
    boolean below = true;
    for (int i = 1; i < 1000 && !single; i++) {
      double p = i / 1000.0;
      boolean now = system.reliability(p).working() < p - 1e-15;
      crossings += now == below ? 0 : 1;
      below = now;
    }
    assertTrue(single || crossings == 1, () -> "not one crossing");
  }
}
