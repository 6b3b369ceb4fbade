package io.github.zonewright.spots;

import io.github.zonewright.image.LevelMap;
import io.github.zonewright.image.Mask;
import io.github.zonewright.image.PackedMask;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.image.PointFilter;
import java.lang.ref.SoftReference;
import java.lang.ref.WeakReference;
import java.util.Comparator;
import java.util.List;
import java.util.Locale;
import java.util.Optional;
import java.util.function.Supplier;
import java.util.stream.Stream;

/** All that was measured on one pattern. Immutable; every position is in pixels of the image as it was given. */
public final class MeasuredPattern {

    /** Least signal to noise of a spot that a person adds; lower than for one found, since it is one place and not all. */
    public static final double LEAST_BY_HAND = 3;
    /** Least signal to noise of what counts as the direct beam where a person sees it. */
    private static final double LEAST_BEAM = 10;
    /** A spot no further than this many spot widths from another is that one. */
    private static final double SAME = 1.7;

    private final int width;
    private final int height;
    private final SpotChoice choice;
    private final int binning;
    private final double sigma;
    private final PackedMask hidden;
    private final Supplier<Fields> fields;
    /** What {@link #hidden()} made last, for those that ask again and again. */
    private volatile WeakReference<Mask> lastHidden = new WeakReference<>(null);

    /**
     * What the measurement keeps per pixel, on the image binned by a factor.
     *
     * @param gauge what spots are measured with
     * @param background level of the background
     */
    record Fields(SpotGauge gauge, LevelMap background) {}

    MeasuredPattern(int width, int height, SpotChoice choice, Fields fields) {
        this.width = width;
        this.height = height;
        this.choice = choice;
        this.binning = fields.gauge.binning();
        this.sigma = fields.gauge.sigma();
        this.hidden = PackedMask.of(fields.gauge.hidden());
        this.fields = () -> fields;
    }

    private MeasuredPattern(MeasuredPattern whole, SpotChoice choice, Supplier<Fields> fields) {
        this.width = whole.width;
        this.height = whole.height;
        this.choice = choice;
        this.binning = whole.binning;
        this.sigma = whole.sigma;
        this.hidden = whole.hidden;
        this.fields = fields;
    }

    private MeasuredPattern with(SpotChoice other) {
        return new MeasuredPattern(this, other, fields);
    }

    /**
     * The same without what it keeps per pixel, for one of thousands that are kept at a time. Spots, centres and what is
     * hidden stay; whoever asks for a background or an intensity has the image measured again.
     *
     * @param again measures the same image in the same way
     * @return the lighter pattern; it answers as this one does
     */
    public MeasuredPattern withoutPixels(Supplier<MeasuredPattern> again) {
        return new MeasuredPattern(this, choice, new MeasuredAgain(again));
    }

    /** Fields that are measured when they are asked for and forgotten when memory is short. */
    private static final class MeasuredAgain implements Supplier<Fields> {

        private final Supplier<MeasuredPattern> again;
        private SoftReference<Fields> last = new SoftReference<>(null);

        MeasuredAgain(Supplier<MeasuredPattern> again) {
            this.again = again;
        }

        @Override
        public synchronized Fields get() {
            Fields kept = last.get();
            if (kept == null) {
                kept = again.get().fields.get();
                last = new SoftReference<>(kept);
            }
            return kept;
        }
    }

    /**
     * The image's width.
     *
     * @return in pixels
     */
    public int width() {
        return width;
    }

    /**
     * The image's height.
     *
     * @return in pixels
     */
    public int height() {
        return height;
    }

    /**
     * The diffracted spots.
     *
     * @return without the direct beam, the most intense first
     */
    public List<MeasuredSpot> spots() {
        return choice.spots();
    }

    /**
     * The direct beam.
     *
     * @return empty when it is hidden, outside the frame or not to be told from the spots
     */
    public Optional<MeasuredSpot> directBeam() {
        return choice.directBeam();
    }

    /**
     * The likeliest centre.
     *
     * @return empty when nothing points to any
     */
    public Optional<PatternCentre> centre() {
        return centres().stream().findFirst().map(CentreCandidate::centre);
    }

    /**
     * The centres the pattern may have.
     *
     * @return the likeliest first
     */
    public List<CentreCandidate> centres() {
        return choice.centres();
    }

    /**
     * Whether a spot is a person's: added or moved by hand.
     *
     * @param spot a spot of this pattern
     * @return false for those that were found
     */
    public boolean isByHand(MeasuredSpot spot) {
        return choice.isByHand(spot);
    }

    /**
     * Whether the centre is a person's.
     *
     * @return false when it was found
     */
    public boolean isCentreByHand() {
        return choice.isCentreByHand();
    }

    /**
     * The pattern with one spot more, measured like those that were found, on the highest peak near a place.
     *
     * @param place where a person sees it; peaks are sought within 2.5 spot widths or 3 px, whichever is more
     * @return the pattern with that spot, which is the person's; the centre is found anew unless it is theirs
     * @throws IllegalArgumentException if nothing rises there, with the signal to noise found, or if a spot is there already
     */
    public MeasuredPattern withSpotNear(PixelPoint place) {
        return with(choice.with(measuredNear(place, LEAST_BY_HAND)));
    }

    /**
     * The pattern without the spot nearest to a place.
     *
     * @param place a place within 2.5 spot widths or 3 px, whichever is more, of a spot or of the direct beam
     * @return the pattern without that spot; the centre is found anew unless it is a person's and elsewhere
     * @throws IllegalArgumentException if there is no spot
     */
    public MeasuredPattern withoutSpotNear(PixelPoint place) {
        return with(choice.without(spotNear(place)));
    }

