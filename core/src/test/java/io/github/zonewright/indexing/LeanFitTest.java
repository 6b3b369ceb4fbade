package io.github.zonewright.indexing;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.crystal.CrystalShelf;
import io.github.zonewright.lattice.Uvw;
import io.github.zonewright.microscope.Beam;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.Collections;
import java.util.Comparator;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.Random;
import org.junit.jupiter.api.Test;

/** Intensities drawn by formula about a known lean, with scatter of {@link Random}. */
class LeanFitTest {

    private static final Beam BEAM = Beam.ofKilovolts(200);
    /** λγ/(πΩ) of silicon at 200 kV, near enough for all: 2.0 × 10⁻⁵ 1/Å per Å. */
    private static final double EXTINCTION = BEAM.wavelength() * BEAM.gamma() / (Math.PI * Math.pow(5.431, 3));

    /** Bending of the foil, in radians: it widens the envelope in proportion to g. */
    private static final double BEND = 0.004;

    private static final ZoneNet SILICON = net("silicon", new Uvw(0, 1, 1));
    private static final ZoneNet COPPER = net("copper", new Uvw(0, 0, 1));

    private static ZoneNet net(String name, Uvw zone) {
        Crystal crystal = CrystalShelf.find(name).orElseThrow();
        return ZoneNet.of(zone, new ReflectionStrengths(crystal, BEAM, 1.6)).orElseThrow();
    }

    /** ln I = ln F² − (s/w)²/2 + scatter of the family + own; what is below the limit is not detected. */
    private static NodeIntensities drawn(
            ZoneNet net, double leanX, double leanY, double width, double limit, double shared, Random random) {
        Map<Integer, Double> families = new HashMap<>();
        double strongest = net.nodes().stream()
                .mapToDouble(n -> Math.log(n.strength()))
                .max()
                .orElseThrow();
        List<NodeIntensities.Entry> entries = new ArrayList<>();
        for (ZoneNet.Node node : net.nodes()) {
            double s = -node.x() * leanX - node.y() * leanY - BEAM.wavelength() * node.g() * node.g() / 2;
            double family = families.computeIfAbsent(node.family(), f -> shared * random.nextGaussian());
            double level = 9
                    + Math.log(node.strength())
                    - strongest
                    - s * s / (2 * (width * width + BEND * BEND * node.g() * node.g()))
                    + family
                    + 0.25 * random.nextGaussian();
            boolean detected = level > limit;
            entries.add(new NodeIntensities.Entry(node, detected, detected ? level : limit, 0));
        }
        return sorted(entries);
    }

    private static NodeIntensities sorted(List<NodeIntensities.Entry> entries) {
        entries.sort(Comparator.comparing((NodeIntensities.Entry e) -> !e.detected())
                .thenComparingInt(e -> e.node().family())
                .thenComparing(e -> e.node().hkl()));
        return new NodeIntensities(entries);
    }

    private static LeanFit.Posterior posterior(NodeIntensities intensities) {
        return new LeanFit(intensities, BEAM.wavelength(), EXTINCTION)
                .envelope()
                .posterior();
    }

    private static double degrees(double x, double y) {
        return Math.toDegrees(Math.hypot(x, y));
    }

    /**
     * The aim for images that lean is a median error of 0.3°. Two standard deviations ought to cover 95 %; with 32
     * coordinates 90 % is asked.
     */
    @Test
    void envelope_manySpots_leanNearTheTruth() {
        Random random = new Random(31);
        int within = 0;
        int all = 0;
        double[] off = new double[16];
        for (int n = 0; n < off.length; n++) {
            double lean = Math.toRadians(0.5 + 2.5 * n / off.length);
            double azimuth = 2 * Math.PI * random.nextDouble();
            double x = lean * Math.cos(azimuth);
            double y = lean * Math.sin(azimuth);
            double width = 0.004 * Math.pow(5, random.nextDouble());
            LeanFit.Posterior p = posterior(drawn(n % 2 == 0 ? SILICON : COPPER, x, y, width, 2, 0.5, random));
            off[n] = degrees(p.x() - x, p.y() - y);
            all += 2;
            within += Math.abs(p.x() - x) < 2 * p.sdX() ? 1 : 0;
            within += Math.abs(p.y() - y) < 2 * p.sdY() ? 1 : 0;
        }
        Arrays.sort(off);
        assertTrue(off[off.length / 2] <= 0.3, "median error " + off[off.length / 2] + "°");
        assertTrue(off[off.length - 1] < 1.5, "largest error " + off[off.length - 1] + "°");
        assertTrue(within >= 0.9 * all, within + " of " + all + " coordinates within two standard deviations");
    }

    /** On zone the envelope is round, and the answer is no lean: by the median of twelve drawings, since one may be odd. */
    @Test
    void envelope_onZone_noLean() {
        double[] off = new double[12];
        double[] spread = new double[12];
        for (int n = 0; n < off.length; n++) {
            LeanFit.Posterior p = posterior(drawn(COPPER, 0, 0, 0.01, 2, 0.5, new Random(2 + n)));
            off[n] = degrees(p.x(), p.y());
            spread[n] = Math.toDegrees(p.spread());
        }
        Arrays.sort(off);
        Arrays.sort(spread);
        assertTrue(off[6] < 0.2, "median " + off[6] + "°");
        assertTrue(off[11] < 0.6, "largest " + off[11] + "°");
        assertTrue(spread[6] < 0.5, "stated " + spread[6] + "°");
    }

