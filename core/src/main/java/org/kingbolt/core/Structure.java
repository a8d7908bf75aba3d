package org.kingbolt.core;

import com.google.common.collect.ImmutableList;
import java.io.InvalidObjectException;
import java.io.ObjectInputStream;
import java.io.Serializable;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.Collection;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.Set;
import java.util.function.Predicate;
import org.jspecify.annotations.Nullable;
import org.kingbolt.core.diagram.Composer;
import org.kingbolt.core.diagram.CutTree;
import org.kingbolt.core.diagram.NetworkPaths;
import org.kingbolt.core.diagram.RouteFinder;
import org.kingbolt.core.diagram.Routes;
import org.kingbolt.core.diagram.WorkMeter;

/**
 * How a system works in terms of its components: a monotone structure function φ, described by
 * gates, networks, sets or rules, nested as deep as wanted.
 *
 * <p>A component may occur in several places; it is one and the same component everywhere. Every
 * structure works when all its components work and fails when all have failed; descriptions for
 * which that is not so are refused with {@link NotCoherentException}. The only exceptions are the
 * two structures without components that conditioning can lead to, see {@link #isAlwaysWorking()}
 * and {@link #isNeverWorking()}.
 *
 * <p>{@link #toString()} gives a text that {@link #parse(String)} turns back into an equal
 * structure. Structures are equal when they are described in the same way: same operators, same
 * parts in the same order. Whether they also work alike is a question for {@link CoherentSystem}.
 *
 * <p>Immutable; safe to share between threads. Depth of nesting is limited by memory only.
 *
 * <p>Example:
 *
 * <pre>{@code
 * Structure station = series(component("intake"), parallel("pumpA", "pumpB"));
 * station.compile().reliability(Probabilities.all(0.9)).working();   // 0.891
 * }</pre>
 *
 * <p>Source of the terms: Barlow &amp; Proschan, Statistical Theory of Reliability and Life
 * Testing, 1975, ch. 1.
 */
