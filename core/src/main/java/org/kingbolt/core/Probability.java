package org.kingbolt.core;

import java.io.Serializable;
import java.util.Locale;

/**
 * The probability that something works, together with the probability that it has failed.
 *
 * <p>Both sides are kept, because one cannot be recovered from the other without loss: with a
 * failing probability of 1e-18 the working side rounds to exactly 1. Sides known only as a
 * complement are computed once, when the value is made.
 *
 * <p>Immutable; safe to share between threads. Two values are equal when both sides are equal.
 *
 * <p>Example: {@code Probability.failing(1e-9).working()} is 0.999999999.
 */
public final class Probability implements Comparable<Probability>, Serializable {

  /** Certain to work. */
  public static final Probability CERTAIN = new Probability(1, 0);

  /** Certain to have failed. */
  public static final Probability IMPOSSIBLE = new Probability(0, 1);

  private static final long serialVersionUID = 1L;

  /** How far the two sides may be from adding up to 1. */
  private static final double SUM_TOLERANCE = 1e-12;

  private final double working;
  private final double failing;

  private Probability(double working, double failing) {
    this.working = working;
    this.failing = failing;
  }

  /**
   * Makes a probability from its working side.
   *
   * @param working the probability of working, from 0 to 1
   * @return the probability; its failing side is {@code 1 - working}
   * @throws IllegalArgumentException if the number is NaN or outside [0, 1]
   */
  public static Probability working(double working) {
    double p = Check.probability(working, "probability of working");
    return new Probability(p, 1 - p);
  }

  /**
   * Makes a probability from its failing side; the way to give a small failing probability all its
   * digits.
   *
   * @param failing the probability of having failed, from 0 to 1
   * @return the probability; its working side is {@code 1 - failing}
   * @throws IllegalArgumentException if the number is NaN or outside [0, 1]
   */
  public static Probability failing(double failing) {
    double q = Check.probability(failing, "probability of failing");
    return new Probability(1 - q, q);
  }

  /**
   * Makes a probability from both sides, each known to full precision.
   *
   * @param working the probability of working, from 0 to 1
   * @param failing the probability of having failed, from 0 to 1
   * @return the probability
   * @throws IllegalArgumentException if a number is NaN or outside [0, 1], or if the two do not add
   *     up to 1 within 1e-12
   */
  public static Probability of(double working, double failing) {
    double p = Check.probability(working, "probability of working");
    double q = Check.probability(failing, "probability of failing");
    if (!addUp(p, q)) {
      throw new IllegalArgumentException(
          "working "
              + p
              + " and failing "
              + q
              + " add up to "
              + (p + q)
              + "; they must add up to 1. With only one side known, call Probability.working or"
              + " Probability.failing");
    }
    return new Probability(p, q);
  }

  /** Whether two sides add up to 1. */
  static boolean addUp(double working, double failing) {
    return Math.abs(working + failing - 1) <= SUM_TOLERANCE;
  }

  /**
   * Makes a probability from both sides as a computation left them: rounding may have carried a
   * side past 1, and the sides of a system add up to 1 only as far as those of its components do.
   */
  static Probability computed(double working, double failing) {
    return new Probability(Math.min(working, 1), Math.min(failing, 1));
  }

  /**
   * Returns the probability of working.
   *
   * @return from 0 to 1
   */
  public double working() {
    return working;
  }

  /**
   * Returns the probability of having failed.
   *
   * @return from 0 to 1
   */
  public double failing() {
    return failing;
  }

  /**
   * Swaps the two sides.
   *
   * @return the probability whose working side is this failing side
   */
  public Probability complement() {
    return new Probability(failing, working);
  }

  /**
   * Orders by how likely it is to work: by the failing side, decreasing, where that is the smaller
   * side and keeps more digits, and by the working side elsewhere.
   *
   * @param other the probability to compare with
   * @return negative when this is less likely to work than the other
   */
  @Override
  public int compareTo(Probability other) {
    boolean upper = working >= 0.5 && other.working >= 0.5;
    int first =
        upper ? Double.compare(other.failing, failing) : Double.compare(working, other.working);
    if (first != 0) {
      return first;
    }
    return upper ? Double.compare(working, other.working) : Double.compare(other.failing, failing);
  }

  @Override
  public boolean equals(Object other) {
    return other instanceof Probability that
        && Double.compare(working, that.working) == 0
        && Double.compare(failing, that.failing) == 0;
  }

  @Override
  public int hashCode() {
    return 31 * Double.hashCode(working) + Double.hashCode(failing);
  }

  /**
   * Shows both sides, such as {@code working 0.97848, failing 0.02152}.
   *
   * @return up to twelve significant digits a side
   */
  @Override
  public String toString() {
    return "working " + digits(working) + ", failing " + digits(failing);
  }

  /** Up to twelve significant digits, without trailing zeros. */
  static String digits(double value) {
    if (value == 0 || value == 1) {
      return value == 0 ? "0" : "1";
    }
    String text;
    if (value >= 1e-4) {
      int leadingZeros = (int) Math.max(0, Math.floor(-Math.log10(value)));
      text = String.format(Locale.ROOT, "%." + (12 + leadingZeros) + "f", value);
      return text.replaceAll("0+$", "").replaceAll("\\.$", "");
    }
    text = String.format(Locale.ROOT, "%.11e", value);
    return text.replaceAll("\\.?0+e", "e");
  }
}
