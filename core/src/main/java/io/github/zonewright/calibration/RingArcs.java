package io.github.zonewright.calibration;

import io.github.zonewright.geometry.LeastSquares;
import io.github.zonewright.image.Ellipse;
import io.github.zonewright.image.GrayImage;
import io.github.zonewright.image.Mask;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.image.RadialProfile;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.Optional;

/**
 * The image cut into sectors about a centre: what a stop hides, the mean profile of the rest, and where each ring crosses
 * each sector.
 *
 * <p>A stop is where a sector is much darker than the median of all sectors at that radius. A crossing is a Gaussian, with
 * a shift, on a parabola, together with the Gaussians of the neighbouring rings.
 */
final class RingArcs {

    static final int SECTORS = 72;

    private static final int COARSE_BINS = 8;
    private static final double SHADOW = 0.6;
    private static final double WINDOW = 3.2;
    private static final double CLEAR = 4;
    private static final double LARGEST_SHIFT = 1.5;
    private static final int FEWEST_BINS = 7;

    /** Where a ring crosses a sector. */
    record Arc(int ring, int sector, PixelPoint point, double error) {}

    private final Ellipse shape;
    private final List<RadialProfile> profiles;
    private final boolean[][] hidden;
    private final int size;

    private RingArcs(Ellipse shape, List<RadialProfile> profiles, double dark) {
        this.shape = shape;
        this.profiles = profiles;
        this.size = profiles.get(0).size();
        this.hidden = shadow(dark);
    }

    static RingArcs of(GrayImage image, Ellipse shape, Mask excluded) {
        float[] sorted = image.values();
        Arrays.sort(sorted);
        double dark = sorted[sorted.length / 200];
        return new RingArcs(shape, RadialProfile.sectors(image, shape, excluded, 1, SECTORS), dark);
    }

    private boolean[][] shadow(double dark) {
        int coarse = (size + COARSE_BINS - 1) / COARSE_BINS;
        boolean[][] set = new boolean[SECTORS][coarse];
        for (int bin = 0; bin < coarse; bin++) {
            double[] levels = new double[SECTORS];
            for (int sector = 0; sector < SECTORS; sector++) {
                levels[sector] = level(profiles.get(sector), bin * COARSE_BINS);
            }
            double[] known = Arrays.stream(levels).filter(l -> l == l).sorted().toArray();
            double median = known.length == 0 ? Double.NaN : known[known.length / 2];
            for (int sector = 0; sector < SECTORS; sector++) {
                set[sector][bin] = levels[sector] - dark < SHADOW * (median - dark);
            }
        }
        boolean[][] result = new boolean[SECTORS][size];
        for (int sector = 0; sector < SECTORS; sector++) {
            for (int bin = 0; bin < size; bin++) {
                int c = bin / COARSE_BINS;
                for (int side = -1; side <= 1; side++) {
                    result[sector][bin] |= set[(sector + side + SECTORS) % SECTORS][c];
                }
            }
        }
        return result;
    }

    private static double level(RadialProfile profile, int from) {
        double sum = 0;
        int count = 0;
        for (int bin = from; bin < Math.min(profile.size(), from + COARSE_BINS); bin++) {
            if (profile.count(bin) > 0) {
                sum += profile.mean(bin) * profile.count(bin);
                count += profile.count(bin);
            }
        }
        return count == 0 ? Double.NaN : sum / count;
    }

    /** The crests of the mean over all that is not hidden. */
    RingCrests crests(double innermost) {
        double[] radii = new double[size];
        double[] means = new double[size];
        double[] errors = new double[size];
        for (int bin = 0; bin < size; bin++) {
            double sum = 0;
            double radius = 0;
            double variance = 0;
            int count = 0;
            for (int sector = 0; sector < SECTORS; sector++) {
                RadialProfile p = profiles.get(sector);
                if (!hidden[sector][bin] && p.count(bin) > 1) {
                    int n = p.count(bin);
                    sum += p.mean(bin) * n;
                    radius += p.radius(bin) * n;
                    variance += p.error(bin) * p.error(bin) * n * n;
                    count += n;
                }
            }
            boolean enough = count >= 8;
            radii[bin] = enough ? radius / count : bin + 0.5;
            means[bin] = enough ? sum / count : 0;
            errors[bin] = enough ? Math.sqrt(variance) / count : Double.NaN;
        }
        return RingCrests.of(radii, means, errors, innermost);
    }

