package io.github.zonewright.indexing;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertInstanceOf;
import static org.junit.jupiter.api.Assertions.assertTrue;

import io.github.zonewright.SyntheticPattern;
import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.crystal.CrystalShelf;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.lattice.Uvw;
import io.github.zonewright.microscope.Beam;
import io.github.zonewright.spots.MeasuredPattern;
import io.github.zonewright.spots.SpotFinder;
import java.util.List;
import java.util.Random;
import org.junit.jupiter.api.Test;

/** A row of spots drawn at a spacing of aluminium: a = 4.0496 Å, so that d(200) = 2.0248 Å. */
class RowAnswerTest {

    private static final Crystal ALUMINIUM = CrystalShelf.find("aluminium").orElseThrow();
    private static final Beam BEAM = Beam.ofKilovolts(200);
    private static final double CONSTANT = 110;

    private static SearchResult search(MeasuredPattern pattern) {
        return OrientationSearch.of(List.of(ALUMINIUM), BEAM, KnownCamera.of(CONSTANT, 0.02, false))
                .find(pattern);
    }

    @Test
    void find_oneRow_spacingFamilyAndCircleOfZones() {
        double step = CONSTANT / 2.0248;
        SearchResult result = search(NoAnswerTest.row(new Random(3), step));
        RowAnswer row = result.row().orElseThrow();
        assertEquals(2.0248, row.d().value(), 0.004);
        assertEquals(1 / 2.0248, row.g().value(), 0.001);
        // Half the tolerance of the camera constant is the standard uncertainty: 1 %.
        assertEquals(0.02, row.d().error(), 0.002);
        assertEquals(new Hkl(2, 0, 0), row.candidates().get(0).hkl());
        List<Uvw> zones = row.candidates().get(0).zones(2);
        assertTrue(zones.stream().allMatch(z -> z.u() == 0), zones.toString());
        // [0 1 0], [0 0 1], [0 1 1], [0 1 −1], [0 1 2], [0 2 1] and the two with a minus.
        assertEquals(8, zones.size(), zones.toString());
        assertTrue(result.solutions().isEmpty());
        Verdict verdict = Verdict.of(result);
        assertInstanceOf(Verdict.Open.class, verdict);
        assertTrue(verdict.sentence().contains("{2 0 0} of Aluminium"), verdict.sentence());
        assertTrue(verdict.sentence().contains("names no zone axis"), verdict.sentence());
    }

    @Test
    void find_lonePair_spacingToo() {
        double step = CONSTANT / 2.0248;
        double azimuth = 0.5;
        double dx = step * Math.cos(azimuth);
        double dy = -step * Math.sin(azimuth);
        SyntheticPattern drawn = new SyntheticPattern(200, 200, 31)
                .spot(100, 100, 1.6, 40_000)
                .spot(100 + dx, 100 + dy, 1.6, 3000)
                .spot(100 - dx, 100 - dy, 1.6, 2500);
        SearchResult result = search(SpotFinder.measure(drawn.shorts(1, 1)));
        RowAnswer row = result.row().orElseThrow();
        assertEquals(2, row.spots());
        assertEquals(azimuth, row.azimuth(), 0.002);
        assertEquals(2.0248, row.d().value(), 0.004);
        assertTrue(result.explanation().startsWith("Only 2 diffraction spots were found"), result.explanation());
    }

    @Test
    void find_spacingOfNoFamily_saysSo() {
        SearchResult result = search(NoAnswerTest.row(new Random(4), 33));
        assertTrue(result.explanation().contains("which no crystal searched has"), result.explanation());
        assertTrue(result.row().orElseThrow().candidates().isEmpty());
    }

    @Test
    void find_twoSpotsNotOpposite_noRow() {
        SyntheticPattern drawn = new SyntheticPattern(200, 200, 31)
                .spot(100, 100, 1.6, 40_000)
                .spot(150, 110, 1.6, 3000)
                .spot(95, 140, 1.6, 2500);
        assertTrue(search(SpotFinder.measure(drawn.shorts(1, 1))).row().isEmpty());
    }
}
