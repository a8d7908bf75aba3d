package org.kingbolt.core.diagram;

import java.util.ArrayList;
import java.util.List;
import java.util.concurrent.CancellationException;
import java.util.concurrent.atomic.AtomicInteger;
import java.util.concurrent.atomic.AtomicReference;

/**
 * Evaluates one diagram for many vectors, a run of vectors at a time, on several threads. Every
 * vector's result has the bits that {@link Evaluation#of} gives, whatever the threads and runs.
 *
 * <p>Where few nodes are needed at once, a run takes up to {@value #MOST_VECTORS} vectors through
 * every node together, in vector instructions. Vectors go one by one where that would be slower: in
 * a wide diagram, whose rows would not stay in cache, and in a long and narrow one, where reading
 * the vectors side by side costs more than the nodes. The scratch is kept from call to call: for
 * one caller at a time. Threads are started for a call and have ended when it returns.
 *
 * <p>Memory: 4 bytes a node, and for every thread at most {@value #MOST_BYTES} bytes or 16 bytes a
 * node.
 */
public final class BatchScan {

  private static final int MOST_VECTORS = 64;
  private static final int FEWEST_VECTORS = 8;
  private static final long MOST_BYTES = 1 << 24;
  private static final int LONG = 1 << 12;
  private static final int NARROW = 4;

  private final Diagram diagram;
  private final RowPlan plan;
  private final int mostVectors;
  private final List<VectorPass> rowPasses = new ArrayList<>();
  private final List<VectorPass> singlePasses = new ArrayList<>();

  /**
   * Prepares.
   *
   * @param diagram any diagram
   */
  public BatchScan(Diagram diagram) {
    this.diagram = diagram;
    this.plan = RowPlan.of(diagram);
    int most = MOST_VECTORS;
    while (most >= FEWEST_VECTORS && RowPass.bytes(plan, most) > MOST_BYTES) {
      most >>= 1;
    }
    boolean isLong = diagram.levels() > LONG;
    this.mostVectors = isLong && diagram.nodeCount() / NARROW < diagram.levels() ? 1 : most;
  }

  /**
   * Evaluates.
   *
   * @param working by vector and variable: probability of working, from 0 to 1
   * @param failing by vector and variable: the complement
   * @param works results by vector
   * @param fails results by vector
   * @param threads how many threads to work on, the caller's own among them; at least 1
   * @param meter hears from the caller's thread, between runs of nodes; ends the others too
   */
  public void run(
      double[][] working,
      double[][] failing,
      double[] works,
      double[] fails,
      int threads,
      WorkMeter meter) {
    int vectors = works.length;
    if (vectors == 0) {
      return;
    }
    int together = Math.min(mostVectors, (vectors - 1) / threads + 1);
    boolean byRows = together >= FEWEST_VECTORS;
    int blocks = byRows ? (vectors - 1) / together + 1 : vectors;
    int workers = Math.min(threads, blocks);
    if (byRows) {
      // as many for each worker
      blocks = ((blocks - 1) / workers + 1) * workers;
    }
    long bytes = byRows ? RowPass.bytes(plan, mostVectors) : SinglePass.bytes(diagram);
    long held = (bytes * workers + 4L * diagram.size()) / WorkMeter.BYTES_PER_NODE;
    meter.at(held);
    List<VectorPass> passes = passes(byRows, workers);
    new Crew(new VectorBatch(working, failing, works, fails, held), blocks)
        .work(passes.subList(0, workers), meter);
  }

  private List<VectorPass> passes(boolean byRows, int workers) {
    List<VectorPass> passes = byRows ? rowPasses : singlePasses;
    while (passes.size() < workers) {
      passes.add(byRows ? new RowPass(diagram, plan, mostVectors) : new SinglePass(diagram));
    }
    return passes;
  }

  /** The threads of one call: each takes the next block until none is left or one has failed. */
  private static final class Crew {
    private final VectorBatch batch;
    private final int blocks;
    private final AtomicInteger next = new AtomicInteger();
    private final AtomicReference<Throwable> failure = new AtomicReference<>();

    Crew(VectorBatch batch, int blocks) {
      this.batch = batch;
      this.blocks = blocks;
    }

    void work(List<VectorPass> passes, WorkMeter meter) {
      List<Thread> helpers = new ArrayList<>();
      try {
        for (VectorPass pass : passes.subList(1, passes.size())) {
          Thread helper = new Thread(() -> takeBlocks(pass, held -> stopIfFailed()));
          helper.setName("kingbolt-batch-" + (helpers.size() + 2));
          helper.setDaemon(true);
          helper.start();
          helpers.add(helper);
        }
        takeBlocks(
            passes.get(0),
            held -> {
              stopIfFailed();
              meter.at(held);
            });
      } catch (RuntimeException | Error failed) {
        failure.compareAndSet(null, failed);
      }
      await(helpers);
      Throwable failed = failure.get();
      if (failed instanceof RuntimeException exception) {
        throw exception;
      }
      if (failed instanceof Error error) {
        throw error;
      }
    }

    private void takeBlocks(VectorPass pass, WorkMeter meter) {
      int vectors = batch.works().length;
      try {
        for (int block = next.getAndIncrement(); block < blocks; block = next.getAndIncrement()) {
          int first = (int) ((long) vectors * block / blocks);
          int end = (int) ((long) vectors * (block + 1) / blocks);
          pass.run(batch, first, end - first, meter);
        }
      } catch (RuntimeException | Error failed) {
        failure.compareAndSet(null, failed);
      }
    }

    private void stopIfFailed() {
      if (failure.get() != null) {
        throw new CancellationException();
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
}
