package io.github.zonewright.imagej.overlay;

import ij.gui.Roi;
import io.github.zonewright.geometry.Vector2;
import io.github.zonewright.geometry.Vector3;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.imagej.bridge.MaskSelection;
import io.github.zonewright.indexing.ResidualPlot;
import io.github.zonewright.indexing.Solution;
import io.github.zonewright.indexing.SpotMatch;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.pattern.PlacedSpot;
import io.github.zonewright.pattern.Placement;
import io.github.zonewright.pattern.PredictedSpot;
import io.github.zonewright.spots.MeasuredPattern;
import io.github.zonewright.spots.MeasuredSpot;
import io.github.zonewright.spots.SpotNet;
import java.util.ArrayList;
import java.util.HashSet;
import java.util.List;
import java.util.Optional;
import java.util.Set;

/** Makes views of one image; keeps what need not be computed again between two of them. */
public final class ViewMaker {
    /** A hand-laid computed spot covers a measured one nearer than this part of the nearest spot's distance. */
    private static final double COVERED_PART = 0.12;

    private static final int FEWEST_FOR_MISSING = 4;

    /** Spots of a further crystal weaker than this part of its strongest are not marked. */
    private static final double FAINTEST_FURTHER = 1e-3;

    private static final int MOST_FURTHER = 150;

    private final int width;
    private final int height;
    private final ComputedSpots computed = new ComputedSpots();
    private final ComputedSpots further = new ComputedSpots();
    private final ForbiddenSpots forbidden = new ForbiddenSpots();
    private MeasuredPattern outlined;
    private Optional<Roi> outline = Optional.empty();

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
     * What was measured, alone.
     *
     * @param measured spots and centre, once they are measured
     * @param net their net, row or neither
     * @return the view
     */
    public PatternView ofMeasured(Optional<MeasuredPattern> measured, Optional<SpotNet> net) {
        return PatternView.ofMeasured(measured.flatMap(m -> net.map(n -> new MeasuredView(m, n, hidden(m)))));
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
        return ofSpots(placement, computed.on(placement, width, height, thickness), measured, labelled);
    }

    /**
     * A pattern moved by hand away from a fit. Spots that the fit explains stay shown, as the faintest where the intensities
     * leave them out, so that none goes at the first touch.
     *
     * @param placement the pattern, of the fit's crystal
     * @param fit where it was moved from
     * @param measured what was measured, if it was
     * @param thickness foil thickness in Å
     * @param labelled whether spots carry their indices
     * @return the view; it makes no claim about missing spots
     */
    public PatternView ofMoved(
            Placement placement, Solution fit, Optional<MeasuredPattern> measured, double thickness, boolean labelled) {
        double wavelength = placement.beam().wavelength();
        List<SpotMatch> moved = new ArrayList<>();
        for (SpotMatch match : fit.matches()) {
            Vector3 g =
                    placement.orientation().scatteringVector(placement.crystal().lattice(), match.hkl());
            Vector2 across = new Vector2(g.x(), g.y());
            if (wavelength * across.norm() < 1) {
                PixelPoint at = placement.camera().toPixel(across, wavelength);
                moved.add(new SpotMatch(match.measured(), match.hkl(), at));
            }
        }
        moved.removeIf(m -> !isInside(m.computed()));
        List<PlacedSpot> spots = withExplained(computed.on(placement, width, height, thickness), placement, moved);
        return ofSpots(placement, spots, measured, labelled);
    }

