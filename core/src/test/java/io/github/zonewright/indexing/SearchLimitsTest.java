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
import io.github.zonewright.spots.MeasuredPattern;
import io.github.zonewright.spots.SpotFinder;
import java.util.List;
import java.util.stream.Stream;
import org.junit.jupiter.api.Test;

/** What a user may hold or limit in a search, on a drawn pattern of silicon along [0 1 1], turned by 0.4 rad. */
class SearchLimitsTest {

    private static final Beam BEAM = Beam.ofKilovolts(200);
    private static final Crystal SILICON = CrystalShelf.find("silicon").orElseThrow();
    private static final Uvw ZONE = new Uvw(0, 1, 1);
    private static final double CONSTANT = 115;
    private static final double RATIO = 1.03;
    private static final double AZIMUTH = 0.7;
    private static final PixelPoint CENTRE = new PixelPoint(118, 125);
    private static final MeasuredPattern ROUND = measured(1);
    private static final MeasuredPattern ELLIPTIC = measured(RATIO);

    private static MeasuredPattern measured(double ratio) {
        Rotation orientation = Rotation.ofAxisAngle(Vector3.Z, 0.4)
                .after(Rotation.between(SILICON.lattice().vector(ZONE), Vector3.Z));
        DrawnCrystal.Setup setup = new DrawnCrystal.Setup(
                SILICON, BEAM.wavelength(), orientation, CENTRE, CONSTANT, ratio, AZIMUTH, false, 240, 0.02);
        return SpotFinder.measure(DrawnCrystal.image(setup, DrawnCrystal.spots(setup, 1), 1));
    }

    private static OrientationSearch search(KnownCamera camera) {
        return OrientationSearch.of(List.of(SILICON), BEAM, camera);
    }

    private static Solution best(OrientationSearch search, MeasuredPattern pattern) {
        return search.find(pattern).best().orElseThrow();
    }

    @Test
    void find_constantHeld_staysAsTold() {
        Solution s = best(search(KnownCamera.of(CONSTANT * 1.002, 0, false)), ROUND);
        assertEquals(CONSTANT * 1.002, s.placement().camera().constant(), 1e-3);
        assertTrue(s.errors().constant() < 1e-3);
        assertTrue(s.matches().size() > 20);
    }

    @Test
    void find_ellipseHeld_staysAsTold() {
        KnownCamera camera = KnownCamera.of(CONSTANT, 0.02, false).withEllipse(RATIO, AZIMUTH, 0);
        Camera found = best(search(camera), ELLIPTIC).placement().camera();
        assertEquals(RATIO, found.ellipseRatio(), 1e-5);
        assertEquals(AZIMUTH, found.ellipseAzimuth(), 1e-4);
        assertEquals(CONSTANT, found.constant(), 0.05);
    }

    @Test
    void find_ellipseOfACalibration_refinesWithinItsError() {
        KnownCamera camera = KnownCamera.of(CONSTANT, 0.02, false).withEllipse(1.034, AZIMUTH + 0.03, 0.004);
        Camera found = best(search(camera), ELLIPTIC).placement().camera();
        assertEquals(RATIO, found.ellipseRatio(), 0.002);
    }

    /** What is held needs no word; what is free goes with the cell by the very equations. */
    @Test
    void find_remarks_nameWhatIsNotToldApart() {
        List<String> free =
                best(search(KnownCamera.of(CONSTANT, 0.02, false)), ROUND).remarks();
        assertTrue(free.stream().anyMatch(r -> r.startsWith("Camera constant and size of the cell")), free.toString());
        assertTrue(free.stream().anyMatch(r -> r.startsWith("Ellipse and axial ratios")), free.toString());
        KnownCamera camera = KnownCamera.of(CONSTANT, 0, false).withEllipse(1, 0, 0);
        List<String> held = best(search(camera), ROUND).remarks();
        assertTrue(held.stream().noneMatch(r -> r.contains("cell")), held.toString());
    }

    @Test
    void find_remarks_aWordWhereTheLeanIsUncertain() {
        for (MeasuredPattern pattern : List.of(ROUND, ELLIPTIC)) {
            Solution s = best(search(KnownCamera.of(CONSTANT, 0.02, false)), pattern);
            double error =
                    Math.toDegrees(Math.max(s.errors().leanX(), s.errors().leanY()));
            assertEquals(error > 0.5, s.remarks().stream().anyMatch(r -> r.startsWith("The lean")), s.remarks() + "");
        }
    }

