package io.github.zonewright.imagej.overlay;

import java.awt.Font;
import java.awt.Shape;
import java.awt.font.FontRenderContext;
import java.awt.font.GlyphVector;
import java.awt.geom.AffineTransform;
import java.awt.geom.Path2D;
import java.awt.geom.Rectangle2D;

/** Indices and other text as drawn letters, with the bars above the negative ones drawn too: fonts place combining bars badly. */
final class IndexShape {
    private static final Font FONT = new Font(Font.SANS_SERIF, Font.PLAIN, 100);
    private static final FontRenderContext CONTEXT = new FontRenderContext(null, true, true);
    private static final double DIGIT_HEIGHT =
            FONT.createGlyphVector(CONTEXT, "0").getVisualBounds().getHeight();

    private IndexShape() {}

    /** The letters of a reflection's three or four indices with digits of this height, somewhere near the origin. */
    static Shape of(int[] indices, double digitHeight) {
        boolean wide = IndexLabel.isWide(indices);
        Path2D path = new Path2D.Double();
        double x = 0;
        for (int index : indices) {
            GlyphVector glyphs = FONT.createGlyphVector(CONTEXT, Integer.toString(Math.abs(index)));
            double advance = glyphs.getLogicalBounds().getWidth();
            path.append(glyphs.getOutline((float) x, 0), false);
            if (index < 0) {
                double margin = 0.1 * DIGIT_HEIGHT;
                path.append(
                        new Rectangle2D.Double(
                                x + margin, -1.32 * DIGIT_HEIGHT, advance - 2 * margin, 0.13 * DIGIT_HEIGHT),
                        false);
            }
            x += advance + (wide ? 0.6 : 0.12) * DIGIT_HEIGHT;
        }
        return scaled(path, digitHeight);
    }

    /** The letters of any text. */
    static Shape of(String text, double digitHeight) {
        return scaled(FONT.createGlyphVector(CONTEXT, text).getOutline(), digitHeight);
    }

    private static Shape scaled(Shape path, double digitHeight) {
        double scale = digitHeight / DIGIT_HEIGHT;
        return AffineTransform.getScaleInstance(scale, scale).createTransformedShape(path);
    }
}
