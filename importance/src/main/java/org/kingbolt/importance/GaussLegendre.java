package org.kingbolt.importance;

import java.util.Arrays;
import org.kingbolt.core.diagram.WorkMeter;

/**
 * The points and weights of Gauss-Legendre quadrature on [0, 1], exact for polynomials up to degree
 * 2n - 1. Each point comes with its distance from 1, to full precision.
 *
 * <p>Points by Newton's method on the recurrence of the Legendre polynomials.
 */
final class GaussLegendre {

  private final double[] points;
  private final double[] complements;
  private final double[] weights;

  private GaussLegendre(double[] points, double[] complements, double[] weights) {
    this.points = points;
    this.complements = complements;
    this.weights = weights;
  }

  int size() {
    return points.length;
  }

  double point(int k) {
    return points[k];
  }

  double complement(int k) {
    return complements[k];
  }

  double weight(int k) {
    return weights[k];
  }

  static GaussLegendre of(int n, WorkMeter meter) {
    double[] points = new double[n];
    double[] complements = new double[n];
    double[] weights = new double[n];
    for (int i = 0; i < (n + 1) / 2; i++) {
      meter.now(0);
      // on [-1, 1], measured from -1 so that points near the end keep their digits
      double angle = Math.PI * (i + 0.75) / (n + 0.5);
      double x = -Math.cos(angle);
      double slope = 1;
      for (int step = 0; step < 100; step++) {
        double[] value = legendre(n, x);
        slope = value[1];
        double move = value[0] / slope;
        x -= move;
        if (Math.abs(move) <= 1e-16) {
          break;
        }
      }
      slope = legendre(n, x)[1];
      int mirror = n - 1 - i;
      points[i] = (1 + x) / 2;
      complements[i] = (1 - x) / 2;
      points[mirror] = complements[i];
      complements[mirror] = points[i];
      weights[i] = 1 / ((1 - x) * (1 + x) * slope * slope);
      weights[mirror] = weights[i];
    }
    double sum = Arrays.stream(weights).sum();
    return new GaussLegendre(
        points, complements, Arrays.stream(weights).map(w -> w / sum).toArray());
  }

  /** The polynomial and its slope. */
  private static double[] legendre(int n, double x) {
    double before = 1;
    double here = x;
    for (int k = 2; k <= n; k++) {
      double next = ((2 * k - 1) * x * here - (k - 1) * before) / k;
      before = here;
      here = next;
    }
    return new double[] {here, n * (x * here - before) / ((x - 1) * (x + 1))};
  }
}
