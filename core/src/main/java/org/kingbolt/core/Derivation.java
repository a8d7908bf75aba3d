package org.kingbolt.core;

/** Placeholder. */
public final class Derivation {
  private Derivation() {}
}
