package org.kingbolt.core.diagram;

import java.util.Arrays;

/**
 * The probability that some set of a family has all failed, where only sets that contain one of
 * some marked variables count.
 *
 * <p>That event is a function of the variables that grows with their failures. Its diagram is built
 * from that of the family, bottom-up: where a variable works, only the sets without it count; where
 * it has failed, those with it count too, which takes an "or". Parts below all marked variables are
 * built once and kept from one question to the next. Then it is evaluated as a sum of non-negative
 * terms.
 *
 * <p>For one thread.
 */
public final class SetUnion {

  private static final int NEVER = Diagram.FAILS;
  private static final int ALWAYS = Diagram.WORKS;

  private final Diagram family;
  private final double[] working;
  private final double[] failing;
  private final WorkMeter meter;
  private final NodeTable table;

  /** By node of the family: the event that some set has all failed. */
  private final int[] whole;

  private int wholeTo = 2;

  /** By node of the table. */
  private double[] probability = {0, 1};

  private int evaluatedTo = 2;

  /**
   * Prepares.
   *
   * @param sets the family, such as that of {@link MinimalSolutions#cuts}
   * @param working indexed by variable: probability of working, from 0 to 1
   * @param failing indexed by variable: the complement
   * @param meter hears of every node
   */
  public SetUnion(SetDiagram sets, double[] working, double[] failing, WorkMeter meter) {
    this.family = sets.nodes();
    this.working = working.clone();
    this.failing = failing.clone();
    this.meter = meter;
    this.table = new NodeTable(family.levels(), meter);
    this.whole = new int[family.size()];
    whole[SetDiagram.NO_SETS] = NEVER;
    whole[SetDiagram.ONLY_EMPTY_SET] = ALWAYS;
  }

  /**
   * Answers for one choice of variables.
   *
   * @param marked indexed by variable
   * @return the probability that all variables of at least one set that contains a marked variable
   *     have failed. Cost: one "or" of two functions for every node of the family; the functions
   *     may be far larger than the family.
   */
  public double probability(boolean[] marked) {
    int deepest = -1;
    int first = family.levels();
    for (int level = 0; level < family.levels(); level++) {
      if (marked[family.variableAt(level)]) {
        deepest = level;
        first = Math.min(first, level);
      }
    }
    if (deepest < 0) {
      return 0;
    }
    buildWhole(family.from(first));
    int[] part = new int[family.size()];
    for (int level = deepest; level >= 0; level--) {
      boolean isMarked = marked[family.variableAt(level)];
      for (int id = family.from(level); id < family.to(level); id++) {
        int without = part[family.low(id)];
        int with = isMarked ? whole[family.high(id)] : part[family.high(id)];
        part[id] = node(level, without, with);
      }
    }
    return evaluated(part[family.root()]);
  }

  private void buildWhole(int end) {
    int level = family.levels() - 1;
    for (; wholeTo < end; wholeTo++) {
      while (wholeTo >= family.to(level)) {
        level--;
      }
      whole[wholeTo] = node(level, whole[family.low(wholeTo)], whole[family.high(wholeTo)]);
    }
  }

  private int node(int level, int without, int with) {
    meter.at(table.size());
    return table.node(level, table.or(without, with), without);
  }

  private double evaluated(int root) {
    if (table.size() > probability.length) {
      probability = Arrays.copyOf(probability, Math.max(table.size(), probability.length << 1));
    }
    for (; evaluatedTo < table.size(); evaluatedTo++) {
      int variable = family.variableAt(table.level(evaluatedTo));
      probability[evaluatedTo] =
          working[variable] * probability[table.high(evaluatedTo)]
              + failing[variable] * probability[table.low(evaluatedTo)];
    }
    return probability[root];
  }
}
