package org.kingbolt.docs.bench;

import java.util.ArrayDeque;
import java.util.ArrayList;
import java.util.Collections;
import java.util.Deque;
import java.util.LinkedHashSet;
import java.util.List;
import java.util.Random;
import java.util.Set;
import org.kingbolt.core.Structure;

/**
 * A plant of 150 subsystems, all of them needed, each a nest of series, parallel and 2-out-of-3
 * gates over components of its own and over supports that stand in two to four places anywhere in
 * the plant.
 */
final class SharedPlant {

  private static final int SUBSYSTEMS = 150;

  private final Random random;

  private SharedPlant(long seed) {
    this.random = new Random(seed);
  }

  static Structure of(int components, int shared, long seed) {
    return new SharedPlant(seed).plant(components - shared, shared);
  }

  private Structure plant(int own, int shared) {
    List<String> uses = new ArrayList<>();
    for (int i = 0; i < shared; i++) {
      uses.addAll(Collections.nCopies(2 + random.nextInt(3), "support" + i));
    }
    Collections.shuffle(uses, random);
    Deque<String> open = new ArrayDeque<>(uses);
    List<Structure> subsystems = new ArrayList<>();
    for (int i = 0; i < SUBSYSTEMS; i++) {
      Set<String> names = new LinkedHashSet<>();
      for (int unit = i * own / SUBSYSTEMS; unit < (i + 1) * own / SUBSYSTEMS; unit++) {
        names.add("unit" + unit);
      }
      int left = SUBSYSTEMS - i;
      for (int take = (open.size() + left - 1) / left; take > 0; take--) {
        names.add(open.remove());
      }
      List<Structure> leaves = new ArrayList<>(names.stream().map(Structure::component).toList());
      Collections.shuffle(leaves, random);
      subsystems.add(nest(leaves, true));
    }
    return Structure.series(subsystems);
  }

  private Structure nest(List<Structure> leaves, boolean redundant) {
    if (leaves.size() == 1) {
      return leaves.get(0);
    }
    List<Structure> parts = leaves;
    if (leaves.size() > 3) {
      int count = 2 + random.nextInt(2);
      parts = new ArrayList<>();
      for (int i = 0; i < count; i++) {
        int from = i * leaves.size() / count;
        int to = (i + 1) * leaves.size() / count;
        parts.add(nest(leaves.subList(from, to), false));
      }
    }
    if (parts.size() == 3 && random.nextBoolean()) {
      return Structure.atLeast(2, parts);
    }
    return redundant || random.nextBoolean() ? Structure.parallel(parts) : Structure.series(parts);
  }
}
