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

  private static final String NOTHING = "–";

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
    List<String> cold = coldStart(workload.name(), true);
    List<Double> times = new ArrayList<>();
    times.add(Double.parseDouble(cold.get(0)));
    while (times.size() < effort.coldStarts) {
      times.add(Double.parseDouble(coldStart(workload.name(), false).get(0)));
    }
    Collections.sort(times);
    double first = times.get(times.size() / 2);
    double size = Double.parseDouble(cold.get(1));
    OptionalDouble ours = warm(workload, Prepared.OURS, effort);
    List<String> start =
        List.of(
            workload.name(),
            Table.number(size) + " " + cold.get(2),
            result(cold, 3),
            ours.isPresent() ? Table.time(ours.getAsDouble()) : NOTHING,
            Table.time(ours.orElse(first) / size),
            Table.time(first));
    if (workload.peers().isEmpty()) {
      table.add(start, NOTHING, NOTHING);
    }
    for (String peer : workload.peers()) {
      double theirs = warm(workload, peer, effort).orElseThrow();
      int number = cold.lastIndexOf(peer) + 1;
      boolean differs = cold.get(4).equals(Prepared.NODES) && !cold.get(number).equals(cold.get(3));
      table.add(
          start,
          peer + (differs ? ", " + result(cold, number) + "," : "") + " " + Table.time(theirs),
          Table.ratio(ours.orElseThrow() / theirs));
    }
  }

  private static String result(List<String> cold, int line) {
    return Table.number(Double.parseDouble(cold.get(line))) + " " + cold.get(4);
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
