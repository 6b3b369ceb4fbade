package io.github.zonewright.spots;

import io.github.zonewright.image.GrayImage;
import java.util.List;

/**
 * Whether spots are dark on bright, as on a scanned negative: a proposal, for the user to confirm. The spots that
 * {@link SpotFinder} sees on the image are weighed against those it sees on the inverted image.
 *
 * @param darkSpots whether the spots are likelier dark
 * @param confidence from 0, no idea, to 1
 */
public record SpotContrast(boolean darkSpots, double confidence) {

    private static final int STRONGEST = 40;
    private static final int LARGEST_SIDE = 768;
    /** Weight, in signal to noise, of what is seen by chance. */
    private static final double CHANCE = 30;

    /**
     * Proposes a contrast.
     *
     * @param image the image as it came
     * @return the proposal
     */
    public static SpotContrast of(GrayImage image) {
        int longer = Math.max(image.width(), image.height());
        int binning = Math.min((longer + LARGEST_SIDE - 1) / LARGEST_SIDE, Math.min(image.width(), image.height()));
        GrayImage small = image.binned(binning);
        double bright = weight(small);
        double dark = weight(small.inverted());
        return new SpotContrast(dark > bright, Math.abs(dark - bright) / (dark + bright + CHANCE));
    }

    private static double weight(GrayImage image) {
        MeasuredPattern pattern = SpotFinder.measure(image);
        List<MeasuredSpot> spots = pattern.spots();
        double beam = pattern.directBeam().map(MeasuredSpot::signalToNoise).orElse(0.0);
        return Math.min(beam, 100)
                + spots.stream()
                        .mapToDouble(s -> Math.min(s.signalToNoise(), 100))
                        .sorted()
                        .skip(Math.max(0, spots.size() - STRONGEST))
                        .sum();
    }
}
