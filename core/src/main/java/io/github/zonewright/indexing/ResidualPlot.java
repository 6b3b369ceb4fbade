package io.github.zonewright.indexing;

import io.github.zonewright.geometry.Vector2;
import io.github.zonewright.image.PixelPoint;
import java.util.List;
import java.util.Optional;

/**
 * Measured minus computed at each explained spot, as arrows on the image: enlarged by one round factor for all, so that the
 * longest is no longer than the way to the nearest spot. What is left in a fit shows in it: a common direction is a wrong centre,
 * arrows along the radius a wrong scale, a whirl a wrong rotation.
 *
 * @param arrows an arrow for each explained spot, in px
 * @param factor by how much the arrows are longer than what they stand for, 1, 2 or 5 times a power of ten from 1 to 1000
 * @param bar a round length in px of what is measured, which goes with the longest arrow
 * @param barLength how long the bar is drawn, in px
 */
public record ResidualPlot(List<Arrow> arrows, double factor, double bar, double barLength) {
    private static final double LARGEST_FACTOR = 1000;

    /** Taken for the distance of spots where there is one alone, in px. */
    private static final double LONE = 50;

    /**
     * An arrow.
     *
     * @param from where the spot is computed to be, in px
     * @param to where the arrow ends, in px: beyond the measured place by the factor
     */
    public record Arrow(PixelPoint from, PixelPoint to) {}

    /** Copies the list. */
    public ResidualPlot {
        arrows = List.copyOf(arrows);
    }

    /**
     * The plot of a solution.
     *
     * @param matches the spots that it explains
     * @return the plot; empty without spots
     */
    public static Optional<ResidualPlot> of(List<SpotMatch> matches) {
        if (matches.isEmpty()) {
            return Optional.empty();
        }
        double reach = spacing(matches);
        double longest = matches.stream().mapToDouble(SpotMatch::residual).max().orElseThrow();
        double factor = longest * LARGEST_FACTOR > reach ? Math.max(1, round(reach / longest)) : LARGEST_FACTOR;
        double bar = round(reach / factor);
        List<Arrow> arrows = matches.stream()
                .map(match -> new Arrow(match.computed(), enlarged(match, factor)))
                .toList();
        return Optional.of(new ResidualPlot(arrows, factor, bar, bar * factor));
    }

    /**
     * The same on an image stretched about its corner; factor and bar go on to speak of the px of the image.
     *
     * @param stretch by how much
     * @return the plot
     */
    public ResidualPlot scaled(double stretch) {
        List<Arrow> all = arrows.stream()
                .map(a -> new Arrow(scaled(a.from(), stretch), scaled(a.to(), stretch)))
                .toList();
        return new ResidualPlot(all, factor, bar, stretch * barLength);
    }

    private static PixelPoint scaled(PixelPoint p, double stretch) {
        return new PixelPoint(stretch * p.x(), stretch * p.y());
    }

    private static PixelPoint enlarged(SpotMatch match, double factor) {
        Vector2 residual = match.measured().position().minus(match.computed());
        return match.computed().plus(residual.times(factor));
    }

    /** The least distance of two computed spots. */
    private static double spacing(List<SpotMatch> matches) {
        double least = Double.POSITIVE_INFINITY;
        for (int i = 0; i < matches.size(); i++) {
            for (int j = 0; j < i; j++) {
                double distance =
                        matches.get(i).computed().distanceTo(matches.get(j).computed());
                least = distance > 0 ? Math.min(least, distance) : least;
            }
        }
        return Double.isInfinite(least) ? LONE : least;
    }

    /** The largest of 1, 2, 5 times a power of ten that is not above a number. */
    private static double round(double most) {
        double power = Math.pow(10, Math.floor(Math.log10(most)));
        double part = most / power;
        return (part >= 5 ? 5 : part >= 2 ? 2 : 1) * power;
    }
}
