package io.github.zonewright.indexing;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertInstanceOf;
import static org.junit.jupiter.api.Assertions.assertTrue;

import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.crystal.CrystalShelf;
import io.github.zonewright.geometry.Rotation;
import io.github.zonewright.geometry.Vector3;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.lattice.Uvw;
import io.github.zonewright.orientation.ZoneSetting;
import io.github.zonewright.spots.MeasuredSpot;
import java.util.List;
import java.util.Optional;
import org.junit.jupiter.api.Test;

class SpotOriginsTest {

    private static SpotOrigin at(List<SpotOrigin> all, DrawnCrystal.Spot place) {
        return all.stream()
                .filter(o -> Math.hypot(
                                o.spot().position().x() - place.x(),
                                o.spot().position().y() - place.y())
                        < 1)
                .findFirst()
                .orElseThrow(() -> new AssertionError("no spot at " + place));
    }

    /** 200 of silicon is extinct and appears in [0 1 1] as the sum of two of {1 1 1} (textbook: Williams & Carter; from memory). */
    @Test
    void of_siliconTwoHundredIn011_doubleDiffraction() {
        DrawnPlacement drawn =
                DrawnPlacement.of("silicon", "0 1 1", "4 0 0", 0.4).with("2 0 0", 1, 900);
        List<SpotOrigin> all = SpotOrigins.of(drawn.solution(1));
        SpotOrigin.DoubleDiffraction found = assertInstanceOf(
                SpotOrigin.DoubleDiffraction.class, at(all, drawn.extra().get(0)));
        assertEquals(new Hkl(2, 0, 0), found.hkl());
        assertEquals(found.hkl(), found.first().plus(found.second()));
        for (Hkl part : List.of(found.first(), found.second())) {
            assertEquals(3, part.h() * part.h() + part.k() * part.k() + part.l() * part.l(), part + " is of {1 1 1}");
        }
        assertTrue(found.sentence().startsWith("2 0 0 is extinct; double diffraction reaches it"), found.sentence());
        long reflected =
                all.stream().filter(o -> o instanceof SpotOrigin.Reflected).count();
        assertTrue(reflected > 10, reflected + " reflections");
    }

    /** In [0 0 1] of silicon no two allowed reflections of the zero layer add up to 200: all have h + k a multiple of four. */
    @Test
    void of_siliconTwoHundredIn001_extinct() {
        DrawnPlacement drawn =
                DrawnPlacement.of("silicon", "0 0 1", "4 0 0", 0.2).with("2 0 0", 1, 900);
        SpotOrigin found = at(SpotOrigins.of(drawn.solution(2)), drawn.extra().get(0));
        assertEquals(
                new Hkl(2, 0, 0),
                assertInstanceOf(SpotOrigin.Extinct.class, found).hkl());
    }

    /** Halves and thirds, their indices within four of their stated errors. */
    @Test
    void of_spotsAtFractions_named() {
        DrawnPlacement drawn = DrawnPlacement.of("copper", "0 0 1", "2 0 0", 0.7)
                .with("1 1 0", 2, 2000)
                .with("4 2 0", 3, 2000);
        List<SpotOrigin> all = SpotOrigins.of(drawn.solution(3));
        SpotOrigin.Fraction half = assertInstanceOf(
                SpotOrigin.Fraction.class, at(all, drawn.extra().get(0)));
        assertEquals(2, half.denominator());
        assertEquals(new Hkl(1, 1, 0), half.multiple());
        assertNear(0.5, half.indices().indices().x(), half.indices().errors().x());
        assertNear(0, half.indices().indices().z(), half.indices().errors().z());
        assertEquals(0, half.indices().layer(), 0.05);
        SpotOrigin.Fraction third = assertInstanceOf(
                SpotOrigin.Fraction.class, at(all, drawn.extra().get(1)));
        assertEquals(3, third.denominator());
        assertEquals(new Hkl(4, 2, 0), third.multiple());
        assertNear(
                4.0 / 3, third.indices().indices().x(), third.indices().errors().x());
        assertTrue(half.chance() < third.chance(), "thirds lie denser than halves");
    }

