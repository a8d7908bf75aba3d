package org.kingbolt.docs.bench;

/** How often a workload is measured; a warm-up or a measurement lasts a second, or one call. */
enum Effort {
  /** For calls of up to a second or so. */
  USUAL(2, 1, 1, 3),

  /** For calls of several seconds. */
  LONG(1, 1, 1, 1),

  /** For calls of minutes: once, in a fresh virtual machine. */
  ONCE(0, 0, 0, 1),

  /** To see whether everything runs; the figures mean nothing. */
  BRIEF(1, 0, 1, 1);

  final int forks;
  final int warmups;
  final int measurements;
  final int coldStarts;

  Effort(int forks, int warmups, int measurements, int coldStarts) {
    this.forks = forks;
    this.warmups = warmups;
    this.measurements = measurements;
    this.coldStarts = coldStarts;
  }
}
