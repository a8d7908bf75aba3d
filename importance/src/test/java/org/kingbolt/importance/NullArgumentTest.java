package org.kingbolt.importance;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;

import java.util.Collections;
import java.util.List;
import java.util.Map;
import org.apache.commons.math3.distribution.RealDistribution;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.function.Executable;
import org.kingbolt.core.CoherentSystem;
import org.kingbolt.core.Probabilities;
import org.kingbolt.core.Probability;
import org.kingbolt.core.Structure;

/** Null is refused by name. */
class NullArgumentTest {

  private static final Structure PAIR = Structure.series("a", "b");
  private static final Probabilities P = Probabilities.all(0.9);

  private static void refused(String message, Executable call) {
    assertEquals(message, assertThrows(NullPointerException.class, call).getMessage());
  }

  @Test
  void measures() {
    ImportanceAtProbabilities at = Importance.of(PAIR).given(P);
    refused("budget is null; it must be given", () -> at.fussellVesely(null));
    refused("budget is null; it must be given", () -> at.jointImportance(null));
    refused("components is null; name at least one", () -> at.interaction((String[]) null));
    refused(
        "component is null; give the name of one of the system's", () -> at.interaction("a", null));
    refused("changes are null; give a map from components to probabilities", () -> at.change(null));
    refused("probability of \"a\" is null", () -> at.change(Collections.singletonMap("a", null)));
    refused("groups are null; give a map from names to components", () -> at.groups(null));
    refused(
        "group \"g\" is null; give the components' names",
        () -> at.groups(Collections.singletonMap("g", (List<String>) null)));
    refused(
        "component is null; give the name of one of the system's",
        () -> at.jointImportance().value(null, "a"));
    Map<String, RealDistribution> noLifetimes = null;
    refused(
        "lifetimes are null; give a map from components to distributions",
        () -> Importance.of(PAIR).natvig(noLifetimes));
  }

  @Test
  void sensitivity() {
    refused(
        "structure is null; give a structure, or a system compiled from one",
        () -> Sensitivity.of((Structure) null));
    refused(
        "system is null; give a compiled system, or a structure to compile",
        () -> Sensitivity.of((CoherentSystem) null));
    refused(
        "probabilities are null; give those of all components, such as Probabilities.all(0.9)",
        () -> Sensitivity.of(PAIR).given(null));
    SensitivityAtProbabilities at = Sensitivity.of(PAIR).given(P);
    refused(
        "component is null; give the name of one of the system's", () -> at.along((String) null));
    refused("the group is null; give the components' names", () -> at.along((List<String>) null));
    refused(
        "low is null; give the low values of the components to vary", () -> at.tornado(null, P));
    refused(
        "high is null; give the high values of the components to vary", () -> at.tornado(P, null));
    refused("target is null; give the reliability wanted", () -> at.along("a").breakEven(null));
    refused("probability is null; give each member's", () -> at.along("a").at((Probability) null));
  }

  @Test
  void diagnosis() {
    refused(
        "structure is null; give a structure, or a system compiled from one",
        () -> Diagnosis.of((Structure) null));
    refused(
        "system is null; give a compiled system, or a structure to compile",
        () -> Diagnosis.of((CoherentSystem) null));
    refused(
        "probabilities are null; give those of all components, such as Probabilities.all(0.9)",
        () -> Diagnosis.of(PAIR).given(null));
    Diagnosis at = Diagnosis.of(PAIR).given(P).systemFailed();
    refused("component is null; give the name of one of the system's", () -> at.working(null));
    refused("component is null; give the name of one of the system's", () -> at.posterior(null));
    refused(
        "costs are null; give a map from components to costs", () -> at.cheapestInspection(null));
    refused("cost of \"a\" is null", () -> at.failedPerCost(Collections.singletonMap("a", null)));
  }
}
