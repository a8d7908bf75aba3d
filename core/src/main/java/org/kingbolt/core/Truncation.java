package org.kingbolt.core;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.BitSet;
import java.util.Comparator;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.Set;
import org.kingbolt.core.TruncatedFamily.CutSet;
import org.kingbolt.core.diagram.CutTree;
import org.kingbolt.core.diagram.NetworkPaths;
import org.kingbolt.core.diagram.WorkMeter;

/**
 * The minimal cut sets of a structure within a cut-off, without compiling it: bottom-up, every
 * operator making its family from those of its parts.
 *
 * <p>Gates join and multiply families and drop what contains other sets, and what costs too much
 * (expansion with absorption and truncation, the common practice of the trade). Other operators are
 * searched over their slots by a {@link CutTree} where their parts share no component, and over
 * components where they do.
 */
final class Truncation {

  private final Numbering numbering;
  private final WorkMeter meter;
  private final double[] cost;
  private final double[] failing;
  private final double[] working;
  private final boolean weighs;
  private final double limit;
  private final TruncatedAlgebra algebra;
  private final TruncatedFamily[] families;

  /** By sub-structure: how many slots it stands in, and whether components below it do in more. */
  private final int[] uses;

  private final boolean[] shares;

  /**
   * Prepares.
   *
   * @param cost of each component
   * @param limit the largest cost of a set
   * @param failing each component's probability of failing; all 1 where nothing is weighed
   * @param working each component's probability of working; likewise
   * @param weighs whether what is left out is weighed
   */
  Truncation(
      Numbering numbering,
      double[] cost,
      double limit,
      double[] failing,
      double[] working,
      boolean weighs,
      WorkMeter meter) {
    this.numbering = numbering;
    this.meter = meter;
    this.cost = cost;
    this.failing = failing;
    this.working = working;
    this.weighs = weighs;
    this.limit = limit + CutTree.SLACK;
    this.algebra = new TruncatedAlgebra(cost, failing, meter);
    this.families = new TruncatedFamily[numbering.size()];
    this.uses = new int[numbering.size()];
    this.shares = new boolean[numbering.size()];
  }

  /** The family of the whole. */
  TruncatedFamily family() {
    int size = numbering.size();
    for (int number = 0; number < size; number++) {
      for (int slot = 0; slot < slots(number); slot++) {
        uses[numbering.part(number, slot)]++;
      }
    }
    int[] left = uses.clone();
    int component = 0;
    for (int number = 0; number < size; number++) {
      Structure structure = numbering.structure(number);
      for (int slot = 0; slot < slots(number); slot++) {
        int part = numbering.part(number, slot);
        shares[number] |= shares[part] || uses[part] > 1;
      }
      families[number] =
          structure instanceof ComponentStructure
              ? single(component++)
              : structure instanceof ConstantStructure
                  ? constant(structure)
                  : operator(number, structure, left);
      for (int slot = 0; slot < slots(number); slot++) {
        int part = numbering.part(number, slot);
        if (--left[part] == 0) {
          algebra.release(families[part]);
          families[part] = new TruncatedFamily();
        }
      }
    }
    return bounded(families[size - 1]);
  }

  private int slots(int number) {
    return numbering.structure(number).parts().size();
  }

  private TruncatedFamily part(int number, int slot) {
    return families[numbering.part(number, slot)];
  }

  private TruncatedFamily single(int component) {
    TruncatedFamily family = new TruncatedFamily();
    if (cost[component] <= limit) {
      family.sets.add(algebra.set(new int[] {component}));
    } else {
      family.giveUp(failing[component]);
    }
    return family;
  }

  private static TruncatedFamily constant(Structure structure) {
    return structure.isNeverWorking() ? TruncatedFamily.failed() : new TruncatedFamily();
  }

  private TruncatedFamily operator(int number, Structure structure, int[] left) {
    boolean sharing = shares[number] && !isOfDistinctComponents(number);
    if (structure instanceof GateStructure gate) {
      return gate.isSeries()
          ? series(number, sharing, left)
          : failing(number, slots(number) - gate.k() + 1, sharing);
    }
    Optional<List<int[]>> listed = structure.slotCuts();
    if (listed.isPresent()) {
      return listed(number, listed.get(), sharing);
    }
    return sharing && !isApart(number) ? overComponents(number) : overSlots(number);
  }

