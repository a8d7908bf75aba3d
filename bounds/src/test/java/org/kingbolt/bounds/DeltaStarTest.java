package org.kingbolt.bounds;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;
import static org.kingbolt.core.published.Families.corners;

import java.util.Random;
import java.util.SplittableRandom;
import net.jqwik.api.Arbitraries;
import net.jqwik.api.Arbitrary;
import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.Provide;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;
import org.kingbolt.bounds.LinkGraph.Link;
import org.kingbolt.core.Budget;
import org.kingbolt.core.NetworkBuilder;
import org.kingbolt.core.Probabilities;
import org.kingbolt.core.Probability;
import org.kingbolt.core.Structure;

/** The old hand method: what its replacements keep, and that it is labelled approximate. */
class DeltaStarTest {

  @Provide
  Arbitrary<Long> seeds() {
    return Arbitraries.longs().map(seed -> new SplittableRandom(seed).nextLong());
  }

  private static Link link(Random random) {
    double q = random.nextInt(3) == 0 ? 1e-7 * random.nextDouble() : random.nextDouble();
    return new Link(1 - q, q);
  }

  /** That two corners of a delta are not joined: neither directly nor over the third. */
  private static double apart(Link direct, Link one, Link two) {
    return direct.fails() * (one.fails() + two.fails() * one.works());
  }

  private static double apart(Link one, Link two) {
    return one.fails() + two.fails() * one.works();
  }

  /** Gadani 1981 (from memory): a star joins every pair of corners as often as its delta. */
  @Property(tries = 1000)
  void star_joinsPairsAsOftenAsItsDelta(@ForAll("seeds") long seed) {
    Random random = new Random(seed);
    Link ab = link(random);
    Link bc = link(random);
    Link ac = link(random);
    Link[] star = DeltaStar.star(ab, bc, ac);
    assertNear(apart(ab, bc, ac), apart(star[0], star[1]));
    assertNear(apart(bc, ab, ac), apart(star[1], star[2]));
    assertNear(apart(ac, ab, bc), apart(star[0], star[2]));
  }

  @Property(tries = 1000)
  void delta_joinsPairsAsOftenAsItsStar(@ForAll("seeds") long seed) {
    Random random = new Random(seed);
    Link a = link(random);
    Link b = link(random);
    Link c = link(random);
    Link[] delta = DeltaStar.delta(a, b, c);
    if (delta.length > 0) {
      assertNear(apart(a, b), apart(delta[0], delta[1], delta[2]));
      assertNear(apart(b, c), apart(delta[1], delta[0], delta[2]));
      assertNear(apart(a, c), apart(delta[2], delta[0], delta[1]));
    }
  }

  /** The delta of a star of alike links is found, and leads back to it. */
  @Test
  void starOfAlikeLinks_hasADelta() {
    for (double q : new double[] {0.3, 0.01, 1e-6}) {
      Link leg = new Link(1 - q, q);
      Link[] delta = DeltaStar.delta(leg, leg, leg);
      assertEquals(3, delta.length);
      Link[] back = DeltaStar.star(delta[0], delta[1], delta[2]);
      assertEquals(q, back[0].fails(), 1e-9 * q);
    }
  }

  private static void assertNear(double wanted, double found) {
    assertEquals(wanted, found, 1e-9 * wanted);
  }

  /** Common practice: a network of series and parallel links needs no replacement. */
  @Test
  void seriesAndParallel_areExact() {
    Structure network =
        Structure.parse(
            "network(link(a, s, m), link(b, s, m), link(c, m, n), link(d, n, t), link(e, m, t),"
                + " link(dead, m, end), perfectLink(t, u), link(f, u, v), connecting(s, v))");
    Probabilities p = Probabilities.all(Probability.failing(1e-5)).with("c", 0.7);
    Approximation found = Bounds.of(network).given(p).deltaStar();
    Probability exact = network.reliability(p);
    assertEquals(0, found.replacements());
    assertEquals(exact.failing(), found.value().failing(), 1e-12 * exact.failing());
    assertTrue(found.certified().contains(exact));
  }

  /**
   * The bridge by one replacement, written out: star of three alike links, then series, parallel.
   */
  @Test
  void bridge_isThatOfTheHandCalculation() {
    Structure bridge =
        Structure.parse(
            "network(link(a, s, u), link(b, s, v), link(c, u, v), link(d, u, t), link(e, v, t),"
                + " connecting(s, t))");
    double p = 0.9;
    double leg = Math.sqrt(p + (1 - p) * p * p);
    double byHand = leg * (1 - Math.pow(1 - leg * p, 2));
    Approximation found = Bounds.of(bridge).given(Probabilities.all(p)).deltaStar();
    assertEquals(1, found.replacements());
    assertEquals(byHand, found.value().working(), 1e-12);
    assertTrue(found.toString().startsWith("delta-star, approximate (1 replacements)"));
    // Barlow and Proschan 1975 (from memory): 0.97848
    assertEquals(0.97848, found.certified().lower().working(), 1e-12);
    assertEquals(0.97848, found.value().working(), 2e-3);
    assertTrue(found.value().working() != 0.97848);
  }

  @ParameterizedTest
  @ValueSource(ints = {3, 4})
  void smallGrids_comeApart(int side) {
    Structure grid = corners(side);
    Probabilities p = Probabilities.all(0.99);
    Approximation found = Bounds.of(grid).given(p).deltaStar();
    double exact = grid.reliability(p).failing();
    assertTrue(found.replacements() > 0);
    assertEquals(exact, found.value().failing(), 0.5 * exact, found::toString);
    assertTrue(found.certified().contains(grid.reliability(p)));
  }

  @Test
  void otherStructures_areRefused() {
    for (String text :
        new String[] {
          "series(a, b)",
          "network(link(a, s, m), link(b, m, t), connectingAll())",
          "network(arc(a, s, t), link(b, s, t), connecting(s, t))"
        }) {
      BoundsAtProbabilities bounds = Bounds.of(Structure.parse(text)).given(Probabilities.all(0.9));
      IllegalArgumentException refused =
          assertThrows(IllegalArgumentException.class, bounds::deltaStar);
      assertTrue(refused.getMessage().startsWith("a network of links between two terminals"));
    }
  }

  /** Every node of the complete network of seven has six links; larger grids get stuck, too. */
  @Test
  void networkThatStaysWhole_isRefused() {
    BoundsAtProbabilities ofGrid = Bounds.of(corners(6)).given(Probabilities.all(0.9));
    assertThrows(IllegalArgumentException.class, ofGrid::deltaStar);
    NetworkBuilder complete = Structure.network();
    for (int i = 0; i < 7; i++) {
      for (int j = 0; j < i; j++) {
        complete = complete.link(i + "-" + j, "" + i, "" + j);
      }
    }
    BoundsAtProbabilities bounds =
        Bounds.of(complete.connecting("0", "6")).given(Probabilities.all(0.9));
    IllegalArgumentException refused =
        assertThrows(IllegalArgumentException.class, bounds::deltaStar);
    assertTrue(refused.getMessage().contains("use within(budget)"), refused::getMessage);
    assertTrue(bounds.within(Budget.ofHeap()).relativeWidthFailing() < 1e-12);
  }
}
