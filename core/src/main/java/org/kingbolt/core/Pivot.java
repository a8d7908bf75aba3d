package org.kingbolt.core;

import java.util.LinkedHashSet;
import java.util.List;
import java.util.Set;

/**
 * A system seen from one key component: what is left of it when the component works, what is left
 * when it has failed, and the reliability as the mean of the two.
 *
 * <p>Immutable; safe to share between threads.
 *
 * <p>Source: the pivotal decomposition of Barlow &amp; Proschan, Statistical Theory of Reliability
 * and Life Testing, 1975, ch. 1 and 2: {@code r(p) = p_i r(1_i, p) + (1 - p_i) r(0_i, p)}.
 */
public final class Pivot {

  private final String component;
  private final CoherentSystem givenWorking;
  private final CoherentSystem givenFailed;

  Pivot(String component, CoherentSystem givenWorking, CoherentSystem givenFailed) {
    this.component = component;
    this.givenWorking = givenWorking;
    this.givenFailed = givenFailed;
  }

  /**
   * Returns the key component.
   *
   * @return its name
   */
  public String component() {
    return component;
  }

  /**
   * Returns the system of the other components when the key component works.
   *
   * @return the system of φ(1_i, x)
   */
  public CoherentSystem givenWorking() {
    return givenWorking;
  }

  /**
   * Returns the system of the other components when the key component has failed.
   *
   * @return the system of φ(0_i, x)
   */
  public CoherentSystem givenFailed() {
    return givenFailed;
  }

  /**
   * The reliability, put together from both sides.
   *
   * @param p the components' probabilities
   * @return {@code p_i r(1_i, p) + (1 - p_i) r(0_i, p)}, and the same for the failing side
   * @throws IllegalArgumentException if components have no probability; the message lists them
   */
  public Probability reliability(Probabilities p) {
    Probability key = key(p);
    Probability works = givenWorking.reliability(p);
    Probability failed = givenFailed.reliability(p);
    return Probability.computed(
        key.working() * works.working() + key.failing() * failed.working(),
        key.working() * works.failing() + key.failing() * failed.failing());
  }

  /**
   * The decomposition in numbers, as a line for a report.
   *
   * @param p the components' probabilities
   * @return such as {@code 0.9 * 0.9801 + 0.1 * 0.9639 = 0.97848}
   * @throws IllegalArgumentException if components have no probability; the message lists them
   */
  public String equation(Probabilities p) {
    Probability key = key(p);
    return Probability.digits(key.working())
        + " * "
        + Probability.digits(givenWorking.reliability(p).working())
        + " + "
        + Probability.digits(key.failing())
        + " * "
        + Probability.digits(givenFailed.reliability(p).working())
        + " = "
        + Probability.digits(reliability(p).working());
  }

  /** The key component's probability; a complaint lists what either side misses, too. */
  private Probability key(Probabilities p) {
    Set<String> needed = new LinkedHashSet<>();
    needed.add(component);
    needed.addAll(givenWorking.components());
    needed.addAll(givenFailed.components());
    return Check.notNull(p, "probabilities").forComponents(List.copyOf(needed)).get(0);
  }

  /**
   * Both sides as structures.
   *
   * @return three lines
   */
  @Override
  public String toString() {
    return "pivot on "
        + component
        + "\n  given it works:  "
        + TextWriter.excerpt(givenWorking.structure())
        + "\n  given it failed: "
        + TextWriter.excerpt(givenFailed.structure());
  }
}
