package io.github.zonewright.imagej.overlay;

import ij.gui.Roi;
import io.github.zonewright.geometry.Vector2;
import io.github.zonewright.geometry.Vector3;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.pattern.PlacedSpot;
import io.github.zonewright.pattern.Placement;
import io.github.zonewright.spots.MeasuredSpot;
import java.awt.Color;
import java.awt.Rectangle;
import java.util.ArrayList;
import java.util.HashSet;
import java.util.List;
import java.util.Set;

/** Turns a view into ROIs. */
final class Marks {
    private static final Color GROUND = new Color(0x101010);

    private final MarkSize size;
    private final MarkSheet sheet = new MarkSheet();
    private double edge = Double.POSITIVE_INFINITY;

    private Marks(MarkSize size) {
        this.size = size;
    }

    /** The ROIs of a view on an image of this size and zoom that is seen as a whole. */
    static List<Roi> of(PatternView view, int width, int height, double zoom) {
        return of(view, width, height, zoom, new Rectangle(width, height));
    }

    /**
     * The ROIs of a view on an image of this size and zoom, in the order in which they are to be drawn; scale bar and legend at
     * the corners of the part that is seen.
     */
    static List<Roi> of(PatternView view, int width, int height, double zoom, Rectangle seen) {
        Marks marks = new Marks(MarkSize.of(view, width, height, zoom));
        if (view.extras().has(ShownMarks.SPLIT)) {
            view.placement().ifPresent(p -> marks.half(view, p, width, height));
        }
        marks.drawComputed(view, marks.drawMissing(view));
        marks.drawLeft(view);
        if (view.labelled() && view.placement().isPresent()) {
            SpotLabels.place(marks.sheet, view, marks.size, width, height);
        }
        marks.drawBeside(view, width, height, zoom, seen);
        List<Roi> all = new ArrayList<>(marks.sheet.all());
        if (view.extras().has(ShownMarks.LEGEND) && view.placement().isPresent()) {
            all.addAll(Legend.of(view, MarkSize.letters(Math.max(width, height), zoom), seen));
        }
        return all;
    }

    /** The marks of a view, in the same order, without its computed spots, their indices and the legend. */
    static List<Roi> besideSpots(PatternView view, int width, int height, double zoom, Rectangle seen) {
        Marks marks = new Marks(MarkSize.of(view, width, height, zoom));
        marks.drawMissing(view);
        marks.drawLeft(view);
        marks.drawBeside(view, width, height, zoom, seen);
        return marks.sheet.all();
    }

    /** The computed pattern in place of the image, right of its centre. */
    private void half(PatternView view, Placement placement, int width, int height) {
        edge = Math.min(width, Math.max(0, placement.camera().centre().x()));
        sheet.fill(new Roi(edge, 0, width - edge, height), MarkStyle.DISC, "computed half", GROUND);
        for (PlacedSpot spot : view.computed()) {
            if (spot.position().x() >= edge) {
                Roi disc = MarkShapes.ring(spot.position(), size.of(spot));
                sheet.fill(disc, MarkStyle.DISC, IndexLabel.of(spot.spot().hkl()), MarkStyle.DISC.colour());
            }
        }
    }

    private boolean isBare(PixelPoint place) {
        return place.x() < edge;
    }

    private void drawBeside(PatternView view, int width, int height, double zoom, Rectangle seen) {
        ExtraMarks.draw(sheet, view, Math.max(width, height), zoom, seen, edge);
        view.measured().ifPresent(m -> MeasuredMarks.draw(sheet, m, width, height, zoom));
        view.further().forEach(mark -> mark.draw(sheet, size));
        RulerMarks.draw(sheet, view.ruler(), Math.max(width, height), zoom);
    }

    /** Draws the missing spots and says which they are. */
    private Set<Hkl> drawMissing(PatternView view) {
        Set<Hkl> missing = new HashSet<>();
        for (PlacedSpot spot : view.missing()) {
            missing.add(spot.spot().hkl());
            if (isBare(spot.position())) {
                sheet.add(
                        MarkShapes.triangle(spot.position(), size.of(spot)),
                        MarkStyle.MISSING,
                        IndexLabel.of(spot.spot().hkl()));
            }
        }
        return missing;
    }

    private void drawComputed(PatternView view, Set<Hkl> missing) {
        for (PlacedSpot spot : view.computed()) {
            if (!missing.contains(spot.spot().hkl()) && isBare(spot.position())) {
                computed(spot, isUpper(view, spot));
            }
        }
    }

    private void drawLeft(PatternView view) {
        for (MeasuredSpot spot : view.unexplained()) {
            if (isBare(spot.position())) {
                sheet.add(MarkShapes.diamond(spot.position(), size.measured()), MarkStyle.UNEXPLAINED, "measured spot");
            }
        }
        view.placement().ifPresent(this::centre);
    }

    /** Whether a computed spot belongs to an upper layer of the zone. */
    static boolean isUpper(PatternView view, PlacedSpot spot) {
        return view.placement()
                .filter(p -> spot.spot().hkl().dot(p.setting().zone()) != 0)
                .isPresent();
    }

    private void computed(PlacedSpot spot, boolean upper) {
        String name = IndexLabel.of(spot.spot().hkl());
        double diameter = size.of(spot);
        if (upper) {
            sheet.add(MarkShapes.star(spot.position(), diameter), MarkStyle.UPPER, name);
        } else {
            sheet.add(MarkShapes.ring(spot.position(), diameter), MarkStyle.COMPUTED, name);
        }
    }

    private void centre(Placement placement) {
        PixelPoint centre = placement.camera().centre();
        sheet.add(MarkShapes.cross(centre, size.centre()), MarkStyle.CENTRE, "centre");
        Hkl reference = placement.setting().reference();
        Vector3 g = placement.orientation().scatteringVector(placement.crystal().lattice(), reference);
        Vector2 across = new Vector2(g.x(), g.y());
        double wavelength = placement.beam().wavelength();
        if (wavelength * across.norm() >= 1) {
            return;
        }
        PixelPoint end = placement.camera().toPixel(across, wavelength);
        double length = centre.distanceTo(end);
        double from = size.centre() * 0.8 / length;
        double to = 1 - size.largest() * 0.6 / length;
        if (to > from) {
            sheet.add(
                    MarkShapes.line(MarkShapes.between(centre, end, from), MarkShapes.between(centre, end, to)),
                    MarkStyle.ROTATION,
                    "rotation");
        }
    }

    static void stroke(Roi roi, MarkStyle style, String name, Color colour, double width) {
        roi.setName(name);
        roi.setProperty(PatternOverlay.PROPERTY, style.key());
        roi.setStrokeColor(colour);
        roi.setUnscalableStrokeWidth(width);
    }
}
