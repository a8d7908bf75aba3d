package org.kingbolt.core;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.HashMap;
import java.util.LinkedHashSet;
import java.util.List;
import java.util.Map;
import java.util.Objects;
import java.util.Optional;
import java.util.Set;
import org.jspecify.annotations.Nullable;
import org.kingbolt.core.diagram.WorkMeter;

/**
 * The reliability of a structure as a factored formula that a reviewer can follow: series and
 * parallel parts as products, and where these do not suffice, conditioning on key components,
 * chosen so that what is left falls apart into series and parallel.
 *
 * <p>The formula holds for components that fail independently. {@code p(x)} is the probability that
 * component x works. Equal intermediate structures are derived once.
 *
 * <p>Immutable; safe to share between threads.
 *
 * <p>Source: Barlow &amp; Proschan, Statistical Theory of Reliability and Life Testing, 1975, ch. 1
 * (pivotal decomposition); Moore &amp; Shannon 1956 (series and parallel reduction of networks).
 *
 * <p>Example: {@code Derivation.of(Structure.atLeast(2, "a", "b", "c")).formula()} is {@code r =
 * p(a)·[1 - (1 - p(b))·(1 - p(c))] + (1 - p(a))·p(b)·p(c)}.
 */
public final class Derivation {

  private static final int INLINED_SYMBOLS = 400;

  /** A step with its formula, as it is being made. */
  private static final class Step {
    final int number;
    final String condition;
    final Structure structure;
    @Nullable Structure key;
    Formula formula;
    int uses;

    Step(int number, String condition, Structure structure) {
      this.number = number;
      this.condition = condition;
      this.structure = structure;
      this.formula = Formula.result(structure);
    }
  }

  private final List<Step> steps = new ArrayList<>();
  private final Map<Structure, Step> byStructure = new HashMap<>();

  private Derivation(Structure structure, WorkMeter meter) {
    Runnable pause = () -> meter.now(steps.size());
    // steps are counted by the caller's meter, and what they hold by another one
    WorkMeter heap = Budget.ofHeap().start("deriving the formula");
    long held = 0;
    int measured = 0;
    stepFor(structure, List.of());
    for (int next = 0; next < steps.size(); next++) {
      for (; measured < steps.size(); measured++) {
        held += size(steps.get(measured));
        heap.at(held);
      }
      pause.run();
      derive(steps.get(next), pause);
    }
  }

  /** What a step holds at most, in nodes of the meter. */
  private static long size(Step step) {
    long size = 1L + step.condition.length() / WorkMeter.BYTES_PER_NODE;
    for (Structure part : Fold.postOrder(step.structure)) {
      int slots = part.parts().size();
      size += slots == 0 ? 0 : 1 + (part instanceof NetworkStructure ? 2 * slots : slots / 8);
    }
    return size;
  }

  /**
   * Derives a structure's formula within 10,000 steps.
   *
   * @param structure any structure
   * @return the derivation
   * @throws BudgetExceededException if that does not suffice
   */
  public static Derivation of(Structure structure) {
    return of(structure, Budget.ofNodes(10_000));
  }

  /**
   * Derives a structure's formula.
   *
   * @param structure any structure
   * @param budget its nodes limit the number of steps
   * @return the derivation. Cost: every step tries its candidates for the key, up to 48; the number
   *     of steps is exponential for structures that do not fall apart.
   * @throws BudgetExceededException if the budget is used up
   */
  public static Derivation of(Structure structure, Budget budget) {
    Check.notNull(structure, "structure");
    return new Derivation(structure, Check.notNull(budget, "budget").start("deriving the formula"));
  }

  private Step stepFor(Structure structure, List<String> conditions) {
    Step step = byStructure.get(structure);
    if (step == null) {
      String condition =
          conditions.isEmpty() ? "no condition" : "given " + String.join(", ", conditions);
      step = new Step(steps.size() + 1, condition, structure);
      steps.add(step);
      byStructure.put(structure, step);
    }
    step.uses++;
    return step;
  }

  private void derive(Step step, Runnable pause) {
    Formula formula = Decomposition.of(step.structure, pause).formula();
    if (formula.kind == Formula.Kind.RESULT) {
      Structure knot = Objects.requireNonNull(formula.structure);
      KeyChoice choice = KeyChoice.best(knot, pause);
      step.key = choice.key;
      formula =
          Formula.pivot(
              Decomposition.of(choice.key, pause).formula(),
              side(choice.working, pause),
              side(choice.failed, pause));
    }
    for (Formula node : formula.postOrder()) {
      Structure open = node.structure;
      if (open != null) {
        node.step = stepFor(open, conditions(step, formula, node)).number;
      }
    }
    step.formula = formula;
  }

