package org.kingbolt.importance;

import java.util.Arrays;
import org.kingbolt.core.diagram.Diagram;
import org.kingbolt.core.diagram.Evaluation;

/**
 * Both sides of a system and all its partial derivatives, from one scan up and one scan down the
 * diagram.
 *
 * <p>What a node's variable gains is a difference that loses digits where it makes little
 * difference. So the side of the system that is less likely is worked out with some 31 digits, each
 * number as the sum of two doubles (Dekker, Numer. Math. 18 (1971) 224): with x and y the values of
 * the two children, and the likelier child's weight one minus the other's, the node has {@code x +
 * weight (y - x)}. As what is subtracted is part of that side, each derivative is off by at most
 * about {@code 8 levels 2^-104} of it, and by a few units in the last place. Derivatives too small
 * for that are left to {@link Evaluation#derivatives()}, whose cost has no such bound.
 *
 * <p>A component's larger side is taken as one minus its smaller.
 */
final class Gradient {

  /** A derivative whose error may be a larger share of it is worked out anew. */
  private static final double CERTAIN = 0x1p-46;

  private static final double UNIT = 0x1p-104;

  private final Diagram diagram;
  private final double[] working;
  private final double[] failing;

  /** By node: the high part, then the low part; afterwards scratch. */
  private final double[] side;

  private final double[] gain;
  private final double works;
  private final double fails;
  private final double[] derivatives;

  private Gradient(Diagram diagram, double[] working, double[] failing) {
    this.diagram = diagram;
    this.working = working;
    this.failing = failing;
    this.side = new double[2 * diagram.size()];
    this.gain = new double[diagram.size()];
    double likely = up(false);
    if (likely <= 0.5) {
      this.fails = likely;
      this.works = 1 - likely;
    } else {
      this.works = up(true);
      this.fails = 1 - works;
    }
    this.derivatives = down();
  }

  /** Of any diagram; indexed by variable. The arrays are not changed. */
  static Gradient of(Diagram diagram, double[] working, double[] failing) {
    return new Gradient(diagram, working, failing);
  }

  /** The probability that the whole function works. */
  double works() {
    return works;
  }

  double fails() {
    return fails;
  }

  /** By variable: right to within a few units and a tiny share of the smaller side. */
  double[] derivatives() {
    return derivatives.clone();
  }

  /** By variable: every digit. */
  double[] refined() {
    double[] all = derivatives.clone();
    double error = 8.0 * diagram.levels() * UNIT * Math.min(works, fails);
    boolean[] tested = diagram.tested(all.length);
    for (int i = 0; i < all.length; i++) {
      if (tested[i] && !(error <= CERTAIN * all[i])) {
        return Evaluation.of(diagram, working, failing).derivatives();
      }
    }
    return all;
  }

  private double up(boolean byWorks) {
    int outcome = byWorks ? Diagram.WORKS : Diagram.FAILS;
    side[2 * outcome] = 1;
    side[2 * (1 - outcome)] = 0;
    for (int level = diagram.levels() - 1; level >= 0; level--) {
      int variable = diagram.variableAt(level);
      double p = working[variable];
      double q = failing[variable];
      int from = diagram.from(level);
      int to = diagram.to(level);
      // the side grows from the less to the more favourable child
      if (byWorks) {
        if (p <= q) {
          fromLow(diagram, side, gain, from, to, p);
        } else {
          fromHigh(diagram, side, gain, from, to, -q);
        }
      } else if (q <= p) {
        fromHighBack(diagram, side, gain, from, to, q);
      } else {
        fromLowBack(diagram, side, gain, from, to, -p);
      }
    }
    int root = diagram.root();
    return Math.min(1, side[2 * root] + side[2 * root + 1]);
  }

  private static void fromLow(
      Diagram diagram, double[] side, double[] gain, int from, int to, double weight) {
    for (int id = from; id < to; id++) {
      int low = 2 * diagram.low(id);
      combine(side, gain, id, low, 2 * diagram.high(id), low, weight);
    }
  }

  private static void fromHigh(
      Diagram diagram, double[] side, double[] gain, int from, int to, double weight) {
    for (int id = from; id < to; id++) {
      int high = 2 * diagram.high(id);
      combine(side, gain, id, 2 * diagram.low(id), high, high, weight);
    }
  }

  private static void fromHighBack(
      Diagram diagram, double[] side, double[] gain, int from, int to, double weight) {
    for (int id = from; id < to; id++) {
      int high = 2 * diagram.high(id);
      combine(side, gain, id, high, 2 * diagram.low(id), high, weight);
    }
  }

  private static void fromLowBack(
      Diagram diagram, double[] side, double[] gain, int from, int to, double weight) {
    for (int id = from; id < to; id++) {
      int low = 2 * diagram.low(id);
      combine(side, gain, id, 2 * diagram.high(id), low, low, weight);
    }
  }

  /** The gain from the lesser child to the greater, and the base plus the weight times it. */
  private static void combine(
      double[] side, double[] gain, int id, int lesser, int greater, int base, double weight) {
    double big = side[greater];
    double small = side[lesser];
    double gainHigh = big - small;
    // the error of a difference whose first term is the larger
    double gainLow = ((big - gainHigh) - small) + (side[greater + 1] - side[lesser + 1]);
    gain[id] = gainHigh + gainLow;
    double product = weight * gainHigh;
    double rest = Math.fma(weight, gainHigh, -product) + weight * gainLow;
    double start = side[base];
    double sum = start + product;
    double added = sum - start;
    double error = (start - (sum - added)) + (product - added) + (side[base + 1] + rest);
    double high = sum + error;
    side[2 * id] = high;
    side[2 * id + 1] = error - (high - sum);
  }

  private double[] down() {
    // the side is no longer needed, and its memory is near
    double[] reach = side;
    Arrays.fill(reach, 0, diagram.size(), 0);
    double[] sums = new double[working.length];
    reach[diagram.root()] = 1;
    for (int level = 0; level < diagram.levels(); level++) {
      int variable = diagram.variableAt(level);
      double p = working[variable];
      double q = failing[variable];
      double sum = pass(diagram, gain, reach, diagram.from(level), diagram.to(level), p, q);
      sums[variable] = Math.min(1, Math.max(0, sum));
    }
    return sums;
  }

  private static double pass(
      Diagram diagram, double[] gain, double[] reach, int from, int to, double p, double q) {
    double even = 0;
    double odd = 0;
    int id = from;
    for (; id <= to - 2; id += 2) {
      double here = reach[id];
      double next = reach[id + 1];
      reach[diagram.low(id)] += q * here;
      reach[diagram.high(id)] += p * here;
      reach[diagram.low(id + 1)] += q * next;
      reach[diagram.high(id + 1)] += p * next;
      even += here * gain[id];
      odd += next * gain[id + 1];
    }
    if (id < to) {
      reach[diagram.low(id)] += q * reach[id];
      reach[diagram.high(id)] += p * reach[id];
      even += reach[id] * gain[id];
    }
    return even + odd;
  }
}
