package io.github.zonewright.indexing;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.crystal.CrystalShelf;
import io.github.zonewright.geometry.Rotation;
import io.github.zonewright.geometry.Vector3;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.lattice.Uvw;
import io.github.zonewright.orientation.OrientationRelation;
import io.github.zonewright.orientation.ZoneSetting;
import io.github.zonewright.spots.MeasuredSpot;
import java.util.HashSet;
import java.util.List;
import java.util.Optional;
import java.util.Set;
import java.util.concurrent.CancellationException;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

class LeftoversTest {

    private static Crystal shelf(String name) {
        return CrystalShelf.find(name).orElseThrow();
    }

    /**
     * A {1 1 1} twin seen along the common [0 1 1]: 60° about [1 1 1], Σ3 (textbook), with the row of 1 1 1 in common. Where
     * [0 1 1] is two-fold no half turn is open.
     */
    @Test
    void search_twinDrawn_namedWithItsSharedRow() {
        Crystal copper = shelf("copper");
        Rotation first = ZoneSetting.onZone(new Uvw(0, 1, 1), new Hkl(2, 0, 0), 0.3)
                .orientation(copper.lattice())
                .rotation();
        Rotation second = first.after(Rotation.ofAxisAngle(new Vector3(1, 1, -1), Math.PI));
        DrawnGrains.Case drawn = DrawnGrains.grains(copper, first, second, 21).orElseThrow();
        Leftovers.Result result = Leftovers.of(List.of(copper)).search(drawn.pattern(), drawn.first());
        assertEquals(1, result.grains().size(), result.explanation());
        Grain twin = result.grains().get(0);
        assertEquals(60, Math.toDegrees(twin.misorientation().angle()), 1.5);
        List<String> names =
                twin.relations().stream().map(OrientationRelation::name).toList();
        assertEquals(2, names.size(), twin.sentence());
        assertTrue(names.get(0).startsWith("twin on (") && names.get(1).equals("Σ3"), twin.sentence());
        assertEquals(
                drawn.first().placement().camera(), twin.solution().placement().camera(), "the camera is held");
        assertTrue(twin.shared().size() >= 2, twin.sentence());
        Set<Hkl> row = new HashSet<>();
        twin.shared()
                .forEach(m -> row.add(new Hkl(
                        Math.abs(m.hkl().h()),
                        Math.abs(m.hkl().k()),
                        Math.abs(m.hkl().l()))));
        assertTrue(row.contains(new Hkl(1, 1, 1)) || row.contains(new Hkl(2, 2, 2)), row.toString());
        assertTrue(twin.solution().matches().containsAll(twin.shared()));
        assertEveryLeftSpotOnce(drawn.first(), twin);
    }

    /** A left spot is either the grain's own or still left. */
    private static void assertEveryLeftSpotOnce(Solution first, Grain grain) {
        Set<MeasuredSpot> own = new HashSet<>();
        grain.solution().matches().stream()
                .filter(m -> !grain.shared().contains(m))
                .forEach(m -> own.add(m.measured()));
        Set<MeasuredSpot> left = new HashSet<>(grain.solution().unexplained());
        assertEquals(first.unexplained().size(), own.size() + left.size());
        assertTrue(first.unexplained().stream().allMatch(s -> own.contains(s) != left.contains(s)));
    }

    /** Stray spots anywhere are claimed for nothing; 150 cases were drawn with none claimed (DrawnGrains). */
    @ParameterizedTest
    @ValueSource(longs = {1, 2, 3, 4, 5, 6, 7, 8})
    void search_straySpots_nothingClaimed(long seed) {
        Optional<DrawnGrains.Case> drawn = DrawnGrains.strays(seed);
        drawn.ifPresent(d -> {
            Leftovers.Result result =
                    Leftovers.of(List.of(d.first().placement().crystal())).search(d.pattern(), d.first());
            assertTrue(result.grains().isEmpty(), result.explanation());
        });
    }

    @ParameterizedTest
    @ValueSource(longs = {2, 3, 6, 10, 12})
    void search_secondGrainDrawn_found(long seed) {
        DrawnGrains.Case drawn = DrawnGrains.grains(seed).orElseThrow();
        Leftovers.Result result =
                Leftovers.of(List.of(drawn.first().placement().crystal())).search(drawn.pattern(), drawn.first());
        assertTrue(drawn.hit(result, 2.5).isPresent(), result.explanation() + " " + result.grains());
        assertTrue(drawn.hit(result, 2.5).get().solution().errors().leanX() > 0);
    }

    /** A second phase among three crystals that are offered. */
    @Test
    void search_secondPhase_theRightCrystal() {
        Crystal silicon = shelf("silicon");
        Crystal rutile = shelf("rutile");
        Rotation first = ZoneSetting.onZone(new Uvw(0, 1, 1), new Hkl(4, 0, 0), 0.3)
                .orientation(silicon.lattice())
                .rotation();
        Rotation second = ZoneSetting.onZone(new Uvw(1, 0, 0), new Hkl(0, 1, 0), 1.1)
                .orientation(rutile.lattice())
                .rotation();
        DrawnGrains.Case drawn =
                DrawnGrains.phases(silicon, first, rutile, second, 5).orElseThrow();
        Leftovers.Result result =
                Leftovers.of(List.of(shelf("copper"), silicon, rutile)).search(drawn.pattern(), drawn.first());
        assertEquals(1, result.grains().size(), result.explanation());
        Grain grain = result.grains().get(0);
        assertEquals(rutile, grain.solution().placement().crystal());
        assertEquals(new Uvw(1, 0, 0), grain.solution().placement().setting().zone());
        assertTrue(grain.relations().isEmpty(), "two crystals have no twin law");
    }

    @Test
    void search_fewLeft_saysSo() {
        DrawnPlacement drawn =
                DrawnPlacement.of("copper", "0 0 1", "2 0 0", 0.7).with("37 14 0", 25, 2000);
        Leftovers.Result result = Leftovers.of(List.of(shelf("copper"))).search(drawn.measured(3), drawn.solution(3));
        assertEquals("1 spot is left over; a further crystal needs 4.", result.explanation());
    }

    @Test
    void search_stopped_throws() {
        DrawnGrains.Case drawn = DrawnGrains.grains(2).orElseThrow();
        Leftovers leftovers = Leftovers.of(List.of(shelf("copper")));
        assertThrows(CancellationException.class, () -> leftovers.search(drawn.pattern(), drawn.first(), () -> true));
    }

    @Test
    void of_noCrystal_refused() {
        assertThrows(IllegalArgumentException.class, () -> Leftovers.of(List.of()));
    }
}
