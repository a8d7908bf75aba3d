package org.kingbolt.bounds;

import org.kingbolt.core.Budget;

/**
 * Bounds from path sets and cut sets that the caller has, at given probabilities.
 *
 * <p>A family may be complete, or cut off with an upper bound on the probability that any of the
 * sets left out occurs, or cut off with nothing known, which is taken until said otherwise. Which
 * ends then still say something:
 *
 * <ul>
 *   <li>min–max and Fréchet: both, from any path set and any cut set;
 *   <li>inclusion–exclusion and second order: of cut sets the upper end, of path sets the lower
 *       end; the other ends only with a bound on what is left out;
 *   <li>Esary–Proschan and linear programming: none without a bound on what is left out. (The
 *       latter falls back on the Fréchet interval.)
 * </ul>
 *
 * <p>Sets need not be minimal, but bounds from non-minimal ones are wider.
 *
 * <p>Immutable; safe to share between threads.
 */
public final class SetBoundsAtProbabilities {

  private final GivenFamilies families;

  SetBoundsAtProbabilities(GivenFamilies families) {
    this.families = families;
  }

  /**
   * Says that both families are complete: every minimal path set and every minimal cut set is
   * there.
   *
   * @return bounds that rely on it
   * @throws IllegalArgumentException if there are no path sets or no cut sets
   */
  public SetBoundsAtProbabilities complete() {
    return discarding(0, 0);
  }

  /**
   * Says how probable the sets are that were left out.
   *
   * @param paths no smaller than the probability that the members of any path set left out all
   *     work: 0 for a complete family, 1 if nothing is known
   * @param cuts no smaller than the probability that the members of any cut set left out have all
   *     failed: 0 for a complete family, 1 if nothing is known
   * @return bounds that rely on it
   * @throws IllegalArgumentException if a number is NaN or outside [0, 1], or is 0 for a family
   *     without sets
   */
  public SetBoundsAtProbabilities discarding(double paths, double cuts) {
    require(paths, true);
    require(cuts, false);
    return new SetBoundsAtProbabilities(families.discarding(paths, cuts));
  }

  private void require(double discarded, boolean paths) {
    String what = paths ? "path sets" : "cut sets";
    if (!(discarded >= 0 && discarded <= 1)) {
      throw new IllegalArgumentException(
          "discarded probability of "
              + what
              + " is "
              + discarded
              + "; it must be a number from 0 to 1");
    }
    if (discarded == 0 && families.isEmpty(paths)) {
      throw new IllegalArgumentException(
          "there are no "
              + what
              + ", so they are not complete; call discarding with 1 for them, which says that"
              + " nothing is known");
    }
  }

  /**
   * Min–max bounds from these sets, for associated components. Both ends hold for families that are
   * cut off.
   *
   * @return the interval; see {@link BoundsAtProbabilities#minMax(Budget)}
   */
  public Interval minMax() {
    return MinMax.of(families, Budget.ofHeap(), new Effort());
  }

  /**
   * Fréchet bounds from these sets, whatever the dependence. Both ends hold for families that are
   * cut off.
   *
   * @return the interval; see {@link BoundsAtProbabilities#frechet(Budget)}
   */
  public Interval frechet() {
    return Frechet.of(families, Budget.ofHeap(), new Effort());
  }

  /**
   * The best possible bounds whatever the dependence. The lower end needs all cut sets, the upper
   * end all path sets, or a bound on what is left out that holds whatever the dependence.
   *
   * @return the interval; see {@link BoundsAtProbabilities#linearProgramming(Budget)}
   * @throws org.kingbolt.core.BudgetExceededException if the program grows too large
   */
  public Interval linearProgramming() {
    return linearProgramming(Budget.ofHeap());
  }

  /**
   * The best possible bounds whatever the dependence.
   *
   * @param budget how much work it may cost
   * @return the interval; see {@link #linearProgramming()}
   * @throws org.kingbolt.core.BudgetExceededException if the budget is used up
   */
  public Interval linearProgramming(Budget budget) {
    BoundsAtProbabilities.requireBudget(budget);
    return LinearProgram.of(families, budget, new Effort());
  }

  /**
   * Esary–Proschan bounds, for independent components. The lower end needs all cut sets, the upper
   * end all path sets, or a bound on what is left out.
   *
   * @return the interval; see {@link BoundsAtProbabilities#esaryProschan(Budget)}
   */
  public Interval esaryProschan() {
    return EsaryProschan.of(families, Budget.ofHeap(), new Effort());
  }

  /**
   * Inclusion–exclusion cut off at an order, for independent components. Sums of even order hold
   * for families that are cut off; those of odd order need a bound on what is left out.
   *
   * @param order how many sets are taken together at most, at least 1
   * @return the interval; see {@link BoundsAtProbabilities#inclusionExclusion(int, Budget)}
   * @throws IllegalArgumentException if the order is less than 1
   * @throws org.kingbolt.core.BudgetExceededException if there are too many terms
   */
  public Interval inclusionExclusion(int order) {
    return inclusionExclusion(order, Budget.ofHeap());
  }

  /**
   * Inclusion–exclusion cut off at an order, for independent components.
   *
   * @param order how many sets are taken together at most, at least 1
   * @param budget how much work each family may cost
   * @return the interval; see {@link #inclusionExclusion(int)}
   * @throws IllegalArgumentException if the order is less than 1
   * @throws org.kingbolt.core.BudgetExceededException if the budget is used up by both families
   */
  public Interval inclusionExclusion(int order, Budget budget) {
    BoundsAtProbabilities.requireBudget(budget);
    return Closed.inclusionExclusion(order, families, budget, new Effort());
  }

  /**
   * Second-order bounds, for independent components. Dawson and Sankoff's hold for families that
   * are cut off; Hunter's and Worsley's need a bound on what is left out.
   *
   * @return the interval; see {@link BoundsAtProbabilities#secondOrder(Budget)}
   * @throws org.kingbolt.core.BudgetExceededException if there are too many pairs of sets
   */
  public Interval secondOrder() {
    return secondOrder(Budget.ofHeap());
  }

  /**
   * Second-order bounds, for independent components.
   *
   * @param budget how much work each family may cost
   * @return the interval; see {@link #secondOrder()}
   * @throws org.kingbolt.core.BudgetExceededException if the budget is used up by both families
   */
  public Interval secondOrder(Budget budget) {
    BoundsAtProbabilities.requireBudget(budget);
    return Closed.secondOrder(families, budget, new Effort());
  }

  /**
   * The intervals of every method that applies to sets, the tightest last.
   *
   * @param budget how much work each method may cost
   * @return the table; see {@link BoundsAtProbabilities#all(Budget)}
   * @throws org.kingbolt.core.BudgetExceededException if the thread is interrupted
   */
  public BoundsTable all(Budget budget) {
    BoundsAtProbabilities.requireBudget(budget);
    return BoundsTable.of(Closed.methods(families), budget);
  }

  /**
   * Says what this is and what to call on it.
   *
   * @return one line
   */
  @Override
  public String toString() {
    return "SetBounds at given probabilities; call all(budget), minMax() or frechet()";
  }
}
