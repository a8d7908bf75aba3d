package org.kingbolt.importance;

/**
 * A lower bound on the failing probability of every plan from one vector of probabilities.
 *
 * <p>Let F be the system's failing probability as a function of its variables, a sum over the
 * failed states of products of both sides of variables. For any vectors a and b, the concavity of
 * the logarithm (Gibbs' inequality) gives
 *
 * <p>{@code log F(a) >= log F(b) + sum over i of (d_i log(q_i(a)/q_i(b)) + e_i
 * log(p_i(a)/p_i(b)))},
 *
 * <p>where d_i and e_i are the probabilities, given that the system has failed at b, that variable
 * i is read by the diagram and has failed, or works. Equal for a = b. The right side is a sum over
 * variables, so that the best choices for it within a budget follow by Lagrange multipliers. The
 * same holds above a step, where the values after the step take the place of the outcomes.
 */
final class PlanReference {

  private final PlanSteps steps;
  private final double logFails;

  /** By step, by place: the log of the failing probability there, and its share in failing. */
  private final double[][] logValue;

  private final double[][] share;

  /** By step: the shares of failing with the variable failed, and working. */
  private final double[] failedShare;

  private final double[] worksShare;
  private final double[] working;
  private final double[] failing;

  /** The vector's two sides are given by step. */
  PlanReference(PlanSteps steps, double[] working, double[] failing) {
    this.steps = steps;
    this.working = working;
    this.failing = failing;
    int count = steps.count();
    logValue = new double[count][];
    share = new double[count][];
    failedShare = new double[count];
    worksShare = new double[count];
    double[][] fails = new double[count][];
    double[] before = {};
    for (int at = 0; at < count; at++) {
      fails[at] = new double[steps.width(at)];
      steps.advance(at, working[at], failing[at], false, before, 0, fails[at], 0);
      before = fails[at];
    }
    double whole = fails[count - 1][0];
    logFails = Math.log(whole);
    double[] reach = {1};
    for (int at = count - 1; at >= 0; at--) {
      double[] below = at == 0 ? new double[0] : fails[at - 1];
      double[] next = new double[below.length];
      logValue[at] = new double[reach.length];
      share[at] = new double[reach.length];
      for (int place = 0; place < reach.length; place++) {
        logValue[at][place] = Math.log(fails[at][place]);
        share[at][place] = whole > 0 ? reach[place] * fails[at][place] / whole : 0;
        int low = steps.low(at, place);
        int high = steps.high(at, place);
        if (low == high && low >= 0) {
          next[low] += reach[place];
        } else {
          failedShare[at] += pass(reach[place] * failing[at], low, below, next);
          worksShare[at] += pass(reach[place] * working[at], high, below, next);
        }
      }
      failedShare[at] = whole > 0 ? failedShare[at] / whole : 0;
      worksShare[at] = whole > 0 ? worksShare[at] / whole : 0;
      reach = next;
    }
  }

  /** Hands on a probability; returns the part of it with which the system fails. */
  private static double pass(double reach, int place, double[] below, double[] next) {
    if (place == PlanSteps.FAILS) {
      return reach;
    }
    if (place == PlanSteps.WORKS) {
      return 0;
    }
    next[place] += reach;
    return reach * below[place];
  }

  /** Whether the bound says anything. */
  boolean isUseful() {
    return logFails > Double.NEGATIVE_INFINITY;
  }

  double logFails() {
    return logFails;
  }

  /** The summand of a step's variable. */
  double term(int at, double works, double fails) {
    return times(failedShare[at], fails, failing[at]) + times(worksShare[at], works, working[at]);
  }

  private static double times(double share, double value, double reference) {
    return share == 0 || value == reference ? 0 : share * Math.log(value / reference);
  }

  /** The bound's part that depends on the values after a step, given as logarithms. */
  double at(int step, double[] logs) {
    double sum = logFails;
    double[] shares = share[step];
    double[] values = logValue[step];
    for (int place = 0; place < shares.length; place++) {
      if (shares[place] > 0) {
        sum += shares[place] * (logs[place] - values[place]);
      }
    }
    return sum;
  }

  double working(int at) {
    return working[at];
  }

  double failing(int at) {
    return failing[at];
  }

  PlanSteps steps() {
    return steps;
  }
}