  private boolean isOfDistinctComponents(int number) {
    Set<Integer> seen = new java.util.HashSet<>();
    for (int slot = 0; slot < slots(number); slot++) {
      int part = numbering.part(number, slot);
      if (!(numbering.structure(part) instanceof ComponentStructure) || !seen.add(part)) {
        return false;
      }
    }
    return true;
  }

  /** Whether the parts of an operator have no component in common. */
  private boolean isApart(int number) {
    int tied = 0;
    for (int slot = 0; slot < slots(number); slot++) {
      int part = numbering.part(number, slot);
      tied += shares[part] || uses[part] > 1 ? 1 : 0;
    }
    if (tied < 2) {
      return true;
    }
    Map<String, Integer> slotOf = new HashMap<>();
    List<Structure> parts = numbering.structure(number).parts();
    for (int slot = 0; slot < parts.size(); slot++) {
      for (String name : Fold.componentSet(parts.get(slot))) {
        meter.at(slotOf.size());
        if (slotOf.put(name, slot) != null) {
          return false;
        }
      }
    }
    return true;
  }

  /** Fails when any part fails. The largest list grows in place where no one else needs it. */
  private TruncatedFamily series(int number, boolean sharing, int[] left) {
    int largest = 0;
    for (int slot = 1; slot < slots(number); slot++) {
      largest = part(number, slot).sets.size() > part(number, largest).sets.size() ? slot : largest;
    }
    TruncatedFamily whole = new TruncatedFamily();
    TruncatedFamily first = part(number, largest);
    if (left[numbering.part(number, largest)] == 1) {
      whole.sets = first.sets;
      first.sets = List.of();
    } else {
      whole.sets.addAll(first.sets);
    }
    whole.leaveOutWith(first);
    for (int slot = 0; slot < slots(number); slot++) {
      if (slot != largest) {
        TruncatedFamily part = part(number, slot);
        for (CutSet set : part.sets) {
          algebra.hold(0);
          whole.sets.add(set);
        }
        whole.leaveOutWith(part);
      }
    }
    if (sharing) {
      algebra.minimize(whole);
    }
    return whole;
  }

  /** Fails when so many parts fail: after each part, the families for every number up to it. */
  private TruncatedFamily failing(int number, int needed, boolean sharing) {
    double least = Double.POSITIVE_INFINITY;
    double[] cheapest = new double[slots(number)];
    for (int slot = 0; slot < cheapest.length; slot++) {
      cheapest[slot] = part(number, slot).cheapest();
      least = Math.min(least, cheapest[slot]);
    }
    Arrays.sort(cheapest);
    double sum = Arrays.stream(cheapest).limit(needed).sum();
    if (!sharing && sum > limit) {
      TruncatedFamily none = new TruncatedFamily();
      none.giveUp(weighs ? atLeastFails(number, needed) : 1);
      return none;
    }
    List<TruncatedFamily> made = new ArrayList<>(List.of(TruncatedFamily.failed()));
    for (int slot = 0; slot < slots(number); slot++) {
      TruncatedFamily part = part(number, slot);
      int fewest = Math.max(1, needed - (slots(number) - slot) + 1);
      if (made.size() <= needed) {
        made.add(new TruncatedFamily());
      }
      for (int j = made.size() - 1; j >= fewest; j--) {
        double affordable = sharing ? limit : limit - (needed - j) * least;
        TruncatedFamily more = algebra.product(made.get(j - 1), part, sharing, affordable);
        TruncatedFamily whole = made.get(j);
        whole.sets.addAll(more.sets);
        whole.leaveOutWith(more);
        if (sharing) {
          algebra.minimize(whole);
        }
      }
    }
    return made.get(needed);
  }

  /** An upper bound on the probability that so many parts, which share nothing, have failed. */
  private double atLeastFails(int number, int needed) {
    double[] fails = new double[slots(number)];
    Arrays.setAll(fails, slot -> part(number, slot).failing());
    return tail(fails, needed, meter);
  }

  /** The probability of at least so many of independent events. */
  static double tail(double[] events, int needed, WorkMeter meter) {
    double[] exactly = new double[needed + 1];
    exactly[0] = 1;
    for (double event : events) {
      for (int j = needed; j >= 0; j--) {
        meter.at(needed);
        double stays = j == needed ? exactly[j] : exactly[j] * (1 - event);
        exactly[j] = stays + (j > 0 ? exactly[j - 1] * event : 0);
      }
    }
    return Math.min(1, exactly[needed]);
  }

