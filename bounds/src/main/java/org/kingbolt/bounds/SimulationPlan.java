package org.kingbolt.bounds;

import java.time.Duration;
import java.util.Optional;
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

  private static final long FIRST_NODES = 1 << 12;
  private static final long FEWEST_NODES = 16;
  private static final int MORE = 8;

  private final Structure structure;
  private final Probabilities p;
  private final SimulationStates states;
  private final Simulation simulation;
  private final Function<Budget, CoherentSystem> compiled;
  private final long started = System.nanoTime();

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
    SimulationPlan plan = new SimulationPlan(structure, p, simulation, compiled);
    SimulationModel model = plan.model();
    return new SimulationRun(model, simulation, plan.started).estimate();
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
      if (isInterrupt(over)) {
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

  /** With ever more nodes, until the simpler system is near enough. */
  private SimulationModel conditional() {
    long most = simulation.budget().nodes();
    long nodes = Math.min(most, Math.max(FIRST_NODES, 16L * states.size()));
    long first = nodes;
    Optional<SimulationModel> best = Optional.empty();
    while (true) {
      try {
        Enclosure enclosure = Enclosure.of(structure, p, budget(nodes));
        boolean near = narrow(enclosure);
        SimulationModel model = conditional(enclosure);
        if (best.isEmpty() || model.scale() < best.get().scale()) {
          best = Optional.of(model);
        }
        if (near || nodes == most) {
          return best.get();
        }
      } catch (BudgetExceededException over) {
        if (isInterrupt(over)) {
          throw over;
        }
        boolean tooLarge = over.limit() == BudgetExceededException.Limit.NODES;
        if (!tooLarge || nodes == most) {
          return best.orElseGet(() -> smaller(first, over));
        }
      }
      nodes = Math.min(most, MORE * nodes);
    }
  }

  /** With ever fewer nodes: what is exact may be a diagram that is too large to keep. */
  private SimulationModel smaller(long first, BudgetExceededException reason) {
    for (long nodes = first / 2; nodes >= FEWEST_NODES; nodes /= 2) {
      try {
        Enclosure enclosure = Enclosure.of(structure, p, budget(nodes));
        narrow(enclosure);
        return conditional(enclosure);
      } catch (BudgetExceededException over) {
        if (over.limit() != BudgetExceededException.Limit.NODES) {
          throw over;
        }
      }
    }
    throw reason;
  }

  private static boolean isInterrupt(BudgetExceededException over) {
    return over.limit() == BudgetExceededException.Limit.INTERRUPT;
  }

  /** What is left of the preparation's time. */
  private Budget budget(long nodes) {
    Budget budget = simulation.budget();
    if (nodes == budget.nodes() && !simulation.hasTime()) {
      return budget;
    }
    Budget part = Budget.ofNodes(nodes);
    long left = simulation.nanos() / 2 - (System.nanoTime() - started);
    return simulation.hasTime() ? part.withTime(Duration.ofNanos(Math.max(1, left))) : part;
  }

  /** Narrows until the simpler system is near enough; false if it will not be. */
  private static boolean narrow(Enclosure enclosure) {
    try {
      while (ratio(enclosure) > NEAR && enclosure.narrow()) {}
    } catch (BudgetExceededException over) {
      if (over.limit() != BudgetExceededException.Limit.TIME) {
        throw over;
      }
    }
    return !(ratio(enclosure) > NEAR);
  }

  private SimulationModel conditional(Enclosure enclosure) {
    boolean failing = isFailingRarer(enclosure);
    Budget budget = budget(simulation.budget().nodes());
    Diagram diagram = failing ? enclosure.lessWorking(budget) : enclosure.moreWorking(budget);
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
