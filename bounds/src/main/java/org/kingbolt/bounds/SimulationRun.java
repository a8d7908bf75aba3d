package org.kingbolt.bounds;

import org.apache.commons.math3.special.Erf;
import org.kingbolt.bounds.SimulationCrew.Tally;

/**
 * Decides how many samples a simulation takes. Stopping as soon as an interval is narrow would make
 * it miss more often than stated. So the number is planned with samples of their own, which are
 * then forgotten, and what the interval may miss is shared out: nine tenths for the first look at
 * the planned number, and nine tenths of the rest for each further look, at twice as many, if the
 * interval was still too wide.
 */
final class SimulationRun {

  private static final long PLANNING = 1;
  private static final long COUNTING = 2;
  private static final long FIRST_ROUND = 16L * SimulationCrew.BATCH;
  private static final double SPENT = 0.9;
  private static final double DOUBTFUL_PLAN = 0.05;

  private final SimulationModel model;
  private final Simulation simulation;
  private final SimulationCrew crew;
  private final boolean reproducible;
  private final double missed;

  /**
   * Prepares.
   *
   * @param started when the clock started, in nanoseconds
   */
  SimulationRun(SimulationModel model, Simulation simulation, long started) {
    this.model = model;
    this.simulation = simulation;
    this.reproducible = !simulation.hasTime();
    this.missed = 1 - simulation.confidence();
    this.crew =
        new SimulationCrew(
            model, simulation.seed(), simulation.threads(), started, simulation.nanos());
  }

  Estimate estimate() {
    if (model.scale() == 0) {
      return Estimate.ofNothing(model, simulation, reproducible);
    }
    long most = simulation.mostSamples();
    if (simulation.relativeError() == 0) {
      return estimate(crew.draw(COUNTING, Tally.NOTHING, most), missed);
    }
    long wanted = planned(most);
    double left = missed;
    Tally tally = Tally.NOTHING;
    while (true) {
      tally = crew.draw(COUNTING, tally, wanted);
      if (wanted == most || tally.samples() < wanted) {
        return estimate(tally, left);
      }
      Estimate estimate = estimate(tally, SPENT * left);
      if (estimate.relativeError() <= simulation.relativeError()) {
        return estimate;
      }
      if (crew.isTimeOver()) {
        return estimate(tally, left);
      }
      left *= 1 - SPENT;
      wanted = Math.min(most, 2 * wanted);
    }
  }

  private Estimate estimate(Tally tally, double mayMiss) {
    return Estimate.of(model, tally, mayMiss, simulation, reproducible);
  }

  /** How many samples are likely to be enough, as a multiple of a batch unless it is the most. */
  private long planned(long most) {
    double error = simulation.relativeError();
    double deviations = Math.sqrt(2) * Erf.erfInv(1 - SPENT * missed);
    double hitsNeeded = deviations * deviations / (error * error);
    double enough = Math.max(30, Math.min(1000, hitsNeeded / 20));
    Tally tally = Tally.NOTHING;
    long round = FIRST_ROUND;
    while (tally.hits() < enough && round <= most / 4 && !crew.isTimeOver()) {
      tally = crew.draw(PLANNING, tally, round);
      round *= 2;
    }
    if (tally.hits() == 0) {
      return most;
    }
    EstimateShare share = EstimateShare.of(tally.hits(), tally.samples(), DOUBTFUL_PLAN);
    double certain = 2 * Math.log(2 / missed) / error;
    double samples = (hitsNeeded * share.highMiss() + certain) / share.low();
    double whole = Math.ceil(samples / SimulationCrew.BATCH) * SimulationCrew.BATCH;
    return whole < most ? (long) whole : most;
  }
}
