package io.github.zonewright.indexing;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.crystal.CrystalShelf;
import io.github.zonewright.geometry.Rotation;
import io.github.zonewright.geometry.Vector3;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.lattice.Uvw;
import io.github.zonewright.microscope.Beam;
import io.github.zonewright.microscope.Camera;
import io.github.zonewright.orientation.Orientation;
import io.github.zonewright.orientation.ZoneSetting;
import java.util.EnumSet;
import java.util.List;
import java.util.Optional;
import java.util.Random;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

class HandIndexingTest {

    private static final Beam BEAM = Beam.ofKilovolts(200);
    private static final PixelPoint CENTRE = new PixelPoint(256, 256);
    private static final double CONSTANT = 250;

    private static Crystal shelf(String name) {
        return CrystalShelf.find(name).orElseThrow();
    }

    private static HandIndexing indexing(double told, Crystal... crystals) {
        return HandIndexing.of(List.of(crystals), BEAM, Camera.of(CENTRE, told, false), 0.03);
    }

    /** A spot at the distance R of Rd = λL, with tan 2θ for sin θ, and an azimuth. */
    private static ClickedSpot spot(double d, double azimuthDegrees) {
        double wavelength = BEAM.wavelength();
        double r = CONSTANT / wavelength * Math.tan(Math.asin(wavelength / d));
        double a = Math.toRadians(azimuthDegrees);
        return ClickedSpot.at(new PixelPoint(CENTRE.x() + r * Math.cos(a), CENTRE.y() - r * Math.sin(a)));
    }

    /**
     * Angles between planes of cubic crystals as every table of them gives (Andrews, Dyson & Keown 1967, appendix; from memory): d = a/√N,
     * 54.74° between {1 1 1} and {2 0 0}, 70.53° within {1 1 1}, 60° within {2 2 0} and {1 1 0}, 73.22° between {1 1 0} and {2 1 1}
     */
    @ParameterizedTest
    @CsvSource({
        "copper, 3.6149, 3, 4, 54.74, 0 1 1",
        "copper, 3.6149, 3, 3, 70.53, 0 1 1",
        "copper, 3.6149, 8, 8, 60.00, 1 1 1",
        "copper, 3.6149, 4, 4, 90.00, 0 0 1",
        "copper, 3.6149, 4, 20, 90.00, 0 1 2",
        "copper, 3.6149, 3, 8, 90.00, 1 1 2",
        "ferrite, 2.8665, 2, 2, 90.00, 0 0 1",
        "ferrite, 2.8665, 2, 2, 60.00, 1 1 1",
        "ferrite, 2.8665, 2, 4, 90.00, 0 1 1",
        "ferrite, 2.8665, 2, 6, 73.22, 1 1 3"
    })
    void index_tabulatedPairs_thatZoneFirst(String name, double a, int n1, int n2, double angle, String zone) {
        Crystal crystal = shelf(name);
        List<HandAnswer> answers = indexing(CONSTANT, crystal)
                .index(List.of(spot(a / Math.sqrt(n1), 20), spot(a / Math.sqrt(n2), 20 + angle)));
        HandAnswer best = answers.get(0);
        assertTrue(
                crystal.spaceGroup()
                        .equivalents(Uvw.parse(zone))
                        .contains(best.placement().setting().zone()),
                best.sentence());
        assertEquals(n1, squares(best.indices().get(0)));
        assertEquals(n2, squares(best.indices().get(1)));
        assertEquals(0, best.spacingResiduals().get(0), 0.3);
        assertEquals(0, best.angleResiduals().get(0), 0.02);
        assertTrue(best.misfit() < 0.1);
    }

    private static int squares(Hkl h) {
        return h.h() * h.h() + h.k() * h.k() + h.l() * h.l();
    }

