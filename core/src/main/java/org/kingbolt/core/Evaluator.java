package org.kingbolt.core;

import java.util.List;
import java.util.Objects;
import org.jspecify.annotations.Nullable;
import org.kingbolt.core.diagram.BatchScan;
import org.kingbolt.core.diagram.Scan;
import org.kingbolt.core.diagram.WorkMeter;

/**
 * Evaluates one system again and again: for the back end of a service, a sweep, an optimizer.
 *
 * <p>Probabilities come in arrays, in the order of {@link CoherentSystem#components()}: those of
 * working and, so that small ones keep their digits, those of failing. Both sides of the answer are
 * computed, neither as one minus the other; {@link #working()} and {@link #failing()} have the same
 * bits as {@link CoherentSystem#reliability(Probabilities)}.
 *
 * <p>An evaluator owns its scratch, so that calls with arrays, other than batches, make no objects
 * once each method has been used; therefore <b>one evaluator is for one thread</b>. Making another
 * is cheap, about as dear as evaluating once or twice, and the system itself is shared by all of
 * them. Arrays passed in are read before the method returns, and not kept.
 *
 * <p>Where the two sides of components do not add up to exactly 1, those of the system need not
 * either: they may be off by as much as all the components together.
 *
 * <pre>{@code
 * Evaluator evaluator = system.evaluator();
 * evaluator.evaluate(working, failing);
 * double today = evaluator.failing();
 * double withBetterPump = evaluator.failingWith(3, 0.999, 0.001);
 * }</pre>
 */
public final class Evaluator {

  /** Stands for the number of a vector where there is but one. */
  private static final int SINGLE = -1;

  private final CoherentSystem system;
  private final List<String> components;
  private final Scan scan;

  /** The values of the latest calls that did not come as two arrays. */
  private final double[] ownWorking;

  private final double[] ownFailing;
  private boolean evaluated;
  private @Nullable BatchScan batches;

  Evaluator(CoherentSystem system) {
    this.system = system;
    this.components = system.components();
    this.scan = new Scan(system.diagram(), components.size());
    this.ownWorking = new double[components.size()];
    this.ownFailing = new double[components.size()];
  }

  /**
   * Returns the system.
   *
   * @return whose components give the order of all arrays
   */
  public CoherentSystem system() {
    return system;
  }

  /**
   * Evaluates the system. Cost: one scan, at about a nanosecond a node. A call that throws leaves
   * the earlier evaluation as it was.
   *
   * @param working by component: the probability of working, from 0 to 1
   * @param failing by component: the probability of having failed, from 0 to 1
   * @throws IllegalArgumentException if an array has not one value for each component, a number is
   *     NaN or outside [0, 1], or the two sides of a component do not add up to 1 within 1e-12; the
   *     message names the component
   */
  public void evaluate(double[] working, double[] failing) {
    check(working, failing, SINGLE);
    scan.up(working, failing);
    evaluated = true;
  }

  /**
   * Evaluates the system; every component's probability of having failed is {@code 1 - working}.
   *
   * @param working by component: the probability of working, from 0 to 1
   * @throws IllegalArgumentException if the array has not one value for each component, or a number
   *     is NaN or outside [0, 1]; the message names the component
   */
  public void evaluate(double[] working) {
    checkLength(working, "working", SINGLE);
    for (int i = 0; i < working.length; i++) {
      double p = working[i];
      if (!(p >= 0 && p <= 1)) {
        throw refused(i, p, 1 - p, SINGLE);
      }
      ownFailing[i] = 1 - p;
    }
    scan.up(working, ownFailing);
    evaluated = true;
  }

  /**
   * Evaluates the system. Here names are looked up, which may take longer than the scan.
   *
   * @param p the components' probabilities
   * @throws IllegalArgumentException if components have no probability; the message lists them
   */
  public void evaluate(Probabilities p) {
    Objects.requireNonNull(p, "probabilities is null").fill(components, ownWorking, ownFailing);
    scan.up(ownWorking, ownFailing);
    evaluated = true;
  }

