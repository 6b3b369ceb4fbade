package io.github.zonewright.spots;

import io.github.zonewright.image.Background;
import io.github.zonewright.image.GrayImage;
import io.github.zonewright.image.LevelMap;
import io.github.zonewright.image.Mask;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.image.PixelRepair;
import io.github.zonewright.image.PointFilter;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.Comparator;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;

/** One run of {@link SpotFinder} over one image. */
final class SpotSearch {

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
    /** Error, in spot widths, of a spot near the stop. */
    private static final double SHADED = 0.25;
    /** No nearer to the direct beam than this many spot widths is a spot believed. */
    private static final double NEAR_CENTRE = 3;

    private final GrayImage image;
    private final int binning;
    private final GrayImage mended;
    private final Mask saturated;
    private final double minimum;
    private final int width;
    private final int height;

    private double sigma;
    private Background background;
    private GrayImage flat;
    private GrayImage response;
    private LevelMap noise;
    private List<SaturatedRegion> regions;

    SpotSearch(GrayImage image, int binning, PixelRepair repaired, Mask saturated, double minimum) {
        this.image = image;
        this.binning = binning;
        this.mended = repaired.image();
        this.flat = repaired.flat();
        this.saturated = saturated;
        this.minimum = minimum;
        this.width = mended.width();
        this.height = mended.height();
    }

    MeasuredPattern run(OptionalDouble givenSigma) {
        Mask none = Mask.none(width, height);
        GrayImage narrow = PointFilter.ofSigma(SpotWidth.TRIAL).apply(flat);
        double rounding = image.isInteger() ? ROUNDING / binning : 0;
        Mask spoilt = saturated.dilated(1);
        ResponseNoise scatter = ResponseNoise.of(
                        flat, narrow, ResponseNoise.ROUGH, SpotWidth.TRIAL, rounding, spoilt, spoilt)
                .smoothed();
        sigma = givenSigma.orElseGet(() -> SpotWidth.of(flat, saturated, narrow, scatter));
        background = Background.of(mended, (int) Math.max(12, Math.round(8 * sigma)), none);
        flat = background.level().subtractedFrom(mended);
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
        for (PeakSearch.Peak peak : peaks) {
            all.add(spot(peak, errors));
        }
        int cell = Math.max(6, Math.max(width, height) / 40);
        Background coarse = Background.unsmoothed(mended, cell, none);
        Optional<GlowCentre> glow = glow(coarse, cell, none);
        Mask hidden = none;
        if (glow.isPresent()) {
            hidden = BeamStop.of(mended, glow.get().x(), glow.get().y());
            if (hidden.count() > 0) {
                glow = glow(coarse, cell, hidden);
                hidden = glow.isPresent()
                        ? BeamStop.of(mended, glow.get().x(), glow.get().y())
                        : hidden;
            }
        }
        return pattern(withoutStopEdge(all, peaks, hidden), glow, hidden);
    }

    /** Peaks of the response, with its scatter taken a second time away from what the first search found. */
    private List<PeakSearch.Peak> peaks(double rounding, Mask spoilt) {
        PeakSearch search = new PeakSearch(response, sigma);
        List<PeakSearch.Peak> first = search.find(noise, minimum);
        Mask covered = around(first, COVERED * sigma).union(spoilt);
        if (covered.count() < MOSTLY * width * height) {
            Mask widely = around(first, FAR * sigma).union(spoilt);
            noise = ResponseNoise.of(flat, response, ResponseNoise.CELL, sigma, rounding, covered, widely)
                    .of(sigma);
        }
        List<PeakSearch.Peak> peaks = search.find(noise, minimum);
        if (peaks.size() * CROWD * sigma * sigma > width * (double) height) {
            peaks = withFaintNeighbours(peaks);
        }
        List<PixelPoint> overexposed = regions.stream()
                .flatMapToInt(region -> Arrays.stream(region.members()))
                .mapToObj(index -> new PixelPoint(index % width + 0.5, index / width + 0.5))
                .toList();
        Mask inRegion = Mask.around(width, height, overexposed, 2 * sigma + 1);
        return peaks.stream()
                .filter(peak -> !inRegion.contains((int) peak.x(), (int) peak.y()))
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
        float share = (float) (1 / PointFilter.alone());
        NearbyPoints near = new NearbyPoints(width, height, APART * sigma);
        strong.forEach(peak -> near.add(peak.x(), peak.y()));
        boolean[] matched = new boolean[strong.size()];
        List<PeakSearch.Peak> peaks = new ArrayList<>();
        for (PeakSearch.Peak peak : new PeakSearch(against, sigma).find(noise, minimum)) {
            int nearest = near.nearest(peak.x(), peak.y());
            if (nearest < 0) {
                peaks.add(peak);
            } else if (strong.get(nearest).distanceTo(peak.x(), peak.y()) < sigma) {
                matched[nearest] = true;
                peaks.add(peak.times(share));
            }
        }
        for (int i = 0; i < matched.length; i++) {
            if (!matched[i]) {
                peaks.add(strong.get(i));
            }
        }
        float[] values = against.values();
        wiped.members().forEach(i -> values[i] *= share);
        response = GrayImage.ofFloats(width, height, values);
        return peaks;
    }