    /**
     * The {1 1 1} twin of a face-centred cube along [0 1 1] has its own spots at thirds of the crystal's (textbook: Hirsch;
     * Edington; from memory), as a superlattice of three times the spacing would.
     */
    @Test
    void of_spotsOfATwin_offeredBesideTheSuperlattice() {
        Crystal copper = CrystalShelf.find("copper").orElseThrow();
        Rotation first = ZoneSetting.onZone(new Uvw(0, 1, 1), new Hkl(2, 0, 0), 0.3)
                .orientation(copper.lattice())
                .rotation();
        Rotation second = first.after(Rotation.ofAxisAngle(new Vector3(1, 1, -1), Math.PI));
        DrawnGrains.Case drawn =
                DrawnGrains.mixed(copper, first, copper, second, 0.5, 21).orElseThrow();
        List<SpotOrigin> left = SpotOrigins.of(drawn.first()).stream()
                .filter(o -> drawn.first().unexplained().contains(o.spot()))
                .toList();
        List<SpotOrigin.Twin> twins = left.stream()
                .filter(SpotOrigin.Twin.class::isInstance)
                .map(SpotOrigin.Twin.class::cast)
                .toList();
        assertTrue(
                twins.size() >= left.size() - 1,
                left.stream().map(SpotOrigin::sentence).toList().toString());
        SpotOrigin.Twin one = twins.get(0);
        assertEquals(3, one.fraction().denominator());
        assertTrue(one.law().startsWith("twin on (1 1 1)") || one.law().startsWith("twin on (1 1 -1)"), one.law());
        assertTrue(one.law().contains("Σ3") && one.ofTwin() >= one.ofSuperlattice(), one.sentence());
        assertTrue(one.sentence().contains("or at (") && one.sentence().contains("superlattice"), one.sentence());
    }

    /** Points halfway between those of the crystal: hardly ever does a twin of low indices have spots on as many of them. */
    @Test
    void of_superlattice_seldomATwin() {
        int twins = 0;
        int fractions = 0;
        for (long seed = 1; seed <= 12; seed++) {
            Optional<DrawnGrains.Case> drawn = DrawnGrains.superlattice(seed);
            if (drawn.isPresent()) {
                for (SpotOrigin o : SpotOrigins.of(drawn.get().first())) {
                    twins += o instanceof SpotOrigin.Twin ? 1 : 0;
                    fractions += o instanceof SpotOrigin.Fraction ? 1 : 0;
                }
            }
        }
        assertTrue(fractions > 50 && twins * 10 < fractions, twins + " and " + fractions);
    }

    private static void assertNear(double expected, double actual, double error) {
        assertTrue(error > 0 || expected == 0, "error " + error);
        assertEquals(expected, actual, 4 * error + 1e-9);
    }

    @Test
    void of_spotAnywhere_unknownWithItsIndices() {
        DrawnPlacement drawn =
                DrawnPlacement.of("copper", "0 0 1", "2 0 0", 0.7).with("37 14 0", 25, 2000);
        Solution solution = drawn.solution(4);
        SpotOrigin found = at(SpotOrigins.of(solution), drawn.extra().get(0));
        assertInstanceOf(SpotOrigin.Unknown.class, found);
        assertEquals(1.48, found.indices().indices().x(), 0.02);
        assertEquals(0.56, found.indices().indices().y(), 0.02);
        int spots = solution.matches().size() + solution.unexplained().size();
        assertEquals(spots, SpotOrigins.of(solution).size());
    }

    /** The first upper layer of silicon [1 1 2] is cut where λg²/2 has risen to its height 1/|r| = 1/(a√6/2) or so. */
    @Test
    void layer_farFromTheCentre_growsWithTheSquare() {
        Solution solution = DrawnPlacement.of("silicon", "0 0 1", "4 0 0", 0).solution(5);
        double wavelength = DrawnPlacement.BEAM.wavelength();
        for (SpotOrigin o : SpotOrigins.of(solution)) {
            MeasuredSpot spot = o.spot();
            double r = spot.position().distanceTo(solution.placement().camera().centre());
            double g = r / solution.placement().camera().constant();
            double lean = solution.placement().setting().lean();
            assertEquals(5.431 * wavelength * g * g / 2, o.indices().layer(), 0.02 + 5.431 * g * lean);
        }
    }
}
