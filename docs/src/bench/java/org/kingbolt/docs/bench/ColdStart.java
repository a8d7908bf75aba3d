package org.kingbolt.docs.bench;

/** Times the first call in a fresh virtual machine. */
final class ColdStart {

  private static final double SAME_FIGURES = 1e-9;

  private ColdStart() {}

  /**
   * Prints nanoseconds, size, unit, number, and what it is, a line each; then the peers' numbers,
   * if asked to, each after the peer's name.
   *
   * @param args the workload, and whether to ask the peers too
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
      prepared.peers().forEach((peer, call) -> compare(prepared, ours, peer, call.getAsDouble()));
    }
  }

  /** Numbers of nodes may differ, when a peer has another order of variables; figures may not. */
  private static void compare(Prepared prepared, double ours, String peer, double theirs) {
    boolean same = Math.abs(ours - theirs) <= SAME_FIGURES * Math.abs(ours);
    if (!same && !prepared.result().equals(Prepared.NODES)) {
      throw new IllegalStateException("ours is " + ours + ", but it is " + theirs + " by " + peer);
    }
    System.out.println(peer);
    System.out.println(theirs);
  }
}
