package org.kingbolt.bounds;

import java.math.BigDecimal;
import java.math.MathContext;
import java.time.Duration;
import java.util.ArrayList;
import java.util.Collections;
import java.util.LinkedHashSet;
import java.util.List;
import java.util.Locale;
import java.util.Objects;
import java.util.Set;
import org.kingbolt.core.Budget;

/**
 * How to simulate: when to stop, at what confidence, with what seed and method, on how many
 * threads.
 *
 * <p>Without more being said: 95 % confidence, seed 0, {@link Method#BEST}, one thread for each
 * processor. The same simulation gives the same bits with any number of threads, unless it is given
 * a limit of time.
 *
 * <p>Immutable; safe to share between threads.
 *
 * <p>Example: {@code Simulation.toRelativeError(0.01).withConfidence(0.99).withSeed(7)}.
 */
public final class Simulation {

  /** How states are drawn. */
  public enum Method {
    /**
     * {@link #CONDITIONAL} where a simpler system can be compiled within the budget, and {@link
     * #CRUDE} elsewhere.
     */
    BEST,
    /** States of independent components, as they come; no use for rare events. */
    CRUDE,
    /**
     * States in which a simpler system fails that fails whenever the system does and whose
     * probability is worked out exactly: of a wide network, an excerpt or the likeliest states of
     * its sweep. For systems that hardly ever work, a simpler one that works whenever they do. The
     * relative error stays bounded as the components become perfect, as long as the simpler system
     * fails about as often.
     */
    CONDITIONAL,
    /**
     * The coverage estimator over the minimal cut sets, or over the path sets of a system that
     * hardly ever works: Karp &amp; Luby, Monte-Carlo algorithms for enumeration and reliability
     * problems, 24th FOCS (1983) 56; Karp, Luby &amp; Madras, J. Algorithms 10 (1989) 429 (both
     * from memory). Needs all sets: from the compiled system, or given by {@link #withCutSets}.
     */
    COVERAGE
  }

  private static final long UNLIMITED = 1L << 40;
  private static final long MOST_FOR_ERROR = 100_000_000;
  private static final long USUAL_NODES = 1 << 18;
  private static final Duration LONGEST = Duration.ofDays(36500);

  private static final long NO_TIME = -1;

  /** 0 where no relative error is asked for. */
  private final double error;

  private final long samples;
  private final long nanos;
  private final double confidence;
  private final long seed;
  private final int threads;
  private final Method method;
  private final Budget budget;
  private final List<Set<String>> cutSets;

  /** The settings while they are being changed, by one method. */
  private static final class Draft {
    private double error;
    private long samples = UNLIMITED;
    private long nanos = NO_TIME;
    private double confidence = 0.95;
    private long seed;
    private int threads = Runtime.getRuntime().availableProcessors();
    private Method method = Method.BEST;
    private Budget budget = Budget.ofNodes(USUAL_NODES);
    private List<Set<String>> cutSets = List.of();
  }

  private Simulation(Draft draft) {
    error = draft.error;
    samples = draft.samples;
    nanos = draft.nanos;
    confidence = draft.confidence;
    seed = draft.seed;
    threads = draft.threads;
    method = draft.method;
    budget = draft.budget;
    cutSets = draft.cutSets;
  }

  private Draft draft() {
    Draft draft = new Draft();
    draft.error = error;
    draft.samples = samples;
    draft.nanos = nanos;
    draft.confidence = confidence;
    draft.seed = seed;
    draft.threads = threads;
    draft.method = method;
    draft.budget = budget;
    draft.cutSets = cutSets;
    return draft;
  }

  /**
   * Stops when the ends of the interval are near the estimate, and after 100 million samples at the
   * latest.
   *
   * @param error the {@link Estimate#relativeError()} wanted, above 0 and below 1
   * @return the simulation
   * @throws IllegalArgumentException if the error is out of range
   */
  public static Simulation toRelativeError(double error) {
    return new Simulation(new Draft()).withRelativeError(error).withSamples(MOST_FOR_ERROR);
  }

  /**
   * Stops after a number of samples.
   *
   * @param samples at least 1
   * @return the simulation
   * @throws IllegalArgumentException if there are none
   */
  public static Simulation ofSamples(long samples) {
    return new Simulation(new Draft()).withSamples(samples);
  }

  /**
   * Stops when a time is over; see {@link #withTime}.
   *
   * @param time longer than zero
   * @return the simulation
   * @throws IllegalArgumentException if the time is zero or negative
   */
  public static Simulation ofTime(Duration time) {
    return new Simulation(new Draft()).withTime(time);
  }

  /**
   * Stops also when the ends of the interval are near the estimate.
   *
   * @param error the {@link Estimate#relativeError()} wanted, above 0 and below 1
   * @return a simulation that differs in this only
   * @throws IllegalArgumentException if the error is out of range
   */
  public Simulation withRelativeError(double error) {
    Draft changed = draft();
    changed.error = checkedError(error);
    return new Simulation(changed);
  }

  /**
   * Stops also after a number of samples.
   *
   * @param samples at least 1
   * @return a simulation that differs in this only
   * @throws IllegalArgumentException if there are none
   */
  public Simulation withSamples(long samples) {
    Draft changed = draft();
    changed.samples = checkedSamples(samples);
    return new Simulation(changed);
  }

  /**
   * Stops also when a time is over, half of which the preparation may take. How many samples are
   * drawn then depends on the machine, so that the estimate is not reproducible, and says so. At
   * least one batch is drawn.
   *
   * @param time longer than zero
   * @return a simulation that differs in this only
   * @throws IllegalArgumentException if the time is zero or negative
   */
  public Simulation withTime(Duration time) {
    Draft changed = draft();
    changed.nanos = checkedNanos(time);
    return new Simulation(changed);
  }

