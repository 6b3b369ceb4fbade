package io.github.zonewright.reference;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;

import io.github.zonewright.crystal.AtomSite;
import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.geometry.Rotation;
import io.github.zonewright.geometry.Vector2;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.lattice.Lattice;
import io.github.zonewright.lattice.Uvw;
import io.github.zonewright.microscope.Beam;
import io.github.zonewright.microscope.Camera;
import io.github.zonewright.microscope.CameraScale;
import io.github.zonewright.orientation.Orientation;
import io.github.zonewright.pattern.PatternSimulator;
import java.util.Arrays;
import java.util.HashSet;
import java.util.List;
import java.util.Map;
import java.util.Set;
import java.util.function.Function;
import java.util.regex.MatchResult;
import java.util.stream.Collectors;
import java.util.stream.Stream;
import org.junit.jupiter.api.DynamicTest;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.TestFactory;

/** Published values that beam, lattice, camera and rotations must meet, each at the tolerance its row gives. */
class CheckValueTest {

    private static final Map<String, Function<CheckValue, double[]>> ANSWERS = Map.ofEntries(
            Map.entry("CONST", CheckValueTest::constant),
            Map.entry("LAMBDA", CheckValueTest::beam),
            Map.entry("DG", CheckValueTest::nickel),
            Map.entry("DSPACING", CheckValueTest::spacing),
            Map.entry("NIST", CheckValueTest::siliconSpacing),
            Map.entry("CELL", CheckValueTest::cell),
            Map.entry("ANGLE-CUBIC", CheckValueTest::cubicAngle),
            Map.entry("ANGLE-HCP", CheckValueTest::hexagonalAngle),
            Map.entry("MILLER-BRAVAIS", CheckValueTest::threeIndices),
            Map.entry("ZONE-LAW", CheckValueTest::zoneLaw),
            Map.entry("ZAP", CheckValueTest::zonePattern),
            Map.entry("ZAP-HCP", CheckValueTest::hexagonalZonePattern),
            Map.entry("TILT-MAP", CheckValueTest::tilt),
            Map.entry("OR", OrientationRelations::answer),
            Map.entry("FOLZ", CheckValueTest::upperLayer),
            Map.entry("CAMERA", CheckValueTest::camera));

    /** Categories that packages above these answer, with the number of their rows. */
    private static final Map<String, Integer> ANSWERED_ELSEWHERE = Map.of(
            "EXTINCTION", 34, // crystal: structure factors
            "FE0", 4, // crystal: scattering factors
            "FORBID", 13, // crystal and pattern: absences, double diffraction
            "SG", 14, // symmetry
            "TILT", 4); // tilting: the holder

    /** Single rows without an answer here. */
    private static final Set<String> UNANSWERED = Set.of(
            "CONST-01", // h, e and m stand inside Beam; CONST-04, -06, -07 and the wavelengths test them
            "CONST-02",
            "CONST-03",
            "ANGLE-HCP-09", // √(8/3), plain arithmetic
            "NIST-03", // certified lattice parameters: what kept crystals hold, not what is computed
            "NIST-04",
            "NIST-05",
            "NIST-06",
            "NIST-07",
            "NIST-08",
            "NIST-09",
            "NIST-10",
            "NIST-13",
            "NIST-14");

    private static List<CheckValue> answered() {
        return CheckValue.table().stream()
                .filter(row -> !ANSWERED_ELSEWHERE.containsKey(row.category()) && !UNANSWERED.contains(row.id()))
                .toList();
    }

    @Test
    void table_noRowIsDroppedSilently() {
        List<CheckValue> table = CheckValue.table();
        assertEquals(274, table.size());
        Map<String, Integer> elsewhere = table.stream()
                .filter(row -> ANSWERED_ELSEWHERE.containsKey(row.category()))
                .collect(Collectors.toMap(CheckValue::category, row -> 1, Integer::sum));
        assertEquals(ANSWERED_ELSEWHERE, elsewhere);
        Set<String> ids = new HashSet<>(table.stream().map(CheckValue::id).toList());
        assertEquals(274, ids.size());
        assertEquals(
                Set.of(), UNANSWERED.stream().filter(id -> !ids.contains(id)).collect(Collectors.toSet()));
        assertEquals(274 - 69 - 14, answered().size());
    }

