package org.kingbolt.core.testing;

import java.math.BigDecimal;
import java.math.BigInteger;
import java.math.MathContext;
import java.util.ArrayList;
import java.util.LinkedHashSet;
import java.util.List;
import java.util.Map;
import java.util.Set;
import org.kingbolt.core.Probabilities;
import org.kingbolt.core.Probability;

/**
 * The right answers for a small structure, found by going through all of its states in exact
 * arithmetic.
 */
public final class Oracle {

  /** Exact for products of up to eleven doubles of moderate size; far beyond a double for more. */
  private static final MathContext PRECISION = new MathContext(200);

  private final List<String> names;
  private final TruthTable table;

  /**
   * Makes an oracle.
   *
   * @param names the components, bit i of a state standing for the i-th
   * @param table the structure function
   */
  public Oracle(List<String> names, TruthTable table) {
    this.names = List.copyOf(names);
    this.table = table;
  }

  /**
   * The names behind the bits of a state.
   *
   * @return all components of the table, also those that do not matter
   */
  public List<String> names() {
    return names;
  }

  /**
   * The structure function.
   *
   * @return the table
   */
  public TruthTable table() {
    return table;
  }

  /**
   * Whether a state works.
   *
   * @param working the working components
   * @return the table's entry
   */
  public boolean works(Set<String> working) {
    return table.works(mask(working));
  }

  /**
   * The components in a state.
   *
   * @param state bit mask
   * @return their names
   */
  public Set<String> set(int state) {
    Set<String> set = new LinkedHashSet<>();
    for (int i = 0; i < names.size(); i++) {
      if ((state >>> i & 1) != 0) {
        set.add(names.get(i));
      }
    }
    return set;
  }

  private int mask(Set<String> working) {
    int mask = 0;
    for (String name : working) {
      mask |= 1 << names.indexOf(name);
    }
    return mask;
  }

  /**
   * The same oracle over some of its components only, the others not mattering.
   *
   * @param kept the components to keep, in the order wanted
   * @return the smaller oracle
   */
  public Oracle over(List<String> kept) {
    return new Oracle(
        kept,
        TruthTable.of(
            kept.size(),
            state -> {
              int mask = 0;
              for (int i = 0; i < kept.size(); i++) {
                mask |= (state >>> i & 1) << names.indexOf(kept.get(i));
              }
              return table.works(mask);
            }));
  }

  /**
   * The probability of the working states.
   *
   * @param p the probabilities of all components
   * @return the sum of products of both sides as they stand, in 200 digits
   */
  public BigDecimal works(Probabilities p) {
    return sum(p, true);
  }

  /**
   * The probability of the failed states.
   *
   * @param p the probabilities of all components
   * @return the sum of products of both sides as they stand, in 200 digits
   */
  public BigDecimal fails(Probabilities p) {
    return sum(p, false);
  }

  private BigDecimal sum(Probabilities p, boolean works) {
    BigDecimal[] values = new BigDecimal[1 << names.size()];
    for (int state = 0; state < values.length; state++) {
      values[state] = table.works(state) == works ? BigDecimal.ONE : BigDecimal.ZERO;
    }
    return mean(values, p);
  }

  /**
   * The probability that a component decides.
   *
   * @param component one of the names
   * @param p the probabilities of all components
   * @return the probability of the states in which its state is that of the system
   */
  public BigDecimal decides(String component, Probabilities p) {
    int bit = 1 << names.indexOf(component);
    BigDecimal[] values = new BigDecimal[1 << names.size()];
    for (int state = 0; state < values.length; state++) {
      boolean decides = table.works(state | bit) && !table.works(state & ~bit);
      values[state] = decides ? BigDecimal.ONE : BigDecimal.ZERO;
    }
    return mean(values, p.with(component, Probability.CERTAIN));
  }

  /** Takes the mean over one component after the other, the last one first. */
  private BigDecimal mean(BigDecimal[] values, Probabilities p) {
    for (int i = names.size() - 1; i >= 0; i--) {
      BigDecimal up = new BigDecimal(p.get(names.get(i)).working());
      BigDecimal down = new BigDecimal(p.get(names.get(i)).failing());
      for (int state = 0; state < 1 << i; state++) {
        values[state] =
            values[state | 1 << i]
                .multiply(up, PRECISION)
                .add(values[state].multiply(down, PRECISION), PRECISION);
      }
    }
    return values[0];
  }

  /**
   * The smallest working states.
   *
   * @return the working components of each
   */
  public Set<Set<String>> minimalPaths() {
    Set<Set<String>> sets = new LinkedHashSet<>();
    for (int state = 0; state < 1 << names.size(); state++) {
      if (table.works(state) && isExtreme(state, state, false)) {
        sets.add(set(state));
      }
    }
    return sets;
  }

  /**
   * The largest failed states.
   *
   * @return the failed components of each
   */
  public Set<Set<String>> minimalCuts() {
    int all = (1 << names.size()) - 1;
    Set<Set<String>> sets = new LinkedHashSet<>();
    for (int state = 0; state <= all; state++) {
      if (!table.works(state) && isExtreme(state, all & ~state, true)) {
        sets.add(set(all & ~state));
      }
    }
    return sets;
  }

  /** Whether changing any one of some components brings the state to the given side. */
  private boolean isExtreme(int state, int changeable, boolean works) {
    for (int rest = changeable; rest != 0; rest &= rest - 1) {
      if (table.works(state ^ Integer.lowestOneBit(rest)) != works) {
        return false;
      }
    }
    return true;
  }

  /**
   * Counts the working states.
   *
   * @return entry j: those with j working components
   */
  public List<BigInteger> workingStates() {
    long[] counts = new long[names.size() + 1];
    table.working().stream().forEach(state -> counts[Integer.bitCount(state)]++);
    List<BigInteger> result = new ArrayList<>();
    for (long count : counts) {
      result.add(BigInteger.valueOf(count));
    }
    return result;
  }

  /**
   * Lets the components fail in every order.
   *
   * @return entry i: in how many of the n! orders the failure of number i + 1 stops the system
   */
  public long[] orders() {
    int n = names.size();
    long[] found = new long[n];
    int[] order = new int[n];
    permute(order, 0, 0, found);
    return found;
  }

  /** Depth is the number of components, a handful. */
  private void permute(int[] order, int place, int failed, long[] found) {
    int n = order.length;
    if (place == n) {
      int state = (1 << n) - 1;
      for (int i = 0; i < n; i++) {
        state &= ~(1 << order[i]);
        if (!table.works(state)) {
          found[i]++;
          return;
        }
      }
      return;
    }
    for (int i = 0; i < n; i++) {
      if ((failed >>> i & 1) == 0) {
        order[place] = i;
        permute(order, place + 1, failed | 1 << i, found);
      }
    }
  }

  /**
   * Components that make no difference in any state.
   *
   * @return their names in order
   */
  public List<String> irrelevant() {
    List<String> found = new ArrayList<>();
    for (int i = 0; i < names.size(); i++) {
      if (!table.matters(i)) {
        found.add(names.get(i));
      }
    }
    return found;
  }

  /**
   * The probabilities by name, for a message.
   *
   * @param p a register
   * @return the values of this oracle's components
   */
  public Map<String, Probability> shown(Probabilities p) {
    Map<String, Probability> shown = new java.util.LinkedHashMap<>();
    names.forEach(name -> shown.put(name, p.get(name)));
    return shown;
  }
}
