package org.kingbolt.bounds;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.HashSet;
import java.util.List;
import java.util.Set;
import org.junit.jupiter.api.Test;
import org.kingbolt.core.Budget;
import org.kingbolt.core.Probabilities;
import org.kingbolt.core.Probability;
import org.kingbolt.core.Structure;

/** The table of all methods: sorted, complete, aligned. */
class BoundsTableTest {

  private static final Structure BRIDGE =
      Structure.parse(
          "network(link(a, s, u), link(b, s, v), link(c, u, v), link(d, u, t), link(e, v, t),"
              + " connecting(s, t))");

  @Test
  void table_holdsEveryMethod_tightestLast() {
    Probabilities p = Probabilities.all(Probability.failing(0.01));
    BoundsTable table = Bounds.of(BRIDGE).given(p).all();
    Set<String> methods = new HashSet<>();
    double before = Double.POSITIVE_INFINITY;
    for (BoundsTable.Row row : table) {
      Interval interval = row.interval();
      assertTrue(methods.add(interval.method()));
      assertTrue(interval.contains(BRIDGE.reliability(p)), table::toString);
      assertTrue(interval.relativeWidthFailing() <= before, table::toString);
      before = interval.relativeWidthFailing();
      assertTrue(row.steps() > 0, table::toString);
    }
    assertEquals(
        Set.of(
            "exact",
            "Esary-Proschan",
            "Esary-Proschan by modules",
            "min-max",
            "Frechet",
            "linear programming",
            "inclusion-exclusion of order 3",
            "second order"),
        methods);
    assertEquals(List.of(), table.leftOut());
    assertEquals("exact", table.tightest(Assumption.INDEPENDENT).method());
    assertEquals("min-max", table.tightest(Assumption.ASSOCIATED).method());
    assertEquals(Assumption.NONE, table.tightest(Assumption.NONE).assumption());
  }

  @Test
  void text_isAligned() {
    List<String> lines =
        Bounds.of(BRIDGE).given(Probabilities.all(0.99)).all().toString().lines().toList();
    assertEquals(9, lines.size());
    int reason = lines.get(0).indexOf("reason");
    int steps = lines.get(0).indexOf("steps");
    for (String line : lines) {
      assertEquals("  ", line.substring(reason - 2, reason));
      assertTrue(line.charAt(reason) != ' ' && line.charAt(steps + 4) != ' ', line);
    }
    assertTrue(lines.get(8).startsWith("exact "), lines.get(8));
  }

  /** Path sets of a 15-out-of-30 system are far too many for such a budget. */
  @Test
  void methodsBeyondTheBudget_areListedWithWhy() {
    String[] names = new String[30];
    for (int i = 0; i < names.length; i++) {
      names[i] = "c" + i;
    }
    BoundsTable table =
        Bounds.of(Structure.atLeast(15, names))
            .given(Probabilities.all(0.9))
            .all(Budget.ofNodes(10_000));
    List<String> left = table.leftOut().stream().map(BoundsTable.LeftOut::method).toList();
    assertTrue(left.contains("Esary-Proschan") && left.contains("second order"), left::toString);
    assertTrue(table.leftOut().get(0).why().contains("limit of 10000 nodes"));
    assertTrue(table.toString().contains("Esary-Proschan left out: stopped at"), table::toString);
    assertTrue(table.tightest(Assumption.ASSOCIATED).lower().working() > 0);
  }

  @Test
  void structureThatCannotBeCompiled_hasAnIntervalForEveryAssumption() {
    StringBuilder text = new StringBuilder("network(");
    for (int row = 0; row < 14; row++) {
      for (int column = 0; column < 14; column++) {
        String here = row + "." + column;
        text.append(
            column < 13
                ? "link(h" + here + ", n" + here + ", n" + row + "." + (column + 1) + "), "
                : "");
        text.append(
            row < 13
                ? "link(v" + here + ", n" + here + ", n" + (row + 1) + "." + column + "), "
                : "");
      }
    }
    Structure grid = Structure.parse(text + "connecting(n0.0, n13.13))");
    BoundsTable table = Bounds.of(grid).given(Probabilities.all(0.99)).all(Budget.ofNodes(50_000));
    assertEquals(3, table.rows().size(), table::toString);
    assertEquals(5, table.leftOut().size(), table::toString);
    assertTrue(table.tightest(Assumption.INDEPENDENT).lower().working() > 0.999);
    // 26 links are the shortest path, two links the smallest cut; those found need not be these
    Interval associated = table.tightest(Assumption.ASSOCIATED);
    assertTrue(associated.lower().working() > 0.2, table::toString);
    assertTrue(associated.lower().working() <= Math.pow(0.99, 26), table::toString);
    assertTrue(associated.upper().failing() <= 1e-4, table::toString);
    assertTrue(associated.upper().failing() >= 1e-8, table::toString);
  }
}
