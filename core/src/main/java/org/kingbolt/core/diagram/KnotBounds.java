package org.kingbolt.core.diagram;

import java.util.ArrayList;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;

/**
 * Bounds for a knot whose diagram is too large: the expression is taken apart into {@link
 * Conjunctions} of pieces, and each of these is bounded by {@link Chain}; likewise its dual.
 */
final class KnotBounds {

  /** A signed sum has a relative error of so much of the sum of its terms. */
  private static final double ROUNDING = 1e-13;

  /** Ends closer than that, relative to the smaller side, are not brought closer still. */
  private static final double CLOSE = 1e-6;

  /** So many nodes may be evaluated for each node that a diagram may have. */
  private static final long EVALUATIONS = 10_000;

  private final Composer composer;
  private final int root;
  private final long effort;
  private final WorkMeter meter;
  private final Map<Integer, Optional<Piece>> built = new HashMap<>();

  KnotBounds(Composer composer, int root, long effort, WorkMeter meter) {
    this.composer = composer;
    this.root = root;
    this.effort = effort;
    this.meter = meter;
  }

  /** Bounds the probability of the knot. */
  Bracket at(double[] up, double[] down) {
    Bracket bracket = one(false, up, down);
    return isClose(bracket) ? bracket : bracket.and(one(true, down, up).dual());
  }

  private static boolean isClose(Bracket bracket) {
    return bracket.failsAtMost() - bracket.failsAtLeast() <= CLOSE * bracket.failsAtLeast()
        && bracket.worksAtMost() - bracket.worksAtLeast() <= CLOSE * bracket.worksAtLeast();
  }

  private Bracket one(boolean dual, double[] up, double[] down) {
    int mostTerms = (int) Math.max(4, Math.min(1024, effort >> 8));
    Conjunctions lower = new Conjunctions(composer, dual, effort, mostTerms, built, meter);
    Bracket bracket = sum(lower, lower.of(root, true), dual, up, down);
    if (lower.isComplete()) {
      return bracket;
    }
    Conjunctions upper = new Conjunctions(composer, dual, effort, mostTerms, built, meter);
    Bracket above = sum(upper, upper.of(root, false), dual, up, down);
    return new Bracket(
        bracket.worksAtLeast(),
        bracket.failsAtMost(),
        above.worksAtMost(),
        above.failsAtLeast());
  }

  /** The signed sum, each term at the end that counts. */
  private Bracket sum(
      Conjunctions conjunctions,
      List<Conjunctions.Term> terms,
      boolean dual,
      double[] up,
      double[] down) {
    double worksAtLeast = 0;
    double failsAtMost = 0;
    double worksAtMost = 0;
    double failsAtLeast = 0;
    double worksTerms = 0;
    double failsTerms = 0;
    long allowance = EVALUATIONS * effort / Math.max(1, terms.size());
    for (Conjunctions.Term term : terms) {
      Bracket bracket = conjunction(conjunctions, term.factors(), dual, up, down, allowance);
      double c = term.coefficient();
      worksAtLeast += c * (c > 0 ? bracket.worksAtLeast() : bracket.worksAtMost());
      worksAtMost += c * (c > 0 ? bracket.worksAtMost() : bracket.worksAtLeast());
      failsAtLeast += c * (c > 0 ? bracket.failsAtLeast() : bracket.failsAtMost());
      failsAtMost += c * (c > 0 ? bracket.failsAtMost() : bracket.failsAtLeast());
      worksTerms += Math.abs(c) * bracket.worksAtMost();
      failsTerms += Math.abs(c) * bracket.failsAtMost();
    }
    if (terms.isEmpty()) {
      return Bracket.exact(0, 1);
    }
    double worksSlack = terms.size() == 1 ? 0 : ROUNDING * worksTerms;
    double failsSlack = terms.size() == 1 ? 0 : ROUNDING * failsTerms;
    return new Bracket(
        Math.max(0, worksAtLeast - worksSlack),
        Math.min(1, failsAtMost + failsSlack),
        Math.min(1, worksAtMost + worksSlack),
        Math.max(0, failsAtLeast - failsSlack));
  }

  private Bracket conjunction(
      Conjunctions conjunctions, int[] factors, boolean dual, double[] up, double[] down, long allowance) {
    double[] restUp = up.clone();
    double[] restDown = down.clone();
    double works = 1;
    double fails = 0;
    List<Piece> pieces = new ArrayList<>();
    for (int factor : factors) {
      if (composer.isLeaf(factor)) {
        // all that counts is what happens while it works
        int variable = composer.variableOf(factor);
        fails += works * down[variable];
        works *= up[variable];
        restUp[variable] = 1;
        restDown[variable] = 0;
      } else {
        Piece piece = conjunctions.piece(factor);
        pieces.add(dual ? piece.dual() : piece);
      }
    }
    Ensemble ensemble = new Ensemble(pieces.toArray(new Piece[0]), restUp, restDown, meter);
    Bracket rest = Chain.of(ensemble, allowance);
    return new Bracket(
        works * rest.worksAtLeast(),
        fails + works * rest.failsAtMost(),
        works * rest.worksAtMost(),
        fails + works * rest.failsAtLeast());
  }
}
