package org.kingbolt.importance;

import java.util.ArrayList;
import java.util.List;
import java.util.Locale;

/** Rows of cells in aligned columns: one of them to the left, numbers to the right. */
final class PlanTable {

  private final List<List<String>> rows = new ArrayList<>();

  private final int leftColumn;

  PlanTable(int leftColumn) {
    this.leftColumn = leftColumn;
  }

  void row(List<String> cells) {
    rows.add(List.copyOf(cells));
  }

  static String gain(double value) {
    return String.format(Locale.ROOT, "%.4e", value);
  }

  /** A decimal number without an exponent or needless zeros, where that is not too long. */
  static String amount(double value) {
    String text =
        new java.math.BigDecimal(Double.toString(value)).stripTrailingZeros().toPlainString();
    return text.length() <= 15 ? text : Double.toString(value);
  }

  void writeTo(StringBuilder out) {
    int[] widths = new int[rows.stream().mapToInt(List::size).max().orElse(0)];
    for (List<String> row : rows) {
      for (int column = 0; column < row.size(); column++) {
        widths[column] = Math.max(widths[column], length(row.get(column)));
      }
    }
    for (List<String> row : rows) {
      out.append(System.lineSeparator());
      StringBuilder line = new StringBuilder();
      for (int column = 0; column < row.size(); column++) {
        String cell = row.get(column);
        String blanks = " ".repeat(widths[column] - length(cell));
        line.append(column == 0 ? "" : "  ");
        line.append(column == leftColumn ? cell + blanks : blanks + cell);
      }
      out.append(line.toString().stripTrailing());
    }
  }

  private static int length(String cell) {
    return cell.codePointCount(0, cell.length());
  }
}
