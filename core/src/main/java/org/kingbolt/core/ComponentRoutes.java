package org.kingbolt.core;

import java.util.Arrays;
import java.util.List;
import java.util.function.Predicate;
import org.kingbolt.core.diagram.RouteFinder;
import org.kingbolt.core.diagram.Routes;
import org.kingbolt.core.diagram.WorkMeter;

/** Path sets over the components of an operator whose parts share some. */
final class ComponentRoutes {

  private ComponentRoutes() {}

  static List<RouteFinder> of(Numbering inner, WorkMeter meter) {
    int root = inner.size() - 1;
    Structure structure = inner.structure(root);
    int[] componentOf = new int[inner.size()];
    int components = 0;
    componentOf[root] = -1;
    for (int number = 0; number < root; number++) {
      boolean component = inner.structure(number) instanceof ComponentStructure;
      componentOf[number] = component ? components++ : -1;
    }
    int[] variable = new int[structure.parts().size()];
    Arrays.setAll(variable, slot -> componentOf[inner.part(root, slot)]);
    if (Arrays.stream(variable).allMatch(v -> v >= 0)) {
      return structure.routes().stream().map(finder -> Routes.joined(finder, variable)).toList();
    }
    return List.of(Routes.asked(components, function(inner, componentOf, meter)));
  }

  private static Predicate<boolean[]> function(
      Numbering inner, int[] componentOf, WorkMeter meter) {
    boolean[] value = new boolean[inner.size()];
    return works -> {
      meter.now(0);
      for (int number = 0; number < value.length; number++) {
        Structure structure = inner.structure(number);
        if (componentOf[number] >= 0) {
          value[number] = works[componentOf[number]];
        } else {
          boolean[] parts = new boolean[structure.parts().size()];
          for (int slot = 0; slot < parts.length; slot++) {
            parts[slot] = value[inner.part(number, slot)];
          }
          value[number] = structure.evaluate(parts);
        }
      }
      return value[value.length - 1];
    };
  }
}
