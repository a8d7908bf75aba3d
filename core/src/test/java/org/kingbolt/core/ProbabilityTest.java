package org.kingbolt.core;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertNotEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.ByteArrayInputStream;
import java.io.ByteArrayOutputStream;
import java.io.IOException;
import java.io.ObjectInputStream;
import java.io.ObjectOutputStream;
import java.util.ArrayList;
import java.util.Collections;
import java.util.List;
import java.util.Locale;
import java.util.Random;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.ValueSource;

class ProbabilityTest {

  /** From the least to the most likely to work; neighbours differ on one side alone at the ends. */
  private static List<Probability> ascending() {
    return List.of(
        Probability.IMPOSSIBLE,
        Probability.of(Double.MIN_VALUE, 1),
        Probability.of(1e-18, 1),
        Probability.of(2e-18, 1),
        Probability.working(1e-9),
        Probability.of(0.25, 0.75),
        Probability.of(0.25, Math.nextDown(0.75)),
        Probability.working(Math.nextDown(0.5)),
        Probability.working(0.5),
        Probability.of(0.75, Math.nextUp(0.25)),
        Probability.of(0.75, 0.25),
        Probability.failing(2e-9),
        Probability.failing(1e-9),
        Probability.of(1, 1e-17),
        Probability.of(1, 1e-18),
        Probability.of(1, Double.MIN_VALUE),
        Probability.CERTAIN);
  }

  @Test
  void order_tellsSmallSidesApart() {
    List<Probability> ascending = ascending();
    for (int i = 0; i < ascending.size(); i++) {
      for (int j = 0; j < ascending.size(); j++) {
        Probability a = ascending.get(i);
        Probability b = ascending.get(j);
        assertEquals(Integer.signum(i - j), Integer.signum(a.compareTo(b)), a + " and " + b);
        assertEquals(i == j, a.equals(b), a + " and " + b);
      }
    }
  }

  @ParameterizedTest
  @ValueSource(longs = {1, 2, 3})
  void order_sorts(long seed) {
    List<Probability> shuffled = new ArrayList<>(ascending());
    Collections.shuffle(shuffled, new Random(seed));
    Collections.sort(shuffled);
    assertEquals(ascending(), shuffled);
  }

  @Test
  void equalValues_areEqual() {
    for (Probability value : ascending()) {
      Probability same = Probability.of(value.working(), value.failing());
      assertEquals(value, same);
      assertEquals(value.hashCode(), same.hashCode());
      assertEquals(0, value.compareTo(same));
    }
    assertNotEquals(Probability.CERTAIN, (Object) 1.0);
  }

  @Test
  void bothSidesCount() {
    Probability given = Probability.of(1, 1e-18);
    assertEquals(1, given.working());
    assertEquals(1e-18, given.failing());
    assertNotEquals(Probability.CERTAIN, given);
    assertNotEquals(Probability.of(1, 2e-18), given);
  }

  @Test
  void oneSide_givesTheOther() {
    assertEquals(1e-9, Probability.failing(1e-9).failing());
    assertEquals(0.999999999, Probability.failing(1e-9).working());
    assertEquals(1e-9, Probability.working(1e-9).working());
    assertEquals(1 - 1e-9, Probability.working(1e-9).failing());
    assertEquals(Probability.CERTAIN, Probability.working(1));
    assertEquals(Probability.CERTAIN, Probability.failing(0));
    assertEquals(Probability.IMPOSSIBLE, Probability.working(0));
    assertEquals(Probability.IMPOSSIBLE, Probability.failing(1));
  }

  @Test
  void negativeZero_isZero() {
    assertEquals(Probability.IMPOSSIBLE, Probability.working(-0.0));
    assertEquals(Probability.CERTAIN, Probability.failing(-0.0));
    assertEquals(Probability.CERTAIN, Probability.of(1, -0.0));
    assertEquals("working 0, failing 1", Probability.working(-0.0).toString());
  }

  @Test
  void sum_maybeOffByRounding() {
    assertEquals(0.5000000000005, Probability.of(0.5, 0.5000000000005).failing());
    assertEquals(0.4999999999995, Probability.of(0.5, 0.4999999999995).failing());
  }

