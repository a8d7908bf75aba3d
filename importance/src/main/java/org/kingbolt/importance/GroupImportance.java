package org.kingbolt.importance;

import com.google.common.collect.ImmutableList;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.Collection;
import java.util.List;
import java.util.Map;
import java.util.Objects;
import java.util.function.ToDoubleFunction;
import org.kingbolt.core.Budget;
import org.kingbolt.core.CoherentSystem;
import org.kingbolt.core.Probability;

/**
 * Importance of groups of components that are moved together: a bus, a supplier, a type. Each
 * measure is that of a component, with "the component works" read as "all members work" and "has
 * failed" as "all members have failed", and is equal to it for groups of one.
 *
 * <p>Groups may overlap. r is the system's probability of working, F that of having failed; {@code
 * 1_G} and {@code 0_G} hold all members of a group working or failed. Degenerate cases are those of
 * {@link ImportanceAtProbabilities}.
 *
 * <p>Immutable; safe to share between threads. Example: {@code
 * Importance.of(system).given(p).groups(Map.of("bus A", Set.of("feeder1",
 * "feeder2"))).riskAchievementWorth()}.
 */
public final class GroupImportance {

  private final CoherentSystem system;
  private final Gains given;
  private final FirstOrder first;
  private final ImmutableList<String> names;
  private final ImmutableList<int[]> groups;

  GroupImportance(
      CoherentSystem system,
      Gains given,
      FirstOrder first,
      Map<String, ? extends Collection<String>> groups) {
    Objects.requireNonNull(groups, "groups are null; give a map from names to components");
    if (groups.isEmpty()) {
      throw new IllegalArgumentException("there are no groups; give at least one");
    }
    this.system = system;
    this.given = given;
    this.first = first;
    List<String> titles = new ArrayList<>();
    List<int[]> members = new ArrayList<>();
    Map<String, Integer> places = Names.places(system.components());
    groups.forEach(
        (name, components) -> {
          titles.add(Objects.requireNonNull(name, "a group's name is null; give it a name"));
          String what = "group " + Names.quoted(name);
          members.add(Names.places(places, components, what));
        });
    this.names = ImmutableList.copyOf(titles);
    this.groups = ImmutableList.copyOf(members);
  }

  /**
   * Birnbaum importance of the group: {@code r(1_G) - r(0_G)}, the probability that the group as a
   * whole decides.
   *
   * @return from 0 to 1. Cost: two scans a group, and three for each member where a difference
   *     would lose digits.
   */
  public Ranking birnbaum() {
    return ranking("Birnbaum importance", group -> working(group).over(failed(group), group));
  }

  /**
   * Criticality, system failing: {@code (F - F(1_G)) / F}, the probability that the system would
   * work if the whole group did, given that it has failed.
   *
   * @return from 0 to 1
   */
  public Ranking criticalityFailing() {
    return ranking(
        "criticality, system failing",
        group -> Measures.share(working(group).over(given, group), first.fails()));
  }

  /**
   * Criticality, system working: {@code (r - r(0_G)) / r}, the probability that the system would
   * have failed if the whole group had, given that it works.
   *
   * @return from 0 to 1
   */
  public Ranking criticalityWorking() {
    return ranking(
        "criticality, system working",
        group -> Measures.share(given.over(failed(group), group), first.works()));
  }

  /**
   * Fussell-Vesely importance within {@link Budget#ofHeap()}; see {@link #fussellVesely(Budget)}.
   *
   * @return from 0 to 1
   * @throws org.kingbolt.core.BudgetExceededException if the event grows too large
   */
  public Ranking fussellVesely() {
    return fussellVesely(Budget.ofHeap());
  }

  /**
   * Exact Fussell-Vesely importance: the probability that some minimal cut set with at least one
   * member of the group has failed altogether, given that the system has failed.
   *
   * @param budget how much work it may cost
   * @return from 0 to 1
   * @throws org.kingbolt.core.BudgetExceededException if the budget is used up
   */
  public Ranking fussellVesely(Budget budget) {
    Objects.requireNonNull(budget, "budget is null; it must be given");
    return ranking(
        "Fussell-Vesely importance", FussellVesely.exactOfGroups(system, first, groups, budget));
  }

  /**
   * Fussell-Vesely importance as a ratio of sums: the probabilities of the minimal cut sets with at
   * least one member of the group, over those of all.
   *
   * @return from 0 to 1
   * @throws org.kingbolt.core.BudgetExceededException if the minimal cut sets are too many
   */
  public Ranking fussellVeselyRareEvent() {
    return ranking(
        "Fussell-Vesely importance, rare events",
        FussellVesely.rareEventOfGroups(system, first, groups, Budget.ofHeap()));
  }

