package io.github.zonewright.pattern;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import io.github.zonewright.crystal.AtomSite;
import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.geometry.Rotation;
import io.github.zonewright.geometry.Vector3;
import io.github.zonewright.lattice.Lattice;
import io.github.zonewright.lattice.Uvw;
import io.github.zonewright.microscope.Beam;
import io.github.zonewright.orientation.Orientation;
import io.github.zonewright.reference.ReferenceCsv;
import java.util.List;
import java.util.Map;
import java.util.regex.MatchResult;
import java.util.regex.Matcher;
import java.util.regex.Pattern;
import java.util.stream.Stream;
import org.junit.jupiter.api.DynamicTest;
import org.junit.jupiter.api.TestFactory;

/** Rings of the first upper layer on zone: the FOLZ rows of {@code check-values.csv}, after Steeds (1979). */
class UpperLayerTest {

    @TestFactory
    Stream<DynamicTest> simulate_onZone_showsTheRing() {
        List<Map<String, String>> rows = ReferenceCsv.read("check-values.csv", ',').stream()
                .filter(row -> row.get("category").equals("FOLZ"))
                .toList();
        assertEquals(6, rows.size());
        return rows.stream()
                .map(row -> DynamicTest.dynamicTest(row.get("id") + " " + row.get("quantity"), () -> checkRing(row)));
    }

    private static void checkRing(Map<String, String> row) {
        MatchResult q = match("^(\\S+) (\\[.*\\]) at (\\d+) kV.*n=(\\d)", row.get("quantity"));
        Uvw zone = Uvw.parse(q.group(2));
        int layer = Integer.parseInt(q.group(4));
        Crystal crystal = crystal(q.group(1));
        Beam beam = Beam.ofKilovolts(Double.parseDouble(q.group(3)));
        double radius = Double.parseDouble(row.get("value"));
        Rotation onZone = Rotation.between(crystal.lattice().vector(zone), Vector3.Z);
        List<PredictedSpot> spots =
                PatternSimulator.of(crystal, beam, radius + 0.5).simulate(new Orientation(onZone)).spots().stream()
                        .filter(s -> s.hkl().dot(zone) == layer)
                        .toList();
        double k = 1 / beam.wavelength();
        double tolerance = Double.parseDouble(row.get("tolerance_abs"));
        for (PredictedSpot spot : spots) {
            double g = spot.g().norm();
            // The sphere is k − √(k² − g²) high at the spot, the layer higher by s: where the sphere reaches it is the
            // ring.
            double height = k - Math.sqrt(k * k - g * g) + spot.excitationError();
            assertEquals(radius, Math.sqrt(2 * k * height - height * height), tolerance, spot::toString);
            assertEquals(g < radius, spot.excitationError() > 0, spot::toString);
        }
        long inside = spots.stream().filter(s -> s.excitationError() > 0).count();
        assertTrue(inside > 0 && inside < spots.size(), "spots on both sides of the ring");
    }

    private static Crystal crystal(String name) {
        return switch (name) {
            case "Si" -> Crystal.of(name, Lattice.cubic(5.4309), "F d -3 m:1", AtomSite.of("Si", 0, 0, 0));
            case "Au" -> Crystal.of(name, Lattice.cubic(4.0786), "F m -3 m", AtomSite.of("Au", 0, 0, 0));
            case "alpha-Fe" -> Crystal.of(name, Lattice.cubic(2.8664), "I m -3 m", AtomSite.of("Fe", 0, 0, 0));
            case "hcp-Ti" ->
                Crystal.of(
                        name,
                        Lattice.hexagonal(2.9505, 4.6826),
                        "P 63/m m c",
                        AtomSite.of("Ti", 1.0 / 3, 2.0 / 3, 0.25));
            default -> throw new IllegalArgumentException(name);
        };
    }

    private static MatchResult match(String regex, String text) {
        Matcher m = Pattern.compile(regex).matcher(text);
        assertTrue(m.find(), text);
        return m.toMatchResult();
    }
}
