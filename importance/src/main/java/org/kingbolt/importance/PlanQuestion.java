package org.kingbolt.importance;

import com.google.common.collect.ImmutableList;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.BitSet;
import java.util.Comparator;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import org.kingbolt.core.Budget;
import org.kingbolt.core.Evaluator;
import org.kingbolt.core.Probability;

/** Puts a caller's question to the search and words the answer. */
final class PlanQuestion {

  private static final double SAME = 1e-12;

  private final PlanModel model;
  private final Map<String, Double> standing;
  private final Budget budget;
  private final double gap;

  PlanQuestion(PlanModel model, Map<String, Double> standing, Budget budget, double gap) {
    this.model = model;
    this.standing = standing;
    this.budget = budget;
    this.gap = gap;
  }

  /** The resource that a question means that names none. */
  String onlyResource(String question) {
    if (model.resources().size() > 1) {
      throw new IllegalArgumentException(
          question
              + ": there are several resources, "
              + PlanCheck.listed(model.resources())
              + "; name the one that is meant, or give an amount for each");
    }
    return model.resources().get(0);
  }

  private int number(String resource) {
    int number = model.resources().indexOf(resource);
    if (number < 0) {
      throw new IllegalArgumentException(
          "unknown resource "
              + PlanCheck.quoted(resource)
              + "; the resources are "
              + PlanCheck.listed(model.resources())
              + "; name one of these");
    }
    return number;
  }

  private long[] limits(Map<String, Double> amounts) {
    long[] limits = new long[model.resources().size()];
    Arrays.fill(limits, PlanCosts.MOST);
    limit(limits, standing);
    limit(limits, amounts);
    return limits;
  }

  private void limit(long[] limits, Map<String, Double> amounts) {
    amounts.forEach(
        (resource, amount) -> {
          int r = number(PlanCheck.notNull(resource, "a resource"));
          String what = "the budget of " + PlanCheck.quoted(resource);
          PlanCheck.amount(PlanCheck.notNull(amount, what), what);
          limits[r] = Math.min(limits[r], model.costs().get(r).limit(amount));
        });
  }

  /** Without the costs of what is not limited, but for some resource; others go free. */
  private PlanModel priced(long[] limits, int resource) {
    boolean[] free = new boolean[limits.length];
    boolean any = false;
    for (int r = 0; r < limits.length; r++) {
      free[r] = limits[r] == PlanCosts.MOST && r != resource;
      any |= free[r];
    }
    if (!any) {
      return model;
    }
    List<PlanItem> items = new ArrayList<>();
    for (PlanItem item : model.items()) {
      long[] cost = item.cost().clone();
      for (int r = 0; r < cost.length; r++) {
        cost[r] = free[r] ? 0 : cost[r];
      }
      items.add(new PlanItem(item.name(), cost, item.effects()));
    }
    return new PlanModel(
        model.system(),
        model.working(),
        model.failing(),
        ImmutableList.copyOf(items),
        model.limits(),
        model.resources(),
        model.costs());
  }

  ImprovementResult best(Map<String, Double> amounts) {
    long[] limits = limits(amounts);
    int first = amounts.isEmpty() ? 0 : number(amounts.keySet().stream().sorted().toList().get(0));
    boolean unlimited = Arrays.stream(limits).allMatch(limit -> limit == PlanCosts.MOST);
    PlanModel searched = unlimited ? model : priced(limits, -1);
    PlanSearch.Answer answer = PlanSearch.find(searched, PlanGoal.best(limits), gap, budget);
    return result(
        "best plan " + within(limits),
        answer,
        model.resources().get(first),
        answer.plan().fails(),
        Math.exp(answer.bound()));
  }

  ImprovementResult cheapest(Probability target, String resource) {
    int r = number(resource);
    long[] limits = limits(Map.of());
    double rank = PlanLabels.rank(target.working(), target.failing());
    double log = Math.log(target.failing()) + SAME;
    PlanGoal goal = PlanGoal.cheapest(limits, r, rank, log);
    PlanModel searched = priced(limits, r);
    PlanSearch.Answer answer;
    try {
      answer = PlanSearch.find(searched, goal, gap, budget);
    } catch (PlanUnreachedException unreached) {
      PlanSearch.Answer best = PlanSearch.find(searched, PlanGoal.best(limits), gap, budget);
      throw new IllegalArgumentException(
          "the target "
              + target
              + " cannot be reached; the best "
              + within(limits)
              + " is working "
              + best.plan().works()
              + ", failing "
              + best.plan().fails()
              + ". Give a lower target, better options or wider limits",
          unreached);
    }
    return result(
        "cheapest plan with failing at most " + target.failing() + ", " + within(limits),
        answer,
        resource,
        model.costs().get(r).amount(answer.plan().cost()[r]),
        model.costs().get(r).amount((long) Math.floor(answer.bound())));
  }

  ImprovementFrontier frontier(String resource) {
    int r = number(resource);
    long[] limits = limits(Map.of());
    List<PlanFound> found =
        new ArrayList<>(
            PlanSearch.frontier(priced(limits, r), PlanGoal.frontier(limits, r), gap, budget));
    found.sort(
        Comparator.comparingLong((PlanFound plan) -> plan.cost()[r])
            .thenComparingDouble(PlanFound::rank)
            .thenComparing(PlanFound::cost, Arrays::compare));
    Evaluator evaluator = model.system().evaluator();
    List<ImprovementFrontier.Point> points = new ArrayList<>();
    double best = Double.POSITIVE_INFINITY;
    for (PlanFound plan : found) {
      double rank = plan.rank();
      if (points.isEmpty() || (rank < best && !PlanLabels.sameRank(rank, best))) {
        best = rank;
        points.add(
            new ImprovementFrontier.Point(
                names(plan.chosen()),
                costs(plan.chosen()),
                model.reliability(evaluator, plan.chosen())));
      }
    }
    return new ImprovementFrontier(resource, points);
  }

  private ImprovementResult result(
      String question, PlanSearch.Answer answer, String resource, double value, double bound) {
    BitSet chosen = answer.plan().chosen();
    return new ImprovementResult(
        question,
        names(chosen),
        costs(chosen),
        model.reliability(model.system().evaluator(), chosen),
        PlanExplanation.of(model, chosen, resource, budget.start("explaining a plan")),
        resource,
        answer.proved(),
        value,
        bound);
  }

  private List<String> names(BitSet chosen) {
    return chosen.stream().mapToObj(item -> model.items().get(item).name()).toList();
  }

  private Map<String, Double> costs(BitSet chosen) {
    long[] cost = model.cost(chosen);
    Map<String, Double> costs = new LinkedHashMap<>();
    for (int r = 0; r < cost.length; r++) {
      costs.put(model.resources().get(r), model.costs().get(r).amount(cost[r]));
    }
    return costs;
  }

  private String within(long[] limits) {
    List<String> parts = new ArrayList<>();
    for (int r = 0; r < limits.length; r++) {
      if (limits[r] != PlanCosts.MOST) {
        String amount = PlanTable.amount(model.costs().get(r).amount(limits[r]));
        parts.add(model.resources().get(r) + " " + amount);
      }
    }
    return parts.isEmpty() ? "at any cost" : "within " + String.join(", ", parts);
  }
}
