package org.kingbolt.core;

import java.util.ArrayList;
import java.util.BitSet;
import java.util.HashSet;
import java.util.LinkedHashSet;
import java.util.List;
import java.util.Optional;
import java.util.Set;
import java.util.stream.IntStream;
import org.kingbolt.core.diagram.Composer;
import org.kingbolt.core.diagram.Operator;
import org.kingbolt.core.diagram.RouteFinder;
import org.kingbolt.core.diagram.Routes;
import org.kingbolt.core.diagram.Templates;
import org.kingbolt.core.diagram.WorkMeter;

/**
 * Consecutive-k-out-of-n:F, in a line or around a circle, and its dual, consecutive-k-out-of-n:G,
 * which works while k neighbours work.
 */
final class RunStructure extends Structure {

  static final String LINE = "withoutFailureRun";
  static final String CIRCLE = "withoutFailureRunAround";

  private static final long serialVersionUID = 1L;

  private final int k;
  private final boolean around;
  private final boolean dual;

  private RunStructure(int k, List<Structure> parts, boolean around, boolean dual) {
    super(parts, 4 * k + (around ? 2 : 0) + (dual ? 1 : 0));
    this.k = k;
    this.around = around;
    this.dual = dual;
  }

  static Structure described(int k, List<Structure> parts, boolean around) {
    String kind = around ? CIRCLE : LINE;
    GateStructure.requireParts(kind, parts);
    if (k < 1 || k > parts.size()) {
      throw new IllegalArgumentException(
          kind
              + ": the run is "
              + k
              + " with "
              + parts.size()
              + " parts; it must be from 1 to "
              + parts.size());
    }
    return new RunStructure(k, parts, around, false);
  }

  @Override
  boolean evaluate(boolean[] partWorks) {
    int n = partWorks.length;
    int length = 0;
    for (int i = 0; i < (around ? n + k - 1 : n); i++) {
      length = partWorks[i % n] == dual ? length + 1 : 0;
      if (length == k) {
        return dual;
      }
    }
    return !dual;
  }

  @Override
  Structure rebuild(List<Structure> newParts) {
    Structure breaker = ConstantStructure.of(!dual);
    Structure carrier = ConstantStructure.of(dual);
    if (newParts.contains(carrier) || new HashSet<>(newParts).size() < newParts.size()) {
      return newParts.contains(carrier) || !newParts.contains(breaker)
          ? FamilyStructure.of(dual, newParts, windows())
          : pieces(newParts, breaker);
    }
    return newParts.contains(breaker)
        ? pieces(newParts, breaker)
        : new RunStructure(k, newParts, around, dual);
  }

  /** The lines between parts that break every run. */
  private Structure pieces(List<Structure> newParts, Structure breaker) {
    int n = newParts.size();
    int start = around ? newParts.indexOf(breaker) : 0;
    List<Structure> pieces = new ArrayList<>();
    List<Structure> piece = new ArrayList<>();
    for (int i = 0; i <= n; i++) {
      Structure part = i < n ? newParts.get((start + i) % n) : breaker;
      if (!part.equals(breaker)) {
        piece.add(part);
      } else {
        if (piece.size() >= k) {
          pieces.add(line(piece));
        }
        piece = new ArrayList<>();
      }
    }
    return dual ? GateStructure.anyOf(pieces) : GateStructure.allOf(pieces);
  }

  /** A line without constants. */
  private Structure line(List<Structure> piece) {
    if (piece.size() == k || k == 1) {
      return dual == (k > 1) ? GateStructure.allOf(piece) : GateStructure.anyOf(piece);
    }
    RunStructure line = new RunStructure(k, piece, false, dual);
    return new HashSet<>(piece).size() < piece.size()
        ? FamilyStructure.of(dual, piece, line.windows())
        : line;
  }

  /** The runs of k neighbours, as sets of slots. */
  private List<BitSet> windows() {
    int n = parts().size();
    Set<BitSet> windows = new LinkedHashSet<>();
    for (int i = 0; i < (around ? n : n - k + 1); i++) {
      BitSet window = new BitSet(n);
      for (int j = 0; j < k; j++) {
        window.set((i + j) % n);
      }
      windows.add(window);
    }
    return List.copyOf(windows);
  }

  @Override
  Structure dualOver(List<Structure> dualParts) {
    return new RunStructure(k, dualParts, around, !dual);
  }

  @Override
  List<RouteFinder> routes() {
    return dual ? List.of(Routes.listed(runs())) : super.routes();
  }

  @Override
  Optional<List<int[]>> slotCuts() {
    return dual ? Optional.empty() : Optional.of(runs());
  }

  /** The runs of k neighbours, each once, their slots in increasing order. */
  private List<int[]> runs() {
    int n = parts().size();
    List<int[]> runs = new ArrayList<>();
    for (int i = 0; i < (around && k < n ? n : n - k + 1); i++) {
      int start = i;
      runs.add(IntStream.range(0, k).map(j -> (start + j) % n).sorted().toArray());
    }
    return runs;
  }

  @Override
  int express(Composer composer, int[] partExpressions, WorkMeter meter) {
    Operator operator = Templates.withoutFailureRun(k, parts().size(), around);
    return composer.operator(dual ? Templates.dual(operator) : operator, partExpressions);
  }

  @Override
  void write(TextWriter out) {
    if (dual) {
      out.dualOf(this);
      return;
    }
    out.token(around ? CIRCLE : LINE).token("(").token(Integer.toString(k)).token(", ");
    out.list(parts()).token(")");
  }

  @Override
  boolean sameOperator(Structure other) {
    return other instanceof RunStructure that
        && k == that.k
        && around == that.around
        && dual == that.dual;
  }
}
