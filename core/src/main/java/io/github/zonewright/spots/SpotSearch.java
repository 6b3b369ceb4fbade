package io.github.zonewright.spots;

import io.github.zonewright.image.Background;
import io.github.zonewright.image.GaussianFilter;
import io.github.zonewright.image.GrayImage;
import io.github.zonewright.image.LevelMap;
import io.github.zonewright.image.Mask;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.image.PixelRepair;
import io.github.zonewright.image.PointFilter;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;

/** One run of {@link SpotFinder} over one image. */
final class SpotSearch {

    private static final int TRIAL_CELL = 24;
    /** A saturated region larger than this many squared spot widths is taken out and measured by its outline. */
    private static final double LARGE = 20;
    /** Radius in spot widths within which a found spot keeps the noise of single pixels from being read. */
    private static final double COVERED = 2;
    /** Radius in spot widths out to which the response still feels a strong spot. */
    private static final double FAR = 6.5;
    /** Part of the image that spots may cover before the noise is no longer read off the rest alone. */
    private static final double MOSTLY = 0.9;
    /** Spots crowd when this many squared widths for each fill the image. */
    private static final double CROWD = 100;
    /** Faint spots nearer to a strong one than this many widths are not believed. */
    private static final double APART = 3.1;
    /** Radius in spot widths within which a found spot is wiped out. */
    private static final double WIPED = 2.6;
    /** Scatter that rounding to whole numbers leaves: 1/√12. */
    private static final double ROUNDING = 0.29;

    private final GrayImage image;
    private final int binning;
    private final GrayImage mended;
    private final Mask faulty;
    private final Mask saturated;
    private final double minimum;
    private final boolean seekStop;
    private final int width;
    private final int height;

    private double sigma;
    private Background background;
    private GrayImage flat;
    private GrayImage response;
    private LevelMap noise;
    private List<SaturatedRegion> regions;

    SpotSearch(GrayImage image, int binning, PixelRepair repaired, Mask saturated, double minimum, boolean seekStop) {
        this.image = image;
        this.binning = binning;
        this.mended = repaired.image();
        this.faulty = repaired.faulty();
        this.saturated = saturated;
        this.minimum = minimum;
        this.seekStop = seekStop;
        this.width = mended.width();
        this.height = mended.height();
    }

    MeasuredPattern run(OptionalDouble givenSigma) {
        Mask none = Mask.none(width, height);
        float[] values = mended.values();
        Mask missing = Mask.of(width, height, i -> Float.isNaN(values[i]));
        background = Background.of(mended, TRIAL_CELL, none);
        flat = background.level().subtractedFrom(mended);
        GrayImage narrow = PointFilter.ofSigma(SpotWidth.TRIAL).apply(flat);
        double rounding = image.isInteger() ? ROUNDING / binning : 0;
        Mask spoilt = saturated.dilated(1).union(missing);
        ResponseNoise scatter = ResponseNoise.of(flat, narrow, SpotWidth.TRIAL, rounding, spoilt, spoilt)
                .smoothed();
        sigma = givenSigma.orElseGet(() -> SpotWidth.of(flat, saturated, narrow, scatter));
        int cell = (int) Math.max(12, Math.round(8 * sigma));
        background = Background.of(mended, cell, none);
        flat = continued(background.level().subtractedFrom(mended), missing);
        regions = SaturatedRegion.of(saturated, 6).stream()
                .filter(region -> region.area() > LARGE * sigma * sigma
                        || region.isBloomed() && region.halfLength() > 3 * sigma + 2)
                .toList();
        response = PointFilter.ofSigma(sigma).apply(flat);
        noise = scatter.of(sigma);
        List<PeakSearch.Peak> found = peaks(rounding, spoilt);
        PositionError errors = new PositionError(background.level(), noise, sigma);
        List<PeakSearch.Peak> peaks =
                found.stream().filter(peak -> isBeyondChance(peak, errors)).toList();
        List<MeasuredSpot> all = new ArrayList<>();
        for (SaturatedRegion region : regions) {
            all.add(spot(region));
        }
        Optional<GlowCentre> glow = glow(none);
        Mask hidden = none;
        if (seekStop && glow.isPresent()) {
            hidden = BeamStop.of(mended, glow.get().x(), glow.get().y());
            if (hidden.count() > 0) {
                glow = glow(hidden);
                hidden = glow.isPresent()
                        ? BeamStop.of(mended, glow.get().x(), glow.get().y())
                        : hidden;
            }
        }
        Mask shaded = hidden.dilated(BeamStop.cell(width, height) / 2).union(missing);
        hidden = hidden.union(missing);
        SpotGauge gauge = new SpotGauge(binning, sigma, response, noise, saturated, hidden, shaded, errors);
        for (PeakSearch.Peak peak : withoutHiddenEdge(peaks, gauge)) {
            all.add(gauge.spot(peak));
        }
        Optional<GlowCentre> scaled =
                glow.map(g -> new GlowCentre(g.x() * binning, g.y() * binning, g.error() * binning, g.floor()));
        return new MeasuredPattern(
                image.width(),
                image.height(),
                new SpotChoice(all, scaled, sigma * binning),
                new MeasuredPattern.Fields(gauge, background.level()));
    }

