package org.kingbolt.importance;

import com.google.common.collect.ImmutableMap;
import java.util.ArrayList;
import java.util.HashMap;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Objects;
import java.util.function.ToDoubleFunction;
import java.util.stream.Collectors;
import org.kingbolt.core.CoherentSystem;
import org.kingbolt.core.Probabilities;
import org.kingbolt.core.Probability;
import org.kingbolt.core.Structure;

/**
 * What to believe of each component, and which to look at next, when the system is known to have
 * failed, or to work, and so are some components. Exact, by conditioning; inspections are taken to
 * tell the truth.
 *
 * <p>Each step gives a new diagnosis. A component of which neither is said is one that remains.
 *
 * <p>Assumes that components fail independently before anything is known. Immutable; safe to share
 * between threads.
 *
 * <pre>{@code
 * Diagnosis diagnosis = Diagnosis.of(system).given(p).systemFailed().working("intake");
 * diagnosis.posterior().top(3);
 * diagnosis.information().top(1);
 * }</pre>
 */
public final class Diagnosis {

  private static final double LN2 = Math.log(2);

  /** What is known of the system itself. */
  private enum SystemState {
    UNKNOWN,
    WORKING,
    FAILED
  }

  /** A system whose components' probabilities are still to be given. */
  public static final class Start {
    private final CoherentSystem system;

    private Start(CoherentSystem system) {
      this.system = system;
    }

    /**
     * Fixes the components' probabilities before anything is known.
     *
     * @param p the probability of each component; a register may name more
     * @return a diagnosis that knows nothing yet
     * @throws IllegalArgumentException if components have no probability; the message lists them
     */
    public Diagnosis given(Probabilities p) {
      Objects.requireNonNull(
          p,
          "probabilities are null; give those of all components, such as Probabilities.all(0.9)");
      Gains prior = Gains.of(system, p);
      return new Diagnosis(system, prior, SystemState.UNKNOWN, ImmutableMap.of());
    }
  }

  private final CoherentSystem system;
  private final Gains prior;
  private final SystemState state;
  private final ImmutableMap<String, Boolean> known;

  private Diagnosis(
      CoherentSystem system, Gains prior, SystemState state, ImmutableMap<String, Boolean> known) {
    this.system = system;
    this.prior = prior;
    this.state = state;
    this.known = known;
  }

  /**
   * Diagnosis of a structure, which is compiled within the default budget.
   *
   * @param structure the system's structure
   * @return a start
   * @throws org.kingbolt.core.BudgetExceededException if the structure is too large to compile
   */
  public static Start of(Structure structure) {
    return of(
        Objects.requireNonNull(
                structure, "structure is null; give a structure, or a system compiled from one")
            .compile());
  }

  /**
   * Diagnosis of a compiled system.
   *
   * @param system the system
   * @return a start
   */
  public static Start of(CoherentSystem system) {
    return new Start(
        Objects.requireNonNull(
            system, "system is null; give a compiled system, or a structure to compile"));
  }

  /**
   * Takes it as known that the system has failed.
   *
   * @return the diagnosis
   * @throws IllegalStateException if it is known to work
   */
  public Diagnosis systemFailed() {
    return system(SystemState.FAILED, SystemState.WORKING);
  }

  /**
   * Takes it as known that the system works.
   *
   * @return the diagnosis
   * @throws IllegalStateException if it is known to have failed
   */
  public Diagnosis systemWorking() {
    return system(SystemState.WORKING, SystemState.FAILED);
  }

  private Diagnosis system(SystemState now, SystemState opposite) {
    if (state == opposite) {
      throw new IllegalStateException(
          "the system is said both to work and to have failed; say one of them");
    }
    return new Diagnosis(system, prior, now, known);
  }

  /**
   * Takes it as known that a component works.
   *
   * @param component its name
   * @return the diagnosis
   * @throws IllegalArgumentException if the system has no such component, or it is known to have
   *     failed, or it cannot work
   */
  public Diagnosis working(String component) {
    return component(component, true);
  }

  /**
   * Takes it as known that a component has failed.
   *
   * @param component its name
   * @return the diagnosis
   * @throws IllegalArgumentException if the system has no such component, or it is known to work,
   *     or it cannot fail
   */
  public Diagnosis failed(String component) {
    return component(component, false);
  }

  private Diagnosis component(String component, boolean works) {
    int place = Names.place(Names.places(system.components()), component);
    if ((works ? prior.working(place) : prior.failing(place)) == 0) {
      throw new IllegalArgumentException(
          "component "
              + Names.quoted(component)
              + " is said to "
              + (works ? "work" : "have failed")
              + ", which has probability 0; give it a probability between 0 and 1");
    }
    if (known.getOrDefault(component, works) != works) {
      throw new IllegalArgumentException(
          "component "
              + Names.quoted(component)
              + " is said both to work and to have failed; say one of them");
    }
    Map<String, Boolean> more = new LinkedHashMap<>(known);
    more.put(component, works);
    return new Diagnosis(system, prior, state, ImmutableMap.copyOf(more));
  }

  /**
   * The components of which nothing is known.
   *
   * @return in the system's order
   */
  public List<String> remaining() {
    return system.components().stream().filter(name -> !known.containsKey(name)).toList();
  }

  /**
   * The probability that each remaining component has failed, given all that is known.
   *
   * @return from 0 to 1. Cost: one scan up and one down.
   * @throws IllegalStateException if what is known cannot be
   */
  public Ranking posterior() {
    return ranking("failed, " + told(), Probability::failing);
  }

