package org.kingbolt.importance;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.Map;
import java.util.Objects;
import java.util.stream.DoubleStream;
import org.apache.commons.math3.distribution.RealDistribution;
import org.kingbolt.core.Budget;
import org.kingbolt.core.CoherentSystem;
import org.kingbolt.core.diagram.Evaluation;
import org.kingbolt.core.diagram.WorkMeter;

/** Importance over the whole of life, for given lifetimes of the components. */
final class LifetimeImportance {

  /** Of the whole: what lies before the first time and after the last. */
  private static final double TAIL = 1e-12;

  private static final double STRIDE = 8;

  /** The largest share that as much time again may have. */
  private static final double HEAVY = 0.01;

  /** How much of a lifetime may pass in one piece. */
  private static final double MOST_RISEN = 0.25;

  private static final double ANY = 1e300;
  private static final double ALLOWED = 1e-9;
  private static final double EARLIEST = 1e-280;
  private static final double LATEST = 1e280;

  private final CoherentSystem system;
  private final RealDistribution[] lifetimes;
  private final WorkMeter meter;

  LifetimeImportance(
      CoherentSystem system, Map<String, ? extends RealDistribution> lifetimes, Budget budget) {
    Objects.requireNonNull(
        lifetimes, "lifetimes are null; give a map from components to distributions");
    List<String> names = system.components();
    List<String> missing = names.stream().filter(name -> !lifetimes.containsKey(name)).toList();
    if (!missing.isEmpty()) {
      throw new IllegalArgumentException(
          "no lifetime for " + Names.listed(missing) + "; give a distribution for each component");
    }
    List<RealDistribution> inOrder = new ArrayList<>();
    for (String name : names) {
      RealDistribution lifetime = lifetimes.get(name);
      inOrder.add(
          Objects.requireNonNull(lifetime, () -> "lifetime of " + Names.quoted(name) + " is null"));
      double atOnce = lifetime.cumulativeProbability(0);
      if (!(atOnce == 0)) {
        throw new IllegalArgumentException(
            "component "
                + Names.quoted(name)
                + " has failed by time 0 with probability "
                + atOnce
                + "; a lifetime must be above 0");
      }
    }
    this.system = system;
    this.lifetimes = inOrder.toArray(new RealDistribution[0]);
    this.meter = budget.start("integrating over the lifetimes");
  }

  /** The integral of B_i(t) dF_i(t). */
  double[] barlowProschan() {
    double from = early();
    double to = late();
    LogQuadrature quadrature =
        new LogQuadrature(lifetimes.length, this::failures, this::offTheLoss);
    double[] values = integrate(quadrature, from, to, 1);
    double sum = DoubleStream.of(values).sum();
    if (!(Math.abs(sum - 1) <= ALLOWED)) {
      throw new IllegalArgumentException(
          "the importances add up to "
              + sum
              + " and not to 1; give lifetimes with a density that is the slope of their"
              + " cumulative probability, without jumps");
    }
    return values;
  }

  /** The integral of S_i (-ln S_i) B_i dt, over the sum of all. */
  double[] natvig() {
    double from = early();
    double to = late();
    LogQuadrature quadrature = new LogQuadrature(lifetimes.length, this::gains, this::unseen);
    // so large a whole that a piece is halved only where a lifetime might be stepped over
    double crude = DoubleStream.of(integrate(quadrature, from, to, ANY)).sum();
    if (!(crude > 0)) {
      throw new IllegalArgumentException(
          "no gains were found between times "
              + from
              + " and "
              + to
              + "; give lifetimes without jumps, in another unit of time");
    }
    double last = DoubleStream.of(quadrature.once(to, 2 * to)).sum();
    if (!(last <= HEAVY * crude)) {
      throw new IllegalArgumentException(
          "much of the expected gains lies where the system survives with less than 1e-12; give"
              + " lifetimes whose means are finite and do not hang on such times");
    }
    double[] values = integrate(quadrature, from, to, crude);
    double total = DoubleStream.of(values).sum();
    for (double at = to; last > TAIL * total && at < LATEST; at *= STRIDE) {
      double[] more = integrate(quadrature, at, at * STRIDE, total);
      Arrays.setAll(values, i -> values[i] + more[i]);
      last = DoubleStream.of(more).sum();
    }
    return Measures.parts(values);
  }

