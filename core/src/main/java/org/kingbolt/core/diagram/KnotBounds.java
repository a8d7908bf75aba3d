package org.kingbolt.core.diagram;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;

/**
 * Bounds for a knot whose diagram is too large: the expression is a function of pieces that are
 * small enough to be built. It is bounded by {@link FirstFailures}, and as a sum of {@link
 * Conjunctions}, each of which is bounded by {@link Chain}; where both leave much open, so is its
 * dual. All of these are right, so that the closest ends count.
 */
final class KnotBounds {

  /** A signed sum has a relative error of so much of the sum of its terms. */
  private static final double ROUNDING = 1e-13;

  /** Ends closer than that, relative to the smaller side, are not brought closer still. */
  private static final double CLOSE = 1e-6;

  /** Ends farther apart than that are worth approximations. */
  private static final double FAR = 0.1;

  /** So many nodes may be evaluated for each node that a diagram may have. */
  private static final long EVALUATIONS = 10_000;

  /** So many beginnings of paths may be kept for each node that a diagram may have. */
  private static final long PATHS = 48;

  private static final long MOST_EFFORT = 1L << 40;
  private static final long MOST_PATHS = 1L << 30;

  private static final Bracket UNKNOWN = new Bracket(0, 1, 1, 0);

  private final Composer composer;
  private final int root;
  private final long effort;
  private final WorkMeter meter;
  private final Map<Integer, Optional<Piece>> built = new HashMap<>();

  KnotBounds(Composer composer, int root, long effort, WorkMeter meter) {
    this.composer = composer;
    this.root = root;
    this.effort = Math.min(MOST_EFFORT, effort);
    this.meter = meter;
  }

  /** Bounds the probability of the knot. */
  Bracket at(double[] up, double[] down) {
    Bracket bracket = side(false, up, down);
    return isWithin(FAR, bracket) ? bracket : bracket.and(side(true, down, up).dual());
  }

  private static boolean isWithin(double gap, Bracket bracket) {
    return bracket.failsAtMost() - bracket.failsAtLeast() <= gap * bracket.failsAtLeast()
        && bracket.worksAtMost() - bracket.worksAtLeast() <= gap * bracket.worksAtLeast();
  }

  /** Bounds for the expression or its dual, at the variables of the same. */
  private Bracket side(boolean dual, double[] up, double[] down) {
    Bracket bracket = paths(dual, up, down);
    if (isWithin(CLOSE, bracket)) {
      return bracket;
    }
    Conjunctions lower = conjunctions(dual);
    List<Conjunctions.Term> terms = lower.of(root, true);
    if (lower.isComplete()) {
      return bracket.and(sum(lower, terms, dual, up, down));
    }
    if (isWithin(FAR, bracket)) {
      return bracket;
    }
    Conjunctions upper = conjunctions(dual);
    Bracket below = sum(lower, terms, dual, up, down);
    Bracket above = sum(upper, upper.of(root, false), dual, up, down);
    return bracket.and(
        new Bracket(
            below.worksAtLeast(), below.failsAtMost(), above.worksAtMost(), above.failsAtLeast()));
  }

  private Conjunctions conjunctions(boolean dual) {
    return new Conjunctions(composer, dual, effort, built, meter);
  }

  /** By ways to fail. */
  private Bracket paths(boolean dual, double[] up, double[] down) {
    Conjunctions conjunctions = conjunctions(dual);
    PieceFunction function =
        new PieceFunction(
            composer,
            root,
            expression -> !conjunctions.isAll(expression) && conjunctions.isBuilt(expression));
    double[] ones = new double[function.pieces.length];
    Arrays.fill(ones, 1);
    Piece[] pieces = new Piece[ones.length];
    Diagram diagram;
    try {
      Cap cap = new Cap(meter, effort);
      diagram = OrderSearch.smallest(function.composer, function.root, ones, cap);
      for (int i = 0; i < pieces.length; i++) {
        int expression = function.pieces[i];
        Piece piece =
            composer.isLeaf(expression)
                ? Piece.of(composer, expression, cap)
                : conjunctions.piece(expression);
        pieces[i] = dual ? piece.dual() : piece;
      }
    } catch (Cap.Reached reached) {
      return UNKNOWN;
    }
    Singles singles = new Singles(conjunctions.parts(root), up, down);
    FirstFailures failures =
        FirstFailures.of(
            dual ? Templates.dual(diagram) : diagram,
            new Ensemble(pieces, singles.up, singles.down, meter),
            (int) Math.min(MOST_PATHS, PATHS * effort),
            EVALUATIONS * effort,
            meter);
    double most = Math.min(1, failures.failsAtMost);
    double least = Math.min(1, failures.failsAtLeast);
    return singles.with(
        new Bracket(
            Math.max(0, 1 - most * (1 + ROUNDING)),
            most,
            Math.min(1, 1 - least * (1 - ROUNDING)),
            least));
  }

  /** The signed sum, each term at the end that counts. */
  private Bracket sum(
      Conjunctions conjunctions,
      List<Conjunctions.Term> terms,
      boolean dual,
      double[] up,
      double[] down) {
    if (terms.isEmpty()) {
      return Bracket.exact(0, 1);
    }
    double worksAtLeast = 0;
    double failsAtMost = 0;
    double worksAtMost = 0;
    double failsAtLeast = 0;
    double worksTerms = 0;
    double failsTerms = 0;
    long allowance = EVALUATIONS * effort / terms.size();
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
    // differences may cancel: what rounding has added to them counts on the safe side
    double worksSlack = terms.size() == 1 ? 0 : ROUNDING * worksTerms;
    double failsSlack = terms.size() == 1 ? 0 : ROUNDING * failsTerms;
    return new Bracket(
        Math.max(0, worksAtLeast - worksSlack),
        Math.min(1, failsAtMost + failsSlack),
        Math.min(1, worksAtMost + worksSlack),
        Math.max(0, failsAtLeast - failsSlack));
  }

  private Bracket conjunction(
      Conjunctions conjunctions,
      int[] factors,
      boolean dual,
      double[] up,
      double[] down,
      long allowance) {
    Singles singles = new Singles(factors, up, down);
    List<Piece> pieces = new ArrayList<>();
    for (int factor : factors) {
      if (!composer.isLeaf(factor)) {
        Piece piece = conjunctions.piece(factor);
        pieces.add(dual ? piece.dual() : piece);
      }
    }
    Piece[] all = pieces.toArray(new Piece[0]);
    return singles.with(Chain.of(new Ensemble(all, singles.up, singles.down, meter), allowance));
  }

  /** The leaves of a conjunction: all that counts besides is what happens while they work. */
  private final class Singles {

    /** Both vectors, given that the leaves work. */
    final double[] up;

    final double[] down;

    private double works = 1;
    private double fails;

    Singles(int[] factors, double[] up, double[] down) {
      this.up = up.clone();
      this.down = down.clone();
      for (int factor : factors) {
        if (composer.isLeaf(factor)) {
          int variable = composer.variableOf(factor);
          fails += works * down[variable];
          works *= up[variable];
          this.up[variable] = 1;
          this.down[variable] = 0;
        }
      }
    }

    /** The whole conjunction, the rest being known while the leaves work. */
    Bracket with(Bracket rest) {
      return new Bracket(
          works * rest.worksAtLeast(),
          fails + works * rest.failsAtMost(),
          works * rest.worksAtMost(),
          fails + works * rest.failsAtLeast());
    }
  }
}
