package io.github.zonewright;

import static com.tngtech.archunit.base.DescribedPredicate.not;
import static com.tngtech.archunit.core.domain.JavaClass.Predicates.resideInAnyPackage;
import static com.tngtech.archunit.lang.syntax.ArchRuleDefinition.classes;
import static com.tngtech.archunit.lang.syntax.ArchRuleDefinition.fields;
import static com.tngtech.archunit.lang.syntax.ArchRuleDefinition.noClasses;
import static com.tngtech.archunit.library.dependencies.SlicesRuleDefinition.slices;

import com.tngtech.archunit.core.domain.JavaClass;
import com.tngtech.archunit.core.domain.JavaCodeUnit;
import com.tngtech.archunit.core.domain.JavaField;
import com.tngtech.archunit.core.domain.JavaModifier;
import com.tngtech.archunit.core.domain.JavaType;
import com.tngtech.archunit.core.domain.properties.HasModifiers;
import com.tngtech.archunit.core.importer.ImportOption;
import com.tngtech.archunit.junit.AnalyzeClasses;
import com.tngtech.archunit.junit.ArchTest;
import com.tngtech.archunit.lang.ArchCondition;
import com.tngtech.archunit.lang.ArchRule;
import com.tngtech.archunit.lang.ConditionEvents;
import com.tngtech.archunit.lang.SimpleConditionEvent;
import com.tngtech.archunit.library.GeneralCodingRules;
import java.util.List;
import java.util.Map;
import java.util.stream.Stream;

/** Holds the library to its floor plan, which DEVELOPERS.md explains. */
@AnalyzeClasses(packages = HouseTest.ROOT, importOptions = ImportOption.DoNotIncludeTests.class)
class HouseTest {
    static final String ROOT = "io.github.zonewright";

    private static final Map<String, Integer> FLOORS = Map.ofEntries(
            Map.entry("geometry", 0),
            Map.entry("cif", 0),
            Map.entry("lattice", 1),
            Map.entry("image", 1),
            Map.entry("symmetry", 2),
            Map.entry("microscope", 2),
            Map.entry("spots", 2),
            Map.entry("crystal", 3),
            Map.entry("orientation", 3),
            Map.entry("pattern", 4),
            Map.entry("calibration", 4),
            Map.entry("indexing", 5),
            Map.entry("tilting", 6),
            Map.entry("document", 7));

    @ArchTest
    static final ArchRule PACKAGES_IMPORT_LOWER_FLOORS_ONLY =
            classes().should(importLowerFloorsOnly()).allowEmptyShould(true);

    @ArchTest
    static final ArchRule PACKAGES_HAVE_NO_CYCLES =
            slices().matching(ROOT + ".(**)").should().beFreeOfCycles().allowEmptyShould(true);

    /** Java's own packages leave out AWT, Swing, logging and preferences: what a library must not drag in. */
    @ArchTest
    static final ArchRule DEPENDS_ON_JAVA_AND_EJML_ALONE = classes()
            .should()
            .onlyDependOnClassesThat(resideInAnyPackage("java..", "org.ejml..", ROOT + "..")
                    .and(not(resideInAnyPackage("java.awt..", "java.util.logging..", "java.util.prefs.."))))
            .allowEmptyShould(true);

    @ArchTest
    static final ArchRule SIGNATURES_ARE_FREE_OF_EJML =
            classes().should(keepEjmlOutOfSignatures()).allowEmptyShould(true);

    @ArchTest
    static final ArchRule STATICS_ARE_FINAL =
            fields().that().areStatic().should().beFinal().allowEmptyShould(true);

    @ArchTest
    static final ArchRule NOTHING_IS_PRINTED =
            noClasses().should(GeneralCodingRules.ACCESS_STANDARD_STREAMS).allowEmptyShould(true);

    private static ArchCondition<JavaClass> importLowerFloorsOnly() {
        return new ArchCondition<>("import lower floors only") {
            @Override
            public void check(JavaClass from, ConditionEvents events) {
                String room = room(from);
                if (!FLOORS.containsKey(room)) {
                    events.add(SimpleConditionEvent.violated(from, from.getName() + " is in no package of the plan"));
                    return;
                }
                from.getDirectDependenciesFromSelf().stream()
                        .filter(d -> d.getTargetClass().getPackageName().startsWith(ROOT))
                        .filter(d -> !room(d.getTargetClass()).equals(room))
                        .filter(d ->
                                FLOORS.getOrDefault(room(d.getTargetClass()), Integer.MAX_VALUE) >= FLOORS.get(room))
                        .forEach(d -> events.add(SimpleConditionEvent.violated(from, d.getDescription())));
            }
        };
    }

    /** The package below the root, which is what has a floor. */
    private static String room(JavaClass type) {
        String name = type.getPackageName();
        return name.length() <= ROOT.length()
                ? ""
                : name.substring(ROOT.length() + 1).split("\\.", 2)[0];
    }

    private static ArchCondition<JavaClass> keepEjmlOutOfSignatures() {
        return new ArchCondition<>("keep EJML out of what callers see") {
            @Override
            public void check(JavaClass type, ConditionEvents events) {
                if (!isOpen(type)) {
                    return;
                }
                Stream.concat(type.getFields().stream().filter(HouseTest::isOpen), openCodeUnits(type))
                        .filter(member -> typesOf(member)
                                .flatMap(t -> t.getAllInvolvedRawTypes().stream())
                                .anyMatch(t -> t.getPackageName().startsWith("org.ejml")))
                        .forEach(member -> events.add(SimpleConditionEvent.violated(type, member + " shows EJML")));
            }
        };
    }

    private static Stream<JavaCodeUnit> openCodeUnits(JavaClass type) {
        return type.getCodeUnits().stream().filter(HouseTest::isOpen);
    }

    private static Stream<JavaType> typesOf(Object member) {
        if (member instanceof JavaField field) {
            return Stream.of(field.getType());
        }
        JavaCodeUnit unit = (JavaCodeUnit) member;
        List<JavaType> taken = unit.getParameterTypes();
        return Stream.concat(Stream.of(unit.getReturnType()), taken.stream());
    }

    private static boolean isOpen(HasModifiers element) {
        return element.getModifiers().contains(JavaModifier.PUBLIC)
                || element.getModifiers().contains(JavaModifier.PROTECTED);
    }
}