    /**
     * The pattern with a spot moved to the highest peak near another place, and measured there.
     *
     * @param from a place near the spot, as for {@link #withoutSpotNear}
     * @param to a place near the peak, as for {@link #withSpotNear}
     * @return the pattern with the spot moved, which is the person's from then on
     * @throws IllegalArgumentException if there is no spot at the one place, or if nothing rises at the other
     */
    public MeasuredPattern withSpotMoved(PixelPoint from, PixelPoint to) {
        return withoutSpotNear(from).withSpotNear(to);
    }

    /**
     * The pattern with its centre on the direct beam near a place, with the error of that.
     *
     * @param place where a person sees the direct beam; its peak is sought within 2.5 spot widths or 3 px, whichever is more
     * @return the pattern with that direct beam and no other centre
     * @throws IllegalArgumentException if nothing bright rises there; {@link #withCentre} takes any place
     */
    public MeasuredPattern withDirectBeamNear(PixelPoint place) {
        Optional<MeasuredSpot> known = nearestWithin(place, fields.get().gauge.reach());
        return with(choice.withBeam(known.orElseGet(() -> measuredNear(place, LEAST_BEAM))));
    }

    /**
     * The pattern with its centre where a person says, which may be hidden or off the frame.
     *
     * @param place the centre
     * @param error standard deviation of each coordinate in pixels
     * @return the pattern with that centre and no other
     * @throws IllegalArgumentException if the error is not positive and finite
     */
    public MeasuredPattern withCentre(PixelPoint place, double error) {
        return with(choice.withCentre(new PatternCentre(place, error, PatternCentre.Source.BY_HAND)));
    }

    /**
     * The pattern with its centre as found from its spots and background.
     *
     * @return the pattern without a centre by hand
     */
    public MeasuredPattern withFoundCentre() {
        return with(choice.withFoundCentre());
    }

    private Optional<MeasuredSpot> nearestWithin(PixelPoint place, double reach) {
        return Stream.concat(spots().stream(), directBeam().stream())
                .filter(spot -> spot.position().distanceTo(place) <= reach)
                .min(Comparator.comparingDouble(spot -> spot.position().distanceTo(place)));
    }

    private MeasuredSpot spotNear(PixelPoint place) {
        double reach = fields.get().gauge.reach();
        return nearestWithin(place, reach)
                .orElseThrow(() -> new IllegalArgumentException(String.format(
                        Locale.ROOT, "No spot within %.1f px of %.1f, %.1f.", reach, place.x(), place.y())));
    }

    private MeasuredSpot measuredNear(PixelPoint place, double least) {
        SpotGauge gauge = fields.get().gauge;
        PixelPoint at = binned(place);
        double reach = gauge.reach();
        List<MeasuredSpot> peaks = new PeakSearch(gauge.response(), gauge.sigma())
                .near(gauge.noise(), at.x(), at.y(), reach / gauge.binning()).stream()
                        .map(gauge::spot)
                        .toList();
        for (MeasuredSpot peak : peaks) {
            if (peak.signalToNoise() >= least
                    && nearestWithin(peak.position(), SAME * spotSigma()).isEmpty()) {
                return peak;
            }
        }
        Optional<MeasuredSpot> known = nearestWithin(place, reach);
        if (known.isPresent()) {
            throw new IllegalArgumentException(String.format(
                    Locale.ROOT,
                    "No other spot rises near %.1f, %.1f than the one at %.1f, %.1f.",
                    place.x(),
                    place.y(),
                    known.get().position().x(),
                    known.get().position().y()));
        }
        double highest = peaks.isEmpty()
                ? measureAt(place).signalToNoise()
                : peaks.get(0).signalToNoise();
        throw new IllegalArgumentException(String.format(
                Locale.ROOT,
                "No spot rises near %.1f, %.1f: the signal to noise is %.1f at most within %.1f px, expected at least %.0f.",
                place.x(),
                place.y(),
                highest,
                reach,
                least));
    }

    /**
     * The width of the spots.
     *
     * @return standard deviation of the Gaussian like which the spots fall to half their height, in pixels
     */
    public double spotSigma() {
        return sigma * binning;
    }

    /**
     * Whether nothing can be seen at a place: it is outside the frame or behind the beam stop.
     *
     * @param point any point
     * @return true when a spot there could not be seen
     */
    public boolean isHidden(PixelPoint point) {
        return point.x() < 0
                || point.y() < 0
                || point.x() >= width
                || point.y() >= height
                || hidden.contains(binned(point));
    }

    /**
     * The pixels behind the beam stop.
     *
     * @return a mask of the whole image
     */
    public Mask hidden() {
        Mask last = lastHidden.get();
        if (last == null) {
            Mask seen = hidden.unpacked();
            last = binning == 1 ? seen : seen.enlarged(binning, width, height);
            lastHidden = new WeakReference<>(last);
        }
        return last;
    }

    /**
     * The level of the background.
     *
     * @param point a point of the frame
     * @return its grey value
     */
    public double backgroundAt(PixelPoint point) {
        PixelPoint place = binned(point);
        return fields.get().background.at(place.x(), place.y());
    }

    /**
     * Measures the intensity at a place whether or not a spot was found there (forced photometry).
     *
     * @param point a point of the frame; outside, the nearest pixel answers
     * @return the filter's answer as an intensity, with its noise
     */
    public SpotResponse measureAt(PixelPoint point) {
        PixelPoint place = binned(point);
        double perSum = PointFilter.ofSigma(sigma).responsePerSum() / (binning * (double) binning);
        SpotGauge gauge = fields.get().gauge;
        return new SpotResponse(
                gauge.response().interpolated(place) / perSum, gauge.noise().at(place.x(), place.y()) / perSum);
    }

    private PixelPoint binned(PixelPoint point) {
        return new PixelPoint(point.x() / binning, point.y() / binning);
    }
}
