package org.kingbolt.importance;

import com.google.common.collect.ImmutableList;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.HashSet;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Set;
import org.kingbolt.core.Budget;
import org.kingbolt.core.CoherentSystem;
import org.kingbolt.core.Probabilities;
import org.kingbolt.core.Probability;
import org.kingbolt.core.Structure;

/**
 * Where the next unit of money goes: which options to choose so that a system is as reliable as
 * possible within a budget, or reaches a target at the least cost, or both for every budget.
 *
 * <p>Describe the present system, the options and how they go together; then ask. Answers are
 * exact: all choices are searched through, variable by variable along the system's diagram, and a
 * partial choice is dropped only when another one is proved to be at least as good whatever follows
 * (the reliability increases in each component's, and is a sum of products of both sides), or when
 * a bound proves that it cannot lead to an answer (monotonicity, and Gibbs' inequality with
 * Lagrange multipliers for the resources). Larger questions for the best plan, if each option
 * changes one component only, are divided further by a branch and bound whose relaxation is a
 * convex programme. Cost: for systems whose parts share no components about as for a knapsack
 * problem; with shared components it grows with the diagram, and may be exponential. A search that
 * the {@link Budget} ends returns the best found, and how far it can be from the best there is.
 *
 * <p>Components fail independently, also new ones. Results support a qualified engineer's judgement
 * and never replace codes, standards and licensed practice.
 *
 * <p>Immutable; safe to share between threads; the same question gives the same answer in every run
 * and thread, unless a limit of time ends it.
 *
 * <pre>{@code
 * ImprovementPlan plan = ImprovementPlan.of(station).given(p)
 *     .with(option("new pump A").replacing("pumpA", 0.99).costing(12.5),
 *         option("third pump").sparing("pumpB", "pumpC", 0.95).costing(20),
 *         option("monthly test").multiplyingFailing("intake", 0.3).costing(4));
 * System.out.println(plan.bestWithin(25));
 * }</pre>
 *
 * <p>Sources: Kettelle, Oper. Res. 10 (1962) 249, for undominated sequences of allocations;
 * Tillman, Hwang &amp; Kuo, Optimization of Systems Reliability, 1980; Duffin, Peterson &amp;
 * Zener, Geometric Programming, 1967, for the convex form (from memory).
 */
public final class ImprovementPlan {

  private final PlanDescription description;
  private final Map<String, Double> limits;
  private final Budget budget;
  private final double gap;

  private ImprovementPlan(
      PlanDescription description, Map<String, Double> limits, Budget budget, double gap) {
    this.description = description;
    this.limits = limits;
    this.budget = budget;
    this.gap = gap;
  }

  /**
   * Begins a plan for a system, as yet without options.
   *
   * @param structure the present system
   * @return the plan
   */
  public static ImprovementPlan of(Structure structure) {
    PlanCheck.notNull(structure, "structure");
    if (structure.isAlwaysWorking() || structure.isNeverWorking()) {
      throw new IllegalArgumentException(
          "the structure has no components, so nothing can be improved; give one that has");
    }
    return new ImprovementPlan(PlanDescription.of(structure), Map.of(), Budget.ofHeap(), 0);
  }

  /**
   * Begins a plan for a compiled system, as yet without options.
   *
   * @param system the present system
   * @return the plan
   */
  public static ImprovementPlan of(CoherentSystem system) {
    return of(PlanCheck.notNull(system, "system").structure());
  }

  /**
   * Sets the present probabilities.
   *
   * @param p of all components but those whose units an allocation chooses; may name more
   * @return the plan with these probabilities
   */
  public ImprovementPlan given(Probabilities p) {
    return with(description.given(PlanCheck.notNull(p, "probabilities")));
  }

  /**
   * Adds options.
   *
   * @param options of names not yet used
   * @return the plan with these options too
   * @throws IllegalArgumentException if a name is used twice
   */
  public ImprovementPlan with(ImprovementOption... options) {
    return withOptions(Arrays.asList(PlanCheck.notNull(options, "the list of options")));
  }

  /**
   * Adds options.
   *
   * @param options of names not yet used
   * @return the plan with these options too
   * @throws IllegalArgumentException if a name is used twice
   */
  public ImprovementPlan withOptions(List<ImprovementOption> options) {
    List<ImprovementOption> all = new ArrayList<>(description.options());
    Set<String> names = new HashSet<>();
    all.forEach(option -> names.add(option.name()));
    for (ImprovementOption option : PlanCheck.notNull(options, "the list of options")) {
      if (!names.add(PlanCheck.notNull(option, "an option").name())) {
        throw new IllegalArgumentException(
            "option " + PlanCheck.quoted(option.name()) + " is given twice; name each once");
      }
      all.add(option);
    }
    return with(description.choosingFrom(all, description.allocations()));
  }

