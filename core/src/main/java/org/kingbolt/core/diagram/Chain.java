package org.kingbolt.core.diagram;

/**
 * Bounds on the probability that all of several pieces work, which may share variables anywhere.
 *
 * <p>The pieces have an order. Let A<sub>j</sub> be the failure of piece j, W<sub>j</sub> its
 * complement. Then the probability of working is the product of P(W<sub>j</sub> | W<sub>k</sub> for
 * all k &lt; j), and each factor is bounded as follows. Of the pieces before j, let D be those that
 * share a variable with j, I the rest, S the variables that j shares with D; W<sub>D</sub> means
 * that all of D work. The variables in S are in none of I, and given their state s, piece j is
 * independent of all pieces before it. Hence
 *
 * <pre>
 *   P(A_j | W_I W_D) = sum over s of P(s) P(A_j | s) P(W_D | s, W_I) / P(W_D | W_I).
 * </pre>
 *
 * <p>Working is an increasing event of independent variables, with or without some of them held, so
 * that by Harris's inequality (association: Esary, Proschan &amp; Walkup, Ann. Math. Statist. 38
 * (1967) 1466; all sources from memory) P(W_D | s, W_I) is at least the product over d in D of
 * P(W<sub>d</sub> | s). In the other direction, put D in order. Given s, let N be those pieces of I
 * and of D before d that share with d a variable outside S, and M the other ones. Then, given s,
 *
 * <pre>
 *   P(A_d | W_N W_M) &gt;= P(A_d W_N | W_M) &gt;= P(A_d | W_M) - sum over k in N of P(A_d A_k | W_M)
 *                    &gt;= P(A_d) - sum over k in N of P(A_d A_k),
 * </pre>
 *
 * <p>where the first probability is even P(A_d W_N | W_M) / P(W_N | W_M), as A<sub>d</sub> is
 * independent of W<sub>M</sub>, and A<sub>d</sub> A<sub>k</sub> is a decreasing event. (The step is
 * the one in Boppana and Spencer's proof of Janson's inequality, for general monotone events as in
 * Riordan &amp; Warnke, Random Struct. Algorithms 46 (2015) 391.) So P(W_D | s, W_I) is at most the
 * product over d of min(1, P(W_d) + sum of P(A_d A_k)), given s. By the same argument, P(W_N | W_M)
 * is at most the product over k in N of min(1, P(W_k) + sum of P(A_k A_l)), over all l that share
 * something with k; this divides the lower bound of P(A_d | W_N W_M), and as it is increasing in s,
 * it is taken where all of S work. Both bounds also hold without s. Moreover P(A_j | W_I W_D) is at
 * most P(A_j).
 *
 * <p>The sum over s is cut off, best first: a part of it in which only some variables of S are held
 * has both factors at its ends, as P(W_D | s, W_I) is increasing in s.
 *
 * <p>What is lost is of the second order in the joint failures of neighbours, whatever the sum of
 * the failing probabilities. No difference of near numbers is taken; the results are as right as
 * rounding allows, which is not directed.
 */
final class Chain {

  /** Where 1 - x is taken, x may have a relative error of so much. */
  private static final double ROUNDING = 1e-13;

  private Chain() {}

  /**
   * Bounds the probability that all pieces work.
   *
   * @param allowance how many nodes may be evaluated, about
   */
  static Bracket of(Ensemble pieces, long allowance) {
    long end = pieces.work() + allowance;
    double worksAtLeast = 1;
    double worksAtMost = 1;
    // 1 minus products, by sums
    double failsAtMost = 0;
    double failsAtLeast = 0;
    double restAtLeast = 1;
    double restAtMost = 1;
    for (int piece = 0; piece < pieces.size(); piece++) {
      double works = pieces.at(piece).works();
      long share = Math.max(0, end - pieces.work()) / (pieces.size() - piece);
      Turn turn = new Turn(pieces, piece, share);
      failsAtMost += restAtLeast * turn.failsAtMost;
      restAtLeast *= Math.max(works, 1 - turn.failsAtMost);
      failsAtLeast += restAtMost * turn.failsAtLeast;
      restAtMost *= 1 - turn.failsAtLeast;
      worksAtLeast *= Math.max(works, 1 - turn.failsAtMost * (1 + ROUNDING));
      worksAtMost *= Math.min(turn.worksAtMost, 1 - turn.failsAtLeast * (1 - ROUNDING));
    }
    return new Bracket(worksAtLeast, failsAtMost, worksAtMost, failsAtLeast);
  }
}
