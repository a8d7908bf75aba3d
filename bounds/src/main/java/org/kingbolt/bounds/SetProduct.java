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

  /** A whole set: path sets occur while their members work, cut sets when they have failed. */
  void add(int[] set, ComponentValues values, boolean paths) {
    double[] occurs = values.occurs(paths);
    double[] fails = values.fails(paths);
    begin();
    for (int member : set) {
      member(occurs[member], fails[member]);
    }
    end();
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
