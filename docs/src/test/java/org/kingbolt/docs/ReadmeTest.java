package org.kingbolt.docs;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertNull;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.ByteArrayOutputStream;
import java.io.IOException;
import java.io.PrintStream;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.regex.Matcher;
import java.util.regex.Pattern;
import java.util.stream.Collectors;
import java.util.stream.Stream;
import jdk.jshell.JShell;
import jdk.jshell.Snippet;
import jdk.jshell.SnippetEvent;
import jdk.jshell.SourceCodeAnalysis;
import org.junit.jupiter.api.DynamicTest;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.TestFactory;

/** Runs the README's code blocks in JShell and compares what they print with what it says. */
class ReadmeTest {

  private static final Pattern BLOCK =
      Pattern.compile("```java\\n(.*?)```[^`]*```text\\n(.*?)```", Pattern.DOTALL);

  private static final Path README = Path.of("..", "README.md");

  @TestFactory
  Stream<DynamicTest> codeBlocks_printWhatTheReadmeSays() throws IOException {
    List<DynamicTest> tests = new ArrayList<>();
    Matcher blocks = BLOCK.matcher(Files.readString(README));
    while (blocks.find()) {
      String code = blocks.group(1);
      String output = blocks.group(2);
      tests.add(
          DynamicTest.dynamicTest(
              "block " + (tests.size() + 1), () -> assertEquals(output, printed(code))));
    }
    assertTrue(tests.size() >= 2, "the README has fewer code blocks than expected");
    return tests.stream();
  }

  @Test
  void testCommand_isTheOneThatContinuousIntegrationRuns() throws IOException {
    String last =
        Files.readString(Path.of("..", ".ci", "run")).lines().reduce("", (a, b) -> b).strip();
    assertTrue(
        Files.readString(README).contains("Run the tests:\n\n```sh\n" + last + "\n```"), last);
  }

  private static String printed(String code) {
    ByteArrayOutputStream out = new ByteArrayOutputStream();
    try (PrintStream stream = new PrintStream(out, true, StandardCharsets.UTF_8);
        JShell shell =
            JShell.builder()
                .out(stream)
                .err(stream)
                .remoteVMOptions("-Dstdout.encoding=UTF-8", "-Dfile.encoding=UTF-8")
                .build()) {
      String path = System.getProperty("surefire.test.class.path");
      shell.addToClasspath(path == null ? System.getProperty("java.class.path") : path);
      String open = "";
      for (String line : code.lines().toList()) {
        // as somebody types it: what is complete at the end of a line is run there and then
        open += line + "\n";
        SourceCodeAnalysis.CompletionInfo typed =
            shell.sourceCodeAnalysis().analyzeCompletion(open);
        while (typed.completeness().isComplete() && !open.isBlank()) {
          for (SnippetEvent event : shell.eval(typed.source())) {
            assertEquals(
                Snippet.Status.VALID, event.status(), () -> faults(shell, event.snippet()));
            assertNull(event.exception(), () -> String.valueOf(event.exception()));
          }
          open = typed.remaining();
          typed = shell.sourceCodeAnalysis().analyzeCompletion(open);
        }
      }
      assertEquals("", open.strip(), "code that is not complete");
    }
    return out.toString(StandardCharsets.UTF_8).replace(System.lineSeparator(), "\n");
  }

  private static String faults(JShell shell, Snippet snippet) {
    return snippet.source()
        + shell
            .diagnostics(snippet)
            .map(diagnostic -> diagnostic.getMessage(null))
            .collect(Collectors.joining("\n", "\n", ""));
  }
}
