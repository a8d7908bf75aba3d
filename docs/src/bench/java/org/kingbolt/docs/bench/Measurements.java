package org.kingbolt.docs.bench;

import java.io.IOException;
import java.io.InputStream;
import java.io.UncheckedIOException;
import java.lang.ProcessBuilder.Redirect;
import java.nio.charset.StandardCharsets;
import java.util.ArrayList;
import java.util.Collections;
import java.util.List;
import java.util.OptionalDouble;
import org.openjdk.jmh.runner.Runner;
import org.openjdk.jmh.runner.RunnerException;
import org.openjdk.jmh.runner.options.Options;
import org.openjdk.jmh.runner.options.OptionsBuilder;
import org.openjdk.jmh.runner.options.TimeValue;
import org.openjdk.jmh.runner.options.VerboseMode;

/** Measures workloads and prints the table of docs/performance.md. */
public final class Measurements {

  private static final String HEAP = "-Xmx12g";

  /** One line of the table holds at most one peer. */
  private static final String NO_PEER = "–";

  private Measurements() {}

  /**
   * Measures the workloads whose names match.
   *
   * @param args a regular expression, and whether to measure once and briefly, as a trial
   */
  public static void main(String[] args) {
    int failures = 0;
    boolean brief = Boolean.parseBoolean(args[1]);
    Table table =
        new Table(
            "workload", "size", "result", "ours warm", "per unit", "ours cold", "peer", "ratio");
    for (Workload workload : Workloads.all()) {
      if (workload.name().matches(args[0])) {
        System.err.println(workload.name());
        try {
          measure(workload, brief ? Effort.BRIEF : workload.effort(), table);
        } catch (IllegalStateException failure) {
          failure.printStackTrace();
          failures++;
        }
      }
    }
    System.out.printf(
        "JDK %s, %d processors, heap %s, %s%n%n%s",
        System.getProperty("java.vm.version"),
        Runtime.getRuntime().availableProcessors(),
        HEAP,
        System.getProperty("os.arch"),
        table);
    System.exit(failures);
  }

  private static void measure(Workload workload, Effort effort, Table table) {
    List<Double> times = new ArrayList<>();
    List<String> cold = List.of();
    for (int i = 0; i < effort.coldStarts; i++) {
      cold = coldStart(workload.name(), i == 0);
      times.add(Double.parseDouble(cold.get(0)));
    }
    Collections.sort(times);
    double size = Double.parseDouble(cold.get(1));
    OptionalDouble ours = warm(workload, Prepared.OURS, effort);
    double median = times.get(times.size() / 2);
    List<String> start =
        List.of(
            workload.name(),
            Table.number(size) + " " + cold.get(2),
            Table.number(Double.parseDouble(cold.get(3))) + " " + cold.get(4),
            ours.isPresent() ? Table.time(ours.getAsDouble()) : NO_PEER,
            Table.time(ours.orElse(median) / size),
            Table.time(median));
    if (workload.peers().isEmpty()) {
      table.add(start, NO_PEER, NO_PEER);
    }
    for (String peer : workload.peers()) {
      double theirs = warm(workload, peer, effort).orElseThrow();
      table.add(start, peer + " " + Table.time(theirs), Table.ratio(ours.orElseThrow() / theirs));
    }
  }

  /** The median in nanoseconds. */
  private static OptionalDouble warm(Workload workload, String side, Effort effort) {
    if (effort.forks == 0) {
      return OptionalDouble.empty();
    }
    Options options =
        new OptionsBuilder()
            .include(WorkloadBenchmark.class.getName())
            .param("workload", workload.name())
            .param("side", side)
            .forks(effort.forks)
            .warmupIterations(effort.warmups)
            .warmupTime(TimeValue.seconds(1))
            .measurementIterations(effort.measurements)
            .measurementTime(TimeValue.seconds(1))
            .jvmArgs(HEAP)
            .shouldFailOnError(true)
            .verbosity(VerboseMode.SILENT)
            .build();
    try {
      return OptionalDouble.of(
          new Runner(options).runSingle().getPrimaryResult().getStatistics().getPercentile(50));
    } catch (RunnerException e) {
      throw new IllegalStateException(workload.name() + ", " + side, e);
    }
  }

  private static List<String> coldStart(String workload, boolean compare) {
    ProcessBuilder java =
        new ProcessBuilder(
                System.getProperty("java.home") + "/bin/java",
                HEAP,
                "-cp",
                System.getProperty("java.class.path"),
                ColdStart.class.getName(),
                workload,
                String.valueOf(compare))
            .redirectError(Redirect.INHERIT);
    try {
      Process process = java.start();
      try (InputStream out = process.getInputStream()) {
        List<String> lines =
            new String(out.readAllBytes(), StandardCharsets.UTF_8).lines().toList();
        if (process.waitFor() != 0) {
          throw new IllegalStateException(workload + ": the cold start failed");
        }
        return lines;
      }
    } catch (IOException e) {
      throw new UncheckedIOException(e);
    } catch (InterruptedException e) {
      throw new IllegalStateException(e);
    }
  }
}
