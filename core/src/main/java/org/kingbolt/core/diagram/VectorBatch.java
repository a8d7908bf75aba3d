package org.kingbolt.core.diagram;

/**
 * The vectors that are to be evaluated, and where the results go. All threads of a call share it;
 * none writes to the results of another's vectors.
 */
final class VectorBatch {

  private final double[][] working;
  private final double[][] failing;
  private final double[] works;
  private final double[] fails;
  private final long held;

  /**
   * Takes the arrays as they are.
   *
   * @param working by vector and variable
   * @param failing by vector and variable
   * @param works results by vector
   * @param fails results by vector
   * @param held what the passes of all threads hold, in counted nodes
   */
  VectorBatch(double[][] working, double[][] failing, double[] works, double[] fails, long held) {
    this.working = working;
    this.failing = failing;
    this.works = works;
    this.fails = fails;
    this.held = held;
  }

  double[][] working() {
    return working;
  }

  double[][] failing() {
    return failing;
  }

  double[] works() {
    return works;
  }

  double[] fails() {
    return fails;
  }

  long held() {
    return held;
  }
}