public abstract sealed class Structure implements Serializable
    permits ComponentStructure,
        ConstantStructure,
        GateStructure,
        CapacityStructure,
        RunStructure,
        FamilyStructure,
        NetworkStructure {

  private static final long serialVersionUID = 1L;

  private final transient ImmutableList<Structure> parts;
  private final transient int hash;
  private transient volatile @Nullable ImmutableList<String> components;

  Structure(List<? extends Structure> parts, int operatorHash) {
    this.parts = ImmutableList.copyOf(parts);
    this.hash = 31 * operatorHash + this.parts.hashCode();
  }

  // ---- descriptions -----------------------------------------------------------------------------

  /**
   * One component.
   *
   * @param name any text with at least one visible character
   * @return the structure that works while the component works
   * @throws IllegalArgumentException if the name is blank
   */
  public static Structure component(String name) {
    return new ComponentStructure(Check.name(name, "component"));
  }

  /**
   * Works while all parts work.
   *
   * @param parts at least one, all different
   * @return the series structure
   * @throws IllegalArgumentException if there are no parts, or a part is listed twice, or a part
   *     has no components
   */
  public static Structure series(Structure... parts) {
    return series(list(parts, GateStructure.SERIES));
  }

  /**
   * Works while all components work.
   *
   * @param components names, at least one, all different
   * @return the series structure
   * @throws IllegalArgumentException if there are no names, or a name is blank or listed twice
   */
  public static Structure series(String... components) {
    return series(named(components, GateStructure.SERIES));
  }

  /**
   * Works while all parts work.
   *
   * @param parts at least one, all different
   * @return the series structure
   * @throws IllegalArgumentException if there are no parts, or a part is listed twice, or a part
   *     has no components
   */
  public static Structure series(List<Structure> parts) {
    Check.notNull(parts, GateStructure.SERIES + ": the list of parts");
    return GateStructure.described(GateStructure.SERIES, parts.size(), parts);
  }

  /**
   * Works while any part works.
   *
   * @param parts at least one, all different
   * @return the parallel structure
   * @throws IllegalArgumentException if there are no parts, or a part is listed twice, or a part
   *     has no components
   */
  public static Structure parallel(Structure... parts) {
    return parallel(list(parts, GateStructure.PARALLEL));
  }

  /**
   * Works while any component works.
   *
   * @param components names, at least one, all different
   * @return the parallel structure
   * @throws IllegalArgumentException if there are no names, or a name is blank or listed twice
   */
  public static Structure parallel(String... components) {
    return parallel(named(components, GateStructure.PARALLEL));
  }

  /**
   * Works while any part works.
   *
   * @param parts at least one, all different
   * @return the parallel structure
   * @throws IllegalArgumentException if there are no parts, or a part is listed twice, or a part
   *     has no components
   */
  public static Structure parallel(List<Structure> parts) {
    return GateStructure.described(GateStructure.PARALLEL, 1, parts);
  }

  /**
   * k-out-of-n:G: works while at least k parts work.
   *
   * @param k from 1 to the number of parts
   * @param parts at least one, all different
   * @return the k-out-of-n structure
   * @throws IllegalArgumentException if k is out of range, or there are no parts, or a part is
   *     listed twice, or a part has no components
   */
  public static Structure atLeast(int k, Structure... parts) {
    return atLeast(k, list(parts, GateStructure.AT_LEAST));
  }

  /**
   * k-out-of-n:G: works while at least k components work.
   *
   * @param k from 1 to the number of components
   * @param components names, at least one, all different
   * @return the k-out-of-n structure
   * @throws IllegalArgumentException if k is out of range, or there are no names, or a name is
   *     blank or listed twice
   */
  public static Structure atLeast(int k, String... components) {
    return atLeast(k, named(components, GateStructure.AT_LEAST));
  }

  /**
   * k-out-of-n:G: works while at least k parts work.
   *
   * @param k from 1 to the number of parts
   * @param parts at least one, all different
   * @return the k-out-of-n structure
   * @throws IllegalArgumentException if k is out of range, or there are no parts, or a part is
   *     listed twice, or a part has no components
   */
  public static Structure atLeast(int k, List<Structure> parts) {
    return GateStructure.described(GateStructure.AT_LEAST, k, parts);
  }

  /**
   * Starts the description of a network of nodes and links.
   *
   * @return an empty network, to be described and closed with the question asked of it
   */
  public static NetworkBuilder network() {
    return new NetworkBuilder();
  }

  /**
   * Works while all components of some set work.
   *
   * @param sets path sets, minimal or not; at least one, none empty, each with different names
   * @return the structure; components are ordered by first mention in the sets' own iteration
   *     order, which {@code Set.of} changes from run to run
   * @throws IllegalArgumentException if there are no sets, or a set is empty, or a name is blank or
   *     listed twice in one set
   */
  public static Structure ofPathSets(Collection<? extends Collection<String>> sets) {
    return FamilyStructure.described(true, sets);
  }

  /**
   * Fails when all components of some set have failed.
   *
   * @param sets cut sets, minimal or not; at least one, none empty, each with different names
   * @return the structure; components are ordered by first mention in the sets' own iteration
   *     order, which {@code Set.of} changes from run to run
   * @throws IllegalArgumentException if there are no sets, or a set is empty, or a name is blank or
   *     listed twice in one set
   */
  public static Structure ofCutSets(Collection<? extends Collection<String>> sets) {
    return FamilyStructure.described(false, sets);
  }

  /**
   * A rule in code, for what no other description fits.
   *
   * <p>The rule is asked once about each of the {@code 2^n} states, in the calling thread, and must
   * answer the same every time. The structure keeps the rule's minimal path sets, not the rule.
   *
   * @param names the components, from 1 to 20, all different
   * @param rule given the set of working components, tells whether the system works
   * @return a structure equal to one described by path sets
   * @throws NotCoherentException if the rule never works, or always does, or works in some state
   *     and fails in a better one
   * @throws IllegalArgumentException if there are no or more than 20 names, or a name is blank or
   *     listed twice
   */
  public static Structure ofRule(List<String> names, Predicate<Set<String>> rule) {
    return RuleTable.describe(names, rule);
  }

  /**
   * Weighted-k-out-of-n:G: works while the capacities of the working components add up to the
   * demand.
   *
   * @param demand from 1 to the sum of the capacities, in the same unit
   * @param capacities the capacity of each component, 0 or more; their order is kept, so use a map
   *     with an order of its own where the text or the diagram must come out the same in every run
   *     ({@code Map.of} has none)
   * @return the structure
   * @throws IllegalArgumentException if a capacity is negative, or the demand is out of range, or
   *     there are no components, or a name is blank
   */
  public static Structure capacityAtLeast(long demand, Map<String, Long> capacities) {
    return CapacityStructure.described(demand, capacities);
  }

  /**
   * Consecutive-k-out-of-n:F in a line: fails when k neighbours have all failed.
   *
   * @param k from 1 to the number of components
   * @param names the components along the line, all different
   * @return the structure
   * @throws IllegalArgumentException if k is out of range, or there are no names, or a name is
   *     blank or listed twice
   */
  public static Structure withoutFailureRun(int k, List<String> names) {
    return RunStructure.described(
        k, named(array(names, RunStructure.LINE), RunStructure.LINE), false);
  }

  /**
   * Consecutive-k-out-of-n:F in a line: fails when k neighbours have all failed.
   *
   * @param k from 1 to the number of components
   * @param names the components along the line, all different
   * @return the structure
   * @throws IllegalArgumentException if k is out of range, or there are no names, or a name is
   *     blank or listed twice
   */
  public static Structure withoutFailureRun(int k, String... names) {
    return RunStructure.described(k, named(names, RunStructure.LINE), false);
  }

  /**
   * Consecutive-k-out-of-n:F around a circle: the last component is a neighbour of the first.
   *
   * @param k from 1 to the number of components
   * @param names the components around the circle, all different
   * @return the structure
   * @throws IllegalArgumentException if k is out of range, or there are no names, or a name is
   *     blank or listed twice
   */
  public static Structure withoutFailureRunAround(int k, List<String> names) {
    return RunStructure.described(
        k, named(array(names, RunStructure.CIRCLE), RunStructure.CIRCLE), true);
  }

  /**
   * Consecutive-k-out-of-n:F around a circle: the last component is a neighbour of the first.
   *
   * @param k from 1 to the number of components
   * @param names the components around the circle, all different
   * @return the structure
   * @throws IllegalArgumentException if k is out of range, or there are no names, or a name is
   *     blank or listed twice
   */
  public static Structure withoutFailureRunAround(int k, String... names) {
    return RunStructure.described(k, named(names, RunStructure.CIRCLE), true);
  }

  /**
   * Reads a structure's text, such as {@code series(intake, parallel(pumpA, pumpB))}.
   *
   * <p>The text names the methods of this class with their arguments; members of sets and carriers
   * of capacity may be structures there, as {@link #replace} makes them. A component is its name; a
   * name with anything but letters, digits, {@code _}, {@code -} and {@code .} stands in double
   * quotes, with {@code \"}, {@code \\}, {@code \n}, {@code \t} and {@code \\u0041} inside. Blank
   * space and line breaks may stand between words.
   *
   * @param text the text
   * @return the structure
   * @throws StructureSyntaxException if the text cannot be read; says the line, the column and what
   *     was expected there
   * @throws IllegalArgumentException if what it describes is refused by the method it names
   */
  public static Structure parse(String text) {
    return new StructureParser(Check.notNull(text, "text")).parse();
  }

  // ---- the structure function -------------------------------------------------------------------

  /**
   * The structure function: tells whether the system works in one state.
   *
   * @param working the working components; all others have failed
   * @return φ of the state. Cost: linear in the size of the structure.
   * @throws IllegalArgumentException if a name is not a component of this structure
   */
  public boolean works(Set<String> working) {
    Check.notNull(working, "the set of working components");
    Set<String> known = Fold.componentSet(this);
    for (String name : working) {
      if (!known.contains(Check.notNull(name, "a name in the set of working components"))) {
        throw Check.unknown(name, components());
      }
    }
    return Fold.over(
        this,
        new FoldStep<Boolean>() {
          @Override
          public Boolean component(String name) {
            return working.contains(name);
          }

          @Override
          public Boolean operator(Structure operator, List<Boolean> parts) {
            boolean[] values = new boolean[parts.size()];
            for (int i = 0; i < values.length; i++) {
              values[i] = parts.get(i);
            }
            return operator.evaluate(values);
          }
        });
  }

  /**
   * Returns the components.
   *
   * @return the names in order of their first mention, each once
   */
  public List<String> components() {
    ImmutableList<String> found = components;
    if (found == null) {
      found = ImmutableList.copyOf(Fold.componentSet(this));
      components = found;
    }
    return found;
  }

  /**
   * Holds a component working: φ(1_i, x).
   *
   * @param component one of this structure's components
   * @return the structure of the other components; it may have lost further ones that no longer
   *     matter
   * @throws IllegalArgumentException if it is not a component of this structure
   */
  public Structure givenWorking(String component) {
    return substitute(component, ConstantStructure.ALWAYS);
  }

  /**
   * Holds a component failed: φ(0_i, x).
   *
   * @param component one of this structure's components
   * @return the structure of the other components; it may have lost further ones that no longer
   *     matter
   * @throws IllegalArgumentException if it is not a component of this structure
   */
  public Structure givenFailed(String component) {
    return substitute(component, ConstantStructure.NEVER);
  }

  /**
   * Puts a module in the place of a component, wherever it occurs.
   *
   * @param component one of this structure's components
   * @param module what takes its place; may itself use components of this structure
   * @return the structure with the module
   * @throws IllegalArgumentException if it is not a component of this structure
   */
  public Structure replace(String component, Structure module) {
    return substitute(component, Check.notNull(module, "module"));
  }

  private Structure substitute(String component, Structure with) {
    Check.name(component, "component");
    if (!Fold.componentSet(this).contains(component)) {
      throw Check.unknown(component, components());
    }
    return Fold.over(
        this,
        new FoldStep<Structure>() {
          @Override
          public Structure component(String name) {
            return name.equals(component) ? with : Structure.component(name);
          }

          @Override
          public Structure operator(Structure operator, List<Structure> parts) {
            return parts.equals(operator.parts()) ? operator : operator.rebuild(parts);
          }
        });
  }

  /**
   * The dual structure, which works in a state exactly when this one fails in the opposite state.
   *
   * @return 1 - φ(1 - x); its path sets are the cut sets of this structure
   */
  public Structure dual() {
    return Fold.over(
        this,
        new FoldStep<Structure>() {
          @Override
          public Structure component(String name) {
            return Structure.component(name);
          }

          @Override
          public Structure operator(Structure operator, List<Structure> parts) {
            return operator.dualOver(parts);
          }
        });
  }

  /**
   * Tells whether this structure has no components and works. Only conditioning leads to it.
   *
   * @return true for such a structure
   */
  public boolean isAlwaysWorking() {
    return equals(ConstantStructure.ALWAYS);
  }

  /**
   * Tells whether this structure has no components and fails. Only conditioning leads to it.
   *
   * @return true for such a structure
   */
  public boolean isNeverWorking() {
    return equals(ConstantStructure.NEVER);
  }

  // ---- answers ----------------------------------------------------------------------------------

  /**
   * Compiles this structure within {@link Budget#ofHeap()}.
   *
   * @return the system, ready to answer
   * @throws BudgetExceededException if the diagram grows too large
   */
  public CoherentSystem compile() {
    return compile(Budget.ofHeap());
  }

  /**
   * Compiles this structure into a decision diagram.
   *
   * @param budget how much work it may cost
   * @return the system, ready to answer. Cost: linear for gates that share no components; where
   *     they do, at most exponential in the smallest gate that holds all uses, of which several
   *     orders are tried; for networks exponential in the width, linear in the length.
   * @throws BudgetExceededException if the budget is used up
   */
  public CoherentSystem compile(Budget budget) {
    return Compilation.compile(this, budget);
  }

  /**
   * Compiles this structure with its components in an order of the caller's choice, which can make
   * the difference between a small diagram and none.
   *
   * @param order all components, each once, those to be read first in front
   * @param budget how much work it may cost
   * @return the system, ready to answer
   * @throws IllegalArgumentException if the order leaves out, repeats or adds components
   * @throws BudgetExceededException if the budget is used up
   */
  public CoherentSystem compile(List<String> order, Budget budget) {
    return Compilation.compile(this, order, budget);
  }

  /**
   * The probability that the system works, without compiling: the way when only the figure is
   * asked, once. Within {@link Budget#ofHeap()}.
   *
   * @param p the components' probabilities; components must fail independently
   * @return both sides, as {@link CoherentSystem#reliability(Probabilities)} gives them, up to the
   *     last digits
   * @throws IllegalArgumentException if components have no probability; the message lists them
   * @throws BudgetExceededException if the work grows too large
   */
  public Probability reliability(Probabilities p) {
    return reliability(p, Budget.ofHeap());
  }

  /**
   * The probability that the system works when all components are alike, without compiling.
   *
   * @param working every component's probability of working, from 0 to 1
   * @return both sides
   * @throws IllegalArgumentException if the number is NaN or outside [0, 1]
   * @throws BudgetExceededException if the work grows too large
   */
  public Probability reliability(double working) {
    return reliability(Probabilities.all(working));
  }

  /**
   * The probability that the system works, without compiling. Parts that share no components are
   * worked out one by one; a network holds two layers of frontier states and no diagram; where
   * parts share components, a diagram is made of the smallest part that holds all uses.
   *
   * @param p the components' probabilities; components must fail independently
   * @param budget how much work it may cost; a state of a network counts by its size
   * @return both sides, each by sums of non-negative terms. Cost: for networks, time as for
   *     compiling and memory for the widest layer only.
   * @throws IllegalArgumentException if components have no probability; the message lists them
   * @throws BudgetExceededException if the budget is used up
   */
  public Probability reliability(Probabilities p, Budget budget) {
    return Compilation.reliability(this, p, budget);
  }

  /**
   * How wide the networks in this structure are to the frontier method, after series, parallel and
   * other reductions: known at once, and the measure of what compiling will cost. Every further
   * node multiplies the number of states by two to three; up to a dozen is a matter of a second or
   * so, twenty is likely to exceed any budget.
   *
   * @return the most nodes between what has been swept and what has not, in the best order found; 0
   *     where there are no networks, or reductions leave none
   */
  public int frontierWidth() {
    return Compilation.widestFrontier(this);
  }

  /**
   * Tells whether the system works when only these components work: whether they are a path set,
   * minimal or not.
   *
   * @param set any of this structure's components
   * @return φ of the state, as {@link #works(Set)} gives it
   * @throws IllegalArgumentException if a name is not a component of this structure
   */
  public boolean isPathSet(Set<String> set) {
    return works(set);
  }

  /**
   * Tells whether the system fails when exactly these components have failed: whether they are a
   * cut set, minimal or not.
   *
   * @param set any of this structure's components
   * @return 1 - φ of the state. Cost: linear in the size of the structure.
   * @throws IllegalArgumentException if a name is not a component of this structure
   */
  public boolean isCutSet(Set<String> set) {
    return SetTests.isCutSet(this, set);
  }

  /**
   * Tells whether these components are a path set, and none of them can be spared.
   *
   * @param set any of this structure's components
   * @return whether it is one of the minimal path sets. Cost: one evaluation a member.
   * @throws IllegalArgumentException if a name is not a component of this structure
   */
  public boolean isMinimalPathSet(Set<String> set) {
    return SetTests.isMinimal(set, this::isPathSet);
  }

  /**
   * Tells whether these components are a cut set, and none of them can be spared.
   *
   * @param set any of this structure's components
   * @return whether it is one of the minimal cut sets. Cost: one evaluation a member.
   * @throws IllegalArgumentException if a name is not a component of this structure
   */
  public boolean isMinimalCutSet(Set<String> set) {
    return SetTests.isMinimal(set, this::isCutSet);
  }

  /**
   * Finds the minimal path sets within a cut-off, without compiling, within {@link
   * Budget#ofHeap()}.
   *
   * @param cutOff where to end
   * @return all of them, see {@link #minimalCutSets(CutOff, Budget)}
   * @throws IllegalArgumentException if components have no probability where it is needed
   * @throws BudgetExceededException if there are too many
   */
  public TruncatedSets minimalPathSets(CutOff cutOff) {
    return minimalPathSets(cutOff, Budget.ofHeap());
  }

  /**
   * Finds the minimal path sets within a cut-off, without compiling.
   *
   * @param cutOff where to end
   * @param budget how much work it may cost
   * @return all of them, see {@link #minimalCutSets(CutOff, Budget)}
   * @throws IllegalArgumentException if components have no probability where it is needed
   * @throws BudgetExceededException if the budget is used up
   */
  public TruncatedSets minimalPathSets(CutOff cutOff, Budget budget) {
    return TruncatedSets.of(this, true, cutOff, budget);
  }

  /**
   * Finds the minimal cut sets within a cut-off, without compiling, within {@link Budget#ofHeap()}.
   *
   * @param cutOff where to end
   * @return all of them, see {@link #minimalCutSets(CutOff, Budget)}
   * @throws IllegalArgumentException if components have no probability where it is needed
   * @throws BudgetExceededException if there are too many
   */
  public TruncatedSets minimalCutSets(CutOff cutOff) {
    return minimalCutSets(cutOff, Budget.ofHeap());
  }

  /**
   * Finds the minimal cut sets within a cut-off, without compiling: the way for systems that no
   * diagram holds.
   *
   * @param cutOff where to end
   * @param budget how much work it may cost; a set of up to 16 components counts as a node
   * @return all that the cut-off lets pass, and a bound on the probability of the others. Cost: for
   *     gates, that of listing the sets of their parts; for networks, a few searches through the
   *     graph for each set found and each one tried in vain, which grow with the cut-off as a power
   *     of the length of routes.
   * @throws IllegalArgumentException if components have no probability where it is needed
   * @throws BudgetExceededException if the budget is used up
   */
  public TruncatedSets minimalCutSets(CutOff cutOff, Budget budget) {
    return TruncatedSets.of(this, false, cutOff, budget);
  }

  // ---- what each kind of structure provides -----------------------------------------------------

  /** What stands in each slot of this operator; for a component or a constant, nothing. */
  final ImmutableList<Structure> parts() {
    return parts;
  }

  /** The operator's value, given its parts' values. */
  abstract boolean evaluate(boolean[] partWorks);

  /** The operator's value for very many states; for one thread. */
  Predicate<boolean[]> evaluation() {
    return this::evaluate;
  }

  /** The same operator over other parts; parts may be constants, the result is simplified. */
  abstract Structure rebuild(List<Structure> newParts);

  /** The dual operator, over parts that are already the duals of this one's. */
  abstract Structure dualOver(List<Structure> dualParts);

  /** Finders of path sets over the slots, as a {@link CutTree} takes them; fresh ones. */
  List<RouteFinder> routes() {
    return List.of(Routes.asked(parts.size(), this::evaluate));
  }

  /**
   * Cut sets as slots in increasing order, all minimal ones among them, where they stand in a list.
   */
  Optional<List<int[]>> slotCuts() {
    return Optional.empty();
  }

  /**
   * The minimal cut sets over the slots up to a cost, where there is a way of one's own to them.
   */
  Optional<NetworkPaths> slotPaths(double[] cost, double limit, WorkMeter meter) {
    return Optional.empty();
  }

  /** Adds this operator over the expressions of its parts; returns the expression's number. */
  abstract int express(Composer composer, int[] partExpressions, WorkMeter meter);

  /** Writes the text. */
  abstract void write(TextWriter out);

  /** Whether the operator, parts aside, is the same. */
  abstract boolean sameOperator(Structure other);

  @Override
  public final boolean equals(Object other) {
    return other instanceof Structure that && Fold.equal(this, that);
  }

  @Override
  public final int hashCode() {
    return hash;
  }

  /**
   * The text form.
   *
   * @return a text that {@link #parse(String)} reads
   */
  @Override
  public final String toString() {
    return TextWriter.textOf(this);
  }

  final Object writeReplace() {
    return new SerialForm(toString());
  }

  private void readObject(ObjectInputStream in) throws InvalidObjectException {
    throw new InvalidObjectException("a structure is read through its text form");
  }

  /** The serialized form: the text. */
  private record SerialForm(String text) implements Serializable {
    private static final long serialVersionUID = 1L;

    Object readResolve() {
      return parse(text);
    }
  }

  private static List<Structure> list(Structure[] parts, String where) {
    Check.notNull(parts, where + ": the list of parts");
    return Arrays.asList(parts);
  }

  private static List<Structure> named(String[] names, String where) {
    Check.notNull(names, where + ": the list of names");
    List<Structure> named = new ArrayList<>(names.length);
    for (String name : names) {
      named.add(new ComponentStructure(Check.name(name, where, named.size() + 1)));
    }
    return named;
  }

  private static String[] array(List<String> names, String where) {
    return Check.notNull(names, where + ": the list of names").toArray(new String[0]);
  }
}
