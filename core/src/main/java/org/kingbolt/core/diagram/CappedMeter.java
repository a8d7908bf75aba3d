package org.kingbolt.core.diagram;

/** A meter that ends the work at a limit of its own, of which only its owner knows. */
final class CappedMeter implements WorkMeter {

  /** The limit has been met; something smaller is to be tried. */
  static final class CapMetException extends RuntimeException {
    private static final long serialVersionUID = 1L;

    CapMetException() {
      super("larger than it was allowed to grow", null, false, false);
    }
  }

  private final long most;
  private final WorkMeter meter;

  CappedMeter(long most, WorkMeter meter) {
    this.most = most;
    this.meter = meter;
  }

  @Override
  public void at(long held) {
    meter.at(held);
    check(held);
  }

  @Override
  public void now(long held) {
    meter.now(held);
    check(held);
  }

  private void check(long held) {
    if (held > most) {
      throw new CapMetException();
    }
  }
}
