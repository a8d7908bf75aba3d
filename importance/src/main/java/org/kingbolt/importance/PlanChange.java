package org.kingbolt.importance;

import org.kingbolt.core.Probabilities;
import org.kingbolt.core.Probability;
import org.kingbolt.core.Structure;

/** What an option does to one component. */
sealed interface PlanChange {

  /** The component of the system that is changed. */
  String component();

  /** Another unit takes the place of the present one. */
  record Replace(String component, Probability unit) implements PlanChange {}

  /** The probability of failing is multiplied, as by a test. */
  record Multiply(String component, double factor) implements PlanChange {}

  /** A further unit stands in parallel to whatever stands in the component's place. */
  record Spare(String component, String spare, Probability unit) implements PlanChange {}

  /** A structure takes the component's place. */
  record Rebuild(String component, Structure module, Probabilities p) implements PlanChange {}
}