    @TestFactory
    Stream<DynamicTest> value_meetsItsSource() {
        return answered().stream()
                .map(row -> DynamicTest.dynamicTest(row.id() + " " + row.quantity(), () -> {
                    double[] expected = row.numbers();
                    double[] actual = ANSWERS.get(row.category()).apply(row);
                    String message = row.source() + ": " + row.value() + ", computed " + Arrays.toString(actual);
                    if (row.tolerance() == 0) {
                        assertArrayEquals(expected, actual, message);
                    } else {
                        assertArrayEquals(expected, actual, row.tolerance(), message);
                    }
                }));
    }

    private static double[] one(double value) {
        return new double[] {value};
    }

    private static double[] constant(CheckValue row) {
        Beam beam = Beam.ofKilovolts(200);
        return switch (row.id()) {
            case "CONST-04" -> one(200 / (beam.gamma() - 1));
            // σ = 2πγmeλ/h², so h²/(2πme) = γλ/σ.
            case "CONST-06" -> one(beam.gamma() * beam.wavelength() / beam.interactionConstant());
            // λ = K/√(V(1 + eV/2mc²)).
            case "CONST-07" -> one(beam.wavelength() * Math.sqrt(2e5 * (1 + 200 / (2 * 510.99895))));
            default -> throw new IllegalStateException(row.id());
        };
    }

    private static double[] beam(CheckValue row) {
        Beam beam = Beam.ofKilovolts(row.number("(\\d+) kV"));
        if (row.mentions("wavelength")) {
            return one(beam.wavelength());
        }
        return one(
                row.mentions("sigma") ? beam.interactionConstant() : row.mentions("v/c") ? beam.speed() : beam.gamma());
    }

    private static double[] nickel(CheckValue row) {
        // The rows on (111) run along [1 −1 0]; they are as far apart as a√6/4, which is half the length of ½[1 1 −2].
        return row.mentions("wavelength")
                ? one(Beam.ofKilovolts(row.number("(\\d+) eV") / 1000).wavelength())
                : one(Lattice.cubic(row.number("a=([\\d.]+)"))
                                .vector(new Uvw(1, 1, -2))
                                .norm()
                        / 4);
    }

    private static double[] spacing(CheckValue row) {
        double a = row.number("a=([\\d.]+)");
        Lattice lattice = row.mentions(" c=") ? Lattice.hexagonal(a, row.number("c=([\\d.]+)")) : Lattice.cubic(a);
        return one(lattice.reciprocal().spacing(Hkl.parse(row.group("d(\\(\\d+\\))"))));
    }

    /** The lattice parameter of silicon, CODATA 2018 (from memory). */
    private static double[] siliconSpacing(CheckValue row) {
        return one(Lattice.cubic(5.431020511).reciprocal().spacing(Hkl.parse(row.group("d(\\(\\d+\\))"))));
    }

    private static double[] cell(CheckValue row) {
        Lattice albite = Lattice.ofDegrees(8.142, 12.785, 7.159, 94.19, 116.61, 87.68);
        return one(
                row.mentions("volume")
                        ? albite.volume()
                        : albite.reciprocal().spacing(Hkl.parse(row.group("d(\\(\\d+\\))"))));
    }

    private static double[] cubicAngle(CheckValue row) {
        MatchResult m = row.match("(\\(.*\\))\\^(\\(.*\\))");
        return one(Math.toDegrees(Lattice.cubic(4).reciprocal().angle(Hkl.parse(m.group(1)), Hkl.parse(m.group(2)))));
    }

    /** Planes written (hk.l), as older tables do. */
    private static double[] hexagonalAngle(CheckValue row) {
        MatchResult m = row.match("c/a ([\\d.]+) \\(0001\\)\\^\\((\\d)(\\d)\\.(\\d)\\)");
        Lattice lattice = Lattice.hexagonal(1, Double.parseDouble(m.group(1)));
        Hkl plane = Hkl.parse(m.group(2) + m.group(3) + m.group(4));
        return one(Math.toDegrees(lattice.reciprocal().angle(new Hkl(0, 0, 1), plane)));
    }