  /**
   * Adds allocations: components whose units, or spares, are to be chosen.
   *
   * @param allocations of components that have none yet
   * @return the plan with these allocations too
   * @throws IllegalArgumentException if a component has two
   */
  public ImprovementPlan with(ImprovementAllocation... allocations) {
    PlanCheck.notNull(allocations, "the list of allocations");
    List<ImprovementAllocation> all = new ArrayList<>(description.allocations());
    Set<String> components = new HashSet<>();
    all.forEach(allocation -> components.add(allocation.component()));
    for (ImprovementAllocation allocation : allocations) {
      if (!components.add(PlanCheck.notNull(allocation, "an allocation").component())) {
        throw new IllegalArgumentException(
            allocation.where() + "it is given twice; put all its units into one");
      }
      all.add(allocation);
    }
    return with(description.choosingFrom(description.options(), all));
  }

  /**
   * Allows at most one of some options.
   *
   * @param options their names, at least two, all different
   * @return the plan with this rule
   * @throws IllegalArgumentException if a name is unknown or given twice
   */
  public ImprovementPlan atMostOneOf(String... options) {
    return limited(PlanLimit.Kind.AT_MOST_ONE, "atMostOneOf", 2, options);
  }

  /**
   * Demands exactly one of some options.
   *
   * @param options their names, all different
   * @return the plan with this rule
   * @throws IllegalArgumentException if a name is unknown or given twice
   */
  public ImprovementPlan exactlyOneOf(String... options) {
    return limited(PlanLimit.Kind.EXACTLY_ONE, "exactlyOneOf", 1, options);
  }

  /**
   * Allows an option only together with another.
   *
   * @param option the option's name
   * @param needed the name of the option that it needs
   * @return the plan with this rule
   * @throws IllegalArgumentException if a name is unknown, or both are the same
   */
  public ImprovementPlan requires(String option, String needed) {
    return limited(PlanLimit.Kind.REQUIRES, "requires", 2, option, needed);
  }

  private ImprovementPlan limited(PlanLimit.Kind kind, String rule, int fewest, String... options) {
    Map<String, Integer> numbers = new LinkedHashMap<>();
    description.options().forEach(option -> numbers.put(option.name(), numbers.size()));
    PlanCheck.notNull(options, rule + ": the list of options");
    for (String option : options) {
      PlanCheck.notNull(option, rule + ": an option's name");
    }
    if (options.length < fewest || new HashSet<>(Arrays.asList(options)).size() < options.length) {
      throw new IllegalArgumentException(
          rule
              + ": the options are "
              + PlanCheck.listed(Arrays.asList(options))
              + "; give at least "
              + fewest
              + ", all different");
    }
    PlanDescription.Named limit = new PlanDescription.Named(kind, ImmutableList.copyOf(options));
    PlanCheck.naming(rule, () -> limit.numbered(numbers));
    return with(description.limited(limit));
  }

  /**
   * Limits what may be spent of a resource, in all questions.
   *
   * @param resource its name, as the options or allocations use it
   * @param amount 0 or more
   * @return the plan with this limit
   * @throws IllegalArgumentException if the amount is negative, infinite or NaN
   */
  public ImprovementPlan limiting(String resource, double amount) {
    PlanCheck.name(resource, "the resource's name");
    Map<String, Double> changed = new LinkedHashMap<>(limits);
    changed.put(resource, PlanCheck.amount(amount, "the limit of " + PlanCheck.quoted(resource)));
    return new ImprovementPlan(
        description, java.util.Collections.unmodifiableMap(changed), budget, gap);
  }

  /**
   * Sets how much work a question may cost; without, {@link Budget#ofHeap()}.
   *
   * @param work nodes, of which a partial choice counts as several, and time
   * @return the plan with this budget
   */
  public ImprovementPlan within(Budget work) {
    return new ImprovementPlan(description, limits, PlanCheck.notNull(work, "budget"), gap);
  }

  /**
   * Sets how far from the best an answer may be, so that it comes sooner; without, 0.
   *
   * @param relativeGap from 0 to 1: in the system's probability of failing, or in the least cost
   * @return the plan with this allowance
   * @throws IllegalArgumentException if the number is NaN or outside [0, 1]
   */
  public ImprovementPlan toWithin(double relativeGap) {
    if (!(relativeGap >= 0 && relativeGap <= 1)) {
      throw new IllegalArgumentException(
          "a gap of " + relativeGap + "; it must be a number from 0 to 1, such as 0.01");
    }
    return new ImprovementPlan(description, limits, budget, relativeGap + 0.0);
  }

