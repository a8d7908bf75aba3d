package org.kingbolt.docs.bench;

import java.util.Map;
import java.util.function.DoubleSupplier;

/** Times the first call in a fresh virtual machine. */
final class ColdStart {

  private static final double SAME_FIGURES = 1e-9;

  /** Reductions can swap neighbours in the order of variables. */
  private static final double SAME_NODES = 0.01;

  private ColdStart() {}

  /**
   * Prints nanoseconds, size, unit, number, and what it is, a line each.
   *
   * @param args the workload, and whether to compare the number with those of the peers
   */
  public static void main(String[] args) {
    Prepared prepared = Workloads.named(args[0]).preparation().get();
    long started = System.nanoTime();
    double ours = prepared.ours().getAsDouble();
    System.out.println(System.nanoTime() - started);
    System.out.println(prepared.size());
    System.out.println(prepared.unit());
    System.out.println(ours);
    System.out.println(prepared.result());
    if (Boolean.parseBoolean(args[1])) {
      compare(prepared, ours);
    }
  }

  private static void compare(Prepared prepared, double ours) {
    double agreement = prepared.result().equals("nodes") ? SAME_NODES : SAME_FIGURES;
    for (Map.Entry<String, DoubleSupplier> peer : prepared.peers().entrySet()) {
      double theirs = peer.getValue().getAsDouble();
      if (!(Math.abs(ours - theirs) <= agreement * Math.abs(ours))) {
        throw new IllegalStateException(
            "ours is " + ours + ", but it is " + theirs + " by " + peer.getKey());
      }
    }
  }
}
