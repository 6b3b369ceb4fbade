package io.github.zonewright.spots;

import io.github.zonewright.geometry.LeastSquares;
import io.github.zonewright.image.GrayImage;
import io.github.zonewright.image.Mask;
import java.util.ArrayList;
import java.util.List;

/**
 * Tells faint spots from shoulders of the glow, which the background map is too coarse to follow. A Gaussian spot is
 * fitted to the pixels around a peak together with a level, a slope and a bend; what is left of the spot is set against the scatter of the
 * residuals, so that it does not matter why they scatter. Peaks beside a higher one are believed, since its skirt would be
 * taken for a bend.
 *
 * @param image the image, its background still there
 * @param unseen pixels that do not take part
 * @param sigma width of the spots in pixels
 */
record LocalGround(GrayImage image, Mask unseen, double sigma) {

    /** Signal to noise from which on a peak is no doubtful one. */
    private static final double CLEAR = 30;
    /** Radius of the fit in spot widths, and what has to be left of the least signal to noise for a spot to be believed. */
    private static final double WIDE = 5;

    private static final double LEFT_WIDE = 0.7;
    /** The same for a second look, where the glow bends in more ways than one: within fewer widths less of a spot is left. */
    private static final double NARROW = 3;

    private static final double LEFT_NARROW = 0.4;
    /** Distance in spot widths within which a higher peak disturbs the fit. */
    private static final double BESIDE = 6;

    /** The peaks that stand out from their surroundings too. */
    List<PeakSearch.Peak> standing(List<PeakSearch.Peak> highestFirst, double minimum) {
        NearbyPoints higher = new NearbyPoints(image.width(), image.height(), BESIDE * sigma);
        List<PeakSearch.Peak> kept = new ArrayList<>();
        for (PeakSearch.Peak peak : highestFirst) {
            boolean believed = peak.signalToNoise() > CLEAR || higher.anyWithin(peak.x(), peak.y());
            if (believed
                    || standing(peak, WIDE) > LEFT_WIDE * minimum
                    || standing(peak, NARROW) > LEFT_NARROW * minimum) {
                kept.add(peak);
            }
            higher.add(peak.x(), peak.y());
        }
        return kept;
    }

    /** Height over its error where the background may bend; infinite where it cannot be fitted. */
    private double standing(PeakSearch.Peak peak, double widths) {
        LeastSquares fit = new LeastSquares(7);
        int reach = (int) Math.ceil(widths * sigma);
        int right = Math.min(image.width() - 1, (int) peak.x() + reach);
        int bottom = Math.min(image.height() - 1, (int) peak.y() + reach);
        double[] row = new double[7];
        for (int y = Math.max(0, (int) peak.y() - reach); y <= bottom; y++) {
            double v = (y + 0.5 - peak.y()) / sigma;
            for (int x = Math.max(0, (int) peak.x() - reach); x <= right; x++) {
                double u = (x + 0.5 - peak.x()) / sigma;
                float value = image.value(x, y);
                if (u * u + v * v <= widths * widths && value == value && !unseen.contains(x, y)) {
                    row[0] = Math.exp(-0.5 * (u * u + v * v));
                    row[1] = 1;
                    row[2] = u;
                    row[3] = v;
                    row[4] = u * u;
                    row[5] = u * v;
                    row[6] = v * v;
                    fit.add(row, value, 1);
                }
            }
        }
        return fit.solve()
                .map(result -> result.values()[0] / Math.sqrt(result.covariance()[0][0] * result.reducedChiSquare()))
                .orElse(Double.POSITIVE_INFINITY);
    }
}
