package org.kingbolt.bounds;

import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.Objects;
import java.util.Set;
import java.util.function.Predicate;
import org.jspecify.annotations.Nullable;
import org.kingbolt.core.Budget;
import org.kingbolt.core.CoherentSystem;
import org.kingbolt.core.MinimalSets;
import org.kingbolt.core.Probabilities;
import org.kingbolt.core.Probability;
import org.kingbolt.core.Structure;
import org.kingbolt.core.diagram.WorkMeter;

/**
 * Bounds on one system's reliability at given probabilities of its components.
 *
 * <p>Both ends are computed on both sides by sums and products of non-negative terms and rounded
 * outwards, so that an end at 1e-18 keeps its digits and rounding never takes the exact figure out
 * of the interval.
 *
 * <p>Immutable; safe to share between threads.
 */
public final class BoundsAtProbabilities {

  private final Structure structure;
  private final List<String> components;
  private final Probabilities p;

  /** Compiled when first needed; two threads may both do it. */
  private volatile @Nullable CoherentSystem system;

  private final Map<String, Probability> byName = new HashMap<>();

  BoundsAtProbabilities(Structure structure, @Nullable CoherentSystem system, Probabilities p) {
    this.structure = structure;
    this.system = system;
    this.components = structure.components();
    this.p = p;
    List<Probability> values = p.forComponents(components);
    for (int i = 0; i < values.size(); i++) {
      byName.put(components.get(i), values.get(i));
    }
  }

  private CoherentSystem compiled(Budget budget) {
    CoherentSystem known = system;
    if (known == null) {
      known = structure.compile(budget);
      system = known;
    }
    return known;
  }

  /**
   * An interval on the exact figure, however large the structure is, as narrow as the budget
   * allows; see {@link #within(Budget, double, Predicate)}.
   *
   * @param budget how much work it may cost
   * @return the interval; both ends are the figure itself, up to rounding, where it can be worked
   *     out
   * @throws org.kingbolt.core.BudgetExceededException if the thread is interrupted
   */
  public Interval within(Budget budget) {
    return within(budget, 0, interval -> true);
  }

  /**
   * An interval on the exact figure, no narrower than asked for; see {@link #within(Budget, double,
   * Predicate)}.
   *
   * @param budget how much work it may cost
   * @param relativeWidth the {@link Interval#relativeWidthFailing()} that is enough, at least 0
   * @return the interval; wider than asked for when the budget is used up
   * @throws IllegalArgumentException if the width is negative or not a number
   * @throws org.kingbolt.core.BudgetExceededException if the thread is interrupted
   */
  public Interval within(Budget budget, double relativeWidth) {
    return within(budget, relativeWidth, interval -> true);
  }

  /**
   * An interval on the exact figure, narrowed step by step until it is as narrow as asked for, the
   * caller has seen enough, or the budget is used up.
   *
   * <p>Holds for independent components. What can be worked out exactly is. A network too wide for
   * that is replaced by networks that work less often and by others that work more often: excerpts
   * with some links held failed, or working, which grow where their partial derivatives differ
   * most; or the likeliest states of a sweep, with the others counted as failed, or as working.
   * Gates with too much sharing are bounded from their factors, which are associated. With a budget
   * of nodes alone the outcome does not depend on the machine's speed.
   *
   * <p>Example: {@code Bounds.of(grid).given(p).within(Budget.ofTime(Duration.ofSeconds(10)), 0.01,
   * interval -> true)}.
   *
   * @param budget how much work it may cost
   * @param relativeWidth the {@link Interval#relativeWidthFailing()} that is enough, at least 0
   * @param goOn is shown every interval, each inside the one before; false ends the work
   * @return the last interval
   * @throws IllegalArgumentException if the width is negative or not a number
   * @throws org.kingbolt.core.BudgetExceededException if the thread is interrupted
   */
  public Interval within(Budget budget, double relativeWidth, Predicate<Interval> goOn) {
    requireBudget(budget);
    Objects.requireNonNull(goOn, "the watcher is null; give one, such as interval -> true");
    if (!(relativeWidth >= 0)) {
      throw new IllegalArgumentException(
          "relative width " + relativeWidth + "; give 0 or more, such as 0.01 for one percent");
    }
    return CertifiedInterval.of(structure, p, budget, relativeWidth, goOn, slack());
  }

  /**
   * A statistical estimate by simulation, with a confidence interval, where no certified interval
   * is narrow enough; see {@link Simulation.Method} for the methods.
   *
   * <p>Holds for independent components. The interval is the exact binomial one of Clopper &amp;
   * Pearson (1934) for a share of random states, times a factor that is worked out, and how many
   * states are drawn is decided so that its confidence is kept.
   *
   * <p>Example: {@code Bounds.of(grid).given(p).simulate(Simulation.toRelativeError(0.01))}.
   *
   * @param simulation when to stop, and how to draw
   * @return the estimate. Cost: the preparation, within the simulation's own budget, and for every
   *     sample the structure function once.
   * @throws IllegalArgumentException if a cut set that the simulation was given is none
   * @throws org.kingbolt.core.BudgetExceededException if the preparation of the method asked for
   *     does not fit its budget, or the thread is interrupted
   */
  public Estimate simulate(Simulation simulation) {
    Objects.requireNonNull(
        simulation, "simulation is null; give one, such as Simulation.toRelativeError(0.01)");
    return SimulationPlan.run(structure, p, simulation, this::compiled);
  }

