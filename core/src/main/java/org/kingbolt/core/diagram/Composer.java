package org.kingbolt.core.diagram;

import java.util.Arrays;
import java.util.function.IntUnaryOperator;
import org.jspecify.annotations.Nullable;

/**
 * Puts templates together: an expression of operators over variables becomes one reduced diagram.
 *
 * <p>Expressions are numbered in order of creation; an operator's parts must exist before it, and a
 * part may be used by several operators. Parts that share no variable are concatenated: the part is
 * built straight towards the nodes where its operator goes on, in time and memory linear in the
 * result. Where parts share variables, the smallest operator that holds all uses is built first,
 * over the parts inside it that share nothing, and its diagram is concatenated like any other.
 *
 * <p>For one thread.
 */
public final class Composer {

  private static final Operator LEAF = Operator.of(Diagram.constant(false));
  private static final int[] NO_PARTS = {};

  private int variables;

  /** Leaf of each variable, or -1. */
  private int[] leaf;

  private int count;
  private int widest;
  private @Nullable NetworkRelaxer relaxer;
  private boolean gaveUp;

  /** What each operator does. */
  private Operator[] operators = new Operator[16];

  /** Variable of a leaf, or -1 for an operator. */
  private int[] variable = new int[16];

  /** Where in the pool the parts of an expression begin, and how many there are. */
  private int[] firstPart = new int[16];

  private int[] partCount = new int[16];
  private int[] pool = new int[64];
  private int pooled;

  /**
   * Starts an expression.
   *
   * @param variables the number of variables, as far as it is known
   */
  public Composer(int variables) {
    this.variables = variables;
    this.leaf = new int[Math.max(16, variables)];
    Arrays.fill(leaf, -1);
  }

