package org.kingbolt.importance;

import java.util.ArrayList;
import java.util.BitSet;
import java.util.Comparator;
import java.util.HashMap;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import org.kingbolt.core.diagram.WorkMeter;

/**
 * What there is to choose from at each step, given the decisions that are remembered there: all
 * combinations of the step's items that the limits allow, without those that others beat in every
 * cost and in the variable's probability.
 */
final class PlanMenus {

  /** Some items chosen: the unit that is set, and the product of the factors on its failing. */
  @SuppressWarnings("ArrayRecordComponent")
  private record Partial(
      BitSet chosen, long[] cost, double unit, double unitFails, double less, double factor) {

    double working() {
      return Math.min(1, unit + unitFails * less);
    }

    double failing() {
      return unitFails * factor;
    }
  }

  private static final int PRUNE_FROM = 16;

  private final PlanModel model;
  private final PlanSteps steps;
  private final PlanOrder order;
  private final WorkMeter meter;

  /** After each step: the remembered decisions there can be, numbered. */
  private final List<List<BitSet>> keys = new ArrayList<>();

  private final List<Map<BitSet, Integer>> numbers = new ArrayList<>();
  private final List<Map<Integer, PlanAlternative[]>> known = new ArrayList<>();

  PlanMenus(PlanModel model, PlanSteps steps, PlanOrder order, WorkMeter meter) {
    this.model = model;
    this.steps = steps;
    this.order = order;
    this.meter = meter;
    for (int at = 0; at < steps.count(); at++) {
      keys.add(new ArrayList<>());
      numbers.add(new HashMap<>());
      known.add(new HashMap<>());
    }
  }

  /** The alternatives of a step after the decisions with a key, 0 before the first step. */
  PlanAlternative[] menu(int at, int key) {
    PlanAlternative[] menu = known.get(at).get(key);
    if (menu == null) {
      BitSet before = at == 0 ? new BitSet() : keys.get(at - 1).get(key);
      menu = build(at, before);
      known.get(at).put(key, menu);
    }
    return menu;
  }

  /**
   * The alternatives of a step whatever is decided elsewhere: also the items decided before count
   * as open, and cost nothing; limits hold among the items here.
   */
  PlanAlternative[] relaxed(int at) {
    int variable = steps.variable(at);
    List<Integer> all = new ArrayList<>();
    for (int item : order.decided(at)) {
      all.add(item);
    }
    for (int item = 0; item < model.items().size(); item++) {
      if (order.step(item) < at && touches(item, variable)) {
        all.add(item);
      }
    }
    all.sort(Comparator.comparing(item -> !PlanOrder.sets(model, item, variable)));
    int[] items = all.stream().mapToInt(Integer::intValue).toArray();
    BitSet among = new BitSet();
    all.forEach(among::set);
    List<Partial> partials = expand(at, items, new BitSet());
    List<PlanLimit> limits =
        model.limits().stream()
            .filter(limit -> limit.members().stream().anyMatch(among::get))
            .toList();
    partials.removeIf(partial -> !holds(limits, partial.chosen, among));
    return finish(at, unbeaten(partials, new BitSet()), new BitSet());
  }

  private boolean touches(int item, int variable) {
    return model.items().get(item).effects().stream()
        .anyMatch(effect -> effect.variable() == variable);
  }

  private PlanAlternative[] build(int at, BitSet before) {
    List<Partial> partials = expand(at, order.decided(at), before);
    BitSet all = new BitSet();
    all.set(0, model.items().size());
    partials.removeIf(partial -> !holds(order.ending(at), partial.chosen, all));
    return finish(at, unbeaten(partials, order.open(at)), before);
  }

  private PlanAlternative[] finish(int at, List<Partial> partials, BitSet before) {
    List<PlanAlternative> menu = new ArrayList<>();
    for (Partial partial : partials) {
      BitSet fresh = (BitSet) partial.chosen.clone();
      fresh.andNot(before);
      BitSet after = (BitSet) partial.chosen.clone();
      after.and(order.open(at));
      menu.add(
          new PlanAlternative(
              fresh.stream().toArray(),
              partial.cost,
              partial.working(),
              partial.failing(),
              number(at, after)));
    }
    return menu.toArray(new PlanAlternative[0]);
  }

  private int number(int at, BitSet key) {
    Integer number = numbers.get(at).get(key);
    if (number == null) {
      number = keys.get(at).size();
      keys.get(at).add(key);
      numbers.get(at).put(key, number);
    }
    return number;
  }

