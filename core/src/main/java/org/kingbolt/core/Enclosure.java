package org.kingbolt.core;

import java.util.Arrays;
import java.util.List;
import org.kingbolt.core.diagram.Diagram;
import org.kingbolt.core.diagram.NetworkRelaxer;
import org.kingbolt.core.diagram.WorkMeter;

/**
 * Two probabilities between which the reliability of a structure lies, however large it is, brought
 * nearer to each other step by step.
 *
 * <p>Everything that can be worked out exactly is. A network that is too wide to sweep is replaced,
 * once by networks that work less often and once by networks that work more often: with some of its
 * links held failed, or working; or with the improbable states of the sweep counted as failed, or
 * as working. Since the structure is coherent, what comes out holds the exact figure.
 *
 * <p>Assumes that components fail independently. Deterministic: the same steps give the same
 * figures. Ends are as computed, up to rounding by a few units in the last place for every
 * component; {@code org.kingbolt.bounds} rounds them outwards.
 *
 * <p>For one thread.
 *
 * <p>Example: {@code Enclosure e = Enclosure.of(structure, p, Budget.ofHeap()); while (e.narrow())
 * {}}
 */
public final class Enclosure {

  private static final long FIRST_EFFORT = 1 << 17;
  private static final long FIRST_GATE_EFFORT = 1_000;
  private static final int MORE_EFFORT = 4;

  private final Numbering numbering;
  private final double[] working;
  private final double[] failing;
  private final NetworkRelaxer relaxer;
  private final WorkMeter meter;
  private final long mostEffort;
  private long effort;
  private boolean started;
  private boolean exact;
  private boolean ended;
  private long gateEffort;
  private long evaluatedEffort;
  private int evaluatedChanges;
  private double[] lower = {0, 1};
  private double[] upper = {1, 0};

  private Enclosure(
      Numbering numbering, double[] working, double[] failing, Budget budget, long effort) {
    this.numbering = numbering;
    this.working = working;
    this.failing = failing;
    this.relaxer = new NetworkRelaxer(working, failing);
    this.meter = budget.start("narrowing an interval");
    this.mostEffort = Math.max(1, budget.nodes() / 2);
    this.effort = Math.min(effort, mostEffort);
    this.gateEffort = Math.min(FIRST_GATE_EFFORT, this.effort);
  }

  /**
   * Starts with the interval from 0 to 1.
   *
   * @param structure the structure
   * @param p the components' probabilities
   * @param budget how much work all steps together may cost; the clock starts now
   * @return an enclosure to be narrowed
   * @throws IllegalArgumentException if components have no probability; the message lists them
   * @throws BudgetExceededException if the structure is too large to be read
   */
  public static Enclosure of(Structure structure, Probabilities p, Budget budget) {
    return of(structure, p, budget, FIRST_EFFORT);
  }

  /** With little effort even small structures are not worked out exactly. */
  static Enclosure of(Structure structure, Probabilities p, Budget budget, long firstEffort) {
    Check.notNull(structure, "structure");
    Check.notNull(p, "probabilities");
    WorkMeter reading = Check.notNull(budget, "budget").start("reading the structure");
    Numbering numbering = new Numbering(structure, reading);
    List<String> components = numbering.components();
    double[] working = new double[components.size()];
    double[] failing = new double[components.size()];
    p.fill(components, working, failing);
    return new Enclosure(numbering, working, failing, budget, firstEffort);
  }

  /**
   * Takes one step. The interval never widens.
   *
   * @return whether another step may narrow it further within the budget's nodes
   * @throws BudgetExceededException if the time is over or the thread is interrupted; the interval
   *     reached stays
   */
  public boolean narrow() {
    if (ended) {
      return false;
    }
    try {
      ended = !step();
    } catch (BudgetExceededException over) {
      if (over.limit() != BudgetExceededException.Limit.NODES) {
        throw over;
      }
      ended = true;
    }
    return !ended;
  }

