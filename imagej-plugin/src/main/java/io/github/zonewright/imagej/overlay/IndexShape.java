package io.github.zonewright.imagej.overlay;

import java.awt.Font;
import java.awt.Shape;
import java.awt.font.FontRenderContext;
import java.awt.font.GlyphVector;
import java.awt.geom.AffineTransform;
import java.awt.geom.Path2D;
import java.awt.geom.Rectangle2D;
import java.util.List;
import java.util.stream.IntStream;

/** Indices and other text as drawn letters, with the bars above the negative ones drawn too: fonts place combining bars badly. */
final class IndexShape {
    private static final Font FONT = new Font(Font.SANS_SERIF, Font.PLAIN, 100);
    private static final FontRenderContext CONTEXT = new FontRenderContext(null, true, true);
    private static final double DIGIT_HEIGHT =
            FONT.createGlyphVector(CONTEXT, "0").getVisualBounds().getHeight();

    /** The digits from 0 to 9, shaped once: a drag draws hundreds of labels anew. */
    private static final List<Digit> DIGITS =
            IntStream.range(0, 10).mapToObj(IndexShape::digit).toList();

    private record Digit(Shape outline, double advance) {}

    private IndexShape() {}

    private static Digit digit(int number) {
        GlyphVector glyphs = FONT.createGlyphVector(CONTEXT, Integer.toString(number));
        return new Digit(glyphs.getOutline(), glyphs.getLogicalBounds().getWidth());
    }

    /** The letters of a reflection's three or four indices with digits of this height, somewhere near the origin. */
    static Shape of(int[] indices, double digitHeight) {
        boolean wide = IndexLabel.isWide(indices);
        Path2D path = new Path2D.Double();
        double x = 0;
        for (int index : indices) {
            double advance = 0;
            for (char c : Integer.toString(Math.abs(index)).toCharArray()) {
                Digit digit = DIGITS.get(c - '0');
                path.append(
                        digit.outline().getPathIterator(AffineTransform.getTranslateInstance(x + advance, 0)), false);
                advance += digit.advance();
            }
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
