package org.kingbolt.core.diagram;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.Collection;
import java.util.Iterator;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;

/**
 * An expression as a signed sum of conjunctions of pieces that are small enough to be built: the
 * probability of working is the sum of coefficients times the probabilities that all pieces of a
 * conjunction work. The coefficients add up to 1, so that the same holds for failing.
 *
 * <p>Series gates are taken apart. A gate of which k parts must work, and which is too large to be
 * built, is the sum over the sets S of k parts or more of (-1)<sup>|S|-k</sup> C(|S|-1, k-1) times
 * the conjunction of S. Where that makes too many conjunctions, and for other operators that are
 * too large, something simpler takes the operator's place, on one side: the conjunction of one of
 * its path sets, which works less often, or nothing at all.
 */
final class Conjunctions {

  /** Marks what never works; as a factor it takes the whole conjunction away. */
  private static final int NEVER = -1;

  /** So many parts of a gate are taken apart at most. */
  private static final int MOST_PARTS = 12;

  /** So many large operators in one conjunction may be tried once more. */
  private static final int FEW = 3;

  private static final int MOST_ATTEMPTS = 16;

  /** What a part that is too large adds to the length of a path; a leaf adds 1. */
  private static final double FAR = 1e6;

  private static final long FEWEST_TERMS = 4;
  private static final long MOST_TERMS = 1024;

  /** One of them. */
  static final class Term {
    private final double coefficient;
    private final int[] factors;

    Term(double coefficient, int[] factors) {
      this.coefficient = coefficient;
      this.factors = factors;
    }

    double coefficient() {
      return coefficient;
    }

    /** Expressions in increasing order: leaves, and operators that have been built. */
    int[] factors() {
      return factors;
    }
  }

  private record Key(List<Integer> factors) {}

  private final Composer composer;
  private final boolean dual;
  private final long effort;
  private final WorkMeter meter;
  private final int mostTerms;
  private final Map<Integer, Optional<Piece>> built;
  private final IntSet given = new IntSet();

  /** Whether the terms are the expression, or else only an approximation from one side. */
  private boolean complete = true;

  /**
   * Prepares the work.
   *
   * @param dual whether the dual of the expression is meant
   * @param effort how many nodes a piece may take to build
   * @param built the pieces known so far, by expression; not dual, even where they are meant to be
   */
  Conjunctions(
      Composer composer,
      boolean dual,
      long effort,
      Map<Integer, Optional<Piece>> built,
      WorkMeter meter) {
    this.composer = composer;
    this.dual = dual;
    this.effort = effort;
    this.mostTerms = (int) Math.max(FEWEST_TERMS, Math.min(MOST_TERMS, effort >> 8));
    this.built = built;
    this.meter = meter;
  }

  boolean isComplete() {
    return complete;
  }

  /** The piece of an operator that has been built. */
  Piece piece(int expression) {
    return trial(expression).orElseThrow();
  }

  /** Whether an operator is small enough to be built, which is tried once. */
  boolean isBuilt(int expression) {
    return trial(expression).isPresent();
  }

  private Optional<Piece> trial(int expression) {
    Optional<Piece> known = built.get(expression);
    if (known == null) {
      known = build(expression);
      built.put(expression, known);
    }
    return known;
  }

  private Optional<Piece> build(int expression) {
    try {
      return Optional.of(Piece.of(composer, expression, new Cap(meter, effort)));
    } catch (Cap.Reached reached) {
      return Optional.empty();
    }
  }

  /**
   * Takes an expression apart.
   *
   * @param lower whether to approximate from below, where it must be
   */
  List<Term> of(int root, boolean lower) {
    for (int attempt = 0; ; attempt++) {
      // in the end, nothing that is too large is taken apart
      List<Term> done = new ArrayList<>();
      if (attempt(root, lower, attempt < MOST_ATTEMPTS, done)) {
        return merged(done);
      }
    }
  }

  /** False if some operator has had to be given up after others have been taken apart. */
  private boolean attempt(int root, boolean lower, boolean apart, List<Term> done) {
    Map<Key, Term> open = new LinkedHashMap<>();
    put(open, 1, new int[] {root});
    while (!open.isEmpty()) {
      Iterator<Term> first = open.values().iterator();
      Term term = first.next();
      first.remove();
      int large = flatten(term, lower, apart, open, done);
      if (large < 0) {
        continue;
      }
      int[] rest = Arrays.stream(term.factors).filter(factor -> factor != large).toArray();
      if (!takeApart(large, rest, term.coefficient, open, mostTerms - done.size())) {
        giveUp(large, rest);
        return false;
      }
    }
    return true;
  }

  /** One operator, and all but a few of those that it stands together with. */
  private void giveUp(int large, int[] rest) {
    given.add(large);
    int others = 0;
    for (int factor : rest) {
      if (!composer.isLeaf(factor) && !isBuilt(factor) && ++others > FEW) {
        given.add(factor);
      }
    }
  }

