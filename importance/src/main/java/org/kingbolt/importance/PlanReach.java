package org.kingbolt.importance;

import java.util.Arrays;

/**
 * How likely the diagram's reading is to come by each node whose value matters after a step, at
 * least and at most, whatever is chosen for the variables read before it. These are the weights of
 * the values in the system's failing probability.
 */
final class PlanReach {

  private final double[][] least;
  private final double[][] most;
  private final double[] spare;

  PlanReach(PlanSteps steps, PlanRange[] ranges) {
    int count = steps.count();
    least = new double[count][];
    most = new double[count][];
    double[] low = {1};
    double[] high = {1};
    double works = 0;
    spare = new double[count];
    for (int at = count - 1; at >= 0; at--) {
      least[at] = low;
      most[at] = high;
      spare[at] = Arrays.stream(high).sum() + works - 1;
      PlanRange range = ranges[at];
      double[] nextLow = new double[steps.width(at - 1)];
      double[] nextHigh = new double[nextLow.length];
      for (int place = 0; place < low.length; place++) {
        int ifFailed = steps.low(at, place);
        int ifWorking = steps.high(at, place);
        if (ifFailed == ifWorking && ifFailed >= 0) {
          nextLow[ifFailed] += low[place];
          nextHigh[ifFailed] += high[place];
          continue;
        }
        if (ifFailed >= 0) {
          nextLow[ifFailed] += low[place] * range.leastFailing();
          nextHigh[ifFailed] += high[place] * range.mostFailing();
        }
        works += ifFailed == PlanSteps.WORKS ? high[place] * range.mostFailing() : 0;
        works += ifWorking == PlanSteps.WORKS ? high[place] * range.mostWorking() : 0;
        if (ifWorking >= 0) {
          nextLow[ifWorking] += low[place] * range.leastWorking();
          nextHigh[ifWorking] += high[place] * range.mostWorking();
        }
      }
      low = nextLow;
      high = nextHigh;
    }
  }

  double[] least(int step) {
    return least[step];
  }

  /**
   * By how much the weights together can at most be below the sum of the most that they can be, in
   * a plan of which it is known how likely the system fails: the reading comes by one of the nodes,
   * or has ended with the system working, or with the system failing.
   */
  double spare(int step, double fails) {
    return spare[step] + Math.min(1, fails);
  }

  double[] most(int step) {
    return most[step];
  }
}
