package org.kingbolt.core;

import java.util.ArrayList;
import java.util.HashMap;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import org.kingbolt.core.diagram.Composer;
import org.kingbolt.core.diagram.Templates;
import org.kingbolt.core.diagram.WorkMeter;

/** Series, parallel and k-out-of-n:G. */
final class GateStructure extends Structure {

  static final String SERIES = "series";
  static final String PARALLEL = "parallel";
  static final String AT_LEAST = "atLeast";

  private static final long serialVersionUID = 1L;

  private final String kind;
  private final int k;

  private GateStructure(String kind, int k, List<Structure> parts) {
    super(parts, 31 * kind.hashCode() + k);
    this.kind = kind;
    this.k = k;
  }

  /** A gate as a caller describes it. */
  static Structure described(String kind, int k, List<Structure> parts) {
    requireParts(kind, parts);
    if (k < 1 || k > parts.size()) {
      throw new IllegalArgumentException(
          kind
              + ": k is "
              + k
              + " with "
              + parts.size()
              + " parts; it must be from 1 to "
              + parts.size());
    }
    return new GateStructure(kind, k, parts);
  }

  /** At least one part, none a constant, none twice. */
  static void requireParts(String kind, List<Structure> parts) {
    Check.notNull(parts, kind + ": the list of parts");
    if (parts.isEmpty()) {
      throw new IllegalArgumentException(
          kind + ": there are no parts; list at least one component or structure");
    }
    Map<Structure, Integer> places = new HashMap<>();
    for (int i = 0; i < parts.size(); i++) {
      Structure part = Check.notNull(parts.get(i), kind + ": part " + (i + 1));
      requireComponents(kind + ": part " + (i + 1), part);
      Integer before = places.putIfAbsent(part, i + 1);
      if (before != null) {
        throw new IllegalArgumentException(
            kind
                + ": part "
                + (i + 1)
                + " repeats part "
                + before
                + ", "
                + TextWriter.excerpt(part)
                + "; one name is one component wherever it stands, so this adds nothing. Give a"
                + " second unit its own name");
      }
    }
  }

  static void requireComponents(String where, Structure part) {
    if (part instanceof ConstantStructure) {
      throw new NotCoherentException(
          where
              + (part.isAlwaysWorking() ? " always works" : " never works")
              + "; it has no components, so leave it out and adapt the structure around it");
    }
  }

  /** Works while all of the parts work; simplified. */
  static Structure allOf(List<Structure> parts) {
    return parts.isEmpty() ? ConstantStructure.ALWAYS : atLeastOf(parts.size(), parts);
  }

  /** Works while any of the parts works; simplified. */
  static Structure anyOf(List<Structure> parts) {
    return parts.isEmpty() ? ConstantStructure.NEVER : atLeastOf(1, parts);
  }

  /** Works while k of the parts work; parts may be constants or repeat; simplified. */
  static Structure atLeastOf(int k, List<Structure> parts) {
    int needed = k;
    Map<Structure, Long> weights = new LinkedHashMap<>();
    int open = 0;
    for (Structure part : parts) {
      if (part.isAlwaysWorking()) {
        needed--;
      } else if (!part.isNeverWorking()) {
        weights.merge(part, 1L, Long::sum);
        open++;
      }
    }
    List<Structure> distinct = new ArrayList<>(weights.keySet());
    if (needed <= 0) {
      return ConstantStructure.ALWAYS;
    }
    if (needed > open) {
      return ConstantStructure.NEVER;
    }
    if (distinct.size() == 1) {
      return distinct.get(0);
    }
    if (needed == 1) {
      return new GateStructure(PARALLEL, 1, distinct);
    }
    if (needed == open) {
      return new GateStructure(SERIES, distinct.size(), distinct);
    }
    return distinct.size() == open
        ? new GateStructure(AT_LEAST, needed, distinct)
        : CapacityStructure.of(needed, distinct, List.copyOf(weights.values()));
  }

  /** How many parts must work. */
  int k() {
    return k;
  }

  boolean isSeries() {
    return k == parts().size();
  }

  boolean isParallel() {
    return k == 1;
  }

  @Override
  boolean evaluate(boolean[] partWorks) {
    int working = 0;
    for (boolean works : partWorks) {
      working += works ? 1 : 0;
    }
    return working >= k;
  }

  @Override
  Structure rebuild(List<Structure> newParts) {
    return atLeastOf(k, newParts);
  }

  @Override
  Structure dualOver(List<Structure> dualParts) {
    String dualKind =
        switch (kind) {
          case SERIES -> PARALLEL;
          case PARALLEL -> SERIES;
          default -> AT_LEAST;
        };
    return new GateStructure(dualKind, dualParts.size() - k + 1, dualParts);
  }

  @Override
  int express(Composer composer, int[] partExpressions, WorkMeter meter) {
    return composer.operator(Templates.atLeast(k, parts().size()), partExpressions);
  }

  @Override
  void write(TextWriter out) {
    out.token(kind).token("(");
    if (kind.equals(AT_LEAST)) {
      out.token(Integer.toString(k)).token(", ");
    }
    out.list(parts()).token(")");
  }

  @Override
  boolean sameOperator(Structure other) {
    return other instanceof GateStructure that && k == that.k && kind.equals(that.kind);
  }
}