  /**
   * Takes series gates apart and simplifies what has been given up.
   *
   * @return an operator that is still too large, for which the term stands; or -1 if the term has
   *     been dealt with
   */
  private int flatten(
      Term term, boolean lower, boolean apart, Map<Key, Term> open, List<Term> done) {
    IntSet kept = new IntSet();
    IntSet seen = new IntSet();
    for (int factor : term.factors) {
      seen.add(factor);
    }
    boolean changed = false;
    for (int next = 0; next < seen.size(); next++) {
      meter.at(seen.size());
      int factor = seen.get(next);
      if (composer.isLeaf(factor)) {
        kept.add(factor);
      } else if (isAll(factor)) {
        changed = true;
        for (int level = composer.levels(factor) - 1; level >= 0; level--) {
          seen.add(composer.partAt(factor, level));
        }
      } else if (given.contains(factor) || (!apart && !isBuilt(factor))) {
        changed = true;
        complete = false;
        for (int part : lower ? path(factor) : new int[0]) {
          if (part == NEVER) {
            return NEVER;
          }
          seen.add(part);
        }
      } else {
        kept.add(factor);
      }
    }
    int[] factors = kept.sorted();
    if (changed) {
      put(open, term.coefficient, factors);
      return NEVER;
    }
    for (int factor : factors) {
      if (!composer.isLeaf(factor) && !isBuilt(factor)) {
        return factor;
      }
    }
    done.add(new Term(term.coefficient, factors));
    return NEVER;
  }

  /** Whether an operator works while all of its parts do. */
  boolean isAll(int expression) {
    return composer.operatorOf(expression) instanceof Threshold
        && needed(expression) == composer.slots(expression);
  }

  /** The parts of a conjunction of any depth, or else the expression itself. */
  int[] parts(int expression) {
    IntSet seen = new IntSet();
    IntSet parts = new IntSet();
    seen.add(expression);
    for (int next = 0; next < seen.size(); next++) {
      int at = seen.get(next);
      if (composer.isLeaf(at) || !isAll(at)) {
        parts.add(at);
        continue;
      }
      for (int level = composer.levels(at) - 1; level >= 0; level--) {
        seen.add(composer.partAt(at, level));
      }
    }
    return parts.sorted();
  }

  /** How many parts of a gate must work, in the dual if that is meant. */
  private int needed(int gate) {
    int k = ((Threshold) composer.operatorOf(gate)).needed();
    return dual ? composer.slots(gate) - k + 1 : k;
  }

  /** Puts the sum for a gate in its place; false if that cannot be done. */
  private boolean takeApart(
      int large, int[] rest, double coefficient, Map<Key, Term> open, int left) {
    int slots = composer.slots(large);
    if (!(composer.operatorOf(large) instanceof Threshold) || slots > MOST_PARTS) {
      return false;
    }
    int k = needed(large);
    int[] parts = composer.parts(large);
    for (int set = 1; set < 1 << slots; set++) {
      int size = Integer.bitCount(set);
      if (size < k) {
        continue;
      }
      double sign = (size - k) % 2 == 0 ? 1 : -1;
      IntSet factors = new IntSet();
      for (int factor : rest) {
        factors.add(factor);
      }
      for (int slot = 0; slot < slots; slot++) {
        if ((set >>> slot & 1) != 0) {
          factors.add(parts[slot]);
        }
      }
      put(open, coefficient * sign * choose(size - 1, k - 1), factors.sorted());
      if (open.size() > left) {
        return false;
      }
    }
    return true;
  }

  private static double choose(int n, int k) {
    double result = 1;
    for (int i = 1; i <= k; i++) {
      result = result * (n - k + i) / i;
    }
    return result;
  }

  private static void put(Map<Key, Term> terms, double coefficient, int[] factors) {
    Key key = new Key(Arrays.stream(factors).boxed().toList());
    terms.merge(
        key,
        new Term(coefficient, factors),
        (one, other) -> new Term(one.coefficient + other.coefficient, factors));
  }

  private static List<Term> merged(Collection<Term> terms) {
    Map<Key, Term> merged = new LinkedHashMap<>();
    for (Term term : terms) {
      put(merged, term.coefficient, term.factors);
    }
    return merged.values().stream().filter(term -> term.coefficient != 0).toList();
  }

  /** The parts along the shortest way to where the operator works; leaves counting least. */
  private int[] path(int operator) {
    Diagram template;
    try {
      template = composer.operatorOf(operator).template(new Cap(meter, effort));
    } catch (Cap.Reached reached) {
      return new int[] {NEVER};
    }
    double[] cost = new double[template.size()];
    cost[dual ? Diagram.WORKS : Diagram.FAILS] = Double.POSITIVE_INFINITY;
    for (int level = template.levels() - 1; level >= 0; level--) {
      int part = composer.partAt(operator, level);
      double one = composer.isLeaf(part) ? 1 : isBuilt(part) ? 2 : FAR;
      for (int id = template.from(level); id < template.to(level); id++) {
        cost[id] = Math.min(cost[taken(template, id)] + one, cost[passed(template, id)]);
      }
    }
    int id = template.root();
    if (cost[id] == Double.POSITIVE_INFINITY) {
      return new int[] {NEVER};
    }
    IntSet path = new IntSet();
    while (id >= 2) {
      int passed = passed(template, id);
      if (cost[passed] > cost[id]) {
        path.add(composer.partAt(operator, template.levelOf(id)));
        id = taken(template, id);
      } else {
        id = passed;
      }
    }
    return path.toArray();
  }

  private int passed(Diagram template, int id) {
    return dual ? template.high(id) : template.low(id);
  }

  private int taken(Diagram template, int id) {
    return dual ? template.low(id) : template.high(id);
  }
}
