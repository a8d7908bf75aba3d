package org.kingbolt.core;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
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
import java.util.HashMap;
import java.util.HashSet;
import java.util.List;
import java.util.Map;
import java.util.Set;
import java.util.concurrent.Callable;
import java.util.concurrent.ExecutionException;
import java.util.concurrent.FutureTask;
import java.util.concurrent.TimeUnit;
import java.util.stream.Stream;
import org.junit.jupiter.api.BeforeAll;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

/** Gates nested far deeper than a small stack could follow by recursion. */
class DeepStructureTest {

  private static final int DEPTH = 100_000;
  private static final String TOP = "x" + DEPTH;
  private static final String BELOW_TOP = "x" + (DEPTH - 1);
  private static final long STACK = 256 * 1024;

  private static final Structure DEEP = ladder("x", DEPTH);
  private static final Structure SHARED = sharedLadder();
  private static final Probabilities P = probabilities();
  private static CoherentSystem system = Structure.component("x0").compile();

  @BeforeAll
  static void compile() throws Exception {
    system = onSmallStack(() -> DEEP.compile());
  }

  /** Series with every even component, parallel with every odd one. */
  private static Structure ladder(String letter, int depth) {
    Structure whole = Structure.component(letter + 0);
    for (int i = 1; i <= depth; i++) {
      Structure next = Structure.component(letter + i);
      whole = isSeries(i) ? Structure.series(whole, next) : Structure.parallel(whole, next);
    }
    return whole;
  }

  /**
   * With the component c on every level: it bridges the series parts and arms the parallel ones.
   */
  private static Structure sharedLadder() {
    Structure c = Structure.component("c");
    Structure whole = Structure.component("x0");
    for (int i = 1; i <= DEPTH; i++) {
      Structure next = Structure.component("x" + i);
      whole =
          isSeries(i)
              ? Structure.series(whole, Structure.parallel(next, c))
              : Structure.parallel(whole, Structure.series(next, c));
    }
    return whole;
  }

  private static boolean isSeries(int level) {
    return level % 2 == 0;
  }

  /** Unlikely both to end a series and to carry a parallel part, so that all levels matter. */
  private static Probability ofLevel(int level) {
    if (level == 0) {
      return Probability.working(0.5);
    }
    return isSeries(level)
        ? Probability.failing(1e-5 * (1 + level % 7))
        : Probability.working(1e-5 * (1 + level % 5));
  }

  private static Probabilities probabilities() {
    Map<String, Probability> byName = new HashMap<>();
    byName.put("c", Probability.working(0.25));
    for (int i = 0; i <= DEPTH; i++) {
      byName.put("x" + i, ofLevel(i));
    }
    return Probabilities.of(byName);
  }

  /** From the innermost level outwards, leaving out the levels that do not count. */
  private static Probability recurrence(boolean countSeries, boolean countParallel) {
    double works = 0.5;
    double fails = 0.5;
    for (int i = 1; i <= DEPTH; i++) {
      double p = ofLevel(i).working();
      double q = ofLevel(i).failing();
      if (isSeries(i) && countSeries) {
        fails += works * q;
        works *= p;
      } else if (!isSeries(i) && countParallel) {
        works += fails * p;
        fails *= q;
      }
    }
    return Probability.of(works, fails);
  }

  private static void assertClose(Probability expected, Probability actual) {
    assertEquals(expected.working(), actual.working(), 1e-9 * expected.working());
    assertEquals(expected.failing(), actual.failing(), 1e-9 * expected.failing());
  }

  private static <T> T onSmallStack(Callable<T> task) throws Exception {
    FutureTask<T> result = new FutureTask<>(task);
    Thread thread = new Thread(null, result, "deep", STACK);
    thread.setDaemon(true);
    thread.start();
    return result.get(60, TimeUnit.SECONDS);
  }

  private static int recursion(int depth) {
    return depth == 0 ? 0 : 1 + recursion(depth - 1);
  }

  @Test
  void theStackIsTooSmallForRecursion() {
    Exception thrown =
        assertThrows(ExecutionException.class, () -> onSmallStack(() -> recursion(DEPTH)));
    assertEquals(StackOverflowError.class, thrown.getCause().getClass());
  }

