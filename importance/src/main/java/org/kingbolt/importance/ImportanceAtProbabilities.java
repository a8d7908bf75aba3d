package org.kingbolt.importance;

import com.google.common.base.Suppliers;
import java.util.Arrays;
import java.util.Collection;
import java.util.Map;
import java.util.Objects;
import java.util.function.Supplier;
import org.kingbolt.core.Budget;
import org.kingbolt.core.CoherentSystem;
import org.kingbolt.core.Probabilities;
import org.kingbolt.core.Probability;
import org.kingbolt.core.diagram.WorkMeter;

/**
 * Importance measures of one system's components at given probabilities.
 *
 * <p>In what follows r is the system's probability of working and F that of having failed; p_i and
 * q_i are those of a component, B_i its Birnbaum importance; {@code r(1_i)}, {@code r(0_i)}, {@code
 * F(1_i)} and {@code F(0_i)} are taken with the component certain to work, or to have failed. All
 * measures but the Fussell-Vesely, joint, group and cut-set ones come from one pass, which is made
 * when the first of them is asked for: one scan of the diagram up and one down, and another of each
 * for {@link #riskReductionWorth()}. Small values keep their digits.
 *
 * <p>Degenerate cases: a probability given something that never happens is 0; a ratio of 0 to 0 is
 * 1, and of anything else to 0 infinite. Components that never matter have the value that says so:
 * 0, or 1 for the two worths, or their own probability for the two diagnostic measures.
 *
 * <p>Assumes that components fail independently. Immutable; safe to share between threads.
 */
public final class ImportanceAtProbabilities {

  private final CoherentSystem system;
  private final Probabilities p;
  private final Supplier<FirstOrder> first;

  ImportanceAtProbabilities(CoherentSystem system, Probabilities p) {
    this.system = system;
    this.p = p;
    this.first = Suppliers.memoize(() -> FirstOrder.of(system, p));
  }

  /**
   * Birnbaum importance: the probability that the component decides, {@code r(1_i) - r(0_i)}, which
   * is the partial derivative of the reliability with respect to the component's own.
   *
   * <p>Source: Birnbaum, On the importance of different components in a multicomponent system, in
   * Multivariate Analysis II, 1969, 581. Shares of their sum are {@link #differentialUniform()}.
   *
   * @return from 0, for irrelevant components, to 1, with every digit. Cost: two scans, about three
   *     evaluations; where some value is less than about 1e-14 of the smaller side of the system,
   *     or 0 though the component can matter, pairs of nodes are followed down as in {@link
   *     org.kingbolt.core.diagram.Evaluation#derivatives()}, which may take hundreds of scans.
   */
  public Ranking birnbaum() {
    return ranking("Birnbaum importance", FirstOrder::derivatives);
  }

  /**
   * Criticality importance, system failing: {@code q_i B_i / F}, the probability that the component
   * has failed and is critical, so that its repair brings the system back, given that the system
   * has failed. Also called the risk reduction ratio, {@code (F - F(1_i)) / F}.
   *
   * <p>Source: Lambert, Measures of importance of events and cut sets in fault trees, in
   * Reliability and Fault Tree Analysis, SIAM, 1975, 77 (from memory).
   *
   * @return from 0 to 1, at most {@link #fussellVesely()}; 0 where F is 0
   */
  public Ranking criticalityFailing() {
    return parts("criticality, system failing", Measures::criticalityFailing);
  }

  /**
   * Criticality importance, system working: {@code p_i B_i / r}, the probability that the component
   * works and is critical, so that its failure stops the system, given that the system works.
   *
   * @return from 0 to 1; 0 where r is 0
   */
  public Ranking criticalityWorking() {
    return parts("criticality, system working", Measures::criticalityWorking);
  }

  /**
   * Fussell-Vesely importance within {@link Budget#ofHeap()}; see {@link #fussellVesely(Budget)}.
   *
   * @return from 0 to 1
   * @throws org.kingbolt.core.BudgetExceededException if the events grow too large
   */
  public Ranking fussellVesely() {
    return fussellVesely(Budget.ofHeap());
  }

