package org.kingbolt.bounds;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.Iterator;
import java.util.List;
import java.util.Locale;
import java.util.function.BiFunction;
import org.kingbolt.core.Budget;
import org.kingbolt.core.BudgetExceededException;

/**
 * The intervals of all methods that apply to one system, the tightest last, and those methods that
 * were left out because their budget was used up.
 *
 * <p>Immutable; safe to share between threads.
 *
 * <p>Example: {@code System.out.println(Bounds.of(system).given(p).all());}
 */
public final class BoundsTable implements Iterable<BoundsTable.Row> {

  /**
   * One method's interval.
   *
   * @param interval with its method, assumption and reason
   * @param steps what it cost: the sets, terms, pairs of sets or steps gone through
   */
  public record Row(Interval interval, long steps) {}

  /**
   * A method without an interval.
   *
   * @param method its name
   * @param why which limit it met
   */
  public record LeftOut(String method, String why) {}

  /** A method to be run. */
  record Method(String name, BiFunction<Budget, Effort, Interval> run) {}

  private static final long USUAL_NODES = 1_000_000;

  private final List<Row> rows;
  private final List<LeftOut> leftOut;

  private BoundsTable(List<Row> rows, List<LeftOut> leftOut) {
    this.rows = List.copyOf(rows);
    this.leftOut = List.copyOf(leftOut);
  }

  /** What every method is given when the caller says nothing. */
  static Budget usualBudget() {
    return Budget.ofNodes(Math.min(USUAL_NODES, Budget.ofHeap().nodes()));
  }

  static BoundsTable of(List<Method> methods, Budget budget) {
    List<Row> rows = new ArrayList<>();
    List<LeftOut> leftOut = new ArrayList<>();
    for (Method method : methods) {
      Effort effort = new Effort();
      try {
        rows.add(new Row(method.run().apply(budget, effort), effort.steps()));
      } catch (BudgetExceededException over) {
        if (over.limit() == BudgetExceededException.Limit.INTERRUPT) {
          throw over;
        }
        leftOut.add(new LeftOut(method.name(), String.valueOf(over.getMessage())));
      }
    }
    rows.sort(
        Comparator.comparingDouble((Row row) -> row.interval().relativeWidthFailing())
            .thenComparingDouble(row -> row.interval().width())
            .reversed());
    return new BoundsTable(rows, leftOut);
  }

  /**
   * Returns the intervals.
   *
   * @return the one with the greatest relative width of the failing side first
   */
  public List<Row> rows() {
    return rows;
  }

  /**
   * Goes through the intervals in the order of {@link #rows()}.
   *
   * @return an iterator that removes nothing
   */
  @Override
  public Iterator<Row> iterator() {
    return rows.iterator();
  }

  /**
   * Returns the methods that used up their budget.
   *
   * @return their names and why, in the order in which they were tried
   */
  public List<LeftOut> leftOut() {
    return leftOut;
  }

  /**
   * Returns the tightest interval.
   *
   * @param assumption what may be taken for granted of the components
   * @return the last interval that needs no more than that
   * @throws IllegalStateException if all methods that need no more were left out
   */
  public Interval tightest(Assumption assumption) {
    for (int i = rows.size() - 1; i >= 0; i--) {
      Interval interval = rows.get(i).interval();
      if (interval.assumption().compareTo(assumption) <= 0) {
        return interval;
      }
    }
    throw new IllegalStateException(
        "no interval for " + assumption + " came out within the budget; give a larger one");
  }

  /**
   * The table with a line for each method.
   *
   * @return aligned columns; the failing side of both ends, with the working side of each after it
   */
  @Override
  public String toString() {
    List<String[]> lines = new ArrayList<>();
    lines.add(
        new String[] {
          "method",
          "holds for",
          "failing at least",
          "at most",
          "working at least",
          "at most",
          "relative width",
          "steps",
          "reason"
        });
    for (Row row : rows) {
      Interval interval = row.interval();
      lines.add(
          new String[] {
            interval.method(),
            interval.assumption().toString(),
            digits(interval.upper().failing()),
            digits(interval.lower().failing()),
            digits(interval.lower().working()),
            digits(interval.upper().working()),
            digits(interval.relativeWidthFailing()),
            Long.toString(row.steps()),
            interval.reason()
          });
    }
    int[] widths = new int[lines.get(0).length];
    for (String[] line : lines) {
      for (int column = 0; column < widths.length; column++) {
        widths[column] = Math.max(widths[column], line[column].length());
      }
    }
    StringBuilder text = new StringBuilder();
    for (String[] line : lines) {
      for (int column = 0; column < widths.length - 1; column++) {
        boolean number = column >= 2;
        String pad = " ".repeat(widths[column] - line[column].length());
        text.append(number ? pad + line[column] : line[column] + pad).append("  ");
      }
      text.append(line[widths.length - 1]).append('\n');
    }
    for (LeftOut left : leftOut) {
      text.append(left.method()).append(" left out: ").append(left.why()).append('\n');
    }
    return text.toString();
  }

  private static String digits(double value) {
    return String.format(Locale.ROOT, "%.6g", value);
  }
}
