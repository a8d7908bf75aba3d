package org.kingbolt.importance;

import com.google.common.collect.ImmutableList;
import java.math.BigDecimal;
import java.math.BigInteger;
import java.util.Arrays;
import java.util.List;
import java.util.Objects;
import java.util.Optional;
import org.kingbolt.core.Probability;

/**
 * The reliability as a function of one probability that some components share, the others staying
 * as they are: a polynomial whose degree is the number of these components.
 *
 * <p>Held by counts: {@code r(x) = sum over k of C(n, k) x^k (1-x)^(n-k) w_k}, where w_k is the
 * reliability given that exactly k of the n members work, any k of them being equally likely.
 * Values are means of the w_k, on both sides, so that small ones keep their digits. (This is the
 * Bernstein form of the polynomial.)
 *
 * <p>Immutable; safe to share between threads. Example: {@code
 * Sensitivity.of(system).given(p).along("pump").at(Probability.failing(1e-6))}.
 */
public final class ReliabilityCurve {

  private final ImmutableList<String> components;
  private final double[] works;
  private final double[] fails;

  ReliabilityCurve(List<String> components, double[] works, double[] fails) {
    this.components = ImmutableList.copyOf(components);
    this.works = works;
    this.fails = fails;
  }

  /**
   * Returns the components that move.
   *
   * @return in the system's order
   */
  public List<String> components() {
    return components;
  }

  /**
   * Returns the degree.
   *
   * @return the number of components that move
   */
  public int degree() {
    return works.length - 1;
  }

  /**
   * Returns the reliability given how many of the members work.
   *
   * @param working from 0 to the degree
   * @return the reliability given that exactly so many of them work, any ones being equally likely;
   *     grows with their number
   * @throws IndexOutOfBoundsException if there are not so many members
   */
  public Probability givenWorking(int working) {
    Objects.checkIndex(working, works.length);
    return Gains.sides(works[working], fails[working]);
  }

  /**
   * Returns the reliability where every member works with some probability.
   *
   * @param x each member's probability
   * @return both sides. Cost: the square of the degree.
   */
  public Probability at(Probability x) {
    Objects.requireNonNull(x, "probability is null; give each member's");
    return Gains.sides(mean(works, x), mean(fails, x));
  }

  /** de Casteljau's way of evaluating. */
  private static double mean(double[] byCount, Probability x) {
    double[] value = byCount.clone();
    for (int left = value.length - 1; left > 0; left--) {
      for (int k = 0; k < left; k++) {
        value[k] = x.failing() * value[k] + x.working() * value[k + 1];
      }
    }
    return value[0];
  }

  /**
   * Returns the reliability where every member works with some probability.
   *
   * @param working each member's probability of working, from 0 to 1
   * @return both sides
   * @throws IllegalArgumentException if the number is NaN or outside [0, 1]
   */
  public Probability at(double working) {
    return at(Probability.working(working));
  }

  /**
   * Returns the coefficients of the powers of x. To evaluate, use {@link #at(Probability)}: powers
   * cancel.
   *
   * @return entry j is the coefficient of x^j, from 0 up to the degree; each the exact one of the
   *     w_k as they are held, rounded
   */
  public double[] coefficients() {
    int n = degree();
    BigDecimal[] difference =
        Arrays.stream(works).mapToObj(BigDecimal::new).toArray(BigDecimal[]::new);
    double[] coefficients = new double[n + 1];
    BigInteger choices = BigInteger.ONE;
    for (int j = 0; j <= n; j++) {
      coefficients[j] = difference[0].multiply(new BigDecimal(choices)).doubleValue();
      for (int k = 0; k < n - j; k++) {
        difference[k] = difference[k + 1].subtract(difference[k]);
      }
      choices = choices.multiply(BigInteger.valueOf(n - j)).divide(BigInteger.valueOf(j + 1));
    }
    return coefficients;
  }

  /**
   * The least probability of the members for which the system meets a target.
   *
   * @param target the reliability wanted
   * @return it, or why there is none. Cost: for one component none; for more, about sixty values.
   */
  public BreakEven breakEven(Probability target) {
    Objects.requireNonNull(target, "target is null; give the reliability wanted");
    Probability worst = at(Probability.IMPOSSIBLE);
    Probability best = at(Probability.CERTAIN);
    return new BreakEven(components, target, worst, best, least(target, worst, best));
  }

  private Optional<Probability> least(Probability target, Probability worst, Probability best) {
    if (worst.compareTo(target) >= 0) {
      return Optional.of(Probability.IMPOSSIBLE);
    }
    if (best.compareTo(target) < 0) {
      return Optional.empty();
    }
    if (degree() == 1) {
      double needed = difference(target, worst);
      double spare = difference(best, target);
      return Optional.of(Gains.sides(needed / (needed + spare), spare / (needed + spare)));
    }
    return Optional.of(searched(target));
  }

  private static double difference(Probability high, Probability low) {
    return high.working() < low.failing()
        ? high.working() - low.working()
        : low.failing() - high.failing();
  }

  /** Halves the doubles up to one half, on the side of the smaller probability. */
  private Probability searched(Probability target) {
    boolean lower = at(0.5).compareTo(target) >= 0;
    long near = 0;
    long far = Double.doubleToLongBits(0.5);
    while (far - near > 1) {
      long middle = (near + far) >>> 1;
      boolean met = at(side(middle, lower)).compareTo(target) >= 0;
      if (met == lower) {
        far = middle;
      } else {
        near = middle;
      }
    }
    return side(lower ? far : near, lower);
  }

  private static Probability side(long bits, boolean working) {
    double value = Double.longBitsToDouble(bits);
    return working ? Probability.working(value) : Probability.failing(value);
  }

  /**
   * Says what moves, and over what range.
   *
   * @return one line
   */
  @Override
  public String toString() {
    return "along "
        + String.join(", ", components)
        + ": from "
        + at(Probability.IMPOSSIBLE)
        + " (failed) to "
        + at(Probability.CERTAIN)
        + " (working)";
  }
}
