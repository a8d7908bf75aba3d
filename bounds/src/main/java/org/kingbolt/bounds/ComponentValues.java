package org.kingbolt.bounds;

import java.util.List;
import org.kingbolt.core.Probability;

/**
 * The components' probabilities in arrays, both sides of each made to agree: the smaller side,
 * which has more digits, decides. Not to be changed once made.
 */
final class ComponentValues {

  final List<String> names;
  final double[] working;
  final double[] failing;

  ComponentValues(List<String> names, List<Probability> values) {
    this.names = names;
    this.working = new double[names.size()];
    this.failing = new double[names.size()];
    for (int i = 0; i < working.length; i++) {
      double works = values.get(i).working();
      double fails = values.get(i).failing();
      working[i] = fails <= works ? 1 - fails : works;
      failing[i] = fails <= works ? fails : 1 - works;
    }
  }

  int size() {
    return working.length;
  }

  /** The probability that a member of a path set works, or that a member of a cut set fails. */
  double[] occurs(boolean paths) {
    return paths ? working : failing;
  }

  double[] fails(boolean paths) {
    return paths ? failing : working;
  }

  /** Operations in an exact evaluation, for whose rounding an interval must leave room, too. */
  long slack() {
    return 4L * size();
  }
}
