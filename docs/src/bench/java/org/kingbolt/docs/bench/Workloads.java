package org.kingbolt.docs.bench;

import java.util.List;
import java.util.stream.Stream;

/** All rows of the table. */
final class Workloads {

  private Workloads() {}

  static List<Workload> all() {
    return Stream.of(
            GridRows.rows(),
            ReliabilityRows.rows(),
            BusRows.rows(),
            GateRows.rows(),
            ScanRows.rows(),
            PolynomialRows.rows(),
            IntervalRows.rows(),
            SetRows.rows(),
            ImportanceRows.rows(),
            PlanRows.rows(),
            SimulationRows.rows())
        .flatMap(List::stream)
        .toList();
  }

  static Workload named(String name) {
    return all().stream()
        .filter(workload -> workload.name().equals(name))
        .findFirst()
        .orElseThrow(() -> new IllegalArgumentException("no workload is named " + name));
  }
}
