package org.kingbolt.importance;

import java.util.Collection;
import java.util.Objects;
import java.util.function.Supplier;
import java.util.stream.Collectors;

/** The argument checks of improvement plans and their messages. */
final class PlanCheck {

  /** How many names a message lists. */
  private static final int SHOWN = 12;

  private PlanCheck() {}

  static <T> T notNull(T value, String what) {
    return Objects.requireNonNull(value, () -> what + " is null; it must be given");
  }

  /** A name with something to see in it. */
  static String name(String name, String what) {
    notNull(name, what);
    if (name.isBlank()) {
      throw new IllegalArgumentException(
          what + " is \"" + name + "\"; it must have at least one visible character");
    }
    return name;
  }

  /** A cost or a limit: a finite number, 0 or more. */
  static double amount(double value, String what) {
    if (!(value >= 0 && value < Double.POSITIVE_INFINITY)) {
      throw new IllegalArgumentException(what + " is " + value + "; it must be a number from 0 up");
    }
    return value + 0.0;
  }

  /** Says where a bad value stood. */
  static <T> T naming(String where, Supplier<T> make) {
    try {
      return make.get();
    } catch (IllegalArgumentException bad) {
      throw new IllegalArgumentException(where + ": " + bad.getMessage(), bad);
    }
  }

  /** The first few names, quoted, and how many more there are. */
  static String listed(Collection<String> names) {
    String shown =
        names.stream().limit(SHOWN).map(PlanCheck::quoted).collect(Collectors.joining(", "));
    int more = names.size() - SHOWN;
    return names.isEmpty() ? "none" : more > 0 ? shown + " and " + more + " more" : shown;
  }

  static String quoted(String name) {
    return "\"" + name + "\"";
  }
}
