package org.kingbolt.importance;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;
import static org.kingbolt.importance.AllStates.assertNear;

import java.math.BigDecimal;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Set;
import net.jqwik.api.Arbitrary;
import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.Provide;
import org.junit.jupiter.api.Test;
import org.kingbolt.core.Budget;
import org.kingbolt.core.BudgetExceededException;
import org.kingbolt.core.Probabilities;
import org.kingbolt.core.Probability;
import org.kingbolt.core.Structure;
import org.kingbolt.core.published.Families;
import org.kingbolt.core.testing.RandomStructures;
import org.kingbolt.core.testing.RandomStructures.Sample;

/** Joint importance, interactions and finite changes against all states. */
class JointImportanceTest {

  @Provide
  Arbitrary<Sample> structures() {
    return RandomStructures.any();
  }

  @Provide
  Arbitrary<Probabilities> probabilities() {
    return RandomStructures.probabilities();
  }

  /** The signed sum over the states of a set, and the sum of the positive and negative parts. */
  private record Mixed(BigDecimal value, BigDecimal terms) {

    static Mixed of(AllStates all, int set) {
      BigDecimal plus = BigDecimal.ZERO;
      BigDecimal minus = BigDecimal.ZERO;
      int most = 1 << Integer.bitCount(set);
      for (int height = -most; height <= most; height++) {
        int wanted = height;
        if (wanted != 0) {
          BigDecimal part = all.probability(s -> height(all, s, set) == wanted);
          BigDecimal times = part.multiply(BigDecimal.valueOf(Math.abs(wanted)));
          plus = wanted > 0 ? plus.add(times) : plus;
          minus = wanted < 0 ? minus.add(times) : minus;
        }
      }
      return new Mixed(plus.subtract(minus), plus.add(minus));
    }

    /** The alternating sum of the structure function over the states of the set. */
    private static int height(AllStates all, int state, int set) {
      int sum = 0;
      for (int part = set; ; part = (part - 1) & set) {
        int sign = Integer.bitCount(set & ~part) % 2 == 0 ? 1 : -1;
        sum += all.table().works((state & ~set) | part) ? sign : 0;
        if (part == 0) {
          return sum;
        }
      }
    }
  }

  @Property(tries = 250)
  void pairs_areAsDefined(
      @ForAll("structures") Sample sample, @ForAll("probabilities") Probabilities p) {
    AllStates all = new AllStates(sample.oracle(), p);
    JointImportance joint = Importance.of(sample.structure()).given(p).jointImportance();
    double[][] matrix = joint.matrix();
    for (int i = 0; i < all.size(); i++) {
      assertEquals(0, matrix[i][i]);
      for (int j = i + 1; j < all.size(); j++) {
        Mixed exact = Mixed.of(all, 1 << i | 1 << j);
        String what = all.names().get(i) + " and " + all.names().get(j);
        assertNear(exact.value, matrix[i][j], exact.terms, what);
        assertEquals(matrix[i][j], matrix[j][i]);
        assertEquals(matrix[i][j], joint.value(all.names().get(j), all.names().get(i)));
      }
    }
  }

  @Property(tries = 120)
  void interactions_areAsDefined(
      @ForAll("structures") Sample sample, @ForAll("probabilities") Probabilities p) {
    AllStates all = new AllStates(sample.oracle(), p);
    ImportanceAtProbabilities at = Importance.of(sample.structure()).given(p);
    for (int set = 1; set < 1 << all.size(); set += 5) {
      Mixed exact = Mixed.of(all, set);
      Set<String> names = all.oracle().set(set);
      double value = at.interaction(names.toArray(new String[0]));
      assertNear(exact.value, value, exact.terms, names.toString());
    }
  }

  /** Effects of all sets add up to the change, and those with a component to its total effect. */
  @Property(tries = 200)
  void finiteChanges_addUp(
      @ForAll("structures") Sample sample,
      @ForAll("probabilities") Probabilities before,
      @ForAll("probabilities") Probabilities after) {
    AllStates all = new AllStates(sample.oracle(), before);
    List<String> changed = all.names().subList(0, Math.min(4, all.size()));
    Map<String, Probability> changes = new LinkedHashMap<>();
    changed.forEach(name -> changes.put(name, after.get(name)));
    FiniteChange change = Importance.of(sample.structure()).given(before).change(changes);
    double sum = 0;
    double[] total = new double[changed.size()];
    for (int set = 1; set < 1 << changed.size(); set++) {
      double effect = change.effect(all.oracle().set(set));
      sum += effect;
      for (int i = 0; i < total.length; i++) {
        total[i] += (set >>> i & 1) != 0 ? effect : 0;
      }
    }
    Probabilities p = before;
    for (String name : changed) {
      p = p.with(name, after.get(name));
    }
    double r0 = all.works().doubleValue();
    double r1 = new AllStates(sample.oracle(), p).works().doubleValue();
    assertEquals(r1 - r0, change.total(), 1e-13);
    assertEquals(r1 - r0, sum, 1e-13);
    for (int i = 0; i < total.length; i++) {
      assertEquals(total[i], change.totalOrder().value(changed.get(i)), 1e-13);
    }
  }