  @Test
  void complement_swapsTheSides() {
    for (Probability value : ascending()) {
      assertEquals(value.failing(), value.complement().working());
      assertEquals(value.working(), value.complement().failing());
      assertEquals(value, value.complement().complement());
    }
    assertEquals(Probability.CERTAIN, Probability.IMPOSSIBLE.complement());
    List<Probability> turned = new ArrayList<>();
    ascending().forEach(value -> turned.add(0, value.complement()));
    List<Probability> sorted = new ArrayList<>(turned);
    Collections.sort(sorted);
    assertEquals(sorted, turned);
  }

  @ParameterizedTest
  @CsvSource(
      delimiter = '|',
      textBlock =
          """
          0                     | 1                  | working 0, failing 1
          0.5                   | 0.5                | working 0.5, failing 0.5
          0.1                   | 0.9                | working 0.1, failing 0.9
          0.97848               | 0.02152            | working 0.97848, failing 0.02152
          0.3333333333333333    | 0.6666666666666666 | working 0.333333333333, failing 0.666666666667
          0.999999999           | 1e-9               | working 0.999999999, failing 1e-09
          1                     | 5e-18              | working 1, failing 5e-18
          1                     | 1.5e-13            | working 1, failing 1.5e-13
          1                     | 4.9e-324           | working 1, failing 4.9e-324
          0.9999                | 1e-4               | working 0.9999, failing 0.0001
          0.9999001             | 9.99e-5            | working 0.9999001, failing 9.99e-05
          1.234567890123456e-3  | 0.998765432109877  | working 0.00123456789012, failing 0.99876543211
          1.234567890123456e-13 | 1                  | working 1.23456789012e-13, failing 1
          1.999999999999999e-7  | 0.9999998          | working 2e-07, failing 0.9999998
          1.0000000001e-30      | 1                  | working 1.0000000001e-30, failing 1
          """)
  void text(double working, double failing, String text) {
    assertEquals(text, Probability.of(working, failing).toString());
  }

  @Test
  void text_knowsNoLocale() {
    Locale before = Locale.getDefault();
    try {
      Locale.setDefault(Locale.forLanguageTag("ar-EG-u-nu-arab"));
      assertEquals("working 0.75, failing 0.25", Probability.working(0.75).toString());
      assertEquals("working 1, failing 2.5e-20", Probability.of(1, 2.5e-20).toString());
    } finally {
      Locale.setDefault(before);
    }
  }

  /** Read back, the text is right to twelve digits. */
  @Test
  void text_keepsTwelveDigits() {
    Random random = new Random(7);
    for (int i = 0; i < 10_000; i++) {
      double value = Math.pow(10, -20 * random.nextDouble());
      String text = Probability.working(value).toString();
      String working = text.substring("working ".length(), text.indexOf(','));
      assertEquals(value, Double.parseDouble(working), 5e-12 * value, text);
      long digits =
          working.replaceFirst("e.*", "").replaceFirst("^0\\.0*", "").replace(".", "").length();
      assertTrue(digits <= 13, text);
    }
  }

  @Test
  void serialization() throws IOException, ClassNotFoundException {
    for (Probability value : ascending()) {
      ByteArrayOutputStream bytes = new ByteArrayOutputStream();
      try (ObjectOutputStream out = new ObjectOutputStream(bytes)) {
        out.writeObject(value);
      }
      try (ObjectInputStream in =
          new ObjectInputStream(new ByteArrayInputStream(bytes.toByteArray()))) {
        assertEquals(value, in.readObject());
      }
    }
  }

  @Test
  void roundingPastOne_isCutOff() {
    assertEquals(Probability.CERTAIN, Probability.computed(1.0000000000000002, 0));
    assertEquals(Probability.IMPOSSIBLE, Probability.computed(0, 1.0000000000000002));
  }

  /** Sides that are accepted one by one never make a system's figure fail. */
  @Test
  void nearlyExactSides_addUpOverManyComponents() {
    Probability nearly = Probability.of(0.5, 0.5 + 9e-13);
    String[] names = new String[200];
    for (int i = 0; i < names.length; i++) {
      names[i] = "c" + i;
    }
    Structure many = Structure.atLeast(100, names);
    Probability exact = many.reliability(0.5);
    Probability result = many.compile().reliability(Probabilities.all(nearly));
    assertEquals(exact.working(), result.working(), 1e-9);
    assertEquals(exact.failing(), result.failing(), 1e-9);
    assertThrows(IllegalArgumentException.class, () -> Probability.of(0.9, 0.1 + 5e-9));
  }
}
