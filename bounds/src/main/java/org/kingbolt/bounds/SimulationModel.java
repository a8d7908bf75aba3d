package org.kingbolt.bounds;

import java.util.function.Supplier;

/**
 * What is drawn and what its share means: the probability of one side is {@code scale} times the
 * probability that a trial hits, and that of the other one {@code base} plus {@code scale} times
 * the probability that it misses.
 *
 * @param trials makes the hand of one thread
 * @param failing whether the side that is counted is the failing one
 * @param scale at least 0
 * @param base the complement of scale
 * @param operations how many operations with rounding have led to scale and base
 * @param method the name of the method
 * @param reason why the interval has its confidence
 */
record SimulationModel(
    Supplier<SimulationTrial> trials,
    boolean failing,
    double scale,
    double base,
    long operations,
    String method,
    String reason) {}
