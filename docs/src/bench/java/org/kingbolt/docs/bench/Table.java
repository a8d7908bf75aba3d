package org.kingbolt.docs.bench;

import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import java.util.stream.IntStream;

/** A table in Markdown with aligned columns, the first one to the left. */
final class Table {

  private static final String[] UNITS = {"ns", "µs", "ms", "s"};

  private final List<List<String>> rows = new ArrayList<>();

  Table(String... head) {
    rows.add(List.of(head));
  }

  void add(List<String> start, String... rest) {
    List<String> row = new ArrayList<>(start);
    row.addAll(List.of(rest));
    rows.add(row);
  }

  /** Three digits and a unit. */
  static String time(double nanos) {
    int unit = 0;
    double value = nanos;
    while (value >= 999.5 && unit < UNITS.length - 1) {
      value /= 1000;
      unit++;
    }
    return threeDigits(value) + " " + UNITS[unit];
  }

  static String ratio(double value) {
    return threeDigits(value);
  }

  private static String threeDigits(double value) {
    int decimals = value < 0.9995 ? 3 : value < 9.995 ? 2 : value < 99.95 ? 1 : 0;
    return String.format(Locale.ROOT, "%." + decimals + "f", value);
  }

  /** A whole number in groups of three digits, any other one in six digits. */
  static String number(double value) {
    return String.format(Locale.ROOT, value == Math.rint(value) ? "%,.0f" : "%.6g", value);
  }

  @Override
  public String toString() {
    int columns = rows.get(0).size();
    int[] widths =
        IntStream.range(0, columns)
            .map(c -> rows.stream().mapToInt(row -> row.get(c).length()).max().orElse(0))
            .toArray();
    StringBuilder text = new StringBuilder();
    for (int r = 0; r < rows.size(); r++) {
      for (int c = 0; c < columns; c++) {
        String format = "| %" + (c == 0 ? "-" : "") + widths[c] + "s ";
        text.append(String.format(Locale.ROOT, format, rows.get(r).get(c)));
      }
      text.append("|\n");
      if (r == 0) {
        text.append("| ").append("-".repeat(widths[0])).append(" |");
        for (int c = 1; c < columns; c++) {
          text.append(' ').append("-".repeat(widths[c] - 1)).append(": |");
        }
        text.append('\n');
      }
    }
    return text.toString();
  }
}
