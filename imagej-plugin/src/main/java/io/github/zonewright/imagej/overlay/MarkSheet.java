package io.github.zonewright.imagej.overlay;

import ij.gui.Roi;
import ij.gui.ShapeRoi;
import java.awt.Color;
import java.awt.Shape;
import java.awt.geom.AffineTransform;
import java.awt.geom.Rectangle2D;
import java.util.ArrayList;
import java.util.List;
import java.util.stream.Stream;

/** The ROIs of one drawing: dark lines beneath, light lines over them, then letters on their plates. */
final class MarkSheet {
    private final List<Roi> fills = new ArrayList<>();
    private final List<Roi> halos = new ArrayList<>();
    private final List<Roi> lines = new ArrayList<>();
    private final List<Roi> plates = new ArrayList<>();
    private final List<Roi> letters = new ArrayList<>();

    /** Draws a light line over a dark one. */
    void add(Roi roi, MarkStyle style, String name) {
        Roi halo = (Roi) roi.clone();
        Marks.stroke(halo, style, name + " halo", MarkStyle.HALO, MarkStyle.HALO_LINE);
        Marks.stroke(roi, style, name, style.colour(), MarkStyle.LINE);
        halos.add(halo);
        lines.add(roi);
    }

    /** Fills letters light on a dark plate. */
    void letters(Shape text, String name) {
        letters(text, name, MarkStyle.LABEL);
    }

    /** The same as a mark of another kind. */
    void letters(Shape text, String name, MarkStyle style) {
        Rectangle2D room = text.getBounds2D();
        double margin = 0.08 * room.getHeight();
        Roi plate = new Roi(
                room.getX() - 2 * margin,
                room.getY() - margin,
                room.getWidth() + 4 * margin,
                room.getHeight() + 2 * margin);
        fill(plate, style, name + " ground", MarkStyle.PLATE, plates);
        bareLetters(text, name, style);
    }

    /** Fills letters that stand on a ground of their own. */
    void bareLetters(Shape text, String name, MarkStyle style) {
        fill(new ShapeRoi(text), style, name, style.colour(), letters);
    }

    /** Fills a shape without an outline, beneath all lines. */
    void fill(Roi roi, MarkStyle style, String name, Color colour) {
        fill(roi, style, name, colour, fills);
    }

    private static void fill(Roi roi, MarkStyle style, String name, Color colour, List<Roi> layer) {
        roi.setFillColor(colour);
        roi.setName(name);
        roi.setProperty(PatternOverlay.PROPERTY, style.key());
        layer.add(roi);
    }

    /** Fills letters whose middle is at a point. */
    void letters(String text, double x, double y, double height, String name) {
        Shape shape = IndexShape.of(text, height);
        Rectangle2D box = shape.getBounds2D();
        letters(
                AffineTransform.getTranslateInstance(x - box.getCenterX(), y - box.getCenterY())
                        .createTransformedShape(shape),
                name);
    }

    /** All of them in the order in which they are to be drawn. */
    List<Roi> all() {
        return Stream.of(fills, halos, lines, plates, letters)
                .flatMap(List::stream)
                .toList();
    }
}
