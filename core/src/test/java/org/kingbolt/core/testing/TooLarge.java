package org.kingbolt.core.testing;

import java.time.Duration;
import java.util.ArrayList;
import java.util.Collections;
import java.util.LinkedHashMap;
import java.util.LinkedHashSet;
import java.util.List;
import java.util.Map;
import java.util.Random;
import java.util.Set;
import org.kingbolt.core.Budget;
import org.kingbolt.core.BudgetExceededException;
import org.kingbolt.core.CoherentSystem;
import org.kingbolt.core.CutOff;
import org.kingbolt.core.Derivation;
import org.kingbolt.core.MinimalSets;
import org.kingbolt.core.NetworkBuilder;
import org.kingbolt.core.Probabilities;
import org.kingbolt.core.Structure;

/** Questions that no small heap can answer, each of which should end by its budget. */
public enum TooLarge {
  /** Gates over gates, most of which stand in several places. */
  SHARED_GATES("compiling the structure") {
    @Override
    void ask() {
      sharedGates(300, 600).compile();
    }
  },
  SHARED_GATES_DIRECT("working out the reliability without a diagram") {
    @Override
    void ask() {
      sharedGates(300, 600).reliability(0.9);
    }
  },
  PATH_SETS("compiling the structure") {
    @Override
    void ask() {
      Structure.ofPathSets(sets()).compile();
    }
  },
  CUT_SETS("compiling the structure") {
    @Override
    void ask() {
      Structure.ofCutSets(sets()).compile();
    }
  },
  CAPACITY("compiling the structure") {
    @Override
    void ask() {
      capacity().compile();
    }
  },
  CAPACITY_DIRECT("working out the reliability without a diagram") {
    @Override
    void ask() {
      capacity().reliability(0.9);
    }
  },
  AT_LEAST("compiling the structure") {
    @Override
    void ask() {
      Structure.atLeast(20_000, names(40_000)).compile();
    }
  },
  RUNS_AROUND("compiling the structure") {
    @Override
    void ask() {
      Structure.withoutFailureRunAround(3_000, names(9_000)).compile();
    }
  },
  NETWORK("compiling the structure") {
    @Override
    void ask() {
      grid(16, 16, false).compile();
    }
  },
  NETWORK_DIRECT("working out the reliability without a diagram") {
    @Override
    void ask() {
      grid(16, 16, false).reliability(0.9);
    }
  },
  ARCS("compiling the structure") {
    @Override
    void ask() {
      grid(16, 24, true).compile();
    }
  },
  ARCS_DIRECT("working out the reliability without a diagram") {
    @Override
    void ask() {
      grid(20, 24, true).reliability(0.9);
    }
  },
  MINIMAL_CUT_SETS("finding minimal cut sets") {
    @Override
    void ask() {
      grid(8, 16, false).compile().minimalCutSets();
    }
  },
  LIST_OF_SETS("searching the most probable sets") {
    @Override
    void ask() {
      CoherentSystem system = Structure.atLeast(400, names(800)).compile();
      system.minimalPathSets().mostProbable(2_000_000, Probabilities.all(0.9));
    }
  },
  CUTS_OF_A_GATE("finding minimal cut sets with size at most 5") {
    @Override
    void ask() {
      Structure.atLeast(196, names(200)).minimalCutSets(CutOff.size(5));
    }
  },
  CUTS_OF_SHARED_GATES("finding minimal cut sets with size at most 12") {
    @Override
    void ask() {
      sharedGates(300, 600).minimalCutSets(CutOff.size(12));
    }
  },
  PATHS_OF_A_NETWORK("finding minimal path sets with size at most 60") {
    @Override
    void ask() {
      grid(16, 16, false).minimalPathSets(CutOff.size(60));
    }
  },
  CUTS_OF_CAPACITIES("finding minimal cut sets with size at most 40") {
    @Override
    void ask() {
      capacity().minimalCutSets(CutOff.size(40));
    }
  },
  INCLUSION_EXCLUSION("expanding by inclusion-exclusion") {
    @Override
    void ask() {
      MinimalSets sets = grid(5, 5, false).compile().minimalPathSets();
      sets.inclusionExclusion(Probabilities.all(0.9));
    }
  },
  POLYNOMIAL("counting working states") {
    @Override
    void ask() {
      Structure.atLeast(600, names(1400)).compile().polynomial();
    }
  },
  POLYNOMIAL_OF_A_GRID("counting working states") {
    @Override
    void ask() {
      grid(7, 60, false).compile().polynomial();
    }
  },
  LARGE_TREE("compiling the structure") {
    @Override
    void ask() {
      Structure tree = Structure.component("c");
      for (int i = 0; i < 550_000; i++) {
        Structure next = Structure.component("c" + i);
        tree = i % 2 == 0 ? Structure.series(tree, next) : Structure.parallel(tree, next);
      }
      tree.compile();
    }
  },
  DERIVATION("deriving the formula") {
    @Override
    void ask() {
      Derivation.of(grid(16, 16, false), Budget.ofHeap().withTime(Duration.ofSeconds(5)));
    }
  };