  /**
   * Fussell-Vesely importance, exactly: the probability that at least one minimal cut set that
   * contains the component has failed altogether, given that the system has failed.
   *
   * <p>For each component the event is built as a decision diagram, as the union of the cut sets
   * that contain it, bottom-up over the diagram of all minimal cut sets, and evaluated as a sum of
   * non-negative terms. Cost: for every component at least a scan of the cut sets' diagram, which
   * for n components in series or parallel is the square of n. For meshed systems the diagrams may
   * outgrow any memory: {@link #fussellVeselyRareEvent()} is far cheaper.
   *
   * <p>Source: Fussell, How to hand-calculate system reliability and safety characteristics, IEEE
   * Trans. Reliab. 24 (1975) 169, after Vesely (from memory).
   *
   * @param budget how much work it may cost
   * @return from 0 to 1, at least {@link #criticalityFailing()} and at most {@link
   *     #diagnosticFailing()}; 0 where F is 0
   * @throws org.kingbolt.core.BudgetExceededException if the budget is used up
   */
  public Ranking fussellVesely(Budget budget) {
    Objects.requireNonNull(budget, "budget is null; it must be given");
    return ranking("Fussell-Vesely importance", f -> FussellVesely.exact(system, f, budget));
  }

  /**
   * Fussell-Vesely importance as a ratio of sums: the sum of the probabilities of the minimal cut
   * sets that contain the component over that of all. Close to {@link #fussellVesely()} where
   * failures are rare, since then two cut sets hardly fail together.
   *
   * @return from 0 to 1; 0 where no cut set can fail. Cost: finding the minimal cut sets, unlisted,
   *     and two scans of their diagram.
   * @throws org.kingbolt.core.BudgetExceededException if the diagram of the cut sets is too large
   */
  public Ranking fussellVeselyRareEvent() {
    return ranking(
        "Fussell-Vesely importance, rare events",
        f -> FussellVesely.rareEvent(system, f, Budget.ofHeap()));
  }

  /**
   * Risk achievement worth: {@code F(0_i) / F}, by how much failure grows if the component has
   * failed for certain.
   *
   * <p>Source: Vesely, Davis, Denning &amp; Saltos, Measures of risk importance and their
   * applications, NUREG/CR-3385, 1983 (from memory).
   *
   * @return from 1 up; where F is 0: 1 if F(0_i) is 0 too, and infinite if not
   */
  public Ranking riskAchievementWorth() {
    return ranking("risk achievement worth", Measures::riskAchievementWorth);
  }

  /**
   * Risk reduction worth: {@code F / F(1_i)}, by how much failure shrinks if the component is
   * certain to work. Source: as {@link #riskAchievementWorth()}.
   *
   * @return from 1 up; where F(1_i) is 0: 1 if F is 0 too, and infinite if not
   */
  public Ranking riskReductionWorth() {
    return ranking("risk reduction worth", Measures::riskReductionWorth);
  }

  /**
   * Improvement potential: {@code r(1_i) - r = q_i B_i}, what is gained if the component is made
   * certain to work. Source: Aven &amp; Jensen, Stochastic Models in Reliability, 1999 (from
   * memory).
   *
   * @return from 0 to 1
   */
  public Ranking improvementPotential() {
    return parts("improvement potential", Measures::improvementPotential);
  }

  /**
   * Differential importance measure for equal changes of all probabilities: {@code B_i / sum of
   * B_j}, the component's share in a small change of the reliability. Adds up: a group's is the
   * sum.
   *
   * <p>Source: Borgonovo &amp; Apostolakis, A new importance measure for risk-informed decision
   * making, Reliab. Eng. Syst. Saf. 72 (2001) 193, hypothesis H1 (from memory).
   *
   * @return from 0 to 1, adding up to 1, or all 0 where no component makes a difference
   */
  public Ranking differentialUniform() {
    return parts("differential importance, uniform", Measures::differentialUniform);
  }

  /**
   * Differential importance measure for changes in proportion to the failing probabilities: {@code
   * q_i B_i / sum of q_j B_j}. Source: as {@link #differentialUniform()}, hypothesis H2.
   *
   * @return from 0 to 1, adding up to 1, or all 0 where no component can be improved
   */
  public Ranking differentialProportional() {
    return parts("differential importance, proportional", Measures::differentialProportional);
  }

  /**
   * Diagnostic importance: {@code q_i F(0_i) / F}, the probability that the component has failed,
   * given that the system has; see {@link Diagnosis} for more that is known.
   *
   * @return from 0 to 1; 0 where F is 0
   */
  public Ranking diagnosticFailing() {
    return ranking("failed, given the system has", Measures::diagnosticFailing);
  }

  /**
   * The twin of {@link #diagnosticFailing()}: {@code p_i r(1_i) / r}, the probability that the
   * component works, given that the system does.
   *
   * @return from 0 to 1; 0 where r is 0
   */
  public Ranking diagnosticWorking() {
    return ranking("works, given the system does", Measures::diagnosticWorking);
  }

