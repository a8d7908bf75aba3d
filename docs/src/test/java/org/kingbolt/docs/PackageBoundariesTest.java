package org.kingbolt.docs;

import static com.tngtech.archunit.lang.syntax.ArchRuleDefinition.classes;
import static com.tngtech.archunit.library.dependencies.SlicesRuleDefinition.slices;
import static org.junit.jupiter.api.Assertions.assertEquals;

import com.tngtech.archunit.core.domain.JavaClass;
import com.tngtech.archunit.core.domain.JavaClasses;
import com.tngtech.archunit.core.domain.JavaModifier;
import com.tngtech.archunit.core.importer.ClassFileImporter;
import com.tngtech.archunit.core.importer.ImportOption;
import java.util.Set;
import java.util.TreeSet;
import java.util.stream.Collectors;
import org.junit.jupiter.api.Test;

/** Holds which package may use which, and which types of the engine other packages can see. */
class PackageBoundariesTest {

  private static final String[] JDK = {"java..", "org.jspecify.."};

  private static final JavaClasses LIBRARY =
      new ClassFileImporter()
          .withImportOption(ImportOption.Predefined.DO_NOT_INCLUDE_TESTS)
          .withImportOption(location -> !location.contains("-tests.jar"))
          .importPackages("org.kingbolt.core", "org.kingbolt.bounds", "org.kingbolt.importance");

  @Test
  void engine_usesTheJdkAlone() {
    mayUse("org.kingbolt.core.diagram..", "org.kingbolt.core.diagram..");
  }

  @Test
  void core_usesTheEngineAndTheTwoLibraries() {
    mayUse(
        "org.kingbolt.core",
        "org.kingbolt.core",
        "org.kingbolt.core.diagram..",
        "com.google.common..",
        "org.apache.commons.math3..");
  }

  @Test
  void bounds_usesCore() {
    mayUse(
        "org.kingbolt.bounds..",
        "org.kingbolt.bounds..",
        "org.kingbolt.core..",
        "com.google.common..",
        "org.apache.commons.math3..");
  }

  @Test
  void importance_usesCore() {
    mayUse(
        "org.kingbolt.importance..",
        "org.kingbolt.importance..",
        "org.kingbolt.core..",
        "com.google.common..",
        "org.apache.commons.math3..");
  }

  @Test
  void packages_areFreeOfCycles() {
    slices().matching("org.kingbolt.(**)").should().beFreeOfCycles().check(LIBRARY);
  }

  @Test
  void library_doesNoInputOrOutput() {
    com.tngtech.archunit.lang.syntax.ArchRuleDefinition.noClasses()
        .should()
        .dependOnClassesThat()
        .resideInAnyPackage("java.nio.file..", "java.net..", "java.sql..")
        .orShould()
        .accessField(System.class, "out")
        .orShould()
        .accessField(System.class, "err")
        .check(LIBRARY);
  }

  @Test
  void engine_showsTheseTypesAndNoOthers() {
    Set<String> visible =
        LIBRARY.stream()
            .filter(type -> type.getPackageName().equals("org.kingbolt.core.diagram"))
            .filter(type -> type.getModifiers().contains(JavaModifier.PUBLIC))
            .map(JavaClass::getSimpleName)
            .collect(Collectors.toCollection(TreeSet::new));
    assertEquals(
        Set.of(
            "BatchScan",
            "Composer",
            "CutTree",
            "Diagram",
            "Evaluation",
            "FrontierSweep",
            "FrontierTooWideException",
            "MinimalSolutions",
            "NetworkPaths",
            "NetworkProblem",
            "NetworkRelaxer",
            "Operator",
            "RouteFinder",
            "Routes",
            "Scan",
            "SetDiagram",
            "SetUnion",
            "SetWalk",
            "StateCounts",
            "Templates",
            "WorkMeter"),
        visible);
  }

  private static void mayUse(String from, String... allowed) {
    String[] all = new String[allowed.length + JDK.length];
    System.arraycopy(allowed, 0, all, 0, allowed.length);
    System.arraycopy(JDK, 0, all, allowed.length, JDK.length);
    classes()
        .that()
        .resideInAPackage(from)
        .should()
        .onlyDependOnClassesThat()
        .resideInAnyPackage(all)
        .check(LIBRARY);
  }
}
