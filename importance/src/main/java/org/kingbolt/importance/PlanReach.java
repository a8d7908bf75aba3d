package org.kingbolt.importance;

/**
 * How likely the diagram's reading is to come by each node whose value matters after a step, at
 * least and at most, whatever is chosen for the variables read before it. These are the weights of
 * the values in the system's failing probability.
 */
final class PlanReach {

  private final double[][] least;
  private final double[][] most;

  PlanReach(PlanModel model, PlanSteps steps) {
    int count = steps.count();
    least = new double[count][];
    most = new double[count][];
    double[] low = {1};
    double[] high = {1};
    for (int at = count - 1; at >= 0; at--) {
      least[at] = low;
      most[at] = high;
      PlanRange range = PlanRange.of(model, steps.variable(at));
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

  double[] most(int step) {
    return most[step];
  }
}
