package org.kingbolt.docs.bench;

import java.util.List;
import java.util.Map;
import java.util.function.DoubleSupplier;
import java.util.stream.DoubleStream;
import org.kingbolt.core.CoherentSystem;
import org.kingbolt.core.Evaluator;
import org.kingbolt.core.Probabilities;
import org.kingbolt.core.Probability;
import org.kingbolt.importance.Importance;
import org.kingbolt.importance.ImportanceAtProbabilities;
import org.kingbolt.importance.JointImportance;

/** What matters in a grid of ten by ten, beside one evaluation, or plain conditioned passes. */
final class ImportanceRows {

  private static final String ONCE = "one evaluation";
  private static final String PASSES = "plain derivatives, conditioned";

  private ImportanceRows() {}

  static List<Workload> rows() {
    return List.of(
        new Workload("10x10 grid: Birnbaum", Effort.USUAL, List.of(ONCE), () -> first(false)),
        new Workload("10x10 grid: ten measures", Effort.USUAL, List.of(ONCE), () -> first(true)),
        new Workload(
            "10x10 grid: joint importance", Effort.LONG, List.of(PASSES), ImportanceRows::joint));
  }

  private static CoherentSystem grid() {
    return Inputs.grid(10, 10).connecting(Inputs.corners(10, 10)).compile();
  }

  private static double[] failing(CoherentSystem system) {
    return Inputs.failing(system.components().size(), 0.01, 0.05);
  }

  /** The sides agree on the failing side, q_i B_i over criticality. */
  private static Prepared first(boolean all) {
    CoherentSystem system = grid();
    Probabilities p = Inputs.probabilities(system.components(), failing(system));
    String component = system.components().get(0);
    double q = p.get(component).failing();
    DoubleSupplier ours =
        () -> {
          ImportanceAtProbabilities at = Importance.of(system).given(p);
          double birnbaum = at.birnbaum().value(component);
          double others = all ? others(at) : 0;
          return others == Double.POSITIVE_INFINITY
              ? others
              : q * birnbaum / at.criticalityFailing().value(component);
        };
    return new Prepared(
        system.diagram().nodeCount(),
        "nodes",
        "failing",
        ours,
        Map.of(ONCE, () -> system.reliability(p).failing()));
  }

  private static double others(ImportanceAtProbabilities at) {
    return at.criticalityWorking().top(1).get(0).value()
        + at.riskAchievementWorth().top(1).get(0).value()
        + at.riskReductionWorth().top(1).get(0).value()
        + at.improvementPotential().top(1).get(0).value()
        + at.differentialUniform().top(1).get(0).value()
        + at.differentialProportional().top(1).get(0).value()
        + at.diagnosticFailing().top(1).get(0).value()
        + at.diagnosticWorking().top(1).get(0).value();
  }

  private static Prepared joint() {
    CoherentSystem system = grid();
    double[] failing = failing(system);
    int n = failing.length;
    Probabilities p = Inputs.probabilities(system.components(), failing);
    return new Prepared(
        (long) n * (n - 1) / 2,
        "pairs",
        "sum of sizes",
        () -> {
          JointImportance joint = Importance.of(system).given(p).jointImportance();
          double sum = 0;
          for (double[] row : joint.matrix()) {
            sum += DoubleStream.of(row).map(Math::abs).sum();
          }
          return sum;
        },
        Map.of(PASSES, () -> conditioned(system, failing)));
  }

  private static double conditioned(CoherentSystem system, double[] failing) {
    Evaluator evaluator = system.evaluator();
    double sum = 0;
    for (int i = 0; i < failing.length; i++) {
      double[] up = given(evaluator, failing, i, Probability.CERTAIN);
      double[] down = given(evaluator, failing, i, Probability.IMPOSSIBLE);
      for (int j = 0; j < failing.length; j++) {
        sum += j == i ? 0 : Math.abs(up[j] - down[j]);
      }
    }
    return sum;
  }

  private static double[] given(Evaluator evaluator, double[] failing, int i, Probability value) {
    double[] q = failing.clone();
    double[] p = DoubleStream.of(failing).map(x -> 1 - x).toArray();
    q[i] = value.failing();
    p[i] = value.working();
    double[] derivatives = new double[q.length];
    evaluator.evaluate(p, q);
    evaluator.derivatives(derivatives);
    return derivatives;
  }
}
