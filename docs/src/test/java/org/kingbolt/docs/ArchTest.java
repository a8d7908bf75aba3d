package org.kingbolt.docs;

import static com.tngtech.archunit.lang.syntax.ArchRuleDefinition.noClasses;

import com.tngtech.archunit.core.importer.ClassFileImporter;
import org.junit.jupiter.api.Test;

class ArchTest {
  @Test
  void coreAlone() {
    noClasses()
        .that()
        .resideInAPackage("org.kingbolt.core..")
        .should()
        .dependOnClassesThat()
        .resideInAPackage("org.kingbolt.bounds..")
        .check(new ClassFileImporter().importPackages("org.kingbolt"));
  }
}