    /** What a whole family gains says nothing of the lean. */
    @Test
    void envelope_familyGains_leanStays() {
        NodeIntensities plain = drawn(SILICON, 0.01, 0.005, 0.012, 2, 0, new Random(3));
        int family = plain.entries().stream()
                .map(e -> e.node().family())
                .filter(f -> plain.entries().stream().allMatch(e -> e.node().family() != f || e.detected())
                        && plain.entries().stream()
                                        .filter(e -> e.node().family() == f)
                                        .count()
                                >= 4)
                .reduce((first, second) -> second)
                .orElseThrow();
        LeanFit.Posterior before = posterior(plain);
        LeanFit.Posterior after = posterior(lifted(plain, family));
        double moved = degrees(after.x() - before.x(), after.y() - before.y());
        assertTrue(moved < 0.02, "moved by " + moved + "°");
    }

    private static NodeIntensities lifted(NodeIntensities plain, int family) {
        List<NodeIntensities.Entry> entries = new ArrayList<>();
        for (NodeIntensities.Entry e : plain.entries()) {
            boolean lift = e.detected() && e.node().family() == family;
            entries.add(new NodeIntensities.Entry(e.node(), e.detected(), e.level() + (lift ? 0.8 : 0), e.variance()));
        }
        return sorted(entries);
    }

    /** Nothing was detected and nothing could have been: all that is left is the habit of tilting to the zone. */
    @Test
    void envelope_noDetections_prior() {
        List<NodeIntensities.Entry> entries = new ArrayList<>();
        for (ZoneNet.Node node : COPPER.nodes()) {
            entries.add(new NodeIntensities.Entry(node, false, 40, 0));
        }
        LeanFit fit = new LeanFit(sorted(entries), BEAM.wavelength(), EXTINCTION);
        LeanFit.Posterior p = fit.envelope().posterior();
        // The cells about the second and third mode lie to one side and pull the mean by 0.11°, a fifth of its spread.
        assertTrue(degrees(p.x(), p.y()) < 0.25 * Math.toDegrees(p.spread()), "mean " + p);
        assertTrue(Math.toDegrees(p.spread()) > 0.3, "as unsure as the habit: " + Math.toDegrees(p.spread()) + "°");
        assertTrue(Double.isFinite(p.evidence()) && Double.isFinite(fit.evidence()));
        // The habit is a density: summed over all leans it is one.
        assertEquals(0, fit.evidence(), 0.4);
    }

    @Test
    void envelope_nothingVisible_prior() {
        LeanFit fit = new LeanFit(new NodeIntensities(List.of()), BEAM.wavelength(), EXTINCTION);
        LeanFit.Posterior p = fit.envelope().posterior();
        // The cells about the second and third mode lie to one side and pull the mean by 0.11°, a fifth of its spread.
        assertTrue(degrees(p.x(), p.y()) < 0.25 * Math.toDegrees(p.spread()), "mean " + p);
        assertTrue(Double.isFinite(p.evidence()));
    }

    /** Half of the spots are missing on one side: the zone leans so that these leave the sphere. */
    @Test
    void envelope_oneSided_leansAwayFromTheMissing() {
        LeanFit.Posterior p = posterior(drawn(COPPER, Math.toRadians(2), 0, 0.006, 4, 0.3, new Random(5)));
        assertEquals(2, Math.toDegrees(p.x()), 3 * Math.toDegrees(p.sdX()));
        assertEquals(0, Math.toDegrees(p.y()), 3 * Math.toDegrees(p.sdY()));
        assertTrue(Math.toDegrees(p.spread()) < 0.6);
    }

    @Test
    void evidence_rightIntensities_aboveShuffledOnes() {
        Random random = new Random(6);
        NodeIntensities right = drawn(SILICON, 0.004, -0.006, 0.012, 2, 0.5, random);
        List<NodeIntensities.Entry> detected =
                right.entries().stream().filter(NodeIntensities.Entry::detected).toList();
        List<Double> levels = new ArrayList<>(
                detected.stream().map(NodeIntensities.Entry::level).toList());
        Collections.shuffle(levels, random);
        List<NodeIntensities.Entry> shuffled = new ArrayList<>(
                right.entries().stream().filter(e -> !e.detected()).toList());
        for (int i = 0; i < detected.size(); i++) {
            shuffled.add(new NodeIntensities.Entry(detected.get(i).node(), true, levels.get(i), 0));
        }
        double gain = new LeanFit(right, BEAM.wavelength(), EXTINCTION).evidence()
                - new LeanFit(sorted(shuffled), BEAM.wavelength(), EXTINCTION).evidence();
        assertTrue(gain > 10, "gain " + gain);
    }

    /** Two leans 10° apart of equal evidence lie 10°/√2 about the one, root mean square; one far less likely adds nothing. */
    @Test
    void orElse_anotherPosterior_covarianceOfBothAboutTheOne() {
        LeanFit.Posterior one = new LeanFit.Posterior(-0.06, -0.08, 0.01, 0.01, 0, 5);
        LeanFit.Posterior both = one.orElse(new LeanFit.Posterior(0.06, 0.08, 0.01, 0.01, 0, 5));
        assertEquals(-0.06, both.x());
        assertEquals(Math.sqrt(0.0001 + 0.0144 / 2), both.sdX(), 1e-12);
        assertEquals(Math.sqrt(0.0001 + 0.0256 / 2), both.sdY(), 1e-12);
        assertEquals(0.0192 / 2, both.covariance(), 1e-12);
        assertEquals(one.within(), both.within());
        LeanFit.Posterior sure = one.orElse(new LeanFit.Posterior(0.06, 0.08, 0.01, 0.01, 0, -35));
        assertEquals(0.01, sure.sdX(), 1e-9);
        LeanFit.Posterior same = one.orElse(one);
        assertEquals(0.01, same.sdY(), 1e-12);
    }
}
