package org.kingbolt.core;

import java.math.BigInteger;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.Collections;
import java.util.Iterator;
import java.util.List;
import java.util.Set;
import java.util.Spliterator;
import java.util.Spliterators;
import java.util.stream.Collectors;
import java.util.stream.Stream;
import java.util.stream.StreamSupport;
import org.kingbolt.core.diagram.SetDiagram;
import org.kingbolt.core.diagram.SetWalk;
import org.kingbolt.core.diagram.WorkMeter;

/**
 * Minimal path sets, or minimal cut sets, of a system: all of them, or those that a question has
 * selected. They are held as a diagram, not as a list: counting does not list them, and streams
 * make them one at a time.
 *
 * <p>The order of streams is by size and, within a size, by components: sets are compared by their
 * first members in order of {@link CoherentSystem#components()}, then by the next. The members of a
 * set come in that order too.
 *
 * <p>Immutable; safe to share between threads; each stream is for one thread.
 *
 * <p>Example: {@code Structure.atLeast(20, names).compile().minimalPathSets().count()}.
 */
public final class MinimalSets implements Iterable<Set<String>> {

  private static final int SHOWN = 20;

  private final List<String> components;
  private final SetDiagram family;
  private final boolean paths;

  MinimalSets(List<String> components, SetDiagram family, boolean paths) {
    this.components = components;
    this.family = family;
    this.paths = paths;
  }

  /**
   * Counts the sets without listing them.
   *
   * @return the exact number
   * @throws BudgetExceededException if the number of nodes is too large for the heap
   */
  public BigInteger count() {
    return family.count(Budget.ofHeap().start("counting minimal sets"));
  }

  /**
   * Counts the sets of each size without listing them.
   *
   * @return entry j is the exact number of sets with j members; the last entry is the largest size
   * @throws BudgetExceededException if the counts grow too large for the heap
   */
  public List<BigInteger> countBySize() {
    return List.of(family.countBySize(Budget.ofHeap().start("counting minimal sets")));
  }

  /**
   * Selects the sets of the least size.
   *
   * @return these, none where there are no sets
   * @throws BudgetExceededException if the heap is too small
   */
  public MinimalSets smallest() {
    SetWalk walk = family.walk(selecting());
    int[] first = walk.next();
    return first == null ? this : ofSizeAtMost(first.length);
  }

  /**
   * Selects the sets of at most so many components, without listing them.
   *
   * @param k the largest size that is wanted, at least 0
   * @return these. Cost: at most k times the nodes of the diagram.
   * @throws IllegalArgumentException if the size is negative
   * @throws BudgetExceededException if the heap is too small
   */
  public MinimalSets ofSizeAtMost(int k) {
    if (k < 0) {
      throw new IllegalArgumentException("size at most " + k + "; it must be 0 or more");
    }
    return selected(family.ofSizeAtMost(k, selecting()));
  }

  /**
   * Selects the sets that a component is a member of, without listing them.
   *
   * @param component one of the system's components
   * @return these, with the component. Cost: one scan.
   * @throws IllegalArgumentException if it is not a component of the system
   * @throws BudgetExceededException if the heap is too small
   */
  public MinimalSets containing(String component) {
    return selected(family.containing(index(component), selecting()));
  }

  /**
   * Selects the sets that a component is not a member of, without listing them.
   *
   * @param component one of the system's components
   * @return these. Cost: one scan.
   * @throws IllegalArgumentException if it is not a component of the system
   * @throws BudgetExceededException if the heap is too small
   */
  public MinimalSets without(String component) {
    return selected(family.without(index(component), selecting()));
  }

  private static WorkMeter selecting() {
    return Budget.ofHeap().start("selecting minimal sets");
  }

  private MinimalSets selected(SetDiagram some) {
    return new MinimalSets(components, some, paths);
  }

  private int index(String component) {
    int index = components.indexOf(Check.name(component, "component"));
    if (index < 0) {
      throw Check.unknown(component, components);
    }
    return index;
  }

  /**
   * Tells whether a set is one of these.
   *
   * @param set components of the system
   * @return whether exactly this set is among them. Cost: at most one step a component.
   * @throws IllegalArgumentException if a name is not a component of the system
   */
  public boolean contains(Set<String> set) {
    return family.contains(members(set));
  }

  /**
   * Tells whether a set contains one of these: for all minimal path sets, whether the system works
   * when only these components work; for all minimal cut sets, whether it fails when they fail.
   *
   * @param set components of the system
   * @return whether all members of some set of the family are in it. Cost: one scan.
   * @throws IllegalArgumentException if a name is not a component of the system
   */
  public boolean containsPartOf(Set<String> set) {
    return family.hasSubset(members(set));
  }

