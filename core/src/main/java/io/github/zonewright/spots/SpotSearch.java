package io.github.zonewright.spots;

import io.github.zonewright.image.Background;
import io.github.zonewright.image.GrayImage;
import io.github.zonewright.image.LevelMap;
import io.github.zonewright.image.Mask;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.image.PixelRepair;
import io.github.zonewright.image.PointFilter;
import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;

/** One run of {@link SpotFinder} over one image. */
final class SpotSearch {

    private static final int TRIAL_CELL = 24;
    /** A saturated region larger than this many squared spot widths is taken out and measured by its outline. */
    private static final double LARGE = 20;
    /** Scatter that rounding to whole numbers leaves: 1/√12. */
    private static final double ROUNDING = 0.29;
    /** No nearer to the direct beam than this many spot widths is a spot believed. */
    private static final double NEAR_CENTRE = 3;

    private final GrayImage image;
    private final int binning;
    private final GrayImage mended;
    private final Mask faulty;
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
        this.faulty = repaired.faulty();
        this.saturated = saturated;
        this.minimum = minimum;
        this.width = mended.width();
        this.height = mended.height();
    }

    MeasuredPattern run(OptionalDouble givenSigma) {
        Mask none = Mask.none(width, height);
        background = Background.of(mended, TRIAL_CELL, none);
        flat = background.level().subtractedFrom(mended);
        sigma = givenSigma.orElseGet(() -> SpotWidth.of(flat, saturated));
        int cell = (int) Math.max(12, Math.round(8 * sigma));
        background = Background.of(mended, cell, none);
        flat = background.level().subtractedFrom(mended);
        regions = SaturatedRegion.of(saturated, 6).stream()
                .filter(region -> region.area() > LARGE * sigma * sigma
                        || region.isBloomed() && region.halfLength() > 3 * sigma + 2)
                .toList();
        response = PointFilter.ofSigma(sigma).apply(flat);
        List<PeakSearch.Peak> peaks = peaks(none);
        PositionError errors = new PositionError(background.level(), noise, sigma);
        List<MeasuredSpot> all = new ArrayList<>();
        for (SaturatedRegion region : regions) {
            all.add(spot(region));
        }
        for (PeakSearch.Peak peak : peaks) {
            all.add(spot(peak, errors));
        }
        Optional<GlowCentre> glow = glow(none);
        Mask hidden = none;
        if (glow.isPresent()) {
            hidden = BeamStop.of(mended, glow.get().x(), glow.get().y());
            if (hidden.count() > 0) {
                glow = glow(hidden);
                hidden = glow.isPresent()
                        ? BeamStop.of(mended, glow.get().x(), glow.get().y())
                        : hidden;
            }
        }
        return pattern(withoutStopEdge(all, peaks, hidden), glow, hidden);
    }

    /** Peaks of the response, with its scatter taken a second time away from what the first search found. */
    private List<PeakSearch.Peak> peaks(Mask none) {
        int cell = (int) Math.max(16, Math.round(6 * sigma));
        PeakSearch search = new PeakSearch(response, sigma);
        noise = floored(Background.of(response, cell, none).noise());
        List<PeakSearch.Peak> first = search.find(noise, minimum);
        boolean[] covered = new boolean[width * height];
        for (PeakSearch.Peak peak : first) {
            cover(covered, peak.x(), peak.y(), 4 * sigma + 1);
        }
        noise = floored(Background.of(response, cell, Mask.of(width, height, i -> covered[i]))
                .noise());
        boolean[] inRegion = new boolean[width * height];
        for (SaturatedRegion region : regions) {
            for (int index : region.members()) {
                cover(inRegion, index % width + 0.5, index / width + 0.5, 2 * sigma + 1);
            }
        }
        return search.find(noise, minimum).stream()
                .filter(peak -> !inRegion[pixel(peak.x(), peak.y())])
                .toList();
    }

    private LevelMap floored(LevelMap scatter) {
        double step = image.isInteger()
                ? ROUNDING / binning * PointFilter.ofSigma(sigma).noiseGain()
                : 0;
        return scatter.atLeast(Math.max(step, Float.MIN_NORMAL));
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
        double scatter =
                noise.at(region.x(), region.y()) / PointFilter.ofSigma(sigma).responsePerSum();
        return new MeasuredSpot(
                new PixelPoint(region.x() * binning, region.y() * binning),
                error * binning,
                Math.max(sum, scatter) * binning * binning,
                Math.max(sum / scatter, 1),
                true);
    }

    private Optional<GlowCentre> glow(Mask hidden) {
        int cell = Math.max(6, Math.max(width, height) / 40);
        if (Math.min(width, height) < 4 * cell) {
            return Optional.empty();
        }
        Background coarse = Background.unsmoothed(mended, cell, hidden);
        double scatter = coarse.noise().level(0, 0) / cell;
        return GlowCentre.of(coarse.level(), scatter, (column, row) -> {
            int covered = 0;
            for (int k = 0; k < 9; k++) {
                int x = column * cell + cell * (k % 3) / 2;
                int y = row * cell + cell * (k / 3) / 2;
                covered += hidden.contains(x, y) ? 1 : 0;
            }
            return covered > 0;
        });
    }

    /** Drops weak or lopsided maxima next to the stop, where its edge makes them. */
    private List<MeasuredSpot> withoutStopEdge(List<MeasuredSpot> all, List<PeakSearch.Peak> peaks, Mask hidden) {
        if (hidden.count() == 0) {
            return all;
        }
        Mask near = hidden.dilated((int) Math.ceil(3.5 * sigma));
        List<MeasuredSpot> kept = new ArrayList<>(all.subList(0, regions.size()));
        for (int i = 0; i < peaks.size(); i++) {
            PeakSearch.Peak peak = peaks.get(i);
            boolean doubtful = peak.roundness() < 0.7 && peak.signalToNoise() < 30;
            if (!(doubtful && near.contains((int) peak.x(), (int) peak.y()))) {
                kept.add(all.get(regions.size() + i));
            }
        }
        return kept;
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
