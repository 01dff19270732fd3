package org.isthmus.language;

import static com.tngtech.archunit.lang.syntax.ArchRuleDefinition.classes;
import static com.tngtech.archunit.lang.syntax.ArchRuleDefinition.noClasses;
import static com.tngtech.archunit.library.dependencies.SlicesRuleDefinition.slices;

import com.tngtech.archunit.base.DescribedPredicate;
import com.tngtech.archunit.core.domain.JavaClass;
import com.tngtech.archunit.core.importer.ImportOption;
import com.tngtech.archunit.junit.AnalyzeClasses;
import com.tngtech.archunit.junit.ArchTest;
import com.tngtech.archunit.lang.ArchRule;

/** The language sees of the runtime the device, the catalogue and the units, and nothing of any front end. */
@AnalyzeClasses(packages = "org.isthmus.language", importOptions = ImportOption.DoNotIncludeTests.class)
class ArchitectureTest {
    @ArchTest
    static final ArchRule seesOnlyItsPartOfTheRuntime = noClasses()
            .should()
            .dependOnClassesThat(DescribedPredicate.describe(
                    "reside in another part of the runtime",
                    c -> c.getPackageName().startsWith("org.isthmus.runtime")
                            && !c.getPackageName().startsWith("org.isthmus.runtime.device")
                            && !c.getPackageName().startsWith("org.isthmus.runtime.catalogue")
                            && !c.getPackageName().startsWith("org.isthmus.runtime.units")));

    @ArchTest
    static final ArchRule knowsNoFrontEnd = noClasses()
            .should()
            .dependOnClassesThat()
            .resideInAnyPackage(
                    "org.eclipse.swt..",
                    "org.eclipse.ui..",
                    "org.eclipse.lsp4j..",
                    "org.eclipse.xtext.ide..",
                    "picocli..");

    /** Written packages only: what is generated from the grammar refers to itself as it likes. */
    private static final DescribedPredicate<JavaClass> WRITTEN =
            DescribedPredicate.describe("are written by hand", c -> java.util.List.of(
                            "evaluation",
                            "elaboration",
                            "findings",
                            "formatting",
                            "measurement",
                            "messages",
                            "structure",
                            "tables",
                            "typing")
                    .stream()
                    .anyMatch(p -> c.getPackageName().startsWith("org.isthmus.language." + p)));

    @ArchTest
    static final ArchRule noCycles = slices().matching("org.isthmus.language.(*)..")
            .that(DescribedPredicate.describe(
                    "hold written classes", s -> s.stream().anyMatch(WRITTEN)))
            .should()
            .beFreeOfCycles();

    @ArchTest
    static final ArchRule noRoomForOddsAndEnds = classes()
            .that(WRITTEN)
            .should()
            .resideOutsideOfPackages("..util..", "..impl..", "..common..", "..helper..");
}
