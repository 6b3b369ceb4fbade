package io.github.zonewright.indexing;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertInstanceOf;
import static org.junit.jupiter.api.Assertions.assertTrue;

import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.crystal.CrystalShelf;
import io.github.zonewright.geometry.Rotation;
import io.github.zonewright.geometry.Vector3;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.lattice.Uvw;
import io.github.zonewright.orientation.Orientation;
import io.github.zonewright.orientation.ZoneSetting;
import io.github.zonewright.pattern.Placement;
import java.util.List;
import java.util.Optional;
import org.junit.jupiter.api.Test;

/** The verdict on a pattern of several crystals, judged with those that explain what the first leaves over. */
class WholeVerdictTest {
    private static final Crystal COPPER = CrystalShelf.find("copper").orElseThrow();

    private static Rotation first() {
        return ZoneSetting.onZone(new Uvw(0, 1, 1), new Hkl(2, 0, 0), 0.3)
                .orientation(COPPER.lattice())
                .rotation();
    }

    /** A twin of half the strength: most of the spots are not of the first crystal, which is not settled by itself. */
    @Test
    void of_twinOfHalfTheStrength_openByItselfAndSettledWithTheTwin() {
        Rotation second = first().after(Rotation.ofAxisAngle(new Vector3(1, 1, -1), Math.PI));
        DrawnGrains.Case drawn =
                DrawnGrains.mixed(COPPER, first(), COPPER, second, 0.5, 21).orElseThrow();
        SearchResult result = DrawnGrains.searched(drawn, COPPER);
        Solution best = result.best().orElseThrow();
        List<Grain> grains =
                Leftovers.of(List.of(COPPER)).search(drawn.pattern(), best).grains();
        Verdict alone = Verdict.of(result);
        Verdict whole = Verdict.of(result, grains);
        assertInstanceOf(Verdict.Open.class, alone, alone.sentence());
        Verdict.Settled settled = assertInstanceOf(Verdict.Settled.class, whole, whole.sentence());
        assertEquals(grains, settled.grains());
        assertTrue(whole.sentence().startsWith("Settled, with a twin: ["), whole.sentence());
        assertFalse(grains.get(0).isFoundAs(best));
        assertTrue(grains.get(0).isFoundAs(grains.get(0).solution()));
        assertTrue(
                result.solutions().stream().anyMatch(grains.get(0)::isFoundAs), "the search found the twin by itself");
    }

    /** What the further crystals leave over still counts against the whole. */
    @Test
    void of_grainThatExplainsLittle_staysOpen() {
        Rotation second = first().after(Rotation.ofAxisAngle(new Vector3(1, 1, -1), Math.PI));
        DrawnGrains.Case drawn =
                DrawnGrains.mixed(COPPER, first(), COPPER, second, 0.5, 21).orElseThrow();
        SearchResult result = DrawnGrains.searched(drawn, COPPER);
        Solution best = result.best().orElseThrow();
        Grain whole = Leftovers.of(List.of(COPPER))
                .search(drawn.pattern(), best)
                .grains()
                .get(0);
        Solution s = whole.solution();
        Solution little = new Solution(
                s.placement(),
                whole.shared(),
                best.unexplained(),
                s.rmsResidual(),
                s.score(),
                s.errors(),
                s.halfTurn());
        Verdict verdict = Verdict.of(result, List.of(Grain.of(little, whole.shared(), best.placement())));
        assertInstanceOf(Verdict.Open.class, verdict, verdict.sentence());
    }

    @Test
    void kind_saysWhatItIs() {
        Rotation second = first().after(Rotation.ofAxisAngle(new Vector3(1, 2, -1), 0.4));
        DrawnGrains.Case drawn =
                DrawnGrains.mixed(COPPER, first(), COPPER, second, 0.5, 3).orElseThrow();
        Solution s = drawn.first();
        Crystal silver = CrystalShelf.find("rutile").orElseThrow();
        assertEquals(
                "a second grain",
                Grain.of(turned(s, COPPER, second), List.of(), s.placement()).kind());
        assertEquals(
                "a second phase",
                Grain.of(turned(s, silver, second), List.of(), s.placement()).kind());
        assertFalse(Grain.with(List.of()).contains("with"));
    }

    private static Solution turned(Solution s, Crystal crystal, Rotation rotation) {
        var orientation = new Orientation(rotation);
        Uvw zone = orientation.nearestZone(crystal.lattice(), 4);
        ZoneSetting setting = ZoneSetting.of(
                orientation,
                crystal.lattice(),
                zone,
                ZoneBasis.of(zone, crystal.lattice().reciprocal()).first());
        return new Solution(
                new Placement(
                        crystal, s.placement().beam(), setting, s.placement().camera()),
                s.matches(),
                s.unexplained(),
                s.rmsResidual(),
                s.score(),
                s.errors(),
                Optional.empty());
    }
}