    private PatternView ofSpots(
            Placement placement, List<PlacedSpot> spots, Optional<MeasuredPattern> measured, boolean labelled) {
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
        List<PlacedSpot> spots = withExplained(
                computed.on(solution.placement(), width, height, thickness), solution.placement(), solution.matches());
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

    /**
     * A solution of which its own spots are all that is known, as a record keeps them.
     *
     * @param solution the solution
     * @param thickness foil thickness in Å
     * @param labelled whether spots carry their indices
     * @return the view; it makes no claim about missing spots
     */
    public PatternView ofSolution(Solution solution, double thickness, boolean labelled) {
        List<PlacedSpot> spots = withExplained(
                computed.on(solution.placement(), width, height, thickness), solution.placement(), solution.matches());
        return new PatternView(Optional.of(solution.placement()), spots, solution.unexplained(), List.of(), labelled);
    }

    /**
     * The computed spots of a further crystal.
     *
     * @param placement how it lies
     * @param number which it is, from 0
     * @param thickness foil thickness in Å
     * @return their marks
     */
    public List<ExtraMark> ofFurther(Placement placement, int number, double thickness) {
        List<PlacedSpot> spots = further.on(placement, width, height, thickness);
        double strongest = spots.isEmpty() ? 1 : spots.get(0).spot().intensity();
        return spots.stream()
                .filter(s -> s.spot().intensity() > FAINTEST_FURTHER * strongest)
                .limit(MOST_FURTHER)
                .map(s -> ExtraMark.further(s, strongest, number))
                .toList();
    }

    /**
     * Whether a place is on the image.
     *
     * @param p the place
     * @return true if so
     */
    public boolean isInside(PixelPoint p) {
        return p.x() >= 0 && p.y() >= 0 && p.x() < width && p.y() < height;
    }

    /**
     * With what a person wants to see about a pattern.
     *
     * @param view the view
     * @param shown the marks
     * @param nanometres whether the scale bar is in 1/nm; in 1/Å else
     * @param explained the spots that the pattern explains, as it was fitted; none for a pattern laid by hand
     * @return the view; unchanged where there is no pattern
     */
    public PatternView withShown(
            PatternView view, Set<ShownMarks> shown, boolean nanometres, List<SpotMatch> explained) {
        if (view.placement().isEmpty() || shown.isEmpty()) {
            return view;
        }
        List<PixelPoint> doubled = shown.contains(ShownMarks.DOUBLED)
                ? forbidden.on(view.placement().get(), width, height)
                : List.of();
        Optional<ResidualPlot> residuals =
                shown.contains(ShownMarks.RESIDUALS) ? ResidualPlot.of(explained) : Optional.empty();
        return view.withExtras(new PatternExtras(shown, nanometres, doubled, residuals));
    }

    private synchronized Optional<Roi> hidden(MeasuredPattern measured) {
        if (outlined != measured) {
            outline = MaskSelection.of(measured.hidden());
            outlined = measured;
        }
        return outline;
    }

    /** Adds, as the faintest, explained spots that the intensity model would have left out. */
    private static List<PlacedSpot> withExplained(
            List<PlacedSpot> spots, Placement placement, List<SpotMatch> matches) {
        Set<Hkl> there = new HashSet<>();
        spots.forEach(s -> there.add(s.spot().hkl()));
        double faintest =
                spots.isEmpty() ? 1 : spots.get(spots.size() - 1).spot().intensity();
        List<PlacedSpot> all = new ArrayList<>(spots);
        double wavelength = placement.beam().wavelength();
        for (SpotMatch match : matches) {
            if (there.add(match.hkl())) {
                Vector2 g = placement.camera().toReciprocal(match.computed(), wavelength);
                double s = placement
                                .orientation()
                                .scatteringVector(placement.crystal().lattice(), match.hkl())
                                .z()
                        - sphereHeight(g.norm(), wavelength);
                all.add(new PlacedSpot(new PredictedSpot(match.hkl(), g, s, 0, faintest), match.computed()));
            }
        }
        return all;
    }

    /** How far the Ewald sphere lies above the zero layer at this |g|, both in 1/Å. */
    private static double sphereHeight(double g, double wavelength) {
        double k = 1 / wavelength;
        return k - Math.sqrt(Math.max(0, k * k - g * g));
    }
}
