package io.github.zonewright.spots;

import io.github.zonewright.image.Background;
import io.github.zonewright.image.Continuation;
import io.github.zonewright.image.GrayImage;
import io.github.zonewright.image.LevelMap;
import io.github.zonewright.image.Mask;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.image.PixelRepair;
import io.github.zonewright.image.PointFilter;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.BitSet;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.function.Function;
import java.util.stream.IntStream;

/** One run of {@link SpotFinder} over one image. */
final class SpotSearch {

    /** A saturated region larger than this many squared spot widths is taken out and measured by its outline. */
    private static final double LARGE = 20;
    /** And fewer pixels than this are none. */
    private static final int LEAST_AREA = 6;
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
    private LevelMap level;
    private GrayImage flat;
    private GrayImage response;
    private LevelMap noise;
    private List<SaturatedRegion> regions;
    private Mask streaks;

    SpotSearch(GrayImage image, int binning, PixelRepair repaired, Mask saturated, double minimum, boolean seekStop) {
        this.image = image;
        this.binning = binning;
        this.mended = repaired.image();
        this.flat = repaired.flat();
        this.faulty = repaired.faulty();
        this.saturated = withoutHotLines(saturated, faulty);
        this.minimum = minimum;
        this.seekStop = seekStop;
        this.width = mended.width();
        this.height = mended.height();
    }

    MeasuredPattern run(OptionalDouble givenSigma) {
        Mask none = Mask.none(width, height);
        Mask missing = Mask.missing(mended);
        SpotWidth.Response narrow = SpotWidth.Response.narrowest(flat);
        double rounding = image.isInteger() ? ROUNDING / binning : 0;
        Mask spoilt = saturated.dilated(1).union(missing);
        ResponseNoise scatter = ResponseNoise.of(
                        flat,
                        narrow.image(),
                        narrow.binning(),
                        ResponseNoise.ROUGH,
                        narrow.sigma(),
                        rounding,
                        spoilt,
                        spoilt)
                .smoothed();
        sigma = givenSigma.orElseGet(() -> SpotWidth.of(flat, saturated, narrow, scatter));
        int fine = (int) Math.max(16, Math.round(8 * sigma));
        level = Background.unsmoothed(mended, fine, none).level().smoothed();
        flat = continued(level.subtractedFrom(mended), missing);
        regions = SaturatedRegion.of(saturated, LEAST_AREA).stream()
                .filter(SaturatedRegion::isSolid)
                .filter(region -> region.area() > LARGE * sigma * sigma
                        || region.isBloomed() && region.halfLength() > 3 * sigma + 2)
                .toList();
        streaks = members(region -> region.streak(width));
        Mask overexposed = members(region -> Arrays.stream(region.members()));
        flat = continued(flat, overexposed);
        response = PointFilter.ofSigma(sigma).apply(flat);
        noise = scatter.of(sigma);
        List<PeakSearch.Peak> found = peaks(rounding, spoilt);
        PositionError errors = new PositionError(level, noise, sigma);
        List<PeakSearch.Peak> peaks =
                found.stream().filter(peak -> isBeyondChance(peak, errors)).toList();
        List<MeasuredSpot> all = new ArrayList<>();
        for (SaturatedRegion region : regions) {
            all.add(spot(region));
        }
        int cell = Math.max(6, Math.max(width, height) / 40);
        Background coarse = Background.unsmoothed(mended, cell, none);
        Optional<GlowCentre> glow = glow(coarse, cell, none);
        Mask hidden = none;
        if (seekStop && glow.isPresent()) {
            GrayImage cells = mended.binned(BeamStop.cell(width, height));
            hidden = BeamStop.of(mended, cells, glow.get().x(), glow.get().y());
            if (hidden.count() > 0) {
                glow = glow(coarse, cell, hidden);
                hidden = glow.isPresent()
                        ? BeamStop.of(mended, cells, glow.get().x(), glow.get().y())
                        : hidden;
            }
        }
        Mask shaded =
                hidden.dilated(BeamStop.cell(width, height) / 2).union(missing).union(streaks);
        hidden = hidden.union(missing);
        SpotGauge gauge = new SpotGauge(binning, sigma, response, noise, saturated, hidden, shaded, errors);
        LocalGround ground = new LocalGround(mended, shaded.union(saturated), sigma);
        Mask unseen = shaded.union(saturated).union(faulty).union(overexposed);
        List<PeakSearch.Peak> standing = ground.standing(withoutHiddenEdge(peaks, gauge), minimum);
        List<PeakSearch.Peak> drawnOut = withoutHiddenEdge(DrawnOut.of(gauge, peaks), gauge);
        all.addAll(new OverlapSearch(new SpotSamples.Source(flat, unseen, gauge), standing, drawnOut).spots());
        Optional<GlowCentre> scaled =
                glow.map(g -> new GlowCentre(g.x() * binning, g.y() * binning, g.error() * binning, g.floor()));
        return new MeasuredPattern(
                image.width(),
                image.height(),
                new SpotChoice(all, scaled, sigma * binning),
                new MeasuredPattern.Fields(gauge, level));
    }

