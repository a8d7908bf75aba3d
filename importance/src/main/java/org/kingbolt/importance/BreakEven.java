package org.kingbolt.importance;

import com.google.common.collect.ImmutableList;
import java.util.List;
import java.util.Optional;
import org.kingbolt.core.Probability;

/**
 * The least probability that a component, or each of a group, needs for the system to meet a
 * target; or that no probability suffices.
 *
 * <p>Immutable; safe to share between threads. Example: {@code
 * Sensitivity.of(system).given(p).breakEven("pump", Probability.failing(1e-4)).probability()}.
 */
public final class BreakEven {

  private final ImmutableList<String> components;
  private final Probability target;
  private final Probability worst;
  private final Probability best;
  private final Optional<Probability> least;

  BreakEven(
      List<String> components,
      Probability target,
      Probability worst,
      Probability best,
      Optional<Probability> least) {
    this.components = ImmutableList.copyOf(components);
    this.target = target;
    this.worst = worst;
    this.best = best;
    this.least = least;
  }

  /**
   * Tells whether the target can be met.
   *
   * @return false if the system misses it even with these components certain to work
   */
  public boolean isReachable() {
    return least.isPresent();
  }

  /**
   * Returns the least probability that meets the target.
   *
   * @return {@link Probability#IMPOSSIBLE} if the target is met even with these components failed;
   *     empty if it is out of reach. For a group: to the last place of its smaller side.
   */
  public Optional<Probability> probability() {
    return least;
  }

  /**
   * Returns the target.
   *
   * @return the reliability wanted
   */
  public Probability target() {
    return target;
  }

  /**
   * Says what is needed, or why nothing helps.
   *
   * @return one line
   */
  @Override
  public String toString() {
    String who = String.join(", ", components);
    if (least.isEmpty()) {
      return "out of reach: with "
          + who
          + " certain to work the system has "
          + best
          + ", which misses the target of "
          + target
          + "; improve others too";
    }
    if (worst.compareTo(target) >= 0) {
      return "nothing needed of " + who + ": with it failed the system has " + worst;
    }
    return who + " needs " + least.get() + " for the system to meet " + target;
  }
}
