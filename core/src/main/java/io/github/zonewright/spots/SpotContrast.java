package io.github.zonewright.spots;

import io.github.zonewright.image.GrayImage;
import io.github.zonewright.image.PixelRepair;
import io.github.zonewright.image.Quantile;
import java.util.Arrays;
import java.util.List;
import java.util.Locale;

/**
 * Whether spots are dark on bright, as on a scanned negative: a proposal, for the user to confirm. Two things speak: which
 * end of the grey values reaches further from their median, since beam, spots and glow are all on one side; and the spots that
 * {@link SpotFinder} sees on the image weighed against those it sees on the inverted image; where the bright end reaches so
 * much further that the spots could not overrule it, they are not asked. Patterns that are all beam stop
 * and no glow leave it unsure.
 *
 * @param darkSpots whether the spots are likelier dark
 * @param confidence from 0, no idea, to 1; below {@value #SURE} the question had better be left open
 * @param reason what speaks for it, a sentence for the user
 */
public record SpotContrast(boolean darkSpots, double confidence, String reason) {

    /** Confidence from which on a proposal was never wrong on simulated patterns. */
    public static final double SURE = 0.5;

    private static final int STRONGEST = 40;
    private static final int LARGEST_SIDE = 768;
    /** Weight, in signal to noise, of what is seen by chance. */
    private static final double CHANCE = 30;
    /** Most that one spot counts. */
    private static final double MOST = 100;
    /** Part of the pixels beyond each end of the greys that are compared. */
    private static final double EXTREME = 0.0005;
    /** Least reach of one end as a part of the other's. */
    private static final double LEAST_REACH = 0.02;
    /** What the spots count beside the logarithm of the ends' ratio. */
    private static final double OF_SPOTS = 3;
    /** The sum of both that makes a proposal three quarters sure. */
    private static final double CLEAR = 4;
    /** What the spots say, as a part of the most they can, where they are not asked; they said 0.8 and more there. */
    private static final double AGREED = 0.8;

    /**
     * Proposes a contrast.
     *
     * @param image the image as it came
     * @return the proposal
     */
    public static SpotContrast of(GrayImage image) {
        int longer = Math.max(image.width(), image.height());
        int binning = Math.min((longer + LARGEST_SIDE - 1) / LARGEST_SIDE, Math.min(image.width(), image.height()));
        GrayImage small = image.without(DetectorGaps.of(image)).binned(binning);
        double ends = ends(PixelRepair.of(small).image());
        if (ends > OF_SPOTS) {
            return new SpotContrast(false, Math.tanh((ends + OF_SPOTS * AGREED) / CLEAR), ofEnds(ends) + ".");
        }
        double bright = weight(small);
        double dark = weight(small.inverted());
        double score = ends + OF_SPOTS * (bright - dark) / (bright + dark + CHANCE);
        boolean darkSpots = score < 0;
        return new SpotContrast(darkSpots, Math.tanh(Math.abs(score) / CLEAR), reason(ends, bright, dark));
    }

    private static String ofEnds(double ends) {
        return String.format(
                Locale.ROOT,
                "The %s end of the grey values reaches %.1f times as far from their median as the other",
                ends < 0 ? "dark" : "bright",
                Math.exp(Math.abs(ends)));
    }

    private static String reason(double ends, double bright, double dark) {
        return ofEnds(ends)
                + String.format(
                        Locale.ROOT,
                        ", and the %s spots stand out more (signal to noise, summed: %.0f bright, %.0f dark).",
                        bright < dark ? "dark" : "bright",
                        bright,
                        dark);
    }

    /** Logarithm of how far the bright end of the greys reaches from their median, over how far the dark one does. */
    private static double ends(GrayImage image) {
        float[] values = image.values();
        int count = 0;
        for (float value : values) {
            if (!Float.isNaN(value)) {
                values[count++] = value;
            }
        }
        if (count == 0) {
            return 0;
        }
        int beyond = (int) (EXTREME * count);
        double median = Quantile.select(values, 0, count, count / 2);
        double up = Quantile.select(values, count / 2, count, count - 1 - beyond) - median;
        double down = median - Quantile.select(values, 0, count / 2 + 1, beyond);
        double least = LEAST_REACH * Math.max(up, down);
        return least > 0 ? Math.log(Math.max(up, least) / Math.max(down, least)) : 0;
    }

    /** Saturated spots do not count: cut off at black, a background makes such of the inverted image. */
    private static double weight(GrayImage image) {
        MeasuredPattern pattern = SpotFinder.measure(image);
        List<MeasuredSpot> spots = pattern.spots();
        double beam = pattern.directBeam()
                .filter(spot -> !spot.saturated())
                .map(MeasuredSpot::signalToNoise)
                .orElse(0.0);
        double[] each = spots.stream()
                .filter(spot -> !spot.saturated())
                .mapToDouble(spot -> Math.min(spot.signalToNoise(), MOST))
                .sorted()
                .toArray();
        return Math.min(beam, MOST)
                + Arrays.stream(each).skip(Math.max(0, each.length - STRONGEST)).sum();
    }
}
