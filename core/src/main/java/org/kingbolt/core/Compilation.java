package org.kingbolt.core;

import java.util.Arrays;
import java.util.HashMap;
import java.util.HashSet;
import java.util.IdentityHashMap;
import java.util.List;
import java.util.Map;
import java.util.Set;
import java.util.function.Supplier;
import org.kingbolt.core.diagram.Composer;
import org.kingbolt.core.diagram.Diagram;
import org.kingbolt.core.diagram.FrontierTooWideException;
import org.kingbolt.core.diagram.WorkMeter;

/** From a structure to the engine's expression, and on to a diagram. */
final class Compilation {

  private Compilation() {}

  static CoherentSystem compile(Structure structure, Budget budget) {
    WorkMeter meter = meter(budget);
    return new CoherentSystem(structure, within(() -> expression(structure, meter).compose(meter)));
  }

  /** The probability alone, without a diagram of the whole. */
  static Probability reliability(Structure structure, Probabilities p, Budget budget) {
    List<Probability> values =
        Check.notNull(p, "probabilities").forComponents(structure.components());
    double[] working = values.stream().mapToDouble(Probability::working).toArray();
    double[] failing = values.stream().mapToDouble(Probability::failing).toArray();
    WorkMeter meter =
        Check.notNull(budget, "budget").start("working out the reliability without a diagram");
    double[] both = within(() -> expression(structure, meter).expect(working, failing, meter));
    return Probability.computed(both[0], both[1]);
  }

  static int widestFrontier(Structure structure) {
    return expression(structure, WorkMeter.UNLIMITED).composer.widestFrontier();
  }

  private static <T> T within(Supplier<T> work) {
    try {
      return work.get();
    } catch (FrontierTooWideException wide) {
      throw BudgetExceededException.width(wide);
    }
  }

  static CoherentSystem compile(Structure structure, List<String> order, Budget budget) {
    List<String> components = structure.components();
    Map<String, Integer> numbers = numbers(components);
    Set<String> rest = new HashSet<>(components);
    int[] variables = new int[components.size()];
    int count = 0;
    for (String name : Check.notNull(order, "the order of components")) {
      Integer number = numbers.get(Check.name(name, "the order of components", count + 1));
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
    return new CoherentSystem(
        structure, within(() -> expression(structure, meter).compose(variables, meter)));
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

  /** A structure as an expression of a composer. */
  private record Expression(Composer composer, int root) {

    Diagram compose(WorkMeter meter) {
      return composer.compose(root, meter);
    }

    Diagram compose(int[] order, WorkMeter meter) {
      return composer.compose(root, order, meter);
    }

    double[] expect(double[] working, double[] failing, WorkMeter meter) {
      return composer.expect(root, working, failing, meter);
    }
  }

  /** An operator over expressions: equal sub-structures, part by part, have equal shapes. */
  private static final class Shape {
    private final Structure operator;
    private final int[] slots;

    Shape(Structure operator, int[] slots) {
      this.operator = operator;
      this.slots = slots;
    }

    @Override
    public boolean equals(Object other) {
      return other instanceof Shape that
          && Arrays.equals(slots, that.slots)
          && operator.sameOperator(that.operator);
    }

    @Override
    public int hashCode() {
      return operator.hashCode();
    }
  }

  /** Equal sub-structures become one expression. */
  private static Expression expression(Structure structure, WorkMeter meter) {
    Map<String, Integer> numbers = numbers(structure.components());
    Composer composer = new Composer(numbers.size());
    IdentityHashMap<Structure, Integer> made = new IdentityHashMap<>();
    Map<Shape, Integer> byShape = new HashMap<>();
    int root = -1;
    for (Structure part : Fold.postOrder(structure)) {
      int[] slots = new int[part.parts().size()];
      for (int i = 0; i < slots.length; i++) {
        slots[i] = made.getOrDefault(part.parts().get(i), -1);
      }
      Shape shape = new Shape(part, slots);
      Integer known = byShape.get(shape);
      root = known != null ? known : add(composer, part, numbers, slots, meter);
      byShape.put(shape, root);
      made.put(part, root);
    }
    return new Expression(composer, root);
  }

  private static int add(
      Composer composer,
      Structure part,
      Map<String, Integer> numbers,
      int[] slots,
      WorkMeter meter) {
    return part instanceof ComponentStructure component
        ? composer.variable(numbers.getOrDefault(component.name(), -1))
        : part.express(composer, slots, meter);
  }
}
