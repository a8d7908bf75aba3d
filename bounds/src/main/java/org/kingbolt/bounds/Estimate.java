package org.kingbolt.bounds;

import java.util.Locale;
import java.util.Objects;
import org.kingbolt.core.Probability;

/**
 * The reliability as a simulation estimates it, with an interval at a stated confidence. This is a
 * statistical statement and never an {@link Interval}: of all simulations with other seeds a share
 * of at most one minus the confidence gives ends that miss the exact figure.
 *
 * <p>Holds for independent components. Immutable; safe to share between threads. Equal when the
 * figures, the confidence, the samples, the seed and the method are.
 *
 * <p>Example: {@code Bounds.of(grid).given(p).simulate(Simulation.toRelativeError(0.01)).value()}.
 */
public final class Estimate {

  private final Probability value;
  private final Probability lower;
  private final Probability upper;
  private final double confidence;
  private final long samples;
  private final Simulation simulation;
  private final String method;
  private final String reason;
  private final boolean reproducible;

  private Estimate(
      SimulationModel model,
      SimulationCrew.Tally tally,
      EstimateShare share,
      Simulation simulation,
      boolean reproducible) {
    double hit = tally.samples() == 0 ? 0 : (double) tally.hits() / tally.samples();
    double miss =
        tally.samples() == 0 ? 1 : (double) (tally.samples() - tally.hits()) / tally.samples();
    double[] least = sides(model, share.low(), share.highMiss());
    double[] most = sides(model, share.high(), share.lowMiss());
    double[] worse = model.failing() ? most : least;
    double[] better = model.failing() ? least : most;
    double[] middle = sides(model, hit, miss);
    this.value =
        middle[1] <= middle[0] ? Probability.failing(middle[1]) : Probability.working(middle[0]);
    this.lower = Rounding.down(worse[0], worse[1], model.operations());
    this.upper = Rounding.up(better[0], better[1], model.operations());
    this.confidence = simulation.confidence();
    this.samples = tally.samples();
    this.simulation = simulation;
    this.method = model.method();
    this.reason = model.reason();
    this.reproducible = reproducible;
  }

  /** From a count, with an interval that misses at most so often. */
  static Estimate of(
      SimulationModel model,
      SimulationCrew.Tally tally,
      double missed,
      Simulation simulation,
      boolean reproducible) {
    EstimateShare share = EstimateShare.of(tally.hits(), tally.samples(), missed);
    return new Estimate(model, tally, share, simulation, reproducible);
  }

  /** Of a side that is impossible, for which nothing need be drawn. */
  static Estimate ofNothing(SimulationModel model, Simulation simulation, boolean reproducible) {
    return new Estimate(
        model,
        SimulationCrew.Tally.NOTHING,
        new EstimateShare(0, 0, 1, 1),
        simulation,
        reproducible);
  }

  /** Working and failing, from the share of hits and its complement. */
  private static double[] sides(SimulationModel model, double hit, double miss) {
    double counted = Math.min(1, model.scale() * hit);
    double other = Math.max(0, Math.min(1, model.base() + model.scale() * miss));
    return model.failing() ? new double[] {other, counted} : new double[] {counted, other};
  }

  /**
   * Returns the estimate itself.
   *
   * @return both sides; its mean over all seeds is the exact figure as long as the number of
   *     samples was fixed beforehand
   */
  public Probability value() {
    return value;
  }

  /**
   * Returns the lower end of the confidence interval.
   *
   * @return less likely to work than the estimate
   */
  public Probability lower() {
    return lower;
  }

  /**
   * Returns the upper end of the confidence interval.
   *
   * @return more likely to work than the estimate
   */
  public Probability upper() {
    return upper;
  }

  /**
   * Returns the confidence.
   *
   * @return above 0 and below 1; the exact figure is between the ends for at least this share of
   *     all seeds
   */
  public double confidence() {
    return confidence;
  }

  /**
   * Returns how far the farther end is from the estimate, relative to the estimate.
   *
   * @return on the side, failing or working, on which the estimate is smaller; infinite when it is
   *     0 and an end is not
   */
  public double relativeError() {
    boolean failing = value.failing() <= value.working();
    double middle = failing ? value.failing() : value.working();
    double above = failing ? lower.failing() - middle : upper.working() - middle;
    double below = failing ? middle - upper.failing() : middle - lower.working();
    double most = Math.max(above, below);
    return most == 0 ? 0 : most / middle;
  }

  /**
   * Tells whether a probability lies between the ends, ends included.
   *
   * @param probability the value
   * @return whether it does, judged on its smaller side, which has more digits
   */
  public boolean contains(Probability probability) {
    Objects.requireNonNull(
        probability, "probability is null; give one, such as Probability.failing(1e-6)");
    return probability.failing() <= probability.working()
        ? probability.failing() <= lower.failing() && probability.failing() >= upper.failing()
        : probability.working() >= lower.working() && probability.working() <= upper.working();
  }

  /**
   * Returns how many states the estimate rests on.
   *
   * @return at least 0; those drawn beforehand to plan their number are not among them
   */
  public long samples() {
    return samples;
  }

  /**
   * Returns the seed.
   *
   * @return as it was given
   */
  public long seed() {
    return simulation.seed();
  }

  /**
   * Tells whether the same simulation gives the same bits again, on any machine and with any number
   * of threads.
   *
   * @return false when it was given a limit of time
   */
  public boolean isReproducible() {
    return reproducible;
  }

  /**
   * Returns the name of the method.
   *
   * @return such as {@code conditional Monte Carlo}
   */
  public String method() {
    return method;
  }

  /**
   * Says why the interval has its confidence.
   *
   * @return a sentence without a full stop
   */
  public String reason() {
    return reason;
  }

  @Override
  public boolean equals(Object other) {
    return other instanceof Estimate that
        && value.equals(that.value)
        && lower.equals(that.lower)
        && upper.equals(that.upper)
        && confidence == that.confidence
        && samples == that.samples
        && seed() == that.seed()
        && method.equals(that.method);
  }

  @Override
  public int hashCode() {
    return Objects.hash(value, lower, upper, samples, seed(), method);
  }

  /**
   * The estimate in four aligned lines.
   *
   * @return that it is statistical, the confidence, the method, samples and seed; then the estimate
   *     and both ends
   */
  @Override
  public String toString() {
    return String.format(
        Locale.ROOT,
        "statistical, %s confidence: %s, independent components, %d samples, seed %d%s%n"
            + "  estimate  %s%n  at least  %s%n  at most   %s",
        Simulation.percent(confidence),
        method,
        samples,
        seed(),
        reproducible ? "" : ", limited by time and so not reproducible",
        value,
        lower,
        upper);
  }
}
