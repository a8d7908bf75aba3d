package org.kingbolt.docs.bench;

import java.util.ArrayList;
import java.util.Collections;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.Random;
import jdd.bdd.BDD;
import org.kingbolt.core.Structure;
import org.logicng.formulas.Formula;
import org.logicng.formulas.FormulaFactory;
import org.logicng.formulas.Variable;
import org.logicng.knowledgecompilation.bdds.BDDFactory;
import org.logicng.knowledgecompilation.bdds.jbuddy.BDDKernel;

/**
 * Random gates over components, some of which occur twice. Gates are numbered, the outermost one
 * first; a part is a component's number, or -1 minus a gate's.
 */
final class NestedGates {

  private enum Kind {
    SERIES,
    PARALLEL,
    TWO_OF_THREE
  }

  /** Nodes that the peers' tables hold at first. */
  private static final int ROOM = 10_000;

  private final List<Kind> kinds = new ArrayList<>();
  private final List<List<Integer>> parts = new ArrayList<>();

  /** Every gate but the outermost is in an earlier one; then components fill the gates. */
  NestedGates(int gates, int components, int repeated, long seed) {
    Random random = new Random(seed);
    for (int gate = 0; gate < gates; gate++) {
      kinds.add(Kind.values()[gate % 3]);
      parts.add(new ArrayList<>());
      if (gate > 0) {
        add(-1 - gate, gate, random);
      }
    }
    List<Integer> leaves = new ArrayList<>();
    for (int leaf = 0; leaf < components + repeated; leaf++) {
      leaves.add(leaf % components);
    }
    Collections.shuffle(leaves, random);
    for (int gate = 0; gate < gates; gate++) {
      int least = kinds.get(gate) == Kind.TWO_OF_THREE ? 3 : 2;
      for (int at = 0; parts.get(gate).size() < least; at++) {
        if (!parts.get(gate).contains(leaves.get(at))) {
          parts.get(gate).add(leaves.remove(at--));
        }
      }
    }
    leaves.forEach(leaf -> add(leaf, gates, random));
    parts.forEach(list -> Collections.shuffle(list, random));
  }

  private void add(int part, int gates, Random random) {
    int gate;
    do {
      gate = random.nextInt(gates);
    } while (parts.get(gate).contains(part)
        || (kinds.get(gate) == Kind.TWO_OF_THREE && parts.get(gate).size() == 3));
    parts.get(gate).add(part);
  }

  /** Makes what a gate stands for from what its parts stand for. */
  private interface Maker<T> {
    T component(int number);

    T gate(Kind kind, List<T> parts);
  }

  /** The innermost gates come first. */
  private <T> T make(Maker<T> maker) {
    List<T> made = new ArrayList<>(Collections.nCopies(kinds.size(), null));
    for (int gate = kinds.size() - 1; gate >= 0; gate--) {
      List<T> inside = new ArrayList<>();
      for (int part : parts.get(gate)) {
        inside.add(part < 0 ? made.get(-1 - part) : maker.component(part));
      }
      made.set(gate, maker.gate(kinds.get(gate), inside));
    }
    return made.get(0);
  }

  Structure structure() {
    return make(
        new Maker<Structure>() {
          @Override
          public Structure component(int number) {
            return Structure.component(name(number));
          }

          @Override
          public Structure gate(Kind kind, List<Structure> inside) {
            return switch (kind) {
              case SERIES -> Structure.series(inside);
              case PARALLEL -> Structure.parallel(inside);
              case TWO_OF_THREE -> Structure.atLeast(2, inside);
            };
          }
        });
  }

  /** The number of JDD's nodes, with the variables in the order given. */
  int jddNodes(List<String> order) {
    BDD bdd = new BDD(ROOM, ROOM / 4);
    Map<String, Integer> variables = new HashMap<>();
    order.forEach(name -> variables.put(name, bdd.createVar()));
    int root =
        make(
            new Maker<Integer>() {
              @Override
              public Integer component(int number) {
                return variables.get(name(number));
              }

              @Override
              public Integer gate(Kind kind, List<Integer> inside) {
                int made =
                    kind == Kind.TWO_OF_THREE
                        ? twoOfThree(bdd, inside.get(0), inside.get(1), inside.get(2))
                        : bdd.ref(inside.get(0));
                for (int part : inside) {
                  if (kind == Kind.SERIES) {
                    made = bdd.andTo(made, part);
                  } else if (kind == Kind.PARALLEL) {
                    made = bdd.orTo(made, part);
                  }
                }
                inside.forEach(bdd::deref);
                return made;
              }
            });
    return bdd.nodeCount(root);
  }

  private static int twoOfThree(BDD bdd, int a, int b, int c) {
    int either = bdd.ref(bdd.or(b, c));
    int both = bdd.ref(bdd.and(b, c));
    int made = bdd.ref(bdd.ite(a, either, both));
    bdd.deref(either);
    bdd.deref(both);
    return made;
  }

  /** The number of LogicNG's nodes, with the variables in the order given. */
  int logicNgNodes(List<String> order) {
    FormulaFactory f = new FormulaFactory();
    Formula formula =
        make(
            new Maker<Formula>() {
              @Override
              public Formula component(int number) {
                return f.variable(name(number));
              }

              @Override
              public Formula gate(Kind kind, List<Formula> inside) {
                return switch (kind) {
                  case SERIES -> f.and(inside);
                  case PARALLEL -> f.or(inside);
                  case TWO_OF_THREE ->
                      f.or(
                          f.and(inside.get(0), f.or(inside.get(1), inside.get(2))),
                          f.and(inside.get(1), inside.get(2)));
                };
              }
            });
    List<Variable> variables = order.stream().map(f::variable).toList();
    BDDKernel kernel = new BDDKernel(f, variables, ROOM, ROOM / 4);
    return BDDFactory.build(formula, kernel).nodeCount();
  }

  private static String name(int component) {
    return "c" + component;
  }
}
