package org.kingbolt.bounds;

import java.util.List;
import java.util.Optional;
import java.util.function.Consumer;
import org.kingbolt.core.diagram.WorkMeter;

/** Path and cut sets that the caller has, all of them or some. */
final class GivenFamilies extends Families {

  private final List<int[]> paths;
  private final List<int[]> cuts;
  private final double discardedPaths;
  private final double discardedCuts;

  GivenFamilies(
      ComponentValues values,
      List<int[]> paths,
      List<int[]> cuts,
      double discardedPaths,
      double discardedCuts) {
    super(values);
    this.paths = paths;
    this.cuts = cuts;
    this.discardedPaths = discardedPaths;
    this.discardedCuts = discardedCuts;
  }

  GivenFamilies discarding(double ofPaths, double ofCuts) {
    return new GivenFamilies(values, paths, cuts, ofPaths, ofCuts);
  }

  boolean isEmpty(boolean ofPaths) {
    return (ofPaths ? paths : cuts).isEmpty();
  }

  @Override
  void forEach(boolean ofPaths, WorkMeter meter, Consumer<int[]> action) {
    (ofPaths ? paths : cuts).forEach(action);
  }

  @Override
  Optional<int[]> lightest(boolean ofPaths, double[] weights, WorkMeter meter) {
    Optional<int[]> best = Optional.empty();
    double least = Double.POSITIVE_INFINITY;
    for (int[] set : ofPaths ? paths : cuts) {
      meter.at(1);
      double sum = 0;
      for (int member : set) {
        sum += weights[member];
      }
      if (sum < least) {
        least = sum;
        best = Optional.of(set);
      }
    }
    return best;
  }

  @Override
  double discarded(boolean ofPaths) {
    return ofPaths ? discardedPaths : discardedCuts;
  }
}
