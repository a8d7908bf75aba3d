package org.kingbolt.bounds;

import java.util.ArrayList;
import java.util.List;
import java.util.concurrent.CancellationException;
import java.util.concurrent.atomic.AtomicLong;
import java.util.concurrent.atomic.AtomicReference;
import org.kingbolt.core.Budget;
import org.kingbolt.core.diagram.WorkMeter;

/**
 * The threads of one simulation. Trials come in batches of one size, each with a generator of its
 * own, and what is added up is whole numbers: the sum does not depend on who draws which batch.
 *
 * <p>Threads are started for a call and have ended when it returns. For one caller.
 */
final class SimulationCrew {

  /** Trials in a batch. */
  static final int BATCH = 256;

  private static final int MASK = 63;

  /** What has been drawn. */
  record Tally(long samples, long hits) {

    static final Tally NOTHING = new Tally(0, 0);

    Tally plus(Tally more) {
      return new Tally(samples + more.samples, hits + more.hits);
    }
  }

  private final SimulationModel model;
  private final long seed;
  private final int threads;
  private final long started;
  private final long allowed;
  private final List<SimulationTrial> trials = new ArrayList<>();
  private final WorkMeter meter = Budget.ofNodes(1).start("simulating");

  /**
   * Prepares.
   *
   * @param started when the clock started, in nanoseconds
   * @param allowed for how many nanoseconds further batches may be begun
   */
  SimulationCrew(SimulationModel model, long seed, int threads, long started, long allowed) {
    this.model = model;
    this.seed = seed;
    this.threads = threads;
    this.started = started;
    this.allowed = allowed;
  }

  boolean isTimeOver() {
    return System.nanoTime() - started > allowed;
  }

  /**
   * Draws more trials of a stage.
   *
   * @param done what the stage has drawn so far, a multiple of a batch
   * @param samples how many it shall have drawn
   * @return what it has drawn; fewer when the time is over, but at least one batch more
   */
  Tally draw(long stage, Tally done, long samples) {
    Work work = new Work(stage, done.samples / BATCH, samples);
    long batches = (samples - 1) / BATCH + 1 - work.first;
    while (trials.size() < Math.min(batches, threads)) {
      trials.add(model.trials().get());
    }
    List<Thread> helpers = new ArrayList<>();
    try {
      for (SimulationTrial trial : trials.subList(1, (int) Math.min(batches, trials.size()))) {
        Thread helper = new Thread(() -> work.takeBatches(trial, false));
        helper.setName("kingbolt-simulation-" + (helpers.size() + 2));
        helper.setDaemon(true);
        helper.start();
        helpers.add(helper);
      }
      work.takeBatches(trials.get(0), true);
    } catch (RuntimeException | Error failed) {
      work.failure.compareAndSet(null, failed);
    }
    await(helpers);
    return done.plus(work.tally());
  }

  /** Batches are taken in order, and every one that is taken is drawn. */
  private final class Work {
    private final long stage;
    private final long first;
    private final long samples;
    private final AtomicLong next;
    private final AtomicLong drawn = new AtomicLong();
    private final AtomicLong hits = new AtomicLong();
    private final AtomicReference<Throwable> failure = new AtomicReference<>();

    Work(long stage, long first, long samples) {
      this.stage = stage;
      this.first = first;
      this.samples = samples;
      this.next = new AtomicLong(first);
    }

    void takeBatches(SimulationTrial trial, boolean own) {
      try {
        while (true) {
          if (isTimeOver() && next.get() > first) {
            return;
          }
          long batch = next.getAndIncrement();
          int size = (int) Math.min(BATCH, samples - batch * BATCH);
          if (size <= 0) {
            return;
          }
          SimulationRandom random = new SimulationRandom(seed, stage, batch);
          int found = 0;
          for (int i = 0; i < size; i++) {
            if ((i & MASK) == 0) {
              look(own);
            }
            found += trial.hits(random) ? 1 : 0;
          }
          drawn.addAndGet(size);
          hits.addAndGet(found);
        }
      } catch (RuntimeException | Error failed) {
        failure.compareAndSet(null, failed);
      }
    }

    private void look(boolean own) {
      if (failure.get() != null) {
        throw new CancellationException();
      }
      if (own) {
        meter.now(0);
      }
    }

    Tally tally() {
      Throwable failed = failure.get();
      if (failed instanceof RuntimeException exception) {
        throw exception;
      }
      if (failed instanceof Error error) {
        throw error;
      }
      return new Tally(drawn.get(), hits.get());
    }
  }

  /** Waits to the end even when interrupted, and leaves the interrupt for the caller to see. */
  private static void await(List<Thread> helpers) {
    boolean interrupted = false;
    for (Thread helper : helpers) {
      while (helper.isAlive()) {
        try {
          helper.join();
        } catch (InterruptedException e) {
          interrupted = true;
        }
      }
    }
    if (interrupted) {
      Thread.currentThread().interrupt();
    }
  }
}
