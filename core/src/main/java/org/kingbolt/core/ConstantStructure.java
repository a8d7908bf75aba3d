package org.kingbolt.core;

import java.util.List;
import org.kingbolt.core.diagram.Composer;
import org.kingbolt.core.diagram.Templates;
import org.kingbolt.core.diagram.WorkMeter;

/** A structure without components: what conditioning leaves when nothing else matters any more. */
final class ConstantStructure extends Structure {

  static final ConstantStructure ALWAYS = new ConstantStructure(true);
  static final ConstantStructure NEVER = new ConstantStructure(false);

  private static final long serialVersionUID = 1L;

  private final boolean works;

  private ConstantStructure(boolean works) {
    super(List.of(), works ? 1 : 0);
    this.works = works;
  }

  static ConstantStructure of(boolean works) {
    return works ? ALWAYS : NEVER;
  }

  @Override
  boolean evaluate(boolean[] partWorks) {
    return works;
  }

  @Override
  Structure rebuild(List<Structure> newParts) {
    return this;
  }

  @Override
  Structure dualOver(List<Structure> dualParts) {
    return of(!works);
  }

  @Override
  int express(Composer composer, int[] partExpressions, WorkMeter meter) {
    return composer.operator(Templates.constant(works), partExpressions);
  }

  @Override
  void write(TextWriter out) {
    out.token(works ? "always()" : "never()");
  }

  @Override
  boolean sameOperator(Structure other) {
    return other instanceof ConstantStructure that && works == that.works;
  }
}
