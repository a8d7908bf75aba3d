package org.kingbolt.bounds;

import java.util.Objects;
import java.util.function.Predicate;
import org.jspecify.annotations.Nullable;
import org.kingbolt.core.Budget;
import org.kingbolt.core.CoherentSystem;
import org.kingbolt.core.Probabilities;
import org.kingbolt.core.Structure;

/**
 * Bounds on one system's reliability at given probabilities of its components.
 *
 * <p>Both ends are computed on both sides by sums and products of non-negative terms and rounded
 * outwards, so that an end at 1e-18 keeps its digits and rounding never takes the exact figure out
 * of the interval.
 *
 * <p>Which contains which: by modules lies within Esary–Proschan (Bodin 1970); min–max and linear
 * programming lie within Fréchet; second order lies within inclusion–exclusion of order 2. Of
 * min–max and Esary–Proschan neither always contains the other: from below, Esary–Proschan is
 * tighter where every cut has two members or more and components are good enough, min–max where the
 * cuts are more than the members of the smallest path and components are bad enough; from above the
 * same with paths and cuts exchanged (Barlow &amp; Proschan 1975, ch. 2). A series system attains
 * the lower ends of both, a parallel system the upper ends.
 *
 * <p>Immutable; safe to share between threads.
 */
public final class BoundsAtProbabilities {

  private final Structure structure;
  private final Probabilities p;
  private final ComponentValues values;

  private final SystemFamilies families;

