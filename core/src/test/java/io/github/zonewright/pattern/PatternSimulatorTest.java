package io.github.zonewright.pattern;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import io.github.zonewright.crystal.AtomSite;
import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.crystal.StructureFactors;
import io.github.zonewright.geometry.Rotation;
import io.github.zonewright.geometry.Vector3;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.lattice.Lattice;
import io.github.zonewright.lattice.Uvw;
import io.github.zonewright.microscope.Beam;
import io.github.zonewright.orientation.Orientation;
import io.github.zonewright.orientation.ZoneSetting;
import java.util.ArrayList;
import java.util.Comparator;
import java.util.HashSet;
import java.util.List;
import java.util.Map;
import java.util.Random;
import java.util.Set;
import java.util.TreeMap;
import java.util.TreeSet;
import java.util.function.Function;
import java.util.stream.Collectors;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.ValueSource;

class PatternSimulatorTest {

    private static final Beam BEAM = Beam.ofKilovolts(200);
    private static final Crystal SILICON =
            Crystal.of("silicon", Lattice.cubic(5.4309), "F d -3 m:1", AtomSite.of("Si", 0, 0, 0));
    private static final Crystal TRICLINIC = Crystal.of(
            "triclinic", Lattice.ofDegrees(4.2, 5.1, 6.3, 82, 97, 104), "P 1", AtomSite.of("C", 0.1, 0.2, 0.3));
    private static final Uvw C = new Uvw(0, 0, 1);

    private static Orientation random(Random r) {
        return new Orientation(
                Rotation.ofQuaternion(r.nextGaussian(), r.nextGaussian(), r.nextGaussian(), r.nextGaussian()));
    }

    private static Orientation silicon(Uvw zone, Hkl reference, double leanX) {
        return new ZoneSetting(zone, reference, 0.3, leanX, 0).orientation(SILICON.lattice());
    }

    private static Map<Hkl, PredictedSpot> byIndices(SpotPattern pattern) {
        return pattern.spots().stream().collect(Collectors.toMap(PredictedSpot::hkl, Function.identity()));
    }

    private static void assertSame(TreeMap<Hkl, EwaldConstruction.Meeting> expected, SpotPattern pattern) {
        Map<Hkl, PredictedSpot> actual = byIndices(pattern);
        assertEquals(expected.keySet(), new TreeSet<>(actual.keySet()));
        expected.forEach((hkl, meeting) -> {
            assertEquals(0, meeting.place().minus(actual.get(hkl).g()).norm(), 1e-12, hkl::toString);
            assertEquals(meeting.excitationError(), actual.get(hkl).excitationError(), 1e-12, hkl::toString);
        });
    }

    @Test
    void simulate_acrossTheBeam_agreesWithEwaldsConstruction() {
        PatternSimulator simulator = PatternSimulator.of(TRICLINIC, BEAM, 1.5);
        EwaldConstruction ewald = new EwaldConstruction(TRICLINIC, BEAM.wavelength(), Vector3.Z, 1.5, 0.02);
        Random random = new Random(81);
        for (int i = 0; i < 10; i++) {
            Orientation o = random(random);
            assertSame(ewald.meetings(o, 12), simulator.simulate(o));
        }
    }

    @ParameterizedTest
    @CsvSource({"0.2, 0", "-0.3, 0.4", "0, -0.7"})
    void simulate_tiltedFoil_agreesWithEwaldsConstruction(double x, double y) {
        Vector3 normal = new Vector3(x, y, 1).normalize();
        PatternSimulator simulator = PatternSimulator.of(TRICLINIC, BEAM, 1.5).withFoilNormal(normal);
        EwaldConstruction ewald = new EwaldConstruction(TRICLINIC, BEAM.wavelength(), normal, 1.5, 0.02);
        Random random = new Random(82);
        for (int i = 0; i < 5; i++) {
            Orientation o = random(random);
            assertSame(ewald.meetings(o, 12), simulator.simulate(o));
        }
    }