  /** By hand: with three in parallel, two of them made twice as good. */
  @Test
  void smallChanges_keepTheirDigits() {
    Probabilities p =
        Probabilities.all(Probability.failing(1e-8)).with("w", Probability.failing(0.25));
    Map<String, Probability> better =
        Map.of("a", Probability.failing(5e-9), "b", Probability.failing(5e-9));
    Structure alone = Structure.parse("parallel(a, b, c)");
    assertNear(0.75e-24, Importance.of(alone).given(p).change(better).total(), "alone");
    Structure behind = Structure.parse("series(w, parallel(a, b, c))");
    assertNear(0.75 * 0.75e-24, Importance.of(behind).given(p).change(better).total(), "behind w");
    Map<String, Probability> worse =
        Map.of("a", Probability.failing(2e-8), "b", Probability.failing(2e-8));
    assertNear(-3e-24, Importance.of(alone).given(p).change(worse).total(), "worse");
    assertEquals(0, Importance.of(alone).given(p).change(Map.of()).total());
  }

  /** A series needs all: q_i q_j at the top is p of the rest; a parallel is its mirror image. */
  @Test
  void smallValues_keepTheirDigits() {
    Probabilities p = Probabilities.all(Probability.failing(1e-9));
    Structure structure = Structure.parse("series(parallel(a, b), parallel(c, d))");
    JointImportance joint = Importance.of(structure).given(p).jointImportance();
    assertEquals(1e-18, joint.value("a", "c"), 1e-31);
    assertEquals(-1, joint.value("a", "b"), 1e-15);
    JointImportance two =
        Importance.of(Structure.parse("series(parallel(a, b, e), parallel(c, d, f))"))
            .given(p)
            .jointImportance();
    assertEquals(1e-36, two.value("a", "c"), 1e-46);
  }

  @Test
  void top_isByAbsoluteValue_andKeepsTheOrder() {
    Structure structure = Structure.parse("series(pump, parallel(a, b))");
    JointImportance joint =
        Importance.of(structure).given(Probabilities.all(0.9)).jointImportance();
    assertEquals(
        List.of(
            "first  second  joint importance",
            "a      b       -9.000000e-01",
            "pump   a       +1.000000e-01",
            "pump   b       +1.000000e-01"),
        joint.toString().lines().toList());
    assertEquals(List.of("a"), joint.top(1).stream().map(JointImportance.Pair::first).toList());
    assertEquals("pump", joint.topComplements(1).get(0).first());
    assertEquals(1, joint.topSubstitutes(5).size());
    assertEquals(List.of(), joint.top(0));
    assertEquals(List.of("pump", "a", "b"), joint.components());
  }

  @Test
  void badInput_isNamed() {
    ImportanceAtProbabilities at =
        Importance.of(Structure.parallel("a", "b")).given(Probabilities.all(0.9));
    JointImportance joint = at.jointImportance();
    assertMessage("\"a\" is paired with itself; name two components", () -> joint.value("a", "a"));
    assertMessage(
        "unknown component \"x\"; the components are \"a\", \"b\"; name one of these",
        () -> joint.value("a", "x"));
    assertMessage("top -1 asked for; ask for 0 or more", () -> joint.top(-1));
    assertMessage("the set is empty; name at least one component", at::interaction);
    assertMessage("the set names \"a\" twice; name it once", () -> at.interaction("a", "a"));
    BudgetExceededException stopped =
        assertThrows(
            BudgetExceededException.class,
            () ->
                Importance.of(Families.corners(5))
                    .given(Probabilities.all(0.9))
                    .jointImportance(Budget.ofNodes(100)));
    assertEquals(BudgetExceededException.Limit.NODES, stopped.limit());
  }

  private static void assertMessage(
      String message, org.junit.jupiter.api.function.Executable call) {
    IllegalArgumentException bad = assertThrows(IllegalArgumentException.class, call);
    assertEquals(message, bad.getMessage());
    assertTrue(message.contains(";"));
  }
}
