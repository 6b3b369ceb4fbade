package io.github.zonewright.imagej.overlay;

import ij.ImagePlus;
import ij.gui.Overlay;
import ij.gui.Roi;
import ij.process.ColorProcessor;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.indexing.Solution;
import io.github.zonewright.indexing.SpotMatch;
import io.github.zonewright.pattern.PlacedSpot;
import io.github.zonewright.spots.MeasuredSpot;
import java.awt.Color;
import java.awt.image.BufferedImage;
import java.util.List;
import java.util.stream.Stream;

/**
 * A solution as a small picture on dark ground: its computed pattern as bright discs, the stronger the larger, on faint ones
 * where spots were measured, and diamonds about those that it leaves unexplained. As far about the centre as was measured, so
 * that the solutions of one search are seen at one scale.
 */
public final class SolutionPicture {
    private static final Color GROUND = new Color(0x101010);
    private static final Color FAINT = new Color(0x6A6A6A);

    /** Drawn so many times larger and averaged, so that a disc of few px is round. */
    private static final int FINER = 4;

    private static final double BEYOND = 1.08;

    /** A measured spot's disc is so much larger than that of the strongest computed one: it shows as a rim. */
    private static final double RIM = 1.5;

    private static final double LARGEST_PART = 1 / 17.0;

    private final Overlay marks = new Overlay();
    private final int side;
    private final PixelPoint centre;
    private final double factor;

    private SolutionPicture(PixelPoint centre, double reach, int side) {
        this.side = side;
        this.centre = centre;
        this.factor = side / (2 * reach);
    }

    /**
     * Draws the picture.
     *
     * @param solution the solution
     * @param thickness foil thickness in Å, for the computed intensities
     * @param side side of the picture in px
     * @return the picture
     */
    public static BufferedImage of(Solution solution, double thickness, int side) {
        PixelPoint centre = solution.placement().camera().centre();
        double reach = BEYOND
                * measured(solution)
                        .mapToDouble(s -> s.position().distanceTo(centre))
                        .max()
                        .orElse(side);
        return new SolutionPicture(centre, reach, FINER * side).draw(solution, thickness);
    }

    private static Stream<MeasuredSpot> measured(Solution solution) {
        return Stream.concat(solution.matches().stream().map(SpotMatch::measured), solution.unexplained().stream());
    }

    private BufferedImage draw(Solution solution, double thickness) {
        double reach = side / (2 * factor);
        ViewMaker views = new ViewMaker((int) Math.ceil(centre.x() + reach), (int) Math.ceil(centre.y() + reach));
        List<PlacedSpot> spots = views.ofSolution(solution, thickness, false).computed();
        double nearest = spots.stream()
                .mapToDouble(s -> factor * s.position().distanceTo(centre))
                .min()
                .orElse(side);
        double strongest = spots.isEmpty() ? 1 : spots.get(0).spot().intensity();
        MarkSize size = new MarkSize(Math.min(LARGEST_PART * side, 0.6 * nearest), strongest, 0);
        measured(solution).forEach(s -> fill(MarkShapes.ring(place(s.position()), RIM * size.largest()), FAINT));
        spots.forEach(s -> fill(MarkShapes.ring(place(s.position()), size.of(s)), MarkStyle.DISC.colour()));
        fill(MarkShapes.cross(place(centre), 1.6 * size.largest()), MarkStyle.CENTRE.colour());
        for (MeasuredSpot spot : solution.unexplained()) {
            Roi diamond = MarkShapes.diamond(place(spot.position()), 2.2 * size.largest());
            diamond.setStrokeColor(MarkStyle.UNEXPLAINED.colour());
            diamond.setStrokeWidth(FINER);
            marks.add(diamond);
        }
        ColorProcessor ground = new ColorProcessor(side, side);
        ground.setColor(GROUND);
        ground.fill();
        ImagePlus picture = new ImagePlus("", ground);
        picture.setOverlay(marks);
        return picture.flatten()
                .getProcessor()
                .resize(side / FINER, side / FINER, true)
                .getBufferedImage();
    }

    private PixelPoint place(PixelPoint p) {
        return new PixelPoint(side / 2.0 + factor * (p.x() - centre.x()), side / 2.0 + factor * (p.y() - centre.y()));
    }

    private void fill(Roi roi, Color colour) {
        roi.setFillColor(colour);
        marks.add(roi);
    }
}
