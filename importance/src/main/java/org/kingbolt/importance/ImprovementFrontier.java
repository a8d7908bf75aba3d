package org.kingbolt.importance;

import com.google.common.collect.ImmutableList;
import com.google.common.collect.ImmutableMap;
import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import org.kingbolt.core.Probability;

/**
 * The efficient plans: each is the best there is for its cost, and none cheaper is as good.
 *
 * <p>Immutable; safe to share between threads. Equal when resource and points are equal.
 *
 * <p>Example: {@code plan.frontier().within(30).get().reliability()}.
 */
public final class ImprovementFrontier {

  /**
   * One efficient plan.
   *
   * @param options the names of what is chosen, in order of their description
   * @param costs what it costs, by resource
   * @param reliability the system's probability with it
   */
  public record Point(List<String> options, Map<String, Double> costs, Probability reliability) {

    /**
     * Makes a point.
     *
     * @param options the names of what is chosen
     * @param costs by resource
     * @param reliability the system's probability
     */
    public Point {
      options = ImmutableList.copyOf(PlanCheck.notNull(options, "the options"));
      costs = ImmutableMap.copyOf(PlanCheck.notNull(costs, "the costs"));
      PlanCheck.notNull(reliability, "the reliability");
    }
  }

  private final String resource;
  private final ImmutableList<Point> points;

  ImprovementFrontier(String resource, List<Point> points) {
    this.resource = resource;
    this.points = ImmutableList.copyOf(points);
  }

  /**
   * The resource whose cost the plans are efficient in.
   *
   * @return its name
   */
  public String resource() {
    return resource;
  }

  /**
   * All efficient plans.
   *
   * @return by cost, the cheapest first, each better than those before it
   */
  public List<Point> points() {
    return points;
  }

  /**
   * The best plan within a budget.
   *
   * @param budget 0 or more
   * @return empty if even the cheapest plan costs more
   * @throws IllegalArgumentException if the budget is negative or NaN
   */
  public Optional<Point> within(double budget) {
    if (!(budget >= 0)) {
      throw new IllegalArgumentException("budget of " + budget + "; it must be a number from 0 up");
    }
    Point best = null;
    for (Point point : points) {
      best = cost(point) <= budget ? point : best;
    }
    return Optional.ofNullable(best);
  }

  private double cost(Point point) {
    return point.costs.getOrDefault(resource, 0.0);
  }

  @Override
  public boolean equals(Object other) {
    return other instanceof ImprovementFrontier that
        && resource.equals(that.resource)
        && points.equals(that.points);
  }

  @Override
  public int hashCode() {
    return 31 * resource.hashCode() + points.hashCode();
  }

  /**
   * The frontier as an aligned table.
   *
   * @return a heading and one line a plan: its cost, the system's probability of failing with it,
   *     what it gains for the cost over the plan before, and its options
   */
  @Override
  public String toString() {
    StringBuilder out = new StringBuilder("efficient plans by ").append(resource);
    PlanTable table = new PlanTable(3);
    table.row(List.of(resource, "failing", "gain per " + resource, "options"));
    Point before = null;
    for (Point point : points) {
      List<String> cells = new ArrayList<>(List.of(PlanTable.amount(cost(point))));
      cells.add(PlanTable.gain(point.reliability.failing()));
      if (before == null) {
        cells.add("");
      } else {
        Map<String, Double> more = Map.of(resource, cost(point) - cost(before));
        ImprovementStep step =
            new ImprovementStep("step", more, before.reliability, point.reliability);
        cells.add(PlanTable.gain(step.gainPer(resource)));
      }
      cells.add(point.options.isEmpty() ? "nothing" : String.join("; ", point.options));
      table.row(cells);
      before = point;
    }
    table.writeTo(out);
    return out.toString();
  }
}
