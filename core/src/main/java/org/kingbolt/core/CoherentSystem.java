package org.kingbolt.core;

import com.google.common.collect.ImmutableList;
import java.io.InvalidObjectException;
import java.io.ObjectInputStream;
import java.io.Serializable;
import java.math.BigInteger;
import java.util.Arrays;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.stream.IntStream;
import org.kingbolt.core.diagram.Diagram;
import org.kingbolt.core.diagram.Evaluation;
import org.kingbolt.core.diagram.MinimalSolutions;
import org.kingbolt.core.diagram.StateCounts;
import org.kingbolt.core.diagram.WorkMeter;

/**
 * A compiled structure: one reduced ordered decision diagram, of which every question is a scan.
 *
 * <p>Assumed: components and system either work or have failed, the structure is coherent, and,
 * wherever probabilities enter, components fail independently. Where people can be hurt, a figure
 * from here supports a qualified engineer's judgement and never replaces codes, standards and
 * licensed practice.
 *
 * <p>Immutable; safe to share between threads; answers are computed anew at every call. Two systems
 * are equal when they were compiled from equal structures in the same order of components. The
 * serialized form is the structure's text and that order.
 *
 * <p>Example: {@code Structure.parallel("a", "b").compile().reliability(0.9).failing()} is 0.01.
 */
public final class CoherentSystem implements Serializable {

  private static final long serialVersionUID = 1L;

  private final Structure structure;
  private final transient ImmutableList<String> components;
  private final transient Diagram diagram;

  /** Variables of the diagram are indices into the structure's components. */
  CoherentSystem(Structure structure, ImmutableList<String> components, Diagram diagram) {
    this.structure = structure;
    this.components = components;
    this.diagram = diagram;
  }

  /**
   * Returns the structure this system was compiled from.
   *
   * @return the structure
   */
  public Structure structure() {
    return structure;
  }

  /**
   * Returns the components.
   *
   * @return the names in order of their first mention in the structure
   */
  public List<String> components() {
    return components;
  }

  /**
   * Returns the order in which the diagram reads the components.
   *
   * @return the names, those read first in front
   */
  public List<String> order() {
    return Arrays.stream(diagram.order()).mapToObj(components::get).toList();
  }

  /**
   * Returns the decision diagram, for algorithms of the caller's own.
   *
   * @return the diagram; its variables are indices into {@link #components()}
   */
  public Diagram diagram() {
    return diagram;
  }

  /**
   * The probability that the system works.
   *
   * @param p the components' probabilities; components must fail independently
   * @return both sides, each to a relative error of a few units in the last place for every level
   *     of the diagram, as long as it is not below the range of a double, about 1e-308; what is
   *     smaller comes out as 0. Cost: one scan.
   * @throws IllegalArgumentException if components have no probability; the message lists them
   */
  public Probability reliability(Probabilities p) {
    Evaluation evaluation = evaluation(p);
    return Probability.computed(evaluation.works(), evaluation.fails());
  }

  /**
   * The probability that the system works when all components are alike.
   *
   * @param working every component's probability of working, from 0 to 1
   * @return both sides
   * @throws IllegalArgumentException if the number is NaN or outside [0, 1]
   */
  public Probability reliability(double working) {
    return reliability(Probabilities.all(working));
  }

  /**
   * Evaluates every node of the diagram, for algorithms that need more than the figure itself.
   *
   * @param p the components' probabilities
   * @return the evaluation; its variables are indices into {@link #components()}
   * @throws IllegalArgumentException if components have no probability; the message lists them
   */
  public Evaluation evaluation(Probabilities p) {
    double[] working = new double[components.size()];
    double[] failing = new double[components.size()];
    Check.notNull(p, "probabilities").fill(components, working, failing);
    return Evaluation.of(diagram, working, failing);
  }

  /**
   * Makes an evaluator, to ask for the reliability many times over, in arrays.
   *
   * @return a fresh one, for one thread. Cost: memory, 16 bytes a node, and 12 more when it is
   *     asked for derivatives and changes.
   */
  public Evaluator evaluator() {
    return new Evaluator(this);
  }

  /**
   * Splits the system by the state of a key component (pivotal decomposition).
   *
   * @param component one of this system's components
   * @return both sides and their combination. Cost: one scan each.
   * @throws IllegalArgumentException if it is not a component of this system
   */
  public Pivot pivot(String component) {
    int index = components.indexOf(Check.name(component, "component"));
    if (index < 0) {
      throw Check.unknown(component, components);
    }
    return new Pivot(component, given(index, true), given(index, false));
  }

  private CoherentSystem given(int index, boolean works) {
    String component = components.get(index);
    Structure reduced =
        works ? structure.givenWorking(component) : structure.givenFailed(component);
    Map<String, Integer> places = new HashMap<>();
    reduced.components().forEach(name -> places.put(name, places.size()));
    int[] numbers = components.stream().mapToInt(name -> places.getOrDefault(name, -1)).toArray();
    WorkMeter meter = Budget.ofHeap().start("conditioning on a component");
    Diagram held = diagram.holding(index, works, meter).renumbered(numbers);
    return new CoherentSystem(reduced, ImmutableList.copyOf(reduced.components()), held);
  }

