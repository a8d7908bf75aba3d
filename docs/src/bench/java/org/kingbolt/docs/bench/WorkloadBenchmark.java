package org.kingbolt.docs.bench;

import java.util.concurrent.TimeUnit;
import java.util.function.DoubleSupplier;
import org.openjdk.jmh.annotations.Benchmark;
import org.openjdk.jmh.annotations.BenchmarkMode;
import org.openjdk.jmh.annotations.Mode;
import org.openjdk.jmh.annotations.OutputTimeUnit;
import org.openjdk.jmh.annotations.Param;
import org.openjdk.jmh.annotations.Scope;
import org.openjdk.jmh.annotations.Setup;
import org.openjdk.jmh.annotations.State;

/** Calls one side of one workload. */
@State(Scope.Benchmark)
@BenchmarkMode(Mode.SampleTime)
@OutputTimeUnit(TimeUnit.NANOSECONDS)
public class WorkloadBenchmark {

  /** The workload's name. */
  @Param({})
  public String workload;

  /** Ours, or the name of a peer. */
  @Param({})
  public String side;

  private DoubleSupplier call;

  /** Makes the input. */
  @Setup
  public void prepare() {
    call = Workloads.named(workload).preparation().get().side(side);
  }

  /**
   * What is timed.
   *
   * @return the workload's number
   */
  @Benchmark
  public double call() {
    return call.getAsDouble();
  }
}
