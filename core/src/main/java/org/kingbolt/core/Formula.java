package org.kingbolt.core;

import java.util.ArrayDeque;
import java.util.ArrayList;
import java.util.Deque;
import java.util.IdentityHashMap;
import java.util.List;
import org.jspecify.annotations.Nullable;

/**
 * A reliability formula over independent operands: a node of it and, through its operands, the
 * rest. Operands are filled in while the formula is made; afterwards it is not changed.
 */
final class Formula {

  /** What a node stands for. */
  enum Kind {
    /** The probability that a component works. */
    SYMBOL,
    /** The result of another step of the derivation. */
    RESULT,
    /** All operands work. */
    PRODUCT,
    /** Any operand works. */
    COPRODUCT,
    /** Operand 0 is the key; operand 1 is what is left when it works, operand 2 when it failed. */
    PIVOT,
    /** Certain. */
    ONE,
    /** Impossible. */
    ZERO
  }

  final Kind kind;

  /** The component of a symbol, or "". */
  final String symbol;

  /** What still has to be derived, for a result. */
  final @Nullable Structure structure;

  /** The number of the step whose result this is, once known. */
  int step;

  final List<Formula> operands = new ArrayList<>();

  private Formula(Kind kind, String symbol, @Nullable Structure structure) {
    this.kind = kind;
    this.symbol = symbol;
    this.structure = structure;
  }

  static Formula symbol(String component) {
    return new Formula(Kind.SYMBOL, component, null);
  }

  static Formula result(Structure structure) {
    return new Formula(Kind.RESULT, "", structure);
  }

  static Formula of(Kind kind) {
    return new Formula(kind, "", null);
  }

  static Formula pivot(Formula key, Formula working, Formula failed) {
    Formula formula = new Formula(Kind.PIVOT, "", null);
    formula.operands.addAll(List.of(key, working, failed));
    return formula;
  }

  /** All nodes, operands before the nodes that use them, this one last. */
  List<Formula> postOrder() {
    record Visit(Formula formula, boolean entered) {}
    List<Formula> order = new ArrayList<>();
    Deque<Visit> open = new ArrayDeque<>();
    open.push(new Visit(this, false));
    while (!open.isEmpty()) {
      Visit visit = open.pop();
      if (visit.entered || visit.formula.operands.isEmpty()) {
        order.add(visit.formula);
      } else {
        open.push(new Visit(visit.formula, true));
        for (int i = visit.formula.operands.size() - 1; i >= 0; i--) {
          open.push(new Visit(visit.formula.operands.get(i), false));
        }
      }
    }
    return order;
  }

  /** Both sides of the value, by sums of non-negative terms. */
  Probability value(Probabilities p, List<Probability> results) {
    IdentityHashMap<Formula, double[]> values = new IdentityHashMap<>();
    double[] last = {0, 1};
    for (Formula formula : postOrder()) {
      last = formula.combine(p, results, values);
      values.put(formula, last);
    }
    return Probability.computed(last[0], last[1]);
  }

  private double[] combine(
      Probabilities p, List<Probability> results, IdentityHashMap<Formula, double[]> values) {
    return switch (kind) {
      case SYMBOL -> sides(p.get(symbol));
      case RESULT -> sides(results.get(step - 1));
      case ONE -> new double[] {1, 0};
      case ZERO -> new double[] {0, 1};
      case PIVOT -> {
        double[] key = values.getOrDefault(operands.get(0), new double[2]);
        double[] working = values.getOrDefault(operands.get(1), new double[2]);
        double[] failed = values.getOrDefault(operands.get(2), new double[2]);
        yield new double[] {
          key[0] * working[0] + key[1] * failed[0], key[0] * working[1] + key[1] * failed[1]
        };
      }
      case PRODUCT, COPRODUCT -> {
        // the side on which all operands must agree is a product; the other is summed up with it
        int all = kind == Kind.PRODUCT ? 0 : 1;
        double[] sum = new double[2];
        sum[all] = 1;
        for (Formula operand : operands) {
          double[] value = values.getOrDefault(operand, new double[2]);
          sum[1 - all] += sum[all] * value[1 - all];
          sum[all] *= value[all];
        }
        yield sum;
      }
    };
  }

  private static double[] sides(Probability value) {
    return new double[] {value.working(), value.failing()};
  }
}