    /** Named spots: the zone is g₁ × g₂ (Weiss), the rotation that of the first, on a mirrored image too. */
    @Test
    void index_indicesGiven_thatOrientation() {
        Crystal copper = shelf("copper");
        ClickedSpot first = new ClickedSpot(spot(3.6149 / 2, 30).position(), Optional.of(new Hkl(2, 0, 0)));
        ClickedSpot second = new ClickedSpot(spot(3.6149 / 2, 120).position(), Optional.of(new Hkl(0, 2, 0)));
        List<HandAnswer> answers = indexing(CONSTANT, copper).index(List.of(first, second));
        assertEquals(1, answers.size());
        assertEquals(new Uvw(0, 0, 1), answers.get(0).placement().setting().zone());
        assertEquals(30, Math.toDegrees(answers.get(0).placement().setting().rotation()), 1e-6);
        HandIndexing mirrored = HandIndexing.of(List.of(copper), BEAM, Camera.of(CENTRE, CONSTANT, true), 0.03);
        HandAnswer other = mirrored.index(List.of(first, second)).get(0);
        assertEquals(new Uvw(0, 0, -1), other.placement().setting().zone());
        assertEquals(150, Math.toDegrees(other.placement().setting().rotation()), 1e-6);
    }

    /** Spacings read 1 % too large when the camera constant is told 1 % too large. */
    @Test
    void index_constantOff_inTheResiduals() {
        HandAnswer best = indexing(1.01 * CONSTANT, shelf("copper"))
                .index(List.of(spot(3.6149 / 2, 0), spot(3.6149 / 2, 91)))
                .get(0);
        assertEquals(1, best.spacingResiduals().get(0), 0.05);
        assertEquals(1, best.spacingResiduals().get(1), 0.05);
        assertEquals(1, best.angleResiduals().get(0), 1e-3, "measured 91°, computed 90°");
        assertTrue(best.sentence().contains("d within 1.0 %, angles within 1.0°"), best.sentence());
    }

    /** Iron's two spots are none of copper's, and a third spot, the sum of the two, adds no answers. */
    @Test
    void index_severalCrystals_rightOneFirst() {
        ClickedSpot a = spot(2.8665 / Math.sqrt(2), 10);
        ClickedSpot b = spot(2.8665 / 2, 100);
        List<HandAnswer> two = indexing(CONSTANT, shelf("copper"), shelf("rutile"), shelf("ferrite"))
                .index(List.of(a, b));
        assertTrue(two.stream().anyMatch(x -> x.placement().crystal().name().equalsIgnoreCase("ferrite")));
        ClickedSpot c = spot(2.8665 / Math.sqrt(6), 10 + 54.7356);
        List<HandAnswer> three = indexing(CONSTANT, shelf("copper"), shelf("rutile"), shelf("ferrite"))
                .index(List.of(a, b, c));
        assertTrue(three.size() <= two.size());
        assertEquals(shelf("ferrite"), three.get(0).placement().crystal());
        assertEquals(
                three.get(0).indices().get(2),
                three.get(0).indices().get(0).plus(three.get(0).indices().get(1)));
    }

    /** Any crystal, any zone: from two short reflections of the zone the orientation is among the answers, exactly. */
    @Test
    void index_drawnAtRandom_truthAmongTheBest() {
        Random random = new Random(14);
        for (String name : List.of("copper", "silicon", "magnesium", "rutile", "quartz", "corundum")) {
            Crystal crystal = shelf(name);
            for (int i = 0; i < 10; i++) {
                List<Uvw> zones = ZoneCatalogue.zones(crystal, 3);
                Uvw zone = zones.get(random.nextInt(zones.size()));
                ReflectionStrengths strengths = new ReflectionStrengths(crystal, BEAM, 1.2);
                Optional<ZoneNet> net = ZoneNet.of(zone, strengths);
                if (net.isEmpty()) {
                    continue;
                }
                List<Hkl> seen = net.get().nodes().stream()
                        .filter(ZoneNet.Node::allowed)
                        .map(ZoneNet.Node::hkl)
                        .toList();
                Hkl first = seen.get(0);
                Hkl second = seen.stream()
                        .filter(h -> crystal.lattice()
                                        .reciprocal()
                                        .vector(h)
                                        .cross(crystal.lattice().reciprocal().vector(first))
                                        .norm()
                                > 0.1
                                        * crystal.lattice()
                                                .reciprocal()
                                                .vector(h)
                                                .norm()
                                        * crystal.lattice()
                                                .reciprocal()
                                                .vector(first)
                                                .norm())
                        .findFirst()
                        .orElseThrow();
                Rotation truth = ZoneSetting.onZone(zone, first, 2 * Math.PI * random.nextDouble())
                        .orientation(crystal.lattice())
                        .rotation();
                List<HandAnswer> answers = indexing(CONSTANT, crystal)
                        .index(List.of(clicked(crystal, truth, first), clicked(crystal, truth, second)));
                assertTrue(
                        answers.stream().anyMatch(a -> off(a, truth) < 0.01 && a.misfit() < 1e-6),
                        name + " [" + zone + "] " + first + ", " + second);
            }
        }
    }

