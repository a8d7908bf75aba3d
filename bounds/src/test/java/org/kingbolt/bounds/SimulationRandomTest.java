package org.kingbolt.bounds;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.HashSet;
import java.util.Set;
import org.junit.jupiter.api.Test;

/** The generator behind simulations. */
class SimulationRandomTest {

  /** The first numbers of xoshiro256++ from the state 1, 2, 3, 4; from memory. */
  @Test
  void numbers_areThePublishedOnes() {
    SimulationRandom random = new SimulationRandom(1, 2, 3, 4);
    String[] published = {
      "41943041",
      "58720359",
      "3588806011781223",
      "3591011842654386",
      "9228616714210784205",
      "9973669472204895162",
      "14011001112246962877",
      "12406186145184390807",
      "15849039046786891736",
      "10450023813501588000"
    };
    for (String number : published) {
      assertEquals(Long.parseUnsignedLong(number), random.next());
    }
  }

  @Test
  void batchesStagesAndSeeds_differ() {
    Set<Long> first = new HashSet<>();
    for (long seed = -5; seed < 5; seed++) {
      for (long stage = 1; stage <= 2; stage++) {
        for (long batch = 0; batch < 1000; batch++) {
          first.add(new SimulationRandom(seed, stage, batch).next());
        }
      }
    }
    assertEquals(10 * 2 * 1000, first.size());
  }

  /** Five standard deviations are allowed. */
  @Test
  void events_happenAsOftenAsTheyShould() {
    SimulationRandom random = new SimulationRandom(1, 1, 1);
    int runs = 1_000_000;
    for (double p : new double[] {0, 1e-3, 0.3, 0.5, 0.9, 1}) {
      int happened = 0;
      int either = 0;
      for (int i = 0; i < runs; i++) {
        happened += random.happens(p) ? 1 : 0;
        either += random.happens(p, 1 - p) ? 1 : 0;
      }
      double deviation = Math.sqrt(runs * p * (1 - p));
      assertEquals(runs * p, happened, 5 * deviation);
      assertEquals(runs * p, either, 5 * deviation);
    }
  }

  /** From this state the first 53 bits are 0, so that the next ones decide. */
  @Test
  void verySmallProbabilities_areNotRoundedUp() {
    SimulationRandom random = new SimulationRandom(0, 1, 0, 0);
    assertEquals(0, random.uniform());
    double decisive = random.uniform();
    assertTrue(new SimulationRandom(0, 1, 0, 0).happens(0x1p-53));
    assertFalse(new SimulationRandom(0, 1, 0, 0).happens(0x1p-53 * decisive));
    assertTrue(new SimulationRandom(0, 1, 0, 0).happens(0x1p-53 * (decisive + 0x1p-30)));
  }
}
