package org.kingbolt.docs.bench;

import java.util.List;
import java.util.function.Supplier;

/**
 * A row of the table, or one for each peer: a question that is asked again and again of one input.
 *
 * @param name unique
 * @param effort how often it is measured
 * @param peers what it is compared with, by the names in {@link Prepared#peers()}
 * @param preparation makes the input, the same every time
 */
record Workload(String name, Effort effort, List<String> peers, Supplier<Prepared> preparation) {}
