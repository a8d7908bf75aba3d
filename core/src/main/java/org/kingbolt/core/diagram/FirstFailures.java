package org.kingbolt.core.diagram;

import java.util.Arrays;
import java.util.Comparator;
import java.util.PriorityQueue;

/**
 * Bounds on the probability that a monotone function of pieces fails, by sums of terms of one sign,
 * for functions that fail only where several pieces do.
 *
 * <p>The diagram of the function, its variables being the pieces, has disjoint paths to the outcome
 * "fails", one of which is taken. On a path the pieces J have failed and the pieces E work. Let D
 * be those of E that share a variable with some piece of J, I the rest. With the notation and the
 * inequalities of {@link Chain}, as J is independent of I,
 *
 * <pre>
 *   P(A_J W_E) = P(W_I) P(A_J W_D | W_I) &gt;= P(W_I) (P(A_J) - sum over k in D of P(A_J A_k)),
 *   P(A_J W_E) &lt;= P(A_J) P(W_E),
 *   P(A_J W_E) &lt;= P(A_J) - P(A_J A_k) for any k in E,
 * </pre>
 *
 * <p>P(W_I) being at least the product, and P(W_E) at most the product of min(1, P(W_e) + sum of
 * P(A_e A_k)) over e in E, k running over what comes before e and shares something with it.
 *
 * <p>The paths are followed best first. What is left in the end, with the pieces J failed and E
 * working so far, has P(A_J) P(W_E) at most.
 */
final class FirstFailures {

  /** No path is followed when all the rest is so little of what has been found. */
  private static final double CLOSE = 1e-5;

  /** Nor is one that is so little of that by itself. */
  private static final double SMALL = 1e-7;

  /** The beginning of a path, as far as its last failed piece. */
  private static final class Beginning {
    final int number;

    /** The same without the last failed piece, the node where that failed, and the node after. */
    final Beginning before;

    final int branch;
    final int next;

    /** At least and at most the probability that all those work which do. */
    final double low;

    final double high;

    /** At most the probability of the whole. */
    final double bound;

    /** Of the function's root. */
    Beginning(int root) {
      this.number = 0;
      this.before = this;
      this.branch = root;
      this.next = root;
      this.low = 1;
      this.high = 1;
      this.bound = 1;
    }

    Beginning(
        int number, Beginning before, int branch, int next, double low, double high, double bound) {
      this.number = number;
      this.before = before;
      this.branch = branch;
      this.next = next;
      this.low = low;
      this.high = high;
      this.bound = bound;
    }
  }

  private final Diagram function;
  private final Ensemble pieces;
  private final JointFailure joint;
  private final WorkMeter meter;

  /** The piece of each node. */
  private final int[] pieceOf;

  /** By piece: the probability of working, and at most that given what comes before works. */
  private final double[] works;

  private final double[] worksAtMost;

  private final PriorityQueue<Beginning> open =
      new PriorityQueue<>(
          Comparator.comparingDouble((Beginning path) -> -path.bound)
              .thenComparingInt(path -> path.number));

  /** On the present path: pieces that have failed, and marks on those that work. */
  private final int[] failed;

  private int failedCount;
  private final int[] workingAt;
  private int present;

  private final int[] some;
  private final int[] seenAt;
  private double openSum;
  private int begun;

  double failsAtLeast;
  double failsAtMost;

  private FirstFailures(Diagram function, Ensemble pieces, JointFailure joint, WorkMeter meter) {
    this.function = function;
    this.pieces = pieces;
    this.joint = joint;
    this.meter = meter;
    int n = pieces.size();
    this.works = new double[n];
    this.worksAtMost = new double[n];
    this.failed = new int[n];
    this.workingAt = new int[n];
    this.some = new int[n + 1];
    this.seenAt = new int[n];
    this.pieceOf = new int[function.size()];
    int[] levelOf = new int[n];
    for (int level = 0; level < function.levels(); level++) {
      levelOf[function.variableAt(level)] = level;
      Arrays.fill(pieceOf, function.from(level), function.to(level), function.variableAt(level));
    }
    for (int piece = 0; piece < n; piece++) {
      works[piece] = pieces.at(piece).works();
      double sum = works[piece];
      for (int other : pieces.neighbours(piece)) {
        if (levelOf[other] < levelOf[piece] && sum < 1) {
          sum += joint.of(new int[] {piece, other}, 2).high();
        }
      }
      worksAtMost[piece] = Math.min(1, sum);
    }
  }

  /**
   * Follows the paths.
   *
   * @param function its variables are the numbers of the pieces
   * @param most how many beginnings of paths may be kept
   * @param allowance how many nodes may be evaluated, about
   */
  static FirstFailures of(
      Diagram function, Ensemble pieces, int most, long allowance, WorkMeter meter) {
    JointFailure joint = new JointFailure(pieces, allowance);
    FirstFailures failures = new FirstFailures(function, pieces, joint, meter);
    failures.run(most, pieces.work() + allowance);
    return failures;
  }

  private void run(int most, long end) {
    Beginning whole = new Beginning(function.root());
    open.add(whole);
    openSum = 1;
    while (!open.isEmpty()
        && begun < most
        && pieces.work() < end
        && openSum > CLOSE * failsAtLeast) {
      Beginning path = open.remove();
      openSum -= path.bound;
      recall(path);
      if (path.next == Diagram.FAILS) {
        close(path);
      } else {
        follow(path);
      }
    }
    for (Beginning path : open) {
      failsAtMost += path.bound;
    }
  }

  /** Marks what has failed and what works on a path. */
  private void recall(Beginning path) {
    pieces.spend(function.levels());
    present++;
    failedCount = 0;
    for (Beginning at = path; at.before != at; at = at.before) {
      failed[failedCount++] = pieceOf[at.branch];
      for (int id = at.before.next; id != at.branch; id = function.high(id)) {
        workingAt[pieceOf[id]] = present;
      }
    }
  }

  /** Lets each of the next pieces be the first to fail. */
  private void follow(Beginning path) {
    double low = path.low;
    double high = path.high;
    double small = SMALL * CLOSE * failsAtLeast;
    for (int id = path.next; id >= 2; id = function.high(id)) {
      meter.at(begun);
      int piece = pieceOf[id];
      System.arraycopy(failed, 0, some, 0, failedCount);
      some[failedCount] = piece;
      double bound = joint.of(some, failedCount + 1).high() * high;
      if (bound <= small) {
        failsAtMost += bound;
      } else {
        open.add(new Beginning(++begun, path, id, function.low(id), low, high, bound));
        openSum += bound;
      }
      low *= works[piece];
      high *= worksAtMost[piece];
    }
  }

  private void close(Beginning path) {
    meter.at(begun);
    System.arraycopy(failed, 0, some, 0, failedCount);
    JointFailure.Ends all = joint.of(some, failedCount);
    double nearWork = 1;
    double one = 0;
    double sum = 0;
    for (int i = 0; i < failedCount; i++) {
      for (int near : pieces.neighbours(failed[i])) {
        if (workingAt[near] != present || seenAt[near] == present) {
          continue;
        }
        seenAt[near] = present;
        nearWork *= works[near];
        System.arraycopy(failed, 0, some, 0, failedCount);
        some[failedCount] = near;
        JointFailure.Ends more = joint.of(some, failedCount + 1);
        one = Math.max(one, more.low());
        sum += more.high();
      }
    }
    double rest = nearWork > 0 ? Math.min(1, path.low / nearWork) : 0;
    failsAtLeast += rest * Math.max(0, all.low() - sum);
    failsAtMost += Math.min(path.bound, Math.max(0, all.high() - one));
  }
}
