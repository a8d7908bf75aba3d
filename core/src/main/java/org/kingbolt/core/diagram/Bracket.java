package org.kingbolt.core.diagram;

/**
 * Both ends of a probability, with both sides each: two pairs that differ, or are the same where
 * the probability is known.
 *
 * @param worksAtLeast the lower end of the probability of working
 * @param failsAtMost the upper end of the probability of failing
 * @param worksAtMost the upper end of the probability of working
 * @param failsAtLeast the lower end of the probability of failing
 */
record Bracket(double worksAtLeast, double failsAtMost, double worksAtMost, double failsAtLeast) {

  /** A known probability. */
  static Bracket exact(double works, double fails) {
    return new Bracket(works, fails, works, fails);
  }

  /** The same of the dual function at the inverted variables. */
  Bracket dual() {
    return new Bracket(failsAtLeast, worksAtMost, failsAtMost, worksAtLeast);
  }

  /** What two of them have in common, both being right. */
  Bracket and(Bracket other) {
    return new Bracket(
        Math.max(worksAtLeast, other.worksAtLeast),
        Math.min(failsAtMost, other.failsAtMost),
        Math.min(worksAtMost, other.worksAtMost),
        Math.max(failsAtLeast, other.failsAtLeast));
  }
}
