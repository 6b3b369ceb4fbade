package io.github.zonewright.indexing;

import io.github.zonewright.SyntheticPattern;
import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.crystal.CrystalShelf;
import io.github.zonewright.geometry.Rotation;
import io.github.zonewright.geometry.Vector3;
import io.github.zonewright.image.GrayImage;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.lattice.Uvw;
import io.github.zonewright.microscope.Beam;
import java.util.ArrayList;
import java.util.List;
import java.util.Random;

/**
 * A pattern as a microscope shows it, drawn from its number: crystals of every system, kinematic to many-beam intensities,
 * lean, wrong camera constant, ellipse, beam stop, second grain or twin, discs, few counts, glow and rings, blooming,
 * saturation, hot pixels, a centre far off the middle.
 */
record DrawnScene(
        Crystal crystal,
        Beam beam,
        Uvw zone,
        Rotation orientation,
        PixelPoint centre,
        double constant,
        double told,
        double tolerance,
        double ellipse,
        boolean mirrored,
        double lean,
        List<Spot> spots,
        int visible,
        String tags,
        GrayImage image) {

    /** A spot that can be seen, of the wanted grain or of another. */
    record Spot(Hkl hkl, double x, double y, double peak, boolean wanted) {}

    /** How hard it is made. */
    record Level(
            double tolerance,
            double ellipse,
            double usualLean,
            double largestLean,
            double leaning,
            double offCentre,
            double faintest,
            double brightest,
            double flaws) {
        static Level of(String name) {
            return switch (name) {
                case "clean" -> new Level(0.01, 0.003, 0.2, 0.2, 0, 0.03, 300, 14000, 0);
                case "typical" -> new Level(0.03, 0.015, 0.25, 3, 0.5, 0.1, 29, 4000, 0.3);
                case "hard" -> new Level(0.05, 0.025, 0.5, 6, 0.5, 0.2, 25, 400, 0.5);
                case "steep" -> new Level(0.05, 0.03, 0.5, 10, 0.9, 0.2, 25, 400, 0.3);
                default ->
                    throw new IllegalArgumentException("level: " + name + ", expected clean, typical, hard or steep");
            };
        }
    }

    private static final List<String> CRYSTALS = List.of(
            "aluminium",
            "copper",
            "ferrite",
            "gallium-arsenide",
            "magnesium",
            "gamma-prime",
            "silicon",
            "anatase",
            "cementite",
            "corundum",
            "pyrite",
            "quartz-alpha",
            "rutile",
            "titanium-alpha",
            "calcite",
            "gypsum",
            "barite",
            "gallium-nitride",
            "magnetite",
            "perovskite",
            "theta-al2cu",
            "fluorite",
            "halite");

    static DrawnScene of(String level, int number) {
        Random random = new Random(104_729L * number + level.hashCode());
        while (true) {
            DrawnScene drawn = tried(Level.of(level), random);
            if (drawn != null) {
                return drawn;
            }
        }
    }

    private static DrawnScene tried(Level level, Random random) {
        Crystal crystal = CrystalShelf.entry(CRYSTALS.get(random.nextInt(CRYSTALS.size())))
                .orElseThrow()
                .crystal();
        Beam beam = Beam.ofKilovolts(new double[] {80, 100, 120, 200, 300}[random.nextInt(5)]);
        int most = random.nextInt(5) == 0 ? 3 : random.nextInt(3) == 0 ? 2 : 1;
        Uvw zone = new Uvw(index(random, most), index(random, most), index(random, most));
        if (zone.isZero()) {
            return null;
        }
        zone = zone.reduced();
        boolean leans = random.nextDouble() < level.leaning;
        double lean = leans
                ? level.largestLean * (0.25 + 0.75 * random.nextDouble())
                : Math.abs(level.usualLean * random.nextGaussian());
        double towards = 2 * Math.PI * random.nextDouble();
        Rotation upright = Rotation.between(crystal.lattice().vector(zone), Vector3.Z);
        Rotation orientation = Rotation.ofVector(
                        new Vector3(-Math.sin(towards), Math.cos(towards), 0).times(Math.toRadians(lean)))
                .after(Rotation.ofAxisAngle(Vector3.Z, 2 * Math.PI * random.nextDouble()))
                .after(upright);
        DrawnIntensities foil = DrawnIntensities.random(random, leans ? 0.6 : 0.3);
        if (lean > 1) {
            foil = foil.thinner(1 / lean);
        }
        int[][] sizes = {{256, 256}, {512, 512}, {512, 512}, {640, 480}, {1024, 1024}};
        int[] size = sizes[random.nextInt(sizes.length)];
        int side = Math.min(size[0], size[1]);
        double shortest = shortest(crystal, zone);
        double spacing = side * (0.08 + 0.14 * random.nextDouble());
        double constant = spacing / shortest;
        double off = level.offCentre * side * Math.sqrt(random.nextDouble());
        double offTo = 2 * Math.PI * random.nextDouble();
        PixelPoint centre =
                new PixelPoint(size[0] / 2.0 + off * Math.cos(offTo), size[1] / 2.0 + off * Math.sin(offTo));
        Camera camera = new Camera(
                centre,
                constant,
                1 + level.ellipse * random.nextDouble(),
                Math.PI * random.nextDouble(),
                random.nextInt(4) == 0,
                beam.wavelength());
        double told = constant * (1 + 0.65 * level.tolerance * (2 * random.nextDouble() - 1));
        boolean discs = random.nextInt(5) == 0;
        double sigma = discs ? 1.6 : Math.min(side / 150.0, 0.8 + 3.2 * random.nextDouble());
        double radius = discs ? Math.min(12, spacing * (0.04 + 0.12 * random.nextDouble())) : 0;
        Look look = new Look(
                size[0],
                size[1],
                sigma,
                radius,
                level.faintest * Math.pow(level.brightest / level.faintest, random.nextDouble()));
        double reach = Math.min(4, Math.hypot(size[0], size[1]) / constant);
        StringBuilder tags = new StringBuilder(" " + foil.model());
        List<Spot> spots = new ArrayList<>();
        for (DrawnIntensities.Diffracted d : foil.of(crystal, beam, orientation, reach)) {
            spots.add(camera.spot(d, look.peak, true));
        }
        boolean second = random.nextDouble() < 0.7 * level.flaws;
        if (second) {
            boolean twin = random.nextInt(4) == 0;
            tags.append(twin ? " twin" : " grain2");
            Rotation other = twin
                    ? orientation.after(
                            Rotation.ofAxisAngle(crystal.lattice().reciprocal().vector(new Hkl(1, 1, 1)), Math.PI))
                    : Rotation.ofQuaternion(
                            random.nextGaussian(), random.nextGaussian(), random.nextGaussian(), random.nextGaussian());
            double share = 0.1 + 0.35 * random.nextDouble();
            for (DrawnIntensities.Diffracted d : foil.of(crystal, beam, other, reach)) {
                spots.add(camera.spot(d, share * look.peak, false));
            }
        }
        DrawnScreen screen = DrawnScreen.random(random, level.flaws, look, centre);
        spots.removeIf(s -> !screen.isInside(s.x, s.y) || s.peak < 1e-3);
        SyntheticPattern pattern = screen.electrons(spots);
        List<Spot> seen = spots.stream().filter(screen::shows).toList();
        List<Spot> own = seen.stream().filter(Spot::wanted).toList();
        if (own.size() < 7 || own.size() > 110 || isRow(own, centre)) {
            return null;
        }
        if (discs) {
            tags.append(" discs");
        }
        tags.append(screen.tags());
        return new DrawnScene(
                crystal,
                beam,
                zone,
                orientation,
                centre,
                constant,
                told,
                level.tolerance,
                camera.ratio,
                camera.mirrored,
                lean,
                seen,
                own.size(),
                tags.toString(),
                screen.image(pattern, random.nextLong()));
    }

    /** How spots look: the frame, the blur, the radius of discs or 0, the electrons at the strongest peak. */
    record Look(int width, int height, double sigma, double radius, double peak) {}

    /** The flat detector: R = K|g|/√(1 − λ²g²), stretched, perhaps mirrored. */
    private record Camera(
            PixelPoint centre, double constant, double ratio, double azimuth, boolean mirrored, double wavelength) {

        Spot spot(DrawnIntensities.Diffracted d, double peak, boolean wanted) {
            Vector3 g = d.g();
            double tangent = constant / Math.sqrt(1 - wavelength * wavelength * (g.x() * g.x() + g.y() * g.y()));
            double c = Math.cos(azimuth);
            double s = Math.sin(azimuth);
            double along = (c * g.x() + s * g.y()) * tangent * Math.sqrt(ratio);
            double beside = (c * g.y() - s * g.x()) * tangent / Math.sqrt(ratio);
            double x = c * along - s * beside;
            double y = s * along + c * beside;
            return new Spot(d.hkl(), centre.x() + (mirrored ? -x : x), centre.y() - y, peak * d.intensity(), wanted);
        }
    }

    private static int index(Random random, int most) {
        return random.nextInt(2 * most + 1) - most;
    }

    /** The shortest |g| of the zone that the space group allows, in 1/Å. */
    private static double shortest(Crystal crystal, Uvw zone) {
        double least = Double.POSITIVE_INFINITY;
        for (int h = -6; h <= 6; h++) {
            for (int k = -6; k <= 6; k++) {
                for (int l = -6; l <= 6; l++) {
                    Hkl hkl = new Hkl(h, k, l);
                    if (!hkl.isZero()
                            && hkl.dot(zone) == 0
                            && !crystal.spaceGroup().isSystematicallyAbsent(hkl)) {
                        least = Math.min(
                                least,
                                crystal.lattice().reciprocal().vector(hkl).norm());
                    }
                }
            }
        }
        return least;
    }

    /** Whether all spots but two lie on one line through the centre. */
    private static boolean isRow(List<Spot> spots, PixelPoint o) {
        return spots.stream().anyMatch(a -> {
            double r = Math.hypot(a.x - o.x(), a.y - o.y());
            return spots.stream()
                            .filter(s ->
                                    Math.abs((s.x - o.x()) * (a.y - o.y()) - (s.y - o.y()) * (a.x - o.x())) > 4 * r)
                            .count()
                    <= 2;
        });
    }
}
