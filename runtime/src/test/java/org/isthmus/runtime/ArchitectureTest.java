package org.isthmus.runtime;

import static com.tngtech.archunit.lang.syntax.ArchRuleDefinition.classes;
import static com.tngtech.archunit.lang.syntax.ArchRuleDefinition.noClasses;
import static com.tngtech.archunit.library.dependencies.SlicesRuleDefinition.slices;

import com.tngtech.archunit.core.importer.ImportOption;
import com.tngtech.archunit.junit.AnalyzeClasses;
import com.tngtech.archunit.junit.ArchTest;
import com.tngtech.archunit.lang.ArchRule;

/** The back end never knows the front end, and linear algebra stays behind its interface. */
@AnalyzeClasses(packages = "org.isthmus.runtime", importOptions = ImportOption.DoNotIncludeTests.class)
class ArchitectureTest {
    @ArchTest
    static final ArchRule knowsNoFrontEnd = noClasses()
            .should()
            .dependOnClassesThat()
            .resideInAnyPackage(
                    "org.eclipse..", "org.isthmus.language..", "picocli..", "com.google.inject..", "org.antlr..");

    @ArchTest
    static final ArchRule linearAlgebraStaysInTheKernel = noClasses()
            .that()
            .resideOutsideOfPackage("org.isthmus.runtime.kernel..")
            .should()
            .dependOnClassesThat()
            .resideInAnyPackage("org.ejml..", "org.bytedeco..");

    @ArchTest
    static final ArchRule kernelsKnowNoPhysics = noClasses()
            .that()
            .resideInAPackage("org.isthmus.runtime.kernel..")
            .should()
            .dependOnClassesThat()
            .resideInAnyPackage(
                    "org.isthmus.runtime.device..",
                    "org.isthmus.runtime.solve..",
                    "org.isthmus.runtime.observable..",
                    "org.isthmus.runtime.plan..");

    @ArchTest
    static final ArchRule thePlannerDoesNotExecute = noClasses()
            .that()
            .resideInAPackage("org.isthmus.runtime.plan..")
            .should()
            .dependOnClassesThat()
            .resideInAnyPackage("org.isthmus.runtime.kernel..", "org.isthmus.runtime.solve..");

    @ArchTest
    static final ArchRule noCycles =
            slices().matching("org.isthmus.runtime.(**)").should().beFreeOfCycles();

    @ArchTest
    static final ArchRule noRoomForOddsAndEnds =
            classes().should().resideOutsideOfPackages("..util..", "..impl..", "..common..", "..helper..");
}