    @Test
    void find_centreGiven_staysNearIt() {
        KnownCamera camera = KnownCamera.of(CONSTANT, 0.02, false).withCentre(CENTRE, 0.5);
        assertEquals(
                0, best(search(camera), ROUND).placement().camera().centre().distanceTo(CENTRE), 0.1);
        KnownCamera astray = camera.withCentre(new PixelPoint(60, 60), 0.5);
        search(astray)
                .find(ROUND)
                .solutions()
                .forEach(s -> assertTrue(
                        s.placement().camera().centre().distanceTo(new PixelPoint(60, 60)) < 5,
                        "stays where it was put"));
    }

    @Test
    void of_otherSolution_holdsItsCamera() {
        Solution standard = best(search(KnownCamera.of(116, 0.02, false)), ELLIPTIC);
        KnownCamera camera = KnownCamera.of(standard);
        assertTrue(camera.tolerance() < 0.002, camera.toString());
        Camera again = best(search(camera), ELLIPTIC).placement().camera();
        assertEquals(standard.placement().camera().constant(), again.constant(), 0.02);
        assertEquals(standard.placement().camera().ellipseRatio(), again.ellipseRatio(), 5e-4);
    }

    @Test
    void withZone_looksAtNoOther() {
        OrientationSearch search = search(KnownCamera.of(CONSTANT, 0.02, false));
        assertEquals(
                ZONE,
                best(search.withZone(new Uvw(0, 2, 2)), ROUND)
                        .placement()
                        .setting()
                        .zone());
        search.withZone(new Uvw(1, 1, 1))
                .find(ROUND)
                .solutions()
                .forEach(s ->
                        assertEquals(new Uvw(1, 1, 1), s.placement().setting().zone()));
        assertThrows(IllegalArgumentException.class, () -> search.withZone(new Uvw(0, 0, 0)));
    }

    @Test
    void withZoneFamily_findsAnyOfIt() {
        OrientationSearch search = search(KnownCamera.of(CONSTANT, 0.02, false));
        Solution s = best(search.withZoneFamily(new Uvw(1, -1, 0)), ROUND);
        assertEquals(new Uvw(1, -1, 0), s.placement().setting().zone());
        assertTrue(s.matches().size() > 20);
    }

    /** Quartz, point group 32: the twofold axes are along a. Across [2 1 0] lies one, across [1 0 0] none. */
    @Test
    void withZoneFamily_oppositesThatDiffer_bothTried() {
        Crystal quartz = CrystalShelf.find("quartz").orElseThrow();
        assertEquals(
                List.of(new Uvw(2, 1, 0)), ZoneLimit.ofFamily(new Uvw(2, 1, 0)).zones(quartz));
        assertEquals(
                List.of(new Uvw(1, 0, 0), new Uvw(-1, 0, 0)),
                ZoneLimit.ofFamily(new Uvw(1, 0, 0)).zones(quartz));
    }

    @Test
    void withRotation_choosesTheHalfThatIsAsked() {
        OrientationSearch search = search(KnownCamera.of(CONSTANT, 0.02, false));
        Solution free = best(search.withZone(ZONE), ROUND);
        Hkl reference = free.placement().setting().reference();
        double rotation = free.placement().setting().rotation();
        for (double asked : new double[] {rotation, rotation + Math.PI}) {
            Solution s = best(search.withRotation(ZONE, reference, asked - 0.05, asked + 0.05), ROUND);
            assertEquals(0, Math.IEEEremainder(s.placement().setting().rotation() - asked, 2 * Math.PI), 0.001);
            assertTrue(s.halfTurn().isEmpty());
        }
        double off = rotation + Math.toRadians(0.1);
        Solution held = best(search.withRotation(ZONE, reference, off, off), ROUND);
        assertEquals(off, held.placement().setting().rotation(), 1e-5);
    }

