package io.github.zonewright.indexing;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.crystal.CrystalShelf;
import io.github.zonewright.crystal.ShelfEntry;
import io.github.zonewright.geometry.Matrix3;
import io.github.zonewright.geometry.Rotation;
import io.github.zonewright.geometry.Vector3;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.lattice.Lattice;
import io.github.zonewright.lattice.Uvw;
import io.github.zonewright.microscope.Beam;
import io.github.zonewright.spots.MeasuredPattern;
import io.github.zonewright.spots.SpotFinder;
import java.util.ArrayList;
import java.util.List;
import java.util.Random;
import java.util.concurrent.Callable;
import java.util.concurrent.CancellationException;
import java.util.concurrent.ExecutorService;
import java.util.concurrent.Executors;
import java.util.concurrent.Future;
import java.util.concurrent.atomic.AtomicInteger;
import org.junit.jupiter.api.Test;

/** Random crystals of the shelf in random settings, drawn by {@link DrawnCrystal}, measured and found again. */
class OrientationSearchTest {

    private static final int SIZE = 280;
    private static final double TOLERANCE = 0.02;

    /** A drawn pattern, and what a user would know of it. */
    private record Case(Crystal crystal, Beam beam, Uvw zone, DrawnCrystal.Setup setup, double told, int spots) {
        MeasuredPattern measured(long seed) {
            return SpotFinder.measure(DrawnCrystal.image(setup, DrawnCrystal.spots(setup, seed), seed));
        }

        OrientationSearch search() {
            return OrientationSearch.of(crystal, beam, told, TOLERANCE, setup.mirrored());
        }

        @Override
        public String toString() {
            return crystal.name() + " [" + zone + "] " + beam.kilovolts() + " kV";
        }
    }

    /** A case with at least eight spots that are no single row. */
    private static Case random(Random random, long seed) {
        while (true) {
            List<ShelfEntry> shelf = CrystalShelf.entries();
            Crystal crystal = shelf.get(random.nextInt(shelf.size())).crystal();
            Beam beam = Beam.ofKilovolts(new double[] {80, 120, 200, 300}[random.nextInt(4)]);
            int[] index = {random.nextInt(5) - 2, random.nextInt(5) - 2, random.nextInt(5) - 2};
            Uvw zone = new Uvw(index[0], index[1], index[2]);
            if (zone.isZero() || crystal.lattice().volume() > 400) {
                continue;
            }
            zone = zone.reduced();
            Rotation upright = Rotation.between(crystal.lattice().vector(zone), Vector3.Z);
            Rotation turn = Rotation.ofAxisAngle(Vector3.Z, 2 * Math.PI * random.nextDouble());
            double lean = Math.toRadians(1.2 * random.nextDouble());
            double towards = 2 * Math.PI * random.nextDouble();
            Rotation tilt = Rotation.ofVector(new Vector3(-lean * Math.sin(towards), lean * Math.cos(towards), 0));
            double constant = 90 + 80 * random.nextDouble();
            DrawnCrystal.Setup setup = new DrawnCrystal.Setup(
                    crystal,
                    beam.wavelength(),
                    tilt.after(turn).after(upright),
                    new PixelPoint(
                            SIZE * (0.42 + 0.16 * random.nextDouble()), SIZE * (0.42 + 0.16 * random.nextDouble())),
                    constant,
                    1 + 0.008 * random.nextDouble(),
                    Math.PI * random.nextDouble(),
                    random.nextBoolean(),
                    SIZE,
                    0.012);
            double told = constant * (1 + 0.8 * TOLERANCE * (2 * random.nextDouble() - 1));
            List<DrawnCrystal.Spot> spots = DrawnCrystal.spots(setup, seed);
            boolean close = spots.stream()
                    .anyMatch(s -> Math.hypot(
                                    s.x() - setup.centre().x(),
                                    s.y() - setup.centre().y())
                            < 16);
            if (spots.size() >= 8 && spots.size() <= 60 && !close) {
                return new Case(crystal, beam, zone, setup, told, spots.size());
            }
        }
    }