  private boolean step() {
    meter.now(0);
    if (!started) {
      // the networks come to be known
      between(true);
      started = true;
    }
    while (!relaxer.step(effort, mostEffort, meter) && isEvaluated()) {
      if (gateEffort == mostEffort && (effort == mostEffort || relaxer.isExact())) {
        return false;
      }
      effort = Math.min(mostEffort, effort * MORE_EFFORT);
      gateEffort = Math.min(mostEffort, gateEffort * MORE_EFFORT);
    }
    update();
    return !exact;
  }

  private boolean isEvaluated() {
    return evaluatedEffort == gateEffort && evaluatedChanges == relaxer.changes();
  }

  private void update() {
    if (isEvaluated()) {
      return;
    }
    double[] less = between(true);
    double[] more = relaxer.isExact() ? less : between(false);
    double[] below = {less[0], less[1]};
    double[] above = {more[2], more[3]};
    exact = relaxer.isExact() && Arrays.equals(below, above);
    lower = exact ? below : atLeast(lower, below);
    upper = exact ? above : atMost(upper, above);
    evaluatedEffort = gateEffort;
    evaluatedChanges = relaxer.changes();
  }

  private double[] between(boolean lessWorking) {
    return Compilation.between(
        numbering, relaxer, lessWorking, working, failing, gateEffort, meter);
  }

  /** What two lower ends say together: both sides of each hold by themselves. */
  private static double[] atLeast(double[] one, double[] other) {
    double works = Math.max(one[0], other[0]);
    double fails = Math.min(one[1], other[1]);
    // the larger side loses no digits as 1 minus the smaller one
    return works < fails
        ? new double[] {works, Math.min(fails, 1 - Math.min(works, 0.5))}
        : new double[] {Math.max(works, 1 - fails), fails};
  }

  private static double[] atMost(double[] one, double[] other) {
    double[] inverted = atLeast(new double[] {one[1], one[0]}, new double[] {other[1], other[0]});
    return new double[] {inverted[1], inverted[0]};
  }

  /**
   * A diagram that works at most as often as the structure, in no state in which the structure
   * fails: what has taken its place for the lower end, before further steps.
   *
   * @param budget how many nodes the diagram may have, and how long making it may take
   * @return the diagram; its variables are indices into {@link Structure#components()}
   * @throws BudgetExceededException if the budget is used up
   */
  public Diagram lessWorking(Budget budget) {
    return diagram(true, budget);
  }

  /**
   * A diagram that works at least as often as the structure, in every state in which the structure
   * does: what has taken its place for the upper end.
   *
   * @param budget how many nodes the diagram may have, and how long making it may take
   * @return the diagram; its variables are indices into {@link Structure#components()}
   * @throws BudgetExceededException if the budget is used up
   */
  public Diagram moreWorking(Budget budget) {
    return diagram(false, budget);
  }

  private Diagram diagram(boolean lessWorking, Budget budget) {
    WorkMeter making =
        Check.notNull(budget, "budget").start("making the diagram of one side of an interval");
    return Compilation.oneSidedDiagram(numbering, relaxer.begin(lessWorking), making);
  }

  /**
   * Tells whether both ends are the exact figure.
   *
   * @return true when nothing is left to narrow
   */
  public boolean isExact() {
    return exact;
  }

  /**
   * Returns the lower end.
   *
   * @return the system is at least as likely to work as this, up to rounding
   */
  public Probability lower() {
    return Probability.computed(lower[0], lower[1]);
  }

  /**
   * Returns the upper end.
   *
   * @return the system is at most as likely to work as this, up to rounding
   */
  public Probability upper() {
    return Probability.computed(upper[0], upper[1]);
  }

  /**
   * Says how far it has got.
   *
   * @return one line
   */
  @Override
  public String toString() {
    return "Enclosure[failing from "
        + upper().failing()
        + " to "
        + lower().failing()
        + "]; call narrow()";
  }
}
