package org.kingbolt.core;

import java.util.ArrayList;
import java.util.BitSet;
import java.util.Collections;
import java.util.HashSet;
import java.util.LinkedHashSet;
import java.util.List;
import java.util.Set;
import java.util.function.Predicate;
import org.kingbolt.core.diagram.Diagram;
import org.kingbolt.core.diagram.MinimalSolutions;
import org.kingbolt.core.diagram.SetWalk;
import org.kingbolt.core.diagram.Templates;
import org.kingbolt.core.diagram.WorkMeter;

/** Asks a rule about every state, checks that it is coherent, and keeps its minimal path sets. */
final class RuleTable {

  private static final String KIND = "ofRule";
  private static final int MOST_NAMES = 20;

  private final List<String> names;
  private final BitSet works;

  private RuleTable(List<String> names, BitSet works) {
    this.names = names;
    this.works = works;
  }

  static Structure describe(List<String> names, Predicate<Set<String>> rule) {
    Check.notNull(names, KIND + ": the list of names");
    Check.notNull(rule, KIND + ": the rule");
    if (names.isEmpty() || names.size() > MOST_NAMES) {
      throw new IllegalArgumentException(
          KIND
              + ": there are "
              + names.size()
              + " names; a rule is asked about every state, so"
              + " give from 1 to "
              + MOST_NAMES
              + ", and build larger systems from several rules");
    }
    Set<String> distinct = new HashSet<>();
    for (String name : names) {
      if (!distinct.add(Check.name(name, KIND, distinct.size() + 1))) {
        throw new IllegalArgumentException(
            KIND + ": " + Check.quoted(name) + " is listed twice; list every component once");
      }
    }
    List<String> kept = List.copyOf(names);
    BitSet works = new BitSet(1 << kept.size());
    RuleTable table = new RuleTable(kept, works);
    for (int state = 0; state < 1 << kept.size(); state++) {
      works.set(state, rule.test(Collections.unmodifiableSet(table.working(state))));
    }
    table.requireCoherent();
    return table.structure();
  }

  /** Name i is bit n - 1 - i, as {@link Templates#truthTable} wants it. */
  private Set<String> working(int state) {
    Set<String> working = new LinkedHashSet<>();
    for (int i = 0; i < names.size(); i++) {
      if ((state >>> (names.size() - 1 - i) & 1) == 1) {
        working.add(names.get(i));
      }
    }
    return working;
  }

  private void requireCoherent() {
    int all = (1 << names.size()) - 1;
    if (works.isEmpty()) {
      throw new NotCoherentException(
          KIND + ": the rule never works, not even when all components work; it must work then");
    }
    for (int state = works.nextSetBit(0); state >= 0; state = works.nextSetBit(state + 1)) {
      for (int failed = all & ~state; failed != 0; failed &= failed - 1) {
        int better = state | Integer.lowestOneBit(failed);
        if (!works.get(better)) {
          throw new NotCoherentException(
              KIND
                  + ": the rule is not monotone; it works with "
                  + working(state)
                  + " working but fails with "
                  + working(better)
                  + ". A working component must never do harm");
        }
      }
    }
    if (works.get(0)) {
      throw new NotCoherentException(
          KIND
              + ": the rule always works, even when all components have failed; it must fail then");
    }
  }

  private Structure structure() {
    Diagram diagram = Templates.truthTable(names.size(), works, WorkMeter.UNLIMITED);
    List<Set<String>> sets = new ArrayList<>();
    WorkMeter meter = WorkMeter.UNLIMITED;
    SetWalk walk = MinimalSolutions.paths(diagram, meter).walk(meter);
    Set<String> mentioned = new HashSet<>();
    for (int[] set = walk.next(); set != null; set = walk.next()) {
      Set<String> path = new LinkedHashSet<>();
      for (int slot : set) {
        path.add(names.get(slot));
      }
      mentioned.addAll(path);
      sets.add(path);
    }
    if (mentioned.size() < names.size()) {
      // one set that is not minimal keeps the irrelevant components in the structure
      sets.add(new LinkedHashSet<>(names));
    }
    return Structure.ofPathSets(sets);
  }
}
