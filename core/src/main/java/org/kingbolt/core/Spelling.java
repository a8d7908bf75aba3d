package org.kingbolt.core;

import java.util.Collection;
import java.util.Locale;

/** Finds the known name that a misspelt one is likely to stand for. */
final class Spelling {

  /** Names shorter than this are guessed only where blanks and case alone differ. */
  private static final int SHORT = 3;

  /** From this length on, two slips are taken for a misspelling, below it one. */
  private static final int LONG = 6;

  /** Names longer than this are not guessed at, to keep the search short. */
  private static final int LONGEST = 80;

  private Spelling() {}

  /** A question for a message, or nothing where no known name is near. */
  static String guess(String name, Collection<String> known) {
    String wanted = plain(name);
    String best = "";
    int fewest = Integer.MAX_VALUE;
    for (String candidate : known) {
      String other = plain(candidate);
      int length = Math.min(wanted.length(), other.length());
      int most = length < SHORT || length > LONGEST ? 0 : length < LONG ? 1 : 2;
      int slips = slips(wanted, other, Math.min(most, fewest - 1));
      if (slips < fewest && slips <= most) {
        fewest = slips;
        best = candidate;
      }
    }
    return best.isEmpty() ? "" : " (did you mean " + Check.quoted(best) + "?)";
  }

  private static String plain(String name) {
    return name.strip().toLowerCase(Locale.ROOT);
  }

  /** The least number of letters added, left out, changed or swapped; more than most if more. */
  private static int slips(String left, String right, int most) {
    if (most <= 0 || Math.abs(left.length() - right.length()) > most) {
      return left.equals(right) ? 0 : Integer.MAX_VALUE;
    }
    int[] beforeLast = new int[right.length() + 1];
    int[] last = new int[right.length() + 1];
    int[] row = new int[right.length() + 1];
    for (int j = 0; j <= right.length(); j++) {
      row[j] = j;
    }
    for (int i = 1; i <= left.length(); i++) {
      int[] free = beforeLast;
      beforeLast = last;
      last = row;
      row = free;
      row[0] = i;
      for (int j = 1; j <= right.length(); j++) {
        boolean same = left.charAt(i - 1) == right.charAt(j - 1);
        row[j] = Math.min(last[j - 1] + (same ? 0 : 1), Math.min(last[j], row[j - 1]) + 1);
        boolean swapped =
            i > 1
                && j > 1
                && left.charAt(i - 1) == right.charAt(j - 2)
                && left.charAt(i - 2) == right.charAt(j - 1);
        if (swapped) {
          row[j] = Math.min(row[j], beforeLast[j - 2] + 1);
        }
      }
    }
    return row[right.length()];
  }
}