  /**
   * One component's probability, given all that is known.
   *
   * @param component its name
   * @return both sides; certain where the component is known
   * @throws IllegalArgumentException if the system has no such component
   * @throws IllegalStateException if what is known cannot be
   */
  public Probability posterior(String component) {
    return Posteriors.of(system, conditioned(), state())
        .get(Names.place(Names.places(system.components()), component));
  }

  /** Before the question, with known components held. */
  private Gains conditioned() {
    Map<Integer, Probability> held = new HashMap<>();
    Map<String, Integer> places = Names.places(system.components());
    known.forEach(
        (name, works) ->
            held.put(
                Names.place(places, name), works ? Probability.CERTAIN : Probability.IMPOSSIBLE));
    return prior.with(held);
  }

  private Posteriors.Event state() {
    return switch (state) {
      case UNKNOWN -> Posteriors.Event.NONE;
      case WORKING -> Posteriors.Event.WORKS;
      case FAILED -> Posteriors.Event.FAILED;
    };
  }

  /**
   * What the inspection of each remaining component is expected to tell, in bits: by how much the
   * entropy of the joint state of all components is expected to fall. As an inspection shows the
   * component's state for certain, that is the entropy of its own posterior: most where failed and
   * working are equally likely.
   *
   * <p>Source: de Kleer &amp; Williams, Diagnosing multiple faults, Artif. Intell. 32 (1987) 97,
   * one step ahead, with the joint state of all components in place of a list of candidates (from
   * memory).
   *
   * @return from 0 to 1 bit; the first is the next to inspect for the most information
   * @throws IllegalStateException if what is known cannot be
   */
  public Ranking information() {
    return ranking("bits told by inspection", Diagnosis::entropy);
  }

  private static double entropy(Probability p) {
    double bits = -(p.working() * log(p.working(), p.failing()));
    return (bits - p.failing() * log(p.failing(), p.working())) / LN2 + 0.0;
  }

  /** The logarithm of one side, by the other where that keeps the digits. */
  private static double log(double side, double other) {
    return side == 0 ? 0 : side > 0.5 ? Math.log1p(-other) : Math.log(side);
  }

  private Ranking ranking(String measure, ToDoubleFunction<Probability> value) {
    Posteriors posteriors = Posteriors.of(system, conditioned(), state());
    Map<String, Integer> places = Names.places(system.components());
    List<String> names = remaining();
    double[] values =
        names.stream()
            .mapToDouble(name -> value.applyAsDouble(posteriors.get(Names.place(places, name))))
            .toArray();
    return Ranking.of(measure, names, values);
  }

  /**
   * The probability of having failed for each unit of inspection cost: the classical order of
   * inspection. Where exactly one of the listed components has failed, going down this order finds
   * it at the least expected cost; in other cases it is a rule of thumb, and {@link
   * #cheapestInspection} is exact.
   *
   * <p>Source: Mitten, An analytic solution to the least cost testing sequence problem, J. Ind.
   * Eng. 11 (1960) 17 (from memory).
   *
   * @param costs by component: what an inspection costs, above 0; those not listed, or known, are
   *     not inspected
   * @return highest first
   * @throws IllegalArgumentException if a cost is not a positive number, or a component unknown
   * @throws IllegalStateException if what is known cannot be
   */
  public Ranking failedPerCost(Map<String, Double> costs) {
    Map<String, Double> left = InspectionCosts.checked(costs, system.components(), known.keySet());
    Ranking failed = posterior();
    List<String> names = List.copyOf(left.keySet());
    double[] values =
        left.entrySet().stream()
            .mapToDouble(entry -> failed.value(entry.getKey()) / entry.getValue())
            .toArray();
    return Ranking.of("probability of failed per cost", names, values);
  }

  /**
   * The best next inspection for the least expected cost until the failure is explained: until the
   * components found failed, by themselves, keep the system from working, or nothing is left to
   * inspect. Exact: all courses that inspections can take are compared.
   *
   * @param costs by component: what an inspection costs, above 0; those not listed, or known, are
   *     not inspected. At most {@value InspectionCosts#MOST} that are not known
   * @return the next component and the expected costs. Cost: one scan for each state of the
   *     components listed, and 3^n steps.
   * @throws IllegalArgumentException if a cost is not a positive number, a component is unknown, or
   *     there are too many
   * @throws IllegalStateException if the system is not said to have failed, or what is known cannot
   *     be
   */
  public CheapestInspection cheapestInspection(Map<String, Double> costs) {
    if (state != SystemState.FAILED) {
      throw new IllegalStateException(
          "there is no failure to explain; say systemFailed() first, or ask for information()");
    }
    Posteriors.of(system, conditioned(), state());
    Map<String, Double> left = InspectionCosts.checked(costs, system.components(), known.keySet());
    return InspectionCosts.cheapest(system, conditioned(), known, left);
  }

  private String told() {
    List<String> facts = new ArrayList<>();
    if (state != SystemState.UNKNOWN) {
      facts.add("the system " + (state == SystemState.FAILED ? "failed" : "works"));
    }
    known.forEach((name, works) -> facts.add(name + (works ? " works" : " failed")));
    return facts.isEmpty()
        ? "nothing known"
        : facts.stream().limit(4).collect(Collectors.joining(", ", "given ", ""))
            + (facts.size() > 4 ? " and " + (facts.size() - 4) + " more" : "");
  }

  /**
   * Says what is known.
   *
   * @return one line
   */
  @Override
  public String toString() {
    return "Diagnosis[" + system + "] " + told() + "; call posterior() or information()";
  }
}
