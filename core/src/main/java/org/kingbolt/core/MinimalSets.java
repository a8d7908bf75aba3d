package org.kingbolt.core;

import java.math.BigInteger;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.Collections;
import java.util.Iterator;
import java.util.LinkedHashSet;
import java.util.List;
import java.util.NoSuchElementException;
import java.util.Set;
import java.util.Spliterator;
import java.util.Spliterators;
import java.util.stream.Collectors;
import java.util.stream.Stream;
import java.util.stream.StreamSupport;
import org.jspecify.annotations.Nullable;
import org.kingbolt.core.diagram.SetDiagram;
import org.kingbolt.core.diagram.SetWalk;
import org.kingbolt.core.diagram.WorkMeter;

/**
 * All minimal path sets, or all minimal cut sets, of a system. They are held as a diagram, not as a
 * list: counting does not list them, and streams make them one at a time.
 *
 * <p>The order of streams is by size and, within a size, by the order in which the diagram reads
 * the components ({@link CoherentSystem#order()}). The members of a set come in order of {@link
 * CoherentSystem#components()}.
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
    SetWalk walk = family.walk(Budget.ofHeap().start("listing minimal sets"));
    return new Iterator<>() {
      private int @Nullable [] next = walk.next();

      @Override
      public boolean hasNext() {
        return next != null;
      }

      @Override
      public Set<String> next() {
        int[] set = next;
        if (set == null) {
          throw new NoSuchElementException("there are no more minimal sets");
        }
        next = walk.next();
        return named(set);
      }
    };
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
    double[] logs =
        Check.notNull(p, "probabilities").forComponents(components).stream()
            .mapToDouble(value -> Math.log(side(value)))
            .toArray();
    WorkMeter meter = Check.notNull(budget, "budget").start("searching the most probable sets");
    SetWalk walk = family.walkByWeight(logs, meter);
    List<Set<String>> found = new ArrayList<>();
    while (found.size() < n) {
      int[] set = walk.next();
      if (set == null) {
        break;
      }
      found.add(named(set));
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

  private double side(Probability value) {
    return paths ? value.working() : value.failing();
  }

  private Set<String> named(int[] set) {
    int[] sorted = set.clone();
    Arrays.sort(sorted);
    Set<String> names = new LinkedHashSet<>();
    for (int index : sorted) {
      names.add(components.get(index));
    }
    return Collections.unmodifiableSet(names);
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
