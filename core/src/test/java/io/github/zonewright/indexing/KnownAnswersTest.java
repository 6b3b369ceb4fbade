package io.github.zonewright.indexing;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import io.github.zonewright.TestData;
import io.github.zonewright.TestImages;
import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.crystal.CrystalCif;
import io.github.zonewright.microscope.Beam;
import io.github.zonewright.spots.SpotFinder;
import java.io.IOException;
import java.util.Map;
import java.util.stream.Collectors;
import java.util.stream.Stream;
import org.junit.jupiter.api.DynamicTest;
import org.junit.jupiter.api.TestFactory;

/**
 * Eight patterns simulated from physics by a program that shares no code with this one (testdata/patterns), searched with
 * what a user would know: crystal, voltage, camera constant within a tolerance, mirrored or not.
 */
class KnownAnswersTest {

    @TestFactory
    Stream<DynamicTest> find_toldWhatAUserKnows_truthOrNoAnswer() {
        Map<String, PatternTruth> truths = PatternTruth.table(TestData.path("patterns/truth.csv")).stream()
                .collect(Collectors.toMap(row -> row.get("file"), PatternTruth::new));
        return PatternTruth.table(TestData.path("patterns/inputs.csv")).stream()
                .map(input -> DynamicTest.dynamicTest(
                        input.get("file"), () -> assertAnswer(input, truths.get(input.get("file")))));
    }

    private static void assertAnswer(Map<String, String> input, PatternTruth truth) throws IOException {
        Crystal crystal = CrystalCif.read(TestData.path("patterns/crystals/" + input.get("cif")))
                .get(0);
        SearchResult result = OrientationSearch.of(
                        crystal,
                        Beam.ofKilovolts(Double.parseDouble(input.get("kV"))),
                        Double.parseDouble(input.get("K_told")),
                        Double.parseDouble(input.get("K_tol_told")),
                        input.get("mirror").equals("1"))
                .find(SpotFinder.measure(TestImages.read(TestData.path("patterns/" + input.get("file")))));
        if (truth.isNegative()) {
            assertTrue(result.best().isEmpty(), result.explanation());
            return;
        }
        Solution best = result.best().orElseThrow(() -> new AssertionError(result.explanation()));
        PatternTruth.Error error = truth.errorOf(crystal, best.placement().orientation());
        String said = best.placement().setting().zone() + ", truth " + truth.zone() + ", " + error;
        // The same zone leans by the same; another would be tens of degrees off.
        assertTrue(error.tilt() < 2, said);
        assertTrue(error.inPlane() <= (truth.level().equals("hard") ? 1 : 0.1), said);
        assertEquals(0, best.placement().camera().centre().distanceTo(truth.centre()), 0.5, said);
        assertEquals(1, best.placement().camera().constant() / truth.number("K"), 0.01, said);
        assertTrue(best.matches().size() >= 0.6 * truth.number("n_visible_zolz"), said);
    }
}
