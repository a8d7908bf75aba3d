package org.kingbolt.core.diagram;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.Objects;
import org.jspecify.annotations.Nullable;

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

  /** What each operator does; nothing for a leaf. */
  private final List<@Nullable Operator> operators = new ArrayList<>();

  private final List<int[]> parts = new ArrayList<>();
  private static final int[] NO_PARTS = {};

  private final int variables;
  private int count;
  private int widest;

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
    return add(number, null, NO_PARTS);
  }

  /**
   * Adds an operator.
   *
   * @param operator what it does with its slots
   * @param slotParts the expression in each slot
   * @return the expression's number
   */
  public int operator(Operator operator, int[] slotParts) {
    return add(-1, operator, slotParts);
  }

  /**
   * Adds a network, taken apart as far as series, parallel, dead ends and cutting nodes go.
   *
   * @param network the network over the slots
   * @param dual whether the dual of the network is meant
   * @param slotParts the expression in each slot
   * @param meter hears of the search for an order to sweep it in
   * @return the expression's number
   */
  public int network(NetworkProblem network, boolean dual, int[] slotParts, WorkMeter meter) {
    return new NetworkReducer(this, network, dual, slotParts, meter).expression();
  }

  /** Adds a network that no reduction takes apart. */
  int sweep(NetworkProblem network, boolean dual, int[] slotParts, WorkMeter meter) {
    FrontierPlan plan = new FrontierPlan(network, meter);
    widest = Math.max(widest, plan.width());
    StateRule rule = network.directed ? new DirectedRule(plan) : new UndirectedRule(plan);
    Operator operator = Operator.swept(rule);
    return operator(dual ? Operator.dual(operator) : operator, slotParts);
  }

  /**
   * Returns the widest frontier of the networks added so far, after all reductions; the cost of
   * sweeping them grows exponentially with it.
   *
   * @return a number of nodes; 0 without networks, and where reductions leave none
   */
  public int widestFrontier() {
    return widest;
  }

  /** All parts work; a single part is itself. */
  int all(int[] slotParts) {
    return slotParts.length == 1
        ? slotParts[0]
        : operator(Templates.atLeast(slotParts.length, slotParts.length), slotParts);
  }

  /** Any part works; a single part is itself. */
  int any(int[] slotParts) {
    return slotParts.length == 1
        ? slotParts[0]
        : operator(Templates.atLeast(1, slotParts.length), slotParts);
  }

  private int add(int number, @Nullable Operator operator, int[] slotParts) {
    if (count == variable.length) {
      variable = Arrays.copyOf(variable, count << 1);
    }
    variable[count] = number;
    operators.add(operator);
    parts.add(slotParts);
    return count++;
  }

  boolean isLeaf(int expression) {
    return variable[expression] >= 0;
  }

  int variableOf(int expression) {
    return variable[expression];
  }

  /** What an operator does. */
  Operator operatorOf(int expression) {
    return Objects.requireNonNull(operators.get(expression), "a leaf");
  }

  int levels(int expression) {
    return operatorOf(expression).levels();
  }

  /** The part that an operator reads on a level of its template. */
  int partAt(int expression, int level) {
    return parts.get(expression)[operatorOf(expression).slotAt(level)];
  }

  /** The parts of an operator, by slot. */
  int[] parts(int expression) {
    return parts.get(expression);
  }

  int count() {
    return count;
  }

  int variables() {
    return variables;
  }

  /**
   * Builds the diagram of an expression, with the variables in depth-first order of their first
   * use.
   *
   * @param root the expression
   * @param meter hears of every node
   * @return the reduced diagram over all variables; those never used come last in the order
   */
  public Diagram compose(int root, WorkMeter meter) {
    return new Composition(this, ExpressionOrder.depthFirst(this, root), meter).diagram(root);
  }

  /**
   * The probability that an expression works, and that it fails, without a diagram of the whole:
   * operators whose parts share nothing are evaluated one by one.
   *
   * @param root the expression
   * @param working indexed by variable: probability of working, variables being independent
   * @param failing indexed by variable: the complement
   * @param meter hears of every node and state
   * @return both, each by sums of non-negative terms
   */
  public double[] expect(int root, double[] working, double[] failing, WorkMeter meter) {
    return new Expectation(this, root, working, failing, meter).result();
  }

  /**
   * Builds the diagram of an expression, in the caller's order.
   *
   * @param root the expression
   * @param order all variables, each once
   * @param meter hears of every node
   * @return the reduced diagram
   */
  public Diagram compose(int root, int[] order, WorkMeter meter) {
    return new Composition(this, ExpressionOrder.given(this, root, order), meter).diagram(root);
  }
}
