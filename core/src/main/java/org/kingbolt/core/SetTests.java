package org.kingbolt.core;

import java.util.HashSet;
import java.util.LinkedHashSet;
import java.util.Set;
import java.util.function.Predicate;

/** Whether a set of components is what it is taken for. */
final class SetTests {

  private SetTests() {}

  static boolean isCutSet(Structure structure, Set<String> set) {
    Set<String> working = new LinkedHashSet<>(structure.components());
    for (String name : Check.notNull(set, "the set of failed components")) {
      if (!working.remove(Check.notNull(name, "a name in the set of failed components"))) {
        throw Check.unknown(name, structure.components());
      }
    }
    return !structure.works(working);
  }

  /** Whether a set has the property and loses it with every member that is left out. */
  static boolean isMinimal(Set<String> set, Predicate<Set<String>> property) {
    if (!property.test(set)) {
      return false;
    }
    Set<String> rest = new HashSet<>(set);
    for (String name : set) {
      rest.remove(name);
      if (property.test(rest)) {
        return false;
      }
      rest.add(name);
    }
    return true;
  }
}
