package io.github.zonewright.indexing;

import io.github.zonewright.SyntheticPattern;
import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.crystal.Reflection;
import io.github.zonewright.crystal.ReflectionTable;
import io.github.zonewright.geometry.Matrix3;
import io.github.zonewright.geometry.Rotation;
import io.github.zonewright.image.GrayImage;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.lattice.Hkl;
import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.Random;
import java.util.TreeMap;

/**
 * The tests' own pattern of a crystal, written from the formulas of the textbooks and not by way of the simulator: every
 * hkl is turned by nine numbers, cut by the sphere of radius 1/λ and laid on a flat detector; ln I = ln F² − (s/w)²/2 with a
 * scatter that Friedel mates share and one of its own. Only |F| and the cell come from the library.
 */
final class DrawnCrystal {

    /** A spot as it ought to be: place, electrons at the peak. */
    record Spot(Hkl hkl, double x, double y, double peak) {}

    /** All that makes the pattern. */
    record Setup(
            Crystal crystal,
            double wavelength,
            Rotation orientation,
            PixelPoint centre,
            double constant,
            double ellipseRatio,
            double ellipseAzimuth,
            boolean mirrored,
            int size,
            double width) {}

    static final double SIGMA = 1.6;

    private DrawnCrystal() {}

    /** The intensity of a reflection, but for a factor, from |F|² and its excitation error. */
    interface Envelope {
        double at(double f2, double s, double g);
    }

    /** The spots inside the frame, with peaks between 25 and 20,000 electrons. */
    static List<Spot> spots(Setup setup, long seed) {
        return spots(setup, seed, (f2, s, g) -> f2 * Math.exp(-s * s / (2 * setup.width * setup.width)));
    }

    /** The same with another envelope. */
    static List<Spot> spots(Setup setup, long seed, Envelope envelope) {
        Random random = new Random(seed);
        Map<Hkl, Double> shared = new TreeMap<>();
        double reach = setup.size / setup.constant;
        List<double[]> found = new ArrayList<>();
        List<Hkl> indices = new ArrayList<>();
        Matrix3 r = setup.orientation.matrix();
        double[] b = columns(setup.crystal);
        double strongest = 0;
        List<Reflection> table = ReflectionTable.ofLength(setup.crystal, reach).reflections().stream()
                .sorted((p, q) -> p.hkl().compareTo(q.hkl()))
                .toList();
        for (Reflection reflection : table) {
            Hkl n = reflection.hkl();
            double cx = b[0] * n.h() + b[3] * n.k() + b[6] * n.l();
            double cy = b[1] * n.h() + b[4] * n.k() + b[7] * n.l();
            double cz = b[2] * n.h() + b[5] * n.k() + b[8] * n.l();
            double gx = r.m00() * cx + r.m01() * cy + r.m02() * cz;
            double gy = r.m10() * cx + r.m11() * cy + r.m12() * cz;
            double gz = r.m20() * cx + r.m21() * cy + r.m22() * cz;
            double k = 1 / setup.wavelength;
            double across = gx * gx + gy * gy;
            double s = gz - (k - Math.sqrt(k * k - across));
            double common = shared.computeIfAbsent(
                    n.compareTo(n.negate()) < 0 ? n : n.negate(), m -> 0.5 * random.nextGaussian());
            double own = 0.2 * random.nextGaussian();
            double f2 = reflection.amplitude() * reflection.amplitude();
            double intensity = envelope.at(f2, s, Math.sqrt(across)) * Math.exp(common + own);
            strongest = Math.max(strongest, intensity);
            double tangent = setup.constant / Math.sqrt(1 - setup.wavelength * setup.wavelength * across);
            double u = gx * tangent;
            double v = gy * tangent;
            double c = Math.cos(setup.ellipseAzimuth);
            double d = Math.sin(setup.ellipseAzimuth);
            double along = (c * u + d * v) * Math.sqrt(setup.ellipseRatio);
            double beside = (c * v - d * u) / Math.sqrt(setup.ellipseRatio);
            double px = c * along - d * beside;
            double py = d * along + c * beside;
            found.add(new double[] {setup.centre.x() + (setup.mirrored ? -px : px), setup.centre.y() - py, intensity});
            indices.add(n);
        }
        List<Spot> spots = new ArrayList<>();
        for (int i = 0; i < found.size(); i++) {
            double[] f = found.get(i);
            double peak = 20_000 * f[2] / strongest;
            boolean inside = f[0] > 6 && f[1] > 6 && f[0] < setup.size - 6 && f[1] < setup.size - 6;
            if (inside && peak > 25) {
                spots.add(new Spot(indices.get(i), f[0], f[1], peak));
            }
        }
        return spots;
    }

    /** Reciprocal basis vectors a*, b*, c* with x along a and z along c*, from the cell's lengths and angles alone. */
    private static double[] columns(Crystal crystal) {
        var cell = crystal.lattice();
        double ca = Math.cos(cell.alpha());
        double cb = Math.cos(cell.beta());
        double cg = Math.cos(cell.gamma());
        double sg = Math.sin(cell.gamma());
        double[] a = {cell.a(), 0, 0};
        double[] b = {cell.b() * cg, cell.b() * sg, 0};
        double y = (ca - cb * cg) / sg;
        double[] c = {cell.c() * cb, cell.c() * y, cell.c() * Math.sqrt(1 - cb * cb - y * y)};
        double volume = a[0] * b[1] * c[2];
        double[] all = new double[9];
        double[][][] pairs = {{b, c}, {c, a}, {a, b}};
        for (int i = 0; i < 3; i++) {
            double[] p = pairs[i][0];
            double[] q = pairs[i][1];
            all[3 * i] = (p[1] * q[2] - p[2] * q[1]) / volume;
            all[3 * i + 1] = (p[2] * q[0] - p[0] * q[2]) / volume;
            all[3 * i + 2] = (p[0] * q[1] - p[1] * q[0]) / volume;
        }
        return all;
    }

    /** The image: spots about a bright direct beam on a glow that falls off from it, with counting noise. */
    static GrayImage image(Setup setup, List<Spot> spots, long seed) {
        PixelPoint centre = setup.centre;
        SyntheticPattern drawn = new SyntheticPattern(setup.size, setup.size, 31)
                .add((x, y) -> 150 / (1 + Math.pow(Math.hypot(x - centre.x(), y - centre.y()) / 30, 2)))
                .spot(centre.x(), centre.y(), SIGMA, 40_000);
        spots.forEach(s -> drawn.spot(s.x(), s.y(), SIGMA, s.peak()));
        return drawn.shorts(seed, 1);
    }
}
