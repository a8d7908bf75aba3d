package org.kingbolt.bounds;

/** What must be true of the components for an interval to hold. */
public enum Assumption {

  /** The components fail independently of each other. */
  INDEPENDENT("independent components"),

  /**
   * The components are associated in the sense of Esary, Proschan &amp; Walkup, Ann. Math. Stat. 38
   * (1967) 1466: increasing functions of their states are never negatively correlated. Components
   * that share loads or environments usually are; independent ones always are.
   */
  ASSOCIATED("associated components");

  private final String text;

  Assumption(String text) {
    this.text = text;
  }

  /** The assumption in words, for a table. */
  @Override
  public String toString() {
    return text;
  }
}
