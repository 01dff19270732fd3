package org.isthmus.language.ide;

import static com.tngtech.archunit.lang.syntax.ArchRuleDefinition.noClasses;
import static com.tngtech.archunit.library.dependencies.SlicesRuleDefinition.slices;

import com.tngtech.archunit.core.importer.ImportOption;
import com.tngtech.archunit.junit.AnalyzeClasses;
import com.tngtech.archunit.junit.ArchTest;
import com.tngtech.archunit.lang.ArchRule;

/** What this module may use, and in which direction. */
@AnalyzeClasses(packages = "org.isthmus", importOptions = ImportOption.DoNotIncludeTests.class)
class ArchitectureTest {
    @ArchTest
    static final ArchRule noWorkbench = noClasses()
            .that()
            .resideInAPackage("org.isthmus.language.ide..")
            .should()
            .dependOnClassesThat()
            .resideInAnyPackage(
                    "org.eclipse.swt..", "org.eclipse.ui..", "org.eclipse.jface..", "org.isthmus.language.ui..");

    @ArchTest
    static final ArchRule noKernels = noClasses()
            .that()
            .resideInAPackage("org.isthmus.language.ide..")
            .should()
            .dependOnClassesThat()
            .resideInAnyPackage("org.ejml..", "org.bytedeco..");

    @ArchTest
    static final ArchRule optionsStayAtTheCommandLine = noClasses()
            .that()
            .resideOutsideOfPackage("org.isthmus.language.ide.cli..")
            .should()
            .dependOnClassesThat()
            .resideInAnyPackage("picocli..", "me.tongfei..");

    @ArchTest
    static final ArchRule pipelineKnowsNoCaller = noClasses()
            .that()
            .resideInAPackage("org.isthmus.language.ide.pipeline..")
            .should()
            .dependOnClassesThat()
            .resideInAnyPackage("org.isthmus.language.ide.cli..", "org.eclipse.lsp4j..");

    @ArchTest
    static final ArchRule noCycles =
            slices().matching("org.isthmus.language.ide.(*)..").should().beFreeOfCycles();
}
