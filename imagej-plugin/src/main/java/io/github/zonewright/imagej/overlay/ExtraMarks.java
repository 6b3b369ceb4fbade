package io.github.zonewright.imagej.overlay;

import ij.gui.PolygonRoi;
import ij.gui.Roi;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.indexing.ResidualPlot;
import io.github.zonewright.pattern.LaueCircle;
import io.github.zonewright.pattern.Placement;
import java.awt.Rectangle;
import java.awt.Shape;
import java.awt.geom.AffineTransform;
import java.awt.geom.Rectangle2D;

/** What is drawn about a pattern beyond its spots: forbidden spots, Laue circle, scale bar, residuals. */
final class ExtraMarks {
    private static final double DOUBLED_ON_SCREEN = 8;

    /** The scale bar is at most such a part of the width that is seen. */
    private static final double WIDEST = 0.22;

    private static final double ANGSTROMS_PER_NANOMETRE = 10;

    private static final double HEAD_ON_SCREEN = 5;

    /** A shorter arrow is a dot alone. */
    private static final double SHORTEST_ON_SCREEN = 3;

    private final MarkSheet sheet;
    private final double letters;
    private final double zoom;
    private final Rectangle seen;

    private ExtraMarks(MarkSheet sheet, double letters, double zoom, Rectangle seen) {
        this.sheet = sheet;
        this.letters = letters;
        this.zoom = zoom;
        this.seen = seen;
    }

    /** Draws them; residuals only left of an edge, where the image is bare. */
    static void draw(MarkSheet sheet, PatternView view, int longer, double zoom, Rectangle seen, double edge) {
        if (view.placement().isEmpty()) {
            return;
        }
        ExtraMarks marks = new ExtraMarks(sheet, MarkSize.letters(longer, zoom), zoom, seen);
        Placement placement = view.placement().get();
        PatternExtras extras = view.extras();
        double side = Math.max(longer / 90.0, DOUBLED_ON_SCREEN / zoom);
        extras.doubled().forEach(p -> sheet.add(MarkShapes.square(p, side), MarkStyle.DOUBLED, "double diffraction"));
        if (extras.has(ShownMarks.LAUE_CIRCLE)) {
            LaueCircle.of(placement).ifPresent(marks::laue);
        }
        if (extras.has(ShownMarks.SCALE_BAR)) {
            marks.bar(placement.camera().constant(), extras.nanometres());
        }
        extras.residuals().ifPresent(plot -> marks.residuals(plot, edge));
    }

    /** Arrows, and at the upper left corner of what is seen an arrow of known length. */
    private void residuals(ResidualPlot plot, double edge) {
        for (ResidualPlot.Arrow arrow : plot.arrows()) {
            if (arrow.from().x() < edge) {
                arrow(arrow.from(), arrow.to(), "residual");
            }
        }
        Shape text =
                IndexShape.of("residual × " + plain(plot.factor()) + "; bar = " + plain(plot.bar()) + " px", letters);
        double left = seen.getX() + 2 * letters;
        double top = seen.getY() + 2 * letters;
        PixelPoint from = new PixelPoint(left, top + 2.4 * letters);
        arrow(from, new PixelPoint(left + plot.barLength(), from.y()), "bar of the residuals");
        Rectangle2D box = text.getBounds2D();
        sheet.letters(
                AffineTransform.getTranslateInstance(left - box.getMinX(), top - box.getMinY())
                        .createTransformedShape(text),
                "scale of the residuals",
                MarkStyle.RESIDUAL);
    }

    private void arrow(PixelPoint from, PixelPoint to, String name) {
        double length = from.distanceTo(to);
        if (length * zoom < SHORTEST_ON_SCREEN) {
            sheet.add(MarkShapes.ring(from, 1 / zoom), MarkStyle.RESIDUAL, name);
        } else {
            double head = Math.min(HEAD_ON_SCREEN / zoom, 0.5 * length);
            sheet.add(MarkShapes.arrow(from, to, head), MarkStyle.RESIDUAL, name);
        }
    }

    private void laue(LaueCircle circle) {
        sheet.add(MarkShapes.closed(circle.outline()), MarkStyle.LAUE, "Laue circle");
        sheet.add(
                MarkShapes.ring(circle.centre(), DOUBLED_ON_SCREEN / zoom),
                MarkStyle.LAUE,
                "centre of the Laue circle");
    }

    /** At the lower right corner of what is seen. */
    private void bar(double constant, boolean nanometres) {
        double unit = nanometres ? constant / ANGSTROMS_PER_NANOMETRE : constant;
        double number = round(WIDEST * seen.getWidth() / unit);
        double length = number * unit;
        double right = seen.getMaxX() - 2 * letters;
        double bottom = seen.getMaxY() - 2 * letters;
        double tick = 0.5 * letters;
        PixelPoint[] way = {
            new PixelPoint(right - length, bottom - tick),
            new PixelPoint(right - length, bottom),
            new PixelPoint(right, bottom),
            new PixelPoint(right, bottom - tick)
        };
        float[] x = new float[way.length];
        float[] y = new float[way.length];
        for (int i = 0; i < way.length; i++) {
            x[i] = (float) (way[i].x() - 0.5);
            y[i] = (float) (way[i].y() - 0.5);
        }
        Roi line = new PolygonRoi(x, y, Roi.POLYLINE);
        sheet.add(line, MarkStyle.SCALE, "scale bar");
        String text = plain(number) + (nanometres ? " 1/nm" : " 1/Å");
        Shape shape = IndexShape.of(text, letters);
        Rectangle2D box = shape.getBounds2D();
        double middle = Math.min(right - length / 2, seen.getMaxX() - letters - box.getWidth() / 2);
        sheet.letters(
                AffineTransform.getTranslateInstance(middle - box.getCenterX(), bottom - 1.1 * letters - box.getMaxY())
                        .createTransformedShape(shape),
                "length of the scale bar",
                MarkStyle.SCALE);
    }

    /** The largest of 1, 2, 5 times a power of ten that is not above a number. */
    static double round(double most) {
        double power = Math.pow(10, Math.floor(Math.log10(most)));
        double part = most / power;
        return (part >= 5 ? 5 : part >= 2 ? 2 : 1) * power;
    }

    private static String plain(double number) {
        return new java.math.BigDecimal(number)
                .round(new java.math.MathContext(3))
                .stripTrailingZeros()
                .toPlainString();
    }
}