  /**
   * The probability that the system works, as last evaluated.
   *
   * @return from 0 to 1
   * @throws IllegalStateException if nothing has been evaluated
   */
  public double working() {
    return Math.min(1, ready().works());
  }

  /**
   * The probability that the system has failed, as last evaluated.
   *
   * @return from 0 to 1
   * @throws IllegalStateException if nothing has been evaluated
   */
  public double failing() {
    return Math.min(1, ready().fails());
  }

  /**
   * All partial derivatives of the probability of working, at the probabilities last evaluated:
   * each the probability that the component decides (Birnbaum 1969).
   *
   * <p>These are plain differences on the side of the system that is less likely. Each is off by at
   * most about {@code 8 levels 2^-53} times the sum of itself and the smaller of {@link #working()}
   * and {@link #failing()}; a derivative far smaller than that has no certain digits. Where every
   * digit counts, use {@code Importance.birnbaum} or {@link
   * org.kingbolt.core.diagram.Evaluation#derivatives()}. Cost: one scan downwards.
   *
   * @param out overwritten, by component: from 0 to 1, 0 for components that never matter
   * @throws IllegalArgumentException if the array has not one place for each component
   * @throws IllegalStateException if nothing has been evaluated
   */
  public void derivatives(double[] out) {
    checkLength(out, "out", SINGLE);
    ready().derivatives(out);
  }

  /**
   * The probability that the system works if only one component's probabilities were others than
   * those last evaluated, which stay as they are.
   *
   * <p>Computed from the probability given that the component works and given that it has failed,
   * each a sum of non-negative terms: no digits are lost, on either side, and the result agrees
   * with that of {@link #evaluate(double[], double[])} at the changed probabilities but for
   * rounding, a few units in the last place for every level of the diagram. Where the same bits are
   * wanted, evaluate. Cost: the first call after an evaluation makes a scan downwards for all
   * components; each call after it takes two multiplications.
   *
   * @param component its index in {@link CoherentSystem#components()}
   * @param working its probability of working instead
   * @param failing its probability of having failed instead
   * @return from 0 to 1; for a component that never matters, {@link #working()}
   * @throws IllegalArgumentException if a number is NaN or outside [0, 1], or if the two do not add
   *     up to 1 within 1e-12
   * @throws IndexOutOfBoundsException if there is no such component
   * @throws IllegalStateException if nothing has been evaluated
   */
  public double workingWith(int component, double working, double failing) {
    checkChange(component, working, failing);
    return Math.min(1, ready().worksWith(component, working, failing));
  }

  /**
   * The probability that the system has failed if only one component's probabilities were others
   * than those last evaluated; see {@link #workingWith}.
   *
   * @param component its index in {@link CoherentSystem#components()}
   * @param working its probability of working instead
   * @param failing its probability of having failed instead
   * @return from 0 to 1; for a component that never matters, {@link #failing()}
   * @throws IllegalArgumentException if a number is NaN or outside [0, 1], or if the two do not add
   *     up to 1 within 1e-12
   * @throws IndexOutOfBoundsException if there is no such component
   * @throws IllegalStateException if nothing has been evaluated
   */
  public double failingWith(int component, double working, double failing) {
    checkChange(component, working, failing);
    return Math.min(1, ready().failsWith(component, working, failing));
  }

  /**
   * Evaluates the system for many vectors within {@link Budget#ofHeap()}; see {@link
   * #evaluateBatch(double[][], double[][], int, Budget)}.
   *
   * @param working by vector, by component: the probability of working, from 0 to 1
   * @param failing by vector, by component: the probability of having failed, from 0 to 1
   * @param threads how many threads to work on, this one among them; at least 1
   * @return both sides for every vector
   * @throws IllegalArgumentException as there
   * @throws BudgetExceededException if the scratch is too large or the thread is interrupted
   */
  public BatchResult evaluateBatch(double[][] working, double[][] failing, int threads) {
    return evaluateBatch(working, failing, threads, Budget.ofHeap());
  }