  /** What is left on one side of a pivot, taken apart as far as reductions of networks go. */
  private static Formula side(Structure structure, Runnable pause) {
    Structure reduced =
        structure instanceof NetworkStructure network
            ? NetworkReduction.of(network, pause)
            : structure;
    return reduced instanceof ConstantStructure
        ? Formula.of(reduced.isAlwaysWorking() ? Formula.Kind.ONE : Formula.Kind.ZERO)
        : Formula.result(reduced);
  }

  @SuppressWarnings("ReferenceEquality")
  private static List<String> conditions(Step step, Formula formula, Formula node) {
    List<String> conditions = new ArrayList<>();
    if (!step.condition.equals("no condition")) {
      conditions.add(step.condition.substring("given ".length()));
    }
    Structure key = step.key;
    if (key != null && formula.operands.get(1) == node) {
      conditions.add(keyText(key) + " works");
    } else if (key != null && formula.operands.get(2) == node) {
      conditions.add(keyText(key) + " failed");
    }
    return conditions;
  }

  private static String keyText(Structure key) {
    return key instanceof ComponentStructure component ? component.name() : TextWriter.excerpt(key);
  }

  /**
   * Returns the steps.
   *
   * @return step 1, the whole system, first; unmodifiable
   */
  public List<DerivationStep> steps() {
    FormulaText writer = new FormulaText(false, number -> null);
    return steps.stream()
        .map(
            step ->
                new DerivationStep(
                    step.number,
                    step.condition,
                    step.structure,
                    Optional.ofNullable(step.key).map(Derivation::keyText),
                    writer.write(step.formula)))
        .toList();
  }

  /**
   * Returns the components on which the derivation conditions.
   *
   * @return in order of their first use, each once; key parts of several components are not among
   *     them
   */
  public List<String> keyComponents() {
    Set<String> keys = new LinkedHashSet<>();
    for (Step step : steps) {
      if (step.key instanceof ComponentStructure component) {
        keys.add(component.name());
      }
    }
    return List.copyOf(keys);
  }

  /**
   * The formula in plain text: one line where every intermediate result is used once, otherwise one
   * line for r and one for each result that is used more than once.
   *
   * @return lines separated by line breaks, such as {@code r = p(a)·p(b)}
   */
  public String formula() {
    return lines(false, "\n");
  }

  /**
   * The formula in LaTeX, for a mathematics environment with the amsmath package.
   *
   * @return one equation a line, separated by {@code \\}
   */
  public String latex() {
    return lines(true, " \\\\\n");
  }

  private String lines(boolean latex, String separator) {
    FormulaText writer = new FormulaText(latex, this::inlined);
    List<String> lines = new ArrayList<>();
    for (Step step : steps) {
      if (step.number == 1 || inlined(step.number) == null) {
        lines.add(writer.result(step.number) + " = " + writer.write(step.formula));
      }
    }
    return String.join(separator, lines);
  }

  /** Results used once are written out in their place, in derivations short enough to read so. */
  private @Nullable Formula inlined(int number) {
    Step step = steps.get(number - 1);
    boolean simple = step.formula.operands.isEmpty() && step.formula.structure == null;
    return simple || (step.uses == 1 && steps.size() <= INLINED_SYMBOLS) ? step.formula : null;
  }

  /**
   * Evaluates the formula itself, step by step, without the decision diagram.
   *
   * @param p the components' probabilities
   * @return both sides, each by sums of non-negative terms
   * @throws IllegalArgumentException if components have no probability; the message lists them
   */
  public Probability reliability(Probabilities p) {
    Check.notNull(p, "probabilities").forComponents(steps.get(0).structure.components());
    List<Step> order = new ArrayList<>(steps);
    // every result is of a structure with fewer components than the step that uses it
    order.sort(
        Comparator.comparingInt((Step step) -> step.structure.components().size())
            .thenComparing(Comparator.comparingInt((Step step) -> step.number).reversed()));
    List<Probability> results = new ArrayList<>();
    steps.forEach(step -> results.add(Probability.IMPOSSIBLE));
    for (Step step : order) {
      results.set(step.number - 1, step.formula.value(p, results));
    }
    return results.get(0);
  }

  /**
   * The derivation as a page for review: each step with its condition, what is left of the
   * structure, its key and its formula.
   *
   * @return aligned plain text
   */
  @Override
  public String toString() {
    StringBuilder text = new StringBuilder();
    for (DerivationStep step : steps()) {
      String result = step.number() == 1 ? "r" : "r" + step.number();
      text.append(text.isEmpty() ? "" : "\n")
          .append("Step ")
          .append(step.number())
          .append(", ")
          .append(step.condition())
          .append("\n  structure  ")
          .append(step.structure());
      step.key().ifPresent(key -> text.append("\n  key        ").append(key));
      text.append("\n  formula    ").append(result).append(" = ").append(step.formula());
    }
    return text.toString();
  }
}