    /** Slow electrons, whose sphere curves so much that |g| is well above what is seen across the beam. */
    @ParameterizedTest
    @CsvSource({"1, 1.5, 0.02", "0.3, 1.0, 0.02", "5, 2.5, 0.1", "100, 2.4, 0.3"})
    void simulate_stronglyCurvedSphere_losesNoSpot(double kilovolts, double largestG, double excitation) {
        Beam slow = Beam.ofKilovolts(kilovolts);
        PatternSimulator simulator =
                PatternSimulator.of(TRICLINIC, slow, largestG).withLargestExcitation(excitation);
        EwaldConstruction ewald = new EwaldConstruction(TRICLINIC, slow.wavelength(), Vector3.Z, largestG, excitation);
        Random random = new Random(83);
        for (int i = 0; i < 3; i++) {
            Orientation o = random(random);
            assertSame(ewald.meetings(o, 18), simulator.simulate(o));
        }
    }

    /** Williams and Carter, Transmission Electron Microscopy, chapter 12: |s| = λg²/2 = 0.01254 1/Å at 200 kV and 1 1/Å (from memory); the sign is the sphere's. */
    @Test
    void simulate_onZone_zeroLayerLiesOutsideTheSphere() {
        Crystal cube = Crystal.of("cube", Lattice.cubic(4), "P 1", AtomSite.of("C", 0, 0, 0));
        SpotPattern pattern = PatternSimulator.of(cube, BEAM, 1.01).simulate(new Orientation(Rotation.IDENTITY));
        PredictedSpot spot = byIndices(pattern).get(new Hkl(4, 0, 0));
        assertEquals(-0.012542, spot.excitationError(), 1e-6);
        assertEquals(1, spot.g().x(), 1e-15);
        assertEquals(0, spot.g().y(), 1e-15);
    }

    /** Leant towards +X, what lies on the left comes up into the sphere, what lies on the right goes down. */
    @Test
    void simulate_leantToTheRight_leftSideComesIntoTheSphere() {
        Crystal cube = Crystal.of("cube", Lattice.cubic(4), "P 1", AtomSite.of("C", 0, 0, 0));
        ZoneSetting setting = new ZoneSetting(C, new Hkl(1, 0, 0), 0, 0.01, 0);
        Map<Hkl, PredictedSpot> spots =
                byIndices(PatternSimulator.of(cube, BEAM, 1).simulate(setting.orientation(cube.lattice())));
        // s = g sin 0.01 − λg²/2 with g = 0.5 1/Å
        assertEquals(0.005 - 0.003135, spots.get(new Hkl(-2, 0, 0)).excitationError(), 1e-6);
        assertEquals(-0.005 - 0.003135, spots.get(new Hkl(2, 0, 0)).excitationError(), 1e-6);
    }

    @Test
    void simulate_foilTiltedToTheRight_workedNumber() {
        // Normal 30° towards X: from 400, which lies 0.01254 1/Å below the sphere, up the normal by s/cos 30° or so.
        Crystal cube = Crystal.of("cube", Lattice.cubic(4), "P 1", AtomSite.of("C", 0, 0, 0));
        Vector3 normal = new Vector3(0.5, 0, Math.sqrt(0.75));
        PatternSimulator tilted = PatternSimulator.of(cube, BEAM, 1.01).withFoilNormal(normal);
        PredictedSpot spot =
                byIndices(tilted.simulate(new Orientation(Rotation.IDENTITY))).get(new Hkl(4, 0, 0));
        // The sphere rises by tan 2θ = 0.02509 there, which takes the first order further.
        double expected = -0.0125416 / (Math.sqrt(0.75) - 0.5 * 0.02509);
        assertEquals(expected, spot.excitationError(), 2e-6);
        assertEquals(1 - 0.5 * expected, spot.g().x(), 2e-6);
        PatternSimulator below = PatternSimulator.of(cube, BEAM, 1.01).withFoilNormal(normal.negate());
        assertEquals(
                tilted.simulate(new Orientation(Rotation.IDENTITY)).spots(),
                below.simulate(new Orientation(Rotation.IDENTITY)).spots());
    }

    @Test
    void simulate_onZone_cutsNoLayerBelow() {
        SpotPattern pattern = PatternSimulator.of(SILICON, BEAM, 4).simulate(silicon(C, new Hkl(2, 2, 0), 0));
        Set<Integer> layers = layers(pattern, C);
        assertEquals(Set.of(0, 1), layers);
    }