  BoundsAtProbabilities(Structure structure, @Nullable CoherentSystem system, Probabilities p) {
    this.structure = structure;
    this.p = p;
    this.values =
        new ComponentValues(structure.components(), p.forComponents(structure.components()));
    this.families = new SystemFamilies(structure, system, values);
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
    return CertifiedInterval.of(structure, p, budget, relativeWidth, goOn, values.slack());
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
    return SimulationPlan.run(structure, p, simulation, families::compiled);
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
   * <p>Where one family is too large for the budget its end is trivial, and the reason says so.
   *
   * <p>Source: Esary &amp; Proschan, Coherent structures of non-identical components, Technometrics
   * 5 (1963) 191.
   *
   * @param budget how much work each family may cost; every minimal set counts as a node
   * @return the interval. Cost: linear in the total size of all minimal path and cut sets.
   * @throws org.kingbolt.core.BudgetExceededException if the budget is used up by both families
   */
  public Interval esaryProschan(Budget budget) {
    return EsaryProschan.of(families.all(budget), budget, new Effort());
  }

  /**
   * Esary–Proschan bounds by modules within {@link Budget#ofHeap()}.
   *
   * @return the interval; see {@link #modular(Budget)}
   * @throws org.kingbolt.core.BudgetExceededException if a module has too many minimal sets
   */
  public Interval modular() {
    return modular(Budget.ofHeap());
  }

  /**
   * Esary–Proschan bounds of every module, put together by those of the structure that is left when
   * each module stands as one component. Never wider than the flat bounds, up to rounding, and for
   * nested gates within reach where those are not: the sets of the whole are never listed.
   *
   * <p>Holds for independent components. (Min–max and Fréchet bounds do not gain from modules: the
   * best path of the whole is made of best paths of the modules.)
   *
   * <p>Source: Bodin, Approximations to system reliability using a modular decomposition,
   * Technometrics 12 (1970) 335 (from memory).
   *
   * @param budget how much work each module may cost
   * @return the interval. Cost: linear in the total size of the modules' own minimal sets.
   * @throws org.kingbolt.core.BudgetExceededException if the budget is used up
   */
  public Interval modular(Budget budget) {
    requireBudget(budget);
    return Modular.of(structure, values, () -> families.all(budget), budget, new Effort());
  }

  /**
   * Min–max bounds within {@link Budget#ofHeap()}.
   *
   * @return the interval; see {@link #minMax(Budget)}
   * @throws org.kingbolt.core.BudgetExceededException if the thread is interrupted
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
   * @return the interval. Cost: two scans of the diagram; no set is listed but the best. What
   *     cannot be compiled within the budget is given the same budget again to find some path and
   *     some cut instead, with which the interval holds, but is wider.
   * @throws org.kingbolt.core.BudgetExceededException if the budget is used up
   */
  public Interval minMax(Budget budget) {
    return MinMax.of(families.some(budget), budget, new Effort());
  }

  /**
   * Fréchet bounds within {@link Budget#ofHeap()}.
   *
   * @return the interval; see {@link #frechet(Budget)}
   * @throws org.kingbolt.core.BudgetExceededException if the thread is interrupted
   */
  public Interval frechet() {
    return frechet(Budget.ofHeap());
  }

  /**
   * Bounds that hold whatever the dependence: the system fails at most as often as the sum of q
   * over a path set, and works at most as often as the sum of p over a cut set; the best sets are
   * taken. (The sum over all cut sets of the smallest q in each is never better: those members
   * together hold a path.) Best possible for two-terminal networks with one component a link, by
   * the max-flow min-cut theorem; see {@link #linearProgramming(Budget)} for the others.
   *
   * <p>Source: Fréchet, Généralisation du théorème des probabilités totales, Fund. Math. 25 (1935)
   * 379 (from memory).
   *
   * @param budget how much work it may cost
   * @return the interval. Cost: two scans of the diagram. What cannot be compiled within the budget
   *     is given the same budget again to find some path and some cut instead, with which the
   *     interval holds, but is wider.
   * @throws org.kingbolt.core.BudgetExceededException if the budget is used up
   */
  public Interval frechet(Budget budget) {
    return Frechet.of(families.some(budget), budget, new Effort());
  }

  /**
   * The best possible bounds whatever the dependence, within {@link Budget#ofHeap()}.
   *
   * @return the interval; see {@link #linearProgramming(Budget)}
   * @throws org.kingbolt.core.BudgetExceededException if the work grows too large
   */
  public Interval linearProgramming() {
    return linearProgramming(Budget.ofHeap());
  }

  /**
   * The best possible bounds whatever the dependence: the least and the most reliability of any
   * joint distribution in which each component has its own probability, as a linear program.
   *
   * <p>Of the 2^n states only those count in which one minimal set has failed, or works, and
   * nothing else, and of these as many as the solution needs; so the number of components is not
   * limited, but more than a few dozen should be given a budget of time. The interval holds however
   * imprecise the solver is; the reason says whether both ends are attained, to 1e-9 of themselves.
   *
   * <p>Source: Hailperin, Best possible inequalities for the probability of a logical function of
   * events, Amer. Math. Monthly 72 (1965) 343 (from memory).
   *
   * @param budget how much work it may cost
   * @return the interval. Cost: a linear program and a scan of the diagram for every set used.
   * @throws org.kingbolt.core.BudgetExceededException if the budget is used up; {@link
   *     #frechet(Budget)} costs less
   */
  public Interval linearProgramming(Budget budget) {
    return LinearProgram.of(families.all(budget), budget, new Effort());
  }

  /**
   * Inclusion–exclusion cut off at an order, within {@link Budget#ofHeap()}.
   *
   * @param order how many sets are taken together at most, at least 1
   * @return the interval; see {@link #inclusionExclusion(int, Budget)}
   * @throws IllegalArgumentException if the order is less than 1
   * @throws org.kingbolt.core.BudgetExceededException if there are too many terms
   */
  public Interval inclusionExclusion(int order) {
    return inclusionExclusion(order, Budget.ofHeap());
  }

  /**
   * Inclusion–exclusion over the minimal cut sets and over the minimal path sets, cut off at an
   * order: sums of odd order are no smaller, and sums of even order no larger, than the probability
   * that any set occurs. Of all orders up to the one given the best of each kind is taken, of both
   * families the better end, and where one family is too large for the budget the other stands
   * alone. A sum below 0 or above 1 says nothing; 0 or 1 stands in its place, and the reason says
   * so.
   *
   * <p>Holds for independent components. Exact, up to rounding, when the order reaches the number
   * of sets. Rounding of alternating sums is counted in full.
   *
   * <p>Source: Bonferroni 1936; Feller, An Introduction to Probability Theory and Its Applications,
   * vol. 1, ch. IV (from memory).
   *
   * @param order how many sets are taken together at most, at least 1
   * @param budget how much work each family may cost; every term counts as a node
   * @return the interval. Cost: linear in the number of choices of up to {@code order} sets.
   * @throws IllegalArgumentException if the order is less than 1
   * @throws org.kingbolt.core.BudgetExceededException if the budget is used up by both families
   */
  public Interval inclusionExclusion(int order, Budget budget) {
    return Closed.inclusionExclusion(order, families.all(budget), budget, new Effort());
  }

  /**
   * Second-order bounds within {@link Budget#ofHeap()}.
   *
   * @return the interval; see {@link #secondOrder(Budget)}
   * @throws org.kingbolt.core.BudgetExceededException if there are too many pairs of sets
   */
  public Interval secondOrder() {
    return secondOrder(Budget.ofHeap());
  }

  /**
   * The best bounds from pairs of minimal sets, for independent components: any set occurs at most
   * as often as all of them in sum less the pairs along the best tree, and at least as often as
   * {@code 2/(k+1)} times the sum less {@code 2/(k(k+1))} times all pairs, for the best k. Over cut
   * sets and over path sets, of which the better end is taken; where one family is too large the
   * other stands alone. The bound of Kounias (1968) from above is that of a tree that is a star,
   * and so never better.
   *
   * <p>Sources: Hunter, J. Appl. Probab. 13 (1976) 597; Worsley, Biometrika 69 (1982) 297; Dawson
   * &amp; Sankoff, Proc. Amer. Math. Soc. 18 (1967) 504 (from memory).
   *
   * @param budget how much work each family may cost; every pair of sets counts as a node
   * @return the interval. Cost: quadratic in the number of sets.
   * @throws org.kingbolt.core.BudgetExceededException if the budget is used up by both families
   */
  public Interval secondOrder(Budget budget) {
    return Closed.secondOrder(families.all(budget), budget, new Effort());
  }

  /**
   * Delta–star replacement within {@link Budget#ofHeap()}.
   *
   * @return the approximation; see {@link #deltaStar(Budget)}
   * @throws IllegalArgumentException if the structure is no network of links between two nodes
   */
  public Approximation deltaStar() {
    return deltaStar(Budget.ofHeap());
  }

  /**
   * The old hand method for networks of independent links: series and parallel links are joined,
   * three links in a delta are replaced by a star that joins every two of its corners equally
   * often, and stars by deltas, until one link is left. The result is approximate: a delta and its
   * star differ in how often all three corners are joined. Kept because reviewers still meet it;
   * the certified interval stands beside it.
   *
   * <p>Source: Gadani, System effectiveness evaluation using star and delta transformations, IEEE
   * Trans. Reliab. 30 (1981) 43 (from memory).
   *
   * @param budget how much work the replacements, and then the interval, may cost
   * @return the approximate figure with {@link #within(Budget)} beside it
   * @throws IllegalArgumentException if the structure is no network of links between two nodes, or
   *     a component stands in more than one link, or replacements do not take the network apart
   * @throws org.kingbolt.core.BudgetExceededException if the budget is used up by the replacements,
   *     or the thread is interrupted
   */
  public Approximation deltaStar(Budget budget) {
    requireBudget(budget);
    return DeltaStar.of(structure, p, budget, () -> within(budget));
  }

  /**
   * All intervals, each within a million nodes.
   *
   * @return the table; see {@link #all(Budget)}
   * @throws org.kingbolt.core.BudgetExceededException if the thread is interrupted
   */
  public BoundsTable all() {
    return all(BoundsTable.usualBudget());
  }

  /**
   * The intervals of every method that applies, the tightest last, with assumption, reason and
   * cost; methods that use up the budget are listed with why.
   *
   * @param budget how much work each method may cost; compiling counts as one of them
   * @return the table
   * @throws org.kingbolt.core.BudgetExceededException if the thread is interrupted
   */
  public BoundsTable all(Budget budget) {
    requireBudget(budget);
    return families.table(
        budget,
        (given, effort) ->
            within(
                given,
                0,
                interval -> {
                  effort.add(1);
                  return true;
                }));
  }

  static void requireBudget(Budget budget) {
    Objects.requireNonNull(budget, "budget is null; give one, such as Budget.ofHeap()");
  }

  /**
   * Says what this is and what to call on it.
   *
   * @return one line
   */
  @Override
  public String toString() {
    return "Bounds["
        + values.size()
        + " components] at given probabilities; call all() or within(budget)";
  }
}
