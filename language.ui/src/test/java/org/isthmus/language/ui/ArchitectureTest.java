package org.isthmus.language.ui;

import static com.tngtech.archunit.lang.syntax.ArchRuleDefinition.noClasses;

import com.tngtech.archunit.core.importer.ImportOption;
import com.tngtech.archunit.junit.AnalyzeClasses;
import com.tngtech.archunit.junit.ArchTest;
import com.tngtech.archunit.lang.ArchRule;

/** The workbench is the outermost module: nothing below knows it, and it computes nothing itself. */
@AnalyzeClasses(packages = "org.isthmus", importOptions = ImportOption.DoNotIncludeTests.class)
class ArchitectureTest {
    @ArchTest
    static final ArchRule nothingBelowKnowsTheWorkbench = noClasses()
            .that()
            .resideOutsideOfPackage("org.isthmus.language.ui..")
            .should()
            .dependOnClassesThat()
            .resideInAPackage("org.isthmus.language.ui..");

    @ArchTest
    static final ArchRule noKernels = noClasses()
            .that()
            .resideInAPackage("org.isthmus.language.ui..")
            .should()
            .dependOnClassesThat()
            .resideInAnyPackage("org.ejml..", "org.bytedeco..", "picocli..")
            .allowEmptyShould(true);
}
