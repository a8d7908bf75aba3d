package org.kingbolt.core;

import java.util.List;
import org.kingbolt.core.diagram.Composer;
import org.kingbolt.core.diagram.WorkMeter;

/** One component. */
final class ComponentStructure extends Structure {

  private static final long serialVersionUID = 1L;

  private final String name;

  ComponentStructure(String name) {
    super(List.of(), name.hashCode());
    this.name = name;
  }

  String name() {
    return name;
  }

  @Override
  boolean evaluate(boolean[] partWorks) {
    throw new AssertionError("a component has no parts");
  }

  @Override
  Structure rebuild(List<Structure> newParts) {
    return this;
  }

  @Override
  Structure dualOver(List<Structure> dualParts) {
    return this;
  }

  @Override
  int express(Composer composer, int[] partExpressions, WorkMeter meter) {
    throw new AssertionError("a component is a leaf");
  }

  @Override
  void write(TextWriter out) {
    out.name(name);
  }

  @Override
  boolean sameOperator(Structure other) {
    return other instanceof ComponentStructure that && name.equals(that.name);
  }
}
