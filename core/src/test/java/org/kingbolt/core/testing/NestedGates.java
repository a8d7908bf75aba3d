package org.kingbolt.core.testing;

import java.util.ArrayList;
import java.util.Collections;
import java.util.LinkedHashSet;
import java.util.List;
import java.util.Random;
import java.util.Set;
import org.kingbolt.core.Structure;

/**
 * A random tree of series, parallel and k-out-of-n gates in which some components stand in several
 * places, and beside it what it means, gate by gate.
 */
public final class NestedGates {

  /** A gate: how many parts must work; components, and gates with larger numbers, are its parts. */
  private record Gate(int k, List<Integer> components, List<Integer> gates) {}

  private final List<Gate> gates = new ArrayList<>();
  private final Structure structure;

  /**
   * Makes a system.
   *
   * @param components the number of components, named c0, c1, ...
   * @param gates the number of gates
   * @param repeated the share of the leaves that repeat a component, from 0 to 1
   * @param seed of the random choices
   */
  public NestedGates(int components, int gates, double repeated, long seed) {
    Random random = new Random(seed);
    List<Integer> leaves = new ArrayList<>();
    int places = (int) Math.round(components / (1 - repeated));
    for (int i = 0; i < Math.max(places, 2 * gates); i++) {
      leaves.add(i < components ? i : random.nextInt(components));
    }
    Collections.shuffle(leaves, random);
    List<Set<Integer>> members = new ArrayList<>();
    List<List<Integer>> inner = new ArrayList<>();
    for (int gate = 0; gate < gates; gate++) {
      members.add(new LinkedHashSet<>());
      inner.add(new ArrayList<>());
      if (gate > 0) {
        inner.get(random.nextInt(gate)).add(gate);
      }
    }
    for (int i = 0; i < leaves.size(); i++) {
      members.get(i < 2 * gates ? i / 2 : random.nextInt(gates)).add(leaves.get(i));
    }
    for (int gate = 0; gate < gates; gate++) {
      int parts = members.get(gate).size() + inner.get(gate).size();
      int k = random.nextInt(3) == 0 ? 1 : random.nextInt(2) == 0 ? parts : Math.min(2, parts);
      this.gates.add(new Gate(k, List.copyOf(members.get(gate)), inner.get(gate)));
    }
    this.structure = make(random);
  }

  /** Two gates that have come out equal are one part of the gate around them. */
  private Structure make(Random random) {
    List<Structure> made = new ArrayList<>(Collections.nCopies(gates.size(), null));
    for (int number = gates.size() - 1; number >= 0; number--) {
      Gate gate = gates.get(number);
      List<Structure> parts = new ArrayList<>();
      gate.components.forEach(component -> parts.add(Structure.component("c" + component)));
      List<Integer> kept = new ArrayList<>();
      for (int inner : gate.gates) {
        if (!parts.contains(made.get(inner))) {
          parts.add(made.get(inner));
          kept.add(inner);
        }
      }
      int k = Math.min(gate.k, parts.size());
      gates.set(number, new Gate(k, gate.components, kept));
      Collections.shuffle(parts, random);
      made.set(number, Structure.atLeast(k, parts));
    }
    return made.get(0);
  }

  /**
   * Returns the system.
   *
   * @return as described to the library
   */
  public Structure structure() {
    return structure;
  }

  /**
   * Tells whether the system works, without the library.
   *
   * @param working indexed by the number in a component's name
   * @return the value of gate 0
   */
  public boolean works(boolean[] working) {
    boolean[] values = new boolean[gates.size()];
    for (int number = values.length - 1; number >= 0; number--) {
      Gate gate = gates.get(number);
      long count = gate.components.stream().filter(component -> working[component]).count();
      count += gate.gates.stream().filter(inner -> values[inner]).count();
      values[number] = count >= gate.k;
    }
    return values[0];
  }
}
