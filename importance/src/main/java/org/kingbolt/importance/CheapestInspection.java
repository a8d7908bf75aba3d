package org.kingbolt.importance;

import com.google.common.collect.ImmutableMap;
import java.util.Map;
import java.util.Optional;

/**
 * Which component to inspect next for the least expected cost until a failure is explained, and
 * what each other beginning would cost, when all goes on at best.
 *
 * <p>Immutable; safe to share between threads. Example: {@code diagnosis.systemFailed()
 * .cheapestInspection(costs).next()}; then say what was found, and ask again.
 */
public final class CheapestInspection {

  private static final double TIED = 1e-12;

  private final ImmutableMap<String, Double> starting;
  private final Optional<String> next;

  CheapestInspection(Map<String, Double> starting) {
    this.starting = ImmutableMap.copyOf(starting);
    double least = starting.values().stream().mapToDouble(cost -> cost).min().orElse(0);
    this.next =
        this.starting.entrySet().stream()
            .filter(entry -> entry.getValue() <= least * (1 + TIED))
            .map(Map.Entry::getKey)
            .findFirst();
  }

  /**
   * Returns the component to inspect next.
   *
   * @return among equally good ones, the first in the system's order; empty if the failure is
   *     explained, or nothing can be inspected
   */
  public Optional<String> next() {
    return next;
  }

  /**
   * Returns the least expected cost until the failure is explained, or nothing is left to inspect.
   *
   * @return at least 0; 0 if there is nothing to inspect
   */
  public double expectedCost() {
    return next.map(starting::get).orElse(0.0);
  }

  /**
   * Returns the expected cost of beginning with each component and going on at best.
   *
   * @return by component, in the system's order; unmodifiable
   */
  public Map<String, Double> startingWith() {
    return starting;
  }

  @Override
  public boolean equals(Object other) {
    return other instanceof CheapestInspection that && starting.equals(that.starting);
  }

  @Override
  public int hashCode() {
    return starting.hashCode();
  }

  /**
   * Says what to inspect next.
   *
   * @return one line
   */
  @Override
  public String toString() {
    return next.map(name -> "inspect " + name + " next; expected cost " + expectedCost())
        .orElse("nothing more to inspect");
  }
}
