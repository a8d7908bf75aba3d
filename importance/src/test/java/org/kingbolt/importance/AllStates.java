package org.kingbolt.importance;

import static org.junit.jupiter.api.Assertions.assertTrue;

import java.math.BigDecimal;
import java.math.MathContext;
import java.util.List;
import java.util.function.IntPredicate;
import org.kingbolt.core.Probabilities;
import org.kingbolt.core.testing.Oracle;
import org.kingbolt.core.testing.TruthTable;

/** Probabilities of events over all states of a small structure, in sixty digits. */
record AllStates(Oracle oracle, Probabilities p) {

  private static final MathContext DIGITS = new MathContext(60);

  int size() {
    return names().size();
  }

  List<String> names() {
    return oracle.names();
  }

  TruthTable table() {
    return oracle.table();
  }

  /** States are bit masks of working components. */
  BigDecimal probability(IntPredicate event) {
    BigDecimal[] values = new BigDecimal[1 << size()];
    for (int state = 0; state < values.length; state++) {
      values[state] = event.test(state) ? BigDecimal.ONE : BigDecimal.ZERO;
    }
    for (int i = size() - 1; i >= 0; i--) {
      BigDecimal up = new BigDecimal(p.get(names().get(i)).working());
      BigDecimal down = new BigDecimal(p.get(names().get(i)).failing());
      for (int state = 0; state < 1 << i; state++) {
        values[state] =
            values[state | 1 << i]
                .multiply(up, DIGITS)
                .add(values[state].multiply(down, DIGITS), DIGITS);
      }
    }
    return values[0];
  }

  BigDecimal works() {
    return probability(table()::works);
  }

  BigDecimal fails() {
    return probability(state -> !table().works(state));
  }

  /** With some components' bits set in every state. */
  BigDecimal failsWith(int working) {
    return probability(state -> !table().works(state | working));
  }

  /** With some components' bits taken out of every state. */
  BigDecimal failsWithout(int failed) {
    return probability(state -> !table().works(state & ~failed));
  }

  /** The first over the second; 0 where that is 0. */
  static BigDecimal share(BigDecimal part, BigDecimal whole) {
    return whole.signum() == 0 ? BigDecimal.ZERO : part.divide(whole, DIGITS);
  }

  /** A quotient that may be infinite, and is 1 for 0 over 0. */
  static double ratio(BigDecimal part, BigDecimal whole) {
    if (whole.signum() == 0) {
      return part.signum() == 0 ? 1 : Double.POSITIVE_INFINITY;
    }
    return part.divide(whole, DIGITS).doubleValue();
  }

  /** Checks to 1e-13 of the sum of the terms that the number came from. */
  static void assertNear(BigDecimal exact, double value, BigDecimal terms, String what) {
    BigDecimal off = new BigDecimal(value).subtract(exact).abs();
    assertTrue(
        off.compareTo(terms.abs().multiply(new BigDecimal("1e-13"))) <= 0,
        () -> what + ": exactly " + exact.doubleValue() + ", computed " + value);
  }

  static void assertNear(BigDecimal exact, double value, String what) {
    assertNear(exact, value, exact, what);
  }

  static void assertNear(double exact, double value, String what) {
    assertTrue(
        exact == value || Math.abs(value - exact) <= 1e-13 * Math.abs(exact),
        () -> what + ": exactly " + exact + ", computed " + value);
  }
}
