package org.kingbolt.core.reference;

import static org.junit.jupiter.api.Assertions.assertEquals;

import java.math.BigInteger;
import java.util.ArrayList;
import java.util.List;
import java.util.Set;
import net.jqwik.api.Arbitrary;
import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.Provide;
import org.junit.jupiter.api.Test;
import org.kingbolt.core.CoherentSystem;
import org.kingbolt.core.MinimalSets;
import org.kingbolt.core.Structure;
import org.kingbolt.core.published.Topology;
import org.kingbolt.core.testing.RandomStructures;
import org.kingbolt.core.testing.RandomStructures.Sample;
import org.logicng.formulas.Formula;
import org.logicng.formulas.FormulaFactory;
import org.logicng.formulas.Literal;
import org.logicng.knowledgecompilation.bdds.BDD;
import org.logicng.knowledgecompilation.bdds.BDDFactory;
import org.logicng.knowledgecompilation.bdds.jbuddy.BDDKernel;

/** Numbers of working states against LogicNG's model counting. */
class LogicLibraryTest {

  @Provide
  Arbitrary<Sample> structures() {
    return RandomStructures.any();
  }

  /** The formula is made from the truth table of the sample, the count by LogicNG. */
  @Property(tries = 100)
  void workingStatesOfRandomStructures_areThoseOfLogicNg(@ForAll("structures") Sample sample) {
    FormulaFactory f = new FormulaFactory();
    List<Formula> paths = new ArrayList<>();
    for (Set<String> path : sample.oracle().minimalPaths()) {
      paths.add(f.and(path.stream().map(f::variable).toList()));
    }
    assertStates(sample.structure().compile(), f, f.or(paths));
  }

  /** The formulas are made from the minimal path sets and from the minimal cut sets. */
  @Test
  void workingStatesOfNetworks_areThoseOfLogicNg() {
    for (Structure network :
        List.of(
            Topology.file("ieee14").connecting("1", "14"),
            Topology.file("ieee14").connectingAll(),
            Topology.file("nsfnet").connecting("WA", "MD"),
            Structure.atLeast(6, names(12)))) {
      CoherentSystem system = network.compile();
      FormulaFactory f = new FormulaFactory();
      Formula byPaths = f.or(terms(f, system.minimalPathSets(), true));
      Formula byCuts = f.and(terms(f, system.minimalCutSets(), false));
      assertStates(system, f, byPaths);
      assertStates(system, f, byCuts);
    }
  }

  private static String[] names(int n) {
    String[] names = new String[n];
    for (int i = 0; i < n; i++) {
      names[i] = "x" + i;
    }
    return names;
  }

  private static List<Formula> terms(FormulaFactory f, MinimalSets sets, boolean and) {
    List<Formula> terms = new ArrayList<>();
    for (Set<String> set : sets) {
      List<Literal> literals = new ArrayList<>();
      set.forEach(name -> literals.add(f.variable(name)));
      terms.add(and ? f.and(literals) : f.or(literals));
    }
    return terms;
  }

  /** LogicNG counts over the variables that the formula has; the others are free. */
  private static void assertStates(CoherentSystem system, FormulaFactory f, Formula formula) {
    BDDKernel kernel = new BDDKernel(f, new ArrayList<>(formula.variables()), 100_000, 100_000);
    BDD bdd = BDDFactory.build(formula, kernel);
    int free = system.components().size() - formula.variables().size();
    assertEquals(system.irrelevantComponents().size(), free);
    BigInteger states =
        system.polynomial().workingStates().stream().reduce(BigInteger.ZERO, BigInteger::add);
    assertEquals(bdd.modelCount().multiply(BigInteger.TWO.pow(free)), states);
  }
}