  @Test
  void text_andBack() throws Exception {
    String text = onSmallStack(DEEP::toString);
    assertTrue(text.startsWith("series(parallel(series(parallel("));
    assertTrue(text.endsWith(", " + BELOW_TOP + "), " + TOP + ")"));
    Structure parsed = onSmallStack(() -> Structure.parse(text));
    assertTrue(onSmallStack(() -> parsed.equals(DEEP)));
    assertEquals(DEEP.hashCode(), onSmallStack(parsed::hashCode));
    assertEquals(text, onSmallStack(parsed::toString));
  }

  @Test
  void equality_findsTheInnermostDifference() throws Exception {
    Structure other = onSmallStack(() -> DEEP.replace("x0", Structure.component("y")));
    assertFalse(onSmallStack(() -> other.equals(DEEP)));
    assertTrue(onSmallStack(() -> other.equals(DEEP.replace("x0", Structure.component("y")))));
    assertNotEquals(DEEP.hashCode(), other.hashCode());
  }

  @Test
  void components_comeFromInsideOut() throws Exception {
    List<String> components = onSmallStack(() -> Structure.parse(DEEP.toString()).components());
    assertEquals(DEPTH + 1, components.size());
    assertEquals("x0", components.get(0));
    assertEquals(TOP, components.get(DEPTH));
  }

  @Test
  void works_inPlainStates() throws Exception {
    assertTrue(onSmallStack(() -> DEEP.works(Set.of(BELOW_TOP, TOP))));
    assertFalse(onSmallStack(() -> DEEP.works(Set.of(TOP))));
    Set<String> allButTop = new HashSet<>(DEEP.components());
    allButTop.remove(TOP);
    assertFalse(onSmallStack(() -> DEEP.works(allButTop)));
    assertTrue(onSmallStack(() -> SHARED.works(Set.of("c", "x1"))));
    assertFalse(onSmallStack(() -> SHARED.works(Set.of("c", "x2"))));
  }

  @Test
  void dual_isItsOwnInverse() throws Exception {
    Structure dual = onSmallStack(DEEP::dual);
    assertTrue(onSmallStack(() -> dual.works(Set.of(TOP))));
    assertFalse(onSmallStack(() -> dual.works(Set.of(BELOW_TOP))));
    assertTrue(onSmallStack(() -> dual.dual().equals(DEEP)));
    assertFalse(onSmallStack(() -> dual.equals(DEEP)));
  }

  @Test
  void given_simplifiesAllTheWay() throws Exception {
    List<String> working = onSmallStack(() -> DEEP.givenWorking("x0").components());
    assertEquals(DEEP.components().subList(2, DEPTH + 1), working);
    List<String> failed = onSmallStack(() -> DEEP.givenFailed("x0").components());
    assertEquals(DEEP.components().subList(1, DEPTH + 1), failed);
    assertEquals(TOP, onSmallStack(() -> DEEP.givenWorking(BELOW_TOP)).toString());
    assertTrue(onSmallStack(() -> DEEP.givenFailed(TOP)).isNeverWorking());
    Structure shared = onSmallStack(() -> SHARED.givenWorking("c"));
    assertEquals(DEPTH / 2 + 1, onSmallStack(shared::components).size());
  }

  @Test
  void replace_putsDepthUponDepth() throws Exception {
    Structure twice = onSmallStack(() -> DEEP.replace("x0", ladder("y", DEPTH)));
    assertEquals(2 * DEPTH + 1, onSmallStack(twice::components).size());
    assertTrue(onSmallStack(() -> twice.works(Set.of("y" + DEPTH, "y1", "x2", TOP, BELOW_TOP))));
  }

  @Test
  void reliability_isThatOfTheRecurrence() throws Exception {
    assertEquals(DEPTH + 1, system.diagram().nodeCount());
    assertClose(recurrence(true, true), onSmallStack(() -> system.reliability(P)));
    assertEquals(List.of(), onSmallStack(system::irrelevantComponents));
  }

  @ParameterizedTest
  @ValueSource(ints = {0, DEPTH / 2})
  void pivot_givesTheReliabilityToo(int level) throws Exception {
    Pivot pivot = onSmallStack(() -> system.pivot("x" + level));
    assertClose(recurrence(true, true), onSmallStack(() -> pivot.reliability(P)));
  }

