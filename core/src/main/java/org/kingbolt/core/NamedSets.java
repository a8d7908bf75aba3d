package org.kingbolt.core;

import java.util.Arrays;
import java.util.Collections;
import java.util.Iterator;
import java.util.LinkedHashSet;
import java.util.List;
import java.util.NoSuchElementException;
import java.util.Set;
import org.jspecify.annotations.Nullable;
import org.kingbolt.core.diagram.SetWalk;

/** A walk over sets of variables as sets of names. For one thread. */
final class NamedSets implements Iterator<Set<String>> {

  private final List<String> components;
  private final SetWalk walk;
  private int @Nullable [] next;

  NamedSets(List<String> components, SetWalk walk) {
    this.components = components;
    this.walk = walk;
    this.next = walk.next();
  }

  @Override
  public boolean hasNext() {
    return next != null;
  }

  @Override
  public Set<String> next() {
    int[] set = next;
    if (set == null) {
      throw new NoSuchElementException("there are no more minimal sets");
    }
    next = walk.next();
    return named(components, set);
  }

  /** An unmodifiable set that keeps the order of components. */
  static Set<String> named(List<String> components, int[] set) {
    int[] sorted = set.clone();
    Arrays.sort(sorted);
    Set<String> names = new LinkedHashSet<>();
    for (int index : sorted) {
      names.add(components.get(index));
    }
    return Collections.unmodifiableSet(names);
  }
}