  private ImprovementPlan with(PlanDescription changed) {
    return new ImprovementPlan(changed, limits, budget, gap);
  }

  private PlanQuestion question() {
    return new PlanQuestion(model(), limits, budget, gap);
  }

  PlanModel model() {
    return PlanModeler.model(description, budget);
  }

  /**
   * The best reliability within a budget, where there is one resource only. Among equally good
   * choices, to twelve digits, the cheapest found.
   *
   * @param amount the most that may be spent, 0 or more
   * @return what to choose
   * @throws IllegalArgumentException if there are several resources, if the plan is faulty, or if
   *     no choice keeps all limits
   * @throws org.kingbolt.core.BudgetExceededException if the budget of work ends before any choice
   *     is found, or the thread is interrupted
   */
  public ImprovementResult bestWithin(double amount) {
    PlanCheck.amount(amount, "the budget");
    PlanQuestion question = question();
    return question.best(Map.of(question.onlyResource("bestWithin"), amount));
  }

  /**
   * The best reliability within a budget of several resources.
   *
   * @param amounts by resource: the most that may be spent; resources not listed are not limited,
   *     unless by {@link #limiting}
   * @return what to choose
   * @throws IllegalArgumentException if a resource is unknown, if the plan is faulty, or if no
   *     choice keeps all limits
   * @throws org.kingbolt.core.BudgetExceededException if the budget of work ends before any choice
   *     is found, or the thread is interrupted
   */
  public ImprovementResult bestWithin(Map<String, Double> amounts) {
    PlanCheck.notNull(amounts, "the map of amounts");
    return question().best(amounts);
  }

  /**
   * The cheapest choice that reaches a target, where there is one resource only.
   *
   * @param working the least probability that the system works, from 0 to 1
   * @return what to choose
   * @throws IllegalArgumentException as {@link #cheapestReaching(Probability, String)}
   * @throws org.kingbolt.core.BudgetExceededException as there
   */
  public ImprovementResult cheapestReaching(double working) {
    return cheapestReaching(PlanCheck.naming("the target", () -> Probability.working(working)));
  }

  /**
   * The cheapest choice that reaches a target, where there is one resource only.
   *
   * @param target such as {@code Probability.failing(1e-9)}
   * @return what to choose
   * @throws IllegalArgumentException as {@link #cheapestReaching(Probability, String)}
   * @throws org.kingbolt.core.BudgetExceededException as there
   */
  public ImprovementResult cheapestReaching(Probability target) {
    PlanCheck.notNull(target, "the target");
    PlanQuestion question = question();
    return question.cheapest(target, question.onlyResource("cheapestReaching"));
  }

  /**
   * The choice that reaches a target and costs least of one resource, within the limits of the
   * others.
   *
   * @param target which is reached when it is met to twelve digits
   * @param resource what is to be saved
   * @return what to choose
   * @throws IllegalArgumentException if the target cannot be reached, which the message tells with
   *     the best that can, if the resource is unknown, or if the plan is faulty
   * @throws org.kingbolt.core.BudgetExceededException if the budget of work ends before any choice
   *     is found, or the thread is interrupted
   */
  public ImprovementResult cheapestReaching(Probability target, String resource) {
    PlanCheck.notNull(target, "the target");
    PlanCheck.notNull(resource, "the resource");
    return question().cheapest(target, resource);
  }

  /**
   * All efficient plans, where there is one resource only.
   *
   * @return from the cheapest to the best. With {@link #toWithin} there may be fewer of them, each
   *     that is missing having one that costs no more and fails at most so much more often.
   * @throws IllegalArgumentException if there are several resources, if the plan is faulty, or if
   *     no choice keeps all limits
   * @throws org.kingbolt.core.BudgetExceededException if the budget of work is used up, or the
   *     thread is interrupted
   */
  public ImprovementFrontier frontier() {
    PlanQuestion question = question();
    return question.frontier(question.onlyResource("frontier"));
  }

  /**
   * All plans that are efficient in one resource, within the limits of the others.
   *
   * @param resource what the frontier is drawn against
   * @return as {@link #frontier()}
   * @throws IllegalArgumentException if the resource is unknown, if the plan is faulty, or if no
   *     choice keeps all limits
   * @throws org.kingbolt.core.BudgetExceededException as {@link #frontier()}
   */
  public ImprovementFrontier frontier(String resource) {
    return question().frontier(PlanCheck.notNull(resource, "the resource"));
  }

  /**
   * Says what this is and what to call on it.
   *
   * @return one line
   */
  @Override
  public String toString() {
    return "ImprovementPlan["
        + description.options().size()
        + " options, "
        + description.allocations().size()
        + " allocations]; call bestWithin, cheapestReaching or frontier";
  }
}
