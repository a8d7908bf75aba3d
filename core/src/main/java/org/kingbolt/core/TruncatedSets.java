package org.kingbolt.core;

import java.util.Arrays;
import java.util.Iterator;
import java.util.List;
import java.util.Optional;
import java.util.Set;
import java.util.stream.Stream;
import org.kingbolt.core.TruncatedFamily.CutSet;
import org.kingbolt.core.diagram.SetDiagram;
import org.kingbolt.core.diagram.WorkMeter;

/**
 * The minimal path sets or minimal cut sets of a structure within a {@link CutOff}, complete within
 * it, and how much was cut off.
 *
 * <p>Iterating goes through the sets in order of size and, within a size, in order of components.
 *
 * <p>Immutable; safe to share between threads.
 *
 * <p>Example: {@code yard.minimalCutSets(CutOff.probability(1e-9, p)).discarded()} bounds the
 * probability that the yard fails and none of the cut sets found has failed altogether.
 */
public final class TruncatedSets implements Iterable<Set<String>> {

  /** Bounds are enlarged by this share to cover the rounding of their own sum. */
  private static final double ROUNDING = 1 + 1e-9;

  /** Every factor and product, and the threshold, may be rounded by half a unit. */
  private static final double ROUNDING_PER_MEMBER = 0x1p-52;

  /** Products of probabilities above exp(-300) do not get below the range of a double. */
  private static final double UNDERFLOW = 300;

  private final Structure structure;
  private final boolean paths;
  private final CutOff cutOff;
  private final MinimalSets sets;
  private final boolean complete;
  private final Optional<Double> discarded;

  private TruncatedSets(
      Structure structure,
      boolean paths,
      CutOff cutOff,
      MinimalSets sets,
      boolean complete,
      Optional<Double> discarded) {
    this.structure = structure;
    this.paths = paths;
    this.cutOff = cutOff;
    this.sets = sets;
    this.complete = complete;
    this.discarded = discarded;
  }

  static TruncatedSets of(Structure structure, boolean paths, CutOff cutOff, Budget budget) {
    Check.notNull(cutOff, "cut-off");
    Check.notNull(budget, "budget");
    Search search = new Search(structure, paths, cutOff, cutOff.probabilities(), budget);
    List<int[]> sorted =
        search.family.sets.stream().map(CutSet::members).sorted(Arrays::compare).toList();
    SetDiagram diagram = SetDiagram.of(search.components.size(), sorted, search.meter);
    return new TruncatedSets(
        structure,
        paths,
        cutOff,
        new MinimalSets(search.components, diagram, paths),
        search.family.complete,
        cutOff.probabilities().map(p -> search.discarded()));
  }

  /** One generation: always of cut sets; path sets are the cut sets of the dual. */
  private static final class Search {
    final List<String> components;
    final WorkMeter meter;
    final TruncatedFamily family;
    private final CutOff cutOff;
    private final double[] failing;
    private final boolean underflows;

    Search(
        Structure structure,
        boolean paths,
        CutOff cutOff,
        Optional<Probabilities> weights,
        Budget budget) {
      this.meter =
          budget.start("finding minimal " + (paths ? "path" : "cut") + " sets with " + cutOff);
      this.cutOff = cutOff;
      Numbering numbering = new Numbering(paths ? structure.dual() : structure, meter);
      this.components = numbering.components();
      int n = components.size();
      double[] cost = new double[n];
      double[] working = new double[n];
      this.failing = new double[n];
      double limit = cutOff.size();
      Arrays.fill(cost, 1);
      Arrays.fill(working, 1);
      Arrays.fill(failing, 1);
      if (cutOff.probabilities().isPresent()) {
        double[] other = new double[n];
        fill(cutOff.probabilities().get(), paths, other, cost);
        Arrays.setAll(cost, i -> -Math.log(cost[i]));
        limit = -Math.log(cutOff.threshold());
      }
      weights.ifPresent(p -> fill(p, paths, working, failing));
      this.underflows = smallness(working) + smallness(failing) > UNDERFLOW;
      this.family =
          new Truncation(numbering, cost, limit, failing, working, weights.isPresent(), meter)
              .family();
      if (cutOff.probabilities().isPresent()) {
        keepProbable(cutOff.probabilities().get(), paths);
      }
    }

    private void fill(Probabilities p, boolean paths, double[] working, double[] failing) {
      p.fill(components, paths ? failing : working, paths ? working : failing);
    }

    /** How small the product of those that are not 0 is: minus its logarithm. */
    private static double smallness(double[] probabilities) {
      return Arrays.stream(probabilities).filter(p -> p > 0).map(p -> -Math.log(p)).sum();
    }

