package org.kingbolt.core.diagram;

/** The frontier of a network is wider than the packed states can tell apart. */
public final class FrontierTooWideException extends RuntimeException {

  private static final long serialVersionUID = 1L;

  /**
   * Says how wide.
   *
   * @param width the number of nodes on the frontier
   * @param most the most that a state can hold
   */
  public FrontierTooWideException(int width, int most) {
    super("a frontier of " + width + " nodes is wider than the " + most + " that a state can hold");
  }
}