    /** In-plane error and the rest, in degrees, to the nearest equivalent; a half turn about the zone axis is one answer. */
    private static double[] error(Case c, Rotation found) {
        Lattice lattice = c.crystal.lattice();
        double[] best = {180, 180};
        for (Matrix3 m : c.crystal.spaceGroup().properLaueRotations(lattice)) {
            for (double half : new double[] {0, Math.PI}) {
                Rotation q = Rotation.ofAxisAngle(lattice.vector(c.zone), half).after(Rotation.ofMatrix(m));
                Rotation off = found.after(c.setup.orientation().after(q).inverse());
                Vector3 v = off.axis().times(Math.toDegrees(off.angle()));
                if (v.norm() < Math.hypot(best[0], best[1])) {
                    best = new double[] {Math.abs(v.z()), Math.hypot(v.x(), v.y())};
                }
            }
        }
        return best;
    }

    /** What the search promises of every case here; a tie by accident may come first if the truth is close behind. */
    @Test
    void find_randomCrystals_zoneRotationAndCamera() {
        Random random = new Random(20);
        int first = 0;
        int cases = 14;
        for (int number = 0; number < cases; number++) {
            int n = number;
            Case c = random(random, n);
            SearchResult result = c.search().find(c.measured(n));
            Solution right = result.solutions().stream()
                    .filter(s -> error(c, s.placement().orientation().rotation())[0] < 0.1
                            && error(c, s.placement().orientation().rotation())[1] < 1.5)
                    .findFirst()
                    .orElseThrow(() -> new AssertionError(n + " " + c + ": " + result.explanation()));
            first += right == result.best().orElseThrow() ? 1 : 0;
            assertTrue(right.score() > result.best().orElseThrow().score() - 20, n + " " + c + " is far behind");
            assertEquals(
                    0, right.placement().camera().centre().distanceTo(c.setup.centre()), 0.2, n + " " + c + " centre");
            assertEquals(1, right.placement().camera().constant() / c.setup.constant(), 0.003, n + " " + c);
            assertTrue(right.explainedFraction() > 0.85, n + " " + c + " explains " + right.explainedFraction());
        }
        assertTrue(first >= cases - 1, first + " of " + cases + " first");
    }

    private static Case silicon() {
        Crystal crystal = CrystalShelf.find("silicon").orElseThrow();
        Beam beam = Beam.ofKilovolts(200);
        Uvw zone = new Uvw(0, 1, 1);
        Rotation orientation = Rotation.ofAxisAngle(Vector3.Z, 0.4)
                .after(Rotation.between(crystal.lattice().vector(zone), Vector3.Z));
        DrawnCrystal.Setup setup = new DrawnCrystal.Setup(
                crystal, beam.wavelength(), orientation, new PixelPoint(118, 125), 115, 1, 0, false, 240, 0.02);
        return new Case(crystal, beam, zone, setup, 116, 0);
    }

    @Test
    void find_wrongMirror_otherHand() {
        // Silicon [0 1 1] has a mirror plane: its pattern is found either way, turned by the mirrored angle.
        Case c = silicon();
        MeasuredPattern pattern = c.measured(1);
        Solution straight = c.search().find(pattern).best().orElseThrow();
        Solution mirrored = OrientationSearch.of(c.crystal, c.beam, 116, TOLERANCE, true)
                .find(pattern)
                .best()
                .orElseThrow();
        assertTrue(mirrored.placement().camera().mirrored());
        assertFalse(straight.placement().camera().mirrored());
        assertEquals(straight.matches().size(), mirrored.matches().size());
        assertTrue(error(c, straight.placement().orientation().rotation())[0] < 0.05);
    }

    @Test
    void find_withProgress_risesFromZeroToOne() {
        List<Double> told = new ArrayList<>();
        silicon().search().find(silicon().measured(1), told::add, () -> false);
        double last = 0;
        for (double share : told) {
            assertTrue(share >= last && share <= 1, "from " + last + " to " + share);
            last = share;
        }
        assertEquals(1, last, 0);
        assertTrue(told.size() > 10);
    }