    private Mask around(List<PeakSearch.Peak> peaks, double reach) {
        List<PixelPoint> places =
                peaks.stream().map(peak -> new PixelPoint(peak.x(), peak.y())).toList();
        return Mask.around(width, height, places, reach);
    }

    private MeasuredSpot spot(PeakSearch.Peak peak, PositionError errors) {
        boolean full = false;
        int reach = (int) Math.ceil(sigma);
        for (int row = (int) peak.y() - reach; row <= peak.y() + reach; row++) {
            for (int column = (int) peak.x() - reach; column <= peak.x() + reach; column++) {
                full |= saturated.contains(column, row);
            }
        }
        double error = errors.of(peak, full, width, height);
        double intensity = peak.height() / PointFilter.ofSigma(sigma).responsePerSum();
        return new MeasuredSpot(
                new PixelPoint(peak.x() * binning, peak.y() * binning),
                error * binning,
                intensity * binning * binning,
                peak.signalToNoise(),
                full);
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

    private Optional<GlowCentre> glow(Background coarse, int cell, Mask hidden) {
        if (Math.min(width, height) < 4 * cell) {
            return Optional.empty();
        }
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

    /** Drops spots half behind the stop, and weak or lopsided ones next to it, where its edge makes such maxima. */
    private List<MeasuredSpot> withoutStopEdge(List<MeasuredSpot> all, List<PeakSearch.Peak> peaks, Mask hidden) {
        if (hidden.count() == 0) {
            return all;
        }
        Mask near = hidden.dilated((int) Math.ceil(3.5 * sigma));
        Mask half = hidden.dilated((int) Math.ceil(sigma));
        List<MeasuredSpot> kept = new ArrayList<>(all.subList(0, regions.size()));
        for (int i = 0; i < peaks.size(); i++) {
            PeakSearch.Peak peak = peaks.get(i);
            boolean doubtful = peak.roundness() < 0.7 && peak.signalToNoise() < 30;
            Mask barred = doubtful ? near : half;
            if (!barred.contains((int) peak.x(), (int) peak.y())) {
                MeasuredSpot spot = all.get(regions.size() + i);
                boolean shaded = near.contains((int) peak.x(), (int) peak.y());
                kept.add(shaded ? lessCertain(spot) : spot);
            }
        }
        return kept;
    }

    /** A spot whose flank the stop may shade. */
    private MeasuredSpot lessCertain(MeasuredSpot spot) {
        double error = Math.hypot(spot.positionError(), SHADED * sigma * binning);
        return new MeasuredSpot(spot.position(), error, spot.intensity(), spot.signalToNoise(), spot.saturated());
    }

    private MeasuredPattern pattern(List<MeasuredSpot> all, Optional<GlowCentre> glow, Mask hidden) {
        Optional<GlowCentre> scaled =
                glow.map(g -> new GlowCentre(g.x() * binning, g.y() * binning, g.error() * binning, g.floor()));
        double reach = sigma * binning;
        List<CentreCandidate> centres = new CentreSearch(all, scaled, reach).candidates();
        Optional<MeasuredSpot> beam = Optional.empty();
        List<MeasuredSpot> spots = new ArrayList<>(all);
        if (!centres.isEmpty()) {
            PatternCentre centre = centres.get(0).centre();
            if (centre.source() == PatternCentre.Source.DIRECT_BEAM) {
                beam = all.stream()
                        .filter(spot -> spot.position().distanceTo(centre.position())
                                <= Math.max(2 * reach, 4 * spot.positionError()))
                        .max(Comparator.comparingDouble(MeasuredSpot::intensity));
            }
            spots.removeIf(spot -> spot.position().distanceTo(centre.position()) < NEAR_CENTRE * reach);
            beam.ifPresent(spots::remove);
        }
        spots.sort(Comparator.comparingDouble(MeasuredSpot::intensity).reversed());
        MeasuredPattern.Fields fields =
                new MeasuredPattern.Fields(binning, sigma, response, noise, background.level(), hidden);
        return new MeasuredPattern(image.width(), image.height(), spots, beam, centres, fields);
    }
}
