package org.kingbolt.core.diagram;

import java.util.Arrays;
import java.util.function.IntPredicate;

/** An expression as a function of its pieces: leaves, and operators that are taken as a whole. */
final class PieceFunction {

  final Composer composer = new Composer(0);
  final int root;

  /** The expressions of the pieces, which are numbered in this order. */
  final int[] pieces;

  /**
   * Copies what is above the pieces.
   *
   * @param isPiece asked once about each operator met
   */
  PieceFunction(Composer whole, int expression, IntPredicate isPiece) {
    IntSet found = new IntSet();
    IntSet cut = new IntSet();
    found.add(expression);
    for (int next = 0; next < found.size(); next++) {
      int from = found.get(next);
      if (whole.isLeaf(from) || isPiece.test(from)) {
        cut.add(from);
        continue;
      }
      for (int level = 0; level < whole.levels(from); level++) {
        found.add(whole.partAt(from, level));
      }
    }
    int[] all = found.sorted();
    this.pieces = cut.sorted();
    for (int i = 0; i < all.length; i++) {
      int place = Arrays.binarySearch(pieces, all[i]);
      if (place >= 0) {
        composer.variable(place);
        continue;
      }
      int[] parts = whole.parts(all[i]);
      for (int slot = 0; slot < parts.length; slot++) {
        // slots that are never read may hold anything
        parts[slot] = Math.max(0, Arrays.binarySearch(all, 0, i, parts[slot]));
      }
      composer.operator(whole.operatorOf(all[i]), parts);
    }
    this.root = all.length - 1;
  }
}
