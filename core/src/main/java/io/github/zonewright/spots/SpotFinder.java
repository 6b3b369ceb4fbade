package io.github.zonewright.spots;

import io.github.zonewright.image.GrayImage;
import io.github.zonewright.image.Mask;
import io.github.zonewright.image.PixelRepair;
import io.github.zonewright.image.Saturation;
import java.util.Optional;
import java.util.OptionalDouble;

/**
 * Measures a spot pattern: finds the spots and their common width, the centre, and what a beam stop hides.
 *
 * <p>Method: faulty pixels are mended; the background is estimated cell by cell and taken away, and what bloomed is filled from
 * beside it; the width of the spots is read off the strongest; the image is filtered with a Gaussian of that width less a
 * wider one, which is close to the best linear filter for a spot on an uneven background; maxima that stand out from the
 * scatter of the filtered image and are round are spots, the faint ones if they also stand out from a slope and a bend
 * fitted around them. Spots nearer to each other than 4.5 widths, and those around which the response is not round, are
 * fitted to the pixels together with tilted and bent ground, in the shape that most spots of the image have; where one
 * spot does not explain what is there, two to four do. The result depends on nothing but the image and the settings.
 * Instances are immutable and may be used by any number of threads.
 *
 * <p>Known limits: spots are bright on dark; one width serves all; two equal spots count as one when nearer than 1.2 widths at a
 * signal to noise of 500, 1.4 at 200 and 2.5 to 3 at 30 (drawn Gaussians; discs are told apart from 1.2 widths on), and so
 * do overexposed ones, those on the frame's edge and more than four in a heap; a fainter one of less than a tenth of the
 * height of its neighbour is lost there; a centre off the frame is found where the glow about it is strong,
 * else it is one of the candidates; nearer to a strong direct beam than 6 widths, discs on a steep glow are displaced by up
 * to 0.3 widths; spots of which the streak of a bloomed direct beam covers the middle are lost; images with a side above
 * {@value #LARGEST_SIDE} pixels are binned to below that before the search.
 */
public final class SpotFinder {

    /** Default least signal to noise of a spot: about one false spot in 10⁶ places of a Gaussian scatter. */
    public static final double DEFAULT_MINIMUM_SIGNAL_TO_NOISE = 5;

    static final int LARGEST_SIDE = 2048;

    private final double minimumSignalToNoise;
    private final OptionalDouble spotSigma;

    private final boolean seekHidden;
    private final Optional<Mask> hidden;

    private SpotFinder(
            double minimumSignalToNoise, OptionalDouble spotSigma, boolean seekHidden, Optional<Mask> hidden) {
        this.minimumSignalToNoise = minimumSignalToNoise;
        this.spotSigma = spotSigma;
        this.seekHidden = seekHidden;
        this.hidden = hidden;
    }

    /**
     * A finder with the default settings.
     *
     * @return least signal to noise 5, width of the spots found from the image
     */
    public static SpotFinder withDefaults() {
        return new SpotFinder(DEFAULT_MINIMUM_SIGNAL_TO_NOISE, OptionalDouble.empty(), true, Optional.empty());
    }

    /**
     * Changes how far a spot must stand out.
     *
     * @param minimum least signal to noise, at least 2
     * @return a finder with that setting
     * @throws IllegalArgumentException if the minimum is below 2 or not finite
     */
    public SpotFinder withMinimumSignalToNoise(double minimum) {
        if (!(minimum >= 2) || Double.isInfinite(minimum)) {
            throw new IllegalArgumentException(
                    "least signal to noise " + minimum + ": expected a finite number of at least 2");
        }
        return new SpotFinder(minimum, spotSigma, seekHidden, hidden);
    }

    /**
     * Sets the width of the spots instead of reading it off the image.
     *
     * @param sigma standard deviation in pixels, 0.5 to 60
     * @return a finder with that setting
     * @throws IllegalArgumentException if the width is out of range
     */
    public SpotFinder withSpotSigma(double sigma) {
        if (!(sigma >= 0.5 && sigma <= 60)) {
            throw new IllegalArgumentException("spot width " + sigma + " px: expected 0.5 to 60");
        }
        return new SpotFinder(minimumSignalToNoise, OptionalDouble.of(sigma), seekHidden, hidden);
    }

    /**
     * Says what is hidden instead of having it found: beam stop, detector gaps, whatever else is no part of the pattern. The
     * mask takes the place of the automatic one, so that a person can take away from that as well as add to it
     * ({@link MeasuredPattern#hidden()} is where to start from). No spot is sought there or on its edge, and its pixels
     * do not count for the background. Pixels without data stay hidden.
     *
     * @param mask the hidden pixels of the image, not binned; of the size of the images to be measured
     * @return a finder with that setting
     */
    public SpotFinder withHidden(Mask mask) {
        return new SpotFinder(minimumSignalToNoise, spotSigma, false, Optional.of(mask));
    }

    /**
     * Takes nothing for hidden but pixels without data.
     *
     * @return a finder with that setting
     */
    public SpotFinder withNothingHidden() {
        return new SpotFinder(minimumSignalToNoise, spotSigma, false, Optional.empty());
    }

    /**
     * Measures a pattern with the default settings.
     *
     * @param image the pattern, spots bright on dark; left as it is
     * @return what was measured; without spots when there are none
     */
    public static MeasuredPattern measure(GrayImage image) {
        return withDefaults().find(image);
    }

    /**
     * Measures a pattern.
     *
     * @param image the pattern, spots bright on dark; left as it is
     * @return what was measured; without spots when there are none
     * @throws IllegalArgumentException if hidden pixels were given for images of another size
     */
    public MeasuredPattern find(GrayImage image) {
        int longer = Math.max(image.width(), image.height());
        int binning = Math.min((longer + LARGEST_SIDE - 1) / LARGEST_SIDE, Math.min(image.width(), image.height()));
        OptionalDouble limit = Saturation.level(image);
        Mask covered =
                hidden.orElseGet(() -> seekHidden ? DetectorGaps.of(image) : Mask.none(image.width(), image.height()));
        GrayImage working = image.without(covered).binned(binning);
        Mask saturated = limit.isPresent()
                ? Mask.atLeast(working, (float) (0.98 * limit.getAsDouble()))
                : Mask.none(working.width(), working.height());
        PixelRepair repaired = PixelRepair.of(working);
        OptionalDouble sigma = spotSigma.isPresent()
                ? OptionalDouble.of(Math.max(0.5, spotSigma.getAsDouble() / binning))
                : OptionalDouble.empty();
        return new SpotSearch(image, binning, repaired, saturated, minimumSignalToNoise, seekHidden).run(sigma);
    }
}
