package io.github.zonewright.imagej.overlay;

import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.indexing.Solution;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.pattern.PlacedSpot;
import io.github.zonewright.pattern.Placement;
import io.github.zonewright.spots.MeasuredPattern;
import io.github.zonewright.spots.MeasuredSpot;
import java.util.HashSet;
import java.util.List;
import java.util.Optional;
import java.util.Set;

/** Makes views of one image; keeps what need not be computed again between two of them. */
public final class ViewMaker {
    /** A hand-laid computed spot covers a measured one nearer than this part of the nearest spot's distance. */
    private static final double COVERED_PART = 0.12;

    private static final int FEWEST_FOR_MISSING = 4;

    private final int width;
    private final int height;
    private final ComputedSpots computed = new ComputedSpots();

    /**
     * For an image of this size.
     *
     * @param width in px
     * @param height in px
     */
    public ViewMaker(int width, int height) {
        this.width = width;
        this.height = height;
    }

    /**
     * Whether it was made for an image of this size.
     *
     * @param imageWidth in px
     * @param imageHeight in px
     * @return true if so
     */
    public boolean fits(int imageWidth, int imageHeight) {
        return imageWidth == width && imageHeight == height;
    }

    /**
     * A pattern laid over the image by hand. Measured spots that lie under a computed one are not marked.
     *
     * @param placement the pattern
     * @param measured what was measured, if it was
     * @param thickness foil thickness in Å
     * @param labelled whether spots carry their indices
     * @return the view; it makes no claim about missing spots
     */
    public PatternView ofPlacement(
            Placement placement, Optional<MeasuredPattern> measured, double thickness, boolean labelled) {
        List<PlacedSpot> spots = computed.on(placement, width, height, thickness);
        PixelPoint centre = placement.camera().centre();
        double nearest = spots.stream()
                .mapToDouble(s -> s.position().distanceTo(centre))
                .min()
                .orElse(0);
        double reach = Math.max(2, COVERED_PART * nearest);
        List<MeasuredSpot> left = measured.map(MeasuredPattern::spots).orElse(List.of()).stream()
                .filter(m -> spots.stream().noneMatch(s -> s.position().distanceTo(m.position()) < reach))
                .toList();
        return new PatternView(Optional.of(placement), spots, left, List.of(), labelled);
    }

    /**
     * A solution as it was fitted.
     *
     * @param solution the solution
     * @param measured the spots it was fitted to
     * @param thickness foil thickness in Å
     * @param labelled whether spots carry their indices
     * @return the view; missing are spots that no stop hides, not measured, and computed to be stronger than the median
     *     of the explained ones
     */
    public PatternView ofSolution(Solution solution, MeasuredPattern measured, double thickness, boolean labelled) {
        List<PlacedSpot> spots = computed.on(solution.placement(), width, height, thickness);
        Set<Hkl> explained = new HashSet<>();
        solution.matches().forEach(match -> explained.add(match.hkl()));
        double[] seen = spots.stream()
                .filter(s -> explained.contains(s.spot().hkl()))
                .mapToDouble(s -> s.spot().intensity())
                .sorted()
                .toArray();
        double strong = seen.length < FEWEST_FOR_MISSING ? Double.POSITIVE_INFINITY : seen[seen.length / 2];
        List<PlacedSpot> missing = spots.stream()
                .filter(s -> s.spot().intensity() > strong)
                .filter(s -> !explained.contains(s.spot().hkl()) && !measured.isHidden(s.position()))
                .toList();
        return new PatternView(Optional.of(solution.placement()), spots, solution.unexplained(), missing, labelled);
    }
}
