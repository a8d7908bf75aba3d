package org.kingbolt.core;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertNotEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.ByteArrayInputStream;
import java.io.ByteArrayOutputStream;
import java.io.IOException;
import java.io.ObjectInputStream;
import java.io.ObjectOutputStream;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.stream.Stream;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.MethodSource;

class ProbabilitiesTest {

  private static final Probability RARE = Probability.failing(1e-9);

  private static Map<String, Double> two(double first, double second) {
    Map<String, Double> values = new LinkedHashMap<>();
    values.put("a", first);
    values.put("b c", second);
    return values;
  }

  static Stream<Probabilities> registers() {
    return Stream.of(
        Probabilities.of(Map.of()),
        Probabilities.all(0.5),
        Probabilities.all(RARE),
        Probabilities.working(two(0.9, 1)),
        Probabilities.failing(two(1e-18, 0)),
        Probabilities.all(0.9).with("a", RARE).with("\u05d0 \"q\"", 0.25));
  }

  @ParameterizedTest
  @MethodSource("registers")
  void serialization(Probabilities register) throws IOException, ClassNotFoundException {
    ByteArrayOutputStream bytes = new ByteArrayOutputStream();
    try (ObjectOutputStream out = new ObjectOutputStream(bytes)) {
      out.writeObject(register);
    }
    try (ObjectInputStream in =
        new ObjectInputStream(new ByteArrayInputStream(bytes.toByteArray()))) {
      Object copy = in.readObject();
      assertEquals(register, copy);
      assertEquals(register.hashCode(), copy.hashCode());
      assertEquals(register.toString(), copy.toString());
    }
  }

  @Test
  void registers_areDistinct() {
    List<Probabilities> all = registers().toList();
    assertEquals(all.size(), all.stream().distinct().count());
  }

  @Test
  void equality_doesNotDependOnHowItWasMade() {
    Probabilities made = Probabilities.working(two(0.9, 0.8));
    Probabilities built =
        Probabilities.of(Map.of()).with("b c", 0.1).with("a", 0.9).with("b c", 0.8);
    assertEquals(made, built);
    assertEquals(made.hashCode(), built.hashCode());
    assertNotEquals(made, Probabilities.working(two(0.9, 0.81)));
    assertNotEquals(made, Probabilities.all(0.7).with("a", 0.9).with("b c", 0.8));
    assertEquals(Probabilities.all(0.5), Probabilities.all(Probability.of(0.5, 0.5)));
  }

  @Test
  void sides_keepTheirDigits() {
    assertEquals(1e-18, Probabilities.failing(two(1e-18, 0)).get("a").failing());
    assertEquals(1e-18, Probabilities.working(two(1e-18, 0)).get("a").working());
    assertEquals(RARE, Probabilities.of(Map.of("a", RARE)).get("a"));
  }

  @Test
  void with_leavesTheOriginalAlone() {
    Probabilities before = Probabilities.all(0.5).with("a", 0.9);
    Probabilities after = before.with("a", RARE).with("b", 0.8);
    assertEquals(Probability.working(0.9), before.get("a"));
    assertEquals(Probability.working(0.5), before.get("b"));
    assertEquals(RARE, after.get("a"));
    assertEquals(Probability.working(0.8), after.get("b"));
    assertEquals(Probability.working(0.5), after.get("c"));
  }

  @Test
  void mapsAreCopied() {
    Map<String, Double> values = two(0.9, 0.8);
    Probabilities register = Probabilities.working(values);
    values.put("a", 0.1);
    values.remove("b c");
    assertEquals(Probabilities.working(two(0.9, 0.8)), register);
  }

  @Test
  void covers_whatIsListedOrAll() {
    Probabilities listed = Probabilities.working(two(0.9, 0.8));
    assertTrue(listed.covers("a"));
    assertFalse(listed.covers("A"));
    assertFalse(listed.covers(""));
    assertTrue(Probabilities.all(0.5).covers("anything"));
  }

  @Test
  void forComponents_keepsTheOrder() {
    Probabilities register = Probabilities.all(0.5).with("a", 0.9);
    assertEquals(
        List.of(
            Probability.working(0.5),
            Probability.working(0.9),
            Probability.working(0.5),
            Probability.working(0.9)),
        register.forComponents(List.of("z", "a", "y", "a")));
    assertEquals(List.of(), Probabilities.of(Map.of()).forComponents(List.of()));
  }

  @Test
  void moreNamesThanComponents_doNoHarm() {
    CoherentSystem system = Structure.series("a", "b c").compile();
    Probabilities register = Probabilities.working(two(0.5, 0.5)).with("other", 0.1);
    assertEquals(Probability.of(0.25, 0.75), system.reliability(register));
  }

  @Test
  void text() {
    assertEquals(
        "{a=working 0.9, failing 0.1, b c=working 0.75, failing 0.25}",
        Probabilities.working(two(0.9, 0.75)).toString());
    assertEquals(
        "{a=working 0.999999999, failing 1e-09}, all others working 0.95, failing 0.05",
        Probabilities.all(0.95).with("a", RARE).toString());
    assertEquals("{}", Probabilities.of(Map.of()).toString());
  }
}
