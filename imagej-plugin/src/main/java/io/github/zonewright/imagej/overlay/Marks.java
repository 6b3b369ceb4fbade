package io.github.zonewright.imagej.overlay;

import ij.gui.Line;
import ij.gui.OvalRoi;
import ij.gui.PolygonRoi;
import ij.gui.Roi;
import io.github.zonewright.geometry.Vector2;
import io.github.zonewright.geometry.Vector3;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.pattern.PlacedSpot;
import io.github.zonewright.pattern.Placement;
import io.github.zonewright.spots.MeasuredSpot;
import java.util.ArrayList;
import java.util.HashSet;
import java.util.List;
import java.util.Set;

/**
 * Turns a view into ROIs. Area ROIs count as the library does, from pixel corners; ImageJ's lines count from pixel
 * centres, so they are moved by half a pixel.
 */
final class Marks {
    private final MarkSize size;
    private final List<Roi> halos = new ArrayList<>();
    private final List<Roi> lines = new ArrayList<>();
    private final List<Roi> texts = new ArrayList<>();

    private Marks(MarkSize size) {
        this.size = size;
    }

    /** The ROIs of a view on an image of this size and zoom, in the order in which they are to be drawn. */
    static List<Roi> of(PatternView view, int width, int height, double zoom) {
        Marks marks = new Marks(MarkSize.of(view, width, height, zoom));
        marks.draw(view, width, height);
        List<Roi> all = new ArrayList<>(marks.halos);
        all.addAll(marks.lines);
        all.addAll(marks.texts);
        return all;
    }

    private void draw(PatternView view, int width, int height) {
        Set<Hkl> missing = new HashSet<>();
        for (PlacedSpot spot : view.missing()) {
            missing.add(spot.spot().hkl());
            add(
                    triangle(spot.position(), size.of(spot)),
                    MarkStyle.MISSING,
                    IndexLabel.of(spot.spot().hkl()));
        }
        for (PlacedSpot spot : view.computed()) {
            if (!missing.contains(spot.spot().hkl())) {
                add(
                        ring(spot.position(), size.of(spot)),
                        MarkStyle.COMPUTED,
                        IndexLabel.of(spot.spot().hkl()));
            }
        }
        for (MeasuredSpot spot : view.unexplained()) {
            add(diamond(spot.position(), size.measured()), MarkStyle.UNEXPLAINED, "measured spot");
        }
        view.placement().ifPresent(this::centre);
        if (view.labelled()) {
            texts.addAll(SpotLabels.of(view, size, width, height));
        }
    }

    private void centre(Placement placement) {
        PixelPoint centre = placement.camera().centre();
        add(cross(centre, size.centre()), MarkStyle.CENTRE, "centre");
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
            add(line(between(centre, end, from), between(centre, end, to)), MarkStyle.ROTATION, "rotation");
        }
    }

    private void add(Roi roi, MarkStyle style, String name) {
        Roi halo = (Roi) roi.clone();
        stroke(halo, style, name + " halo", MarkStyle.HALO, MarkStyle.HALO_LINE);
        stroke(roi, style, name, style.colour(), MarkStyle.LINE);
        halos.add(halo);
        lines.add(roi);
    }

    static void stroke(Roi roi, MarkStyle style, String name, java.awt.Color colour, double width) {
        roi.setName(name);
        roi.setProperty(PatternOverlay.PROPERTY, style.key());
        roi.setStrokeColor(colour);
        roi.setUnscalableStrokeWidth(width);
    }

    private static Roi ring(PixelPoint p, double diameter) {
        return new OvalRoi(p.x() - diameter / 2, p.y() - diameter / 2, diameter, diameter);
    }

    private static Roi diamond(PixelPoint p, double diameter) {
        double r = diameter * 0.62;
        return polygon(p, new double[] {0, r, 0, -r}, new double[] {-r, 0, r, 0});
    }

    private static Roi triangle(PixelPoint p, double diameter) {
        double r = diameter * 0.72;
        return polygon(p, new double[] {0, 0.87 * r, -0.87 * r}, new double[] {-r, 0.5 * r, 0.5 * r});
    }

    private static Roi cross(PixelPoint p, double diameter) {
        double r = diameter / 2;
        double h = diameter / 8;
        double[] x = {-h, h, h, r, r, h, h, -h, -h, -r, -r, -h};
        double[] y = {-r, -r, -h, -h, h, h, r, r, h, h, -h, -h};
        return polygon(p, x, y);
    }

    private static Roi polygon(PixelPoint p, double[] x, double[] y) {
        float[] px = new float[x.length];
        float[] py = new float[x.length];
        for (int i = 0; i < x.length; i++) {
            px[i] = (float) (p.x() + x[i]);
            py[i] = (float) (p.y() + y[i]);
        }
        return new PolygonRoi(px, py, Roi.POLYGON);
    }

    private static Roi line(PixelPoint a, PixelPoint b) {
        return new Line(a.x() - 0.5, a.y() - 0.5, b.x() - 0.5, b.y() - 0.5);
    }

    private static PixelPoint between(PixelPoint a, PixelPoint b, double part) {
        return new PixelPoint(a.x() + part * (b.x() - a.x()), a.y() + part * (b.y() - a.y()));
    }
}