    /** What is left of the background beside unseen pixels, continued into them lest their edges look like spots. */
    private GrayImage continued(GrayImage rest, Mask unseen) {
        return Continuation.of(rest, unseen, 2 * sigma);
    }

    /** Peaks of the response, with its scatter taken a second time away from what the first search found. */
    private List<PeakSearch.Peak> peaks(double rounding, Mask spoilt) {
        PeakSearch search = new PeakSearch(response, sigma);
        List<PeakSearch.Peak> first = search.find(noise, minimum);
        Mask covered = around(first, COVERED * sigma).union(spoilt);
        if (covered.count() < MOSTLY * width * height) {
            Mask widely = around(first, FAR * sigma).union(spoilt);
            noise = ResponseNoise.of(flat, response, 1, ResponseNoise.CELL, sigma, rounding, covered, widely)
                    .of(sigma);
        }
        List<PeakSearch.Peak> peaks = search.find(noise, minimum);
        if (peaks.size() * CROWD * sigma * sigma > width * (double) height) {
            peaks = withFaintNeighbours(peaks);
        }
        List<PixelPoint> overexposed = regions.stream()
                .flatMapToInt(region -> Arrays.stream(region.members()))
                .filter(index -> !streaks.contains(index % width, index / width))
                .mapToObj(index -> new PixelPoint(index % width + 0.5, index / width + 0.5))
                .toList();
        Mask inRegion = Mask.around(width, height, overexposed, 2 * sigma + 1).union(streaks);
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

    /** Without lines that always count to the limit, which are mended by now. */
    private static Mask withoutHotLines(Mask saturated, Mask faulty) {
        BitSet hot = new BitSet();
        int frameWidth = saturated.width();
        for (SaturatedRegion region : SaturatedRegion.of(saturated, LEAST_AREA)) {
            long mended = Arrays.stream(region.members())
                    .filter(index -> faulty.contains(index % frameWidth, index / frameWidth))
                    .count();
            if (2 * mended > region.area()) {
                Arrays.stream(region.members()).forEach(hot::set);
            }
        }
        return hot.isEmpty()
                ? saturated
                : Mask.of(
                        frameWidth,
                        saturated.height(),
                        index -> saturated.contains(index % frameWidth, index / frameWidth) && !hot.get(index));
    }

    /** Pixels of the saturated regions, with those beside them. */
    private Mask members(Function<SaturatedRegion, IntStream> part) {
        BitSet members = new BitSet();
        regions.forEach(region -> part.apply(region).forEach(members::set));
        return Mask.of(width, height, members).dilated(1);
    }

    private MeasuredSpot spot(SaturatedRegion region) {
        double sum = 0;
        for (int index : region.members()) {
            int column = index % width;
            int row = index / width;
            sum += mended.value(column, row) - level.at(column + 0.5, row + 0.5);
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

    /** Drops spots half behind what is hidden, and weak or lopsided ones next to it, where its edge makes such maxima. */
    private List<PeakSearch.Peak> withoutHiddenEdge(List<PeakSearch.Peak> peaks, SpotGauge gauge) {
        Mask hidden = gauge.hidden();
        if (peaks.isEmpty() || hidden.count() == 0) {
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