    private static double[] indices(Uvw uvw) {
        return new double[] {uvw.u(), uvw.v(), uvw.w()};
    }

    private static double[] threeIndices(CheckValue row) {
        return indices(Uvw.parse(row.group("(\\[[-\\d ]+\\])")));
    }

    private static double[] zoneLaw(CheckValue row) {
        MatchResult m = row.match("(\\([-\\d, ]+\\)) x (\\([-\\d, ]+\\))");
        return indices(Hkl.parse(m.group(1)).zoneWith(Hkl.parse(m.group(2))));
    }

    private static double[] zonePattern(CheckValue row) {
        ZoneNet net = ZoneNet.of(row.group("^([\\w-]+)"), Uvw.parse(row.group("(\\[\\d+\\])")));
        return one(row.mentions("R2/R1") ? net.ratio() : row.mentions("R3/R1") ? net.shortDiagonal() : net.degrees());
    }

    private static double[] hexagonalZonePattern(CheckValue row) {
        return one(ZoneNet.of(row.group("^([\\w-]+)"), Uvw.parse(row.group("=(\\([-\\d, ]+\\)): g1")))
                .ratio());
    }

    private static double[] tilt(CheckValue row) {
        MatchResult m = row.match("(\\[\\d+\\]) to (\\[\\d+\\])");
        return one(Math.toDegrees(Lattice.cubic(4).angle(Uvw.parse(m.group(1)), Uvw.parse(m.group(2)))));
    }

    /** Where the Ewald sphere cuts the plane at height H = n/|uvw|: G² = 2H/λ − H². */
    private static double[] upperLayer(CheckValue row) {
        Lattice lattice = switch (row.group("^([\\w-]+)")) {
            case "Si" -> Lattice.cubic(5.4309);
            case "Au" -> Lattice.cubic(4.0786);
            case "alpha-Fe" -> Lattice.cubic(2.8664);
            case "hcp-Ti" -> ZoneNet.lattice("hcp-Ti");
            default -> throw new IllegalStateException(row.quantity());
        };
        double wavelength = Beam.ofKilovolts(row.number("(\\d+) kV")).wavelength();
        double height = row.number("n=(\\d)")
                / lattice.vector(Uvw.parse(row.group("(\\[.*\\])"))).norm();
        // The table cuts H off after five digits.
        assertEquals(row.number("H=([\\d.]+)"), height, 1e-5);
        return one(Math.sqrt(2 * height / wavelength - height * height));
    }

    private static double[] camera(CheckValue row) {
        double spacing = Lattice.cubic(4.0786).reciprocal().spacing(new Hkl(1, 1, 1));
        double wavelength = Beam.ofKilovolts(row.mentions("200 kV") ? 200 : 100).wavelength();
        double theta = Math.asin(wavelength / (2 * spacing));
        return switch (row.id()) {
            case "CAMERA-02" -> one(1 / wavelength);
            case "CAMERA-04" -> one(1000 * theta);
            case "CAMERA-03" -> {
                // Pixels of 1 mm, so that pixels are millimetres.
                Camera plate = Camera.of(
                        new PixelPoint(0, 0),
                        CameraScale.fromCameraLength(1000, 1000, 1, Beam.ofKilovolts(100)),
                        false);
                yield one(plate.toPixel(new Vector2(Math.sin(2 * theta) / wavelength, 0), wavelength)
                        .x());
            }
            case "CAMERA-06" -> one(Math.abs(excitationErrorOnZone()));
            default -> throw new IllegalStateException(row.id());
        };
    }

    /** Of the reflection at 1 1/Å of a crystal exactly on zone, at 200 kV. */
    private static double excitationErrorOnZone() {
        Crystal cube = Crystal.of("cube", Lattice.cubic(1), "P 1", AtomSite.of("C", 0, 0, 0));
        return PatternSimulator.of(cube, Beam.ofKilovolts(200), 1.01)
                .simulate(new Orientation(Rotation.IDENTITY))
                .spots()
                .get(0)
                .excitationError();
    }
}
