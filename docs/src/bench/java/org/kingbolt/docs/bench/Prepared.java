package org.kingbolt.docs.bench;

import java.util.Map;
import java.util.function.DoubleSupplier;

/**
 * A workload with its input at hand. Every call gives the number by which one sees that all sides
 * do the same work.
 *
 * @param size of the input
 * @param unit in which the size is counted
 * @param result what the number is
 * @param ours the library's side
 * @param peers the other sides by name
 */
record Prepared(
    long size, String unit, String result, DoubleSupplier ours, Map<String, DoubleSupplier> peers) {

  static final String OURS = "ours";
  static final String NODES = "nodes";

  DoubleSupplier side(String name) {
    return name.equals(OURS) ? ours : peers.getOrDefault(name, ours);
  }
}
