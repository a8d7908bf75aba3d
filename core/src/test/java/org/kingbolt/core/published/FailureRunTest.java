package org.kingbolt.core.published;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.kingbolt.core.published.Digits.assertPrinted;

import java.math.BigInteger;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.kingbolt.core.CoherentSystem;
import org.kingbolt.core.Structure;

/** Consecutive-k-out-of-n:F systems in a line and around a circle. */
class FailureRunTest {

  private static CoherentSystem line(int k, int n) {
    return Structure.withoutFailureRun(k, Families.components(n)).compile();
  }

  private static CoherentSystem circle(int k, int n) {
    return Structure.withoutFailureRunAround(k, Families.components(n)).compile();
  }

  /**
   * Recursions of Chiang and Niu, IEEE Trans. Reliab. 30 (1981) 87, and Derman, Lieberman and Ross,
   * IEEE Trans. Reliab. 31 (1982) 57 (formula from memory).
   */
  @ParameterizedTest
  @CsvSource({
    "2, 5, 0.9, 0.96309",
    "2, 5, 0.5, 0.40625",
    "2, 10, 0.9, 0.919747224",
    "2, 20, 0.9, 0.8388257568845",
    "3, 10, 0.9, 0.99270846",
    "3, 20, 0.9, 0.9837861452517",
    "4, 10, 0.9, 0.9993600261",
    "3, 50, 0.9, 0.9574974790144",
    "3, 100, 0.9, 0.9152348199388"
  })
  void line_hasThePublishedReliability(int k, int n, double p, String printed) {
    assertPrinted(printed, line(k, n).reliability(p).working());
  }

  /** The recursions of the same authors (formula from memory). */
  @ParameterizedTest
  @CsvSource({"2, 5, 0.95499", "2, 10, 0.9120177099", "3, 10, 0.9910121499", "4, 10, 0.9991000404"})
  void circle_hasThePublishedReliability(int k, int n, String printed) {
    assertPrinted(printed, circle(k, n).reliability(0.9).working());
  }

  /** Fibonacci, tribonacci and tetranacci numbers, OEIS A000045, A000073, A000078 (from memory). */
  @ParameterizedTest
  @CsvSource({"2, 10, 144", "2, 20, 17711", "3, 10, 504", "3, 20, 223317", "4, 10, 773"})
  void line_hasThePublishedNumberOfWorkingStates(int k, int n, BigInteger states) {
    assertEquals(states, Exact.states(line(k, n).polynomial()));
  }

  /** Samaniego 2007; Eryilmaz, Statist. Probab. Lett. 2010 (formula from memory). */
  @ParameterizedTest
  @CsvSource(
      delimiter = '|',
      textBlock =
          """
          2 | 4 | (0, 1/2, 1/2, 0)
          2 | 5 | (0, 2/5, 1/2, 1/10, 0)
          2 | 6 | (0, 1/3, 7/15, 1/5, 0, 0)
          2 | 8 | (0, 1/4, 11/28, 2/7, 1/14, 0, 0, 0)
          3 | 8 | (0, 0, 3/28, 1/4, 5/14, 1/4, 1/28, 0)
          """)
  void line_hasThePublishedSignature(int k, int n, String signature) {
    assertEquals(signature, line(k, n).signature().toString());
  }
}
