package org.kingbolt.core;

/**
 * A description is not a coherent structure: it can never work, can never fail, or works in some
 * state and fails in a better one. The message names the state that shows it.
 *
 * <p>Irrelevant components are no reason for this exception; {@link
 * CoherentSystem#irrelevantComponents()} reports them.
 */
public final class NotCoherentException extends IllegalArgumentException {

  private static final long serialVersionUID = 1L;

  NotCoherentException(String message) {
    super(message);
  }
}
