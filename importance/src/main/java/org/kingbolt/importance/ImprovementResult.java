package org.kingbolt.importance;

import com.google.common.collect.ImmutableList;
import com.google.common.collect.ImmutableMap;
import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.Objects;
import java.util.Optional;
import org.jspecify.annotations.Nullable;
import org.kingbolt.core.Probability;

/**
 * The answer of an improvement plan: what to choose, what it costs and what it achieves, whether
 * that is proved to be the best there is, and why.
 *
 * <p>Immutable; safe to share between threads. Equal when all that it says is equal.
 *
 * <p>Example: {@code plan.bestWithin(30).options()} names what to buy.
 */
public final class ImprovementResult {

  private final String question;
  private final ImmutableList<String> options;
  private final ImmutableMap<String, Double> costs;
  private final Probability reliability;
  private final ImmutableList<ImprovementStep> steps;
  private final @Nullable ImprovementStep next;
  private final String resource;
  private final boolean proved;
  private final double value;
  private final double bound;

  ImprovementResult(
      String question,
      List<String> options,
      Map<String, Double> costs,
      Probability reliability,
      PlanExplanation.Why why,
      String resource,
      boolean proved,
      double value,
      double bound) {
    this.question = question;
    this.options = ImmutableList.copyOf(options);
    this.costs = ImmutableMap.copyOf(costs);
    this.reliability = reliability;
    this.steps = ImmutableList.copyOf(why.steps());
    this.next = why.next();
    this.resource = resource;
    this.proved = proved;
    this.value = value;
    this.bound = Math.min(bound, value);
  }

  /**
   * The chosen options, and of each allocation the chosen content.
   *
   * @return their names in order of their description
   */
  public List<String> options() {
    return options;
  }

  /**
   * What they cost together.
   *
   * @return by resource
   */
  public Map<String, Double> costs() {
    return costs;
  }

  /**
   * What they cost together, where there is one resource.
   *
   * @return the sum
   * @throws IllegalStateException if there are several resources
   */
  public double cost() {
    if (costs.size() > 1) {
      throw new IllegalStateException(
          "costs are in several resources, "
              + PlanCheck.listed(costs.keySet())
              + "; name one of these: cost(name)");
    }
    return costs.values().stream().mapToDouble(Double::doubleValue).sum();
  }

  /**
   * What they cost together in one resource.
   *
   * @param name the resource
   * @return the sum
   * @throws IllegalArgumentException if there is no such resource
   */
  public double cost(String name) {
    Double cost = costs.get(PlanCheck.notNull(name, "the resource"));
    if (cost == null) {
      throw new IllegalArgumentException(
          "unknown resource "
              + PlanCheck.quoted(name)
              + "; the resources are "
              + PlanCheck.listed(costs.keySet())
              + "; name one of these");
    }
    return cost;
  }

  /**
   * The system's probability with the chosen options.
   *
   * @return both sides
   */
  public Probability reliability() {
    return reliability;
  }

  /**
   * Tells whether it is proved that no choice is better.
   *
   * @return false if the search was stopped early, by its budget or because the gap that was
   *     allowed is proved
   */
  public boolean isProved() {
    return proved;
  }

  /**
   * How much better another choice could be at most, in the system's probability of failing; where
   * the cheapest was asked for, in its cost.
   *
   * @return the difference to the proved bound; 0 if this is proved to be the best
   */
  public double absoluteGap() {
    return proved ? 0 : value - bound;
  }

  /**
   * How much better another choice could be at most, relative to the best that is possible.
   *
   * @return the difference to the proved bound, divided by the bound: 0.01 if failing is at most
   *     one percent more likely than necessary; infinite if the bound is 0
   */
  public double relativeGap() {
    return proved || value == bound ? 0 : (value - bound) / bound;
  }

  /**
   * The way there, one option at a time: next comes what gains most for its cost. It begins with
   * nothing chosen, and of allocations and others of which exactly one is to be chosen with the
   * cheapest.
   *
   * @return the steps; the last ends at {@link #reliability()}
   */
  public List<ImprovementStep> steps() {
    return steps;
  }

  /**
   * The best step that was left out: what would gain most for its cost if there were more to spend.
   *
   * @return empty if nothing is left that would help
   */
  public Optional<ImprovementStep> nextBest() {
    return Optional.ofNullable(next);
  }

  @Override
  public boolean equals(Object other) {
    return other instanceof ImprovementResult that
        && question.equals(that.question)
        && options.equals(that.options)
        && costs.equals(that.costs)
        && reliability.equals(that.reliability)
        && steps.equals(that.steps)
        && Objects.equals(next, that.next)
        && proved == that.proved
        && Double.compare(bound, that.bound) == 0;
  }

  @Override
  public int hashCode() {
    return Objects.hash(question, options, reliability);
  }

  /**
   * The plan as an aligned table.
   *
   * @return the question, one line a step, the sum, what is proved, and the next best step
   */
  @Override
  public String toString() {
    StringBuilder out = new StringBuilder(question);
    PlanTable table = new PlanTable(0);
    List<String> heading = new ArrayList<>(List.of("step"));
    heading.addAll(costs.keySet());
    heading.addAll(List.of("failing after", "gain", "gain per " + resource));
    table.row(heading);
    steps.forEach(step -> table.row(line(step)));
    List<String> sum = new ArrayList<>(List.of("total"));
    costs.values().forEach(cost -> sum.add(PlanTable.amount(cost)));
    table.row(sum);
    if (next != null) {
      List<String> line = new ArrayList<>(line(next));
      line.set(0, "left out: " + next.option());
      table.row(line);
    }
    table.writeTo(out);
    out.append(System.lineSeparator()).append(reliability).append("; ");
    if (proved) {
      out.append("proved to be the best");
    } else {
      out.append("at most ")
          .append(PlanTable.gain(absoluteGap()))
          .append(" (")
          .append(PlanTable.gain(100 * relativeGap()))
          .append(" %) from the best");
    }
    return out.toString();
  }

  private List<String> line(ImprovementStep step) {
    List<String> cells = new ArrayList<>(List.of(step.option()));
    step.costs().values().forEach(cost -> cells.add(PlanTable.amount(cost)));
    cells.add(PlanTable.gain(step.after().failing()));
    cells.add(PlanTable.gain(step.gain()));
    cells.add(PlanTable.gain(step.gainPer(resource)));
    return cells;
  }
}
