package org.kingbolt.core;

import static org.junit.jupiter.api.Assertions.assertEquals;

import java.math.BigInteger;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.Set;
import java.util.concurrent.Callable;
import java.util.concurrent.CyclicBarrier;
import java.util.concurrent.ExecutorService;
import java.util.concurrent.Executors;
import java.util.concurrent.Future;
import java.util.concurrent.TimeUnit;
import org.junit.jupiter.api.Timeout;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;
import org.kingbolt.core.diagram.Diagram;

/** Many threads get from one object what one thread gets, to the last bit. */
@Timeout(120)
class ConcurrencyTest {

  private static final int THREADS = 16;

  private static final String GRID =
      """
      network(link(a1, n11, n12), link(a2, n12, n13), link(a3, n13, n14), link(b1, n21, n22),
        link(b2, n22, n23), link(b3, n23, n24), link(c1, n31, n32), link(c2, n32, n33),
        link(c3, n33, n34), link(d1, n11, n21), link(d2, n12, n22), link(d3, n13, n23),
        link(d4, n14, n24), link(e1, n21, n31), link(e2, n22, n32), link(e3, n23, n33),
        link(e4, n24, n34), node(n22, bus), connecting(n11, n34))
      """;

  private static final String SHARED =
      "series(parallel(a, series(b, c)), atLeast(2, a, b, d, e), withoutFailureRun(2, c, d, e, f),"
          + " capacityAtLeast(7, a: 3, c: 2, f: 4, g: 1), ofPathSets({a, g}, {b, f}, {c, h}))";

  /** All that is computed anew at every call. */
  private record Answers(
      Probability reliability,
      List<Probability> pivots,
      List<Double> derivatives,
      List<Set<String>> paths,
      List<Set<String>> likelyCuts,
      List<BigInteger> cutsBySize,
      ReliabilityPolynomial polynomial,
      Probability atOneP,
      Signature signature,
      List<String> irrelevant) {}

  private static Probabilities probabilities(List<String> components) {
    Probabilities p = Probabilities.all(0.5);
    for (int i = 0; i < components.size(); i++) {
      p = p.with(components.get(i), Probability.failing(0.3 / (i + 1)));
    }
    return p;
  }

  private static Answers ask(CoherentSystem system, MinimalSets cuts, Probabilities p) {
    return new Answers(
        system.reliability(p),
        system.components().stream().map(name -> system.pivot(name).reliability(p)).toList(),
        Arrays.stream(system.evaluation(p).derivatives()).boxed().toList(),
        system.minimalPathSets().stream().toList(),
        cuts.mostProbable(25, p),
        cuts.countBySize(),
        system.polynomial(),
        system.polynomial().at(0.7),
        system.signature(),
        system.irrelevantComponents());
  }

  /** Runs a task in all threads at once. */
  private static <T> List<T> together(Callable<T> task) throws Exception {
    ExecutorService threads = Executors.newFixedThreadPool(THREADS);
    try {
      CyclicBarrier start = new CyclicBarrier(THREADS);
      List<Future<T>> results = new ArrayList<>();
      for (int i = 0; i < THREADS; i++) {
        results.add(
            threads.submit(
                () -> {
                  start.await();
                  return task.call();
                }));
      }
      List<T> values = new ArrayList<>();
      for (Future<T> result : results) {
        values.add(result.get(60, TimeUnit.SECONDS));
      }
      return values;
    } finally {
      threads.shutdownNow();
    }
  }

  @ParameterizedTest
  @ValueSource(strings = {GRID, SHARED})
  void answersOfOneSystem(String text) throws Exception {
    CoherentSystem system = Structure.parse(text).compile();
    Probabilities p = probabilities(system.components());
    MinimalSets cuts = system.minimalCutSets();
    Answers alone = ask(system, cuts, p);
    for (int round = 0; round < 5; round++) {
      for (Answers answers : together(() -> ask(system, cuts, p))) {
        assertEquals(alone, answers);
      }
    }
  }

  @ParameterizedTest
  @ValueSource(strings = {GRID, SHARED})
  void diagramsOfOneStructure(String text) throws Exception {
    Diagram alone = Structure.parse(text).compile().diagram();
    Structure fresh = Structure.parse(text);
    for (Diagram diagram : together(() -> fresh.compile().diagram())) {
      assertEquals(alone, diagram);
    }
  }

  @ParameterizedTest
  @ValueSource(strings = {GRID, SHARED})
  void answersOfOneStructure(String text) throws Exception {
    Structure alone = Structure.parse(text);
    List<Object> expected = describe(alone);
    for (int round = 0; round < 20; round++) {
      Structure fresh = Structure.parse(text);
      for (List<Object> answers : together(() -> describe(fresh))) {
        assertEquals(expected, answers);
      }
    }
  }

  private static List<Object> describe(Structure structure) {
    List<String> components = structure.components();
    return List.of(
        components,
        structure.works(Set.copyOf(components.subList(0, components.size() / 2))),
        structure.toString(),
        structure.dual(),
        structure.givenFailed(components.get(0)),
        structure.hashCode());
  }

  @ParameterizedTest
  @ValueSource(strings = {GRID, SHARED})
  void answersOfOneDerivation(String text) throws Exception {
    Derivation derivation = Derivation.of(Structure.parse(text));
    Probabilities p = probabilities(Structure.parse(text).components());
    Probability alone = derivation.reliability(p);
    String formula = derivation.formula();
    for (Probability value : together(() -> derivation.reliability(p))) {
      assertEquals(alone, value);
    }
    for (String value : together(derivation::formula)) {
      assertEquals(formula, value);
    }
  }
}