  /**
   * Sets the confidence of the interval.
   *
   * @param confidence above 0 and below 1
   * @return a simulation that differs in this only
   * @throws IllegalArgumentException if it is out of range, or nearer to 1 than 1e-12
   */
  public Simulation withConfidence(double confidence) {
    if (!(confidence > 0 && 1 - confidence >= 1e-12)) {
      throw new IllegalArgumentException(
          "confidence "
              + confidence
              + "; give a number above 0 and below 1, such as 0.95 for 95 percent");
    }
    Draft changed = draft();
    changed.confidence = confidence;
    return new Simulation(changed);
  }

  /**
   * Sets the seed.
   *
   * @param seed any number; simulations with different ones are independent of each other
   * @return a simulation that differs in this only
   */
  public Simulation withSeed(long seed) {
    Draft changed = draft();
    changed.seed = seed;
    return new Simulation(changed);
  }

  /**
   * Sets the number of threads, which changes nothing but the time.
   *
   * @param threads at least 1, the calling one among them
   * @return a simulation that differs in this only
   * @throws IllegalArgumentException if there are none
   */
  public Simulation withThreads(int threads) {
    if (threads < 1) {
      throw new IllegalArgumentException(
          threads + " threads; at least 1 is needed, and one for each processor is usual");
    }
    Draft changed = draft();
    changed.threads = threads;
    return new Simulation(changed);
  }

  /**
   * Sets the method.
   *
   * @param method how states are drawn
   * @return a simulation that differs in this only
   */
  public Simulation withMethod(Method method) {
    Draft changed = draft();
    changed.method =
        Objects.requireNonNull(method, "method is null; give one, such as Method.BEST");
    return new Simulation(changed);
  }

  /**
   * Sets what may be spent before the first sample: on the diagram of the simpler system, or on the
   * minimal sets. A larger diagram makes fewer samples necessary.
   *
   * @param budget for the preparation alone; 2^18 nodes otherwise
   * @return a simulation that differs in this only
   */
  public Simulation withBudget(Budget budget) {
    Draft changed = draft();
    changed.budget =
        Objects.requireNonNull(budget, "budget is null; give one, such as Budget.ofHeap()");
    return new Simulation(changed);
  }

  /**
   * Uses {@link Method#COVERAGE} over cut sets at hand, for a system that cannot be compiled.
   *
   * @param all all minimal cut sets, or a family that has all of them in it; where some are left
   *     out, what is estimated is the probability that one of those given fails, which is less.
   *     Each one is checked to be a cut set when the simulation begins
   * @return a simulation that differs in this only
   * @throws IllegalArgumentException if there are none
   */
  public Simulation withCutSets(Iterable<? extends Set<String>> all) {
    List<Set<String>> sets = new ArrayList<>();
    for (Set<String> set : Objects.requireNonNull(all, "the cut sets are null; give all of them")) {
      String what = "cut set " + (sets.size() + 1);
      Objects.requireNonNull(set, () -> what + " is null; list its members");
      sets.add(Collections.unmodifiableSet(new LinkedHashSet<>(set)));
    }
    if (sets.isEmpty()) {
      throw new IllegalArgumentException("there are no cut sets; give all minimal ones");
    }
    Draft changed = draft();
    changed.method = Method.COVERAGE;
    changed.cutSets = List.copyOf(sets);
    return new Simulation(changed);
  }

  private static double checkedError(double error) {
    if (!(error > 0 && error < 1)) {
      throw new IllegalArgumentException(
          "relative error " + error + "; give a number above 0 and below 1, such as 0.01");
    }
    return error;
  }

  private static long checkedSamples(long samples) {
    if (samples < 1) {
      throw new IllegalArgumentException(
          samples + " samples; at least 1 is needed, and 100,000 is usual");
    }
    return Math.min(samples, UNLIMITED);
  }

  private static long checkedNanos(Duration time) {
    Objects.requireNonNull(time, "time is null; give one, such as Duration.ofSeconds(10)");
    if (time.isZero() || time.isNegative()) {
      throw new IllegalArgumentException(
          "time of " + time + "; it must be longer than zero, such as Duration.ofSeconds(10)");
    }
    return time.compareTo(LONGEST) > 0 ? LONGEST.toNanos() : time.toNanos();
  }

  double relativeError() {
    return error;
  }

  long mostSamples() {
    return samples;
  }

  boolean hasTime() {
    return nanos >= 0;
  }

  /** For how long batches may be begun. */
  long nanos() {
    return hasTime() ? nanos : LONGEST.toNanos();
  }

  double confidence() {
    return confidence;
  }

  long seed() {
    return seed;
  }

  int threads() {
    return threads;
  }

  Method method() {
    return method;
  }

  /** For the preparation, half of the time at most. */
  Budget budget() {
    return hasTime() ? budget.withTime(Duration.ofNanos(Math.max(1, nanos / 2))) : budget;
  }

  /** Empty where none were given. */
  List<Set<String>> cutSets() {
    return cutSets;
  }

  /** Such as 95 %. */
  static String percent(double confidence) {
    BigDecimal percent = new BigDecimal(confidence).movePointRight(2);
    return percent.round(new MathContext(14)).stripTrailingZeros().toPlainString() + " %";
  }

  /**
   * Says when it stops, and how it draws.
   *
   * @return one line
   */
  @Override
  public String toString() {
    return "Simulation["
        + method.name().toLowerCase(Locale.ROOT)
        + ", "
        + percent(confidence)
        + " confidence, seed "
        + seed
        + (error > 0 ? ", to a relative error of " + error : "")
        + (samples < UNLIMITED ? ", at most " + samples + " samples" : "")
        + (hasTime() ? ", at most " + Duration.ofNanos(nanos) : "")
        + "]";
  }
}
