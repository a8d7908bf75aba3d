package org.kingbolt.core;

import java.util.HashMap;
import java.util.HashSet;
import java.util.List;
import java.util.Map;
import java.util.Set;
import java.util.function.Supplier;
import org.kingbolt.core.diagram.Composer;
import org.kingbolt.core.diagram.Diagram;
import org.kingbolt.core.diagram.FrontierTooWideException;
import org.kingbolt.core.diagram.NetworkRelaxer;
import org.kingbolt.core.diagram.WorkMeter;

/** From a structure to the engine's expression, and on to a diagram. */
final class Compilation {

  private Compilation() {}

  static CoherentSystem compile(Structure structure, Budget budget) {
    WorkMeter meter = meter(budget);
    Numbering numbering = new Numbering(structure, meter);
    Diagram diagram = within(() -> expression(numbering, meter).compose(meter));
    return new CoherentSystem(structure, numbering.components(), diagram);
  }

  /** The probability alone, without a diagram of the whole. */
  static Probability reliability(Structure structure, Probabilities p, Budget budget) {
    Check.notNull(p, "probabilities");
    WorkMeter meter =
        Check.notNull(budget, "budget").start("working out the reliability without a diagram");
    Numbering numbering = new Numbering(structure, meter);
    List<String> components = numbering.components();
    double[] working = new double[components.size()];
    double[] failing = new double[components.size()];
    p.fill(components, working, failing);
    double[] both = within(() -> expression(numbering, meter).expect(working, failing, meter));
    return Probability.computed(both[0], both[1]);
  }

  /**
   * Both ends of the probability, exact where parts that share components are small enough.
   *
   * @param effort how many nodes one diagram may have, at least 1
   * @return in the order of {@link Composer#expectBetween}
   */
  static double[] between(Structure structure, Probabilities p, long effort, WorkMeter meter) {
    Numbering numbering = new Numbering(structure, meter);
    List<String> components = numbering.components();
    double[] working = new double[components.size()];
    double[] failing = new double[components.size()];
    p.fill(components, working, failing);
    return within(() -> expression(numbering, meter).between(working, failing, effort, meter));
  }

  /**
   * Both ends of the probability of a structure whose networks are replaced.
   *
   * @param relaxer says by what
   * @param lessWorking whether by something that works less often, or more often
   * @param effort how many nodes one diagram may have, at least 1
   * @return in the order of {@link Composer#expectBetween}
   */
  static double[] between(
      Numbering numbering,
      NetworkRelaxer relaxer,
      boolean lessWorking,
      double[] working,
      double[] failing,
      long effort,
      WorkMeter meter) {
    Composer composer = new Composer(0);
    composer.relax(relaxer.begin(lessWorking));
    double[] ends =
        within(
            () -> expression(numbering, composer, meter).between(working, failing, effort, meter));
    if (!composer.hasGivenUp()) {
      return ends;
    }
    Composer again = new Composer(0);
    again.relax(relaxer.beginMonotone(lessWorking));
    double[] others =
        within(() -> expression(numbering, again, meter).between(working, failing, effort, meter));
    return new double[] {
      Math.max(ends[0], others[0]),
      Math.min(ends[1], others[1]),
      Math.min(ends[2], others[2]),
      Math.max(ends[3], others[3])
    };
  }

  /**
   * The diagram of a structure that works less often, or more often, than this one.
   *
   * @param relaxer chooses for the networks
   */
  static Diagram oneSidedDiagram(Numbering numbering, NetworkRelaxer relaxer, WorkMeter meter) {
    Composer composer = new Composer(0);
    composer.relax(relaxer);
    return within(() -> expression(numbering, composer, meter).compose(meter));
  }

  static int widestFrontier(Structure structure) {
    WorkMeter meter = WorkMeter.UNLIMITED;
    return expression(new Numbering(structure, meter), meter).composer.widestFrontier();
  }

  private static <T> T within(Supplier<T> work) {
    try {
      return work.get();
    } catch (FrontierTooWideException wide) {
      throw BudgetExceededException.width(wide);
    }
  }

  static CoherentSystem compile(Structure structure, List<String> order, Budget budget) {
    WorkMeter meter = meter(budget);
    Numbering numbering = new Numbering(structure, meter);
    List<String> components = numbering.components();
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
    Diagram diagram = within(() -> expression(numbering, meter).compose(variables, meter));
    return new CoherentSystem(structure, numbering.components(), diagram);
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

  /** A structure as an expression of a composer, whose variables are the components in order. */
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

    double[] between(double[] working, double[] failing, long effort, WorkMeter meter) {
      return composer.expectBetween(root, working, failing, effort, meter);
    }
  }

  private static Expression expression(Numbering numbering, WorkMeter meter) {
    return expression(numbering, new Composer(0), meter);
  }

  private static Expression expression(Numbering numbering, Composer composer, WorkMeter meter) {
    int[] made = new int[numbering.size()];
    int components = 0;
    for (int number = 0; number < made.length; number++) {
      Structure part = numbering.structure(number);
      if (part instanceof ComponentStructure) {
        made[number] = composer.variable(components++);
      } else {
        int[] slots = new int[part.parts().size()];
        for (int slot = 0; slot < slots.length; slot++) {
          slots[slot] = made[numbering.part(number, slot)];
        }
        made[number] = part.express(composer, slots, meter);
      }
    }
    return new Expression(composer, made[made.length - 1]);
  }
}