    /**
     * Costs are rounded; whether a set is probable enough is decided by its product. Sets of equal
     * probability stay together, whatever the order of their factors.
     */
    private void keepProbable(Probabilities p, boolean paths) {
      double[] working = new double[components.size()];
      double[] decides = new double[components.size()];
      fill(p, paths, working, decides);
      family.sets =
          family.sets.stream()
              .filter(
                  set -> {
                    double rounding = 1 + set.members().length * ROUNDING_PER_MEMBER;
                    boolean kept = product(set, decides) * rounding >= cutOff.threshold();
                    if (!kept) {
                      family.giveUp(product(set, failing));
                    }
                    return kept;
                  })
              .toList();
    }

    private static double product(CutSet set, double[] failing) {
      double product = 1;
      for (int member : set.members()) {
        product *= failing[member];
      }
      return product;
    }

    double discarded() {
      double bound = family.discarded * ROUNDING;
      if (cutOff.probabilities().isEmpty() && !family.complete) {
        bound = Math.min(bound, ROUNDING * larger());
      }
      // what gets below the range of a double loses less than the least one, every time
      double lost = underflows ? Double.MIN_NORMAL : 0;
      return family.complete ? 0 : Math.min(1, bound + lost);
    }

    /** The probability that more components have failed than a set within the cut-off holds. */
    private double larger() {
      int more = (int) Math.min(failing.length + 1L, cutOff.size() + 1L);
      return Truncation.tail(failing, more, meter);
    }
  }

  /**
   * Returns the sets.
   *
   * @return the family of the sets within the cut-off, with all its questions
   */
  public MinimalSets sets() {
    return sets;
  }

  /**
   * Streams the sets in order of size and, within a size, in order of components.
   *
   * @return a sequential stream of unmodifiable sets
   */
  public Stream<Set<String>> stream() {
    return sets.stream();
  }

  @Override
  public Iterator<Set<String>> iterator() {
    return sets.iterator();
  }

  /**
   * Returns the cut-off.
   *
   * @return as given
   */
  public CutOff cutOff() {
    return cutOff;
  }

  /**
   * Tells whether nothing was cut off.
   *
   * @return true when these are known to be all minimal sets of the structure; false when some
   *     were, or may have been, left out
   */
  public boolean isComplete() {
    return complete;
  }

  /**
   * Bounds what was cut off at a probability.
   *
   * @return an upper bound, for the probabilities of the cut-off; see {@link
   *     #discarded(Probabilities)}
   * @throws IllegalStateException if the cut-off is a size, which knows of no probabilities
   */
  public double discarded() {
    return discarded.orElseThrow(
        () ->
            new IllegalStateException(
                "the cut-off, "
                    + cutOff
                    + ", has no probabilities; call discarded(Probabilities) with them"));
  }

  /**
   * Bounds what was cut off, within {@link Budget#ofHeap()}.
   *
   * @param p the components' probabilities; components must fail independently
   * @return an upper bound; see {@link #discarded(Probabilities, Budget)}
   * @throws IllegalArgumentException if components have no probability
   * @throws BudgetExceededException if the work grows too large
   */
  public double discarded(Probabilities p) {
    return discarded(p, Budget.ofHeap());
  }

  /**
   * Bounds what was cut off: for cut sets, the probability that the system has failed though none
   * of the sets found has failed altogether; for path sets, that it works though none of them works
   * altogether. With the sets found, it encloses the system's probability of failing (or working):
   * from the probability that some set found has, to that plus this bound.
   *
   * <p>Why it holds: the search gives branches up in which some components are known to have failed
   * and others to work. Every state in question is in one of them, and the probability of each is
   * bounded by a product; gates add up the bounds of their parts. For a cut-off by size it is also
   * at most the probability that more components have failed than that size. The bound is enlarged
   * by a billionth to cover rounding, and by 2.3e-308 where products of the probabilities may get
   * below the range of a double.
   *
   * @param p the components' probabilities; components must fail independently
   * @param budget how much work it may cost
   * @return from 0, where nothing was cut off, to 1. For path sets of a system that works most of
   *     the time it says little. Cost: that of the generation, a little more for the bound, unless
   *     they are the cut-off's own probabilities.
   * @throws IllegalArgumentException if components have no probability
   * @throws BudgetExceededException if the budget is used up
   */
  public double discarded(Probabilities p, Budget budget) {
    Check.notNull(p, "probabilities");
    Check.notNull(budget, "budget");
    if (discarded.isPresent() && cutOff.probabilities().equals(Optional.of(p))) {
      return discarded.get();
    }
    return new Search(structure, paths, cutOff, Optional.of(p), budget).discarded();
  }

  /**
   * The first sets in a row, and the cut-off.
   *
   * @return one line
   */
  @Override
  public String toString() {
    return sets + " (" + cutOff + (complete ? "; nothing was cut off)" : ")");
  }
}