  private static double[] integrate(
      LogQuadrature quadrature, double from, double to, double scale) {
    double[] sum = new double[0];
    for (double at = from; at < to; at *= STRIDE) {
      double[] more = quadrature.integrate(at, Math.min(to, at * STRIDE), scale);
      double[] before = sum.length == 0 ? new double[more.length] : sum;
      Arrays.setAll(more, i -> before[i] + more[i]);
      sum = more;
    }
    return sum;
  }

  /** A time before which the system hardly fails. */
  private double early() {
    double time = median();
    while (time > EARLIEST && evaluation(time).fails() > TAIL) {
      time /= 2;
    }
    return time;
  }

  /** A time that the system hardly survives. */
  private double late() {
    double time = median();
    while (time < LATEST && evaluation(time).works() > TAIL) {
      time *= 2;
    }
    return time;
  }

  private double median() {
    return Arrays.stream(lifetimes)
        .mapToDouble(lifetime -> lifetime.inverseCumulativeProbability(0.5))
        .min()
        .orElse(1);
  }

  private Evaluation evaluation(double time) {
    meter.now(system.diagram().size());
    double[] failing = new double[lifetimes.length];
    double[] working = new double[lifetimes.length];
    for (int i = 0; i < failing.length; i++) {
      failing[i] = lifetimes[i].cumulativeProbability(time);
      working[i] = 1 - failing[i];
      if (!(failing[i] >= 0 && failing[i] <= 1)) {
        throw strange(i, "cumulative probability", failing[i], time);
      }
    }
    return Evaluation.of(system.diagram(), working, failing);
  }

  private void failures(double time, double[] out) {
    double[] derivatives = evaluation(time).derivatives();
    for (int i = 0; i < out.length; i++) {
      double density = lifetimes[i].density(time);
      if (!(density >= 0 && density < Double.POSITIVE_INFINITY)) {
        throw strange(i, "density", density, time);
      }
      out[i] = derivatives[i] * density;
    }
  }

  private void gains(double time, double[] out) {
    double[] derivatives = evaluation(time).derivatives();
    for (int i = 0; i < out.length; i++) {
      double failed = lifetimes[i].cumulativeProbability(time);
      out[i] = failed == 1 ? 0 : -(1 - failed) * Math.log1p(-failed) * derivatives[i];
    }
  }

  /** Too much where a lifetime may lie between the points at which a piece is looked at. */
  private double unseen(double from, double to, double[] integrals) {
    meter.now(system.diagram().size());
    for (RealDistribution lifetime : lifetimes) {
      double risen = lifetime.cumulativeProbability(to) - lifetime.cumulativeProbability(from);
      if (risen > MOST_RISEN) {
        return Double.POSITIVE_INFINITY;
      }
    }
    return 0;
  }

  /** Over any time, the failures that stop the system add up to its loss of reliability. */
  private double offTheLoss(double from, double to, double[] integrals) {
    Evaluation before = evaluation(from);
    Evaluation after = evaluation(to);
    double loss =
        after.fails() < before.works()
            ? after.fails() - before.fails()
            : before.works() - after.works();
    return Math.abs(DoubleStream.of(integrals).sum() - loss);
  }

  private IllegalArgumentException strange(int i, String what, double value, double time) {
    return new IllegalArgumentException(
        "component "
            + Names.quoted(system.components().get(i))
            + ": the "
            + what
            + " of its lifetime at time "
            + time
            + " is "
            + value
            + "; give a distribution for which it is a finite number");
  }
}
