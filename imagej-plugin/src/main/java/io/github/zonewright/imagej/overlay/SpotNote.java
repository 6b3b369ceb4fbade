package io.github.zonewright.imagej.overlay;

import ij.ImagePlus;
import ij.gui.ImageCanvas;
import io.github.zonewright.image.PixelPoint;
import java.awt.Shape;
import java.awt.geom.AffineTransform;
import java.awt.geom.Path2D;
import java.awt.geom.Rectangle2D;
import java.util.List;

/**
 * A small box beside a spot, with its indices and what else is to be read. It goes as soon as the pattern is drawn anew.
 *
 * @param at the spot, in px
 * @param indices its three or four indices; none for a spot without
 * @param lines what stands beneath them
 */
public record SpotNote(PixelPoint at, int[] indices, List<String> lines) {
    private static final double LINE = 1.75;
    private static final double AWAY = 1.6;

    /** Copies what can change. */
    public SpotNote {
        indices = indices.clone();
        lines = List.copyOf(lines);
    }

    @Override
    public int[] indices() {
        return indices.clone();
    }

    /**
     * The note in one line, with the indices in plain text.
     *
     * @return for example {@code 11̅1; d 2.087 Å; not measured}
     */
    public String text() {
        String rest = String.join("; ", lines);
        return indices.length == 0 ? rest : IndexLabel.joined(indices) + "; " + rest;
    }

    /**
     * Draws it in place of any other on the current slice.
     *
     * @param image the image
     */
    public void show(ImagePlus image) {
        ImageCanvas canvas = image.getCanvas();
        double zoom = canvas == null ? 1 : canvas.getMagnification();
        double height = MarkSize.letters(Math.max(image.getWidth(), image.getHeight()), zoom);
        Shape text = letters(height);
        Rectangle2D box = text.getBounds2D();
        double away = AWAY * height;
        double left = at.x() + away;
        if (left + box.getWidth() + height > image.getWidth()) {
            left = at.x() - away - box.getWidth();
        }
        double top = at.y() - away - box.getHeight();
        if (top < height) {
            top = at.y() + away;
        }
        MarkSheet sheet = new MarkSheet();
        sheet.letters(
                AffineTransform.getTranslateInstance(left - box.getX(), top - box.getY())
                        .createTransformedShape(text),
                "spot note",
                MarkStyle.NOTE);
        PatternOverlay.showNote(image, sheet.all());
    }

    /**
     * Takes the note on the current slice away, if there is one.
     *
     * @param image the image
     */
    public static void clear(ImagePlus image) {
        PatternOverlay.showNote(image, List.of());
    }

    private Shape letters(double height) {
        Path2D all = new Path2D.Double();
        double y = 0;
        if (indices.length > 0) {
            all.append(IndexShape.of(indices, height), false);
            y += LINE * height;
        }
        for (String line : lines) {
            all.append(
                    AffineTransform.getTranslateInstance(0, y).createTransformedShape(IndexShape.of(line, height)),
                    false);
            y += LINE * height;
        }
        return all;
    }
}