  /** What is being done when the budget ends it, as its message says. */
  public final String work;

  TooLarge(String work) {
    this.work = work;
  }

  abstract void ask();

  /**
   * Asks one question and prints how that ended.
   *
   * @param args the question's name
   */
  public static void main(String[] args) {
    try {
      valueOf(args[0]).ask();
      System.out.println("answered");
    } catch (BudgetExceededException exceeded) {
      System.out.println(exceeded.getClass().getSimpleName() + " " + exceeded.limit());
      System.out.println(exceeded.getMessage());
    }
  }

  private static String[] names(int count) {
    String[] names = new String[count];
    for (int i = 0; i < count; i++) {
      names[i] = "c" + i;
    }
    return names;
  }

  private static Structure sharedGates(int components, int gates) {
    Random random = new Random(1);
    List<Structure> pool = new ArrayList<>();
    for (String name : names(components)) {
      pool.add(Structure.component(name));
    }
    for (int gate = 0; gate < gates; gate++) {
      Set<Structure> parts = new LinkedHashSet<>();
      while (parts.size() < 5) {
        parts.add(pool.get(random.nextInt(pool.size())));
      }
      pool.add(Structure.atLeast(1 + random.nextInt(5), List.copyOf(parts)));
    }
    return Structure.atLeast(20, pool.subList(pool.size() - 40, pool.size()));
  }

  private static List<Set<String>> sets() {
    Random random = new Random(1);
    List<String> names = new ArrayList<>(List.of(names(400)));
    List<Set<String>> sets = new ArrayList<>();
    for (int i = 0; i < 3_000; i++) {
      Collections.shuffle(names, random);
      sets.add(new LinkedHashSet<>(names.subList(0, 4 + random.nextInt(5))));
    }
    return sets;
  }

  private static Structure capacity() {
    Random random = new Random(1);
    Map<String, Long> capacities = new LinkedHashMap<>();
    long sum = 0;
    for (String name : names(60)) {
      long capacity = random.nextLong() >>> 24;
      capacities.put(name, capacity);
      sum += capacity;
    }
    return Structure.capacityAtLeast(sum / 2, capacities);
  }

  private static Structure grid(int width, int height, boolean arcs) {
    NetworkBuilder network = Structure.network();
    Random random = new Random(1);
    for (int y = 0; y < height; y++) {
      for (int x = 0; x < width; x++) {
        String here = x + ":" + y;
        for (int step = 0; step < 2; step++) {
          int toX = x + 1 - step;
          int toY = y + step;
          if (toX < width && toY < height) {
            String there = toX + ":" + toY;
            boolean back = random.nextInt(3) == 0;
            String name = here + "-" + there;
            if (arcs) {
              network.arc(name, here, there);
              if (back) {
                network.arc(there + "-" + here, there, here);
              }
            } else {
              network.link(name, here, there);
            }
          }
        }
      }
    }
    return network.connecting("0:0", (width - 1) + ":" + (height - 1));
  }
}
