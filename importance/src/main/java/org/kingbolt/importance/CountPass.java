package org.kingbolt.importance;

import java.util.Arrays;
import org.kingbolt.core.CoherentSystem;
import org.kingbolt.core.diagram.Diagram;
import org.kingbolt.core.diagram.WorkMeter;

/**
 * For every node, the probability of working given that so many of a group's members at or below it
 * work, any ones of that number being equally likely. Every step is a mean of two numbers, so that
 * nothing cancels and nothing grows.
 */
final class CountPass {

  private final Diagram diagram;
  private final double[] working;
  private final double[] failing;
  private final boolean[] member;
  private final WorkMeter meter;

  /** In bytes. */
  private long held;

  private CountPass(CoherentSystem system, Gains given, int[] members, WorkMeter meter) {
    this.diagram = system.diagram();
    this.working = given.working();
    this.failing = given.failing();
    this.member = new boolean[working.length];
    this.meter = meter;
    for (int i : members) {
      member[i] = true;
    }
  }

  static ReliabilityCurve curve(
      CoherentSystem system, Gains given, int[] members, WorkMeter meter) {
    CountPass pass = new CountPass(system, given, members, meter);
    return new ReliabilityCurve(
        Arrays.stream(members).sorted().mapToObj(system.components()::get).toList(),
        pass.side(Diagram.WORKS, members.length),
        pass.side(Diagram.FAILS, members.length));
  }

  /** By number of working members: the probability of one outcome. */
  private double[] side(int outcome, int degree) {
    double[][] values = new double[diagram.size()][];
    values[Diagram.FAILS] = new double[] {outcome == Diagram.FAILS ? 1 : 0};
    values[Diagram.WORKS] = new double[] {outcome == Diagram.WORKS ? 1 : 0};
    held = 0;
    int below = 0;
    for (int level = diagram.levels() - 1; level >= 0; level--) {
      int variable = diagram.variableAt(level);
      for (int id = diagram.from(level); id < diagram.to(level); id++) {
        double[] high = raised(values, diagram.high(id), below);
        double[] low = raised(values, diagram.low(id), below);
        values[id] = member[variable] ? split(high, low) : mean(high, low, variable);
        hold(WorkMeter.BYTES_PER_NODE + (long) values[id].length * Double.BYTES);
      }
      below += member[variable] ? 1 : 0;
    }
    return raised(values, diagram.root(), degree);
  }

  private void hold(long more) {
    held += more;
    meter.at(held / WorkMeter.BYTES_PER_NODE);
  }

  private double[] mean(double[] high, double[] low, int variable) {
    double[] mean = new double[high.length];
    for (int k = 0; k < mean.length; k++) {
      mean[k] = working[variable] * high[k] + failing[variable] * low[k];
    }
    return mean;
  }

  /** Over one more member: it is among the k that work with probability k / n. */
  private static double[] split(double[] high, double[] low) {
    int n = high.length;
    double[] values = new double[n + 1];
    for (int k = 0; k <= n; k++) {
      double working = k == 0 ? 0 : high[k - 1] * k;
      double failed = k == n ? 0 : low[k] * (n - k);
      values[k] = (working + failed) / n;
    }
    return values;
  }

  /**
   * Over more members that make no difference. Those above ask for as many or more, so what has
   * been raised is kept, and is not raised again from its beginning for each of them.
   */
  private double[] raised(double[][] values, int id, int degree) {
    while (values[id].length <= degree) {
      values[id] = split(values[id], values[id]);
      hold(Double.BYTES);
    }
    return values[id];
  }
}