  @Test
  void truncatedSets_areTheSmallestOfTheDeepLadder() throws Exception {
    TruncatedSets paths = onSmallStack(() -> DEEP.minimalPathSets(CutOff.size(3)));
    TruncatedSets cuts = onSmallStack(() -> DEEP.minimalCutSets(CutOff.size(3)));
    MinimalSets allPaths = onSmallStack(system::minimalPathSets);
    MinimalSets allCuts = onSmallStack(system::minimalCutSets);
    assertEquals(
        onSmallStack(() -> allPaths.ofSizeAtMost(3).stream().toList()), paths.stream().toList());
    assertEquals(
        onSmallStack(() -> allCuts.ofSizeAtMost(3).stream().toList()), cuts.stream().toList());
    assertTrue(onSmallStack(() -> cuts.discarded(P)) < 1);
  }

  /** Less deep, since sizes far apart need a bit each. */
  @Test
  void minimalSets_beginWithTheSmallestAndTheMostProbable() throws Exception {
    CoherentSystem ladder = onSmallStack(() -> ladder("y", DEPTH / 5).compile());
    MinimalSets paths = onSmallStack(ladder::minimalPathSets);
    MinimalSets cuts = onSmallStack(ladder::minimalCutSets);
    Set<String> path = Set.of("y19999", "y20000");
    Set<String> cut = Set.of("y20000");
    Probabilities p = Probabilities.all(0.5);
    assertEquals(path, onSmallStack(() -> paths.stream().findFirst()).orElseThrow());
    assertEquals(cut, onSmallStack(() -> cuts.iterator().next()));
    assertEquals(List.of(path), onSmallStack(() -> paths.mostProbable(1, p)));
    assertEquals(List.of(cut), onSmallStack(() -> cuts.mostProbable(1, p)));
  }

  @Test
  void irrelevantDepth_isReported() throws Exception {
    Structure c = Structure.component("c");
    Structure absorbing = Structure.parallel(Structure.series(DEEP, c), c);
    assertEquals(DEEP.components(), onSmallStack(() -> absorbing.compile().irrelevantComponents()));
  }

  private static Object copy(Object value) throws IOException, ClassNotFoundException {
    ByteArrayOutputStream bytes = new ByteArrayOutputStream();
    try (ObjectOutputStream out = new ObjectOutputStream(bytes)) {
      out.writeObject(value);
    }
    try (ObjectInputStream in =
        new ObjectInputStream(new ByteArrayInputStream(bytes.toByteArray()))) {
      return in.readObject();
    }
  }

  @Test
  void serialization_ofStructureAndSystem() throws Exception {
    assertTrue(onSmallStack(() -> copy(DEEP).equals(DEEP)));
    CoherentSystem copied = (CoherentSystem) onSmallStack(() -> copy(system));
    assertTrue(onSmallStack(() -> copied.equals(system)));
    assertEquals(system.diagram(), copied.diagram());
  }

  @Test
  void derivation_writesItAllOut() throws Exception {
    Derivation derivation = onSmallStack(() -> Derivation.of(DEEP, Budget.ofNodes(DEPTH)));
    assertEquals(List.of(), derivation.keyComponents());
    String formula = onSmallStack(derivation::formula);
    assertEquals(DEPTH + 1, Stream.of(formula.split("p\\(", -1)).skip(1).count());
    assertClose(recurrence(true, true), onSmallStack(() -> derivation.reliability(P)));
  }

  /** If c works the parallel levels alone count, otherwise the series levels. */
  private static Probability sharedReliability() {
    Probability working = recurrence(false, true);
    Probability failed = recurrence(true, false);
    return Probability.of(
        0.25 * working.working() + 0.75 * failed.working(),
        0.25 * working.failing() + 0.75 * failed.failing());
  }

  @Test
  void sharedComponent_outermostReadFirst() throws Exception {
    List<String> order = new ArrayList<>(SHARED.components());
    Collections.reverse(order);
    CoherentSystem shared = onSmallStack(() -> SHARED.compile(order, Budget.ofNodes(1_000_000)));
    assertClose(sharedReliability(), onSmallStack(() -> shared.reliability(P)));
    assertClose(sharedReliability(), onSmallStack(() -> shared.pivot("c").reliability(P)));
  }

  @Test
  void sharedComponent_isTheKey() throws Exception {
    Derivation derivation = onSmallStack(() -> Derivation.of(SHARED, Budget.ofNodes(DEPTH)));
    assertEquals(List.of("c"), derivation.keyComponents());
    assertClose(sharedReliability(), onSmallStack(() -> derivation.reliability(P)));
  }
}
