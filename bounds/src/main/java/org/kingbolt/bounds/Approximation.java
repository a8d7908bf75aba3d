package org.kingbolt.bounds;

import java.util.Locale;
import org.kingbolt.core.Probability;

/**
 * A figure found by a method that is not exact and does not say how far off it is, with the
 * interval that holds beside it. It is no bound, and never an {@link Interval}.
 *
 * <p>Immutable; safe to share between threads.
 *
 * <p>Example: {@code Bounds.of(yard).given(p).deltaStar().certified()}.
 */
public final class Approximation {

  private final Probability value;
  private final String method;
  private final int replacements;
  private final Interval certified;

  Approximation(Probability value, String method, int replacements, Interval certified) {
    this.value = value;
    this.method = method;
    this.replacements = replacements;
    this.certified = certified;
  }

  /**
   * Returns the approximate figure.
   *
   * @return both sides; may lie outside {@link #certified()}
   */
  public Probability value() {
    return value;
  }

  /**
   * Returns the name of the method.
   *
   * @return such as {@code delta-star}
   */
  public String method() {
    return method;
  }

  /**
   * Returns how often a part was replaced by one that is not equal to it.
   *
   * @return 0 where the figure is exact up to rounding
   */
  public int replacements() {
    return replacements;
  }

  /**
   * Returns the interval in which the exact figure lies.
   *
   * @return an interval for independent components
   */
  public Interval certified() {
    return certified;
  }

  /**
   * The figure, labelled as what it is, and the interval.
   *
   * @return four lines
   */
  @Override
  public String toString() {
    return String.format(
        Locale.ROOT,
        "%s, approximate (%d replacements): %s%n%s",
        method,
        replacements,
        value,
        certified);
  }
}
