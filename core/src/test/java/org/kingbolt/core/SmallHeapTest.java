package org.kingbolt.core;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.IOException;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.concurrent.TimeUnit;
import org.junit.jupiter.api.Tag;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.EnumSource;
import org.kingbolt.core.testing.FewOfMany;
import org.kingbolt.core.testing.TooLarge;

/** In a heap of 256 MB, work that is too large ends by its budget, never by the heap itself. */
@Tag("slow")
class SmallHeapTest {

  @TempDir Path directory;

  @ParameterizedTest
  @EnumSource(TooLarge.class)
  void largeWork_endsByItsBudget(TooLarge question) throws IOException, InterruptedException {
    List<String> lines = run(TooLarge.class, question.name());
    String limit = question == TooLarge.DERIVATION ? "TIME" : "NODES";
    assertEquals("BudgetExceededException " + limit, lines.get(0), lines::toString);
    assertTrue(lines.get(1).contains("while " + question.work), lines::toString);
  }

  /** C(40, 20) sets, counted, and ten of them each way. */
  @Test
  void fewOfVeryManySets_areThereAtOnce() throws IOException, InterruptedException {
    assertEquals(List.of("137846528820 10 10"), run(FewOfMany.class));
  }

  /** What a program prints in a heap of 256 MB, within two minutes. */
  private List<String> run(Class<?> program, String... args)
      throws IOException, InterruptedException {
    Path output = directory.resolve("output");
    List<String> command =
        new ArrayList<>(
            List.of(
                Path.of(System.getProperty("java.home"), "bin", "java").toString(),
                "-Xmx256m",
                "-cp",
                System.getProperty("java.class.path"),
                program.getName()));
    command.addAll(List.of(args));
    Process process =
        new ProcessBuilder(command)
            .redirectErrorStream(true)
            .redirectOutput(output.toFile())
            .start();
    boolean ended = process.waitFor(120, TimeUnit.SECONDS);
    process.destroyForcibly().waitFor();
    List<String> lines = Files.readAllLines(output, StandardCharsets.UTF_8);
    assertTrue(ended, () -> "not done after two minutes: " + lines);
    return lines;
  }
}