  /**
   * Finds or adds the leaf of a variable.
   *
   * @param number the variable's number, from 0
   * @return the expression's number
   */
  public int variable(int number) {
    if (number >= leaf.length) {
      int known = leaf.length;
      leaf = Arrays.copyOf(leaf, Math.max(known << 1, number + 1));
      Arrays.fill(leaf, known, leaf.length, -1);
    }
    if (leaf[number] < 0) {
      leaf[number] = add(number, LEAF, NO_PARTS);
      variables = Math.max(variables, number + 1);
    }
    return leaf[number];
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

  /**
   * Replaces the networks added from now on.
   *
   * @param newRelaxer says by what
   */
  public void relax(NetworkRelaxer newRelaxer) {
    relaxer = newRelaxer;
  }

  /** Adds a network that no reduction takes apart. */
  int sweep(NetworkProblem network, boolean dual, int[] slotParts, WorkMeter meter) {
    if (relaxer != null && !relaxer.isBusy()) {
      return relaxer.sweep(this, network, dual, slotParts, meter);
    }
    FrontierPlan plan = new FrontierPlan(network, meter);
    widest = Math.max(widest, plan.width());
    Operator operator = Operator.swept(plan.rule());
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

  private int add(int number, Operator operator, int[] slotParts) {
    if (count == variable.length) {
      operators = Arrays.copyOf(operators, count << 1);
      variable = Arrays.copyOf(variable, count << 1);
      firstPart = Arrays.copyOf(firstPart, count << 1);
      partCount = Arrays.copyOf(partCount, count << 1);
    }
    variable[count] = number;
    replace(count, operator, slotParts);
    return count++;
  }

  /** Puts another operator over other parts in the place of an equal expression. */
  void replace(int expression, Operator operator, int[] slotParts) {
    if (pool.length - pooled < slotParts.length) {
      pool = Arrays.copyOf(pool, Math.max(pool.length << 1, pooled + slotParts.length));
    }
    System.arraycopy(slotParts, 0, pool, pooled, slotParts.length);
    operators[expression] = operator;
    firstPart[expression] = pooled;
    partCount[expression] = slotParts.length;
    pooled += slotParts.length;
  }

  boolean isLeaf(int expression) {
    return variable[expression] >= 0;
  }

  int variableOf(int expression) {
    return variable[expression];
  }

  /** What an operator does. */
  Operator operatorOf(int expression) {
    return operators[expression];
  }

  /** The number of levels of an operator's template; 0 for a leaf. */
  int levels(int expression) {
    return operators[expression].levels();
  }

  /** The part that an operator reads on a level of its template. */
  int partAt(int expression, int level) {
    return pool[firstPart[expression] + operators[expression].slotAt(level)];
  }

  /** The number of slots of an operator. */
  int slots(int expression) {
    return partCount[expression];
  }

  /** The part in a slot of an operator. */
  int part(int expression, int slot) {
    return pool[firstPart[expression] + slot];
  }

  /** How many levels of operators read each expression. */
  int[] uses() {
    int[] uses = new int[count];
    for (int expression = 0; expression < count; expression++) {
      for (int level = levels(expression) - 1; level >= 0; level--) {
        uses[partAt(expression, level)]++;
      }
    }
    return uses;
  }

  /** The parts of an operator, by slot. */
  int[] parts(int expression) {
    int first = firstPart[expression];
    return Arrays.copyOfRange(pool, first, first + partCount[expression]);
  }

  /** Lets the parts of a gate change places. */
  void arrange(int gate, int[] slotParts) {
    System.arraycopy(slotParts, 0, pool, firstPart[gate], slotParts.length);
  }

  /** The parts of all operators. */
  int[] arrangement() {
    return Arrays.copyOf(pool, pooled);
  }

  /** Puts the parts of all operators back into their places. */
  void arrange(int[] arrangement) {
    System.arraycopy(arrangement, 0, pool, 0, pooled);
  }

  /** The slots of an operator, their parts in increasing order of a key, equal ones as they are. */
  int[] sortedSlots(int expression, IntUnaryOperator key) {
    long[] keyed = new long[partCount[expression]];
    for (int slot = 0; slot < keyed.length; slot++) {
      keyed[slot] = ((long) key.applyAsInt(part(expression, slot)) << 32) | slot;
    }
    Arrays.sort(keyed);
    return Arrays.stream(keyed).mapToInt(slot -> (int) slot).toArray();
  }

  /** The parts of an operator in increasing order of a key, equal ones as they are. */
  int[] sortedParts(int expression, IntUnaryOperator key) {
    int[] parts = sortedSlots(expression, key);
    for (int i = 0; i < parts.length; i++) {
      parts[i] = part(expression, parts[i]);
    }
    return parts;
  }

  /** Whether all operators are. */
  boolean isMonotone() {
    for (int expression = 0; expression < count; expression++) {
      if (!operators[expression].isMonotone()) {
        return false;
      }
    }
    return true;
  }

  void giveUp() {
    gaveUp = true;
  }

  /**
   * Tells whether some part was too large and not monotone, so that nothing is known of it.
   *
   * @return true after {@link #expectBetween} if {@link NetworkRelaxer#beginMonotone} may do better
   */
  public boolean hasGivenUp() {
    return gaveUp;
  }

  int count() {
    return count;
  }

  int variables() {
    return variables;
  }

  /**
   * Builds the diagram of an expression, with the variables in depth-first order: where nothing is
   * shared, of their first use, except that k-out-of-n gates read large parts first and last;
   * elsewhere, in the best of several such orders. The expression is used up.
   *
   * @param root the expression
   * @param meter hears of every node
   * @return the reduced diagram over all variables; those never used come last in the order
   */
  public Diagram compose(int root, WorkMeter meter) {
    double nodes = Untangling.of(this, root, meter);
    meter.at((long) nodes);
    if (nodes > UniqueTable.LARGEST_SIZE) {
      throw new IllegalStateException("more than " + UniqueTable.LARGEST_SIZE + " nodes");
    }
    return new Concatenation(this, meter).diagram(root);
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
    return Expectation.of(this, root, working, failing, meter);
  }

  /**
   * Both ends of the probability that an expression works, and of that it fails: the same where
   * parts that share something are small enough to be built, and bounds elsewhere. They hold up to
   * rounding, which is not directed: to about {@code 4 levels 2^-53} of each, like {@link #expect}.
   *
   * @param root the expression
   * @param working indexed by variable: probability of working, variables being independent
   * @param failing indexed by variable: the complement
   * @param effort how many nodes may be spent on one diagram, at least 1; the more, the closer, in
   *     general
   * @param meter hears of every node and state
   * @return four numbers, the same for the same effort: at least the probability of working, at
   *     most that of failing; at most that of working, at least that of failing
   */
  public double[] expectBetween(
      int root, double[] working, double[] failing, long effort, WorkMeter meter) {
    Bracket both = ExpectationBounds.of(this, root, working, failing, effort, meter);
    return new double[] {
      both.worksAtLeast(), both.failsAtMost(), both.worksAtMost(), both.failsAtLeast()
    };
  }

  /**
   * Builds the diagram of an expression, in the caller's order. The expression is used up.
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
