package org.kingbolt.core;

import com.google.common.collect.ImmutableMap;
import java.io.Serializable;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.Iterator;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.function.Consumer;
import java.util.function.Function;
import org.jspecify.annotations.Nullable;

/**
 * How likely each component is to work: a register of probabilities by name, with or without a
 * value for all the names that it does not list.
 *
 * <p>A register may name more components than a system has. A component that it does not cover is
 * an error when the system is asked, and the error lists every such component.
 *
 * <p>Components are taken to fail independently of each other.
 *
 * <p>Immutable; safe to share between threads. Equal when the same names have equal values and the
 * value for the others is equal too.
 *
 * <p>Example: {@code Probabilities.all(0.95).with("intake", Probability.failing(1e-9))}.
 */
public final class Probabilities implements Serializable {

  private static final long serialVersionUID = 1L;

  private final ImmutableMap<String, Probability> byName;
  private final @Nullable Probability others;

  private Probabilities(Map<String, Probability> byName, @Nullable Probability others) {
    this.byName = ImmutableMap.copyOf(byName);
    this.others = others;
  }

  /**
   * The same probability of working for every component.
   *
   * @param working from 0 to 1
   * @return the register
   * @throws IllegalArgumentException if the number is NaN or outside [0, 1]
   */
  public static Probabilities all(double working) {
    return all(Probability.working(working));
  }

  /**
   * The same probability for every component.
   *
   * @param probability the value
   * @return the register
   */
  public static Probabilities all(Probability probability) {
    return new Probabilities(Map.of(), Check.notNull(probability, "probability"));
  }

  /**
   * A probability for each component named.
   *
   * @param byName the values by component
   * @return the register
   * @throws IllegalArgumentException if a name is blank
   */
  public static Probabilities of(Map<String, Probability> byName) {
    return collect(byName, value -> value);
  }

  /**
   * A probability of working for each component named.
   *
   * @param byName values from 0 to 1 by component
   * @return the register
   * @throws IllegalArgumentException if a name is blank, or a number is NaN or outside [0, 1]; the
   *     message names the component
   */
  public static Probabilities working(Map<String, Double> byName) {
    return collect(byName, Probability::working);
  }

  /**
   * A probability of failing for each component named.
   *
   * @param byName values from 0 to 1 by component
   * @return the register
   * @throws IllegalArgumentException if a name is blank, or a number is NaN or outside [0, 1]; the
   *     message names the component
   */
  public static Probabilities failing(Map<String, Double> byName) {
    return collect(byName, Probability::failing);
  }

  private static <V> Probabilities collect(Map<String, V> values, Function<V, Probability> make) {
    Check.notNull(values, "the map of probabilities");
    Map<String, Probability> byName = new LinkedHashMap<>();
    for (Map.Entry<String, V> entry : values.entrySet()) {
      String name = Check.name(entry.getKey(), "probabilities");
      V value = Check.notNull(entry.getValue(), "probability of " + Check.quoted(name));
      byName.put(name, naming(name, () -> make.apply(value)));
    }
    return new Probabilities(byName, null);
  }

  /** Adds the component's name to a complaint about its value. */
  private static Probability naming(String name, java.util.function.Supplier<Probability> make) {
    try {
      return make.get();
    } catch (IllegalArgumentException bad) {
      throw new IllegalArgumentException(
          "component " + Check.quoted(name) + ": " + bad.getMessage(), bad);
    }
  }

  /**
   * Sets or replaces one component's probability.
   *
   * @param component its name
   * @param probability its value
   * @return a register that differs in this component only. Cost: linear in the names listed; to
   *     set many, use {@link #of(Map)}.
   * @throws IllegalArgumentException if the name is blank
   */
  public Probabilities with(String component, Probability probability) {
    Map<String, Probability> changed = new LinkedHashMap<>(byName);
    changed.put(
        Check.name(component, "probabilities"),
        Check.notNull(probability, "probability of " + Check.quoted(component)));
    return new Probabilities(changed, others);
  }

  /**
   * Sets or replaces one component's probability of working.
   *
   * @param component its name
   * @param working from 0 to 1
   * @return a register that differs in this component only
   * @throws IllegalArgumentException if the name is blank, or the number is NaN or outside [0, 1]
   */
  public Probabilities with(String component, double working) {
    Check.name(component, "probabilities");
    return with(component, naming(component, () -> Probability.working(working)));
  }

  /**
   * Tells whether a component has a value.
   *
   * @param component a name
   * @return true if it is listed, or if the register has a value for all others
   */
  public boolean covers(String component) {
    Check.notNull(component, "component");
    return others != null || byName.containsKey(component);
  }

  /**
   * Returns one component's probability.
   *
   * @param component its name
   * @return its value
   * @throws IllegalArgumentException if the component is not covered
   */
  public Probability get(String component) {
    return forComponents(List.of(Check.notNull(component, "component"))).get(0);
  }

  /**
   * Returns the probabilities of some components.
   *
   * @param components their names
   * @return the values in the same order
   * @throws IllegalArgumentException if components are not covered; the message lists all of them
   */
  public List<Probability> forComponents(List<String> components) {
    Check.notNull(components, "the list of components");
    List<Probability> found = new ArrayList<>(components.size());
    forEach(components, found::add);
    return found;
  }

  /**
   * Writes the probabilities of some components into arrays.
   *
   * @throws IllegalArgumentException if components are not covered; the message lists all of them
   */
  void fill(List<String> components, double[] working, double[] failing) {
    if (byName.isEmpty() && others != null) {
      Arrays.fill(working, others.working());
      Arrays.fill(failing, others.failing());
      return;
    }
    forEach(components, new Filler(working, failing));
  }

  /** Takes the values in the order of the components. */
  private void forEach(List<String> components, Consumer<Probability> taker) {
    List<String> missing = new ArrayList<>();
    Iterator<Map.Entry<String, Probability>> listed = byName.entrySet().iterator();
    boolean inOrder = true;
    for (String component : components) {
      Check.notNull(component, "a name in the list of components");
      Probability value = null;
      if (inOrder && listed.hasNext()) {
        // registers often list the components in this very order, which spares a look-up
        Map.Entry<String, Probability> entry = listed.next();
        value = entry.getKey().equals(component) ? entry.getValue() : null;
      }
      if (value == null) {
        inOrder = false;
        Check.notNull(component, "a name in the list of components");
        value = byName.getOrDefault(component, others);
      }
      if (value == null) {
        missing.add(component);
      } else {
        taker.accept(value);
      }
    }
    if (!missing.isEmpty()) {
      throw new IllegalArgumentException(
          "no probability for "
              + Check.listedInFull(missing)
              + "; set each with Probabilities.with, or all at once with Probabilities.all");
    }
  }

  private static final class Filler implements Consumer<Probability> {
    private final double[] working;
    private final double[] failing;
    private int next;

    Filler(double[] working, double[] failing) {
      this.working = working;
      this.failing = failing;
    }

    @Override
    public void accept(Probability value) {
      working[next] = value.working();
      failing[next++] = value.failing();
    }
  }

  @Override
  public boolean equals(Object other) {
    return other instanceof Probabilities that
        && byName.equals(that.byName)
        && java.util.Objects.equals(others, that.others);
  }

  @Override
  public int hashCode() {
    return 31 * byName.hashCode() + java.util.Objects.hashCode(others);
  }

  @Override
  public String toString() {
    return others == null ? byName.toString() : byName + ", all others " + others;
  }
}
