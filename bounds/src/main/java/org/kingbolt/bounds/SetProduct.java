package org.kingbolt.bounds;

/**
 * The probability that any, and that none, of several independent sets of independent events occurs
 * as a whole, set by set and event by event, without subtraction. For one thread.
 */
final class SetProduct {

  private double any;
  private double none = 1;
  private double all;
  private double notAll;
  private long operations;

  void begin() {
    all = 1;
    notAll = 0;
  }

  void member(double occurs, double fails) {
    notAll += all * fails;
    all *= occurs;
    operations++;
  }

  void end() {
    any += none * all;
    none *= notAll;
    operations++;
  }

  double any() {
    return any;
  }

  double none() {
    return none;
  }

  /** A count of steps, each of which adds at most two roundings to either result. */
  long operations() {
    return operations;
  }
}
