package org.kingbolt.core;

import java.math.BigInteger;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.Collections;
import java.util.List;
import org.kingbolt.core.diagram.WorkMeter;

/** From counts of states to coefficients of powers. */
final class PowerForm {

  private PowerForm() {}

  /**
   * The coefficients of p^j in the sum of n_j p^j (1-p)^(n-j), down to the last one that is not
   * zero.
   *
   * <p>Method: with z = 1/p the sum is z^(-n) times that of n_j (z-1)^(n-j); the latter is shifted
   * by additions alone (Horner). Cost: about n^2/2 additions.
   */
  static List<BigInteger> of(List<BigInteger> counts) {
    int n = counts.size() - 1;
    BigInteger[] shifted = counts.toArray(new BigInteger[0]);
    Collections.reverse(Arrays.asList(shifted));
    long held = 1 + (long) n * n / Byte.SIZE / WorkMeter.BYTES_PER_NODE;
    WorkMeter meter = Budget.ofHeap().start("working out the coefficients of powers");
    for (int from = 0; from < n; from++) {
      meter.now(held);
      for (int i = n - 1; i >= from; i--) {
        shifted[i] = shifted[i].subtract(shifted[i + 1]);
      }
    }
    List<BigInteger> powers = new ArrayList<>(n + 1);
    int degree = 0;
    for (int j = 0; j <= n; j++) {
      powers.add(shifted[n - j]);
      degree = shifted[n - j].signum() == 0 ? degree : j;
    }
    return List.copyOf(powers.subList(0, degree + 1));
  }
}
