package org.kingbolt.bounds;

import java.time.Duration;
import java.util.function.Function;
import org.kingbolt.core.Budget;
import org.kingbolt.core.BudgetExceededException;
import org.kingbolt.core.CoherentSystem;
import org.kingbolt.core.Enclosure;
import org.kingbolt.core.Probabilities;
import org.kingbolt.core.Structure;
import org.kingbolt.core.diagram.Diagram;

/** Prepares what a simulation draws. */
final class SimulationPlan {

  /** A simpler system that fails so much more often at most is near enough. */
  private static final double NEAR = 1.25;

  /** With fewer nodes than these no simpler system is tried. */
  private static final long FEWEST_NODES = 16;

  private static final int FEWER = 8;

  private final Structure structure;
  private final Probabilities p;
  private final SimulationStates states;
  private final Simulation simulation;
  private final Function<Budget, CoherentSystem> compiled;

  private SimulationPlan(
      Structure structure,
      Probabilities p,
      Simulation simulation,
      Function<Budget, CoherentSystem> compiled) {
    this.structure = structure;
    this.p = p;
    this.states = new SimulationStates(structure.components(), p);
    this.simulation = simulation;
    this.compiled = compiled;
  }

  /**
   * Simulates.
   *
   * @param compiled compiles the structure, if it comes to that
   */
  static Estimate run(
      Structure structure,
      Probabilities p,
      Simulation simulation,
      Function<Budget, CoherentSystem> compiled) {
    long started = System.nanoTime();
    SimulationModel model = new SimulationPlan(structure, p, simulation, compiled).model();
    return new SimulationRun(model, simulation, started, !simulation.hasTime()).estimate();
  }

  private SimulationModel model() {
    return switch (simulation.method()) {
      case BEST -> best();
      case CRUDE -> SimulationCrude.model(structure, states);
      case CONDITIONAL -> conditional();
      case COVERAGE -> coverage();
    };
  }

  private SimulationModel best() {
    try {
      return conditional();
    } catch (BudgetExceededException over) {
      if (over.limit() == BudgetExceededException.Limit.INTERRUPT) {
        throw over;
      }
      return SimulationCrude.model(structure, states);
    }
  }

  private SimulationModel coverage() {
    Budget budget = simulation.budget();
    if (!simulation.cutSets().isEmpty()) {
      return SimulationCoverage.model(
          structure, states, simulation.cutSets(), true, budget.start("reading cut sets"));
    }
    CoherentSystem system = compiled.apply(budget);
    boolean cuts = system.reliability(p).failing() <= system.reliability(p).working();
    return SimulationCoverage.model(
        structure,
        states,
        cuts ? system.minimalCutSets(budget) : system.minimalPathSets(budget),
        cuts,
        budget.start("listing minimal sets"));
  }

  /** With ever fewer nodes, as what is exact may be a diagram that is too large to keep. */
  private SimulationModel conditional() {
    Budget budget = simulation.budget();
    Budget less = budget;
    while (true) {
      try {
        return conditional(less, budget);
      } catch (BudgetExceededException over) {
        if (over.limit() != BudgetExceededException.Limit.NODES
            || less.nodes() / FEWER < FEWEST_NODES) {
          throw over;
        }
        less = fewer(less);
      }
    }
  }

  private Budget fewer(Budget budget) {
    Budget fewer = Budget.ofNodes(budget.nodes() / FEWER);
    return simulation.hasTime()
        ? fewer.withTime(Duration.ofNanos(Math.max(1, simulation.nanos() / 4)))
        : fewer;
  }

  private SimulationModel conditional(Budget effort, Budget whole) {
    Enclosure enclosure = Enclosure.of(structure, p, effort);
    try {
      while (ratio(enclosure) > NEAR && enclosure.narrow()) {}
    } catch (BudgetExceededException over) {
      if (over.limit() != BudgetExceededException.Limit.TIME) {
        throw over;
      }
    }
    boolean failing = isFailingRarer(enclosure);
    Diagram diagram = failing ? enclosure.lessWorking(whole) : enclosure.moreWorking(whole);
    return SimulationConditional.model(structure, states, diagram, failing, enclosure.isExact());
  }

  private static boolean isFailingRarer(Enclosure enclosure) {
    return enclosure.lower().failing() <= enclosure.upper().working();
  }

  /** How much more likely the simpler system is to fail (or work) than the structure, at most. */
  private static double ratio(Enclosure enclosure) {
    return isFailingRarer(enclosure)
        ? enclosure.lower().failing() / enclosure.upper().failing()
        : enclosure.upper().working() / enclosure.lower().working();
  }
}
