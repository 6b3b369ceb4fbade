package io.github.zonewright.imagej;

import static com.tngtech.archunit.lang.syntax.ArchRuleDefinition.noClasses;
import static com.tngtech.archunit.library.Architectures.layeredArchitecture;
import static com.tngtech.archunit.library.dependencies.SlicesRuleDefinition.slices;

import com.tngtech.archunit.core.importer.ImportOption;
import com.tngtech.archunit.junit.AnalyzeClasses;
import com.tngtech.archunit.junit.ArchTest;
import com.tngtech.archunit.lang.ArchRule;

/** Holds the plugin to its floor plan, which DEVELOPERS.md explains. */
@AnalyzeClasses(packages = HouseTest.ROOT, importOptions = ImportOption.DoNotIncludeTests.class)
class HouseTest {
    static final String ROOT = "io.github.zonewright.imagej";

    @ArchTest
    static final ArchRule PACKAGES_IMPORT_LOWER_FLOORS_ONLY = layeredArchitecture()
            .consideringOnlyDependenciesInAnyPackage(ROOT + "..")
            .withOptionalLayers(true)
            .layer("bridge")
            .definedBy(ROOT + ".bridge..")
            .layer("overlay")
            .definedBy(ROOT + ".overlay..")
            .layer("session")
            .definedBy(ROOT + ".session..")
            .layer("command")
            .definedBy(ROOT + ".command..")
            .layer("workbench")
            .definedBy(ROOT + ".workbench..")
            .layer("demo")
            .definedBy(ROOT + ".demo..")
            .whereLayer("overlay")
            .mayOnlyBeAccessedByLayers("session", "command", "workbench", "demo")
            .whereLayer("session")
            .mayOnlyBeAccessedByLayers("command", "workbench", "demo")
            .whereLayer("command")
            .mayOnlyBeAccessedByLayers("workbench", "demo")
            .whereLayer("workbench")
            .mayOnlyBeAccessedByLayers("demo")
            .whereLayer("demo")
            .mayNotBeAccessedByAnyLayer()
            .ensureAllClassesAreContainedInArchitectureIgnoring(ROOT);

    @ArchTest
    static final ArchRule PACKAGES_HAVE_NO_CYCLES =
            slices().matching(ROOT + ".(**)").should().beFreeOfCycles().allowEmptyShould(true);

    /** EJML is relocated in the jar that people install: it stays the library's own business. */
    @ArchTest
    static final ArchRule MATRICES_STAY_IN_THE_LIBRARY = noClasses()
            .should()
            .dependOnClassesThat()
            .resideInAPackage("org.ejml..")
            .allowEmptyShould(true);
}