  private List<Partial> expand(int at, int[] items, BitSet before) {
    int variable = steps.variable(at);
    Partial start =
        new Partial(
            (BitSet) before.clone(),
            new long[model.resources().size()],
            model.working()[variable],
            model.failing()[variable],
            0,
            1);
    for (int item = before.nextSetBit(0); item >= 0; item = before.nextSetBit(item + 1)) {
      start = with(start, item, variable, false);
    }
    List<Partial> partials = new ArrayList<>(List.of(start));
    BitSet remembered = (BitSet) order.limited().clone();
    remembered.or(order.open(at));
    int pruned = PRUNE_FROM;
    for (int item : items) {
      boolean paid = order.step(item) == at;
      if (!PlanOrder.sets(model, item, variable) && partials.size() > 2 * pruned) {
        partials = unbeaten(partials, remembered);
        pruned = Math.max(PRUNE_FROM, partials.size());
      }
      int size = partials.size();
      for (int i = 0; i < size; i++) {
        if (mayJoin(item, partials.get(i).chosen)) {
          partials.add(with(partials.get(i), item, variable, paid));
          meter.at(partials.size());
        }
      }
    }
    return partials;
  }

  private Partial with(Partial partial, int item, int variable, boolean paid) {
    BitSet chosen = (BitSet) partial.chosen.clone();
    chosen.set(item);
    long[] cost = partial.cost.clone();
    for (int r = 0; r < cost.length && paid; r++) {
      cost[r] += model.items().get(item).cost()[r];
    }
    double unit = partial.unit;
    double unitFails = partial.unitFails;
    double less = partial.less;
    double factor = partial.factor;
    for (PlanEffect effect : model.items().get(item).effects()) {
      if (effect.variable() == variable && effect.sets()) {
        unit = effect.working();
        unitFails = effect.failing();
      } else if (effect.variable() == variable) {
        less = Math.min(1, less + factor * effect.working());
        factor *= effect.failing();
      }
    }
    return new Partial(chosen, cost, unit, unitFails, less, factor);
  }

  /** Whether no limit is broken already. */
  private boolean mayJoin(int item, BitSet chosen) {
    for (PlanLimit limit : order.limitsOf(item)) {
      if (limit.kind() != PlanLimit.Kind.REQUIRES) {
        for (int member : limit.members()) {
          if (chosen.get(member)) {
            return false;
          }
        }
      }
    }
    return true;
  }

  /** Whether limits hold, as far as they are about some items only. */
  private static boolean holds(List<PlanLimit> limits, BitSet chosen, BitSet among) {
    for (PlanLimit limit : limits) {
      int count = 0;
      boolean all = true;
      for (int member : limit.members()) {
        all &= among.get(member);
        count += among.get(member) && chosen.get(member) ? 1 : 0;
      }
      boolean kept =
          switch (limit.kind()) {
            case AT_MOST_ONE -> count <= 1;
            case EXACTLY_ONE -> count <= 1 && (!all || count == 1);
            case REQUIRES ->
                !all || !chosen.get(limit.members().get(0)) || chosen.get(limit.members().get(1));
          };
      if (!kept) {
        return false;
      }
    }
    return true;
  }

  /**
   * Of those with the same remembered decisions the ones that no other beats; equals: the first.
   */
  private static List<Partial> unbeaten(List<Partial> partials, BitSet remembered) {
    Map<BitSet, List<Integer>> groups = new LinkedHashMap<>();
    for (int i = 0; i < partials.size(); i++) {
      BitSet key = (BitSet) partials.get(i).chosen.clone();
      key.and(remembered);
      groups.computeIfAbsent(key, k -> new ArrayList<>()).add(i);
    }
    BitSet kept = new BitSet();
    for (List<Integer> group : groups.values()) {
      group.sort(
          Comparator.comparingDouble((Integer i) -> rank(partials.get(i)))
              .thenComparing(i -> partials.get(i).cost, java.util.Arrays::compare));
      List<Integer> best = new ArrayList<>();
      for (int i : group) {
        long[] cost = partials.get(i).cost;
        if (best.stream().noneMatch(other -> noDearer(partials.get(other).cost, cost))) {
          best.add(i);
          kept.set(i);
        }
      }
    }
    return new ArrayList<>(kept.stream().mapToObj(partials::get).toList());
  }

  private static double rank(Partial partial) {
    return PlanLabels.rank(partial.working(), partial.failing());
  }

  private static boolean noDearer(long[] costs, long[] others) {
    for (int r = 0; r < costs.length; r++) {
      if (costs[r] > others[r]) {
        return false;
      }
    }
    return true;
  }
}
