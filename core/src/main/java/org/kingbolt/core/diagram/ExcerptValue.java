package org.kingbolt.core.diagram;

import java.util.Arrays;
import org.jspecify.annotations.Nullable;

/** The probability of an excerpt, and what each slot adds to it. */
final class ExcerptValue {

  final double works;
  final double fails;

  /** Indexed by slot: the probability that the slot has failed and decides; 0 where it is held. */
  final double[] gains;

  private ExcerptValue(double works, double fails, double[] gains) {
    this.works = works;
    this.fails = fails;
    this.gains = gains;
  }

  /**
   * Evaluates by diagram.
   *
   * @param most how many nodes it may have
   * @return the value; nothing if the diagram grows larger
   */
  static @Nullable ExcerptValue of(
      NetworkProblem excerpt, double[] works, double[] fails, long most, WorkMeter meter) {
    Composer composer = new Composer(works.length);
    int[] slots = new int[works.length];
    Arrays.setAll(slots, composer::variable);
    Cap capped = new Cap(meter, most);
    Diagram diagram;
    try {
      diagram = composer.compose(composer.network(excerpt, false, slots, capped), capped);
    } catch (Cap.Reached | FrontierTooWideException tooLarge) {
      return null;
    }
    Scan scan = new Scan(diagram, works.length);
    scan.up(works, fails);
    double[] gains = new double[works.length];
    scan.derivatives(gains);
    for (int slot = 0; slot < gains.length; slot++) {
      gains[slot] *= fails[slot];
    }
    return new ExcerptValue(scan.works(), scan.fails(), gains);
  }
}
