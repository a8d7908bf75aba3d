package org.kingbolt.core;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.HashMap;
import java.util.HashSet;
import java.util.List;
import java.util.Map;
import java.util.Set;
import net.jqwik.api.Arbitrary;
import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.Provide;
import org.junit.jupiter.api.Test;
import org.kingbolt.core.ModularDecomposition.Module;
import org.kingbolt.core.testing.RandomStructures;
import org.kingbolt.core.testing.RandomStructures.Sample;

/** Modules put together again are the system, and they share nothing. */
class ModularDecompositionTest {

  @Provide
  Arbitrary<Sample> structures() {
    return RandomStructures.any();
  }

  private static List<Module> modules(Structure structure) {
    return ModularDecomposition.of(structure, Budget.ofHeap()).modules();
  }

  @Property(tries = 500)
  void modules_putTogether_areTheSystem(@ForAll("structures") Sample sample) {
    List<Module> modules = modules(sample.structure());
    List<String> names = sample.oracle().names();
    for (int state = 0; state < 1 << names.size(); state++) {
      Set<String> up = sample.oracle().set(state);
      Map<String, Boolean> values = new HashMap<>();
      boolean works = false;
      for (Module module : modules) {
        Set<String> working = new HashSet<>();
        for (String part : module.structure().components()) {
          if (values.getOrDefault(part, up.contains(part))) {
            working.add(part);
          }
        }
        works = module.structure().works(working);
        values.put(module.name(), works);
      }
      assertEquals(sample.oracle().table().works(state), works, () -> modules.toString());
    }
  }

  @Property(tries = 500)
  void everyName_standsInOneModule(@ForAll("structures") Sample sample) {
    Set<String> seen = new HashSet<>();
    for (Module module : modules(sample.structure())) {
      for (String part : module.structure().components()) {
        assertTrue(seen.add(part), part);
      }
    }
  }

  @Test
  void nestedGates_fallApart() {
    Structure shared = Structure.parse("atLeast(2, series(a, x), series(b, x), c)");
    Structure whole =
        Structure.parse("series(d, parallel(atLeast(2, series(a, x), series(b, x), c), e))");
    List<Module> modules = modules(whole);
    assertEquals(3, modules.size(), modules::toString);
    assertEquals(shared, modules.get(0).structure());
    assertEquals("parallel(\"module 1\", e)", modules.get(1).structure().toString());
    assertEquals("series(d, \"module 2\")", modules.get(2).structure().toString());
  }

  @Test
  void namesOfModules_differFromThoseOfComponents() {
    Structure whole = Structure.parse("series(\"module 1\", parallel(a, b))");
    assertEquals("module 1'", modules(whole).get(0).name());
  }

  @Test
  void links_areListed_andOtherNetworksAreRefused() {
    NetworkLinks links =
        NetworkLinks.of(Structure.parse("network(link(a, s, m), link(b, m, t), connecting(s, t))"));
    assertEquals("s", links.source());
    assertEquals("t", links.target());
    assertEquals(new NetworkLinks.Link("m", "t", Structure.component("b")), links.links().get(1));
    Map<String, String> refused =
        Map.of(
            "series(a, b)", "it is not a network",
            "network(link(a, s, m), link(b, m, t), connectingAll())", "other than two nodes",
            "network(link(a, s, m), arc(b, m, t), connecting(s, t))", "an arc from \"m\" to \"t\"",
            "network(link(a, s, m), link(a, m, t), connecting(s, t))", "component \"a\" stands",
            "network(link(a, s, m), link(b, m, t), node(m, c), connecting(s, t))",
                "node \"m\" can fail");
    refused.forEach(
        (text, why) -> {
          String message =
              assertThrows(
                      IllegalArgumentException.class, () -> NetworkLinks.of(Structure.parse(text)))
                  .getMessage();
          assertTrue(message.contains(why), message);
        });
  }
}
