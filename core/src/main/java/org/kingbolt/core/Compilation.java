package org.kingbolt.core;

import java.util.HashMap;
import java.util.HashSet;
import java.util.List;
import java.util.Map;
import java.util.Set;
import org.kingbolt.core.diagram.Composer;
import org.kingbolt.core.diagram.Diagram;
import org.kingbolt.core.diagram.WorkMeter;

/** From a structure to the engine's expression, and on to a diagram. */
final class Compilation {

  private Compilation() {}

  static CoherentSystem compile(Structure structure, Budget budget) {
    WorkMeter meter = meter(budget);
    return new CoherentSystem(structure, composer(structure, meter).compose(meter));
  }

  static CoherentSystem compile(Structure structure, List<String> order, Budget budget) {
    List<String> components = structure.components();
    Map<String, Integer> numbers = numbers(components);
    Set<String> rest = new HashSet<>(components);
    int[] variables = new int[components.size()];
    int count = 0;
    for (String name : Check.notNull(order, "the order of components")) {
      Integer number = numbers.get(Check.name(name, "the order of components"));
      if (number == null) {
        throw Check.unknown(name, components);
      }
      if (!rest.remove(name)) {
        throw new IllegalArgumentException(
            "the order of components names "
                + Check.quoted(name)
                + " twice; name every component once");
      }
      variables[count++] = number;
    }
    if (!rest.isEmpty()) {
      throw new IllegalArgumentException(
          "the order of components leaves out "
              + Check.listed(components.stream().filter(rest::contains).toList())
              + "; name every component once");
    }
    WorkMeter meter = meter(budget);
    return new CoherentSystem(structure, composer(structure, meter).compose(variables, meter));
  }

  private static WorkMeter meter(Budget budget) {
    return Check.notNull(budget, "budget").start("compiling the structure");
  }

  private static Map<String, Integer> numbers(List<String> components) {
    Map<String, Integer> numbers = new HashMap<>();
    for (int i = 0; i < components.size(); i++) {
      numbers.put(components.get(i), i);
    }
    return numbers;
  }

  /** Equal sub-structures become one expression. */
  private static Composer composer(Structure structure, WorkMeter meter) {
    Map<String, Integer> numbers = numbers(structure.components());
    Composer composer = new Composer(numbers.size());
    Map<Structure, Integer> made = new HashMap<>();
    for (Structure part : Fold.postOrder(structure)) {
      if (!made.containsKey(part)) {
        made.put(part, add(composer, part, numbers, made, meter));
      }
    }
    return composer;
  }

  private static int add(
      Composer composer,
      Structure part,
      Map<String, Integer> numbers,
      Map<Structure, Integer> made,
      WorkMeter meter) {
    if (part instanceof ComponentStructure component) {
      return composer.variable(numbers.getOrDefault(component.name(), -1));
    }
    Diagram template = part.template(meter);
    int[] slots = new int[part.parts().size()];
    for (int i = 0; i < slots.length; i++) {
      slots[i] = made.getOrDefault(part.parts().get(i), -1);
    }
    return composer.operator(template, slots);
  }
}
