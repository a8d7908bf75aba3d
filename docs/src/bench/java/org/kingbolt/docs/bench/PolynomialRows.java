package org.kingbolt.docs.bench;

import java.math.BigDecimal;
import java.math.BigInteger;
import java.math.MathContext;
import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import java.util.Map;
import java.util.function.DoubleSupplier;
import java.util.function.Supplier;
import java.util.stream.IntStream;
import org.kingbolt.core.ReliabilityPolynomial;
import org.kingbolt.core.Structure;
import org.kingbolt.core.diagram.Diagram;
import org.kingbolt.core.published.Topology;

/** Exact polynomials, compiled and counted anew at every call. */
final class PolynomialRows {

  private static final String LOOP = "plain loop";
  private static final int MANY = 2_000;

  private PolynomialRows() {}

  static List<Workload> rows() {
    List<Workload> rows = new ArrayList<>();
    rows.add(row("6x12 grid: polynomial", true, () -> grid(6, 12)));
    rows.add(
        row("6x12 grid, all nodes: polynomial", true, () -> Inputs.grid(6, 12).connectingAll()));
    rows.add(row("10x10 grid: polynomial", false, () -> grid(10, 10)));
    rows.add(row("6x50 grid: polynomial", false, () -> grid(6, 50)));
    rows.add(row("IEEE 118-bus, first to last bus: polynomial", true, () -> buses("ieee118")));
    rows.add(row("IEEE 300-bus, first to last bus: polynomial", false, () -> buses("ieee300")));
    rows.add(row(MANY + " in parallel: polynomial", false, () -> Structure.parallel(names())));
    rows.add(
        new Workload(
            MANY + " in parallel: polynomial by powers",
            Effort.USUAL,
            List.of(),
            PolynomialRows::powers));
    return rows;
  }

  private static Structure grid(int width, int length) {
    return Inputs.grid(width, length).connecting(Inputs.corners(width, length));
  }

  private static Structure buses(String file) {
    Topology network = Topology.file(file);
    String last =
        network.nodes().stream().max(Comparator.comparingInt(Integer::parseInt)).orElseThrow();
    return network.connecting("1", last);
  }

  private static String[] names() {
    return IntStream.range(0, MANY).mapToObj(i -> "c" + i).toArray(String[]::new);
  }

  private static Workload row(String name, boolean peer, Supplier<Structure> input) {
    return new Workload(
        name,
        Effort.USUAL,
        peer ? List.of(LOOP) : List.of(),
        () -> {
          Structure structure = input.get();
          DoubleSupplier ours = () -> structure.compile().polynomial().at(0.5).working();
          DoubleSupplier loop = () -> workingShare(structure.compile().diagram());
          return new Prepared(
              structure.components().size(),
              "components",
              "working at 1/2",
              ours,
              peer ? Map.of(LOOP, loop) : Map.of());
        });
  }

  private static Prepared powers() {
    Structure structure = Structure.parallel(names());
    return new Prepared(
        MANY,
        "components",
        "coefficient of p",
        () -> {
          ReliabilityPolynomial polynomial = structure.compile().polynomial();
          return polynomial.coefficients().get(1).doubleValue();
        },
        Map.of());
  }

  /** The peer keeps the counts of every node in one large integer, and lifts every edge anew. */
  private static double workingShare(Diagram diagram) {
    int levels = diagram.levels();
    int block = levels + 1;
    BigInteger free = BigInteger.ONE.add(BigInteger.ONE.shiftLeft(block));
    BigInteger[] counts = new BigInteger[diagram.size()];
    int[] levelOf = new int[diagram.size()];
    counts[Diagram.FAILS] = BigInteger.ZERO;
    counts[Diagram.WORKS] = BigInteger.ONE;
    levelOf[Diagram.FAILS] = levels;
    levelOf[Diagram.WORKS] = levels;
    for (int level = levels - 1; level >= 0; level--) {
      for (int id = diagram.from(level); id < diagram.to(level); id++) {
        levelOf[id] = level;
        int low = diagram.low(id);
        int high = diagram.high(id);
        BigInteger lifted = counts[high].multiply(free.pow(levelOf[high] - level - 1));
        counts[id] =
            counts[low].multiply(free.pow(levelOf[low] - level - 1)).add(lifted.shiftLeft(block));
      }
    }
    BigInteger all = counts[diagram.root()].multiply(free.pow(levelOf[diagram.root()]));
    BigInteger mask = BigInteger.ONE.shiftLeft(block).subtract(BigInteger.ONE);
    BigInteger sum = BigInteger.ZERO;
    for (int j = 0; j <= levels; j++) {
      sum = sum.add(all.shiftRight(j * block).and(mask));
    }
    return new BigDecimal(sum)
        .divide(new BigDecimal(BigInteger.TWO.pow(levels)), MathContext.DECIMAL64)
        .doubleValue();
  }
}
