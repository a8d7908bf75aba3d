package org.kingbolt.core.diagram;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.LinkedHashSet;
import java.util.List;
import java.util.Random;
import java.util.Set;
import java.util.SplittableRandom;
import java.util.function.IntPredicate;
import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import org.junit.jupiter.api.Test;

/** The bounds for pieces that share variables, each against all states. */
class PieceBoundsTest {

  private static final double ROUNDING = 1e-12;

  /** Random gates of gates over a few variables, and their values. */
  private static final class Case {
    final Random random;
    final int variables;
    final int count;
    final Composer composer = new Composer(0);
    final List<IntPredicate> functions = new ArrayList<>();
    final Piece[] pieces;
    final double[] up;
    final double[] down;

    Case(long seed) {
      random = new Random(new SplittableRandom(seed).nextLong());
      variables = 2 + random.nextInt(8);
      count = 1 + random.nextInt(6);
      up = new double[variables];
      down = new double[variables];
      int kind = random.nextInt(4);
      for (int i = 0; i < variables; i++) {
        composer.variable(i);
        down[i] = failing(kind);
        up[i] = 1 - down[i];
      }
      pieces = new Piece[count];
      for (int i = 0; i < count; i++) {
        pieces[i] = Piece.of(composer, gate(), WorkMeter.UNLIMITED);
      }
    }

    private double failing(int kind) {
      return switch (kind) {
        case 0 -> random.nextDouble();
        case 1 -> 0.01 * random.nextDouble();
        case 2 -> Math.pow(10, -9 * random.nextDouble());
        default -> new double[] {0, 1, 1e-9, 0.5}[random.nextInt(4)];
      };
    }

    /** k of some variables, or that and one more, or that or one more. */
    private int gate() {
      Set<Integer> some = new LinkedHashSet<>();
      for (int i = 1 + random.nextInt(4); i > 0; i--) {
        some.add(random.nextInt(variables));
      }
      int k = 1 + random.nextInt(some.size());
      int mask = some.stream().mapToInt(i -> 1 << i).sum();
      int[] leaves = some.stream().mapToInt(composer::variable).toArray();
      int gate = composer.operator(Templates.atLeast(k, leaves.length), leaves);
      int more = random.nextInt(variables);
      int need = 1 + random.nextInt(2);
      functions.add(
          state -> (Integer.bitCount(state & mask) >= k ? 1 : 0) + (state >>> more & 1) >= need);
      return composer.operator(
          Templates.atLeast(need, 2), new int[] {gate, composer.variable(more)});
    }

    int working(int state) {
      return (int) functions.stream().filter(function -> function.test(state)).count();
    }

    /** The probability of the states in which so many pieces work. */
    double sum(int least, int most) {
      double sum = 0;
      for (int state = 0; state < 1 << variables; state++) {
        int working = working(state);
        if (working >= least && working <= most) {
          double weight = 1;
          for (int i = 0; i < variables; i++) {
            weight *= (state >>> i & 1) != 0 ? up[i] : down[i];
          }
          sum += weight;
        }
      }
      return sum;
    }

    Ensemble ensemble() {
      return new Ensemble(pieces, up, down, WorkMeter.UNLIMITED);
    }

    /** Mostly enough for all there is to do. */
    long allowance() {
      return random.nextInt(3) == 0 ? random.nextInt(3_000) : 1L << 40;
    }
  }

  private static void assertBetween(double low, double value, double high) {
    assertTrue(low * (1 - ROUNDING) <= value, () -> low + " <= " + value);
    assertTrue(value <= high * (1 + ROUNDING), () -> value + " <= " + high);
  }

  @Property(tries = 4_000)
  void allPieces_workAsOftenAsTheChainSays(@ForAll long seed) {
    Case c = new Case(seed);
    Bracket bracket = Chain.of(c.ensemble(), c.allowance());
    assertBetween(bracket.worksAtLeast(), c.sum(c.count, c.count), bracket.worksAtMost());
    assertBetween(bracket.failsAtLeast(), c.sum(0, c.count - 1), bracket.failsAtMost());
  }

  @Property(tries = 4_000)
  void tooFewPieces_workAsOftenAsThePathsSay(@ForAll long seed) {
    Case c = new Case(seed);
    int k = 1 + c.random.nextInt(c.count);
    Diagram gate = Templates.atLeast(k, c.count).template(WorkMeter.UNLIMITED);
    int most = c.random.nextInt(3) == 0 ? c.random.nextInt(20) : 1 << 20;
    FirstFailures failures =
        FirstFailures.of(gate, c.ensemble(), most, c.allowance(), WorkMeter.UNLIMITED);
    assertBetween(failures.failsAtLeast, c.sum(0, k - 1), failures.failsAtMost);
  }

  @Property(tries = 2_000)
  void allPieces_failTogetherAsOftenAsSaid(@ForAll long seed) {
    Case c = new Case(seed);
    int[] all = new int[c.count];
    Arrays.setAll(all, i -> i);
    JointFailure.Ends ends = new JointFailure(c.ensemble(), c.allowance()).of(all, c.count);
    assertBetween(ends.low(), c.sum(0, 0), ends.high());
  }

  /** Pieces that share nothing, and two that share one thing, are not bounded but known. */
  @Test
  void littleInCommon_isExact() {
    Composer composer = new Composer(0);
    int[] leaves = new int[6];
    Arrays.setAll(leaves, composer::variable);
    int[][] parts = {{leaves[0], leaves[1]}, {leaves[1], leaves[2]}, {leaves[3], leaves[4]}};
    Piece[] pieces = new Piece[3];
    for (int i = 0; i < 3; i++) {
      pieces[i] = Piece.of(composer, composer.any(parts[i]), WorkMeter.UNLIMITED);
    }
    double[] down = {1e-3, 2e-3, 3e-3, 4e-3, 5e-3, 6e-3};
    double[] up = Arrays.stream(down).map(q -> 1 - q).toArray();
    Bracket bracket = Chain.of(new Ensemble(pieces, up, down, WorkMeter.UNLIMITED), 1L << 40);
    // the second variable decides between a series and nothing at all
    double two = 2e-3 * (1e-3 + 3e-3 - 3e-6);
    double exact = two + (1 - two) * 2e-5;
    assertEquals(exact, bracket.failsAtLeast(), 1e-14 * exact);
    assertEquals(exact, bracket.failsAtMost(), 1e-14 * exact);
  }
}