    /** By 8° the plane at −1 layer, H = 1/5.4309 Å, comes into the sphere: k(1 − cos 8°) = 0.388 > H. */
    @Test
    void simulate_leaningCrystal_showsLayersOfEitherSign() {
        SpotPattern pattern =
                PatternSimulator.of(SILICON, BEAM, 2).simulate(silicon(C, new Hkl(2, 2, 0), Math.toRadians(8)));
        assertTrue(layers(pattern, C).contains(-1), layers(pattern, C)::toString);
        assertTrue(layers(pattern, C).contains(0));
        EwaldConstruction ewald = new EwaldConstruction(SILICON, BEAM.wavelength(), Vector3.Z, 2, 0.02);
        Orientation o = silicon(C, new Hkl(2, 2, 0), Math.toRadians(8));
        TreeMap<Hkl, EwaldConstruction.Meeting> expected = ewald.meetings(o, 12);
        expected.keySet().removeIf(hkl -> !inDiamond(hkl));
        assertSame(expected, pattern);
    }

    private static Set<Integer> layers(SpotPattern pattern, Uvw zone) {
        Set<Integer> layers = new HashSet<>();
        pattern.spots().forEach(s -> layers.add(s.hkl().dot(zone)));
        return layers;
    }

    /** International Tables A, F d -3 m with the atom at 8a: hkl all odd, or all even with h + k + l = 4n. */
    private static boolean inDiamond(Hkl g) {
        boolean unmixed = (g.h() - g.k()) % 2 == 0 && (g.k() - g.l()) % 2 == 0;
        return unmixed && (g.h() % 2 != 0 || (g.h() + g.k() + g.l()) % 4 == 0);
    }

    @Test
    void simulate_silicon_leavesOutWhatTheDiamondGlideForbids() {
        PatternSimulator simulator = PatternSimulator.of(SILICON, BEAM, 1.5);
        Map<Hkl, PredictedSpot> spots = byIndices(simulator.simulate(silicon(C, new Hkl(2, 2, 0), 0)));
        assertFalse(spots.containsKey(new Hkl(2, 0, 0)));
        assertFalse(spots.containsKey(new Hkl(0, 0, 0)));
        assertTrue(spots.containsKey(new Hkl(2, 2, 0)));
        assertTrue(spots.containsKey(new Hkl(4, 0, 0)));
        // 222 and 442 are forbidden by the special position alone, which no table of the space group tells.
        Map<Hkl, PredictedSpot> zone112 =
                byIndices(simulator.simulate(silicon(new Uvw(1, 1, 2), new Hkl(2, -2, 0), 0)));
        zone112.values().forEach(s -> assertTrue(inDiamond(s.hkl()), s::toString));
        assertTrue(zone112.containsKey(new Hkl(1, 1, -1)));
    }

    @Test
    void simulate_onZone_zeroLayerIsTwoFold() {
        SpotPattern pattern = PatternSimulator.of(TRICLINIC, BEAM, 1.2)
                .simulate(ZoneSetting.onZone(C, new Hkl(1, 0, 0), 1).orientation(TRICLINIC.lattice()));
        Map<Hkl, PredictedSpot> spots = byIndices(pattern);
        List<PredictedSpot> zero =
                spots.values().stream().filter(s -> s.hkl().dot(C) == 0).toList();
        assertTrue(zero.size() > 20);
        for (PredictedSpot spot : zero) {
            PredictedSpot mate = spots.get(spot.hkl().negate());
            assertEquals(0, spot.g().plus(mate.g()).norm(), 1e-14);
            assertEquals(spot.excitationError(), mate.excitationError(), 1e-14);
            assertEquals(spot.intensity(), mate.intensity(), 1e-9 * spot.intensity() + 1e-15);
        }
    }

    @Test
    void simulate_crystalTurnedAboutTheBeam_turnsThePattern() {
        PatternSimulator simulator = PatternSimulator.of(TRICLINIC, BEAM, 1.2);
        Orientation before = random(new Random(84));
        Orientation after = new Orientation(Rotation.ofAxisAngle(Vector3.Z, 0.7).after(before.rotation()));
        Map<Hkl, PredictedSpot> turned = byIndices(simulator.simulate(after));
        for (PredictedSpot spot : simulator.simulate(before).spots()) {
            assertEquals(
                    0, spot.g().rotate(0.7).minus(turned.get(spot.hkl()).g()).norm(), 1e-14);
        }
    }