  /**
   * Finds all minimal path sets within {@link Budget#ofHeap()}.
   *
   * @return the smallest sets of components that keep the system working
   * @throws BudgetExceededException if their diagram grows too large
   */
  public MinimalSets minimalPathSets() {
    return minimalPathSets(Budget.ofHeap());
  }

  /**
   * Finds all minimal path sets.
   *
   * @param budget how much work it may cost
   * @return the smallest sets of components that keep the system working
   * @throws BudgetExceededException if the budget is used up
   */
  public MinimalSets minimalPathSets(Budget budget) {
    WorkMeter meter = Check.notNull(budget, "budget").start("finding minimal path sets");
    return new MinimalSets(components, MinimalSolutions.paths(diagram, meter), true);
  }

  /**
   * Finds all minimal cut sets within {@link Budget#ofHeap()}.
   *
   * @return the smallest sets of components whose failure makes the system fail
   * @throws BudgetExceededException if their diagram grows too large
   */
  public MinimalSets minimalCutSets() {
    return minimalCutSets(Budget.ofHeap());
  }

  /**
   * Finds all minimal cut sets.
   *
   * @param budget how much work it may cost
   * @return the smallest sets of components whose failure makes the system fail
   * @throws BudgetExceededException if the budget is used up
   */
  public MinimalSets minimalCutSets(Budget budget) {
    WorkMeter meter = Check.notNull(budget, "budget").start("finding minimal cut sets");
    return new MinimalSets(components, MinimalSolutions.cuts(diagram, meter), false);
  }

  /**
   * The reliability as a polynomial in one p common to all components, within {@link
   * Budget#ofHeap()}.
   *
   * @return exact integers
   * @throws BudgetExceededException if the counts grow too large
   */
  public ReliabilityPolynomial polynomial() {
    return polynomial(Budget.ofHeap());
  }

  /**
   * The reliability as a polynomial in one p common to all components.
   *
   * @param budget how much work it may cost
   * @return exact integers. Cost: one scan, of as many bits a node as the square of the number of
   *     components; memory, the counts of the levels in use.
   * @throws BudgetExceededException if the budget is used up
   */
  public ReliabilityPolynomial polynomial(Budget budget) {
    return new ReliabilityPolynomial(workingStates(budget));
  }

  /**
   * The signature: which failure, the first, second, ... , makes the system fail, when components
   * are exchangeable. Within {@link Budget#ofHeap()}.
   *
   * @return exact fractions
   * @throws BudgetExceededException if the counts grow too large
   */
  public Signature signature() {
    return signature(Budget.ofHeap());
  }

  /**
   * The signature: which failure, the first, second, ... , makes the system fail, when components
   * are exchangeable.
   *
   * @param budget how much work it may cost
   * @return exact fractions. Cost: that of {@link #polynomial(Budget)}.
   * @throws BudgetExceededException if the budget is used up
   */
  public Signature signature(Budget budget) {
    return new Signature(workingStates(budget));
  }

  private List<BigInteger> workingStates(Budget budget) {
    WorkMeter meter = Check.notNull(budget, "budget").start("counting working states");
    return List.of(StateCounts.workingBySize(diagram, meter));
  }

  /**
   * The components that make no difference in any state: their failure never matters.
   *
   * @return the names in order of {@link #components()}; empty for most systems
   */
  public List<String> irrelevantComponents() {
    boolean[] tested = diagram.tested(components.size());
    return IntStream.range(0, components.size())
        .filter(index -> !tested[index])
        .mapToObj(components::get)
        .toList();
  }

  @Override
  public boolean equals(Object other) {
    return other instanceof CoherentSystem that
        && structure.equals(that.structure)
        && Arrays.equals(diagram.order(), that.diagram.order());
  }

  @Override
  public int hashCode() {
    return structure.hashCode();
  }

  /**
   * A one-line summary.
   *
   * @return the numbers of components and nodes
   */
  @Override
  public String toString() {
    return "CoherentSystem["
        + components.size()
        + " components, "
        + diagram.nodeCount()
        + " nodes]";
  }

  private Object writeReplace() {
    return new SerialForm(structure, order().toArray(new String[0]));
  }

  private void readObject(ObjectInputStream in) throws InvalidObjectException {
    throw new InvalidObjectException("a system is read through its structure and order");
  }

  /** The serialized form. */
  private static final class SerialForm implements Serializable {
    private static final long serialVersionUID = 1L;
    private final Structure structure;
    private final String[] order;

    SerialForm(Structure structure, String[] order) {
      this.structure = structure;
      this.order = order;
    }

    private Object readResolve() {
      return structure.compile(List.of(order), Budget.ofHeap());
    }
  }
}
