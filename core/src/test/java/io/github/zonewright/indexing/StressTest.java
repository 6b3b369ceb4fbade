package io.github.zonewright.indexing;

import static org.junit.jupiter.api.Assertions.assertTrue;

import io.github.zonewright.spots.MeasuredPattern;
import java.util.ArrayList;
import java.util.List;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

/** A few of the drawn patterns that {@link StressEvaluation} counts: what is settled is right in zone axis and rotation. */
class StressTest {

    /** The last of these are left open or tied: a second grain takes as many spots as the wanted one. */
    @ParameterizedTest
    @CsvSource({
        "typical, 0",
        "typical, 1",
        "typical, 2",
        "typical, 7",
        "typical, 23",
        "hard, 5",
        "hard, 13",
        "hard, 28",
        "hard, 6",
        "hard, 15",
        "hard, 35"
    })
    void find_drawnPattern_nothingWrongIsSettled(String name, int number) {
        StressEvaluation.Level level = StressEvaluation.Level.of(name);
        List<DrawnCrystal.Spot> spots = new ArrayList<>();
        StressEvaluation.Case drawn = StressEvaluation.random(level, number, spots);
        MeasuredPattern pattern = StressEvaluation.measure(drawn, spots, level, number);
        KnownCamera camera =
                KnownCamera.of(drawn.told(), level.tolerance(), drawn.setup().mirrored());
        SearchResult result = OrientationSearch.of(List.of(drawn.crystal()), drawn.beam(), camera)
                .find(pattern);
        Verdict verdict = Verdict.of(result);
        if (verdict instanceof Verdict.Settled settled) {
            OffTruth off = StressEvaluation.off(drawn, settled.solution());
            assertTrue(off.isRight(), verdict.sentence() + " drawn: [" + drawn.zone() + "], " + off);
        }
        assertTrue(level.tolerance() > 0.03 || !(verdict instanceof Verdict.Open), verdict.sentence());
    }

    /** Upper layers that the crystal shows either way when it is turned by half and leans the other way: both are told. */
    @Test
    void find_leanReversedFitsAsWell_errorCoversBothAndAWordIsSaid() {
        StressEvaluation.Level level = StressEvaluation.Level.of("steep");
        List<DrawnCrystal.Spot> spots = new ArrayList<>();
        StressEvaluation.Case drawn = StressEvaluation.random(level, 44, spots);
        MeasuredPattern pattern = StressEvaluation.measure(drawn, spots, level, 44);
        KnownCamera camera =
                KnownCamera.of(drawn.told(), level.tolerance(), drawn.setup().mirrored());
        Solution best = OrientationSearch.of(List.of(drawn.crystal()), drawn.beam(), camera)
                .find(pattern)
                .best()
                .orElseThrow();
        OffTruth off = StressEvaluation.off(drawn, best);
        double stated =
                Math.toDegrees(Math.hypot(best.errors().leanX(), best.errors().leanY()));
        assertTrue(off.inPlane() < 0.02, off.toString());
        assertTrue(off.tilt() < 2 * stated, off + ", stated " + stated + "°");
        assertTrue(best.halfTurn().isPresent());
        assertTrue(
                best.remarks().stream().anyMatch(r -> r.startsWith("The crystal may lean another way")),
                best.remarks().toString());
    }
}