    @Test
    void find_cancelledAtAnyTime_throws() {
        OrientationSearch search = silicon().search();
        MeasuredPattern pattern = silicon().measured(1);
        AtomicInteger all = new AtomicInteger();
        search.find(pattern, share -> {}, () -> all.incrementAndGet() < 0);
        assertTrue(all.get() > 10, "asked " + all.get() + " times");
        for (int after : new int[] {1, 2, all.get() / 2, all.get()}) {
            AtomicInteger asked = new AtomicInteger();
            assertThrows(
                    CancellationException.class,
                    () -> search.find(pattern, share -> {}, () -> asked.incrementAndGet() >= after));
            assertEquals(after, asked.get(), "stops when it is told to");
        }
    }

    @Test
    void find_twiceAndFromManyThreads_same() throws Exception {
        OrientationSearch search = silicon().search();
        MeasuredPattern pattern = silicon().measured(2);
        SearchResult once = search.find(pattern);
        assertEquals(once, search.find(pattern));
        assertEquals(once, silicon().search().find(silicon().measured(2)), "from the image on");
        ExecutorService threads = Executors.newFixedThreadPool(3);
        try {
            Callable<SearchResult> task = () -> search.find(pattern);
            for (Future<SearchResult> result : threads.invokeAll(List.of(task, task, task))) {
                assertEquals(once, result.get());
            }
        } finally {
            threads.shutdownNow();
        }
    }

    @Test
    void find_bestFirst_everySpotOnceAndScoresFall() {
        Case c = silicon();
        MeasuredPattern pattern = c.measured(3);
        SearchResult result = c.search().find(pattern);
        double last = Double.POSITIVE_INFINITY;
        for (Solution s : result.solutions()) {
            assertTrue(s.score() <= last && s.score() >= OrientationSearch.LEAST_SCORE);
            last = s.score();
            List<Object> spots = new ArrayList<>(s.unexplained());
            s.matches().forEach(m -> spots.add(m.measured()));
            assertEquals(pattern.spots().size(), spots.size());
            assertTrue(spots.containsAll(pattern.spots()));
            double squares = s.matches().stream()
                    .mapToDouble(m -> m.residual() * m.residual())
                    .sum();
            assertEquals(Math.sqrt(squares / s.matches().size()), s.rmsResidual(), 1e-12);
            long different = s.matches().stream().map(SpotMatch::hkl).distinct().count();
            assertEquals(s.matches().size(), different, "a reflection explains one spot");
        }
    }

    /** With [0 1 1] out of bounds there is nothing to find. */
    @Test
    void withLargestIndex_boundsTheZones() {
        Case c = silicon();
        MeasuredPattern pattern = c.measured(3);
        for (Solution s : c.search().withLargestIndex(1).find(pattern).solutions()) {
            assertTrue(s.placement().setting().zone().largestIndex() <= 1);
        }
        assertThrows(IllegalArgumentException.class, () -> c.search().withLargestIndex(0));
        assertThrows(IllegalArgumentException.class, () -> c.search().withLargestIndex(13));
    }

    @Test
    void of_valuesOutOfRange_sayWhichAndWhatWasExpected() {
        Case c = silicon();
        for (double constant : new double[] {0, -1, Double.NaN, Double.POSITIVE_INFINITY, 1e9}) {
            IllegalArgumentException e = assertThrows(
                    IllegalArgumentException.class,
                    () -> OrientationSearch.of(c.crystal, c.beam, constant, 0.02, false));
            assertTrue(
                    e.getMessage().contains("camera constant") && e.getMessage().contains("expected"));
        }
        for (double tolerance : new double[] {0, 0.0009, 0.21, Double.NaN}) {
            IllegalArgumentException e = assertThrows(
                    IllegalArgumentException.class,
                    () -> OrientationSearch.of(c.crystal, c.beam, 100, tolerance, false));
            assertTrue(e.getMessage().contains("tolerance") && e.getMessage().contains("expected"));
        }
    }
}
