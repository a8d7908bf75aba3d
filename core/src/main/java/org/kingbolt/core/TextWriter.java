package org.kingbolt.core;

import java.util.ArrayDeque;
import java.util.ArrayList;
import java.util.Deque;
import java.util.List;

/** Writes structures as text, with a stack of what is still to be written. */
final class TextWriter {

  private static final int LONGEST = 1 << 28;
  private static final int EXCERPT = 60;

  /** Words and parts of the structure being written, in order. */
  private final List<Object> items = new ArrayList<>();

  private TextWriter() {}

  static String textOf(Structure root) {
    String text = write(root, LONGEST);
    if (text.length() > LONGEST) {
      throw new IllegalStateException(
          "the structure's text is longer than "
              + LONGEST
              + " characters; it repeats large parts many times");
    }
    return text;
  }

  /** The text, cut short for a message. */
  static String excerpt(Structure root) {
    String text = write(root, EXCERPT);
    if (text.length() <= EXCERPT) {
      return text;
    }
    boolean withinPair = Character.isSurrogatePair(text.charAt(EXCERPT - 1), text.charAt(EXCERPT));
    return text.substring(0, withinPair ? EXCERPT - 1 : EXCERPT) + "...";
  }

  private static String write(Structure root, int enough) {
    StringBuilder text = new StringBuilder();
    Deque<Object> open = new ArrayDeque<>();
    open.push(root);
    while (!open.isEmpty() && text.length() <= enough) {
      Object item = open.pop();
      if (item instanceof Structure structure) {
        TextWriter writer = new TextWriter();
        structure.write(writer);
        for (int i = writer.items.size() - 1; i >= 0; i--) {
          open.push(writer.items.get(i));
        }
      } else {
        text.append(item);
      }
    }
    return text.toString();
  }

  TextWriter token(String word) {
    items.add(word);
    return this;
  }

  TextWriter part(Structure part) {
    items.add(part);
    return this;
  }

  TextWriter list(List<Structure> parts) {
    for (int i = 0; i < parts.size(); i++) {
      if (i > 0) {
        items.add(", ");
      }
      items.add(parts.get(i));
    }
    return this;
  }

  TextWriter name(String name) {
    return token(nameText(name));
  }

  /** Writes a structure as the dual of its dual. */
  TextWriter dualOf(Structure structure) {
    return token("dual(").part(structure.dual()).token(")");
  }

  static boolean isBare(int codePoint) {
    return Character.isLetterOrDigit(codePoint)
        || codePoint == '_'
        || codePoint == '-'
        || codePoint == '.';
  }

  /** A name as it stands in a text: bare where possible, quoted elsewhere. */
  static String nameText(String name) {
    if (name.codePoints().allMatch(TextWriter::isBare)) {
      return name;
    }
    StringBuilder quoted = new StringBuilder("\"");
    name.codePoints()
        .forEach(
            c -> {
              switch (c) {
                case '"' -> quoted.append("\\\"");
                case '\\' -> quoted.append("\\\\");
                case '\n' -> quoted.append("\\n");
                case '\t' -> quoted.append("\\t");
                default -> {
                  // half of a pair counts as a code point only where the other half is missing
                  if (Character.isISOControl(c) || Character.getType(c) == Character.SURROGATE) {
                    quoted.append(String.format("\\u%04x", c));
                  } else {
                    quoted.appendCodePoint(c);
                  }
                }
              }
            });
    return quoted.append('"').toString();
  }
}
