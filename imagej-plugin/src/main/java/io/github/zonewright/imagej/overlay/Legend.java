package io.github.zonewright.imagej.overlay;

import ij.gui.Roi;
import io.github.zonewright.geometry.Vector2;
import io.github.zonewright.image.PixelPoint;
import java.awt.Color;
import java.awt.Rectangle;
import java.awt.Shape;
import java.awt.geom.AffineTransform;
import java.awt.geom.Rectangle2D;
import java.util.ArrayList;
import java.util.List;

/** A box at the lower left corner of what is seen, that says what the shapes mean: those that are on the image, and no others. */
final class Legend {
    private static final Color GROUND = new Color(0, 0, 0, 200);
    private static final double ROW = 2.1;

    /** A shape and what it means. */
    private record Row(MarkStyle style, String text) {}

    private Legend() {}

    static List<Roi> of(PatternView view, double letters, Rectangle seen) {
        List<Row> rows = rows(view);
        List<Shape> texts =
                rows.stream().map(row -> IndexShape.of(row.text(), letters)).toList();
        double widest =
                texts.stream().mapToDouble(t -> t.getBounds2D().getMaxX()).max().orElse(0);
        double tall = (ROW * rows.size() + 0.6) * letters;
        double left = seen.getX() + letters;
        double top = seen.getMaxY() - letters - tall;
        Roi ground = new Roi(left, top, widest + 4 * letters, tall);
        ground.setFillColor(GROUND);
        ground.setName("legend");
        ground.setProperty(PatternOverlay.PROPERTY, MarkStyle.LEGEND.key());
        MarkSheet sheet = new MarkSheet();
        for (int i = 0; i < rows.size(); i++) {
            double y = top + (ROW * (i + 0.5) + 0.3) * letters;
            MarkStyle style = rows.get(i).style();
            sheet.add(shape(style, new PixelPoint(left + 1.5 * letters, y), 1.3 * letters), style, "legend");
            Rectangle2D box = IndexShape.of("0", letters).getBounds2D();
            sheet.bareLetters(
                    AffineTransform.getTranslateInstance(left + 3 * letters, y - box.getCenterY())
                            .createTransformedShape(texts.get(i)),
                    rows.get(i).text(),
                    MarkStyle.LEGEND);
        }
        List<Roi> all = new ArrayList<>(List.of(ground));
        all.addAll(sheet.all());
        return all;
    }

    private static List<Row> rows(PatternView view) {
        List<Row> rows = new ArrayList<>(List.of(
                new Row(MarkStyle.CENTRE, "centre, line to the reference"), new Row(MarkStyle.COMPUTED, "computed")));
        if (view.computed().stream().anyMatch(s -> Marks.isUpper(view, s))) {
            rows.add(new Row(MarkStyle.UPPER, "computed, upper layer"));
        }
        if (!view.missing().isEmpty()) {
            rows.add(new Row(MarkStyle.MISSING, "strong, not measured"));
        }
        if (!view.unexplained().isEmpty()) {
            rows.add(new Row(MarkStyle.UNEXPLAINED, "measured, not explained"));
        }
        if (!view.extras().doubled().isEmpty()) {
            rows.add(new Row(MarkStyle.DOUBLED, "double diffraction"));
        }
        if (view.extras().residuals().isPresent()) {
            rows.add(new Row(MarkStyle.RESIDUAL, "computed to measured, enlarged"));
        }
        if (view.extras().has(ShownMarks.LAUE_CIRCLE)) {
            rows.add(new Row(MarkStyle.LAUE, "Laue circle"));
        }
        return rows;
    }

    private static Roi shape(MarkStyle style, PixelPoint at, double size) {
        return switch (style) {
            case CENTRE -> MarkShapes.cross(at, size);
            case UPPER -> MarkShapes.star(at, size);
            case MISSING -> MarkShapes.triangle(at, size);
            case UNEXPLAINED -> MarkShapes.diamond(at, size);
            case DOUBLED -> MarkShapes.square(at, 0.9 * size);
            case RESIDUAL ->
                MarkShapes.arrow(
                        at.plus(new Vector2(-0.6 * size, 0.3 * size)),
                        at.plus(new Vector2(0.6 * size, -0.3 * size)),
                        0.4 * size);
            case LAUE -> MarkShapes.ring(at, 1.3 * size);
            default -> MarkShapes.ring(at, size);
        };
    }
}
