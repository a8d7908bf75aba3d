package org.kingbolt.core;

import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;
import java.util.SplittableRandom;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.MethodSource;
import org.kingbolt.core.published.Topology;

/** Plain simulation of component states, judged by the structure function alone. */
class SimulationTest {

  private static final int RUNS = 20_000;

  static List<Structure> structures() {
    String[] names = new String[12];
    for (int i = 0; i < names.length; i++) {
      names[i] = "c" + i;
    }
    return List.of(
        Topology.file("ieee14").connecting("1", "14"),
        Topology.file("ieee14").connectingAll(),
        Topology.file("ieee30").connecting("1", "30"),
        Topology.file("nsfnet").connecting("WA", "MD", "GA"),
        Structure.atLeast(9, names),
        Structure.withoutFailureRun(3, names));
  }

  /** With a seed of its own the run is the same every time; 4.5 standard deviations are allowed. */
  @ParameterizedTest
  @MethodSource("structures")
  void share_ofWorkingRuns_isWithinItsConfidenceInterval(Structure structure) {
    SplittableRandom random = new SplittableRandom(structure.components().size());
    Probabilities p = Probabilities.all(0.5);
    for (String name : structure.components()) {
      p = p.with(name, 0.6 + 0.4 * random.nextDouble());
    }
    List<Probability> values = p.forComponents(structure.components());
    int works = 0;
    for (int run = 0; run < RUNS; run++) {
      java.util.Set<String> working = new java.util.HashSet<>();
      for (int i = 0; i < values.size(); i++) {
        if (random.nextDouble() < values.get(i).working()) {
          working.add(structure.components().get(i));
        }
      }
      works += structure.works(working) ? 1 : 0;
    }
    double r = structure.compile().reliability(p).working();
    double deviation = Math.sqrt(r * (1 - r) / RUNS);
    double share = works / (double) RUNS;
    assertTrue(
        Math.abs(share - r) <= 4.5 * deviation, () -> "simulated " + share + ", computed " + r);
  }
}
