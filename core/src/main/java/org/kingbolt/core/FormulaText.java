package org.kingbolt.core;

import java.util.ArrayDeque;
import java.util.ArrayList;
import java.util.Deque;
import java.util.List;
import java.util.function.IntFunction;
import org.jspecify.annotations.Nullable;

/** Writes formulas, in plain text or in LaTeX, with a stack of what is still to be written. */
final class FormulaText {

  /** A formula in brackets; plain formulas stand for themselves. */
  private record Bracketed(Formula formula) {}

  /** One minus a formula, in parentheses. */
  private record Complement(Formula formula) {}

  private final boolean latex;

  /** The formula to be written in the place of a step's result, or null for the result's name. */
  private final IntFunction<@Nullable Formula> inlined;

  FormulaText(boolean latex, IntFunction<@Nullable Formula> inlined) {
    this.latex = latex;
    this.inlined = inlined;
  }

  String write(Formula root) {
    StringBuilder text = new StringBuilder();
    Deque<Object> open = new ArrayDeque<>();
    open.push(root);
    while (!open.isEmpty()) {
      Object item = open.pop();
      if (item instanceof String word) {
        text.append(word);
        continue;
      }
      List<Object> items = new ArrayList<>();
      if (item instanceof Bracketed bracketed) {
        bracketed(resolved(bracketed.formula), items);
      } else if (item instanceof Complement complement) {
        complement(resolved(complement.formula), items);
      } else {
        plain(resolved((Formula) item), items);
      }
      for (int i = items.size() - 1; i >= 0; i--) {
        open.push(items.get(i));
      }
    }
    return text.toString();
  }

  private Formula resolved(Formula formula) {
    Formula current = formula;
    while (current.kind == Formula.Kind.RESULT) {
      Formula inline = inlined.apply(current.step);
      if (inline == null) {
        return current;
      }
      current = inline;
    }
    return current;
  }

  private void bracketed(Formula formula, List<Object> items) {
    if (isSum(formula)) {
      items.add(latex ? "\\left[" : "[");
      plain(formula, items);
      items.add(latex ? "\\right]" : "]");
    } else {
      plain(formula, items);
    }
  }

  /** Whether the formula is written with a plus or a minus outside of brackets. */
  private boolean isSum(Formula formula) {
    return switch (formula.kind) {
      case COPRODUCT -> true;
      case PIVOT -> resolved(formula.operands.get(2)).kind != Formula.Kind.ZERO;
      default -> false;
    };
  }

  private void complement(Formula formula, List<Object> items) {
    items.add(latex ? "\\left(1 - " : "(1 - ");
    bracketed(formula, items);
    items.add(latex ? "\\right)" : ")");
  }

  private void plain(Formula formula, List<Object> items) {
    switch (formula.kind) {
      case SYMBOL -> items.add(symbol(formula.symbol));
      case RESULT -> items.add(result(formula.step));
      case ONE -> items.add("1");
      case ZERO -> items.add("0");
      case PRODUCT -> product(formula.operands, false, items);
      case COPRODUCT -> {
        items.add("1 - ");
        product(formula.operands, true, items);
      }
      case PIVOT -> pivot(formula, items);
    }
  }

  private void product(List<Formula> operands, boolean complements, List<Object> items) {
    for (int i = 0; i < operands.size(); i++) {
      if (i > 0) {
        items.add(times());
      }
      items.add(complements ? new Complement(operands.get(i)) : new Bracketed(operands.get(i)));
    }
  }

  /** key times working plus (1 - key) times failed, without factors 1 and terms 0. */
  private void pivot(Formula formula, List<Object> items) {
    Formula key = formula.operands.get(0);
    Formula working = resolved(formula.operands.get(1));
    Formula failed = resolved(formula.operands.get(2));
    items.add(new Bracketed(key));
    if (working.kind != Formula.Kind.ONE) {
      items.add(times());
      items.add(new Bracketed(working));
    }
    if (failed.kind != Formula.Kind.ZERO) {
      items.add(" + ");
      items.add(new Complement(key));
      items.add(times());
      items.add(new Bracketed(failed));
    }
  }

  private String times() {
    return latex ? " \\, " : "·";
  }

  String result(int step) {
    if (step == 1) {
      return "r";
    }
    return latex ? "r_{" + step + "}" : "r" + step;
  }

  private String symbol(String component) {
    return latex
        ? "p_{\\mathrm{" + escaped(component) + "}}"
        : "p(" + TextWriter.nameText(component) + ")";
  }

  private static String escaped(String name) {
    StringBuilder text = new StringBuilder();
    name.codePoints()
        .forEach(
            c -> {
              switch (c) {
                case '#', '$', '%', '&', '_', '{', '}' -> text.append('\\').appendCodePoint(c);
                case '\\' -> text.append("\\backslash{}");
                case '~' -> text.append("\\sim{}");
                case '^' -> text.append("\\hat{}");
                case ' ' -> text.append("\\ ");
                case '-' -> text.append("\\text{-}");
                default -> text.appendCodePoint(c);
              }
            });
    return text.toString();
  }
}