    private static ClickedSpot clicked(Crystal crystal, Rotation r, Hkl hkl) {
        Vector3 g = r.apply(crystal.lattice().reciprocal().vector(hkl));
        double k = CONSTANT / Math.sqrt(1 - Math.pow(BEAM.wavelength() * g.norm(), 2));
        return ClickedSpot.at(new PixelPoint(CENTRE.x() + k * g.x(), CENTRE.y() - k * g.y()));
    }

    private static double off(HandAnswer a, Rotation truth) {
        Crystal c = a.placement().crystal();
        return c.spaceGroup().properLaueRotations(c.lattice()).stream()
                .map(m -> truth.after(Rotation.ofMatrix(m)))
                .mapToDouble(t -> Math.min(
                        t.angleTo(a.placement().orientation().rotation()),
                        a.halfTurn().map(Orientation::rotation).map(t::angleTo).orElse(9.0)))
                .map(Math::toDegrees)
                .min()
                .orElseThrow();
    }

    /** Clicked a pixel off, then refined against all spots, with the rotation locked or free. */
    @Test
    void index_thenRefined_onTheSpots() {
        DrawnPlacement drawn = DrawnPlacement.of("silicon", "0 1 1", "2 0 0", 0.4);
        Vector3 a = drawn.truth()
                .orientation()
                .scatteringVector(drawn.truth().crystal().lattice(), new Hkl(1, 1, -1));
        Vector3 b = drawn.truth()
                .orientation()
                .scatteringVector(drawn.truth().crystal().lattice(), new Hkl(4, 0, 0));
        Camera told = Camera.of(
                new PixelPoint(DrawnPlacement.CENTRE.x() + 0.4, DrawnPlacement.CENTRE.y()),
                DrawnPlacement.CONSTANT,
                false);
        HandAnswer best = HandIndexing.of(List.of(drawn.truth().crystal()), DrawnPlacement.BEAM, told, 0.02)
                .index(List.of(at(a, 0.3), at(b, -0.4)))
                .get(0);
        assertTrue(drawn.truth()
                .crystal()
                .spaceGroup()
                .equivalents(new Uvw(0, 1, 1))
                .contains(best.placement().setting().zone()));
        Solution free = LockedRefinement.refine(
                        drawn.measured(7), best.placement(), EnumSet.noneOf(LockedRefinement.Lock.class))
                .orElseThrow();
        assertTrue(free.rmsResidual() < 0.3, "rms " + free.rmsResidual());
        assertTrue(free.unexplained().size() <= 1);
    }

    private static ClickedSpot at(Vector3 g, double off) {
        double k = DrawnPlacement.CONSTANT / Math.sqrt(1 - Math.pow(DrawnPlacement.BEAM.wavelength() * g.norm(), 2));
        return ClickedSpot.at(new PixelPoint(
                DrawnPlacement.CENTRE.x() + k * g.x() + off, DrawnPlacement.CENTRE.y() - k * g.y() + off));
    }

    @Test
    void index_oneRow_refusedInWords() {
        IllegalArgumentException e = assertThrows(
                IllegalArgumentException.class,
                () -> indexing(CONSTANT, shelf("copper")).index(List.of(spot(2, 10), spot(1, 190.5))));
        assertTrue(e.getMessage().contains("one row"), e.getMessage());
    }

    @Test
    void index_oneSpotOrTheCentre_refused() {
        HandIndexing indexing = indexing(CONSTANT, shelf("copper"));
        assertThrows(IllegalArgumentException.class, () -> indexing.index(List.of(spot(2, 10))));
        assertThrows(
                IllegalArgumentException.class, () -> indexing.index(List.of(spot(2, 10), ClickedSpot.at(CENTRE))));
        assertThrows(
                IllegalArgumentException.class,
                () -> HandIndexing.of(List.of(), BEAM, Camera.of(CENTRE, 1, false), 0.1));
    }
}
