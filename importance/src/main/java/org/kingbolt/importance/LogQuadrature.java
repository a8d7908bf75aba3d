package org.kingbolt.importance;

import java.util.ArrayDeque;
import java.util.Arrays;
import java.util.Deque;

/**
 * Adaptive Gauss-Kronrod quadrature of many functions of time at once, over the logarithm of time.
 *
 * <p>A piece is halved until the rule of 15 points and that of 7 within it agree as well as asked,
 * by the usual estimate {@code (200 times their difference)^1.5}, and until a check of the caller's
 * own is content. Source of points, weights and estimate: Piessens, de Doncker-Kapenga, Überhuber
 * &amp; Kahaner, QUADPACK, 1983 (from memory).
 */
final class LogQuadrature {

  /** Functions of time. */
  interface Functions {
    void at(double time, double[] out);
  }

  /** Something known about the integral over a piece: how far it is off. */
  interface Check {
    double off(double from, double to, double[] integrals);
  }

  private static final double PIECE = 1e-12;
  private static final int DEEPEST = 48;

  private static final double[] POINTS = {
    0.9914553711208126,
    0.9491079123427585,
    0.8648644233597691,
    0.7415311855993945,
    0.5860872354676911,
    0.4058451513773972,
    0.20778495500789848,
    0.0
  };

  private static final double[] KRONROD = {
    0.022935322010529224,
    0.06309209262997856,
    0.10479001032225019,
    0.14065325971552592,
    0.1690047266392679,
    0.19035057806478542,
    0.20443294007529889,
    0.20948214108472782
  };

  /** At every second point. */
  private static final double[] GAUSS = {
    0.1294849661688697, 0.27970539148927664, 0.3818300505051189, 0.4179591836734694
  };

  private final int size;
  private final Functions functions;
  private final Check check;

  LogQuadrature(int size, Functions functions, Check check) {
    this.size = size;
    this.functions = functions;
    this.check = check;
  }

  private record Piece(double from, double to, int depth) {}

  /** One piece, without halving. */
  double[] once(double from, double to) {
    double[] integrals = new double[size];
    rule(from, to, integrals);
    return integrals;
  }

  /**
   * Integrates from one time to a later one.
   *
   * @param scale the size of the whole, to which errors on each piece are compared
   */
  double[] integrate(double from, double to, double scale) {
    double tolerance = PIECE * scale;
    double[] sum = new double[size];
    double[] integrals = new double[size];
    Deque<Piece> left = new ArrayDeque<>();
    left.push(new Piece(from, to, 0));
    while (!left.isEmpty()) {
      Piece piece = left.pop();
      double difference = rule(piece.from, piece.to, integrals);
      boolean fine =
          scale * Math.pow(200 * difference / scale, 1.5) <= tolerance
              && check.off(piece.from, piece.to, integrals) <= tolerance;
      double middle = Math.sqrt(piece.from) * Math.sqrt(piece.to);
      if (fine || piece.depth == DEEPEST || middle <= piece.from || middle >= piece.to) {
        for (int i = 0; i < size; i++) {
          sum[i] += integrals[i];
        }
      } else {
        left.push(new Piece(middle, piece.to, piece.depth + 1));
        left.push(new Piece(piece.from, middle, piece.depth + 1));
      }
    }
    return sum;
  }

  /** Returns the largest difference between the two rules. */
  private double rule(double from, double to, double[] kronrod) {
    double half = (Math.log(to) - Math.log(from)) / 2;
    double[] gauss = new double[size];
    double[] out = new double[size];
    Arrays.fill(kronrod, 0);
    for (int k = 0; k < 15; k++) {
      int place = k < 8 ? k : 14 - k;
      double x = k < 8 ? -POINTS[place] : POINTS[place];
      double time = Math.sqrt(from) * Math.sqrt(to) * Math.exp(half * x);
      functions.at(time, out);
      for (int i = 0; i < size; i++) {
        double value = out[i] * time * half;
        kronrod[i] += KRONROD[place] * value;
        gauss[i] += place % 2 == 1 ? GAUSS[place / 2] * value : 0;
      }
    }
    double difference = 0;
    for (int i = 0; i < size; i++) {
      difference = Math.max(difference, Math.abs(kronrod[i] - gauss[i]));
    }
    return difference;
  }
}
