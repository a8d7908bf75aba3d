package org.kingbolt.docs.bench;

import org.kingbolt.core.diagram.Diagram;
import org.logicng.formulas.FormulaFactory;
import org.logicng.knowledgecompilation.bdds.BDD;
import org.logicng.knowledgecompilation.bdds.jbuddy.BDDConstruction;
import org.logicng.knowledgecompilation.bdds.jbuddy.BDDKernel;

/**
 * A function in LogicNG's node table, made bottom-up in the order of the diagram given. Without a
 * call that makes a node, each takes two conjunctions and a disjunction. The table has room for all
 * from the start.
 */
final class LogicNgNodes {

  private LogicNgNodes() {}

  static BDD of(Diagram diagram) {
    int room = 3 * diagram.size() + 1000;
    BDDKernel kernel = new BDDKernel(new FormulaFactory(), diagram.levels(), room, room / 4);
    BDDConstruction construction = new BDDConstruction(kernel);
    int[] made = new int[diagram.size()];
    made[Diagram.FAILS] = BDDKernel.BDD_FALSE;
    made[Diagram.WORKS] = BDDKernel.BDD_TRUE;
    for (int level = diagram.levels() - 1; level >= 0; level--) {
      int works = construction.ithVar(level);
      int fails = construction.nithVar(level);
      for (int id = diagram.from(level); id < diagram.to(level); id++) {
        made[id] =
            construction.or(
                construction.and(works, made[diagram.high(id)]),
                construction.and(fails, made[diagram.low(id)]));
      }
    }
    return new BDD(made[diagram.root()], kernel);
  }
}
