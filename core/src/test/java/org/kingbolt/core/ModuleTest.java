package org.kingbolt.core;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;
import static org.kingbolt.core.Structure.atLeast;
import static org.kingbolt.core.Structure.component;
import static org.kingbolt.core.Structure.parallel;
import static org.kingbolt.core.Structure.series;

import java.util.ArrayList;
import java.util.List;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

/** A component that stands in several places costs inside the smallest gate that holds them all. */
class ModuleTest {

  /** The bridge, written out by its paths, so that every component stands in two of them. */
  private static Structure bridge(String name) {
    Structure a = component(name + "a");
    Structure b = component(name + "b");
    Structure c = component(name + "c");
    Structure d = component(name + "d");
    Structure e = component(name + "e");
    return parallel(series(a, c), series(b, d), series(a, e, d), series(b, e, c));
  }

  /** Three bridges in parallel. */
  private static Structure bridges(String name) {
    return parallel(bridge(name + 1), bridge(name + 2), bridge(name + 3));
  }

  private static int nodes(Structure structure) {
    return structure.compile().diagram().nodeCount();
  }

  @ParameterizedTest
  @ValueSource(ints = {10, 1_000, 10_000})
  void modulesInSeries_costWhatTheyCostAlone(int count) {
    List<Structure> modules = new ArrayList<>();
    for (int i = 0; i < count; i++) {
      modules.add(bridge("m" + i));
    }
    int one = nodes(bridge(""));
    assertEquals(count * one, nodes(series(modules)));
    assertEquals(count * one, nodes(parallel(modules)));
    Structure nested = modules.get(0);
    for (int i = 1; i < count; i++) {
      Structure module = modules.get(i);
      nested = i % 2 == 0 ? series(nested, module) : parallel(module, nested);
    }
    assertEquals(count * one, nodes(nested));
  }

  /** Of the parts of a 2-out-of-3 gate only the one read second is needed twice: the smallest. */
  @Test
  void modulesInTwoOutOfThree_costOnceExceptTheSmallest() {
    int one = nodes(bridge(""));
    Structure small = component("x");
    assertEquals(2 * one + 2, nodes(atLeast(2, bridge("m"), small, bridge("n"))));
    assertEquals(2 * one + 2, nodes(atLeast(2, small, bridge("m"), bridge("n"))));
    assertEquals(4 * one + 2 * one, nodes(atLeast(2, bridge("m"), bridges("n"), bridge("o"))));
    List<Structure> gates = new ArrayList<>();
    for (int i = 0; i < 1_000; i++) {
      gates.add(atLeast(2, bridge("m" + i), component("x" + i), bridge("n" + i)));
    }
    assertEquals(1_000 * (2 * one + 2), nodes(parallel(gates)));
  }

  /** What the first and the last module share has to be remembered past all others, once. */
  @Test
  void sharingAcrossModules_leavesTheModulesBetweenAlone() {
    Structure x = component("x");
    List<Structure> modules = new ArrayList<>();
    modules.add(parallel(series(x, component("y")), bridge("first")));
    for (int i = 0; i < 1_000; i++) {
      modules.add(bridge("m" + i));
    }
    modules.add(parallel(series(x, component("z")), bridge("last")));
    int between = 1_000 * nodes(bridge(""));
    int whole = nodes(series(modules));
    assertTrue(whole >= between && whole <= between + 50, () -> whole + ", between " + between);
    // as described, the modules between are read while x is remembered
    int asDescribed =
        series(modules)
            .compile(series(modules).components(), Budget.ofHeap())
            .diagram()
            .nodeCount();
    assertTrue(asDescribed >= 2 * between, () -> asDescribed + ", between " + between);
  }
}