  /**
   * Evaluates the system for many vectors. Takes runs of them through the diagram together, several
   * times as fast as one by one; every result has the bits that {@link #evaluate(double[],
   * double[])} gives, whatever the number of vectors and threads. Leaves the last single evaluation
   * as it was.
   *
   * <p>Helper threads are started for the call and have ended when it returns. The first call makes
   * the scratch, at most 16 MiB or 16 bytes a node for each thread, and keeps it.
   *
   * @param working by vector, by component: the probability of working, from 0 to 1
   * @param failing by vector, by component: the probability of having failed, from 0 to 1
   * @param threads how many threads to work on, this one among them; at least 1
   * @param budget the nodes count the scratch; time and interrupts are looked at every few
   *     milliseconds
   * @return both sides for every vector
   * @throws IllegalArgumentException if there are not as many vectors of either kind, if threads is
   *     less than 1, or if a vector breaks a rule of {@link #evaluate(double[], double[])}; the
   *     message names the vector and the component
   * @throws BudgetExceededException if the budget is used up
   */
  public BatchResult evaluateBatch(
      double[][] working, double[][] failing, int threads, Budget budget) {
    Objects.requireNonNull(working, "working is null");
    Objects.requireNonNull(failing, "failing is null");
    Objects.requireNonNull(budget, "budget is null");
    if (working.length != failing.length) {
      throw new IllegalArgumentException(
          "working has "
              + working.length
              + " vectors and failing has "
              + failing.length
              + "; give one of each kind for every evaluation");
    }
    if (threads < 1) {
      throw new IllegalArgumentException(
          threads + " threads; at least 1 is needed, and one for each processor is usual");
    }
    for (int i = 0; i < working.length; i++) {
      check(working[i], failing[i], i);
    }
    if (batches == null) {
      batches = new BatchScan(system.diagram());
    }
    WorkMeter meter = budget.start("evaluating a batch of vectors");
    return BatchResult.of(batches, working, failing, threads, meter);
  }

  private Scan ready() {
    if (!evaluated) {
      throw new IllegalStateException("nothing has been evaluated; call evaluate first");
    }
    return scan;
  }

  private void check(double[] working, double[] failing, int vector) {
    checkLength(working, "working", vector);
    checkLength(failing, "failing", vector);
    for (int i = 0; i < working.length; i++) {
      double p = working[i];
      double q = failing[i];
      if (!(p >= 0 && p <= 1 && q >= 0 && q <= 1 && Probability.addUp(p, q))) {
        throw refused(i, p, q, vector);
      }
    }
  }

  private void checkChange(int component, double working, double failing) {
    Objects.checkIndex(component, components.size());
    if (!(working >= 0 && working <= 1 && failing >= 0 && failing <= 1)
        || !Probability.addUp(working, failing)) {
      throw refused(component, working, failing, SINGLE);
    }
  }

  private void checkLength(double[] values, String what, int vector) {
    if (values == null) {
      throw new NullPointerException(place(vector) + what + " is null");
    }
    if (values.length != components.size()) {
      throw new IllegalArgumentException(
          place(vector)
              + what
              + " has length "
              + values.length
              + " and the system has "
              + components.size()
              + " components; give one value for each, in the order of system.components()");
    }
  }

  /** The complaint that a {@link Probability} would make. */
  private IllegalArgumentException refused(int component, double p, double q, int vector) {
    try {
      Probability.of(p, q);
    } catch (IllegalArgumentException bad) {
      return new IllegalArgumentException(
          place(vector)
              + "component "
              + Check.quoted(components.get(component))
              + ": "
              + bad.getMessage(),
          bad);
    }
    throw new AssertionError("refused without a reason");
  }

  private static String place(int vector) {
    return vector == SINGLE ? "" : "vector " + vector + ": ";
  }
}
