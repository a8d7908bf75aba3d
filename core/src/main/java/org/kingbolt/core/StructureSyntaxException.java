package org.kingbolt.core;

/** A structure's text cannot be read: says where, what was expected there, and what was found. */
public final class StructureSyntaxException extends IllegalArgumentException {

  private static final long serialVersionUID = 1L;

  private final int line;
  private final int column;
  private final String expected;

  StructureSyntaxException(int line, int column, String expected, String found) {
    super("line " + line + ", column " + column + ": expected " + expected + ", found " + found);
    this.line = line;
    this.column = column;
    this.expected = expected;
  }

  /**
   * Returns the line of the fault.
   *
   * @return 1 for the first line
   */
  public int line() {
    return line;
  }

  /**
   * Returns the column of the fault, in characters as a reader counts them (Unicode code points).
   *
   * @return 1 for the first character of the line
   */
  public int column() {
    return column;
  }

  /**
   * Returns what would have been right there.
   *
   * @return such as "a comma or a closing parenthesis"
   */
  public String expected() {
    return expected;
  }
}
