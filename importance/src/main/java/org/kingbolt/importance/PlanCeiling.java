package org.kingbolt.importance;

/** What is left of failing when everything that is not decided is at its best, costs aside. */
final class PlanCeiling {

  private final double[][] reach;
  private final double[] lost;
  private final double root;

  PlanCeiling(PlanSteps steps, PlanAlternative[][] menus) {
    int count = steps.count();
    reach = new double[count][];
    lost = new double[count];
    double[] now = {1};
    double gone = 0;
    double[] before = {};
    for (int at = 0; at < count; at++) {
      PlanAlternative best = best(menus[at]);
      double[] next = new double[steps.width(at)];
      steps.advance(at, best.working(), best.failing(), false, before, 0, next, 0);
      before = next;
    }
    root = Math.log(before[0]);
    for (int at = count - 1; at >= 0; at--) {
      reach[at] = now;
      lost[at] = gone;
      PlanAlternative best = best(menus[at]);
      double[] next = new double[steps.width(at - 1)];
      for (int place = 0; place < now.length; place++) {
        int low = steps.low(at, place);
        int high = steps.high(at, place);
        if (low == high && low >= 0) {
          next[low] += now[place];
        } else {
          gone += pass(now[place] * best.failing(), low, next);
          gone += pass(now[place] * best.working(), high, next);
        }
      }
      now = next;
    }
  }

  private static double pass(double probability, int place, double[] next) {
    if (place >= 0) {
      next[place] += probability;
      return 0;
    }
    return place == PlanSteps.FAILS ? probability : 0;
  }

  private static PlanAlternative best(PlanAlternative[] menu) {
    PlanAlternative best = menu[0];
    for (PlanAlternative other : menu) {
      if (PlanLabels.rank(other.working(), other.failing())
          < PlanLabels.rank(best.working(), best.failing())) {
        best = other;
      }
    }
    return best;
  }

  double logRoot() {
    return root;
  }

  double log(int step, PlanLabels labels, int label) {
    double sum = lost[step];
    double[] weights = reach[step];
    for (int place = 0; place < weights.length; place++) {
      sum += weights[place] * labels.fails[label * labels.width + place];
    }
    return Math.log(sum);
  }
}
