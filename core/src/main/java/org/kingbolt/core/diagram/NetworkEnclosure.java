package org.kingbolt.core.diagram;

import org.jspecify.annotations.Nullable;

/**
 * A network that no reduction takes apart, between two that can be worked out: one works less
 * often, the other one more often, and both come nearer with every step. Three means are used,
 * whichever is nearest: the network itself, once it fits; a sweep that follows the likeliest states
 * only; and excerpts with some of the links held.
 *
 * <p>For one thread.
 */
final class NetworkEnclosure {

  /** A frontier so wide, as a first glance tells, is not swept at all. */
  private static final int WIDE = 48;

  /** A frontier no wider than this is swept before anything else is tried. */
  private static final int NARROW = 24;

  /** With less effort no order is sought for one that is wider. */
  private static final long WORTH_A_PLAN = 1 << 21;

  /** Expected growth of the number of states with every node of the frontier. */
  private static final double GROWTH = 2.2;

  /** How far that guess may be off. */
  private static final double MARGIN = 100;

  /** With fewer states a layer a truncated sweep says little. */
  private static final long FEWEST_STATES = 4;

  private static final long MOST_STATES = 1 << 20;

  /** Sweeps that differ by less are as good as exact. */
  private static final double CLOSE = 1e-9;

  /** A step that leaves so much of the difference was idle; so many in a row are enough. */
  private static final double IDLE = 0.95;

  private static final int IDLE_STEPS = 2;

  private static final int EXCERPTS = 8;

  private enum Means {
    NOTHING,
    WHOLE,
    LIKELY_STATES,
    EXCERPT
  }

  private final NetworkProblem network;
  private final double[] works;
  private final double[] fails;
  private final int firstWidth;
  private final NetworkGrowth growth;
  private @Nullable FrontierPlan plan;

  private Means less = Means.NOTHING;
  private Means more = Means.NOTHING;
  private double mostFails = 1;
  private double leastFails;
  private int states;

  private long level;
  private boolean swept;
  private boolean grown;
  private int idle;
  private int changes;

  /**
   * Starts with nothing known.
   *
   * @param works indexed by slot: what the slots are likely to come to; a guide for choices
   */
  NetworkEnclosure(NetworkProblem network, double[] works, double[] fails, WorkMeter meter) {
    this.network = network;
    this.works = works;
    this.fails = fails;
    this.firstWidth = FrontierOrder.firstWidth(network, meter);
    this.growth = new NetworkGrowth(network, works, fails);
  }

  /** Whether the network itself is used. */
  boolean isExact() {
    return less == Means.WHOLE;
  }

  /** The distance between the two, by the guide. */
  double gap() {
    return mostFails - leastFails;
  }

  /**
   * Takes one step.
   *
   * @param effort how many nodes a sweep may hold
   * @param most how many nodes may be held at all; excerpts, which are only as large as they must
   *     be, may hold several times the effort
   * @return whether another step of this size may help
   */
  boolean step(long effort, long most, WorkMeter meter) {
    if (isExact()) {
      return false;
    }
    if (level != effort) {
      level = effort;
      boolean isWide = firstWidth > NARROW && !growth.hasManyTerminals();
      swept = firstWidth > WIDE || (isWide && effort < WORTH_A_PLAN);
      grown = false;
      idle = 0;
      growth.retry();
    }
    if (!swept && (grown || firstWidth <= NARROW || growth.hasManyTerminals())) {
      swept = true;
      sweep(effort, meter);
      return !isExact();
    }
    if (!grown) {
      grown = !grow(Math.min(most, EXCERPTS * effort), meter);
    }
    return !grown || !swept;
  }

  private void sweep(long most, WorkMeter meter) {
    FrontierPlan known = plan;
    if (known == null) {
      known = new FrontierPlan(network, meter);
      plan = known;
    }
    if (Math.pow(GROWTH, known.width()) <= MARGIN * most) {
      double[] both = new double[2];
      try {
        StateSweep.expect(known.rule(), works, fails, both, new Cap(meter, most));
        improve(Means.WHOLE, both[1], both[1]);
        return;
      } catch (Cap.Reached tooLarge) {
        // the likeliest states will do
      }
    }
    if (mostFails - leastFails > CLOSE * leastFails) {
      states = (int) Math.min(MOST_STATES, Math.max(FEWEST_STATES, most / (1 + known.decisions())));
      improve(Means.LIKELY_STATES, likely(known, true, meter), likely(known, false, meter));
    }
  }

  private double likely(FrontierPlan known, boolean lessWorking, WorkMeter meter) {
    int otherwise = otherwise(lessWorking);
    return TruncatedSweep.expect(known.rule(), works, fails, states, otherwise, meter)[1];
  }

  private void improve(Means means, double most, double least) {
    boolean whole = means == Means.WHOLE;
    if (whole || most < mostFails || (means == less && most <= mostFails)) {
      mostFails = most;
      less = means;
      changes++;
    }
    if (whole || least > leastFails || (means == more && least >= leastFails)) {
      leastFails = least;
      more = means;
      changes++;
    }
  }

  /** Counts the changes of what {@link #express} adds. */
  int changes() {
    return changes;
  }

  private static int otherwise(boolean lessWorking) {
    return lessWorking ? StateRule.SETTLED_FAILS : StateRule.SETTLED_WORKS;
  }

  private boolean grow(long most, WorkMeter meter) {
    if (mostFails - leastFails <= CLOSE * leastFails) {
      return false;
    }
    double before = growth.gap();
    boolean again = growth.step(most, meter);
    improve(Means.EXCERPT, growth.mostFails(), growth.leastFails());
    idle = growth.gap() > IDLE * before ? idle + 1 : 0;
    return again && idle < IDLE_STEPS;
  }

  /**
   * Adds what stands for the network to an expression.
   *
   * @param lessWorking whether it is to work at most as often as the network, or at least as often
   * @param monotone whether it must be monotone itself
   * @param dual whether the dual of the network is meant
   */
  int express(
      Composer composer,
      boolean lessWorking,
      boolean monotone,
      boolean dual,
      int[] parts,
      WorkMeter meter) {
    Means means = lessWorking ? less : more;
    if (monotone && means == Means.LIKELY_STATES) {
      boolean known = lessWorking ? growth.mostFails() < 1 : growth.leastFails() > 0;
      means = known ? Means.EXCERPT : Means.NOTHING;
    }
    return switch (means) {
      case NOTHING -> composer.operator(constant(lessWorking == dual), new int[0]);
      case EXCERPT -> {
        NetworkProblem excerpt = lessWorking ? growth.lessWorking() : growth.moreWorking();
        yield composer.network(excerpt, dual, parts, meter);
      }
      default -> {
        FrontierPlan known = plan;
        if (known == null) {
          throw new AssertionError("there is no plan");
        }
        Operator operator =
            means == Means.WHOLE
                ? Operator.swept(known.rule())
                : Operator.likely(known.rule(), works, fails, states, otherwise(lessWorking));
        yield composer.operator(dual ? Operator.dual(operator) : operator, parts);
      }
    };
  }

  private static Operator constant(boolean works) {
    return Templates.atLeast(works ? 0 : 1, 0);
  }
}
