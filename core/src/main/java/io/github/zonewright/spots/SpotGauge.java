package io.github.zonewright.spots;

import io.github.zonewright.image.GrayImage;
import io.github.zonewright.image.LevelMap;
import io.github.zonewright.image.Mask;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.image.PointFilter;

/**
 * Makes spots of peaks of the response. Peaks are in pixels of the binned image, spots in those of the image as given.
 *
 * @param binning pixels of the image per side of a pixel of the response
 * @param sigma width of the spots in pixels of the response
 * @param response the image filtered for spots
 * @param noise scatter of the response
 * @param saturated pixels at the detector's limit
 * @param hidden where nothing is seen
 * @param shaded where perhaps not all is seen: the hidden pixels and what a stop may shade beyond those
 * @param errors how well peaks are placed
 */
record SpotGauge(
        int binning,
        double sigma,
        GrayImage response,
        LevelMap noise,
        Mask saturated,
        Mask hidden,
        Mask shaded,
        PositionError errors) {

    /** How far from where a person points a peak is sought, in spot widths and in pixels. */
    private static final double REACH = 2.5;

    private static final double LEAST_REACH = 3;
    /** Share of a spot behind the straight edge of what is hidden, one width away; a spot with more is none. */
    private static final double HALF_HIDDEN = 0.16;
    /** Error, in spot widths, of a spot of which that share is shaded; measured on drawn stops. */
    private static final double SHADED = 0.5;

    private static final double SHADE_REACHES = 3.5;

    MeasuredSpot spot(PeakSearch.Peak peak) {
        return spot(peak, errors.of(peak, isSaturated(peak, sigma), response.width(), response.height()));
    }

    /** A spot whose position has another error than that of a peak of the response. */
    MeasuredSpot spot(PeakSearch.Peak peak, double seenWhole) {
        double share = share(shaded, peak);
        double error = PeakSearch.root(seenWhole, SHADED * sigma * Math.sqrt(Math.min(1, share / HALF_HIDDEN)));
        double intensity = peak.height() / PointFilter.ofSigma(sigma).responsePerSum();
        return new MeasuredSpot(
                new PixelPoint(peak.x() * binning, peak.y() * binning),
                error * binning,
                intensity * binning * binning,
                peak.signalToNoise(),
                isSaturated(peak, sigma));
    }

    boolean isSaturated(PeakSearch.Peak peak, double within) {
        return any(saturated, peak, within);
    }

    boolean isHalfHidden(PeakSearch.Peak peak) {
        return share(hidden, peak) > HALF_HIDDEN;
    }

    /** How much of a spot, as a Gaussian of the pattern's width, a mask covers. */
    private double share(Mask mask, PeakSearch.Peak peak) {
        int reach = (int) Math.ceil(SHADE_REACHES * sigma);
        if (!any(mask, peak, reach)) {
            return 0;
        }
        double sum = 0;
        for (int row = (int) peak.y() - reach; row <= peak.y() + reach; row++) {
            for (int column = (int) peak.x() - reach; column <= peak.x() + reach; column++) {
                if (mask.contains(column, row)) {
                    double square = Math.pow(column + 0.5 - peak.x(), 2) + Math.pow(row + 0.5 - peak.y(), 2);
                    sum += Math.exp(-square / (2 * sigma * sigma));
                }
            }
        }
        return sum / (2 * Math.PI * sigma * sigma);
    }

    private static boolean any(Mask mask, PeakSearch.Peak peak, double within) {
        int reach = (int) Math.ceil(within);
        int left = (int) peak.x() - reach;
        int top = (int) peak.y() - reach;
        return mask.containsAny(left, top, (int) (peak.x() + reach) + 1, (int) (peak.y() + reach) + 1);
    }

    /** How far from where a person points a spot is sought, in pixels of the image as given. */
    double reach() {
        return binning * Math.max(LEAST_REACH, REACH * sigma);
    }
}
