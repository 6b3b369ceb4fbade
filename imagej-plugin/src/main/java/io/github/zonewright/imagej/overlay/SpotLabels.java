package io.github.zonewright.imagej.overlay;

import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.pattern.PlacedSpot;
import java.awt.Shape;
import java.awt.geom.AffineTransform;
import java.awt.geom.Rectangle2D;
import java.util.ArrayList;
import java.util.List;

/**
 * Indices beneath the spots: the strongest first, and none where it would cover another. Each is a shape of the drawn
 * letters, filled light on a dark plate, so that it can be read on any ground.
 */
final class SpotLabels {
    private static final int MOST = 120;
    private static final double BELOW = 0.75;

    private SpotLabels() {}

    /** Letters that begin so far below the middle of a spot's ring of this diameter. */
    static double below(double diameter) {
        return BELOW * diameter;
    }

    /**
     * The indices of a spot.
     *
     * @param spot the spot
     * @param letters their shape, its upper edge in the middle at the origin
     * @param x where the origin comes to lie
     * @param y where the origin comes to lie
     */
    record Label(PlacedSpot spot, Shape letters, double x, double y) {
        Shape placed() {
            return AffineTransform.getTranslateInstance(x, y).createTransformedShape(letters);
        }
    }

    /** Adds the labels of a view. */
    static void place(MarkSheet sheet, PatternView view, MarkSize size, int width, int height) {
        for (Label label : of(view, size, width, height)) {
            sheet.letters(label.placed(), "indices " + label.spot().spot().hkl());
        }
    }

    /** The labels of a view. */
    static List<Label> of(PatternView view, MarkSize size, int width, int height) {
        Rectangle2D frame = new Rectangle2D.Double(0, 0, width, height);
        List<Rectangle2D> taken = new ArrayList<>();
        List<Label> labels = new ArrayList<>();
        Crystal crystal = view.placement().orElseThrow().crystal();
        for (PlacedSpot spot : view.computed()) {
            Shape text = IndexShape.of(IndexLabel.shown(spot.spot().hkl(), crystal), size.letters());
            Rectangle2D box = text.getBounds2D();
            Shape letters = AffineTransform.getTranslateInstance(-box.getCenterX(), -box.getMinY())
                    .createTransformedShape(text);
            Label label = new Label(
                    spot, letters, spot.position().x(), spot.position().y() + below(size.of(spot)));
            Rectangle2D room = label.placed().getBounds2D();
            if (frame.contains(room) && taken.stream().noneMatch(room::intersects)) {
                taken.add(room);
                labels.add(label);
            }
            if (labels.size() == MOST) {
                break;
            }
        }
        return labels;
    }
}
