package org.kingbolt.importance;

/** No plan within the limits reaches the target. */
final class PlanUnreachedException extends RuntimeException {

  private static final long serialVersionUID = 1L;

  PlanUnreachedException() {
    super("no plan reaches the target");
  }
}
