package org.kingbolt.core;

/** Cuts a structure's text into words, with their lines and columns. For one thread. */
final class Lexer {

  /** What a word is. */
  enum Kind {
    NAME,
    QUOTED,
    MARK,
    END
  }

  /** A word and where it stands. */
  record Word(Kind kind, String text, int line, int column) {

    boolean isMark(char mark) {
      return kind == Kind.MARK && text.charAt(0) == mark;
    }

    boolean isName() {
      return kind == Kind.NAME || kind == Kind.QUOTED;
    }

    StructureSyntaxException expected(String what) {
      String found =
          switch (kind) {
            case END -> "the end of the text";
            case MARK -> "'" + text + "'";
            default -> Check.quoted(text);
          };
      return new StructureSyntaxException(line, column, what, found);
    }
  }

  private static final String MARKS = "(){},:";

  private final String text;
  private int at;
  private int line = 1;
  private int column = 1;
  private Word ahead;

  Lexer(String text) {
    this.text = text;
    this.ahead = read();
  }

  Word peek() {
    return ahead;
  }

  Word next() {
    Word word = ahead;
    ahead = read();
    return word;
  }

  void mark(char mark, String what) {
    if (!ahead.isMark(mark)) {
      throw ahead.expected(what);
    }
    next();
  }

  String name(String what) {
    if (!ahead.isName()) {
      throw ahead.expected(what);
    }
    return next().text();
  }

  long number(String what) {
    if (ahead.kind() != Kind.NAME || !ahead.text().matches("-?[0-9]+")) {
      throw ahead.expected(what);
    }
    try {
      return Long.parseLong(ahead.text());
    } catch (NumberFormatException tooLong) {
      throw ahead.expected(what + " that fits 64 bits");
    } finally {
      next();
    }
  }

  private Word read() {
    while (at < text.length() && isBlank(text.codePointAt(at))) {
      step();
    }
    int startLine = line;
    int startColumn = column;
    if (at == text.length()) {
      return new Word(Kind.END, "", startLine, startColumn);
    }
    int first = text.codePointAt(at);
    if (MARKS.indexOf(first) >= 0) {
      step();
      return new Word(Kind.MARK, Character.toString(first), startLine, startColumn);
    }
    if (first == '"') {
      return new Word(Kind.QUOTED, quoted(), startLine, startColumn);
    }
    int start = at;
    while (at < text.length() && TextWriter.isBare(text.codePointAt(at))) {
      step();
    }
    if (at == start) {
      throw new StructureSyntaxException(
          line,
          column,
          "a name (in double quotes if it has other signs than letters and digits)",
          "'" + Character.toString(first) + "'");
    }
    return new Word(Kind.NAME, text.substring(start, at), startLine, startColumn);
  }

  private static boolean isBlank(int codePoint) {
    return Character.isWhitespace(codePoint)
        || Character.isSpaceChar(codePoint)
        || codePoint == 0xFEFF;
  }

  private String quoted() {
    int startLine = line;
    int startColumn = column;
    step();
    StringBuilder name = new StringBuilder();
    while (at < text.length()) {
      int c = text.codePointAt(at);
      step();
      if (c == '"') {
        return name.toString();
      }
      if (c == '\\') {
        escape(name);
      } else {
        name.appendCodePoint(c);
      }
    }
    throw new StructureSyntaxException(
        line,
        column,
        "a closing double quote for the name that begins at line "
            + startLine
            + ", column "
            + startColumn,
        "the end of the text");
  }

  private void escape(StringBuilder name) {
    int c = at < text.length() ? text.codePointAt(at) : -1;
    switch (c) {
      case '"', '\\' -> name.append((char) c);
      case 'n' -> name.append('\n');
      case 't' -> name.append('\t');
      case 'u' -> {
        String digits = at + 5 <= text.length() ? text.substring(at + 1, at + 5) : "";
        if (!digits.matches("[0-9a-fA-F]{4}")) {
          throw new StructureSyntaxException(
              line, column, "four hexadecimal digits after \\u", "something else");
        }
        name.append((char) Integer.parseInt(digits, 16));
        for (int i = 0; i < 4; i++) {
          step();
        }
      }
      default ->
          throw new StructureSyntaxException(
              line,
              column,
              "one of \\\" \\\\ \\n \\t \\u",
              c < 0 ? "the end of the text" : "'\\" + Character.toString(c) + "'");
    }
    step();
  }

  private void step() {
    int c = text.codePointAt(at);
    at += Character.charCount(c);
    if (c == '\n') {
      line++;
      column = 1;
    } else {
      column++;
    }
  }
}
