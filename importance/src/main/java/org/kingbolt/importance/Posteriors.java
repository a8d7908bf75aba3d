package org.kingbolt.importance;

import org.kingbolt.core.CoherentSystem;
import org.kingbolt.core.Probability;
import org.kingbolt.core.diagram.Scan;

/** Each component's probability given what the system does; both sides without differences. */
final class Posteriors {

  /** What is known of the system. */
  enum Event {
    NONE,
    WORKS,
    FAILED
  }

  private final Probability[] values;

  private Posteriors(Probability[] values) {
    this.values = values;
  }

  static Posteriors of(CoherentSystem system, Gains given, Event event) {
    int n = system.components().size();
    Scan scan = new Scan(system.diagram(), n);
    scan.up(given.working(), given.failing());
    double evidence = event == Event.WORKS ? scan.works() : scan.fails();
    if (event != Event.NONE && evidence == 0) {
      throw new IllegalStateException(
          "the system cannot "
              + (event == Event.WORKS ? "work" : "have failed")
              + " with what is known of its components: that has probability 0; check what is said,"
              + " and the components' probabilities");
    }
    Probability[] values = new Probability[n];
    for (int i = 0; i < n; i++) {
      double p = given.working(i);
      double q = given.failing(i);
      values[i] =
          switch (event) {
            case NONE -> Probability.of(p, q);
            case WORKS -> value(p * scan.worksWith(i, 1, 0), q * scan.worksWith(i, 0, 1), evidence);
            case FAILED ->
                value(p * scan.failsWith(i, 1, 0), q * scan.failsWith(i, 0, 1), evidence);
          };
    }
    return new Posteriors(values);
  }

  private static Probability value(double works, double fails, double evidence) {
    return Gains.sides(works / evidence, fails / evidence);
  }

  Probability get(int component) {
    return values[component];
  }
}
