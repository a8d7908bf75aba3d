package org.kingbolt.core.testing;

import java.util.List;
import java.util.Random;
import java.util.SplittableRandom;
import net.jqwik.api.Arbitraries;
import net.jqwik.api.Arbitrary;
import net.jqwik.api.Combinators;
import org.kingbolt.core.Probabilities;
import org.kingbolt.core.Probability;
import org.kingbolt.core.Structure;

/**
 * Random structures of every kind, nested and with components in several places, each with an
 * oracle that was made beside it and not from it. Failing samples shrink by number of components
 * and by depth.
 */
public final class RandomStructures {

  /**
   * A structure and its right answers.
   *
   * @param structure as described to the library
   * @param oracle knows the same structure from its truth table; its names are the structure's
   *     components, in their order
   */
  public record Sample(Structure structure, Oracle oracle) {

    @Override
    public String toString() {
      return structure.toString();
    }
  }

  private RandomStructures() {}

  /**
   * Structures of every kind over up to eight components, nested up to three deep.
   *
   * @return the arbitrary that all modules share
   */
  public static Arbitrary<Sample> any() {
    return Combinators.combine(
            Arbitraries.integers().between(1, 8), Arbitraries.integers().between(0, 3), seeds())
        .as((components, depth, seed) -> new StructureMaker(components, seed).sample(depth))
        .withoutEdgeCases();
  }

  /**
   * Networks of every kind over up to ten components: links, arcs, failing nodes, components in
   * several places, and every question.
   *
   * @return the arbitrary
   */
  public static Arbitrary<Sample> networks() {
    return Combinators.combine(
            Arbitraries.integers().between(1, 10), Arbitraries.integers().between(2, 7), seeds())
        .as((components, nodes, seed) -> new StructureMaker(components, seed).network(nodes))
        .withoutEdgeCases();
  }

  /**
   * Probabilities for any component, with sure, impossible and very small ones among them.
   *
   * @return registers that cover the names of {@link #NAMES}
   */
  public static Arbitrary<Probabilities> probabilities() {
    return seeds().map(RandomStructures::probabilities);
  }

  /** Well mixed, so that near seeds make different samples. */
  private static Arbitrary<Long> seeds() {
    return Arbitraries.longs()
        .withoutEdgeCases()
        .map(seed -> new SplittableRandom(seed).nextLong());
  }

  private static Probabilities probabilities(long seed) {
    Random random = new Random(seed);
    Probabilities p = Probabilities.all(0.5);
    for (String name : NAMES) {
      p = p.with(name, probability(random));
    }
    return p;
  }

  private static Probability probability(Random random) {
    return switch (random.nextInt(12)) {
      case 0 -> Probability.CERTAIN;
      case 1 -> Probability.IMPOSSIBLE;
      case 2, 3 -> Probability.failing(1e-9 * random.nextDouble());
      case 4, 5 -> Probability.working(1e-9 * random.nextDouble());
      case 6 -> Probability.failing(0.01 * random.nextDouble());
      default -> Probability.working(random.nextDouble());
    };
  }

  /** The names that random structures draw from, in the order of the bits of a state. */
  public static final List<String> NAMES =
      List.of("a", "b", "c", "d", "e", "f", "g", "h", "i", "j");
}
