package io.github.zonewright.imagej.overlay;

import ij.gui.Roi;
import io.github.zonewright.geometry.Vector2;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.spots.MeasuredSpot;
import io.github.zonewright.spots.PatternCentre;
import io.github.zonewright.spots.SpotNet;
import java.util.HashSet;
import java.util.List;
import java.util.Set;

/**
 * Marks of what was measured: squares about spots, larger for more intensity, diamonds about those off the net, a cross at
 * the centre with a ring as large as its error where that can be seen, arrows along the net's vectors, and the outline of
 * the hidden area.
 */
final class MeasuredMarks {
    private static final double DECADES = 3;
    private static final double SMALLEST_PART = 0.45;

    /** A square leaves so many widths of the spot free, so that the spot itself can be seen. */
    private static final double WIDTHS = 4.5;

    private static final double LARGEST_WIDTHS = 9;
    private static final double LEAST_ON_SCREEN = 12;
    /** A spot by hand has a second square about the first. */
    private static final double BY_HAND = 1.4;

    private static final double LETTERS = 2.2;

    private final MarkSheet sheet;
    private final MeasuredView view;
    private final double zoom;
    private final double largest;

    private MeasuredMarks(MarkSheet sheet, MeasuredView view, int side, double zoom) {
        this.sheet = sheet;
        this.view = view;
        this.zoom = zoom;
        double widths = LARGEST_WIDTHS * view.pattern().spotSigma();
        this.largest =
                Math.max(LEAST_ON_SCREEN / zoom, Math.min(MarkSize.largest(spacing(view, side), side, zoom), widths));
    }

    static void draw(MarkSheet sheet, MeasuredView view, int width, int height, double zoom) {
        MeasuredMarks marks = new MeasuredMarks(sheet, view, Math.max(width, height), zoom);
        marks.hidden();
        marks.spots();
        marks.centre();
        marks.vectors();
    }

    private static double spacing(MeasuredView view, int side) {
        if (view.net() instanceof SpotNet.Net net) {
            return net.lengthA().value();
        }
        return view.net() instanceof SpotNet.SystematicRow row ? row.spacing().value() : side / 12.0;
    }

    private void hidden() {
        view.hidden().ifPresent(outline -> sheet.add((Roi) outline.clone(), MarkStyle.HIDDEN, "hidden area"));
    }

    private void spots() {
        List<MeasuredSpot> spots = view.pattern().spots();
        Set<MeasuredSpot> off = new HashSet<>(view.net().offNet());
        double strongest =
                spots.stream().mapToDouble(MeasuredSpot::intensity).max().orElse(1);
        for (MeasuredSpot spot : spots) {
            double size = size(spot, strongest);
            if (off.contains(spot)) {
                sheet.add(MarkShapes.diamond(spot.position(), 1.2 * size), MarkStyle.UNEXPLAINED, "spot off the net");
            } else {
                sheet.add(MarkShapes.square(spot.position(), size), MarkStyle.MEASURED, "measured spot");
            }
            if (view.pattern().isByHand(spot)) {
                sheet.add(MarkShapes.square(spot.position(), BY_HAND * size), MarkStyle.MEASURED, "spot by hand");
            }
        }
    }

    private double size(MeasuredSpot spot, double strongest) {
        double part = spot.intensity() > 0 ? 1 + Math.log10(spot.intensity() / strongest) / DECADES : 0;
        double clipped = Math.min(1, Math.max(0, part));
        double least = Math.max(SMALLEST_PART * largest, WIDTHS * view.pattern().spotSigma());
        return least + clipped * Math.max(0.5 * least, largest - least);
    }

    private void centre() {
        view.pattern().centre().or(view.net()::refinedCentre).ifPresent(this::cross);
    }

    private void cross(PatternCentre centre) {
        sheet.add(MarkShapes.cross(centre.position(), 1.3 * largest), MarkStyle.CENTRE, "centre");
        double error = 2 * centre.error();
        if (error > 0.4 * largest) {
            sheet.add(MarkShapes.ring(centre.position(), error), MarkStyle.CENTRE, "centre error");
        }
    }

    private void vectors() {
        if (view.net() instanceof SpotNet.Net net) {
            vector(net.centre().position(), net.a(), "a");
            vector(net.centre().position(), net.b(), "b");
        } else if (view.net() instanceof SpotNet.SystematicRow row) {
            vector(row.centre().position(), row.step(), "a");
        }
    }

    private void vector(PixelPoint centre, Vector2 vector, String name) {
        PixelPoint end = centre.plus(vector);
        double length = vector.norm();
        double from = Math.min(0.4, 0.9 * largest / length);
        double to = Math.max(0.6, 1 - 0.8 * largest / length);
        double head = Math.min(0.25 * length, 8 / zoom);
        sheet.add(
                MarkShapes.arrow(MarkShapes.between(centre, end, from), MarkShapes.between(centre, end, to), head),
                MarkStyle.NET,
                "net vector " + name);
        double letters =
                MarkSize.letters(Math.max(view.pattern().width(), view.pattern().height()), zoom);
        PixelPoint middle = MarkShapes.between(centre, end, 0.55);
        Vector2 aside = new Vector2(-vector.y(), vector.x()).times(0.9 * letters / length);
        sheet.letters(name, middle.x() + aside.x(), middle.y() + aside.y(), letters, "name of " + name);
    }
}
