package org.kingbolt.importance;

import java.util.Map;
import java.util.Objects;
import org.apache.commons.math3.distribution.RealDistribution;
import org.apache.commons.math3.fraction.BigFraction;
import org.kingbolt.core.Budget;
import org.kingbolt.core.CoherentSystem;
import org.kingbolt.core.Probabilities;
import org.kingbolt.core.Structure;

/**
 * Where importance measures begin: {@code Importance.of(system).given(p).birnbaum()}.
 *
 * <p>Immutable; safe to share between threads.
 */
public final class Importance {

  private final CoherentSystem system;

  private Importance(CoherentSystem system) {
    this.system = system;
  }

  /**
   * Importance in a structure, which is compiled within the default budget.
   *
   * @param structure the system's structure
   * @return a start for questions
   * @throws org.kingbolt.core.BudgetExceededException if the structure is too large to compile
   */
  public static Importance of(Structure structure) {
    return of(
        Objects.requireNonNull(
                structure, "structure is null; give a structure, or a system compiled from one")
            .compile());
  }

  /**
   * Importance in a compiled system.
   *
   * @param system the system
   * @return a start for questions
   */
  public static Importance of(CoherentSystem system) {
    return new Importance(
        Objects.requireNonNull(
            system, "system is null; give a compiled system, or a structure to compile"));
  }

  /**
   * Birnbaum structural importance: the share of the states of the other components in which this
   * component decides whether the system works.
   *
   * <p>Source: Birnbaum, On the importance of different components in a multicomponent system, in
   * Multivariate Analysis II, 1969, 581. Equal to the Birnbaum importance with all probabilities
   * one half. Needs no probabilities.
   *
   * @return from 0, for irrelevant components, to 1. Cost: two scans of the diagram.
   */
  public Ranking structural() {
    return Ranking.of(
        "Birnbaum structural importance",
        system.components(),
        system.evaluation(Probabilities.all(0.5)).derivatives());
  }

  /**
   * Barlow-Proschan structural importance: the probability that the component's failure is the one
   * that stops the system, when all lifetimes are independent and alike. Equal to the integral of
   * the Birnbaum importance over a common probability from 0 to 1, and to the share of the orders
   * of failure in which this component's failure is the decisive one.
   *
   * <p>Source: Barlow &amp; Proschan, Importance of system components and fault tree events,
   * Stochastic Processes Appl. 3 (1975) 153. Needs no probabilities.
   *
   * @return from 0 to 1, adding up to 1, a group's being the sum; exact but for rounding. Cost: for
   *     n components, n / 2 passes, by a quadrature that is exact for polynomials of their degree.
   * @throws org.kingbolt.core.BudgetExceededException if the thread is interrupted
   */
  public Ranking barlowProschan() {
    return Ranking.ofParts(
        "Barlow-Proschan structural importance",
        system.components(),
        AlikeLifetimes.rounded(system, Budget.ofHeap()));
  }

  /**
   * The values of {@link #barlowProschan()} as exact fractions.
   *
   * @return by component, in the system's order, adding up to exactly 1; unmodifiable. Cost: for
   *     each component two conditioned diagrams and counts of their states in big integers.
   * @throws org.kingbolt.core.BudgetExceededException if the counts grow too large
   */
  public Map<String, BigFraction> barlowProschanFractions() {
    return AlikeLifetimes.exact(system, Budget.ofHeap());
  }

  /**
   * Barlow-Proschan importance: the probability that the component's failure is the one that stops
   * the system, {@code integral of B_i(R(t)) dF_i(t)} over all times, where R holds the components'
   * survival probabilities at time t. Source: as {@link #barlowProschan()}.
   *
   * <p>Integrated over the logarithm of time by an adaptive rule, until on every piece two rules
   * agree and the values add up to what the system's reliability loses there, as they must; what
   * lies before and after is less than 1e-12. The sum is checked to be 1 within 1e-9.
   *
   * @param lifetimes by component: independent lifetimes above 0 with a density and no jumps; may
   *     name more components
   * @return from 0 to 1, adding up to 1 within 1e-9. Cost: some hundred passes.
   * @throws IllegalArgumentException if a component has no lifetime, or one that can be 0, jumps,
   *     or has no finite density
   * @throws org.kingbolt.core.BudgetExceededException if the thread is interrupted
   */
  public Ranking barlowProschan(Map<String, ? extends RealDistribution> lifetimes) {
    return Ranking.ofParts(
        "Barlow-Proschan importance",
        system.components(),
        new LifetimeImportance(system, lifetimes, Budget.ofHeap()).barlowProschan());
  }

  /**
   * Natvig's importance in its simplest form: the component's share in the expected gains of system
   * lifetime if each component's failure were repaired once, minimally (as good as just before):
   * {@code integral of S_i(t) (-ln S_i(t)) B_i(R(t)) dt} over the sum of these, where S_i is the
   * component's survival probability.
   *
   * <p>Source: Natvig, A suggestion of a new measure of importance of system components, Stochastic
   * Processes Appl. 9 (1979) 319; in this form: New light on measures of importance of system
   * components, Scand. J. Statist. 12 (1985) 43 (from memory).
   *
   * @param lifetimes by component: independent lifetimes above 0 without jumps, with finite means;
   *     may name more components
   * @return from 0 to 1, adding up to 1; right to about 1e-9, by the rule of {@link
   *     #barlowProschan(Map)}. Cost: some hundred passes.
   * @throws IllegalArgumentException if a component has no lifetime, or one that can be 0, or the
   *     means are not finite or hang on times that are survived with less than 1e-12
   * @throws org.kingbolt.core.BudgetExceededException if the thread is interrupted
   */
  public Ranking natvig(Map<String, ? extends RealDistribution> lifetimes) {
    return Ranking.ofParts(
        "Natvig importance",
        system.components(),
        new LifetimeImportance(system, lifetimes, Budget.ofHeap()).natvig());
  }

  /**
   * Fixes the components' probabilities.
   *
   * @param p the probability of each component; a register may name more
   * @return the measures at these probabilities
   * @throws IllegalArgumentException if components have no probability; the message lists them
   */
  public ImportanceAtProbabilities given(Probabilities p) {
    Objects.requireNonNull(
            p,
            "probabilities are null; give those of all components, such as Probabilities.all(0.9)")
        .forComponents(system.components());
    return new ImportanceAtProbabilities(system, p);
  }

  /**
   * Says what this is and what to call on it.
   *
   * @return one line
   */
  @Override
  public String toString() {
    return "Importance["
        + system
        + "]; call structural() or barlowProschan(), or given(probabilities) first";
  }
}
