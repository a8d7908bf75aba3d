package org.kingbolt.core;

import java.util.Collection;
import java.util.List;
import java.util.Objects;
import java.util.function.Supplier;
import java.util.stream.Collectors;
import org.jspecify.annotations.Nullable;

/** The argument checks of this package and their messages. */
final class Check {

  private static final int SHOWN = 12;

  private Check() {}

  /** A number from 0 to 1; negative zero becomes zero. */
  static double probability(double value, String what) {
    if (!(value >= 0 && value <= 1)) {
      throw new IllegalArgumentException(
          what + " is " + value + "; it must be a number from 0 to 1");
    }
    return value + 0.0;
  }

  /** A component's name: not null, something to see in it. */
  static String name(String name, String where) {
    return name(name, () -> where + ": a name");
  }

  /** A component's name in a list, at a place from 1 up. */
  static String name(String name, String where, int place) {
    return name(name, () -> where + ": name " + place);
  }

  /** A component's name; a complaint begins with what it is the name of. */
  static String name(String name, Supplier<String> what) {
    Objects.requireNonNull(
        name, () -> what.get() + " is null; give one with at least one visible character");
    if (isInvisible(name)) {
      throw new IllegalArgumentException(
          what.get()
              + " is "
              + quoted(name)
              + codePoints(name)
              + "; it must have at least one visible character");
    }
    return name;
  }

  /** Whether there is nothing to see in a name: blank space, controls, halves of pairs. */
  static boolean isInvisible(String name) {
    int at = 0;
    while (at < name.length() && isInvisible(name.codePointAt(at))) {
      at += Character.charCount(name.codePointAt(at));
    }
    return at == name.length();
  }

  private static boolean isInvisible(int codePoint) {
    return Character.isWhitespace(codePoint)
        || switch (Character.getType(codePoint)) {
          case Character.SPACE_SEPARATOR,
              Character.LINE_SEPARATOR,
              Character.PARAGRAPH_SEPARATOR,
              Character.CONTROL,
              Character.FORMAT,
              Character.SURROGATE,
              Character.UNASSIGNED ->
              true;
          default -> false;
        };
  }

  /** The first few characters of an invisible name by number, since its text says nothing. */
  private static String codePoints(String name) {
    return name.codePoints()
        .limit(SHOWN)
        .mapToObj(codePoint -> String.format("U+%04X", codePoint))
        .collect(Collectors.joining(" ", name.isEmpty() ? "" : " (", name.isEmpty() ? "" : ")"));
  }

  static <T> T notNull(T value, String what) {
    return Objects.requireNonNull(value, () -> what + " is null; it must be given");
  }

  /** The complaint about a name that the structure does not have. */
  static IllegalArgumentException unknown(String name, Collection<String> known) {
    return new IllegalArgumentException(
        "unknown component "
            + quoted(name)
            + Spelling.guess(name, known)
            + "; the components are "
            + listed(known)
            + (known.isEmpty() ? "" : "; name one of these"));
  }

  /** The first few names, quoted, and how many more there are. */
  static String listed(Collection<String> names) {
    List<String> shown = names.stream().limit(SHOWN).map(Check::quoted).toList();
    String text = String.join(", ", shown);
    return names.size() > SHOWN
        ? text + " and " + (names.size() - SHOWN) + " more"
        : text.isEmpty() ? "none" : text;
  }

  /** All names, quoted. */
  static String listedInFull(Collection<String> names) {
    return String.join(", ", names.stream().map(Check::quoted).toList());
  }

  static String quoted(@Nullable String name) {
    return name == null ? "null" : "\"" + name + "\"";
  }
}
