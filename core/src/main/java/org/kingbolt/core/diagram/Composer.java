package org.kingbolt.core.diagram;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;

/**
 * Puts templates together: an expression of operators over variables becomes one reduced diagram.
 *
 * <p>Expressions are numbered in order of creation; an operator's parts must exist before it, and a
 * part may be used by several operators. Parts that share no variable are concatenated: the part is
 * built straight towards the nodes where its operator goes on, in time and memory linear in the
 * result. Where parts share variables, they are built on their own and joined by if-then-else,
 * inside the smallest operator that holds all uses.
 *
 * <p>For one thread.
 */
public final class Composer {

  private final List<Diagram> templates = new ArrayList<>();
  private final List<int[]> parts = new ArrayList<>();
  private final int variables;
  private int count;

  /** Variable of a leaf, or -1 for an operator. */
  private int[] variable = new int[16];

  /**
   * Starts an expression.
   *
   * @param variables the number of variables
   */
  public Composer(int variables) {
    this.variables = variables;
  }

  /**
   * Adds a leaf.
   *
   * @param number the variable's number, from 0 to {@code variables - 1}
   * @return the expression's number
   */
  public int variable(int number) {
    return add(number, Layers.chain(1, true), new int[0]);
  }

  /**
   * Adds an operator.
   *
   * @param template what it does with its slots
   * @param slotParts the expression in each slot
   * @return the expression's number
   */
  public int operator(Diagram template, int[] slotParts) {
    return add(-1, template, slotParts);
  }

  private int add(int number, Diagram template, int[] slotParts) {
    if (count == variable.length) {
      variable = Arrays.copyOf(variable, count << 1);
    }
    variable[count] = number;
    templates.add(template);
    parts.add(slotParts);
    return count++;
  }

  boolean isLeaf(int expression) {
    return variable[expression] >= 0;
  }

  int variableOf(int expression) {
    return variable[expression];
  }

  Diagram template(int expression) {
    return templates.get(expression);
  }

  /** The part that an operator reads on a level of its template. */
  int partAt(int expression, int level) {
    return parts.get(expression)[templates.get(expression).variableAt(level)];
  }

  int count() {
    return count;
  }

  int variables() {
    return variables;
  }

  /**
   * Builds the diagram of the last expression added, with the variables in depth-first order of
   * their first use.
   *
   * @param meter hears of every node
   * @return the reduced diagram over all variables; those never used come last in the order
   */
  public Diagram compose(WorkMeter meter) {
    return new Composition(this, ExpressionOrder.depthFirst(this), meter).diagram();
  }

  /**
   * Builds the diagram of the last expression added, in the caller's order.
   *
   * @param order all variables, each once
   * @param meter hears of every node
   * @return the reduced diagram
   */
  public Diagram compose(int[] order, WorkMeter meter) {
    return new Composition(this, ExpressionOrder.given(this, order), meter).diagram();
  }
}