    @Test
    void withRotation_elsewhere_findsNothingThere() {
        OrientationSearch search = search(KnownCamera.of(CONSTANT, 0.02, false));
        Solution free = best(search.withZone(ZONE), ROUND);
        Hkl reference = free.placement().setting().reference();
        double asked = free.placement().setting().rotation() + Math.toRadians(20);
        SearchResult result =
                search.withRotation(ZONE, reference, asked - 0.1, asked + 0.1).find(ROUND);
        assertTrue(result.best().isEmpty(), result.explanation());
    }

    @Test
    void withRotation_wrongReferenceOrRange_refused() {
        OrientationSearch search = search(KnownCamera.of(CONSTANT, 0.02, false));
        assertThrows(IllegalArgumentException.class, () -> search.withRotation(ZONE, new Hkl(1, 1, 1), 0, 1));
        assertThrows(IllegalArgumentException.class, () -> search.withRotation(ZONE, new Hkl(2, 0, 0), 1, 0));
        assertThrows(IllegalArgumentException.class, () -> search.withRotation(ZONE, new Hkl(2, 0, 0), 0, 7));
        assertThrows(IllegalArgumentException.class, () -> search.withRotation(ZONE, new Hkl(2, 0, 0), 0, Double.NaN));
    }

    @Test
    void find_severalCrystals_oneRankedListAndProgress() {
        List<Crystal> crystals = Stream.of("copper", "silicon", "quartz")
                .map(n -> CrystalShelf.find(n).orElseThrow())
                .toList();
        double[] last = {0};
        SearchResult result = OrientationSearch.of(crystals, BEAM, KnownCamera.of(116, 0.02, false))
                .find(
                        ROUND,
                        share -> {
                            assertTrue(share >= last[0] && share <= 1);
                            last[0] = share;
                        },
                        () -> false);
        assertEquals(1, last[0], 0);
        assertEquals(
                "Silicon", result.best().orElseThrow().placement().crystal().name());
        assertTrue(result.explanation().contains("3 crystals were tried"), result.explanation());
        assertThrows(
                IllegalArgumentException.class,
                () -> OrientationSearch.of(List.of(), BEAM, KnownCamera.of(116, 0.02, false)));
    }

    @Test
    void find_scaleFurtherOffThanTold_saysWhichWouldDo() {
        SearchResult result =
                search(KnownCamera.of(CONSTANT * 1.02, 0.015, false)).find(ROUND);
        assertTrue(result.best().isEmpty());
        String said = result.explanation();
        assertTrue(said.contains("which is 2.0 % off") && said.contains("[1 1 0]"), said);
    }

    /** Alone a crystal keeps its score; beside one of fewer zone axes the logarithm of the ratio is taken off. */
    @Test
    void find_crystalOfMoreZones_paysForThem() {
        Crystal quartz = CrystalShelf.find("quartz").orElseThrow();
        KnownCamera camera = KnownCamera.of(CONSTANT, 0.02, false);
        double alone = best(search(camera), ROUND).score();
        int zones = ZoneCatalogue.zones(SILICON, 5).size();
        Crystal caesium = CrystalShelf.find("caesium chloride").orElseThrow();
        assertEquals(zones, ZoneCatalogue.zones(caesium, 5).size());
        assertTrue(ZoneCatalogue.zones(quartz, 5).size() > 3 * zones);
        assertEquals(
                alone,
                best(OrientationSearch.of(List.of(quartz, SILICON), BEAM, camera), ROUND)
                        .score(),
                0);
    }

    @Test
    void of_valuesOutOfRange_sayWhich() {
        KnownCamera camera = KnownCamera.of(100, 0.02, false);
        assertMessage("camera constant", () -> KnownCamera.of(0, 0.02, false));
        assertMessage("tolerance", () -> KnownCamera.of(100, -0.01, false));
        assertMessage("ratio", () -> camera.withEllipse(0.98, 0, 0.01));
        assertMessage("azimuth", () -> camera.withEllipse(1.01, Double.NaN, 0.01));
        assertMessage("uncertainty", () -> camera.withEllipse(1.01, 0, Double.NaN));
        assertMessage("centre", () -> camera.withCentre(CENTRE, 0));
    }

    private static void assertMessage(String quantity, Runnable made) {
        String message = assertThrows(IllegalArgumentException.class, made::run).getMessage();
        assertTrue(message.contains(quantity) && message.contains("expected"), message);
    }
}
