package org.kingbolt.core.testing;

import java.util.ArrayList;
import java.util.BitSet;
import java.util.List;
import java.util.function.IntPredicate;
import java.util.function.Predicate;

/**
 * A structure function written out: for every state of a pool of components, whether it works.
 * States are bit masks of working components. Shares nothing with the library.
 *
 * @param components how many components the pool has
 * @param working the working states
 */
public record TruthTable(int components, BitSet working) {

  /**
   * Asks about every state.
   *
   * @param components at most 20
   * @param works tells of a bit mask of working components whether it works
   * @return the table
   */
  public static TruthTable of(int components, IntPredicate works) {
    BitSet working = new BitSet();
    for (int state = 0; state < 1 << components; state++) {
      working.set(state, works.test(state));
    }
    return new TruthTable(components, working);
  }

  static TruthTable component(int components, int index) {
    return of(components, state -> (state >>> index & 1) != 0);
  }

  static TruthTable constant(int components, boolean works) {
    return of(components, state -> works);
  }

  /** The operator that decides by the values of its parts. */
  static TruthTable over(int components, List<TruthTable> parts, Predicate<boolean[]> operator) {
    return of(
        components,
        state -> {
          boolean[] values = new boolean[parts.size()];
          for (int i = 0; i < values.length; i++) {
            values[i] = parts.get(i).works(state);
          }
          return operator.test(values);
        });
  }

  /**
   * Looks one state up.
   *
   * @param state bit mask of working components
   * @return whether it works
   */
  public boolean works(int state) {
    return working.get(state);
  }

  TruthTable dual() {
    int all = (1 << components) - 1;
    return of(components, state -> !works(all & ~state));
  }

  TruthTable given(int index, boolean works) {
    int bit = 1 << index;
    return of(components, state -> works(works ? state | bit : state & ~bit));
  }

  TruthTable replace(int index, TruthTable module) {
    int bit = 1 << index;
    return of(components, state -> works(module.works(state) ? state | bit : state & ~bit));
  }

  /** Whether the component makes a difference in some state. */
  boolean matters(int index) {
    return !given(index, true).working.equals(given(index, false).working);
  }

  boolean isConstant() {
    int states = working.cardinality();
    return states == 0 || states == 1 << components;
  }

  /**
   * All monotone functions: a function of n variables is a pair f &lt;= g of functions of n - 1.
   *
   * @param order the number of variables, at most 5
   * @return truth tables as masks, bit x of which is the value in state x
   */
  public static List<Integer> monotone(int order) {
    List<Integer> tables = List.of(0, 1);
    for (int n = 0; n < order; n++) {
      List<Integer> next = new ArrayList<>();
      for (int low : tables) {
        for (int high : tables) {
          if ((low & ~high) == 0) {
            next.add(low | high << (1 << n));
          }
        }
      }
      tables = next;
    }
    return tables;
  }
}