  private boolean[] members(Set<String> set) {
    boolean[] members = new boolean[components.size()];
    for (String name : Check.notNull(set, "set")) {
      members[index(name)] = true;
    }
    return members;
  }

  /**
   * Streams the sets, smallest first, made one at a time as they are asked for.
   *
   * @return a sequential stream of unmodifiable sets; it ends in a {@link BudgetExceededException}
   *     where it needs more memory than {@link Budget#ofHeap()} allows, or the thread is
   *     interrupted
   * @throws BudgetExceededException if the heap is too small to begin with
   */
  public Stream<Set<String>> stream() {
    return StreamSupport.stream(
        Spliterators.spliteratorUnknownSize(
            iterator(), Spliterator.ORDERED | Spliterator.DISTINCT | Spliterator.NONNULL),
        false);
  }

  /**
   * Goes through the sets in the order of {@link #stream()}.
   *
   * @return an iterator for one thread, which may throw as the stream does
   * @throws BudgetExceededException if the heap is too small to begin with
   */
  @Override
  public Iterator<Set<String>> iterator() {
    return new NamedSets(
        components, family.walkByVariables(Budget.ofHeap().start("listing minimal sets")));
  }

  /**
   * The most probable sets within {@link Budget#ofHeap()}.
   *
   * @param n how many, at least 0; fewer are returned when there are not so many
   * @param p the components' probabilities
   * @return the sets; see {@link #mostProbable(int, Probabilities, Budget)}
   * @throws IllegalArgumentException if n is negative, or components have no probability
   * @throws BudgetExceededException if the search grows too large for the heap
   */
  public List<Set<String>> mostProbable(int n, Probabilities p) {
    return mostProbable(n, p, Budget.ofHeap());
  }

  /**
   * The most probable sets, best first, without listing the others: path sets by the probability
   * that all members work, cut sets by the probability that all members have failed.
   *
   * @param n how many, at least 0; fewer are returned when there are not so many
   * @param p the components' probabilities
   * @param budget how much work it may cost
   * @return an unmodifiable list; among equally probable sets the order is fixed but of no meaning
   * @throws IllegalArgumentException if n is negative, or components have no probability
   * @throws BudgetExceededException if the budget is used up
   */
  public List<Set<String>> mostProbable(int n, Probabilities p, Budget budget) {
    if (n < 0) {
      throw new IllegalArgumentException("asked for " + n + " sets; ask for 0 or more");
    }
    double[] logs = Arrays.stream(sides(p)).map(Math::log).toArray();
    WorkMeter meter = Check.notNull(budget, "budget").start("searching the most probable sets");
    SetWalk walk = family.walkByWeight(logs, meter);
    List<Set<String>> found = new ArrayList<>();
    while (found.size() < n) {
      int[] set = walk.next();
      if (set == null) {
        break;
      }
      found.add(NamedSets.named(components, set));
    }
    return Collections.unmodifiableList(found);
  }

  /**
   * The probability of one set: that all members of a path set work, or that all members of a cut
   * set have failed.
   *
   * @param set any components
   * @param p the components' probabilities
   * @return the product over the members, from 0 to 1
   * @throws IllegalArgumentException if members have no probability
   */
  public double probability(Set<String> set, Probabilities p) {
    Check.notNull(set, "set");
    Check.notNull(p, "probabilities");
    double product = 1;
    for (Probability value : p.forComponents(new ArrayList<>(set))) {
      product *= side(value);
    }
    return product;
  }

  /**
   * Adds up the probabilities of all sets, without listing them: for cut sets, the rare-event
   * approximation of the system's probability of failing, and an upper bound on it.
   *
   * @param p the components' probabilities
   * @return the sum, which is also the expected number of sets all of whose members have failed (or
   *     work); at least 0, and above 1 where it says nothing. Cost: one scan.
   * @throws IllegalArgumentException if components have no probability
   */
  public double sumOfProbabilities(Probabilities p) {
    return family.sumOfWeights(sides(p));
  }

  private double[] sides(Probabilities p) {
    return Check.notNull(p, "probabilities").forComponents(components).stream()
        .mapToDouble(this::side)
        .toArray();
  }

  /**
   * The system's probability from these sets by inclusion–exclusion, within {@link
   * Budget#ofHeap()}.
   *
   * @param p the components' probabilities; components must fail independently
   * @return see {@link #inclusionExclusion(Probabilities, Budget)}
   * @throws IllegalArgumentException if components have no probability
   * @throws BudgetExceededException if there are too many terms
   */
  public Probability inclusionExclusion(Probabilities p) {
    return inclusionExclusion(p, Budget.ofHeap());
  }

