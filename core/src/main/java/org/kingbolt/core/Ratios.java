package org.kingbolt.core;

import java.math.BigInteger;

/** Quotients of large integers as doubles. */
final class Ratios {

  /** More bits than a double has, by enough to round only once. */
  private static final int BITS = 64;

  private Ratios() {}

  /** The quotient of two integers of any size, the second one positive, rounded to a double. */
  static double toDouble(BigInteger numerator, BigInteger denominator) {
    int up = BITS + denominator.bitLength() - numerator.bitLength();
    BigInteger[] parts =
        numerator
            .shiftLeft(Math.max(0, up))
            .divideAndRemainder(denominator.shiftLeft(Math.max(0, -up)));
    BigInteger quotient = parts[0];
    if (parts[1].signum() != 0 && !quotient.testBit(0)) {
      // a last bit that stands for all that follow, so that halves are rounded the right way
      quotient = quotient.add(BigInteger.valueOf(numerator.signum()));
    }
    return Math.scalb(quotient.doubleValue(), -up);
  }
}
