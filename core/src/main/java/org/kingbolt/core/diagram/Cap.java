package org.kingbolt.core.diagram;

/** Passes work on to a meter, and ends it where it holds more than a trial may. */
final class Cap implements WorkMeter {

  /** A trial has grown too large. */
  static final class Reached extends RuntimeException {
    private static final long serialVersionUID = 1L;

    private Reached() {
      super("larger than a trial may become", null, false, false);
    }
  }

  private final WorkMeter meter;
  private final long most;

  Cap(WorkMeter meter, long most) {
    this.meter = meter;
    this.most = most;
  }

  @Override
  public void at(long held) {
    meter.at(held);
    if (held > most) {
      throw new Reached();
    }
  }

  @Override
  public void now(long held) {
    meter.now(held);
    if (held > most) {
      throw new Reached();
    }
  }
}
