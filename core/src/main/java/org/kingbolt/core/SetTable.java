package org.kingbolt.core;

import java.math.BigInteger;
import java.util.ArrayList;
import java.util.List;
import java.util.Locale;

/** Minimal sets as lines of text. */
final class SetTable {

  private static final List<String> HEAD = List.of("size", "components", "probability", "share");

  private SetTable() {}

  static String of(List<MinimalSets.Row> rows, BigInteger count) {
    List<List<String>> lines = new ArrayList<>(List.of(HEAD));
    for (MinimalSets.Row row : rows) {
      lines.add(
          List.of(
              Integer.toString(row.size()),
              String.join(", ", row.set()),
              String.format(Locale.ROOT, "%.4e", row.probability()),
              String.format(Locale.ROOT, "%.2f%%", 100 * row.share())));
    }
    int[] widths = new int[HEAD.size()];
    for (List<String> line : lines) {
      for (int i = 0; i < widths.length; i++) {
        widths[i] = Math.max(widths[i], width(line.get(i)));
      }
    }
    StringBuilder text = new StringBuilder();
    for (List<String> line : lines) {
      StringBuilder out = new StringBuilder();
      for (int i = 0; i < widths.length; i++) {
        String pad = " ".repeat(widths[i] - width(line.get(i)));
        boolean left = i == 1;
        out.append(i == 0 ? "" : "  ").append(left ? line.get(i) + pad : pad + line.get(i));
      }
      text.append(out).append('\n');
    }
    BigInteger more = count.subtract(BigInteger.valueOf(rows.size()));
    if (more.signum() > 0) {
      text.append("and ").append(more).append(" more\n");
    }
    return text.toString();
  }

  private static int width(String text) {
    return text.codePoints().map(SetTable::columns).sum();
  }

  /** As in wcwidth of POSIX: marks take no column of a terminal, East Asian signs take two. */
  private static int columns(int codePoint) {
    return switch (Character.getType(codePoint)) {
      case Character.NON_SPACING_MARK, Character.ENCLOSING_MARK, Character.FORMAT -> 0;
      default -> isWide(codePoint) ? 2 : 1;
    };
  }

  private static boolean isWide(int at) {
    return (at >= 0x1100 && at <= 0x115f)
        || (at >= 0x2e80 && at <= 0xa4cf)
        || (at >= 0xac00 && at <= 0xd7a3)
        || (at >= 0xf900 && at <= 0xfaff)
        || (at >= 0xff00 && at <= 0xff60)
        || (at >= 0xffe0 && at <= 0xffe6)
        || (at >= 0x1f300 && at <= 0x1faff)
        || (at >= 0x20000 && at <= 0x3fffd);
  }
}