  /**
   * The system's probability from these sets by inclusion–exclusion: a method in its own right, for
   * small families, to check others with. Terms of one union of sets are collected. The sum cancels
   * by nature; exact arithmetic brings out both sides to the last digit.
   *
   * @param p the components' probabilities; components must fail independently. Of each component
   *     the smaller side is taken as it stands, and the other one as 1 minus it, exactly.
   * @param budget how much work it may cost; a term counts as a node
   * @return both sides for the structure of which these are all minimal sets. Cost: terms at most 2
   *     to the number of sets, or of components, whichever is smaller; each of all digits.
   * @throws IllegalArgumentException if components have no probability
   * @throws BudgetExceededException if the budget is used up
   */
  public Probability inclusionExclusion(Probabilities p, Budget budget) {
    WorkMeter meter = Check.notNull(budget, "budget").start("expanding by inclusion-exclusion");
    List<Probability> values = Check.notNull(p, "probabilities").forComponents(components);
    return InclusionExclusion.of(family.walk(meter), values, paths, meter);
  }

  /**
   * The system's probability from these sets by sums of disjoint products, within {@link
   * Budget#ofHeap()}.
   *
   * @param p the components' probabilities; components must fail independently
   * @return see {@link #disjointProducts(Probabilities, Budget)}
   * @throws IllegalArgumentException if components have no probability
   * @throws BudgetExceededException if there are too many terms
   */
  public Probability disjointProducts(Probabilities p) {
    return disjointProducts(p, Budget.ofHeap());
  }

  /**
   * The system's probability from these sets by sums of disjoint products: a method in its own
   * right, for small families, to check others with. Sets are taken smallest first, each without
   * the states of those before it; what shares nothing with the rest is inverted as a whole.
   *
   * <p>Source: Abraham, IEEE Trans. Reliab. 28 (1979) 58; inversion of several variables at once:
   * Heidtmann, IEEE Trans. Reliab. 38 (1989) 447 (both from memory).
   *
   * @param p the components' probabilities; components must fail independently
   * @param budget how much work it may cost; a set in a term not yet worked out counts as a node
   * @return both sides for the structure of which these are all minimal sets, each a sum of
   *     non-negative terms. Cost: exponential in the number of sets at worst.
   * @throws IllegalArgumentException if components have no probability
   * @throws BudgetExceededException if the budget is used up
   */
  public Probability disjointProducts(Probabilities p, Budget budget) {
    WorkMeter meter = Check.notNull(budget, "budget").start("expanding by disjoint products");
    List<Probability> values = Check.notNull(p, "probabilities").forComponents(components);
    return DisjointProducts.of(family.walk(meter), values, paths, meter);
  }

  /**
   * One set in a report.
   *
   * @param set its components, unmodifiable
   * @param size how many these are
   * @param probability that all of them work, for a path set, or have failed, for a cut set
   * @param share of the probability in the sum over all sets of the family, from 0 to 1; 0 where
   *     that sum is 0
   */
  public record Row(Set<String> set, int size, double probability, double share) {}

  /**
   * The sets with their figures, for a report of the caller's own, in the order of {@link
   * #stream()}, made one at a time.
   *
   * @param p the components' probabilities
   * @return as often iterable as wanted; its iterators may throw as the stream does
   * @throws IllegalArgumentException if components have no probability
   */
  public Iterable<Row> rows(Probabilities p) {
    double sum = sumOfProbabilities(p);
    return () -> stream().map(set -> row(set, p, sum)).iterator();
  }

  private Row row(Set<String> set, Probabilities p, double sum) {
    double probability = probability(set, p);
    return new Row(set, set.size(), probability, sum > 0 ? Math.min(1, probability / sum) : 0);
  }

  /**
   * The most probable sets as a table with aligned columns: size, components, probability, and the
   * share in the sum over all sets.
   *
   * @param p the components' probabilities
   * @param n how many rows at most, at least 0
   * @return lines, each with its end; the last one counts what is not shown
   * @throws IllegalArgumentException if n is negative, or components have no probability
   * @throws BudgetExceededException if the search grows too large for the heap
   */
  public String table(Probabilities p, int n) {
    double sum = sumOfProbabilities(p);
    List<Row> rows = mostProbable(n, p).stream().map(set -> row(set, p, sum)).toList();
    return SetTable.of(rows, count());
  }

  private double side(Probability value) {
    return paths ? value.working() : value.failing();
  }

  /**
   * The first sets in a row, such as {@code {1, 4} {2, 5} {1, 3, 5} {2, 3, 4}}.
   *
   * @return one line, with a count of what is not shown
   */
  @Override
  public String toString() {
    BigInteger more = count().subtract(BigInteger.valueOf(SHOWN));
    return stream()
            .limit(SHOWN)
            .map(set -> "{" + String.join(", ", set) + "}")
            .collect(Collectors.joining(" "))
        + (more.signum() > 0 ? " and " + more + " more" : "");
  }
}