    /** What is left of the background beside missing data, continued into them lest their edges look like spots. */
    private GrayImage continued(GrayImage rest, Mask missing) {
        if (missing.count() == 0) {
            return rest;
        }
        GaussianFilter smooth = GaussianFilter.ofSigma(2 * sigma);
        float[] around = smooth.apply(rest).values();
        float[] present = new float[around.length];
        for (int i = 0; i < present.length; i++) {
            present[i] = missing.contains(i % width, i / width) ? 0 : 1;
        }
        float[] share = smooth.apply(GrayImage.ofFloats(width, height, present)).values();
        float[] values = rest.values();
        for (int i = 0; i < values.length; i++) {
            if (present[i] == 0) {
                values[i] = around[i] / Math.max(share[i], Float.MIN_NORMAL);
            }
        }
        return GrayImage.ofFloats(width, height, values);
    }

    /** Peaks of the response, with its scatter taken a second time away from what the first search found. */
    private List<PeakSearch.Peak> peaks(double rounding, Mask spoilt) {
        PeakSearch search = new PeakSearch(response, sigma);
        List<PeakSearch.Peak> first = search.find(noise, minimum);
        Mask covered = around(first, COVERED * sigma).union(spoilt);
        if (covered.count() < MOSTLY * width * height) {
            Mask widely = around(first, FAR * sigma).union(spoilt);
            noise = ResponseNoise.of(flat, response, sigma, rounding, covered, widely)
                    .of(sigma);
        }
        List<PeakSearch.Peak> peaks = search.find(noise, minimum);
        if (peaks.size() * CROWD * sigma * sigma > width * (double) height) {
            peaks = withFaintNeighbours(peaks);
        }
        boolean[] inRegion = new boolean[width * height];
        for (SaturatedRegion region : regions) {
            for (int index : region.members()) {
                cover(inRegion, index % width + 0.5, index / width + 0.5, 2 * sigma + 1);
            }
        }
        return peaks.stream()
                .filter(peak -> !inRegion[pixel(peak.x(), peak.y())])
                .toList();
    }

    /**
     * Whether a peak passes the threshold once it is raised for the longer tail of few counts (first term of the
     * Cornish–Fisher expansion).
     */
    private boolean isBeyondChance(PeakSearch.Peak peak, PositionError errors) {
        double skewness = Math.min(1, errors.skewness(peak.noise()));
        return peak.signalToNoise() > minimum + (minimum * minimum - 1) * skewness / 6;
    }

