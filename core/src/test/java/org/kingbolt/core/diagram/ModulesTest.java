package org.kingbolt.core.diagram;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

/** Modules are found as they are, and the work grows with their number. */
class ModulesTest {

  private final Composer composer = new Composer(0);

  private int leaf(int number) {
    return composer.variable(number);
  }

  @Test
  void sharedParts_makeKnotsOfTheGatesThatHoldAllUses() {
    int shared = composer.any(new int[] {leaf(0), leaf(1)});
    int first = composer.all(new int[] {shared, leaf(2)});
    int second = composer.all(new int[] {shared, leaf(3)});
    int knot = composer.any(new int[] {first, second});
    int root = composer.all(new int[] {knot, leaf(4)});
    Modules modules = new Modules(composer, root);
    assertTrue(modules.isModule(shared), "nothing outside uses its leaves");
    assertFalse(modules.isSingle(shared), "it stands in two places");
    assertFalse(modules.isModule(first), "its part stands elsewhere, too");
    assertTrue(modules.isKnot(knot));
    assertTrue(modules.isSingle(knot));
    assertFalse(modules.isKnot(root));
    assertTrue(modules.isModule(leaf(4)));
  }

  @Test
  void leafUsedInsideAndOutside_spoilsTheModule() {
    int inner = composer.any(new int[] {leaf(0), leaf(1)});
    int root = composer.all(new int[] {inner, leaf(1)});
    Modules modules = new Modules(composer, root);
    assertFalse(modules.isModule(inner));
    assertTrue(modules.isKnot(root));
  }

  /** A gate with a part in two places, as networks make them, grants nothing to itself. */
  @Test
  void partTwiceInOneGate_countsOnce() {
    int twice = composer.all(new int[] {leaf(0), leaf(0)});
    int root = composer.any(new int[] {twice, composer.all(new int[] {leaf(0), leaf(1)})});
    Diagram diagram = composer.compose(root, WorkMeter.UNLIMITED);
    assertEquals(1, diagram.nodeCount());
    assertTrue(diagram.works(new boolean[] {true, false}));
    assertFalse(diagram.works(new boolean[] {false, true}));
  }

  /** An operator without slots is no module, so that what it settles is simplified away. */
  @Test
  void constantPart_leavesNoNodeThatDoesNotMatter() {
    int works = composer.all(new int[] {});
    int root = composer.all(new int[] {works, composer.any(new int[] {leaf(0), leaf(1)})});
    assertEquals(2, composer.compose(root, WorkMeter.UNLIMITED).nodeCount());
    Composer other = new Composer(2);
    int[] parts = {other.variable(0), other.all(new int[] {}), other.variable(1)};
    int any = other.any(parts);
    double[] direct =
        other.expect(any, new double[] {0.5, 0.5}, new double[] {0.5, 0.5}, WorkMeter.UNLIMITED);
    assertEquals(1, direct[0]);
    assertEquals(Diagram.WORKS, other.compose(any, WorkMeter.UNLIMITED).root());
  }

  /** Calls of the meter stand for the work, however fast the machine is. */
  @ParameterizedTest
  @ValueSource(booleans = {true, false})
  void work_growsInProportionToTheModules(boolean nested) {
    double work = work(1_000, nested);
    assertEquals(8, work(8_000, nested) / work, 0.1);
  }

  private static long work(int count, boolean nested) {
    Composer composer = new Composer(0);
    int[] modules = new int[count];
    int next = 0;
    for (int i = 0; i < count; i++) {
      int a = composer.variable(next++);
      int b = composer.variable(next++);
      int c = composer.variable(next++);
      modules[i] =
          composer.any(
              new int[] {
                composer.all(new int[] {a, b}),
                composer.all(new int[] {b, c}),
                composer.all(new int[] {a, c})
              });
    }
    int root = modules[0];
    for (int i = 1; i < count && nested; i++) {
      int[] both = {root, modules[i]};
      root = i % 2 == 0 ? composer.all(both) : composer.any(both);
    }
    long[] calls = new long[1];
    composer.compose(nested ? root : composer.all(modules), held -> calls[0]++);
    return calls[0];
  }
}
