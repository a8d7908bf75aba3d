package org.kingbolt.importance;

import com.google.common.base.Suppliers;
import java.util.List;
import java.util.function.Supplier;
import org.kingbolt.core.CoherentSystem;
import org.kingbolt.core.Probabilities;
import org.kingbolt.core.Probability;
import org.kingbolt.core.diagram.Scan;

/**
 * What one pass up and down the diagram tells about every component: both sides of the system, all
 * partial derivatives, and, when it is asked for, the failing side given that a component works,
 * for which a sum would have to be taken apart otherwise.
 *
 * <p>Immutable; safe to share between threads.
 */
final class FirstOrder {

  /** A difference of at least this share of its terms is good enough. */
  private static final double SHARE = 0.125;

  private final List<String> components;
  private final double[] working;
  private final double[] failing;
  private final double works;
  private final double fails;
  private final double[] derivatives;
  private final Supplier<double[]> failsGivenWorking;

  private FirstOrder(CoherentSystem system, double[] working, double[] failing) {
    this.components = system.components();
    this.working = working;
    this.failing = failing;
    Gradient gradient = Gradient.of(system.diagram(), working, failing);
    this.works = gradient.works();
    this.fails = gradient.fails();
    this.derivatives = gradient.refined();
    this.failsGivenWorking = Suppliers.memoize(() -> failsGivenWorking(system, working, failing));
  }

  static FirstOrder of(CoherentSystem system, Probabilities p) {
    List<Probability> values = p.forComponents(system.components());
    return new FirstOrder(
        system,
        values.stream().mapToDouble(Probability::working).toArray(),
        values.stream().mapToDouble(Probability::failing).toArray());
  }

  private static double[] failsGivenWorking(
      CoherentSystem system, double[] working, double[] failing) {
    Scan scan = new Scan(system.diagram(), working.length);
    scan.up(working, failing);
    double[] given = new double[working.length];
    for (int i = 0; i < given.length; i++) {
      given[i] = Math.min(1, scan.failsWith(i, 1, 0));
    }
    return given;
  }

  List<String> components() {
    return components;
  }

  int size() {
    return working.length;
  }

  /** The component's probability of working. */
  double working(int i) {
    return working[i];
  }

  double failing(int i) {
    return failing[i];
  }

  double[] workings() {
    return working.clone();
  }

  double[] failings() {
    return failing.clone();
  }

  /** The system's probability of working. */
  double works() {
    return works;
  }

  double fails() {
    return fails;
  }

  double derivative(int i) {
    return derivatives[i];
  }

  double[] derivatives() {
    return derivatives.clone();
  }

  /** F(1_i) = F - q_i B_i, where that keeps its digits, and elsewhere by another pass. */
  double failsGivenWorking(int i) {
    double left = fails - failing[i] * derivatives[i];
    return left >= SHARE * fails ? left : failsGivenWorking.get()[i];
  }

  /** F(0_i) = F + p_i B_i. */
  double failsGivenFailed(int i) {
    return Math.min(1, fails + working[i] * derivatives[i]);
  }

  /** r(1_i) = r + q_i B_i. */
  double worksGivenWorking(int i) {
    return Math.min(1, works + failing[i] * derivatives[i]);
  }
}
