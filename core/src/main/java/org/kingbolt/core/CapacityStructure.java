package org.kingbolt.core;

import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import org.kingbolt.core.diagram.Composer;
import org.kingbolt.core.diagram.RouteFinder;
import org.kingbolt.core.diagram.Routes;
import org.kingbolt.core.diagram.Templates;
import org.kingbolt.core.diagram.WorkMeter;

/** Weighted-k-out-of-n:G. */
final class CapacityStructure extends Structure {

  static final String KIND = "capacityAtLeast";

  private static final long serialVersionUID = 1L;

  private final long demand;
  private final transient List<Long> capacities;

  private CapacityStructure(long demand, List<Structure> parts, List<Long> capacities) {
    super(parts, 31 * Long.hashCode(demand) + capacities.hashCode());
    this.demand = demand;
    this.capacities = capacities;
  }

  static Structure described(long demand, Map<String, Long> capacities) {
    Check.notNull(capacities, KIND + ": the map of capacities");
    List<Structure> parts = new ArrayList<>();
    List<Long> values = new ArrayList<>();
    for (Map.Entry<String, Long> entry : capacities.entrySet()) {
      parts.add(component(Check.name(entry.getKey(), KIND)));
      values.add(
          Check.notNull(
              entry.getValue(), KIND + ": the capacity of " + Check.quoted(entry.getKey())));
    }
    return described(demand, parts, values);
  }

  static Structure described(long demand, List<Structure> parts, List<Long> capacities) {
    GateStructure.requireParts(KIND, parts);
    long sum = 0;
    for (int i = 0; i < parts.size(); i++) {
      long capacity = capacities.get(i);
      if (capacity < 0) {
        throw new IllegalArgumentException(
            KIND
                + ": the capacity of "
                + TextWriter.excerpt(parts.get(i))
                + " is "
                + capacity
                + "; it must be 0 or more");
      }
      if (sum > Long.MAX_VALUE - capacity) {
        throw new IllegalArgumentException(
            KIND
                + ": the capacities add up to more than "
                + Long.MAX_VALUE
                + "; use a larger unit");
      }
      sum += capacity;
    }
    if (demand < 1) {
      throw new NotCoherentException(
          KIND
              + ": a demand of "
              + demand
              + " is met even when all components have failed; it must be at least 1");
    }
    if (demand > sum) {
      throw new NotCoherentException(
          KIND
              + ": a demand of "
              + demand
              + " is never met; all capacities together are only "
              + sum
              + ", so ask for less or add capacity");
    }
    return new CapacityStructure(demand, parts, List.copyOf(capacities));
  }

  /** Simplified; parts may be constants or repeat. */
  static Structure of(long demand, List<Structure> parts, List<Long> capacities) {
    long unmet = demand;
    long sum = 0;
    Map<Structure, Long> merged = new LinkedHashMap<>();
    for (int i = 0; i < parts.size(); i++) {
      Structure part = parts.get(i);
      if (part.isAlwaysWorking()) {
        unmet -= capacities.get(i);
      } else if (!part.isNeverWorking()) {
        merged.merge(part, capacities.get(i), Long::sum);
        sum += capacities.get(i);
      }
    }
    if (unmet <= 0) {
      return ConstantStructure.ALWAYS;
    }
    if (unmet > sum) {
      return ConstantStructure.NEVER;
    }
    List<Structure> open = new ArrayList<>(merged.keySet());
    List<Long> values = List.copyOf(merged.values());
    long first = values.get(0);
    if (values.stream().allMatch(value -> value == first)) {
      return GateStructure.atLeastOf((int) ((unmet - 1) / first + 1), open);
    }
    return new CapacityStructure(unmet, open, values);
  }

  @Override
  boolean evaluate(boolean[] partWorks) {
    long sum = 0;
    for (int i = 0; i < partWorks.length; i++) {
      sum += partWorks[i] ? capacities.get(i) : 0;
    }
    return sum >= demand;
  }

  @Override
  Structure rebuild(List<Structure> newParts) {
    return of(demand, newParts, capacities);
  }

  @Override
  Structure dualOver(List<Structure> dualParts) {
    long sum = capacities.stream().mapToLong(Long::longValue).sum();
    return new CapacityStructure(sum - demand + 1, dualParts, capacities);
  }

  @Override
  List<RouteFinder> routes() {
    long[] weights = capacities.stream().mapToLong(Long::longValue).toArray();
    return List.of(Routes.capacity(demand, weights));
  }

  @Override
  int express(Composer composer, int[] partExpressions, WorkMeter meter) {
    long[] weights = capacities.stream().mapToLong(Long::longValue).toArray();
    return composer.operator(Templates.capacity(demand, weights), partExpressions);
  }

  @Override
  void write(TextWriter out) {
    out.token(KIND).token("(").token(Long.toString(demand));
    for (int i = 0; i < parts().size(); i++) {
      out.token(", ").part(parts().get(i)).token(": ").token(Long.toString(capacities.get(i)));
    }
    out.token(")");
  }

  @Override
  boolean sameOperator(Structure other) {
    return other instanceof CapacityStructure that
        && demand == that.demand
        && capacities.equals(that.capacities);
  }
}