  /** Fails when all slots of a listed set fail. */
  private TruncatedFamily listed(int number, List<int[]> cuts, boolean sharing) {
    TruncatedFamily whole = new TruncatedFamily();
    for (int[] cut : cuts) {
      expand(number, cut, sharing, whole);
    }
    algebra.minimize(whole);
    return whole;
  }

  /** Adds the sets that make some slots fail. */
  private void expand(int number, int[] slots, boolean sharing, TruncatedFamily whole) {
    TruncatedFamily product = TruncatedFamily.failed();
    for (int slot : slots) {
      product = algebra.product(product, part(number, slot), sharing, limit);
    }
    whole.sets.addAll(product.sets);
    whole.leaveOutWith(product);
  }

  private TruncatedFamily overSlots(int number) {
    Structure structure = numbering.structure(number);
    double[] slotCost = new double[slots(number)];
    double[] slotFailing = new double[slotCost.length];
    double[] slotWorking = new double[slotCost.length];
    for (int slot = 0; slot < slotCost.length; slot++) {
      TruncatedFamily part = part(number, slot);
      boolean component = structure.parts().get(slot) instanceof ComponentStructure;
      slotCost[slot] = part.cheapest();
      slotFailing[slot] = part.failing();
      boolean known = component && !part.sets.isEmpty();
      slotWorking[slot] = known ? working[part.sets.get(0).members()[0]] : 1;
    }
    TruncatedFamily whole = new TruncatedFamily();
    Optional<NetworkPaths> paths = structure.slotPaths(slotCost, limit, meter);
    if (paths.isPresent()) {
      for (int[] cut : paths.get().sets()) {
        expand(number, cut, false, whole);
      }
      if (!paths.get().isComplete()) {
        whole.giveUp(1);
      }
      return bounded(whole);
    }
    CutTree tree = new CutTree(slotCost, limit, slotFailing, slotWorking, weighs, meter);
    for (int[] cut : tree.search(structure.routes())) {
      expand(number, cut, false, whole);
    }
    return searched(whole, tree);
  }

  private TruncatedFamily searched(TruncatedFamily whole, CutTree tree) {
    whole.discarded = Math.min(1, whole.discarded + tree.discarded());
    whole.complete &= tree.isComplete();
    return bounded(whole);
  }

  /**
   * Bounds what is left out by the probability that none of the sets has failed altogether, which
   * is at most that of none of a few sets without common components: much where sets are probable,
   * as path sets are, seen from the dual.
   */
  private TruncatedFamily bounded(TruncatedFamily whole) {
    if (weighs && whole.discarded > 0) {
      List<CutSet> likely = new ArrayList<>(whole.sets);
      likely.sort(Comparator.comparingDouble(set -> -set.failing()));
      BitSet taken = new BitSet();
      double none = 1;
      for (CutSet set : likely) {
        meter.at(likely.size());
        if (Arrays.stream(set.members()).noneMatch(taken::get)) {
          Arrays.stream(set.members()).forEach(taken::set);
          none *= anyWorks(set);
        }
      }
      whole.discarded = Math.min(whole.discarded, none);
    }
    return whole;
  }

  private double anyWorks(CutSet set) {
    double all = 1;
    double any = 0;
    for (int member : set.members()) {
      any += all * working[member];
      all *= failing[member];
    }
    return Math.min(1, any);
  }

  /** Searches an operator whose parts share components, over the components. */
  private TruncatedFamily overComponents(int number) {
    Structure structure = numbering.structure(number);
    List<String> all = numbering.components();
    Map<String, Integer> global = new HashMap<>();
    all.forEach(name -> global.put(name, global.size()));
    Numbering inner = new Numbering(structure, meter);
    int[] members =
        inner.components().stream().mapToInt(name -> global.getOrDefault(name, 0)).toArray();
    CutTree tree =
        new CutTree(
            Arrays.stream(members).mapToDouble(member -> cost[member]).toArray(),
            limit,
            Arrays.stream(members).mapToDouble(member -> failing[member]).toArray(),
            Arrays.stream(members).mapToDouble(member -> working[member]).toArray(),
            weighs,
            meter);
    TruncatedFamily whole = new TruncatedFamily();
    for (int[] cut : tree.search(ComponentRoutes.of(inner, meter))) {
      int[] set = Arrays.stream(cut).map(member -> members[member]).sorted().toArray();
      whole.sets.add(algebra.set(set));
    }
    return searched(whole, tree);
  }
}