    /** The number of sectors in which a ring of a radius is in the frame and not hidden. */
    int visible(double radius, double sigma) {
        int from = Math.max(0, (int) (radius - WINDOW * sigma));
        int to = Math.min(size - 1, (int) (radius + WINDOW * sigma));
        int count = 0;
        for (int sector = 0; sector < SECTORS; sector++) {
            boolean all = true;
            for (int bin = from; bin <= to; bin++) {
                all &= !hidden[sector][bin] && profiles.get(sector).count(bin) > 0;
            }
            count += all ? 1 : 0;
        }
        return count;
    }

    /** The crossings of rings of given radii and width. */
    List<Arc> arcs(double[] rings, double sigma) {
        List<Arc> arcs = new ArrayList<>();
        for (int ring = 0; ring < rings.length; ring++) {
            List<Crossing> crossings = new ArrayList<>();
            for (int sector = 0; sector < SECTORS; sector++) {
                crossing(rings, sigma, ring, sector).ifPresent(crossings::add);
            }
            double scatter =
                    crossings.stream().mapToDouble(Crossing::scatter).average().orElse(0);
            for (Crossing c : crossings) {
                double error = Math.max(1e-3, c.spread * Math.sqrt(scatter));
                PixelPoint point = shape.pointAt(c.radius, 2 * Math.PI * (c.sector + 0.5) / SECTORS);
                arcs.add(new Arc(ring, c.sector, point, error));
            }
        }
        return arcs;
    }

    /** A crossing before the scatter of the pixels, variance of a single one, is averaged over the ring. */
    private record Crossing(int sector, double radius, double spread, double scatter) {}

    private Optional<Crossing> crossing(double[] rings, double sigma, int ring, int sector) {
        RadialProfile profile = profiles.get(sector);
        double reach = WINDOW * sigma;
        int from = Math.max(0, (int) (rings[ring] - reach));
        int to = Math.min(size - 1, (int) (rings[ring] + reach));
        double[] neighbours = Arrays.stream(rings)
                .filter(r -> r != rings[ring] && Math.abs(r - rings[ring]) < reach + 2 * sigma)
                .toArray();
        double shift = 0;
        double spread = 0;
        double scatter = 0;
        for (int round = 0; round < 2; round++) {
            LeastSquares fit = new LeastSquares(5 + neighbours.length);
            int lower = 0;
            int upper = 0;
            for (int bin = from; bin <= to; bin++) {
                if (hidden[sector][bin]) {
                    return Optional.empty();
                }
                if (profile.count(bin) > 0) {
                    double u = (profile.radius(bin) - rings[ring] - shift) / sigma;
                    fit.add(row(u, profile.radius(bin), neighbours, sigma), profile.mean(bin), profile.count(bin));
                    lower += u < 0 ? 1 : 0;
                    upper += u > 0 ? 1 : 0;
                }
            }
            if (Math.min(lower, upper) * 2 + 1 < FEWEST_BINS || lower + upper < FEWEST_BINS + neighbours.length) {
                return Optional.empty();
            }
            Optional<LeastSquares.Result> solved = fit.solve();
            if (solved.isEmpty()) {
                return Optional.empty();
            }
            LeastSquares.Result result = solved.get();
            double height = result.values()[0];
            scatter = result.reducedChiSquare();
            if (!(height > CLEAR * Math.sqrt(result.covariance()[0][0] * scatter))) {
                return Optional.empty();
            }
            shift += result.values()[1] / height * sigma;
            spread = Math.sqrt(result.covariance()[1][1]) / height * sigma;
            if (Math.abs(shift) > LARGEST_SHIFT * sigma) {
                return Optional.empty();
            }
        }
        return Optional.of(new Crossing(sector, rings[ring] + shift, spread, scatter));
    }

    private static double[] row(double u, double radius, double[] neighbours, double sigma) {
        double[] row = new double[5 + neighbours.length];
        row[0] = Math.exp(-u * u / 2);
        row[1] = u * row[0];
        row[2] = 1;
        row[3] = u / WINDOW;
        row[4] = u * u / WINDOW / WINDOW;
        for (int k = 0; k < neighbours.length; k++) {
            double v = (radius - neighbours[k]) / sigma;
            row[5 + k] = Math.exp(-v * v / 2);
        }
        return row;
    }
}
