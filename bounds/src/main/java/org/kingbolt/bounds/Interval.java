package org.kingbolt.bounds;

import java.util.Locale;
import java.util.Objects;
import org.kingbolt.core.Probability;

/**
 * Two probabilities between which the reliability lies, and why.
 *
 * <p>Immutable; safe to share between threads. Equal when both ends, assumption and method are
 * equal.
 *
 * <p>Example: {@code Bounds.of(system).given(p).minMax().lower().working()}.
 */
public final class Interval {

  private final Probability lower;
  private final Probability upper;
  private final Assumption assumption;
  private final String method;
  private final String reason;

  Interval(
      Probability lower, Probability upper, Assumption assumption, String method, String reason) {
    if (lower.working() > upper.working() || lower.failing() < upper.failing()) {
      throw new IllegalStateException(
          method + ": the lower end (" + lower + ") is above the upper end (" + upper + ")");
    }
    this.lower = lower;
    this.upper = upper;
    this.assumption = assumption;
    this.method = method;
    this.reason = reason;
  }

  /**
   * Returns the lower end.
   *
   * @return the system is at least as likely to work as this
   */
  public Probability lower() {
    return lower;
  }

  /**
   * Returns the upper end.
   *
   * @return the system is at most as likely to work as this
   */
  public Probability upper() {
    return upper;
  }

  /**
   * Returns what must be true of the components.
   *
   * @return the assumption
   */
  public Assumption assumption() {
    return assumption;
  }

  /**
   * Returns the name of the method.
   *
   * @return such as {@code Esary-Proschan}
   */
  public String method() {
    return method;
  }

  /**
   * Says why the interval holds.
   *
   * @return a sentence without a full stop
   */
  public String reason() {
    return reason;
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
   * Combines two intervals for the same figure: it lies in both.
   *
   * @param other another interval for the same system at the same probabilities
   * @return the part that both have in common, under the stricter of both assumptions
   * @throws IllegalStateException if they have nothing in common, which is a defect: of the
   *     program, or because the intervals are not about the same figure
   */
  public Interval intersection(Interval other) {
    Objects.requireNonNull(other, "interval is null; give one for the same system");
    boolean lowerIsTheirs = isAbove(other.lower, lower);
    boolean upperIsTheirs = isAbove(upper, other.upper);
    if (!lowerIsTheirs && !upperIsTheirs) {
      return this;
    }
    if (lowerIsTheirs && upperIsTheirs) {
      return other;
    }
    Probability newLower = lowerIsTheirs ? other.lower : lower;
    Probability newUpper = upperIsTheirs ? other.upper : upper;
    if (isAbove(newLower, newUpper)) {
      throw new IllegalStateException(
          method
              + " ("
              + this
              + ") and "
              + other.method
              + " ("
              + other
              + ") have nothing in common; ask both about one system at the same probabilities, and"
              + " report a defect if you did");
    }
    return new Interval(
        newLower,
        newUpper,
        assumption.and(other.assumption),
        (lowerIsTheirs ? other : this).method
            + " from below, "
            + (upperIsTheirs ? other : this).method
            + " from above",
        "the figure lies in both intervals: " + reason + "; " + other.reason);
  }

  /** Judged on the side that has more digits. */
  private static boolean isAbove(Probability one, Probability other) {
    return other.failing() <= other.working()
        ? one.failing() < other.failing()
        : one.working() > other.working();
  }

  /**
   * Returns the distance of the ends.
   *
   * @return from 0 to 1, taken on the side where the ends are smaller
   */
  public double width() {
    return lower.failing() < upper.working()
        ? lower.failing() - upper.failing()
        : upper.working() - lower.working();
  }

  /**
   * Returns the distance of the ends relative to the failing probability.
   *
   * @return the larger failing probability divided by the smaller one, minus 1; 0 when both are 0,
   *     and infinite when only the smaller one is
   */
  public double relativeWidthFailing() {
    double most = lower.failing();
    double least = upper.failing();
    return most == least ? 0 : (most - least) / least;
  }

  @Override
  public boolean equals(Object other) {
    return other instanceof Interval that
        && lower.equals(that.lower)
        && upper.equals(that.upper)
        && assumption == that.assumption
        && method.equals(that.method);
  }

  @Override
  public int hashCode() {
    return Objects.hash(lower, upper, method);
  }

  /**
   * The interval in three aligned lines.
   *
   * @return method and assumption, then both ends with both sides
   */
  @Override
  public String toString() {
    return String.format(
        Locale.ROOT,
        "%s, for %s%n  at least  %s%n  at most   %s",
        method,
        assumption,
        lower,
        upper);
  }
}
