package org.kingbolt.bounds;

/** What must be true of the components for an interval to hold, from the least to the most. */
public enum Assumption {

  /** Nothing: the interval holds whatever the dependence, given the probability of each one. */
  NONE("components with any dependence"),

  /**
   * The components are associated in the sense of Esary, Proschan &amp; Walkup, Ann. Math. Stat. 38
   * (1967) 1466: increasing functions of their states are never negatively correlated. Components
   * that share loads or environments usually are; independent ones always are.
   */
  ASSOCIATED("associated components"),

  /** The components fail independently of each other. */
  INDEPENDENT("independent components");

  private final String text;

  Assumption(String text) {
    this.text = text;
  }

  /** The one that is true only where both are. */
  Assumption and(Assumption other) {
    return compareTo(other) >= 0 ? this : other;
  }

  /** The assumption in words, for a table. */
  @Override
  public String toString() {
    return text;
  }
}
