package org.kingbolt.importance;

import java.util.Arrays;
import org.kingbolt.core.diagram.Diagram;
import org.kingbolt.core.diagram.WorkMeter;

/**
 * Mixed partial derivatives of the probability of working, of any order, each in one pass down the
 * diagram.
 *
 * <p>From every node of the first variable's level a one goes to where the variable works and a
 * minus one to where it has failed, both times the probability of coming there. They are passed
 * down; at the next variable's level all but its own nodes are dropped, since what passes by does
 * not depend on it, and each again sends its number and the opposite one. At the last variable they
 * meet what it gains. Whole rows of second derivatives come from one pass.
 *
 * <p>The signed numbers are summed in {@link TwofoldArray}s: a derivative is off by at most about
 * 2^-96 of the sum of its terms, and what is smaller than that counts as 0. A component's larger
 * side is taken as one minus its smaller. For one thread; about 84 bytes a node.
 */
final class MixedDerivatives {

  private static final double RESOLUTION = 0x1p-96;
  private static final int BYTES = 84;

  private final Diagram diagram;
  private final WorkMeter meter;
  private final long held;
  private final int[] levelOf;
  private final TwofoldArray p;
  private final TwofoldArray q;

  /** By node: what its variable gains, in the function below it. */
  private final TwofoldArray gain;

  private final double[] reach;
  private final TwofoldArray signed;

  /** The same without signs, to know what the rounding may come to. */
  private final double[] unsigned;

  private final TwofoldArray sum = new TwofoldArray(1);
  private double terms;

  MixedDerivatives(Diagram diagram, double[] working, double[] failing, WorkMeter meter) {
    this.diagram = diagram;
    this.meter = meter;
    this.held = (long) diagram.size() * BYTES / WorkMeter.BYTES_PER_NODE;
    meter.now(held);
    this.levelOf = new int[working.length];
    Arrays.fill(levelOf, -1);
    this.p = new TwofoldArray(working.length);
    this.q = new TwofoldArray(working.length);
    for (int i = 0; i < working.length; i++) {
      if (working[i] < failing[i]) {
        p.set(i, working[i]);
        q.setComplement(i, working[i]);
      } else {
        q.set(i, failing[i]);
        p.setComplement(i, failing[i]);
      }
    }
    this.gain = new TwofoldArray(diagram.size());
    this.reach = new double[diagram.size()];
    this.signed = new TwofoldArray(diagram.size());
    this.unsigned = new double[diagram.size()];
    up();
    down();
  }

  /** Both sides at every node, then the differences on the side whose terms are smaller. */
  private void up() {
    TwofoldArray works = new TwofoldArray(diagram.size());
    TwofoldArray fails = new TwofoldArray(diagram.size());
    works.set(Diagram.WORKS, 1);
    fails.set(Diagram.FAILS, 1);
    for (int level = diagram.levels() - 1; level >= 0; level--) {
      int variable = diagram.variableAt(level);
      levelOf[variable] = level;
      for (int id = diagram.from(level); id < diagram.to(level); id++) {
        meter.at(held);
        int low = diagram.low(id);
        int high = diagram.high(id);
        mean(works, id, low, high, variable);
        mean(fails, id, low, high, variable);
        if (works.high(high) < fails.high(low)) {
          gain.add(id, works.high(high), works.low(high));
          gain.add(id, -works.high(low), -works.low(low));
        } else {
          gain.add(id, fails.high(low), fails.low(low));
          gain.add(id, -fails.high(high), -fails.low(high));
        }
      }
    }
  }

  private void mean(TwofoldArray side, int id, int low, int high, int variable) {
    side.addProduct(id, p.high(variable), p.low(variable), side.high(high), side.low(high));
    side.addProduct(id, q.high(variable), q.low(variable), side.high(low), side.low(low));
  }

  private void down() {
    reach[diagram.root()] = 1;
    for (int level = 0; level < diagram.levels(); level++) {
      int variable = diagram.variableAt(level);
      double up = p.get(variable);
      double down = q.get(variable);
      for (int id = diagram.from(level); id < diagram.to(level); id++) {
        reach[diagram.low(id)] += down * reach[id];
        reach[diagram.high(id)] += up * reach[id];
      }
    }
  }

  /**
   * All second derivatives with one variable and one that is read after it.
   *
   * @param variable the first
   * @param out by variable; written at those on deeper levels only
   */
  void row(int variable, double[] out) {
    int first = levelOf[variable];
    if (first < 0) {
      return;
    }
    start(first);
    for (int level = first + 1; level < diagram.levels(); level++) {
      meet(level);
      out[diagram.variableAt(level)] = met();
      pass(level);
    }
  }

  /**
   * One mixed derivative.
   *
   * @param variables at least one, none twice
   * @return from -2^(k-2) to 2^(k-2) for k of them, from 0 to 1 for one
   */
  double of(int[] variables) {
    int[] levels = Arrays.stream(variables).map(variable -> levelOf[variable]).sorted().toArray();
    if (levels[0] < 0) {
      return 0;
    }
    int last = levels[levels.length - 1];
    if (levels.length == 1) {
      Arrays.fill(unsigned, 0);
      signed.clear();
      for (int id = diagram.from(last); id < diagram.to(last); id++) {
        signed.set(id, reach[id]);
        unsigned[id] = reach[id];
      }
    } else {
      start(levels[0]);
    }
    int next = 1;
    for (int level = levels[0] + 1; level < last; level++) {
      if (level == levels[next]) {
        split(level);
        next++;
      } else {
        pass(level);
      }
    }
    meet(last);
    return met();
  }

  private void start(int level) {
    signed.clear();
    Arrays.fill(unsigned, 0);
    for (int id = diagram.from(level); id < diagram.to(level); id++) {
      send(id, reach[id], 0, reach[id]);
    }
  }

  /** To the children: the number where the variable works, and its opposite where it failed. */
  private void send(int id, double high, double low, double size) {
    meter.at(held);
    signed.add(diagram.high(id), high, low);
    signed.add(diagram.low(id), -high, -low);
    unsigned[diagram.high(id)] += size;
    unsigned[diagram.low(id)] += size;
  }

  private void split(int level) {
    int from = diagram.from(level);
    for (int id = 0; id < from; id++) {
      signed.set(id, 0);
      unsigned[id] = 0;
    }
    for (int id = from; id < diagram.to(level); id++) {
      send(id, signed.high(id), signed.low(id), unsigned[id]);
    }
  }

  private void pass(int level) {
    int variable = diagram.variableAt(level);
    double pHigh = p.high(variable);
    double pLow = p.low(variable);
    double qHigh = q.high(variable);
    double qLow = q.low(variable);
    for (int id = diagram.from(level); id < diagram.to(level); id++) {
      if (unsigned[id] == 0) {
        continue;
      }
      meter.at(held);
      int low = diagram.low(id);
      int high = diagram.high(id);
      double here = signed.high(id);
      double rest = signed.low(id);
      signed.addProduct(high, here, rest, pHigh, pLow);
      signed.addProduct(low, here, rest, qHigh, qLow);
      unsigned[high] += pHigh * unsigned[id];
      unsigned[low] += qHigh * unsigned[id];
    }
  }

  private void meet(int level) {
    sum.set(0, 0);
    terms = 0;
    for (int id = diagram.from(level); id < diagram.to(level); id++) {
      sum.addProduct(0, signed.high(id), signed.low(id), gain.high(id), gain.low(id));
      terms += unsigned[id] * gain.high(id);
    }
  }

  private double met() {
    double value = sum.get(0);
    return Math.abs(value) <= RESOLUTION * terms ? 0 : value;
  }
}
