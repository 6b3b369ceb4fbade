package io.github.zonewright.spots;

import io.github.zonewright.image.LevelMap;
import java.util.ArrayList;
import java.util.List;

/**
 * Finds clear maxima of the response that are no round peaks: two spots side by side make such, as edges and streaks do.
 */
final class DrawnOut {

    /** Signal to noise of what is looked at. */
    private static final double CLEAR = 30;
    /** A round peak accounts for the response within this many spot widths. */
    private static final double ACCOUNTED = 4;

    private static final double REACH = 1.5;
    /** Curvature across, as height over squared width; 0.67 for a Gaussian spot. */
    private static final double SHARP = 0.4;

    private DrawnOut() {}

    /** Maxima far from all round peaks. */
    static List<PeakSearch.Peak> of(SpotGauge gauge, List<PeakSearch.Peak> round) {
        double sigma = gauge.sigma();
        int width = gauge.response().width();
        int height = gauge.response().height();
        NearbyPoints known = new NearbyPoints(width, height, ACCOUNTED * sigma);
        round.forEach(peak -> known.add(peak.x(), peak.y()));
        PeakSearch search = new PeakSearch(gauge.response(), sigma);
        List<PeakSearch.Peak> found = new ArrayList<>();
        int step = Math.max(1, (int) (REACH * sigma));
        double least = CLEAR * least(gauge.noise());
        for (int row = step / 2; row < height; row += step) {
            for (int column = step / 2; column < width; column += step) {
                float value = gauge.response().value(column, row);
                if (value > least && value > CLEAR * gauge.noise().at(column, row) && !known.anyWithin(column, row)) {
                    for (PeakSearch.Peak peak : search.near(gauge.noise(), column, row, REACH * sigma + 1)) {
                        if (isSharp(peak, sigma) && !known.anyWithin(peak.x(), peak.y())) {
                            known.add(peak.x(), peak.y());
                            found.add(peak);
                        }
                    }
                }
            }
        }
        return found;
    }

    private static double least(LevelMap map) {
        double least = Double.POSITIVE_INFINITY;
        for (int row = 0; row < map.rows(); row++) {
            for (int column = 0; column < map.columns(); column++) {
                least = Math.min(least, map.level(column, row));
            }
        }
        return least;
    }

    /** Whether a maximum is as narrow as a spot at least in one direction. */
    private static boolean isSharp(PeakSearch.Peak peak, double sigma) {
        double greater = 2 * peak.curvature() / (1 + peak.roundness());
        return greater * sigma * sigma > SHARP * peak.height();
    }
}
