package org.isthmus.examples;

import static com.tngtech.archunit.lang.syntax.ArchRuleDefinition.noClasses;

import com.tngtech.archunit.junit.AnalyzeClasses;
import com.tngtech.archunit.junit.ArchTest;
import com.tngtech.archunit.lang.ArchRule;

/** Examples are run as a user runs them: by the façade, not by what stands behind it. */
@AnalyzeClasses(packages = "org.isthmus.examples")
class ArchitectureTest {
    @ArchTest
    static final ArchRule onlyTheFacade = noClasses()
            .that()
            .resideInAPackage("org.isthmus.examples..")
            .should()
            .dependOnClassesThat()
            .resideInAnyPackage("org.isthmus.runtime.kernel..", "org.isthmus.runtime.solve..", "org.ejml..");
}
