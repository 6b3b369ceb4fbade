package io.github.zonewright.calibration;

import io.github.zonewright.image.Ellipse;
import io.github.zonewright.image.GrayImage;
import io.github.zonewright.image.Mask;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.image.RadialProfile;
import io.github.zonewright.spots.MeasuredValue;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.stream.IntStream;

/**
 * Measures the rings of a powder pattern: bright rings on a background that may fall off with the radius, textured or of
 * single grains, partly behind a beam stop.
 *
 * <p>Method: the shape about which the image is sharpest in radius gives centre and ellipse to a pixel; crests of the mean
 * profile give the rings; in each of 72 sectors every ring's crossing is fitted; centre, ellipse and radii follow from the
 * crossings by least squares, and all is done again about the better shape.
 *
 * <p>Known limits: all rings share one width; rings nearer than some 3 widths (σ) are left out or count as one; ellipse ratios up to 1.2; images
 * with a side above 2048 pixels are binned to below that. A beam stop need not be masked. Instances are immutable.
 */
public final class RingFinder {

    private static final int LARGEST_SIDE = 2048;
    private static final int ROUNDS = 3;
    private static final int FEWEST_ARCS = 8;
    /** A ring is one when it is seen in this part of the sectors in which it could be. */
    private static final double LEAST_SHARE = 0.4;

    private final Optional<Mask> mask;
    private final Optional<PixelPoint> near;

    private RingFinder(Optional<Mask> mask, Optional<PixelPoint> near) {
        this.mask = mask;
        this.near = near;
    }

    /**
     * A finder that is told nothing.
     *
     * @return the finder
     */
    public static RingFinder withDefaults() {
        return new RingFinder(Optional.empty(), Optional.empty());
    }

    /**
     * Leaves pixels out, besides what is found to be hidden.
     *
     * @param excluded pixels of the image that do not count
     * @return a finder with that setting
     */
    public RingFinder withMask(Mask excluded) {
        return new RingFinder(Optional.of(excluded), near);
    }

    /**
     * Starts from a centre instead of looking for it.
     *
     * @param centre the centre to within some pixels
     * @return a finder with that setting
     */
    public RingFinder withCentreNear(PixelPoint centre) {
        return new RingFinder(mask, Optional.of(centre));
    }

    /**
     * Measures the rings.
     *
     * @param image the pattern, left as it is
     * @return what was measured; without rings when there are none
     * @throws IllegalArgumentException if the mask is of another frame
     */
    public MeasuredRings find(GrayImage image) {
        int width = image.width();
        int height = image.height();
        Mask excluded = mask.orElseGet(() -> Mask.none(width, height));
        if (excluded.width() != width || excluded.height() != height) {
            throw new IllegalArgumentException("mask size " + excluded.width() + " × " + excluded.height()
                    + ": expected " + width + " × " + height);
        }
        int binning = Math.max(1, (Math.max(width, height) + LARGEST_SIDE - 1) / LARGEST_SIDE);
        if (Math.min(width, height) < 48 * binning || image.range().count() == 0) {
            return MeasuredRings.none();
        }
        GrayImage working = image.binned(binning);
        Mask out = binning == 1
                ? excluded
                : Mask.of(
                        working.width(),
                        working.height(),
                        i -> excluded.contains(
                                i % working.width() * binning + binning / 2,
                                i / working.width() * binning + binning / 2));
        Optional<PixelPoint> start = near.map(c -> new PixelPoint(c.x() / binning, c.y() / binning));
        Ellipse shape = start.map(c -> RingSharpness.searchNear(working, out, c))
                .orElseGet(() -> RingSharpness.search(working, out));
        return measure(working, out, shape, binning);
    }