  /**
   * Esary–Proschan bounds within {@link Budget#ofHeap()}.
   *
   * @return the interval; see {@link #esaryProschan(Budget)}
   * @throws org.kingbolt.core.BudgetExceededException if there are too many minimal sets
   */
  public Interval esaryProschan() {
    return esaryProschan(Budget.ofHeap());
  }

  /**
   * Esary–Proschan bounds: at least the product over the minimal cut sets of {@code 1 - product of
   * q}, at most one minus the product over the minimal path sets of {@code 1 - product of p}.
   *
   * <p>Holds for independent components. (For components that are merely associated the
   * inequalities hold with the true probabilities of whole sets, which products of single
   * probabilities do not give.) Tight where the system is highly reliable or hardly reliable at
   * all; attained by series and parallel systems.
   *
   * <p>Source: Esary &amp; Proschan, Coherent structures of non-identical components, Technometrics
   * 5 (1963) 191.
   *
   * @param budget how much work it may cost; every minimal set counts as a node
   * @return the interval. Cost: linear in the total size of all minimal path and cut sets.
   * @throws org.kingbolt.core.BudgetExceededException if the budget is used up
   */
  public Interval esaryProschan(Budget budget) {
    requireBudget(budget);
    SetProduct cuts = combined(compiled(budget).minimalCutSets(budget), false, budget);
    SetProduct paths = combined(compiled(budget).minimalPathSets(budget), true, budget);
    return new Interval(
        Rounding.down(cuts.none(), cuts.any(), cuts.operations() + slack()),
        Rounding.up(paths.any(), paths.none(), paths.operations() + slack()),
        Assumption.INDEPENDENT,
        "Esary-Proschan",
        "with independent components the minimal cuts are at least as likely to hold all together,"
            + " and the minimal paths to fail all together, as if they shared no components");
  }

  /**
   * Min–max bounds within {@link Budget#ofHeap()}.
   *
   * @return the interval; see {@link #minMax(Budget)}
   * @throws org.kingbolt.core.BudgetExceededException if the minimal sets are too many to hold
   */
  public Interval minMax() {
    return minMax(Budget.ofHeap());
  }

  /**
   * Min–max bounds from single paths and cuts: at least the largest product of p over a minimal
   * path set, at most the smallest {@code 1 - product of q} over a minimal cut set.
   *
   * <p>Holds for associated components, independent ones among them: the system works whenever one
   * path does, and fails whenever one cut does, and the members of a set are at least as likely to
   * work (or to have failed) all together as independent ones would be.
   *
   * <p>Source: Barlow &amp; Proschan, Statistical Theory of Reliability and Life Testing, 1975, ch.
   * 2.
   *
   * @param budget how much work it may cost
   * @return the interval. Cost: the diagrams of minimal sets, of which only the best set is listed.
   * @throws org.kingbolt.core.BudgetExceededException if the budget is used up
   */
  public Interval minMax(Budget budget) {
    requireBudget(budget);
    SetProduct path = best(compiled(budget).minimalPathSets(budget), true, budget);
    SetProduct cut = best(compiled(budget).minimalCutSets(budget), false, budget);
    return new Interval(
        Rounding.down(path.any(), path.none(), path.operations() + slack()),
        Rounding.up(cut.none(), cut.any(), cut.operations() + slack()),
        Assumption.ASSOCIATED,
        "min-max",
        "with associated components the system works at least as often as its best path, and fails"
            + " at least as often as its worst cut, would with independent members");
  }

  private static void requireBudget(Budget budget) {
    Objects.requireNonNull(budget, "budget is null; give one, such as Budget.ofHeap()");
  }

  /** Operations in an exact evaluation, for whose rounding an interval must leave room, too. */
  private long slack() {
    return 4L * components.size();
  }

  private SetProduct combined(MinimalSets sets, boolean paths, Budget budget) {
    WorkMeter meter = budget.start("combining minimal sets");
    SetProduct product = new SetProduct();
    long count = 0;
    for (Set<String> set : sets) {
      meter.at(++count);
      add(product, set, paths);
    }
    return product;
  }

  private SetProduct best(MinimalSets sets, boolean paths, Budget budget) {
    SetProduct product = new SetProduct();
    for (Set<String> set : sets.mostProbable(1, p, budget)) {
      add(product, set, paths);
    }
    return product;
  }

  private void add(SetProduct product, Set<String> set, boolean paths) {
    product.begin();
    for (String name : set) {
      Probability value = Objects.requireNonNull(byName.get(name));
      product.member(
          paths ? value.working() : value.failing(), paths ? value.failing() : value.working());
    }
    product.end();
  }

  /**
   * Says what this is and what to call on it.
   *
   * @return one line
   */
  @Override
  public String toString() {
    return "Bounds["
        + components.size()
        + " components] at given probabilities; call within(budget), esaryProschan() or minMax()";
  }
}