    /**
     * Looks once more where spots crowd, against a surround from which those found are wiped out, since the surround of
     * the first search suppresses faint spots beside strong ones and pushes spots away from their neighbours.
     */
    private List<PeakSearch.Peak> withFaintNeighbours(List<PeakSearch.Peak> strong) {
        Mask wiped = around(strong, WIPED * sigma);
        GrayImage against = PointFilter.ofSigma(sigma).apply(flat, wiped);
        double share = 1 / PointFilter.alone();
        List<PeakSearch.Peak> unmatched = new ArrayList<>(strong);
        List<PeakSearch.Peak> peaks = new ArrayList<>();
        for (PeakSearch.Peak peak : new PeakSearch(against, sigma).find(noise, minimum)) {
            if (unmatched.removeIf(other -> other.distanceTo(peak.x(), peak.y()) < sigma)) {
                peaks.add(peak.times(share));
            } else if (strong.stream().noneMatch(other -> other.distanceTo(peak.x(), peak.y()) < APART * sigma)) {
                peaks.add(peak);
            }
        }
        peaks.addAll(unmatched);
        float[] values = against.values();
        for (int i = 0; i < values.length; i++) {
            values[i] *= wiped.contains(i % width, i / width) ? share : 1;
        }
        response = GrayImage.ofFloats(width, height, values);
        return peaks;
    }

    private Mask around(List<PeakSearch.Peak> peaks, double reach) {
        boolean[] covered = new boolean[width * height];
        for (PeakSearch.Peak peak : peaks) {
            cover(covered, peak.x(), peak.y(), reach);
        }
        return Mask.of(width, height, i -> covered[i]);
    }

    private void cover(boolean[] covered, double x, double y, double reach) {
        for (int row = Math.max(0, (int) (y - reach)); row < Math.min(height, y + reach); row++) {
            for (int column = Math.max(0, (int) (x - reach)); column < Math.min(width, x + reach); column++) {
                if (Math.hypot(column + 0.5 - x, row + 0.5 - y) <= reach) {
                    covered[row * width + column] = true;
                }
            }
        }
    }

    private int pixel(double x, double y) {
        return Math.max(0, Math.min(height - 1, (int) y)) * width + Math.max(0, Math.min(width - 1, (int) x));
    }

    private MeasuredSpot spot(SaturatedRegion region) {
        double sum = 0;
        for (int index : region.members()) {
            sum += flat.value(index % width, index / width);
        }
        double error = 0.1 + 0.02 * region.radius() + (region.isBloomed() ? 0.04 * region.halfLength() : 0);
        double least =
                noise.at(region.x(), region.y()) / PointFilter.ofSigma(sigma).responsePerSum();
        return new MeasuredSpot(
                new PixelPoint(region.x() * binning, region.y() * binning),
                error * binning,
                Math.max(sum, least) * binning * binning,
                Math.max(sum / least, 1),
                true);
    }

    private Optional<GlowCentre> glow(Mask hidden) {
        int cell = Math.max(6, Math.max(width, height) / 40);
        if (Math.min(width, height) < 4 * cell) {
            return Optional.empty();
        }
        Background coarse = Background.unsmoothed(mended, cell, hidden);
        return GlowCentre.of(coarse.level(), coarse.noise().level(0, 0) / cell, (column, row) -> {
            int covered = 0;
            for (int k = 0; k < 9; k++) {
                int x = column * cell + cell * (k % 3) / 2;
                int y = row * cell + cell * (k / 3) / 2;
                covered += hidden.contains(x, y) ? 1 : 0;
            }
            return covered > 0;
        });
    }

    /** Drops spots half behind what is hidden, and weak or lopsided ones next to it, where its edge makes such maxima. */
    private List<PeakSearch.Peak> withoutHiddenEdge(List<PeakSearch.Peak> peaks, SpotGauge gauge) {
        Mask hidden = gauge.hidden();
        if (hidden.count() == 0) {
            return peaks;
        }
        Mask near = hidden.dilated((int) Math.ceil(3.5 * sigma));
        List<PeakSearch.Peak> kept = new ArrayList<>();
        for (PeakSearch.Peak peak : peaks) {
            boolean doubtful = peak.roundness() < 0.7 && peak.signalToNoise() < 30;
            boolean shaded = near.contains((int) peak.x(), (int) peak.y());
            if (!shaded || !doubtful && !gauge.isHalfHidden(peak)) {
                kept.add(peak);
            }
        }
        return kept;
    }
}
