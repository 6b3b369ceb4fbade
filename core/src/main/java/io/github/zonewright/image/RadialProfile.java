package io.github.zonewright.image;

import io.github.zonewright.geometry.Vector2;
import java.util.Arrays;
import java.util.List;

/**
 * The grey value as a function of the radius about a centre, averaged over the azimuth, with the ellipse that circles have
 * become.
 *
 * <p>A pixel counts with its whole value in the bin of its centre. {@link #radius} is the mean radius of those pixels, not
 * the middle of the bin.
 */
public final class RadialProfile {

    private final double binWidth;
    private final double[] radii;
    private final double[] means;
    private final double[] errors;
    private final int[] counts;

    private RadialProfile(double binWidth, double[] radii, double[] means, double[] errors, int[] counts) {
        this.binWidth = binWidth;
        this.radii = radii;
        this.means = means;
        this.errors = errors;
        this.counts = counts;
    }

    /**
     * The profile of an image.
     *
     * @param image the image; pixels without data do not count
     * @param shape centre and ellipse
     * @param excluded pixels to leave out, of the same frame
     * @param binWidth width of a bin in pixels, above 0
     * @return the profile, from the centre out to the farthest corner
     * @throws IllegalArgumentException if the frames differ or the width is not above 0
     */
    public static RadialProfile of(GrayImage image, Ellipse shape, Mask excluded, double binWidth) {
        return sectors(image, shape, excluded, binWidth, 1).get(0);
    }

    /**
     * One profile for each of some equal sectors.
     *
     * @param image the image; pixels without data do not count
     * @param shape centre and ellipse
     * @param excluded pixels to leave out, of the same frame
     * @param binWidth width of a bin in pixels, above 0
     * @param sectors number of sectors, counted counter-clockwise on the screen from the right, before the distortion
     * @return the profiles, all with the same number of bins
     * @throws IllegalArgumentException if the frames differ, the width is not above 0 or there is no sector
     */
    public static List<RadialProfile> sectors(
            GrayImage image, Ellipse shape, Mask excluded, double binWidth, int sectors) {
        if (excluded.width() != image.width() || excluded.height() != image.height()) {
            throw new IllegalArgumentException("mask size " + excluded.width() + " × " + excluded.height()
                    + ": expected " + image.width() + " × " + image.height());
        }
        if (!(binWidth > 0) || Double.isInfinite(binWidth) || sectors < 1) {
            throw new IllegalArgumentException(
                    "bin width " + binWidth + " px, sectors " + sectors + ": expected both above 0");
        }
        int width = image.width();
        int height = image.height();
        int bins = 1 + (int) (farthest(shape, width, height) / binWidth);
        Sums[] sums = new Sums[sectors];
        Arrays.setAll(sums, k -> new Sums(bins));
        float[] values = image.array();
        for (int row = 0; row < height; row++) {
            for (int column = 0; column < width; column++) {
                float value = values[row * width + column];
                if (value == value && !excluded.contains(column, row)) {
                    Vector2 place = shape.undistorted(column + 0.5, row + 0.5);
                    double radius = place.norm();
                    int sector = sectors == 1 ? 0 : sectorOf(place, sectors);
                    sums[sector].add((int) (radius / binWidth), radius, value);
                }
            }
        }
        return Arrays.stream(sums).map(s -> s.profile(binWidth)).toList();
    }

    private static int sectorOf(Vector2 place, int sectors) {
        double turn = place.azimuth() / (2 * Math.PI);
        return (int) ((turn < 0 ? turn + 1 : turn) * sectors) % sectors;
    }

    private static double farthest(Ellipse shape, int width, int height) {
        double far = 0;
        for (int corner = 0; corner < 4; corner++) {
            far = Math.max(far, shape.radius(new PixelPoint(corner % 2 * width, corner / 2 * height)));
        }
        return far;
    }

    /** Sums of a profile; the squares are about the first value of a bin, lest digits get lost. */
    private static final class Sums {
        private final int[] counts;
        private final double[] radii;
        private final double[] first;
        private final double[] sums;
        private final double[] squares;

        Sums(int bins) {
            counts = new int[bins];
            radii = new double[bins];
            first = new double[bins];
            sums = new double[bins];
            squares = new double[bins];
        }

        void add(int bin, double radius, double value) {
            if (counts[bin]++ == 0) {
                first[bin] = value;
            }
            radii[bin] += radius;
            double excess = value - first[bin];
            sums[bin] += excess;
            squares[bin] += excess * excess;
        }

        RadialProfile profile(double binWidth) {
            double[] means = new double[counts.length];
            double[] errors = new double[counts.length];
            for (int i = 0; i < counts.length; i++) {
                int n = counts[i];
                radii[i] = n == 0 ? (i + 0.5) * binWidth : radii[i] / n;
                means[i] = n == 0 ? Double.NaN : first[i] + sums[i] / n;
                double variance = (squares[i] - sums[i] * sums[i] / Math.max(1, n)) / Math.max(1, n - 1);
                errors[i] = n < 2 ? Double.NaN : Math.sqrt(Math.max(0, variance) / n);
            }
            return new RadialProfile(binWidth, radii, means, errors, counts);
        }
    }

    /**
     * The width of the bins.
     *
     * @return in pixels
     */
    public double binWidth() {
        return binWidth;
    }

    /**
     * The number of bins.
     *
     * @return at least 1
     */
    public int size() {
        return counts.length;
    }

    /**
     * The mean radius of the pixels of a bin.
     *
     * @param bin from 0 at the centre
     * @return in pixels; the middle of the bin when no pixel is in it
     */
    public double radius(int bin) {
        return radii[bin];
    }

    /**
     * The mean grey value of a bin.
     *
     * @param bin from 0 at the centre
     * @return the mean; NaN when no pixel is in it
     */
    public double mean(int bin) {
        return means[bin];
    }

    /**
     * The standard error of the mean, from the scatter of the pixels of the bin, whatever its cause: noise, or grains that
     * show as spots on a ring.
     *
     * @param bin from 0 at the centre
     * @return the error; NaN when fewer than two pixels are in it
     */
    public double error(int bin) {
        return errors[bin];
    }

    /**
     * The number of pixels in a bin.
     *
     * @param bin from 0 at the centre
     * @return the count
     */
    public int count(int bin) {
        return counts[bin];
    }
}
