package org.kingbolt.importance;

import java.util.List;
import java.util.Map;
import java.util.OptionalDouble;
import org.kingbolt.core.CoherentSystem;
import org.kingbolt.core.Probabilities;
import org.kingbolt.core.Probability;
import org.kingbolt.core.diagram.Evaluation;

/**
 * Both sides of every component's probability, of which some can be set otherwise, and what the
 * system gains from one such state to a better one.
 *
 * <p>Not changed once made; safe to share between threads.
 */
final class Gains {

  /** A difference of at least this share of its terms is good enough. */
  private static final double SHARE = 0.125;

  private final CoherentSystem system;
  private final double[] working;
  private final double[] failing;

  private Gains(CoherentSystem system, double[] working, double[] failing) {
    this.system = system;
    this.working = working;
    this.failing = failing;
  }

  static Gains of(CoherentSystem system, Probabilities p) {
    List<Probability> values = p.forComponents(system.components());
    return new Gains(
        system,
        values.stream().mapToDouble(Probability::working).toArray(),
        values.stream().mapToDouble(Probability::failing).toArray());
  }

  /** The same with some components at a probability. */
  Gains with(int[] members, Probability value) {
    double[] up = working.clone();
    double[] down = failing.clone();
    for (int member : members) {
      up[member] = value.working();
      down[member] = value.failing();
    }
    return new Gains(system, up, down);
  }

  /** The same with several components at probabilities of their own. */
  Gains with(Map<Integer, Probability> values) {
    double[] up = working.clone();
    double[] down = failing.clone();
    values.forEach(
        (member, value) -> {
          up[member] = value.working();
          down[member] = value.failing();
        });
    return new Gains(system, up, down);
  }

  Gains with(int member, Probability value) {
    return with(new int[] {member}, value);
  }

  private Gains as(int member, Gains other) {
    return with(member, Probability.of(other.working[member], other.failing[member]));
  }

  double[] working() {
    return working.clone();
  }

  double[] failing() {
    return failing.clone();
  }

  double working(int member) {
    return working[member];
  }

  double failing(int member) {
    return failing[member];
  }

  Evaluation evaluation() {
    return Evaluation.of(system.diagram(), working, failing);
  }

  Probability reliability() {
    Evaluation evaluation = evaluation();
    return sides(evaluation.works(), evaluation.fails());
  }

  /** Two sides as a computation left them, in one value. */
  static Probability sides(double works, double fails) {
    double up = Math.min(1, works);
    double down = Math.min(1, fails);
    return Math.abs(up + down - 1) <= 1e-12
        ? Probability.of(up, down)
        : up < down ? Probability.working(up) : Probability.failing(down);
  }

  /**
   * What the system gains over a state in which some components are less likely to work, to full
   * precision: as a difference where that keeps its digits, and elsewhere member by member, as a
   * sum of derivatives.
   */
  double over(Gains worse, int[] members) {
    Evaluation high = evaluation();
    Evaluation low = worse.evaluation();
    boolean byWorks = high.works() < low.fails();
    double term = byWorks ? high.works() : low.fails();
    double difference = byWorks ? term - low.works() : term - high.fails();
    if (difference >= SHARE * term) {
      return Math.min(1, difference);
    }
    double sum = 0;
    Gains state = worse;
    for (int member : members) {
      double step = change(member, worse);
      if (step > 0) {
        sum += step * state.evaluation().derivatives()[member];
      }
      state = state.as(member, this);
    }
    return sum;
  }

  /** How much likelier one component is to work here than there, where that is less. */
  double change(int member, Gains worse) {
    return step(working[member], failing[member], worse.working[member], worse.failing[member]);
  }

  /** How much likelier the one is to work than the other, where that is less. */
  static double step(Probability to, Probability from) {
    return step(to.working(), to.failing(), from.working(), from.failing());
  }

  private static double step(double toUp, double toDown, double fromUp, double fromDown) {
    return toUp < fromDown ? toUp - fromUp : fromDown - toDown;
  }

  /**
   * How much likelier the system is to work here than there, less where that is less; empty where
   * the difference would lose digits.
   */
  OptionalDouble plainly(Gains before) {
    Evaluation here = evaluation();
    Evaluation there = before.evaluation();
    double works = Math.max(here.works(), there.works());
    double fails = Math.max(here.fails(), there.fails());
    double difference = works < fails ? here.works() - there.works() : there.fails() - here.fails();
    return Math.abs(difference) >= SHARE * Math.min(works, fails)
        ? OptionalDouble.of(difference)
        : OptionalDouble.empty();
  }
}
