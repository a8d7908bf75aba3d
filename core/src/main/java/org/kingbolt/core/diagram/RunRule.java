package org.kingbolt.core.diagram;

/**
 * Consecutive-k-out-of-n:F, in a line or around a circle. State: the length of the run of failures
 * that ends here and, around a circle, of the run that began at the first slot.
 *
 * <p>Source of the recurrence: Derman, Lieberman &amp; Ross, On the consecutive-k-of-n:F system,
 * IEEE Trans. Reliab. 31 (1982) 57 (from memory).
 */
final class RunRule implements StateRule {

  /** Stands in the second word while no slot has worked yet. */
  private static final long UNBROKEN = -1;

  private final int run;
  private final int slots;
  private final boolean around;

  RunRule(int run, int slots, boolean around) {
    this.run = run;
    this.slots = slots;
    this.around = around;
  }

  @Override
  public int steps() {
    return slots;
  }

  @Override
  public int slot(int step) {
    return step;
  }

  @Override
  public int start(StateWords out) {
    return settle(0, 0, around ? UNBROKEN : 0, out);
  }

  @Override
  public int next(int step, boolean works, long[] pool, int at, int length, StateWords out) {
    long trailing = pool[at];
    long leading = pool[at + 1];
    if (!works) {
      return settle(step + 1, trailing + 1, leading, out);
    }
    return settle(step + 1, 0, leading == UNBROKEN ? trailing : leading, out);
  }

  private int settle(int step, long trailing, long leading, StateWords out) {
    if (trailing >= run) {
      return SETTLED_FAILS;
    }
    long wrapped = leading == UNBROKEN ? 0 : leading;
    int left = slots - step;
    if (trailing + left + wrapped < run) {
      return SETTLED_WORKS;
    }
    if (left == 0) {
      return SETTLED_FAILS;
    }
    out.add(trailing);
    out.add(leading);
    return CONTINUES;
  }
}