  /**
   * Risk achievement worth: {@code F(0_G) / F}.
   *
   * @return from 1 up, possibly infinite
   */
  public Ranking riskAchievementWorth() {
    return ranking(
        "risk achievement worth",
        group -> Measures.ratio(failed(group).reliability().failing(), first.fails()));
  }

  /**
   * Risk reduction worth: {@code F / F(1_G)}.
   *
   * @return from 1 up, possibly infinite
   */
  public Ranking riskReductionWorth() {
    return ranking(
        "risk reduction worth",
        group -> Measures.ratio(first.fails(), working(group).reliability().failing()));
  }

  /**
   * Improvement potential: {@code r(1_G) - r}.
   *
   * @return from 0 to 1
   */
  public Ranking improvementPotential() {
    return ranking("improvement potential", group -> working(group).over(given, group));
  }

  /**
   * Differential importance for equal changes of all probabilities: the sum over the members, for
   * this measure adds up (Borgonovo &amp; Apostolakis 2001).
   *
   * @return from 0 to 1
   */
  public Ranking differentialUniform() {
    return ranking("differential importance, uniform", sums(Measures.differentialUniform(first)));
  }

  /**
   * Differential importance for changes in proportion to the failing probabilities: the sum over
   * the members.
   *
   * @return from 0 to 1
   */
  public Ranking differentialProportional() {
    return ranking(
        "differential importance, proportional", sums(Measures.differentialProportional(first)));
  }

  private double[] sums(double[] parts) {
    return groups.stream()
        .mapToDouble(group -> Arrays.stream(group).mapToDouble(i -> parts[i]).sum())
        .toArray();
  }

  /**
   * Diagnostic importance: the probability that all members have failed, given that the system has.
   *
   * @return from 0 to 1
   */
  public Ranking diagnosticFailing() {
    return ranking(
        "all failed, given the system has",
        group ->
            Measures.share(
                product(group, false) * failed(group).reliability().failing(), first.fails()));
  }

  /**
   * The twin of {@link #diagnosticFailing()}: the probability that all members work, given that the
   * system does.
   *
   * @return from 0 to 1
   */
  public Ranking diagnosticWorking() {
    return ranking(
        "all work, given the system does",
        group ->
            Measures.share(
                product(group, true) * working(group).reliability().working(), first.works()));
  }

  private double product(int[] group, boolean works) {
    double product = 1;
    for (int member : group) {
      product *= works ? given.working(member) : given.failing(member);
    }
    return product;
  }

  /**
   * Joint importance of two groups: {@code r(1_G,1_H) - r(1_G,0_H) - r(0_G,1_H) + r(0_G,0_H)}.
   *
   * @param first a group's name
   * @param second another's, with no member in common
   * @return from -1 to 1. Cost: a few scans for every pair of members.
   * @throws IllegalArgumentException if there is no such group, or the two share a component
   */
  public double jointImportance(String first, String second) {
    int[] one = group(first);
    int[] other = group(second);
    for (int member : one) {
      if (Arrays.stream(other).anyMatch(i -> i == member)) {
        throw new IllegalArgumentException(
            "groups "
                + Names.quoted(first)
                + " and "
                + Names.quoted(second)
                + " share component "
                + Names.quoted(system.components().get(member))
                + "; name groups that share none");
      }
    }
    double sum = 0;
    Gains state = given.with(one, Probability.IMPOSSIBLE);
    for (int i : one) {
      Gains inner = state.with(other, Probability.IMPOSSIBLE);
      for (int j : other) {
        sum += second(inner, i, j);
        inner = inner.with(j, Probability.CERTAIN);
      }
      state = state.with(i, Probability.CERTAIN);
    }
    return sum;
  }

  private double second(Gains at, int i, int j) {
    return new MixedDerivatives(
            system.diagram(),
            at.working(),
            at.failing(),
            Budget.ofHeap().start("joining the importance of groups"))
        .of(new int[] {i, j});
  }

  private int[] group(String name) {
    Objects.requireNonNull(name, "group is null; give the name of one");
    int place = names.indexOf(name);
    if (place < 0) {
      throw new IllegalArgumentException(
          "unknown group "
              + Names.quoted(name)
              + "; the groups are "
              + Names.listed(names)
              + "; name one of these");
    }
    return groups.get(place);
  }

  private Gains working(int[] group) {
    return given.with(group, Probability.CERTAIN);
  }

  private Gains failed(int[] group) {
    return given.with(group, Probability.IMPOSSIBLE);
  }

  private Ranking ranking(String measure, ToDoubleFunction<int[]> value) {
    return ranking(measure, groups.stream().mapToDouble(value).toArray());
  }

  private Ranking ranking(String measure, double[] values) {
    return Ranking.of(measure, names, values);
  }

  /**
   * Says what this is and what to call on it.
   *
   * @return one line
   */
  @Override
  public String toString() {
    return "GroupImportance of " + Names.listed(names) + "; call birnbaum() or another measure";
  }
}