  /**
   * Joint importance of all pairs within {@link Budget#ofHeap()}.
   *
   * @return the values of all pairs; see {@link #jointImportance(Budget)}
   * @throws org.kingbolt.core.BudgetExceededException if the matrix is too large for the heap
   */
  public JointImportance jointImportance() {
    return jointImportance(Budget.ofHeap());
  }

  /**
   * Joint importance of all pairs: the second mixed derivatives of the reliability. Sources: see
   * {@link JointImportance}.
   *
   * @param budget how much work it may cost
   * @return from -1 to 1 for each pair. Cost: one scan of half the diagram for every component.
   * @throws org.kingbolt.core.BudgetExceededException if the budget is used up
   */
  public JointImportance jointImportance(Budget budget) {
    Objects.requireNonNull(budget, "budget is null; it must be given");
    WorkMeter meter = budget.start("working out the joint importance of all pairs");
    Gains given = Gains.of(system, p);
    int n = system.components().size();
    meter.now((long) n * n * Double.BYTES / 2 / WorkMeter.BYTES_PER_NODE);
    double[][] rows = new double[n][];
    Arrays.setAll(rows, i -> new double[n - i - 1]);
    MixedDerivatives mixed =
        new MixedDerivatives(system.diagram(), given.working(), given.failing(), meter);
    double[] row = new double[n];
    for (int i = 0; i < n; i++) {
      Arrays.fill(row, 0);
      mixed.row(i, row);
      for (int j = 0; j < n; j++) {
        if (row[j] != 0) {
          rows[Math.min(i, j)][Math.abs(i - j) - 1] = row[j];
        }
      }
    }
    return new JointImportance(system.components(), rows);
  }

  /**
   * The interaction of a set of components of any size: the mixed derivative of the reliability
   * with respect to all of them, which is Birnbaum importance for one, joint importance for two,
   * and for more the joint importance of order k (Gao, Cui &amp; Li, Analysis for joint importance
   * of components in a coherent system, Eur. J. Oper. Res. 182 (2007) 282, from memory).
   *
   * @param components at least one
   * @return the alternating sum over all states of the set. Cost: a few scans, whatever the size.
   * @throws IllegalArgumentException if there are none, or one is unknown or named twice
   */
  public double interaction(String... components) {
    Objects.requireNonNull(components, "components is null; name at least one");
    int[] set = Names.places(system.components(), Arrays.asList(components), "the set");
    Gains given = Gains.of(system, p);
    WorkMeter meter = Budget.ofHeap().start("working out an interaction");
    return new MixedDerivatives(system.diagram(), given.working(), given.failing(), meter).of(set);
  }

  /**
   * Splits a finite change of some probabilities into effects and interactions.
   *
   * @param changes the new probabilities of some components
   * @return first-order, total-order and interaction effects
   * @throws IllegalArgumentException if the system has no such component
   */
  public FiniteChange change(Map<String, Probability> changes) {
    return new FiniteChange(system, Gains.of(system, p), first.get(), changes);
  }

  /**
   * The most important minimal cut sets.
   *
   * @param n how many, at least 0; fewer are returned when there are not so many
   * @return most probable first, each with its probability given that the system has failed
   * @throws IllegalArgumentException if n is negative
   * @throws org.kingbolt.core.BudgetExceededException if the search grows too large for the heap
   */
  public CutSetImportance cutSets(int n) {
    return CutSetImportance.of(system.minimalCutSets(), n, p, first.get().fails());
  }

  /**
   * Importance of groups of components that are moved together.
   *
   * @param groups the components of each group, by the group's name; groups may overlap
   * @return the measures of the groups; in the map's order where they are tied
   * @throws IllegalArgumentException if there are no groups, or a group is empty, or names a
   *     component twice or one that the system does not have
   */
  public GroupImportance groups(Map<String, ? extends Collection<String>> groups) {
    return new GroupImportance(system, Gains.of(system, p), first.get(), groups);
  }

  private Ranking ranking(String name, Measure measure) {
    return Ranking.of(name, system.components(), measure.of(first.get()));
  }

  private Ranking parts(String name, Measure measure) {
    return Ranking.ofParts(name, system.components(), measure.of(first.get()));
  }

  private interface Measure {
    double[] of(FirstOrder first);
  }

  /**
   * Says what this is and what to call on it.
   *
   * @return one line
   */
  @Override
  public String toString() {
    return "Importance[" + system + "] at given probabilities; call birnbaum() or another measure";
  }
}
