package org.kingbolt.docs;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.Set;
import java.util.TreeSet;
import java.util.regex.Matcher;
import java.util.regex.Pattern;
import java.util.stream.Stream;
import org.junit.jupiter.api.Test;

/** Holds that docs/checks.md and the tests that it lists agree. */
class ChecksPageTest {

  private static final Path MODULES = Path.of("..");
  private static final Path PUBLISHED =
      MODULES.resolve("core/src/test/java/org/kingbolt/core/published");
  private static final Set<String> MARKS = Set.of("seen", "from memory", "our own recomputation");

  private static final Pattern NAMED_TEST = Pattern.compile("`(\\w+)\\.(\\w+)`");
  private static final Pattern ANNOTATION =
      Pattern.compile("  @(Test|ParameterizedTest|Property|TestFactory)\\b.*");
  private static final Pattern METHOD = Pattern.compile("  \\w[^=;]*?(\\w+)\\(.*");

  @Test
  void everyRow_hasASourceAMarkAndTests() throws IOException {
    for (List<String> row : rows()) {
      assertEquals(4, row.size(), row.toString());
      assertFalse(row.get(0).isEmpty() || row.get(1).isEmpty(), row.toString());
      assertTrue(MARKS.contains(row.get(2)), row.toString());
      assertTrue(NAMED_TEST.matcher(row.get(3)).matches(), row.toString());
    }
  }

  @Test
  void everyTestThatIsNamed_exists() throws IOException {
    Set<String> existing = new TreeSet<>();
    for (Path file : testClasses(MODULES)) {
      testMethods(file).forEach(method -> existing.add(className(file) + "." + method));
    }
    Set<String> missing = named();
    assertTrue(missing.size() >= 50, "the page names fewer tests than expected");
    missing.removeAll(existing);
    assertEquals(Set.of(), missing);
  }

  @Test
  void everyClassOfPublishedValues_isNamed() throws IOException {
    Set<String> classes = new TreeSet<>();
    for (Path file : testClasses(PUBLISHED)) {
      if (!testMethods(file).isEmpty()) {
        classes.add(className(file));
      }
    }
    assertTrue(classes.size() >= 10, () -> "fewer classes than expected: " + classes);
    named().forEach(test -> classes.remove(test.substring(0, test.indexOf('.'))));
    assertEquals(Set.of(), classes);
  }

  /** The cells of all tables, without their headings. */
  private static List<List<String>> rows() throws IOException {
    List<List<String>> rows = new ArrayList<>();
    for (String line : Files.readAllLines(Path.of("checks.md"))) {
      boolean heading = line.startsWith("| source ") || line.startsWith("| --- ");
      if (line.startsWith("|") && !heading) {
        rows.add(List.of(line.substring(2, line.length() - 2).split(" \\| ", -1)));
      }
    }
    return rows;
  }

  private static Set<String> named() throws IOException {
    Set<String> names = new TreeSet<>();
    for (List<String> row : rows()) {
      Matcher name = NAMED_TEST.matcher(row.get(row.size() - 1));
      while (name.find()) {
        names.add(name.group(1) + "." + name.group(2));
      }
    }
    return names;
  }

  private static List<Path> testClasses(Path folder) throws IOException {
    try (Stream<Path> files = Files.walk(folder)) {
      return files
          .filter(file -> file.toString().replace('\\', '/').contains("/src/test/java/"))
          .filter(file -> file.toString().endsWith(".java"))
          .sorted()
          .toList();
    }
  }

  private static String className(Path file) {
    return file.getFileName().toString().replace(".java", "");
  }

  /** Methods of the outer class that stand below a test's annotation. */
  private static Set<String> testMethods(Path file) throws IOException {
    Set<String> methods = new TreeSet<>();
    boolean annotated = false;
    for (String line : Files.readAllLines(file)) {
      annotated |= ANNOTATION.matcher(line).matches();
      Matcher method = METHOD.matcher(line);
      if (annotated && method.matches()) {
        methods.add(method.group(1));
        annotated = false;
      }
    }
    return methods;
  }
}
