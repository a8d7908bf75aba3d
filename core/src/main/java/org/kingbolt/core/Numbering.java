package org.kingbolt.core;

import com.google.common.collect.ImmutableList;
import java.util.Arrays;
import java.util.IdentityHashMap;
import java.util.List;

/**
 * The distinct sub-structures of a structure, numbered from 0, parts before wholes and the root
 * last; equal ones have one number. One walk with an explicit stack, in which two operators are
 * known to be equal by the numbers of their parts.
 */
final class Numbering {

  private Structure[] structures = new Structure[64];
  private int[] hash = new int[64];
  private int count;

  /** Numbers of the parts of all structures; those of structure n end at {@code end[n]}. */
  private int[] parts = new int[64];

  private int[] end = new int[64];

  /** Open-addressed by hash code: one more than a structure's number. */
  private int[] index = new int[128];

  /** Numbers of operators that are equal to another object met before. */
  private final IdentityHashMap<Structure, Integer> copies = new IdentityHashMap<>();

  /** The operators being walked over, the next part of each, and the numbers found so far. */
  private Structure[] open = new Structure[64];

  private int[] next = new int[64];
  private int depth;
  private int[] found = new int[64];
  private int foundCount;

  Numbering(Structure root) {
    arrive(root);
    while (depth > 0) {
      Structure operator = open[depth - 1];
      List<Structure> operands = operator.parts();
      if (next[depth - 1] < operands.size()) {
        arrive(operands.get(next[depth - 1]++));
      } else {
        depth--;
        foundCount -= operands.size();
        found(numberOf(operator, operands.size()));
      }
    }
  }

  int size() {
    return count;
  }

  Structure structure(int number) {
    return structures[number];
  }

  /** The number of the part in a slot of an operator. */
  int part(int number, int slot) {
    return parts[end[number] - structures[number].parts().size() + slot];
  }

  /** Names of the components in order of first mention. */
  ImmutableList<String> components() {
    ImmutableList.Builder<String> names = ImmutableList.builder();
    for (int number = 0; number < count; number++) {
      if (structures[number] instanceof ComponentStructure component) {
        names.add(component.name());
      }
    }
    return names.build();
  }

  /** Notes the number of what is known; opens what is not. */
  @SuppressWarnings("ReferenceEquality")
  private void arrive(Structure structure) {
    boolean component = structure instanceof ComponentStructure;
    boolean alike = false;
    int at = slot(structure.hashCode());
    for (; index[at] != 0; at = (at + 1) & (index.length - 1)) {
      int number = index[at] - 1;
      if (hash[number] == structure.hashCode()) {
        Structure known = structures[number];
        if (known == structure || (component && known.sameOperator(structure))) {
          found(number);
          return;
        }
        alike = true;
      }
    }
    if (component) {
      found(add(structure, 0, at));
      return;
    }
    Integer copy = alike ? copies.get(structure) : null;
    if (copy != null) {
      found(copy);
      return;
    }
    if (depth == open.length) {
      open = Arrays.copyOf(open, depth << 1);
      next = Arrays.copyOf(next, depth << 1);
    }
    open[depth] = structure;
    next[depth++] = 0;
  }

  private void found(int number) {
    if (foundCount == found.length) {
      found = Arrays.copyOf(found, foundCount << 1);
    }
    found[foundCount++] = number;
  }

  /** The number of an operator whose parts stand at the top of what has been found. */
  private int numberOf(Structure operator, int operands) {
    int at = slot(operator.hashCode());
    for (; index[at] != 0; at = (at + 1) & (index.length - 1)) {
      int number = index[at] - 1;
      if (hash[number] == operator.hashCode()
          && hasParts(number, operands)
          && structures[number].sameOperator(operator)) {
        copies.put(operator, number);
        return number;
      }
    }
    return add(operator, operands, at);
  }

  private boolean hasParts(int number, int operands) {
    int from = number == 0 ? 0 : end[number - 1];
    return Arrays.equals(parts, from, end[number], found, foundCount, foundCount + operands);
  }

  private int add(Structure structure, int operands, int at) {
    int from = count == 0 ? 0 : end[count - 1];
    if (count == structures.length) {
      structures = Arrays.copyOf(structures, count << 1);
      hash = Arrays.copyOf(hash, count << 1);
      end = Arrays.copyOf(end, count << 1);
    }
    if (parts.length - from < operands) {
      parts = Arrays.copyOf(parts, Math.max(parts.length << 1, from + operands));
    }
    System.arraycopy(found, foundCount, parts, from, operands);
    structures[count] = structure;
    hash[count] = structure.hashCode();
    end[count] = from + operands;
    index[at] = ++count;
    if (count << 1 > index.length) {
      growIndex();
    }
    return count - 1;
  }

  private void growIndex() {
    index = new int[index.length << 1];
    for (int number = 0; number < count; number++) {
      int at = slot(hash[number]);
      while (index[at] != 0) {
        at = (at + 1) & (index.length - 1);
      }
      index[at] = number + 1;
    }
  }

  /** Where the search for a hash code begins. */
  private int slot(int hashCode) {
    int mixed = hashCode * 0x9E3779B9;
    return (mixed ^ (mixed >>> 16)) & (index.length - 1);
  }
}
