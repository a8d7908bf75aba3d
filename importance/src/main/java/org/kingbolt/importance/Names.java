package org.kingbolt.importance;

import java.util.Collection;
import java.util.HashSet;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Objects;
import java.util.Set;
import java.util.stream.Collectors;
import org.jspecify.annotations.Nullable;

/** Finds components by name, complains about others, and lines names up. */
final class Names {

  private static final int SHOWN = 12;

  private Names() {}

  static Map<String, Integer> places(List<String> components) {
    Map<String, Integer> places = new LinkedHashMap<>();
    components.forEach(component -> places.put(component, places.size()));
    return places;
  }

  static int place(Map<String, Integer> places, String component) {
    Objects.requireNonNull(component, "component is null; give the name of one of the system's");
    Integer place = places.get(component);
    if (place == null) {
      throw new IllegalArgumentException(
          "unknown component "
              + quoted(component)
              + "; the components are "
              + listed(places.keySet())
              + "; name one of these");
    }
    return place;
  }

  /** The places of components of which none is named twice. */
  static int[] places(List<String> components, Collection<String> named, String what) {
    return places(places(components), named, what);
  }

  /** The same, where the places are at hand. Cost: by what is named. */
  static int[] places(Map<String, Integer> places, Collection<String> named, String what) {
    Objects.requireNonNull(named, () -> what + " is null; give the components' names");
    int[] found = named.stream().mapToInt(name -> place(places, name)).toArray();
    if (found.length == 0) {
      throw new IllegalArgumentException(what + " is empty; name at least one component");
    }
    Set<String> seen = new HashSet<>();
    for (String name : named) {
      if (!seen.add(name)) {
        throw new IllegalArgumentException(
            what + " names " + quoted(name) + " twice; name it once");
      }
    }
    return found;
  }

  static String quoted(@Nullable String name) {
    return "\"" + name + "\"";
  }

  static String listed(Collection<String> names) {
    String shown = names.stream().limit(SHOWN).map(Names::quoted).collect(Collectors.joining(", "));
    return names.size() > SHOWN ? shown + " and " + (names.size() - SHOWN) + " more" : shown;
  }

  static int width(Collection<String> names) {
    return names.stream().mapToInt(name -> name.codePointCount(0, name.length())).max().orElse(0);
  }

  /** Padded by what is seen, not by halves of pairs. */
  static String padded(String text, int width) {
    return text + " ".repeat(Math.max(0, width - text.codePointCount(0, text.length())));
  }
}