    private static MeasuredRings measure(GrayImage image, Mask excluded, Ellipse first, int binning) {
        Ellipse shape = first;
        Optional<RingShapeFit.Result> result = Optional.empty();
        List<RingCrests.Crest> crests = List.of();
        double sigma = 0;
        for (int round = 0; round < ROUNDS; round++) {
            RingArcs arcs = RingArcs.of(image, shape, excluded);
            RingCrests profile = arcs.crests(Math.max(image.width(), image.height()) * 0.02);
            crests = profile.crests();
            double width = profile.sigma();
            sigma = width;
            double[] radii =
                    crests.stream().mapToDouble(RingCrests.Crest::radius).toArray();
            int[] counts = new int[radii.length];
            arcs.arcs(radii, sigma).forEach(arc -> counts[arc.ring()]++);
            crests = IntStream.range(0, radii.length)
                    .filter(k -> counts[k] >= Math.max(FEWEST_ARCS, LEAST_SHARE * arcs.visible(radii[k], width)))
                    .mapToObj(profile.crests()::get)
                    .toList();
            result = fit(arcs, crests, sigma, shape);
            if (result.isEmpty()) {
                return MeasuredRings.none();
            }
            shape = result.get().ellipse();
        }
        RadialProfile profile = RadialProfile.of(image, shape, excluded, 1);
        return rings(result.get(), crests, sigma, profile, binning);
    }

    /** Fits twice, as a crossing is told from its neighbours' the better the nearer their radii are. */
    private static Optional<RingShapeFit.Result> fit(
            RingArcs arcs, List<RingCrests.Crest> crests, double sigma, Ellipse shape) {
        double[] radii = crests.stream().mapToDouble(RingCrests.Crest::radius).toArray();
        return radii.length == 0
                ? Optional.empty()
                : RingShapeFit.of(arcs.arcs(radii, sigma), radii, shape)
                        .flatMap(r -> RingShapeFit.of(arcs.arcs(r.radii(), sigma), r.radii(), r.ellipse()));
    }

    private static MeasuredRings rings(
            RingShapeFit.Result fit, List<RingCrests.Crest> crests, double sigma, RadialProfile profile, int binning) {
        List<MeasuredRing> rings = new ArrayList<>();
        List<List<Double>> covariance = new ArrayList<>();
        double[][] c = fit.covariance();
        for (int i = 0; i < crests.size(); i++) {
            RingCrests.Crest crest = crests.get(i);
            MeasuredValue radius = new MeasuredValue(fit.radii()[i], Math.sqrt(c[4 + i][4 + i])).times(binning);
            rings.add(new MeasuredRing(
                    radius,
                    crest.height(),
                    crest.signalToNoise(),
                    (double) fit.counts()[i] / RingArcs.SECTORS,
                    fit.scatter()[i]));
            List<Double> row = new ArrayList<>();
            for (int j = 0; j < crests.size(); j++) {
                row.add(c[4 + i][4 + j] * binning * binning);
            }
            covariance.add(row);
        }
        return new MeasuredRings(
                rings, Optional.of(shape(fit, binning)), covariance, sigma * binning, Optional.of(profile));
    }

    /** From the strains u and v: ln q = 2√(u² + v²), azimuth = ½ atan2(v, u). */
    private static RingShape shape(RingShapeFit.Result fit, int binning) {
        double[][] c = fit.covariance();
        Ellipse own = fit.ellipse();
        double cos = Math.cos(2 * own.azimuth());
        double sin = Math.sin(2 * own.azimuth());
        double radial = cos * cos * c[2][2] + 2 * sin * cos * c[2][3] + sin * sin * c[3][3];
        double across = sin * sin * c[2][2] - 2 * sin * cos * c[2][3] + cos * cos * c[3][3];
        double size = Math.max(Math.log(own.ratio()) / 2, 1e-12);
        PixelPoint centre =
                new PixelPoint(own.centre().x() * binning, own.centre().y() * binning);
        return new RingShape(
                new Ellipse(centre, own.ratio(), own.azimuth()),
                Math.sqrt(c[0][0]) * binning,
                Math.sqrt(c[1][1]) * binning,
                2 * own.ratio() * Math.sqrt(radial),
                Math.min(Math.PI / 2, Math.sqrt(across) / (2 * size)));
    }
}
