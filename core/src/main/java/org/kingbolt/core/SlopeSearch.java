package org.kingbolt.core;

import java.math.BigInteger;
import java.util.ArrayDeque;
import java.util.ArrayList;
import java.util.Deque;
import java.util.List;

/**
 * Where a reliability polynomial is steepest.
 *
 * <p>Method: the slope changes direction no more often than the coefficients of its derivative, in
 * the form of counts, change sign. Where they change sign once, the turning point is found by
 * halving; where more often, the interval is split in the middle and the coefficients of both
 * halves follow by averages (de Casteljau), which do not lose digits.
 */
final class SlopeSearch {

  /** Two slopes that differ less, relative to their size, count as equal. */
  private static final double SAME = 1e-13;

  /** Turning points that lie closer together are taken for one. */
  private static final int DEEPEST = 40;

  private final CountForm slope;
  private final CountForm rising;
  private final CountForm falling;

  /** Of the slope's derivative at 1/2; exact. */
  private final int signAtHalf;

  private final double[] bends;
  private final double noise;

  private final List<Probability> turns = new ArrayList<>();
  private final List<Probability> splits = new ArrayList<>();

  private SlopeSearch(List<BigInteger> slopes) {
    List<BigInteger> second = StateTotals.derived(slopes);
    this.slope = new CountForm(slopes);
    this.rising = new CountForm(second.stream().map(BigInteger.ZERO::max).toList());
    this.falling =
        new CountForm(second.stream().map(c -> c.negate().max(BigInteger.ZERO)).toList());
    this.signAtHalf = StateTotals.sum(second).signum();
    this.bends = new double[second.size()];
    List<BigInteger> all = StateTotals.binomials(bends.length - 1);
    double largest = 0;
    for (int j = 0; j < bends.length; j++) {
      bends[j] = Ratios.toDouble(second.get(j), all.get(j));
      largest = Math.max(largest, Math.abs(bends[j]));
    }
    this.noise = largest * bends.length * 1e-15;
  }

  /**
   * Finds the steepest point.
   *
   * @param slopes the derivative's coefficients of p^j (1-p)^(m-j), none negative
   * @return the smallest p from 0 to 1 at which the derivative is largest
   */
  static Probability steepest(List<BigInteger> slopes) {
    if (slopes.size() < 2) {
      return Probability.IMPOSSIBLE;
    }
    return new SlopeSearch(slopes).steepest();
  }

  private Probability steepest() {
    split();
    splits.add(0, Probability.IMPOSSIBLE);
    splits.add(Probability.CERTAIN);
    // turning points first: a point of division close to one is as steep, but less exact
    List<Probability> candidates = new ArrayList<>(turns);
    candidates.addAll(splits);
    Probability best = candidates.get(0);
    double steepest = slope.at(best);
    for (Probability candidate : candidates) {
      double value = slope.at(candidate);
      if (value > steepest * (1 + SAME)) {
        best = candidate;
        steepest = value;
      }
    }
    return best;
  }

  /** How often the coefficients change sign, leaving out those that may be rounded zeros. */
  private static int changes(double[] values, double noise) {
    int changes = 0;
    double sign = 0;
    for (double value : values) {
      if (Math.abs(value) > noise) {
        changes += value * sign < 0 ? 1 : 0;
        sign = Math.signum(value);
      }
    }
    return changes;
  }

  private static double firstSign(double[] values, double noise) {
    for (double value : values) {
      if (Math.abs(value) > noise) {
        return Math.signum(value);
      }
    }
    return 0;
  }

  /** The part from {@code place} 2^-depth on, 2^-depth wide, and its coefficients. */
  private static final class Part {
    private final long place;
    private final int depth;
    private final double[] bends;

    Part(long place, int depth, double[] bends) {
      this.place = place;
      this.depth = depth;
      this.bends = bends;
    }

    double from() {
      return Math.scalb((double) place, -depth);
    }

    double to() {
      return Math.scalb((double) (place + 1), -depth);
    }
  }

  private void split() {
    Deque<Part> open = new ArrayDeque<>();
    open.push(new Part(0, 0, bends));
    while (!open.isEmpty()) {
      Part part = open.pop();
      double rounded = part.depth == 0 ? 0 : noise;
      int changes = changes(part.bends, rounded);
      if (part.depth > 0) {
        splits.add(Probability.working(part.from()));
      }
      if (changes == 1) {
        if (firstSign(part.bends, rounded) > 0) {
          turn(part.from(), part.to());
        }
      } else if (changes > 1 && part.depth < DEEPEST) {
        double[] left = new double[part.bends.length];
        double[] right = part.bends.clone();
        for (int end = right.length - 1; end >= 0; end--) {
          left[right.length - 1 - end] = right[0];
          for (int i = 0; i < end; i++) {
            right[i] = right[i] / 2 + right[i + 1] / 2;
          }
        }
        open.push(new Part(2 * part.place + 1, part.depth + 1, right));
        open.push(new Part(2 * part.place, part.depth + 1, left));
      }
    }
  }

  /** Halves an interval in which the slope turns once; below 1/2 by p, above by 1 - p. */
  private void turn(double from, double to) {
    if (from < 0.5 && to > 0.5) {
      if (signAtHalf == 0) {
        turns.add(Probability.working(0.5));
      } else {
        turn(signAtHalf > 0 ? 0.5 : from, signAtHalf > 0 ? to : 0.5);
      }
      return;
    }
    boolean upper = from >= 0.5;
    double near = upper ? 1 - to : from;
    double far = upper ? 1 - from : to;
    double middle = (near + far) / 2;
    while (middle > near && middle < far) {
      if (isRising(probability(middle, upper)) == upper) {
        far = middle;
      } else {
        near = middle;
      }
      middle = near / 2 + far / 2;
    }
    turns.add(probability(middle, upper));
  }

  private boolean isRising(Probability p) {
    return rising.at(p) > falling.at(p);
  }

  private static Probability probability(double side, boolean upper) {
    return upper ? Probability.failing(side) : Probability.working(side);
  }
}