    @Test
    void simulate_intensity_isThatOfTheModelAtTheExtinctionDistance() {
        IntensityModel model = new IntensityModel.TwoBeam(800);
        StructureFactors factors = StructureFactors.of(SILICON);
        SpotPattern pattern = PatternSimulator.of(SILICON, BEAM, 1.5)
                .withModel(model)
                .simulate(silicon(new Uvw(0, 1, 1), new Hkl(2, 0, 0), 0.01));
        for (PredictedSpot spot : pattern.spots()) {
            double extinction = factors.extinctionDistance(spot.hkl(), BEAM);
            assertEquals(factors.at(spot.hkl()).amplitude(), spot.amplitude(), 1e-12);
            assertEquals(model.intensity(spot.excitationError(), extinction), spot.intensity(), 1e-10);
        }
    }

    @Test
    void simulate_order_isStrongestFirst() {
        SpotPattern pattern = PatternSimulator.of(SILICON, BEAM, 2).simulate(silicon(C, new Hkl(2, 2, 0), 0));
        List<PredictedSpot> sorted = new ArrayList<>(pattern.spots());
        sorted.sort(Comparator.comparing(PredictedSpot::intensity).reversed().thenComparing(PredictedSpot::hkl));
        assertEquals(sorted, pattern.spots());
        assertThrows(UnsupportedOperationException.class, () -> pattern.spots().clear());
    }

    @Test
    void with_leavesTheSimulatorItself() {
        PatternSimulator simulator = PatternSimulator.of(SILICON, BEAM, 1);
        Orientation o = silicon(C, new Hkl(2, 2, 0), 0.003);
        SpotPattern before = simulator.simulate(o);
        simulator
                .withLargestExcitation(0.5)
                .withModel(new IntensityModel.TwoBeam(90))
                .withFoilNormal(Vector3.X.plus(Vector3.Z));
        assertEquals(before.spots(), simulator.simulate(o).spots());
        SpotPattern narrow = simulator.withLargestExcitation(0.002).simulate(o);
        assertTrue(narrow.spots().size() < before.spots().size());
        narrow.spots().forEach(s -> assertTrue(Math.abs(s.excitationError()) <= 0.002));
        assertTrue(before.spots().containsAll(narrow.spots()));
    }

    @ParameterizedTest
    @ValueSource(doubles = {0, -1, Double.NaN, 40})
    void of_largestGOutOfRange_isRefused(double largestG) {
        String message = assertThrows(
                        IllegalArgumentException.class, () -> PatternSimulator.of(SILICON, BEAM, largestG))
                .getMessage();
        assertTrue(message.startsWith("largest scattering vector: " + largestG), message);
    }

    @Test
    void with_badArguments_areRefused() {
        PatternSimulator simulator = PatternSimulator.of(SILICON, BEAM, 1);
        assertThrows(IllegalArgumentException.class, () -> simulator.withLargestExcitation(0));
        assertThrows(IllegalArgumentException.class, () -> simulator.withLargestExcitation(1.01));
        assertThrows(IllegalArgumentException.class, () -> simulator.withLargestExcitation(Double.NaN));
        assertThrows(IllegalArgumentException.class, () -> simulator.withFoilNormal(Vector3.X));
        assertThrows(ArithmeticException.class, () -> simulator.withFoilNormal(Vector3.ZERO));
    }

    /** Few reflections or all of them: the pattern is the same, spot by spot, as long as the tilt stays within the angle. */
    @ParameterizedTest
    @ValueSource(doubles = {10, 30, 200})
    void near_isTheSamePattern(double kilovolts) {
        Random random = new Random(12);
        PatternSimulator all = PatternSimulator.of(TRICLINIC, Beam.ofKilovolts(kilovolts), 2.2);
        double angle = Math.toRadians(0.5);
        for (int i = 0; i < 40; i++) {
            Orientation base = random(random);
            PatternSimulator near = all.near(base.towardsSource(), angle);
            double azimuth = 2 * Math.PI * random.nextDouble();
            Rotation tilt = Rotation.ofAxisAngle(new Vector3(Math.cos(azimuth), Math.sin(azimuth), 0), 0.999 * angle);
            Orientation tilted = new Orientation(Rotation.ofAxisAngle(Vector3.Z, 6 * random.nextDouble())
                    .after(tilt)
                    .after(base.rotation()));
            assertEquals(all.simulate(tilted).spots(), near.simulate(tilted).spots());
        }
    }
}
